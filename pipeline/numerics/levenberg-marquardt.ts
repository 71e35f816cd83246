import {
  createLeastSquaresWorkspace,
  type LeastSquaresWorkspace,
  leastSquaresCovariance,
  leastSquaresInto,
  weightedSumOfSquares,
} from "./least-squares.ts";
import { centralDifferenceJacobian } from "./numerical-jacobian.ts";

/** Writes n residuals r(parameters); entries that are not finite mark parameters outside the domain. */
export type Residuals = (parameters: Float64Array, result: Float64Array) => void;

/** Writes dr_i / dparameter_j, row-major n x p. */
export type Jacobian = (parameters: Float64Array, result: Float64Array) => void;

/** A nonlinear least-squares problem: the parameters that make sum r_i^2 smallest. Weight by scaling the residuals. */
export interface NonlinearProblem {
  readonly residuals: Residuals;
  /** By central differences (about 10 digits) where absent. */
  readonly jacobian?: Jacobian;
  /** Number of residuals. */
  readonly n: number;
  readonly start: Float64Array;
  /** Default 1000. */
  readonly maxIterations?: number;
}

/** How the search ended; only "converged" is a solution. */
export type NonlinearStatus =
  /** The relative offset or the full Gauss-Newton step is at rounding level. */
  | "converged"
  /** No step lowers the sum of squares, though the stop tests are not met: see `relativeOffset`. */
  | "stalled"
  | "iteration-limit";

/** Result of {@link levenbergMarquardt}. */
export interface NonlinearFit {
  readonly status: NonlinearStatus;
  readonly parameters: Float64Array;
  readonly residuals: Float64Array;
  readonly residualSumOfSquares: number;
  /** Rank of the Jacobian at the solution. Below p the covariance holds NaN. */
  readonly rank: number;
  /** (J'J)^-1, row-major p x p; times the residual variance it is the linearised covariance of the parameters. */
  readonly unscaledCovariance: Float64Array;
  /** Length of the part of the residuals that the Jacobian explains, relative to all; 0 at a stationary point. */
  readonly relativeOffset: number;
  readonly iterations: number;
}

const OFFSET_TOLERANCE = 1e-9;
const STEP_TOLERANCE = 1e-11;
/** Offset that rounding of the residuals may leave. */
const ATTAINABLE_OFFSET = 1e-6;
const ROUNDING = 1e-12;
/** Cautious: from far away a first long step may end where the model no longer depends on its parameters. */
const FIRST_DAMPING = 300;
const LARGEST_DAMPING = 1e16;

interface Search {
  readonly problem: NonlinearProblem;
  readonly p: number;
  readonly parameters: Float64Array;
  readonly trial: Float64Array;
  readonly residuals: Float64Array;
  readonly trialResiduals: Float64Array;
  /** Row-major (n + p) x p: the Jacobian, and below it the damping rows. */
  readonly design: Float64Array;
  /** -r, and p zeros. */
  readonly target: Float64Array;
  readonly columnSize: Float64Array;
  readonly linear: LeastSquaresWorkspace;
  sumOfSquares: number;
  damping: number;
  growth: number;
  relativeOffset: number;
  rank: number;
}

/**
 * Levenberg-Marquardt search with damping in units of the largest column norms seen, each step solved as an augmented
 * least-squares problem by QR (the normal equations are never formed).
 *
 * Stops when the relative offset is at most 1e-9 or every Gauss-Newton step is at most 1e-11 of its parameter.
 * @throws RangeError if residuals or Jacobian are not finite at the start, or n is below the number of parameters.
 * @see More, in Numerical Analysis, ed. Watson (Springer, 1978) 105-116 (scaling); Nielsen, IMM-REP-1999-05
 *   (damping); Bates and Watts, Technometrics 23 (1981) 179-183 (relative offset).
 */
export function levenbergMarquardt(problem: NonlinearProblem): NonlinearFit {
  const search = begin(problem);
  const maxIterations = problem.maxIterations ?? 1000;
  let status: NonlinearStatus = "iteration-limit";
  let iterations = 0;
  linearise(search);
  while (iterations < maxIterations) {
    if (isSolved(search)) {
      status = "converged";
      break;
    }
    iterations += 1;
    if (!descend(search)) {
      status = polish(search) ? "converged" : "stalled";
      break;
    }
    linearise(search);
  }
  isSolved(search);
  return {
    status,
    parameters: search.parameters,
    residuals: search.residuals,
    residualSumOfSquares: search.sumOfSquares,
    rank: search.rank,
    unscaledCovariance: leastSquaresCovariance(search.linear).slice(0, search.p * search.p),
    relativeOffset: search.relativeOffset,
    iterations,
  };
}

function begin(problem: NonlinearProblem): Search {
  const { n, start } = problem;
  const p = start.length;
  if (!(n >= p && p >= 1)) throw new RangeError(`Levenberg-Marquardt: ${n} residuals for ${p} parameters`);
  const search: Search = {
    problem,
    p,
    parameters: Float64Array.from(start),
    trial: new Float64Array(p),
    residuals: new Float64Array(n),
    trialResiduals: new Float64Array(n),
    design: new Float64Array((n + p) * p),
    target: new Float64Array(n + p),
    columnSize: new Float64Array(p),
    linear: createLeastSquaresWorkspace(n + p, p),
    sumOfSquares: 0,
    damping: FIRST_DAMPING,
    growth: 2,
    relativeOffset: Number.NaN,
    rank: 0,
  };
  problem.residuals(search.parameters, search.residuals);
  search.sumOfSquares = weightedSumOfSquares(search.residuals, n);
  if (!(search.sumOfSquares < Infinity)) {
    throw new RangeError("Levenberg-Marquardt: the residuals at the start are not finite");
  }
  return search;
}

/** Jacobian and right-hand side at the present parameters; column sizes never shrink. */
function linearise(search: Search): void {
  const { problem, p, parameters, design, target, residuals, columnSize } = search;
  const { n } = problem;
  if (problem.jacobian) problem.jacobian(parameters, design);
  else centralDifferenceJacobian(problem.residuals, parameters, n, design);
  for (let i = 0; i < n; i++) target[i] = -residuals[i]!;
  for (let j = 0; j < p; j++) {
    let squares = 0;
    for (let i = 0; i < n; i++) squares += design[i * p + j]! ** 2;
    columnSize[j] = Math.max(columnSize[j]!, Math.sqrt(squares));
  }
}

/** Solves the undamped problem and applies the stop tests. */
function isSolved(search: Search): boolean {
  const { problem, p, parameters, design, target, linear } = search;
  search.rank = leastSquaresInto(linear, design, target, problem.n, p);
  const length = Math.sqrt(search.sumOfSquares);
  search.relativeOffset = length > 0 ? explainedLength(search) / length : 0;
  if (length === 0) return true;
  if (search.rank < p) return false;
  if (search.relativeOffset <= OFFSET_TOLERANCE) return true;
  for (let j = 0; j < p; j++) {
    if (Math.abs(linear.coefficients[j]!) > STEP_TOLERANCE * Math.abs(parameters[j]!)) return false;
  }
  return true;
}

/** |J d| for the step d just solved. */
function explainedLength({ problem, p, design, linear }: Search): number {
  let squares = 0;
  for (let i = 0; i < problem.n; i++) {
    let change = 0;
    for (let j = 0; j < p; j++) change += design[i * p + j]! * linear.coefficients[j]!;
    squares += change * change;
  }
  return Math.sqrt(squares);
}

/**
 * Where the fall of the sum of squares is lost in rounding, its gradient still tells the way: plain Gauss-Newton steps
 * while the relative offset falls by half or more. Returns whether it is then at most 1e-6.
 */
function polish(search: Search): boolean {
  const { problem, p, parameters, trial, residuals, trialResiduals, linear } = search;
  linearise(search);
  if (isSolved(search)) return true;
  while (search.rank === p) {
    const before = search.relativeOffset;
    const sumBefore = search.sumOfSquares;
    trial.set(parameters);
    trialResiduals.set(residuals);
    for (let j = 0; j < p; j++) parameters[j]! += linear.coefficients[j]!;
    problem.residuals(parameters, residuals);
    search.sumOfSquares = weightedSumOfSquares(residuals, problem.n);
    if (search.sumOfSquares <= sumBefore * (1 + ROUNDING)) {
      linearise(search);
      if (isSolved(search)) return true;
      if (search.relativeOffset <= before / 2) continue;
    }
    parameters.set(trial);
    residuals.set(trialResiduals);
    search.sumOfSquares = sumBefore;
    linearise(search);
    isSolved(search);
    return search.relativeOffset <= ATTAINABLE_OFFSET;
  }
  return false;
}

/** Tries steps of growing damping until one lowers the sum of squares; false if none does. */
function descend(search: Search): boolean {
  const { problem, p, parameters, trial, trialResiduals, residuals } = search;
  while (search.damping < LARGEST_DAMPING) {
    const predicted = dampedStep(search);
    for (let j = 0; j < p; j++) trial[j] = parameters[j]! + search.linear.coefficients[j]!;
    problem.residuals(trial, trialResiduals);
    const sum = weightedSumOfSquares(trialResiduals, problem.n);
    const gain = (search.sumOfSquares - sum) / predicted;
    if (gain > 0 && sum < search.sumOfSquares) {
      search.damping = Math.max(1e-15, search.damping * Math.max(1 / 3, 1 - (2 * gain - 1) ** 3));
      search.growth = 2;
      search.sumOfSquares = sum;
      parameters.set(trial);
      residuals.set(trialResiduals);
      return true;
    }
    search.damping *= search.growth;
    search.growth *= 2;
  }
  return false;
}

/**
 * Step d that makes |r + J d|^2 + damping |D d|^2 smallest; returns the fall of |r|^2 that the linear model predicts,
 * |J d|^2 + 2 damping |D d|^2.
 */
function dampedStep(search: Search): number {
  const { problem, p, design, target, columnSize, linear } = search;
  const { n } = problem;
  const root = Math.sqrt(search.damping);
  design.fill(0, n * p);
  for (let j = 0; j < p; j++) design[(n + j) * p + j] = root * (columnSize[j]! || 1);
  leastSquaresInto(linear, design, target, n + p, p);
  let dampingTerm = 0;
  for (let j = 0; j < p; j++) dampingTerm += (root * (columnSize[j]! || 1) * linear.coefficients[j]!) ** 2;
  return explainedLength(search) ** 2 + 2 * dampingTerm;
}
