import type { Link } from "./link.ts";
import type { Needs } from "./needs.ts";
import { quantityFromValue, relativeFromStandard, type Unit } from "./unit.ts";

/** Above this relative error a first-order uncertainty should not be stated without saying so. */
export const firstOrderTolerance = 0.05;

/**
 * How far first-order propagation of a value's normal error misses the standard deviation of r because the conversion
 * bends within it: SD/first order - 1 [1], by three-point Gauss-Hermite quadrature at the value and at sqrt(3) u on
 * either side. Infinity where the uncertainty reaches values that are impossible.
 *
 * Linear bases give 0; -ln x with u = 0.3 gives 0.07.
 * @see Abramowitz and Stegun, Handbook of Mathematical Functions, table 25.10.
 */
export function firstOrderDeviation(
  unit: Unit,
  value: number,
  standardUncertainty: number,
  link: Link,
  needs: Needs,
): number {
  if (standardUncertainty === 0) return 0;
  const reach = Math.sqrt(3) * standardUncertainty;
  const r = link.toHub(quantityFromValue(unit.scale, value), needs);
  const above = link.toHub(quantityFromValue(unit.scale, value + reach), needs) - r;
  const below = link.toHub(quantityFromValue(unit.scale, value - reach), needs) - r;
  const variance = (above * above + below * below) / 6 - ((above + below) / 6) ** 2;
  const relative = relativeFromStandard(unit.scale, value, standardUncertainty);
  const firstOrder = Math.abs(r * link.valueElasticity(r, needs) * relative);
  return Number.isNaN(variance) ? Number.POSITIVE_INFINITY : Math.sqrt(variance) / firstOrder - 1;
}

/** The words that go with a deviation beyond the tolerance, or undefined. */
export function firstOrderCaution(deviation: number): string | undefined {
  if (Math.abs(deviation) <= firstOrderTolerance) return undefined;
  if (deviation === Number.POSITIVE_INFINITY) return "the uncertainty of the value reaches values that are impossible";
  const percent = Number((100 * Math.abs(deviation)).toPrecision(2));
  return `first-order uncertainty is too ${deviation > 0 ? "small" : "large"} by about ${percent} %: the conversion bends within it`;
}
