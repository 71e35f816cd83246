import { bestBreak, bootstrapBreak, type Sense } from "./break-bootstrap.ts";
import { type BreakPoints, type BreakScan, breakScan, distinctTemperatures, inner } from "./break-scan.ts";

/** Replicates behind the question whether a break is still there without a source. */
const LEFT_OUT_REPLICATES = 199;

/** Distinct temperatures needed on either side of a break. */
export const breakSide = 3;
/** Without any one point, and without any one source where the rest can show it, the break must pass this level. */
export const LEFT_OUT_LEVEL = 0.05;

/**
 * Whether sources that cross the break, each with two points on either side, have three temperatures a side between
 * them: sources that lie wholly on one side differ in slope for other reasons too.
 */
export function seenWithinSources(points: BreakPoints, breakK: number): boolean {
  const crossing: number[] = [];
  for (let b = 0; b < points.nBlocks; b++) {
    const sides = [0, 0];
    for (let i = 0; i < points.n; i++) if (points.block[i] === b) sides[points.temperatureK[i]! <= breakK ? 0 : 1]!++;
    if (sides[0]! >= 2 && sides[1]! >= 2) crossing.push(b);
  }
  const ofCrossing = (cold: boolean) =>
    distinctTemperatures(
      without(points, (i) => !crossing.includes(points.block[i]!) || points.temperatureK[i]! <= breakK !== cold),
    ).length >= breakSide;
  return ofCrossing(true) && ofCrossing(false);
}

/**
 * Whether the statistic without some one point is at most `critical`. Points that bring most of the gain are left out
 * first: they are the ones that may carry the break alone.
 */
export function carriedByOnePoint(
  points: BreakPoints,
  scan: BreakScan,
  position: number,
  sense: Sense,
  critical: number,
): boolean {
  const { rows, directions, residuals } = scan;
  const at = 2 * rows * position;
  const along = [at, at + rows].map((from) => inner(directions, from, residuals, 0, rows));
  const brought = (i: number) =>
    Math.abs(residuals[i]! * (along[0]! * directions[at + i]! + along[1]! * directions[at + rows + i]!));
  const order = Array.from({ length: points.n }, (_, i) => i).sort((i, k) => brought(k) - brought(i) || i - k);
  return order.some((left) => {
    const rest = breakScan(
      without(points, (k) => k === left),
      { side: breakSide - 1, perGap: 2 },
    );
    return rest === undefined || bestBreak(rest, rest.residuals, rest.smoothSum, sense).statistic <= critical;
  });
}

/** Whether the break is no longer there at the 5 % level without one of the sources, where the rest can show it. */
export function carriedByOneSource(points: BreakPoints, breakK: number, sense: Sense, seed: number): boolean {
  for (let b = 0; points.nBlocks > 1 && b < points.nBlocks; b++) {
    const rest = without(points, (i) => points.block[i] === b);
    if (!seenWithinSources(rest, breakK)) continue;
    const scan = breakScan(rest, { side: breakSide, perGap: 2 });
    if (scan === undefined) continue;
    const { statistic } = bestBreak(scan, scan.residuals, scan.smoothSum, sense);
    if (bootstrapBreak(scan, statistic, sense, LEFT_OUT_LEVEL, seed, LEFT_OUT_REPLICATES).probability >= LEFT_OUT_LEVEL)
      return true;
  }
  return false;
}

/** The points without some of them; sources are numbered anew. */
function without(points: BreakPoints, leftOut: (i: number) => boolean): BreakPoints {
  const use = Array.from({ length: points.n }, (_, i) => i).filter((i) => !leftOut(i));
  const blocks = [...new Set(use.map((i) => points.block[i]!))];
  return {
    ...points,
    n: use.length,
    temperatureK: Float64Array.from(use, (i) => points.temperatureK[i]!),
    lnValue: Float64Array.from(use, (i) => points.lnValue[i]!),
    variance: Float64Array.from(use, (i) => points.variance[i]!),
    block: Int32Array.from(use, (i) => blocks.indexOf(points.block[i]!)),
    nBlocks: blocks.length,
  };
}
