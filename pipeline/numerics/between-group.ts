/** Consensus of k group estimates y_i with variances v_i and an unknown variance tau^2 between groups. */
export interface Consensus {
  /** tau^2, at least 0. From one group nothing is learnt: 0, with 0 degrees of freedom. */
  readonly betweenVariance: number;
  /** sum w y / sum w, w = 1 / (v + tau^2) */
  readonly mean: number;
  /** 1 / sqrt(sum w): the variances are taken as known, so it is too small for few groups. */
  readonly standardError: number;
  /** Cochran's Q = sum (y - mean)^2 / v about the mean weighted by 1 / v. */
  readonly cochranQ: number;
  /** k - 1 */
  readonly degreesOfFreedom: number;
}

/**
 * DerSimonian-Laird estimate: tau^2 from one step of the method of moments,
 * max(0, (Q - (k - 1)) / (sum w - sum w^2 / sum w)) with w = 1 / v.
 * @throws RangeError if the lists are empty or unequal, a y is not finite or a v not positive and finite.
 * @see DerSimonian and Laird, Control. Clin. Trials 7 (1986) 177-188.
 */
export function derSimonianLaird(estimates: ArrayLike<number>, variances: ArrayLike<number>): Consensus {
  const fixed = begin("DerSimonian-Laird", estimates, variances);
  const surplus = fixed.q - (estimates.length - 1);
  const denominator = fixed.weightSum - fixed.weightSquares / fixed.weightSum;
  const betweenVariance = estimates.length > 1 && surplus > 0 ? surplus / denominator : 0;
  return consensus(estimates, variances, betweenVariance, fixed.q);
}

/**
 * Paule-Mandel estimate: the tau^2 at which sum (y - mean)^2 / (v + tau^2) = k - 1, or 0 where it is less already at 0.
 * The sum is convex and falling, so Newton's method from 0 rises to the root without overshoot.
 * @throws RangeError as {@link derSimonianLaird}.
 * @see Paule and Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385.
 */
export function pauleMandel(estimates: ArrayLike<number>, variances: ArrayLike<number>): Consensus {
  const fixed = begin("Paule-Mandel", estimates, variances);
  const target = estimates.length - 1;
  let betweenVariance = 0;
  let { q, slope } = fixed;
  for (let iteration = 0; iteration < 200 && target > 0 && q > target; iteration++) {
    const next = betweenVariance + (q - target) / slope;
    if (!(next > betweenVariance)) break;
    betweenVariance = next;
    ({ q, slope } = moments(estimates, variances, betweenVariance));
  }
  return consensus(estimates, variances, betweenVariance, fixed.q);
}

function begin(name: string, estimates: ArrayLike<number>, variances: ArrayLike<number>) {
  if (estimates.length === 0 || estimates.length !== variances.length) {
    throw new RangeError(`${name}: ${estimates.length} estimates and ${variances.length} variances`);
  }
  for (let i = 0; i < estimates.length; i++) {
    if (!Number.isFinite(estimates[i]!)) throw new RangeError(`${name}: estimate ${i} is ${estimates[i]}`);
    if (!(variances[i]! > 0 && variances[i]! < Infinity)) {
      throw new RangeError(`${name}: variance ${i} is ${variances[i]}; it must be positive and finite`);
    }
  }
  return moments(estimates, variances, 0);
}

/** Weighted mean, Q, minus its derivative by tau^2, and sums of the weights. */
function moments(estimates: ArrayLike<number>, variances: ArrayLike<number>, betweenVariance: number) {
  const origin = estimates[0]!;
  let weightSum = 0;
  let weightSquares = 0;
  let weighted = 0;
  for (let i = 0; i < estimates.length; i++) {
    const weight = 1 / (variances[i]! + betweenVariance);
    weightSum += weight;
    weightSquares += weight * weight;
    weighted += weight * (estimates[i]! - origin);
  }
  const mean = origin + weighted / weightSum;
  let q = 0;
  let slope = 0;
  for (let i = 0; i < estimates.length; i++) {
    const weight = 1 / (variances[i]! + betweenVariance);
    const part = weight * (estimates[i]! - mean) ** 2;
    q += part;
    slope += weight * part;
  }
  return { mean, q, slope, weightSum, weightSquares };
}

function consensus(
  estimates: ArrayLike<number>,
  variances: ArrayLike<number>,
  betweenVariance: number,
  cochranQ: number,
): Consensus {
  const { mean, weightSum } = moments(estimates, variances, betweenVariance);
  return {
    betweenVariance,
    mean,
    standardError: 1 / Math.sqrt(weightSum),
    cochranQ,
    degreesOfFreedom: estimates.length - 1,
  };
}
