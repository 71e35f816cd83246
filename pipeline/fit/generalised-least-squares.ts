import { leastSquaresCovariance, leastSquaresInto } from "../numerics/least-squares.ts";
import type { FitWorkspace } from "./fit-workspace.ts";
import { inverseDiagonal, type RandomIntercept, solve, whiten } from "./random-intercept.ts";

/** A linear model fitted under the covariance K of a random offset per source. */
export interface GeneralisedFit {
  readonly coefficients: readonly number[];
  /** (F' K^-1 F)^-1, p x p, row-major: the covariance of the coefficients where K is the true covariance. */
  readonly covariance: readonly number[];
  /** r' K^-1 r. */
  readonly residualSumOfSquares: number;
}

/**
 * Generalised least squares: minimises (y - F b)' K^-1 (y - F b) by QR of the whitened design.
 *
 * Takes the p columns of F from `ws.columns` and y from `response`; leaves y - F b in `ws.residuals` and K^-1 F in
 * `ws.solvedDesign`.
 * @param lastSd standard deviation about 0 that the last coefficient is known to have before the data (Infinity: none);
 *   it counts as one more observation, of 0, whose square joins the residual sum of squares
 * @returns undefined where the columns are collinear
 */
export function generalisedLeastSquares(
  ws: FitWorkspace,
  K: RandomIntercept,
  response: Float64Array,
  p: number,
  lastSd: number,
): GeneralisedFit | undefined {
  const { columns, design, whitened, residuals, leastSquares: ls } = ws;
  const n = K.n;
  const known = lastSd < Number.POSITIVE_INFINITY;
  const rows = n + (known ? 1 : 0);
  if (rows < p) return undefined;
  design.fill(0, n * p, rows * p);
  whitened[n] = 0;
  for (let j = 0; j < p; j++) whiten(K, columns[j]!, design, j, p);
  whiten(K, response, whitened, 0, 1);
  if (known) design[rows * p - 1] = 1 / lastSd;
  if (leastSquaresInto(ls, design, whitened, rows, p) < p) return undefined;
  let residualSumOfSquares = 0;
  for (let i = 0; i < rows; i++) residualSumOfSquares += ls.residuals[i]! * ls.residuals[i]!;
  const coefficients = firstOf(ls.coefficients, p);
  const covariance = firstOf(leastSquaresCovariance(ls), p * p);
  for (let i = 0; i < n; i++) {
    let residual = response[i]!;
    for (let j = 0; j < p; j++) residual -= columns[j]![i]! * coefficients[j]!;
    residuals[i] = residual;
  }
  for (let j = 0; j < p; j++) solve(K, columns[j]!, ws.solvedDesign, j, p);
  return { coefficients, covariance, residualSumOfSquares };
}

/** The first values of a buffer as a list of their own, short enough for a plain array to be the faster choice. */
function firstOf(buffer: Float64Array, count: number): number[] {
  const values: number[] = [];
  for (let i = 0; i < count; i++) values.push(buffer[i]!);
  return values;
}

/**
 * Root mean square leave-one-out residual of the fit just made, in closed form: (P y)_i / P_ii with
 * P = K^-1 - K^-1 F C F' K^-1.
 *
 * Points without offsets reduce it to the usual e_i / (1 - h_ii).
 * @returns Infinity where a point alone decides a coefficient, so that leaving it out leaves no fit
 */
export function leaveOneOut(ws: FitWorkspace, K: RandomIntercept, covariance: readonly number[], p: number): number {
  const { solvedDesign, solvedResiduals } = ws;
  const n = K.n;
  solve(K, ws.residuals, solvedResiduals, 0, 1);
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const own = inverseDiagonal(K, i);
    const left = own - rowForm(covariance, solvedDesign, i * p, p);
    if (!(left > 1e-10 * own)) return Number.POSITIVE_INFINITY;
    sum += (solvedResiduals[i]! / left) ** 2;
  }
  return Math.sqrt(sum / n);
}

/**
 * Part of the covariance of the fit just made that comes from scatter within sources: C F' K^-1 diag(v) K^-1 F C.
 *
 * The remainder, covariance less this, comes from the offsets between sources and from what was known before the data.
 */
export function withinPart(ws: FitWorkspace, K: RandomIntercept, C: readonly number[], p: number): number[] {
  const rows = ws.solvedDesign;
  const middle = zeros(p * p);
  for (let i = 0; i < K.n; i++)
    for (let j = 0; j < p; j++) {
      const scaled = K.variance[i]! * rows[i * p + j]!;
      for (let k = 0; k < p; k++) middle[j * p + k]! += scaled * rows[i * p + k]!;
    }
  return product(product(C, middle, p), C, p);
}

function zeros(count: number): number[] {
  const values: number[] = [];
  for (let i = 0; i < count; i++) values.push(0);
  return values;
}

function product(left: readonly number[], right: readonly number[], p: number): number[] {
  const out = zeros(p * p);
  for (let i = 0; i < p; i++)
    for (let j = 0; j < p; j++) for (let k = 0; k < p; k++) out[i * p + j]! += left[i * p + k]! * right[k * p + j]!;
  return out;
}

function rowForm(C: readonly number[], rows: Float64Array, at: number, p: number): number {
  let sum = 0;
  for (let j = 0; j < p; j++) {
    let product = 0;
    for (let k = 0; k < p; k++) product += C[j * p + k]! * rows[at + k]!;
    sum += rows[at + j]! * product;
  }
  return sum;
}
