import { centredValue } from "../curves/linear-models.ts";
import type { Candidate } from "./candidate.ts";
import { curveVariances, type Variance } from "./curve-variances.ts";
import { limitFactor } from "./limit-factor.ts";
import type { CurveContext, FittedModels } from "./system-models.ts";

/** 95 % limits of a curve as half-widths about the published curve. */
export interface CurveLimits {
  /** In ln value: of the curve, and of a new measurement from a new source. */
  readonly halfWidths: (temperatureK: number) => { readonly curve: number; readonly newMeasurement: number };
  /** In d ln value/dT, 1/K. */
  readonly slopeHalfWidth: (temperatureK: number) => number;
}

/**
 * Limits of a published curve, from the largest admissible model whatever model was chosen.
 *
 * The half-width is t sqrt(V + d^2): V and the degrees of freedom of t from {@link curveVariances}, d the distance between
 * the published curve and that model, which stands for the bias of the choice.
 */
export function curveLimits(fitted: FittedModels, chosen: Candidate, { scales }: CurveContext): CurveLimits {
  const { points, scale, largest, betweenDegreesOfFreedom } = fitted;
  const { model, coefficients, centreK } = largest;
  const variances = curveVariances(largest, {
    withinDegreesOfFreedom: scale.degreesOfFreedom,
    betweenVariance: scale.betweenVariance,
    betweenDegreesOfFreedom,
    sharedVariance: points.sharedVariance.reduce((sum, one) => sum + one / points.sharedVariance.length, 0),
    newSourceVariance: scale.varianceFactor * newSourceVariance(fitted, scales.within),
    oneSource: points.sources.length === 1,
  });
  const half = (variance: Variance, bias: number): number =>
    limitFactor(variance.degreesOfFreedom) * Math.sqrt(variance.value + bias);
  return {
    halfWidths: (T) => {
      const bias = (chosen.lnValue(T) - centredValue(model, coefficients, T, centreK)) ** 2;
      const curve = half(variances.ofCurve(T), bias);
      // More variance means more degrees of freedom too: at very few points the factor could fall faster than it grows.
      return { curve, newMeasurement: Math.max(curve, half(variances.ofNewMeasurement(T), bias)) };
    },
    slopeHalfWidth: (T) => half(variances.ofSlope(T), 0),
  };
}

/**
 * Expected variance of a measurement by a source not yet seen: the mean over the edition's sources, raised as those of
 * this system are (a value near a detection limit scatters more for everybody).
 */
function newSourceVariance({ points, common, expectedVariance }: FittedModels, pooledWithin: Float64Array): number {
  let edition = 0;
  for (const sd of pooledWithin) edition += (sd * sd) / pooledWithin.length;
  let shape = 0;
  points.sources.forEach((source, b) => {
    shape += (common.within[b]! / pooledWithin[source]!) ** 2 / points.sources.length;
  });
  const raised = edition * shape;
  return raised > 0 && raised < Number.POSITIVE_INFINITY ? raised : expectedVariance;
}
