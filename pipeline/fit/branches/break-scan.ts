import { leastSquares } from "../../numerics/least-squares.ts";
import { createRandomIntercept, type RandomIntercept, setRandomIntercept, whiten } from "../random-intercept.ts";

/** The points of one system as the search for a break wants them: any order, sources numbered 0 and up. */
export interface BreakPoints {
  readonly n: number;
  readonly temperatureK: Float64Array;
  readonly lnValue: Float64Array;
  /** Variance of ln value within its source. */
  readonly variance: Float64Array;
  readonly block: Int32Array;
  readonly nBlocks: number;
  /** Between-source variance; takes part where there are two sources or more. */
  readonly betweenVariance: number;
}

/** Temperatures (K) that count as one, with the extremes of the cluster. */
export interface DistinctTemperature {
  readonly lowK: number;
  readonly highK: number;
}

/** How finely, and where, a break is looked for. */
export interface BreakSearch {
  /** Distinct temperatures needed on either side. */
  readonly side: number;
  /** Positions tried between two neighbouring temperatures. */
  readonly perGap: number;
  /** Temperatures tried besides, K: known transitions of the solid. */
  readonly alsoK?: readonly number[];
  /** Whether the change of curvature is left to the points alone; else what is usual for it is known beforehand. */
  readonly freeCurvatureChange?: boolean;
}

/**
 * The smooth model and all broken ones of one system, whitened and orthogonalised once, so that a set of values is
 * judged by inner products alone. Smooth: ln s = b0 + b1 u + b2 (u - ln(1 + u)), u = T0/T - 1, which is the modified
 * Apelblat equation. Broken at Tb: two more terms above Tb, both 0 at Tb, a change of slope and one of curvature.
 */
export interface BreakScan {
  /** n points, one row for what is known of the curvature, one for its change. */
  readonly rows: number;
  readonly n: number;
  /** Three orthonormal columns of the smooth model, one after another. */
  readonly smooth: Float64Array;
  /** True if the curvature is held by what is usual for it, because the points are too few to fit it. */
  readonly heldCurvature: boolean;
  readonly breakK: Float64Array;
  /** Two orthonormal columns a position, one after another, orthogonal to the smooth ones. */
  readonly directions: Float64Array;
  /** Triangle r11, r12, r22 of each position: turns the two components into slope and curvature change. */
  readonly triangle: Float64Array;
  /** Whitened values less the smooth model, and their sum of squares. */
  readonly residuals: Float64Array;
  readonly smoothSum: number;
}

/** Temperatures closer than this (K) count as one: thermostats and thermometers differ by as much. */
const SAME_TEMPERATURE_K = 0.5;
/** Six temperatures over 30 K let the curvature be fitted freely, as in the published models. */
const [FREE_TEMPERATURES, FREE_SPAN_K] = [6, 30];
/** SD of the curvature (dissolution heat capacity over R) before the data: common practice, see system-models.ts. */
const USUAL_C = 9;
/** Of the difference of two such. */
const USUAL_C_CHANGE = USUAL_C * Math.SQRT2;

/** Distinct temperatures of the points, ascending. */
export function distinctTemperatures({ n, temperatureK }: BreakPoints): DistinctTemperature[] {
  const sorted = temperatureK.slice(0, n).sort();
  const distinct: { lowK: number; highK: number }[] = [];
  for (const T of sorted) {
    const last = distinct.at(-1);
    if (last !== undefined && T - last.lowK <= SAME_TEMPERATURE_K) last.highK = T;
    else distinct.push({ lowK: T, highK: T });
  }
  return distinct;
}

/** Positions of the break to be tried, K, ascending. */
function positions(distinct: readonly DistinctTemperature[], { side, perGap, alsoK = [] }: BreakSearch): Float64Array {
  const all: number[] = [];
  for (let j = side; j <= distinct.length - side; j++) {
    const [from, to] = [distinct[j - 1]!.highK, distinct[j]!.lowK];
    for (let k = 0; k < perGap; k++) all.push(from + ((to - from) * k) / perGap);
    for (const known of alsoK) if (known >= from && known < to) all.push(known);
  }
  return Float64Array.from(new Set(all)).sort();
}

let kept: RandomIntercept | undefined;

function covarianceOf({ n, nBlocks, variance, block, betweenVariance }: BreakPoints): RandomIntercept {
  if (kept === undefined || kept.variance.length < n)
    kept = createRandomIntercept(Math.max(64, 2 * n), Math.max(64, 2 * n), new Int32Array(Math.max(64, 2 * n)));
  for (let i = 0; i < n; i++) kept.block[i] = block[i]!;
  setRandomIntercept(kept, n, nBlocks, variance, 1, nBlocks > 1 ? betweenVariance : 0);
  return kept;
}

/** Harmonic mean temperature, K: centre of the basis. */
function centreOf({ n, temperatureK }: BreakPoints): number {
  let reciprocals = 0;
  for (let i = 0; i < n; i++) reciprocals += 1 / temperatureK[i]!;
  return n / reciprocals;
}

/**
 * The smooth model as three whitened, orthonormal columns, one after another in `smooth`, and the whitened values less that
 * model in `residuals`; both `rows` long, with the curvature's own observation behind the points where it is held.
 */
export function breakBasis(
  points: BreakPoints,
  distinct: readonly DistinctTemperature[],
  rows: number,
  smooth: Float64Array,
  residuals: Float64Array,
) {
  const { n, temperatureK, lnValue } = points;
  const K = covarianceOf(points);
  const T0 = centreOf(points);
  const span = distinct.at(-1)!.highK - distinct[0]!.lowK;
  const heldCurvature = distinct.length < FREE_TEMPERATURES || span < FREE_SPAN_K;
  const u = new Float64Array(n);
  smooth.fill(0, 0, 3 * rows);
  residuals.fill(0, 0, rows);
  for (let i = 0; i < n; i++) {
    const own = T0 / temperatureK[i]! - 1;
    u[i] = own;
    smooth[i] = 1;
    smooth[rows + i] = own;
    smooth[2 * rows + i] = own - Math.log1p(own);
    residuals[i] = lnValue[i]!;
  }
  for (let j = 0; j < 3; j++) whiten(K, smooth.subarray(j * rows), smooth, j * rows, 1);
  whiten(K, residuals, residuals, 0, 1);
  if (heldCurvature) smooth[2 * rows + n] = 1 / USUAL_C;
  for (let j = 0; j < 3; j++) {
    for (let k = 0; k < j; k++) removeTwice(smooth, j * rows, smooth, k * rows, rows);
    normalise(smooth, j * rows, rows);
  }
  for (let k = 0; k < 3; k++) removeTwice(residuals, 0, smooth, k * rows, rows);
  return { u, T0, heldCurvature, whitened: (column: Float64Array) => whiten(K, column, column, 0, 1) };
}

/**
 * Lays out the search for a break.
 *
 * @returns undefined where no position has enough temperatures on both sides
 */
export function breakScan(points: BreakPoints, search: BreakSearch): BreakScan | undefined {
  const { n } = points;
  const distinct = distinctTemperatures(points);
  const breakK = positions(distinct, search);
  if (breakK.length === 0) return undefined;
  const rows = n + 2;
  const [smooth, residuals] = [new Float64Array(3 * rows), new Float64Array(rows)];
  const { u, T0, heldCurvature, whitened } = breakBasis(points, distinct, rows, smooth, residuals);
  const column = new Float64Array(n);
  const write = (target: Float64Array, at: number, of: (u: number) => number): void => {
    for (let i = 0; i < n; i++) column[i] = of(u[i]!);
    whitened(column);
    target.set(column, at);
  };
  const directions = new Float64Array(2 * rows * breakK.length);
  const triangle = new Float64Array(3 * breakK.length);
  breakK.forEach((Tb, b) => {
    const at = 2 * rows * b;
    const ub = T0 / Tb - 1;
    const above = (of: (x: number) => number) => (x: number) => (x < ub ? of(x) : 0);
    write(
      directions,
      at,
      above((x) => ub - x),
    );
    const bend = (x: number) => x - ub - Math.log((1 + x) / (1 + ub)) - ((x - ub) * ub) / (1 + ub);
    write(directions, at + rows, above(bend));
    directions[at + rows + n + 1] = search.freeCurvatureChange ? 0 : 1 / USUAL_C_CHANGE;
    for (let k = 0; k < 3; k++) {
      removeTwice(directions, at, smooth, k * rows, rows);
      removeTwice(directions, at + rows, smooth, k * rows, rows);
    }
    triangle[3 * b] = normalise(directions, at, rows);
    triangle[3 * b + 1] = removeTwice(directions, at + rows, directions, at, rows);
    triangle[3 * b + 2] = normalise(directions, at + rows, rows);
  });
  return {
    ...{ rows, n, smooth, heldCurvature, breakK, directions, triangle, residuals },
    smoothSum: inner(residuals, 0, residuals, 0, rows),
  };
}

/**
 * Residual sum of squares of a smooth curve with as many coefficients as a broken one with its position (five, or what
 * the temperatures carry): a polynomial in u. Where it follows the points as well, nothing speaks for a break.
 */
export function smoothRival(points: BreakPoints): number {
  const { n, temperatureK, lnValue } = points;
  const p = Math.min(5, distinctTemperatures(points).length - 3);
  const K = covarianceOf(points);
  const T0 = centreOf(points);
  const [design, response, column] = [new Float64Array(n * p), new Float64Array(n), new Float64Array(n)];
  const scale = temperatureK.slice(0, n).reduce((most, T) => Math.max(most, Math.abs(T0 / T - 1)), 1e-6);
  for (let j = 0; j < p; j++) {
    for (let i = 0; i < n; i++) column[i] = ((T0 / temperatureK[i]! - 1) / scale) ** j;
    whiten(K, column, design, j, p);
  }
  for (let i = 0; i < n; i++) column[i] = lnValue[i]!;
  whiten(K, column, response, 0, 1);
  return leastSquares(design, response, n, p).residualSumOfSquares;
}

/** Inner product of two stretches. */
export function inner(a: Float64Array, atA: number, b: Float64Array, atB: number, length: number): number {
  let sum = 0;
  for (let i = 0; i < length; i++) sum += a[atA + i]! * b[atB + i]!;
  return sum;
}

/** Takes a unit direction out of a vector, twice, so that rounding leaves nothing of it; returns the component. */
function removeTwice(vector: Float64Array, at: number, unit: Float64Array, atUnit: number, length: number): number {
  let component = 0;
  for (let time = 0; time < 2; time++) {
    const part = inner(vector, at, unit, atUnit, length);
    for (let i = 0; i < length; i++) vector[at + i]! -= part * unit[atUnit + i]!;
    component += part;
  }
  return component;
}

/** Brings a vector to length 1 and returns the length it had; a vanishing one becomes 0. */
function normalise(vector: Float64Array, at: number, length: number): number {
  const size = Math.sqrt(inner(vector, at, vector, at, length));
  for (let i = 0; i < length; i++) vector[at + i] = size > 1e-9 ? vector[at + i]! / size : 0;
  return size > 1e-9 ? size : 0;
}
