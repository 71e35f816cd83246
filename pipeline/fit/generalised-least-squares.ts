import { leastSquares } from "../numerics/least-squares.ts";
import { inverseDiagonal, type RandomIntercept, solve, whiten } from "./random-intercept.ts";

/** A linear model fitted under the covariance K of a random offset per source. */
export interface GeneralisedFit {
  readonly coefficients: Float64Array;
  /** (F' K^-1 F)^-1, p x p, row-major: the covariance of the coefficients where K is the true covariance. */
  readonly covariance: Float64Array;
  /** y - F b. */
  readonly residuals: Float64Array;
  /** r' K^-1 r. */
  readonly residualSumOfSquares: number;
}

/**
 * Generalised least squares: minimises (y - F b)' K^-1 (y - F b) by QR of the whitened design.
 *
 * @param K covariance of the points
 * @param columns the p columns of F, n values each
 * @param y response, n values
 * @param lastSd standard deviation about 0 that the last coefficient is known to have before the data (Infinity: none);
 *   it counts as one more observation, of 0, whose square joins the residual sum of squares
 * @returns undefined where the columns are collinear
 */
export function generalisedLeastSquares(
  K: RandomIntercept,
  columns: readonly Float64Array[],
  y: Float64Array,
  lastSd = Number.POSITIVE_INFINITY,
): GeneralisedFit | undefined {
  const n = y.length;
  const p = columns.length;
  const rows = n + (lastSd < Number.POSITIVE_INFINITY ? 1 : 0);
  if (rows < p) return undefined;
  const sums = new Float64Array(K.precision.length);
  const design = new Float64Array(rows * p);
  const response = new Float64Array(rows);
  design[rows * p - 1] = 1 / lastSd;
  for (let j = 0; j < p; j++) whiten(K, columns[j] as Float64Array, sums, design, j, p);
  whiten(K, y, sums, response, 0, 1);
  const fit = leastSquares(design, response, rows, p);
  if (fit.rank < p) return undefined;
  return {
    coefficients: fit.coefficients,
    covariance: fit.unscaledCovariance,
    residuals: residualsOf(columns, fit.coefficients, y),
    residualSumOfSquares: fit.residualSumOfSquares,
  };
}

/** y - F b. */
export function residualsOf(
  columns: readonly Float64Array[],
  coefficients: Float64Array,
  y: Float64Array,
): Float64Array {
  const out = Float64Array.from(y);
  for (let j = 0; j < columns.length; j++) {
    const column = columns[j] as Float64Array;
    const b = coefficients[j] as number;
    for (let i = 0; i < out.length; i++) out[i]! -= b * (column[i] as number);
  }
  return out;
}

/** Rows of K^-1 F, n x p, row-major. */
export function solvedDesign(K: RandomIntercept, columns: readonly Float64Array[]): Float64Array {
  const p = columns.length;
  const sums = new Float64Array(K.precision.length);
  const out = new Float64Array(K.variance.length * p);
  for (let j = 0; j < p; j++) solve(K, columns[j] as Float64Array, sums, out, j, p);
  return out;
}

/**
 * Root mean square leave-one-out residual, in closed form: (P y)_i / P_ii with P = K^-1 - K^-1 F C F' K^-1.
 *
 * Points without offsets reduce it to the usual e_i / (1 - h_ii).
 * @param residuals y - F b
 * @returns Infinity where a point alone decides a coefficient, so that leaving it out leaves no fit
 */
export function leaveOneOut(
  K: RandomIntercept,
  columns: readonly Float64Array[],
  covariance: Float64Array,
  residuals: Float64Array,
): number {
  const n = residuals.length;
  const p = columns.length;
  const rows = solvedDesign(K, columns);
  const solvedResiduals = new Float64Array(n);
  solve(K, residuals, new Float64Array(K.precision.length), solvedResiduals, 0, 1);
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const own = inverseDiagonal(K, i);
    const left = own - rowForm(covariance, rows, i * p, p);
    if (!(left > 1e-10 * own)) return Number.POSITIVE_INFINITY;
    sum += ((solvedResiduals[i] as number) / left) ** 2;
  }
  return Math.sqrt(sum / n);
}

/**
 * Part of the covariance of the coefficients that comes from scatter within sources: C F' K^-1 diag(v) K^-1 F C.
 *
 * The remainder, covariance less this, comes from the offsets between sources.
 */
export function withinPart(K: RandomIntercept, columns: readonly Float64Array[], covariance: Float64Array) {
  const p = columns.length;
  const rows = solvedDesign(K, columns);
  const middle = new Float64Array(p * p);
  for (let i = 0; i < K.variance.length; i++)
    for (let j = 0; j < p; j++) {
      const scaled = (K.variance[i] as number) * (rows[i * p + j] as number);
      for (let k = 0; k < p; k++) middle[j * p + k]! += scaled * (rows[i * p + k] as number);
    }
  return sandwich(covariance, middle, p);
}

/** C M C for symmetric p x p matrices, row-major. */
function sandwich(C: Float64Array, M: Float64Array, p: number): Float64Array {
  const half = new Float64Array(p * p);
  const out = new Float64Array(p * p);
  multiply(C, M, half, p);
  multiply(half, C, out, p);
  return out;
}

function multiply(left: Float64Array, right: Float64Array, out: Float64Array, p: number): void {
  for (let i = 0; i < p; i++)
    for (let j = 0; j < p; j++) {
      let sum = 0;
      for (let k = 0; k < p; k++) sum += (left[i * p + k] as number) * (right[k * p + j] as number);
      out[i * p + j] = sum;
    }
}

function rowForm(C: Float64Array, rows: Float64Array, at: number, p: number): number {
  let sum = 0;
  for (let j = 0; j < p; j++)
    for (let k = 0; k < p; k++) sum += (rows[at + j] as number) * (C[j * p + k] as number) * (rows[at + k] as number);
  return sum;
}
