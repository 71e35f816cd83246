import { chiSquareQuantile } from "../../numerics/distributions.ts";
import type { RobustFit } from "../../records/fits.ts";
import { limitFactor } from "../limit-factor.ts";
import {
  type BestBreak,
  bestBreak,
  bootstrapBreak,
  brokenDegreesOfFreedom,
  brokenVariance,
  leastStatistic,
  type Sense,
} from "./break-bootstrap.ts";
import {
  breakSide,
  carriedByOnePoint,
  carriedByOneSource,
  LEFT_OUT_LEVEL,
  seenWithinSources,
} from "./break-carried.ts";
import { breakHint } from "./break-hint.ts";
import {
  type BreakPoints,
  type BreakScan,
  breakScan,
  type DistinctTemperature,
  distinctTemperatures,
  smoothRival,
} from "./break-scan.ts";

/** A break that the points of a system show. */
export interface FoundBreak {
  readonly sense: Sense;
  /** Temperature at which it fits best, K. */
  readonly breakK: number;
  /** p of as strong a break under one smooth curve, by parametric bootstrap. */
  readonly probability: number;
}

/** A break is published only below this probability. */
const LEVEL = 0.01;
/** Share of the usual variance so small that a system's own residuals alone tell its scatter. */
const QUIET = 0.02;
/** Statistic of a change of slope alone from which a closer look is worth its time. */
const HINT = 5;
/** Coefficients of the smooth curve that a broken one is held against. */
const RIVAL_COEFFICIENTS = 5;
/** Share of the least statistic that the search with one position a gap must reach. */
const COARSE = 0.8;
/** Positions tried over all temperatures; fewer a gap where there are many. */
const MOST_POSITIONS = 28;

/** Positions between two temperatures. */
function perGap(temperatures: number): number {
  return Math.max(1, Math.min(4, Math.round(MOST_POSITIONS / Math.max(1, temperatures - 2 * breakSide + 1))));
}

/** The kept points of a robust fit as the search for a break wants them. */
export function breakPoints(
  { points, kept, noiseSd, betweenSd }: RobustFit,
  takesPart: (point: number) => boolean = () => true,
): BreakPoints {
  let n = 0;
  const order = new Int32Array(points.n);
  for (let i = 0; i < points.n; i++) {
    const finite = points.temperatureK[i]! > 0 && Number.isFinite(points.lnValue[i]) && noiseSd[i]! > 0;
    if (kept[i] === 1 && finite && takesPart(i)) order[n++] = i;
  }
  const [temperatureK, lnValue, variance] = [new Float64Array(n), new Float64Array(n), new Float64Array(n)];
  const block = new Int32Array(n);
  const sources: number[] = [];
  for (let k = 0; k < n; k++) {
    const i = order[k]!;
    temperatureK[k] = points.temperatureK[i]!;
    lnValue[k] = points.lnValue[i]!;
    variance[k] = noiseSd[i]! ** 2;
    const known = sources.lastIndexOf(points.source[i]!);
    block[k] = known >= 0 ? known : sources.push(points.source[i]!) - 1;
  }
  return { n, temperatureK, lnValue, variance, block, nBlocks: sources.length, betweenVariance: betweenSd ** 2 };
}

/**
 * Looks for a break in the points of one system whose solid form is not specified: two branches that meet, with three
 * distinct temperatures a side. A break in which the slope falls on heating is what an equilibrium transition of the
 * solid makes; where none is found, one in which it rises.
 *
 * It must have p < 0.01 by parametric bootstrap against the smooth model with curvature (see {@link judge} for the scatter
 * assumed); follow the points better
 * than a smooth curve of as many coefficients, because tables that were smoothed by a polynomial leave residuals that
 * are no noise; and better than any break of a rising slope, else it is the curvature alone that changes; be seen
 * within sources; and still be there at the 5 % level with any one point left out, and with any one
 * source left out where the rest can show it.
 *
 * @param seed starts the random numbers of the bootstrap
 * @param knownK transitions of the solid that are listed, K: they do not lower what is asked for, but are tried as
 *   positions, and the search is made even where nothing in the points suggests it
 */
export function findBreak(points: BreakPoints, seed: number, knownK: readonly number[] = []): FoundBreak | undefined {
  const { distinct, inside, worth } = whetherToSearch(points, knownK);
  if (!worth) return undefined;
  const scan = breakScan(points, { side: breakSide, perGap: perGap(distinct.length), alsoK: inside });
  if (scan === undefined) return undefined;
  for (const sense of ["falls", "rises"] as const) {
    const found = judge(points, scan, sense, seed);
    if (found !== undefined) return found;
  }
  return undefined;
}

/**
 * Where a falling slope fits best, K, if the points or a listed transition suggest that there is one; else NaN. Claims
 * nothing.
 *
 * @param thoroughly makes the search even where a quick one finds nothing
 */
export function likelyBreak(points: BreakPoints, knownK: readonly number[], thoroughly = false): number {
  const { distinct, inside, enough, worth } = whetherToSearch(points, knownK);
  if (!worth && !(thoroughly && enough)) return Number.NaN;
  const scan = breakScan(points, { side: breakSide, perGap: perGap(distinct.length), alsoK: inside });
  if (scan === undefined) return Number.NaN;
  const { position, statistic } = bestBreak(scan, scan.residuals, scan.smoothSum, "falls");
  return position >= 0 && statistic > leastStatistic(points.n, LEVEL) ? scan.breakK[position]! : Number.NaN;
}

/** Whether a search is worth its time: for a listed transition always, else where a quick one finds anything. */
export function whetherToSearch(points: BreakPoints, knownK: readonly number[]) {
  const distinct = distinctTemperatures(points);
  const inside = knownK.filter((T) => T > distinct[0]!.highK && T < distinct.at(-1)!.lowK);
  const enough = distinct.length >= 2 * breakSide;
  return { distinct, inside, enough, worth: enough && (inside.length > 0 || worthTrying(points, distinct)) };
}

/** Whether a quick search finds anything. */
function worthTrying(points: BreakPoints, distinct: readonly DistinctTemperature[]): boolean {
  if (breakHint(points, distinct, breakSide) < HINT) return false;
  const scan = breakScan(points, { side: breakSide, perGap: 1 });
  if (scan === undefined) return false;
  const best = (sense: Sense) => bestBreak(scan, scan.residuals, scan.smoothSum, sense).statistic;
  return Math.max(best("falls"), best("rises")) > COARSE * leastStatistic(points.n, LEVEL);
}

/** The points as if their sources scattered by a seventh of the usual only. */
function quieter(points: BreakPoints): BreakPoints {
  return { ...points, variance: points.variance.map((variance) => QUIET * variance) };
}

/**
 * A falling slope is judged twice, because systems of one source differ in their scatter more than the moderated variance
 * allows for: with the scatter usual in the sources, and with the system's own, which is much smaller in many a table that
 * somebody smoothed or rounded, and then shows smaller breaks. Each of the two takes half the level, and the published
 * probability is twice the smaller one (Bonferroni).
 */
function judge(points: BreakPoints, scan: BreakScan, sense: Sense, seed: number): FoundBreak | undefined {
  const { position, statistic } = bestBreak(scan, scan.residuals, scan.smoothSum, sense);
  if (position < 0 || statistic < leastStatistic(points.n, LEVEL)) return undefined;
  if (sense === "rises") return judgeAt(points, scan, sense, LEVEL, seed);
  const quiet = quieter(points);
  const asUsual = judgeAt(points, scan, sense, LEVEL / 2, seed);
  const found = asUsual ?? judgeAt(quiet, rescanned(quiet, scan), sense, LEVEL / 2, seed);
  return found === undefined ? undefined : { ...found, probability: 2 * found.probability };
}

/** The same search, laid out for other variances. */
function rescanned(points: BreakPoints, { breakK }: BreakScan): BreakScan | undefined {
  return breakScan(points, { side: breakSide, perGap: 1, alsoK: [...breakK] });
}

function judgeAt(
  points: BreakPoints,
  scan: BreakScan | undefined,
  sense: Sense,
  level: number,
  seed: number,
): FoundBreak | undefined {
  if (scan === undefined) return undefined;
  const best = bestBreak(scan, scan.residuals, scan.smoothSum, sense);
  if (best.position < 0 || best.statistic < leastStatistic(points.n, level)) return undefined;
  if (sense === "falls" && mayRise(points.n, scan, best)) return undefined;
  const breakK = scan.breakK[best.position]!;
  if (!seenWithinSources(points, breakK)) return undefined;
  const rival = smoothRival(points);
  if (rival <= scan.smoothSum - best.gain || (sense === "rises" && withinScatter(points.n, rival))) return undefined;
  const { probability, replicates } = bootstrapBreak(scan, best.statistic, sense, level, seed);
  if (probability >= level || fallsNearAnEnd(points, scan, best, sense)) return undefined;
  const critical = replicates[Math.ceil((1 - LEFT_OUT_LEVEL) * replicates.length) - 1]!;
  if (carriedByOnePoint(points, scan, best.position, sense, critical)) return undefined;
  if (carriedByOneSource(points, breakK, sense, seed)) return undefined;
  return { sense, breakK, probability };
}

/**
 * Whether the residuals of the smooth rival are no larger than the scatter of the sources at the 1 % level. A falling slope
 * is what hydrates are known to do; for a rising one there must be no smooth explanation at all.
 */
function withinScatter(n: number, rivalSum: number): boolean {
  return n <= RIVAL_COEFFICIENTS || rivalSum <= chiSquareQuantile(1 - LEVEL, n - RIVAL_COEFFICIENTS);
}

/**
 * Whether a falling slope with two temperatures on one side explains the points better: it is too near an end to be
 * published. It makes the points before it look as if their slope rose, and a break farther inside seem to lie where it
 * does not; for one that falls itself, the nearer one must exclude it at the 5 % level.
 */
function fallsNearAnEnd(points: BreakPoints, scan: BreakScan, best: BestBreak, sense: Sense): boolean {
  const wide = breakScan(points, { side: breakSide - 1, perGap: 2 });
  if (wide === undefined) return false;
  const { gain } = bestBreak(wide, wide.residuals, wide.smoothSum, "falls");
  if (sense === "rises") return gain >= best.gain;
  const freedom = brokenDegreesOfFreedom(points.n);
  return gain - best.gain > limitFactor(freedom) ** 2 * brokenVariance(points.n, scan.smoothSum - gain);
}

/** Whether the points do not exclude a rising slope at the 5 % level: then it is the curvature alone that changes. */
function mayRise(n: number, scan: BreakScan, { gain }: BestBreak): boolean {
  const rising = bestBreak(scan, scan.residuals, scan.smoothSum, "rises").gain;
  return gain - rising <= limitFactor(brokenDegreesOfFreedom(n)) ** 2 * brokenVariance(n, scan.smoothSum - gain);
}
