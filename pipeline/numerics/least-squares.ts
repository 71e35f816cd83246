import { createQrWorkspace, factorise, type QrWorkspace } from "./householder-qr.ts";
import { refineLeastSquares } from "./iterative-refinement.ts";
import { leverages, solve, unscaledCovariance } from "./qr-solve.ts";

/** Result of {@link leastSquares}; arrays are in the order of the design's rows and columns. */
export interface LeastSquaresFit {
  /** Number of linearly independent columns; below p the coefficients are one of many solutions. */
  readonly rank: number;
  /** b, length p; 0 for a column left out because earlier columns explain it. */
  readonly coefficients: Float64Array;
  /** y - Xb, unweighted, length n. */
  readonly residuals: Float64Array;
  /** Diagonal of the weighted hat matrix, length n; 0 where the weight is 0. */
  readonly leverages: Float64Array;
  /** sum w_i (y_i - x_i b)^2 */
  readonly residualSumOfSquares: number;
  /** (X'WX)^-1, row-major p x p; times the residual variance it is the covariance of b. NaN for columns left out. */
  readonly unscaledCovariance: Float64Array;
}

/** A {@link LeastSquaresFit} that is overwritten by each call of {@link leastSquaresInto}. */
export interface LeastSquaresWorkspace {
  readonly qr: QrWorkspace;
  readonly coefficients: Float64Array;
  readonly residuals: Float64Array;
  readonly leverages: Float64Array;
  readonly unscaledCovariance: Float64Array;
}

/**
 * Weighted linear least squares, min over b of sum w_i (y_i - x_i b)^2, by Householder QR with iterative refinement.
 *
 * - design  X, row-major n x p          - response  y, length n
 * - weights  length n, at least 0 (1 where absent); a weight acts as the number of equal rows it stands for
 *
 * Test `rank === p` before using coefficients or covariance: with fewer than p independent columns (n < p, all
 * x equal, collinear terms, too many weights of 0) columns explained by earlier ones get coefficient 0 and
 * covariance NaN. Coefficients are refined to rounding error of the exact solution for the design as given; centre the
 * terms all the same, so that the design itself loses nothing.
 * @throws RangeError if sizes do not agree, a weight is negative or not finite, or a number is not finite.
 * @see Golub and Van Loan, Matrix Computations, 4th ed. (2013), section 5.3.
 */
export function leastSquares(
  design: Float64Array,
  response: Float64Array,
  n: number,
  p: number,
  weights?: Float64Array,
): LeastSquaresFit {
  const ws = createLeastSquaresWorkspace(n, p);
  const rank = leastSquaresInto(ws, design, response, n, p, weights);
  if (rank === p) refineLeastSquares(ws.qr, design, response, ws.coefficients, ws.residuals);
  leverages(ws.qr, ws.leverages);
  unscaledCovariance(ws.qr, ws.unscaledCovariance);
  return {
    rank,
    coefficients: ws.coefficients,
    residuals: ws.residuals,
    leverages: ws.leverages,
    residualSumOfSquares: weightedSumOfSquares(ws.residuals, n, weights),
    unscaledCovariance: ws.unscaledCovariance,
  };
}

/** Buffers for fits of at most `maxRows` points and `maxColumns` terms. @throws RangeError on a size below 1. */
export function createLeastSquaresWorkspace(maxRows: number, maxColumns: number): LeastSquaresWorkspace {
  return {
    qr: createQrWorkspace(maxRows, maxColumns),
    coefficients: new Float64Array(maxColumns),
    residuals: new Float64Array(maxRows),
    leverages: new Float64Array(maxRows),
    unscaledCovariance: new Float64Array(maxColumns * maxColumns),
  };
}

/**
 * The same fit as {@link leastSquares} without allocation: coefficients and residuals are written to the workspace,
 * the rank is returned. Nothing is refined. Leverages and covariance are left to {@link leastSquaresLeverages} and
 * {@link leastSquaresCovariance}, as most loops need neither.
 * @throws RangeError as {@link leastSquares}.
 */
export function leastSquaresInto(
  ws: LeastSquaresWorkspace,
  design: Float64Array,
  response: Float64Array,
  n: number,
  p: number,
  weights?: Float64Array,
): number {
  if (response.length < n) throw new RangeError(`least squares: ${response.length} responses for ${n} rows`);
  const rank = factorise(ws.qr, design, n, p, weights);
  solve(ws.qr, response, ws.coefficients);
  residualsInto(ws.residuals, design, response, ws.coefficients, n, p);
  return rank;
}

/** Leverages of the last fit in the workspace, written to its `leverages`. */
export function leastSquaresLeverages(ws: LeastSquaresWorkspace): Float64Array {
  leverages(ws.qr, ws.leverages);
  return ws.leverages;
}

/** (X'WX)^-1 of the last fit in the workspace, written to its `unscaledCovariance` (row-major p x p). */
export function leastSquaresCovariance(ws: LeastSquaresWorkspace): Float64Array {
  unscaledCovariance(ws.qr, ws.unscaledCovariance);
  return ws.unscaledCovariance;
}

/** Residuals y - Xb of n rows, written to `result`. */
export function residualsInto(
  result: Float64Array,
  design: Float64Array,
  response: Float64Array,
  coefficients: Float64Array,
  n: number,
  p: number,
): void {
  for (let i = 0; i < n; i++) {
    let value = response[i]!;
    const row = i * p;
    for (let j = 0; j < p; j++) value -= design[row + j]! * coefficients[j]!;
    result[i] = value;
  }
}

/** sum w_i r_i^2 over n residuals; weights of 1 where absent, and rows of weight 0 do not count even if not finite. */
export function weightedSumOfSquares(residuals: Float64Array, n: number, weights?: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const weight = weights ? weights[i]! : 1;
    if (weight !== 0) sum += weight * residuals[i]! * residuals[i]!;
  }
  return sum;
}
