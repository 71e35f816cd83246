import { firstOrderCaution, firstOrderDeviation } from "../bases/first-order.ts";
import { linkOf } from "../bases/link.ts";
import { amplificationCaution, concentrationAmplification } from "../bases/solution-density.ts";
import { isPerSolutionVolume } from "../bases/steps.ts";
import { standardFromRelative } from "../bases/unit.ts";
import type { UnitContext } from "./unit-context.ts";

/** Below this relative uncertainty of r the bending of a conversion cannot reach 5 % of it, so it is not looked at. */
const SMALL = 0.15;

/**
 * What weakens a row's value or its uncertainty, in words: a density error amplified beyond use (ask for a weighed
 * value), and a first-order uncertainty that misses by more than 5 % because the conversion bends within it. Undefined or
 * empty where nothing does.
 *
 * @param relative relative standard uncertainty of the basis quantity [1]   @param r g/g
 */
export function rowCautions(
  { unit, soluteBasis, converter, liquor }: UnitContext,
  value: number,
  relative: number,
  r: number,
): string | undefined {
  const rich = r > 1;
  const wide = Math.abs(converter.valueElasticity(r)) * relative > SMALL;
  if (!rich && !wide) return undefined;
  const link = linkOf(unit.basis, soluteBasis);
  const amplification = isPerSolutionVolume(link) ? concentrationAmplification(r) : undefined;
  const u = standardFromRelative(unit.scale, value, relative);
  const deviation = wide ? firstOrderDeviation(unit, value, u, link, liquor.needs) : 0;
  const cautions = [amplificationCaution(amplification), firstOrderCaution(deviation)];
  return cautions.filter((text) => text !== undefined).join("; ");
}
