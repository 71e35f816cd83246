/**
 * Covariance of points whose sources carry random offsets: K = diag(v) + tau^2 [same source].
 *
 * Its inverse and its inverse square root are known in closed form source by source (Sherman and Morrison), so that
 * generalised least squares is ordinary least squares on whitened columns, without any n x n matrix.
 */
export interface RandomIntercept {
  /** Variance of each point within its source, v. */
  readonly variance: Float64Array;
  /** Source of each point, 0 and up. */
  readonly block: Int32Array;
  /** Between-source variance tau^2; 0 leaves weighted least squares. */
  readonly betweenVariance: number;
  /** Sum of 1/v over each source. */
  readonly precision: Float64Array;
}

/**
 * @param variance v of each point, above 0
 * @param block source of each point, 0 to nBlocks - 1
 * @param nBlocks number of sources
 * @param betweenVariance tau^2, at or above 0; Infinity gives every source a free offset
 */
export function randomIntercept(
  variance: Float64Array,
  block: Int32Array,
  nBlocks: number,
  betweenVariance: number,
): RandomIntercept {
  const precision = new Float64Array(nBlocks);
  for (let i = 0; i < variance.length; i++) precision[block[i] as number]! += 1 / (variance[i] as number);
  return { variance, block, betweenVariance, precision };
}

/** Part of a source's weighted sum that whitening takes off: (1 - 1/sqrt(1 + tau^2 S)) / S. */
function whiteningShare(betweenVariance: number, precision: number): number {
  return (1 - 1 / Math.sqrt(1 + betweenVariance * precision)) / precision;
}

/** Part of a source's weighted sum that the inverse takes off: tau^2 / (1 + tau^2 S). */
function inverseShare(betweenVariance: number, precision: number): number {
  return 1 / (1 / betweenVariance + precision);
}

/**
 * K^(-1/2) column, written with a stride so that it can fill a row-major design.
 *
 * @param sums scratch, one number a source
 * @param stride distance between the values of consecutive points in `out`
 */
export function whiten(
  K: RandomIntercept,
  column: Float64Array,
  sums: Float64Array,
  out: Float64Array,
  at: number,
  stride: number,
): void {
  const { variance, block, betweenVariance, precision } = K;
  weightedSums(K, column, sums);
  for (let b = 0; b < precision.length; b++) sums[b]! *= whiteningShare(betweenVariance, precision[b] as number);
  for (let i = 0; i < variance.length; i++)
    out[at + i * stride] =
      ((column[i] as number) - (sums[block[i] as number] as number)) / Math.sqrt(variance[i] as number);
}

/** K^(-1) column, written with a stride; arguments as for {@link whiten}. */
export function solve(
  K: RandomIntercept,
  column: Float64Array,
  sums: Float64Array,
  out: Float64Array,
  at: number,
  stride: number,
): void {
  const { variance, block, betweenVariance, precision } = K;
  weightedSums(K, column, sums);
  for (let b = 0; b < precision.length; b++) sums[b]! *= inverseShare(betweenVariance, precision[b] as number);
  for (let i = 0; i < variance.length; i++)
    out[at + i * stride] = ((column[i] as number) - (sums[block[i] as number] as number)) / (variance[i] as number);
}

/** (K^(-1))_ii of one point. */
export function inverseDiagonal(K: RandomIntercept, i: number): number {
  const v = K.variance[i] as number;
  return (1 - inverseShare(K.betweenVariance, K.precision[K.block[i] as number] as number) / v) / v;
}

/** ln det K. */
export function logDeterminant(K: RandomIntercept): number {
  let sum = 0;
  for (let i = 0; i < K.variance.length; i++) sum += Math.log(K.variance[i] as number);
  for (let b = 0; b < K.precision.length; b++) sum += Math.log1p(K.betweenVariance * (K.precision[b] as number));
  return sum;
}

function weightedSums({ variance, block }: RandomIntercept, column: Float64Array, sums: Float64Array): void {
  sums.fill(0);
  for (let i = 0; i < variance.length; i++)
    sums[block[i] as number]! += (column[i] as number) / (variance[i] as number);
}
