/**
 * Correlation coefficients r_ij of n inputs, row after row (n x n, ones on the diagonal, symmetric). Left out: none.
 */
export type Correlation = ArrayLike<number>;

/** The combined standard uncertainty and what each input contributes to it, with sign: sensitivity times uncertainty. */
export interface Propagated {
  readonly standardUncertainty: number;
  readonly contributions: readonly number[];
}

/**
 * First-order propagation of uncertainty: u^2 = sum_i sum_j c_i c_j u_i u_j r_ij.
 *
 * - sensitivities c_i = df/dx_i at the estimates   - standardUncertainties u_i of the inputs, not negative
 *
 * Holds where f is nearly linear over the uncertainties. Without `correlation` the inputs are independent.
 * @throws RangeError if the lengths differ or an uncertainty is negative or not a number.
 * @see JCGM 100:2008 (GUM), equations 10, 13 and 16.
 * @example propagate([1, 2], [0.3, 0.2]).standardUncertainty // 0.5
 */
export function propagate(
  sensitivities: ArrayLike<number>,
  standardUncertainties: ArrayLike<number>,
  correlation?: Correlation,
): Propagated {
  const contributions = contributionsOf(sensitivities, standardUncertainties);
  return { standardUncertainty: Math.sqrt(quadraticForm(contributions, contributions, correlation)), contributions };
}

/**
 * Correlation coefficient of two results that share their inputs, from the sensitivities of both:
 * r = sum_i sum_j a_i b_j u_i u_j r_ij / (u(f) u(g)). 0 where one of them is exact.
 * @throws RangeError as `propagate`.
 * @see JCGM 100:2008 (GUM), H.2.3 and F.1.2.3.
 */
export function correlationOfResults(
  sensitivitiesOfFirst: ArrayLike<number>,
  sensitivitiesOfSecond: ArrayLike<number>,
  standardUncertainties: ArrayLike<number>,
  correlation?: Correlation,
): number {
  const first = contributionsOf(sensitivitiesOfFirst, standardUncertainties);
  const second = contributionsOf(sensitivitiesOfSecond, standardUncertainties);
  const ofFirst = quadraticForm(first, first, correlation);
  const ofSecond = quadraticForm(second, second, correlation);
  if (ofFirst === 0 || ofSecond === 0) return 0;
  return bilinearForm(first, second, correlation) / Math.sqrt(ofFirst * ofSecond);
}

function contributionsOf(sensitivities: ArrayLike<number>, uncertainties: ArrayLike<number>): number[] {
  if (sensitivities.length !== uncertainties.length) {
    throw new RangeError(
      `propagate got ${sensitivities.length} sensitivities for ${uncertainties.length} uncertainties`,
    );
  }
  return Array.from(sensitivities, (sensitivity, i) => {
    const u = uncertainties[i] ?? Number.NaN;
    if (!(u >= 0)) throw new RangeError(`propagate got ${u} as a standard uncertainty; it must be 0 or more`);
    return sensitivity * u;
  });
}

/** Never below 0: with correlations near 1 rounding can leave a tiny negative sum. */
function quadraticForm(a: readonly number[], b: readonly number[], correlation: Correlation | undefined): number {
  return Math.max(0, bilinearForm(a, b, correlation));
}

function bilinearForm(a: readonly number[], b: readonly number[], correlation: Correlation | undefined): number {
  if (correlation !== undefined && correlation.length !== a.length * a.length) {
    throw new RangeError(`propagate needs ${a.length} x ${a.length} correlations, got ${correlation.length}`);
  }
  let sum = 0;
  for (let i = 0; i < a.length; i++) {
    if (correlation === undefined) {
      sum += (a[i] ?? 0) * (b[i] ?? 0);
      continue;
    }
    for (let j = 0; j < b.length; j++) sum += (a[i] ?? 0) * (b[j] ?? 0) * (correlation[i * a.length + j] ?? 0);
  }
  return sum;
}
