import { bestBreak, brokenDegreesOfFreedom, brokenVariance, type Sense, slopeChange } from "./break-bootstrap.ts";
import { type BreakPoints, breakScan, distinctTemperatures, inner } from "./break-scan.ts";
import { limitFactor } from "./limit-factor.ts";

/** Where a break lies, K, with 95 % limits. */
export interface BreakProfile {
  readonly breakK: number;
  readonly lowK: number;
  readonly highK: number;
}

/** Positions over all temperatures. */
const POSITIONS = 600;

/**
 * Limits of the temperature of a break by profile likelihood: all temperatures at which the residual sum of squares of the
 * broken model exceeds the least by no more than t^2 s^2, with s^2 and its degrees of freedom as in the test. Two distinct
 * temperatures on either side are enough for a limit, so that one is not cut short by what an estimate needs; the limits
 * are the outermost temperatures where the profile stays below, whatever lies between.
 *
 * @param side distinct temperatures that the estimate needs on either side
 * @returns undefined where no position gives a break of this sense
 * @see Venzon and Moolgavkar, Appl. Stat. 37 (1988) 87-94; for broken lines Hinkley, J. Am. Stat. Assoc. 66 (1971) 736-743.
 */
export function breakProfile(points: BreakPoints, sense: Sense, side: number): BreakProfile | undefined {
  const distinct = distinctTemperatures(points);
  const perGap = Math.max(2, Math.round(POSITIONS / Math.max(1, distinct.length)));
  const estimate = breakScan(points, { side, perGap });
  const wide = breakScan(points, { side: side - 1, perGap });
  if (estimate === undefined || wide === undefined) return undefined;
  const best = bestBreak(estimate, estimate.residuals, estimate.smoothSum, sense);
  if (best.position < 0) return undefined;
  const breakK = estimate.breakK[best.position]!;
  const t = limitFactor(brokenDegreesOfFreedom(points.n));
  const least = best.gain - t * t * brokenVariance(points.n, estimate.smoothSum - best.gain);
  let [lowK, highK] = [breakK, breakK];
  wide.breakK.forEach((T, b) => {
    const at = 2 * wide.rows * b;
    const first = inner(wide.directions, at, wide.residuals, 0, wide.rows);
    const second = inner(wide.directions, at + wide.rows, wide.residuals, 0, wide.rows);
    const change = slopeChange(wide, b, first, second);
    if (first * first + second * second < least || (sense === "falls") !== change < 0) return;
    // A position stands for its neighbourhood: half a step to either side.
    lowK = Math.min(lowK, (T + (wide.breakK[b - 1] ?? T)) / 2);
    highK = Math.max(highK, (T + (wide.breakK[b + 1] ?? T)) / 2);
  });
  return { breakK, lowK, highK };
}
