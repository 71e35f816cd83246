import { fQuantile } from "../../numerics/distributions.ts";
import { limitFactor } from "../limit-factor.ts";
import {
  type BestBreak,
  bestBreak,
  brokenDegreesOfFreedom,
  brokenVariance,
  type Sense,
  slopeChange,
} from "./break-bootstrap.ts";
import {
  type BreakPoints,
  type BreakScan,
  type BreakSearch,
  breakScan,
  distinctTemperatures,
  inner,
} from "./break-scan.ts";

/** Where a break lies, K, with 95 % limits. */
export interface BreakProfile {
  readonly breakK: number;
  readonly lowK: number;
  readonly highK: number;
}

/** Positions over all temperatures for the estimate and, more of them, for its limits; and about the best one. */
const [POSITIONS, LIMIT_POSITIONS, FINE_POSITIONS] = [200, 600, 20];
/** Level at which the points must ask for more curvature in one branch than is usual. */
const CURVATURE_LEVEL = 0.01;

/**
 * Limits of the temperature of a break by profile likelihood: all temperatures at which the residual sum of squares of the
 * broken model exceeds the least by no more than t^2 s^2, with s^2 and its degrees of freedom as in the test. Two distinct
 * temperatures on either side are enough for a limit, so that one is not cut short by what an estimate needs; the limits
 * are the outermost temperatures where the profile stays below, whatever lies between.
 *
 * The test holds the change of curvature at the break near what is usual. A hydrate that dissolves to a concentrated
 * electrolyte bends far more than that, and a branch kept too stiff misplaces the break: where the fall of the residual sum
 * of squares asks for it, F(1, v) at the 1 % level, the curvature of either branch is free.
 *
 * @param side distinct temperatures that the estimate needs on either side
 * @param curvature "usual" holds the change of curvature whatever the points ask for
 * @returns undefined where no position gives a break of this sense
 * @see Venzon and Moolgavkar, Appl. Stat. 37 (1988) 87-94; for broken lines Hinkley, J. Am. Stat. Assoc. 66 (1971) 736-743.
 */
export function breakProfile(
  points: BreakPoints,
  sense: Sense,
  side: number,
  curvature: "as asked for" | "usual" = "as asked for",
): BreakProfile | undefined {
  const distinct = distinctTemperatures(points);
  const perGap = (positions: number) => Math.max(2, Math.round(positions / Math.max(1, distinct.length)));
  const search = { side, perGap: perGap(POSITIONS) };
  const held = bestOf(points, search, sense);
  if (held === undefined) return undefined;
  const free = curvature === "usual" ? undefined : bestOf(points, { ...search, freeCurvatureChange: true }, sense);
  const freeCurvatureChange = free !== undefined && asksForCurvature(points.n, held, free);
  const estimate = freeCurvatureChange ? free : held;
  const { best, scan } = finer(points, { ...search, freeCurvatureChange }, sense, estimate);
  const breakK = scan.breakK[best.position]!;
  const t = limitFactor(brokenDegreesOfFreedom(points.n));
  const least = best.gain - t * t * brokenVariance(points.n, scan.smoothSum - best.gain);
  const wide = breakScan(points, { side: side - 1, perGap: perGap(LIMIT_POSITIONS), freeCurvatureChange });
  return { breakK, ...limitsOf(wide ?? scan, sense, least, breakK) };
}

interface BestOfScan {
  readonly scan: BreakScan;
  readonly best: BestBreak;
}

function bestOf(points: BreakPoints, search: BreakSearch, sense: Sense): BestOfScan | undefined {
  const scan = breakScan(points, search);
  if (scan === undefined) return undefined;
  const best = bestBreak(scan, scan.residuals, scan.smoothSum, sense);
  return best.position < 0 ? undefined : { scan, best };
}

/** Whether the points fall nearer the broken curve with the change of curvature free than one more coefficient explains. */
function asksForCurvature(n: number, held: BestOfScan, free: BestOfScan): boolean {
  const left = free.scan.smoothSum - free.best.gain;
  const fall = held.scan.smoothSum - held.best.gain - left;
  return fall / brokenVariance(n, left) > fQuantile(1 - CURVATURE_LEVEL, 1, brokenDegreesOfFreedom(n));
}

/** The best break among positions close about it: where the best lies between two of the first. */
function finer(points: BreakPoints, search: BreakSearch, sense: Sense, coarse: BestOfScan): BestOfScan {
  const { breakK } = coarse.scan;
  const at = coarse.best.position;
  const [from, to] = [breakK[at - 1] ?? breakK[at]!, breakK[at + 1] ?? breakK[at]!];
  const alsoK = Array.from({ length: FINE_POSITIONS }, (_, i) => from + ((to - from) * i) / FINE_POSITIONS);
  const fine = bestOf(points, { ...search, perGap: 1, alsoK }, sense);
  return fine !== undefined && fine.best.gain >= coarse.best.gain ? fine : coarse;
}

/** Outermost positions at which the gain is at least `least`, K. */
function limitsOf(wide: BreakScan, sense: Sense, least: number, breakK: number): { lowK: number; highK: number } {
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
  return { lowK, highK };
}
