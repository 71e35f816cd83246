/**
 * Covariance of points whose sources carry random offsets: K = diag(v) + t_b [same source b], with the offset variances
 * t_b = m_b tau^2 + s_b^2: tau^2 between sources, m_b sources of one laboratory here, s_b what the source's points share.
 *
 * Its inverse and its inverse square root are known in closed form source by source (Sherman and Morrison), so that
 * generalised least squares is ordinary least squares on whitened columns, without any n x n matrix. Arrays are buffers
 * that may be longer than n; nothing is allocated.
 */
export interface RandomIntercept {
  n: number;
  nBlocks: number;
  /** Variance of each point within its source, v; above 0. */
  readonly variance: Float64Array;
  /** Source of each point, 0 to nBlocks - 1. */
  readonly block: Int32Array;
  /** Variance t of each source's offset; 0 leaves weighted least squares, Infinity gives the source a free offset. */
  readonly offsetVariance: Float64Array;
  /** Sum of 1/v over each source. */
  readonly precision: Float64Array;
  /** Scratch, one number a source. */
  readonly sums: Float64Array;
}

/** Buffers for up to `points` points by up to `sources` sources; `block` may be shared with others. */
export function createRandomIntercept(points: number, sources: number, block: Int32Array): RandomIntercept {
  return {
    ...{ n: 0, nBlocks: 0, block },
    variance: new Float64Array(points),
    offsetVariance: new Float64Array(sources),
    precision: new Float64Array(sources),
    sums: new Float64Array(sources),
  };
}

/** What is known of the offsets of a system's sources besides tau^2. */
export interface OffsetParts {
  /** m, the number of sources here from the laboratory of each source, itself included. */
  readonly perLaboratory: readonly number[];
  /** s^2, the variance of ln value that the points of each source share. */
  readonly sharedVariance: readonly number[];
}

/**
 * Sets K from variances v (n values), each times `factor`, and tau^2.
 *
 * Sources of one laboratory weigh together as much as one: m of them, each with the variance m tau^2, have a mean of the
 * variance tau^2.
 * @param parts what besides tau^2 makes up the offsets; undefined: nothing
 */
export function setRandomIntercept(
  K: RandomIntercept,
  n: number,
  nBlocks: number,
  variance: Float64Array,
  factor: number,
  betweenVariance: number,
  parts?: OffsetParts,
): void {
  K.n = n;
  K.nBlocks = nBlocks;
  for (let b = 0; b < nBlocks; b++)
    K.offsetVariance[b] =
      parts === undefined ? betweenVariance : parts.perLaboratory[b]! * betweenVariance + parts.sharedVariance[b]!;
  K.precision.fill(0, 0, nBlocks);
  for (let i = 0; i < n; i++) {
    const v = variance[i]! * factor;
    K.variance[i] = v;
    K.precision[K.block[i]!]! += 1 / v;
  }
}

/** Part of a source's weighted sum that the inverse takes off: t / (1 + t S). */
function inverseShare(offsetVariance: number, precision: number): number {
  return 1 / (1 / offsetVariance + precision);
}

/** K^(-1/2) column, n values; written with a stride so that it can fill a row-major design. */
export function whiten(K: RandomIntercept, column: Float64Array, out: Float64Array, at: number, stride: number): void {
  const { n, nBlocks, variance, block, offsetVariance, precision, sums } = K;
  weightedSums(K, column);
  for (let b = 0; b < nBlocks; b++) {
    const S = precision[b]!;
    sums[b]! *= (1 - 1 / Math.sqrt(1 + offsetVariance[b]! * S)) / S;
  }
  for (let i = 0; i < n; i++) out[at + i * stride] = (column[i]! - sums[block[i]!]!) / Math.sqrt(variance[i]!);
}

/** K^(-1) column, n values, written with a stride. */
export function solve(K: RandomIntercept, column: Float64Array, out: Float64Array, at: number, stride: number): void {
  const { n, nBlocks, variance, block, offsetVariance, precision, sums } = K;
  weightedSums(K, column);
  for (let b = 0; b < nBlocks; b++) sums[b]! *= inverseShare(offsetVariance[b]!, precision[b]!);
  for (let i = 0; i < n; i++) out[at + i * stride] = (column[i]! - sums[block[i]!]!) / variance[i]!;
}

/** (K^(-1))_ii of one point. */
export function inverseDiagonal(K: RandomIntercept, i: number): number {
  const v = K.variance[i]!;
  return (1 - inverseShare(K.offsetVariance[K.block[i]!]!, K.precision[K.block[i]!]!) / v) / v;
}

/** ln det K. */
export function logDeterminant(K: RandomIntercept): number {
  let sum = 0;
  for (let i = 0; i < K.n; i++) sum += Math.log(K.variance[i]!);
  for (let b = 0; b < K.nBlocks; b++) sum += Math.log1p(K.offsetVariance[b]! * K.precision[b]!);
  return sum;
}

function weightedSums({ n, nBlocks, variance, block, sums }: RandomIntercept, column: Float64Array): void {
  sums.fill(0, 0, nBlocks);
  for (let i = 0; i < n; i++) sums[block[i]!]! += column[i]! / variance[i]!;
}
