import { studentTQuantile } from "../../numerics/distributions.ts";
import type { Candidate } from "../candidate.ts";

/** Level of the test. */
const LEVEL = 0.01;

const criticalValues: number[] = [];

/** t^2 exceeded with probability {@link LEVEL}; kept, as few degrees of freedom occur. */
function criticalValue(degreesOfFreedom: number): number {
  criticalValues[degreesOfFreedom] ??= studentTQuantile(1 - LEVEL / 2, degreesOfFreedom) ** 2;
  return criticalValues[degreesOfFreedom];
}

/**
 * Why a two-coefficient model cannot follow the points, if it cannot: the bend that a third coefficient would take up
 * exceeds what the scatter explains at the 1 % level (F test with 1 and d degrees of freedom).
 *
 * AICc estimates the scatter from the residuals of each model alone. With six points its correction lets a third
 * coefficient pass only if it removes 99.3 % of the residual sum of squares; the scatter of the same sources in other
 * systems says much sooner that a straight line does not fit.
 * @param largest fit of the largest admissible model to the same points under the same covariance
 * @param degreesOfFreedom d, of the scatter within sources that the covariance holds
 */
export function lackOfCurvature(
  candidate: Candidate,
  largest: Candidate,
  degreesOfFreedom: number,
): string | undefined {
  if (candidate.parameterCount >= largest.parameterCount) return undefined;
  const bend = candidate.residualSumOfSquares - largest.residualSumOfSquares;
  if (bend <= criticalValue(degreesOfFreedom)) return undefined;
  return `does not follow the bend of the points: F = ${bend.toFixed(1)} against ${criticalValue(degreesOfFreedom).toFixed(1)} at the 1 % level`;
}
