/**
 * Tukey's bisquare: rho(u) = 1 - (1 - u^2)^3 for |u| < 1, else 1, with u = r / (c s); weight (1 - u^2)^2.
 * And the M-scale built on it: the s at which the mean of rho is 1/2.
 */

/** c of the S-estimate: with a mean of 1/2 it has breakdown 1/2 and is consistent at the normal law. */
export const BREAKDOWN_TUNING = 1.54764;

/** c of the final M-step: 95 % efficiency at the normal law. */
export const EFFICIENCY_TUNING = 4.685061;

const MEAN_RHO = 0.5;

/** Robustness weights (1 - (r / (c s))^2)^2, 0 beyond c s, written to `weights`; times `votes` where given. */
export function bisquareWeights(
  weights: Float64Array,
  residuals: Float64Array,
  n: number,
  cutoff: number,
  votes?: Float64Array,
): void {
  const inverse = 1 / cutoff;
  for (let i = 0; i < n; i++) {
    const u = residuals[i]! * inverse;
    const rest = 1 - u * u;
    const weight = rest > 0 ? rest * rest : 0;
    weights[i] = votes ? votes[i]! * weight : weight;
  }
}

/** Derivatives of the influence function, (1 - u^2)(1 - 5 u^2) with u = r / cutoff, 0 beyond; times `votes`. */
export function bisquareCurvatures(
  curvatures: Float64Array,
  residuals: Float64Array,
  n: number,
  cutoff: number,
  votes?: Float64Array,
): void {
  const inverse = 1 / cutoff;
  for (let i = 0; i < n; i++) {
    const u = residuals[i]! * inverse;
    const square = u * u;
    const curvature = square < 1 ? (1 - square) * (1 - 5 * square) : 0;
    curvatures[i] = votes ? votes[i]! * curvature : curvature;
  }
}

/** sum v_i rho(r_i / cutoff); votes v_i of 1 where absent. */
export function sumOfRho(residuals: Float64Array, n: number, cutoff: number, votes?: Float64Array): number {
  const inverse = 1 / cutoff;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const u = residuals[i]! * inverse;
    const square = u * u;
    const rho = square < 1 ? square * (3 - square * (3 - square)) : 1;
    sum += votes ? votes[i]! * rho : rho;
  }
  return sum;
}

/**
 * M-scale s of residuals: sum v_i rho(r_i / (c s)) = `votesInAll` / 2, by Newton's method from `start`.
 *
 * `votesInAll` is the sum of the votes less the share of the fitted parameters; n - p for votes of 1. Returns 0 when
 * so many residuals are (almost) 0 that the solution lies below `smallest`, and then the fit is exact for most votes.
 * @see Rousseeuw and Yohai, in Robust and Nonlinear Time Series Analysis (1984) 256-272.
 */
export function mScale(
  residuals: Float64Array,
  n: number,
  votesInAll: number,
  start: number,
  smallest: number,
  tolerance: number,
  votes?: Float64Array,
): number {
  const target = MEAN_RHO * votesInAll;
  let s = Math.max(start, smallest);
  for (let iteration = 0; iteration < 200; iteration++) {
    const inverse = 1 / (BREAKDOWN_TUNING * s);
    let sum = 0;
    let slope = 0;
    for (let i = 0; i < n; i++) {
      const u = residuals[i]! * inverse;
      const square = u * u;
      const vote = votes ? votes[i]! : 1;
      if (square < 1) {
        const rest = 1 - square;
        sum += vote * square * (3 - square * (3 - square));
        slope += vote * 6 * square * rest * rest;
      } else sum += vote;
    }
    const factor = Math.min(3, Math.max(1 / 3, slope > 0 ? 1 + (sum - target) / slope : sum > target ? 3 : 1 / 3));
    s *= factor;
    if (s < smallest) return 0;
    if (Math.abs(factor - 1) <= tolerance) return s;
  }
  return s;
}

/** Whether the M-scale of the residuals is below s: one pass, no solving. */
export function scaleIsBelow(
  residuals: Float64Array,
  n: number,
  votesInAll: number,
  s: number,
  votes?: Float64Array,
): boolean {
  return sumOfRho(residuals, n, BREAKDOWN_TUNING * s, votes) < MEAN_RHO * votesInAll;
}
