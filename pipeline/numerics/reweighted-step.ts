import { choleskyFactorise, choleskySolve } from "./cholesky.ts";

/** Coefficients of an orthonormal basis Q (row-major, n x p) and residuals, improved step by step in place. */
export interface StepState {
  readonly basis: Float64Array;
  readonly coefficients: Float64Array;
  readonly residuals: Float64Array;
  readonly n: number;
  readonly p: number;
}

/** Buffers of {@link reweightedStep}; `step` is the last change of the coefficients. */
export interface StepWorkspace {
  readonly matrix: Float64Array;
  readonly step: Float64Array;
}

/** Buffers for at most `maxColumns` columns. */
export function createStepWorkspace(maxColumns: number): StepWorkspace {
  return { matrix: new Float64Array(maxColumns * maxColumns), step: new Float64Array(maxColumns) };
}

/**
 * Adds d = (Q'CQ)^-1 Q'W r to the coefficients and takes Q d from the residuals r. With curvatures C equal to the
 * weights W this is a step of iteratively reweighted least squares; with C the derivatives of the influence function
 * it is a Newton step. Returns the largest change of a residual, or NaN (nothing changed) where Q'CQ is not positive
 * definite.
 *
 * Normal equations are safe here only because Q has orthonormal columns; and as each step starts from the residuals,
 * rounding in one is mended by the next.
 */
export function reweightedStep(
  ws: StepWorkspace,
  state: StepState,
  weights: Float64Array,
  curvatures: Float64Array,
): number {
  const { basis, residuals, n, p } = state;
  const { matrix, step } = ws;
  matrix.fill(0, 0, p * p);
  step.fill(0, 0, p);
  for (let i = 0; i < n; i++) {
    const weight = weights[i]!;
    if (weight === 0) continue;
    const pull = weight * residuals[i]!;
    const curvature = curvatures[i]!;
    for (let a = 0; a < p; a++) {
      const entry = basis[i * p + a]!;
      step[a]! += entry * pull;
      for (let b = 0; b <= a; b++) matrix[a * p + b]! += curvature * entry * basis[i * p + b]!;
    }
  }
  if (!choleskyFactorise(matrix, p)) return Number.NaN;
  choleskySolve(matrix, p, step);
  return moveBy(ws, state, 1);
}

/** Undoes the last step. */
export function takeStepBack(ws: StepWorkspace, state: StepState): void {
  moveBy(ws, state, -1);
}

function moveBy({ step }: StepWorkspace, state: StepState, sign: number): number {
  const { basis, coefficients, residuals, n, p } = state;
  for (let a = 0; a < p; a++) coefficients[a]! += sign * step[a]!;
  let largest = 0;
  for (let i = 0; i < n; i++) {
    let change = 0;
    for (let a = 0; a < p; a++) change += basis[i * p + a]! * step[a]!;
    residuals[i]! -= sign * change;
    largest = Math.max(largest, Math.abs(change));
  }
  return largest;
}
