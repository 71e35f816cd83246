/** Gaussian information criteria of a least-squares fit; of models fitted to the same rows the smallest is best. */
export interface InformationCriteria {
  /** -n/2 (ln(2 pi RSS / n) + 1) */
  readonly logLikelihood: number;
  /** -2 ln L + 2k */
  readonly aic: number;
  /** AIC + 2k(k + 1) / (n - k - 1); Infinity where n is below k + 2. */
  readonly aicc: number;
  /** -2 ln L + k ln n */
  readonly bic: number;
}

/**
 * AIC, AICc and BIC with k = p + 1 parameters: p coefficients and the error variance.
 *
 * - residualSumOfSquares  weighted, if weights were used; then all models must share the weights
 *
 * A perfect fit (RSS 0) has likelihood Infinity and criteria -Infinity, unless n is too small for AICc.
 * @throws RangeError if n is below 1, p below 0, or the residual sum of squares is negative or not finite.
 * @see Hurvich and Tsai, Biometrika 76 (1989) 297-307; Burnham and Anderson, Model Selection (2002), chapter 2.
 */
export function informationCriteria(residualSumOfSquares: number, n: number, p: number): InformationCriteria {
  if (!(n >= 1 && p >= 0)) throw new RangeError(`information criteria: ${n} rows and ${p} coefficients`);
  if (!(residualSumOfSquares >= 0 && residualSumOfSquares < Infinity)) {
    throw new RangeError(`information criteria: a residual sum of squares of ${residualSumOfSquares}`);
  }
  const k = p + 1;
  const logLikelihood = (-n / 2) * (Math.log((2 * Math.PI * residualSumOfSquares) / n) + 1);
  const aic = -2 * logLikelihood + 2 * k;
  return {
    logLikelihood,
    aic,
    aicc: n >= k + 2 ? aic + (2 * k * (k + 1)) / (n - k - 1) : Infinity,
    bic: -2 * logLikelihood + k * Math.log(n),
  };
}

/**
 * Residual of row i from the fit without row i, e_i / (1 - h_i), for least squares with or without weights.
 *
 * A row of leverage 1 (within 1e-10) has no such residual, as the other rows do not determine the fit there: Infinity
 * is written.
 * @see Allen, Technometrics 16 (1974) 125-127.
 */
export function leaveOneOutResiduals(
  residuals: Float64Array,
  leverages: Float64Array,
  result: Float64Array = new Float64Array(residuals.length),
): Float64Array {
  for (let i = 0; i < residuals.length; i++) {
    const rest = 1 - leverages[i]!;
    result[i] = rest > 1e-10 ? residuals[i]! / rest : Infinity;
  }
  return result;
}

/** PRESS, sum w_i (e_i / (1 - h_i))^2, without refitting; Infinity if a row that counts has leverage 1. */
export function predictedResidualSumOfSquares(
  residuals: Float64Array,
  leverages: Float64Array,
  weights?: Float64Array,
): number {
  let sum = 0;
  for (let i = 0; i < residuals.length; i++) {
    const weight = weights ? weights[i]! : 1;
    if (weight === 0) continue;
    const rest = 1 - leverages[i]!;
    if (!(rest > 1e-10)) return Infinity;
    sum += weight * (residuals[i]! / rest) ** 2;
  }
  return sum;
}
