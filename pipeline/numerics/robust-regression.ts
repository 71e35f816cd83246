import { BREAKDOWN_TUNING, bisquareCurvatures, bisquareWeights, EFFICIENCY_TUNING, sumOfRho } from "./bisquare.ts";
import { createLeastSquaresWorkspace, type LeastSquaresWorkspace, leastSquaresInto } from "./least-squares.ts";
import { orthonormalBasis } from "./qr-solve.ts";
import { seededRandom } from "./random.ts";
import { reweightedStep, type StepState, takeStepBack } from "./reweighted-step.ts";
import { createSEstimateWorkspace, type RobustData, type SEstimateWorkspace, sEstimate } from "./s-estimate.ts";

/** How a robust fit ended. */
export type RobustStatus =
  /** The MM equations are solved. */
  | "converged"
  /** 500 reweightings did not settle; the last state is given. */
  | "not-converged"
  /** Half of the votes (or all points, when n = p) lie on the fit but for rounding; scale 0, weights 0 or 1. */
  | "exact-fit"
  /** Fewer than p independent columns; plain least squares is given, with weights of 1 and scale NaN. */
  | "rank-deficient";

/** Settings of {@link robustRegression}. */
export interface RobustOptions {
  /**
   * Votes of the rows in the high-breakdown start and its scale, at least 0, for instance {@link equalVotes} so that
   * every group has one. The MM step that follows counts rows alike.
   */
  readonly votes?: Float64Array;
  /** Seed of the random subsets, needed only where not all are tried. Default 1. */
  readonly seed?: number;
  /** Most elemental fits in the start. Default: 20, 49, 104 for p = 1 to 3, 2000 or more beyond. */
  readonly maxSubsets?: number;
}

/** Buffers, and after {@link robustRegressionInto} the result in order of rows and columns. */
export interface RobustWorkspace {
  readonly leastSquares: LeastSquaresWorkspace;
  readonly start: SEstimateWorkspace;
  readonly basis: Float64Array;
  readonly cumulativeVotes: Float64Array;
  readonly startCoefficients: Float64Array;
  readonly coefficients: Float64Array;
  readonly residuals: Float64Array;
  readonly weights: Float64Array;
  /** S-scale of the start, sum of rho over n - p equal to 1/2: the error SD at the normal law for large n. */
  scale: number;
  rank: number;
  iterations: number;
}

/** Result of {@link robustRegression}. */
export interface RobustFit {
  readonly status: RobustStatus;
  readonly rank: number;
  /** MM-estimate, length p. */
  readonly coefficients: Float64Array;
  /** y - Xb, length n. */
  readonly residuals: Float64Array;
  /** Robustness weights in [0, 1], length n; 0 from |r| = 4.685 scale. */
  readonly weights: Float64Array;
  /** S-scale (divisor n - p). */
  readonly scale: number;
  /** `scale` times {@link smallSampleScaleFactor}: nearly free of bias for normal errors at small n. */
  readonly correctedScale: number;
  /** S-estimate from which the MM step started. */
  readonly startCoefficients: Float64Array;
  readonly iterations: number;
}

const MAX_ITERATIONS = 500;
const TOLERANCE = 1e-8;

/** Buffers for fits of at most `maxRows` rows and `maxColumns` columns. @throws RangeError on a size below 1. */
export function createRobustWorkspace(maxRows: number, maxColumns: number): RobustWorkspace {
  return {
    leastSquares: createLeastSquaresWorkspace(maxRows, maxColumns),
    start: createSEstimateWorkspace(maxRows, maxColumns),
    basis: new Float64Array(maxRows * maxColumns),
    cumulativeVotes: new Float64Array(maxRows),
    startCoefficients: new Float64Array(maxColumns),
    coefficients: new Float64Array(maxColumns),
    residuals: new Float64Array(maxRows),
    weights: new Float64Array(maxRows),
    scale: Number.NaN,
    rank: 0,
    iterations: 0,
  };
}

/**
 * MM-estimate of linear regression: S-estimate (breakdown 1/2) as start and scale, then a bisquare M-step of 95 %
 * efficiency at the normal law.
 *
 * - design  X, row-major n x p; divide row and response by the error SD where the errors differ in size
 * - response  y, length n
 *
 * Six rows and three columns withstand one bad row; in general floor((n - p - 1) / 2) in general position.
 * @throws RangeError as leastSquares, or if a vote is negative, not finite, or fewer than p + 1 rows have one.
 * @see Yohai, Ann. Stat. 15 (1987) 642-656.
 */
export function robustRegression(
  design: Float64Array,
  response: Float64Array,
  n: number,
  p: number,
  options: RobustOptions = {},
): RobustFit {
  const ws = createRobustWorkspace(n, p);
  const status = robustRegressionInto(ws, design, response, n, p, options);
  return {
    status,
    rank: ws.rank,
    coefficients: ws.coefficients,
    residuals: ws.residuals,
    weights: ws.weights,
    scale: ws.scale,
    correctedScale: ws.scale * smallSampleScaleFactor(n, p),
    startCoefficients: ws.startCoefficients,
    iterations: ws.iterations,
  };
}

/** The same as {@link robustRegression} into buffers, without allocating in its loops. @throws RangeError likewise. */
export function robustRegressionInto(
  ws: RobustWorkspace,
  design: Float64Array,
  response: Float64Array,
  n: number,
  p: number,
  options: RobustOptions = {},
): RobustStatus {
  ws.rank = leastSquaresInto(ws.leastSquares, design, response, n, p);
  ws.iterations = 0;
  ws.weights.fill(1, 0, n);
  ws.scale = ws.rank < p ? Number.NaN : 0;
  if (ws.rank < p || n === p) {
    keep(ws, n, p);
    ws.startCoefficients.set(ws.coefficients);
    return ws.rank < p ? "rank-deficient" : "exact-fit";
  }
  orthonormalBasis(ws.leastSquares.qr, ws.basis);
  const data = describe(ws, response, n, p, options.votes);
  ws.scale = sEstimate(ws.start, data, () => seededRandom(options.seed ?? 1), options.maxSubsets);
  return ws.scale === 0 ? exactFit(ws, design, data) : mStep(ws, design, data);
}

/** One vote for every group: each row gets 1 / (rows of its group). Groups are told apart by their numbers. */
export function equalVotes(groups: ArrayLike<number>): Float64Array {
  const sizes = new Map<number, number>();
  for (let i = 0; i < groups.length; i++) sizes.set(groups[i]!, (sizes.get(groups[i]!) ?? 0) + 1);
  return Float64Array.from(groups, (group) => 1 / sizes.get(group)!);
}

/**
 * Factor that takes the mean bias off the S-scale of n normal errors and p coefficients:
 * 1 / (1 - 0.6 (p - 1) / (n + 5)), and 1 / 1.20 and 1 / 1.23 for n - p of 1 and 2.
 *
 * Measured by simulation (normal errors, equally spaced points, polynomials up to degree 3, p = 1 to 4, n up to 200):
 * the bias left is within 4 % from n - p = 3 on, and within 6 % below. One sample scatters by far more.
 */
export function smallSampleScaleFactor(n: number, p: number): number {
  if (n - p <= 2) return 1 / (n - p === 2 ? 1.23 : 1.2);
  return 1 / (1 - (0.6 * (p - 1)) / (n + 5));
}

/** Lowers sum rho(r / (c s)) in the orthonormal basis until it settles, then solves once by QR on the design itself. */
function mStep(ws: RobustWorkspace, design: Float64Array, data: RobustData): RobustStatus {
  const { basis, response, n, p, votes } = data;
  const { coefficients, residuals } = ws.start;
  bisquareWeights(ws.weights, residuals, n, BREAKDOWN_TUNING * ws.scale, votes);
  leastSquaresInto(ws.leastSquares, design, response, n, p, ws.weights);
  for (let j = 0; j < p; j++) ws.startCoefficients[j] = ws.leastSquares.coefficients[j]!;
  const state = { basis, coefficients, residuals, n, p };
  const cutoff = EFFICIENCY_TUNING * ws.scale;
  let change = Infinity;
  while (change > TOLERANCE * ws.scale && ws.iterations < MAX_ITERATIONS) {
    ws.iterations += 1;
    change = descend(ws, state, cutoff);
  }
  bisquareWeights(ws.weights, residuals, n, cutoff);
  leastSquaresInto(ws.leastSquares, design, response, n, p, ws.weights);
  keep(ws, n, p);
  return change <= TOLERANCE * ws.scale ? "converged" : "not-converged";
}

/** A Newton step where that lowers the loss, else one of reweighting, which always does. Returns the largest change. */
function descend(ws: RobustWorkspace, state: StepState, cutoff: number): number {
  const { residuals, n } = state;
  const { step, curvatures } = ws.start;
  bisquareWeights(ws.weights, residuals, n, cutoff);
  bisquareCurvatures(curvatures, residuals, n, cutoff);
  const loss = sumOfRho(residuals, n, cutoff);
  const change = reweightedStep(step, state, ws.weights, curvatures);
  if (change >= 0) {
    if (sumOfRho(residuals, n, cutoff) <= loss * (1 + 1e-12)) return change;
    takeStepBack(step, state);
  }
  return reweightedStep(step, state, ws.weights, ws.weights);
}

/** Least squares over the rows on the exact fit, so that rounding in one elemental fit does not show. */
function exactFit(ws: RobustWorkspace, design: Float64Array, data: RobustData): RobustStatus {
  const { response, n, p, smallestScale } = data;
  for (let i = 0; i < n; i++) ws.weights[i] = Math.abs(ws.start.residuals[i]!) <= 10 * smallestScale ? 1 : 0;
  leastSquaresInto(ws.leastSquares, design, response, n, p, ws.weights);
  keep(ws, n, p);
  ws.startCoefficients.set(ws.coefficients);
  return "exact-fit";
}

function keep(ws: RobustWorkspace, n: number, p: number): void {
  const { coefficients, residuals } = ws.leastSquares;
  for (let j = 0; j < p; j++) ws.coefficients[j] = coefficients[j]!;
  for (let i = 0; i < n; i++) ws.residuals[i] = residuals[i]!;
}

function describe(
  ws: RobustWorkspace,
  response: Float64Array,
  n: number,
  p: number,
  votes: Float64Array | undefined,
): RobustData {
  let sum = 0;
  let voters = 0;
  let largestResponse = 0;
  for (let i = 0; i < n; i++) {
    const vote = votes ? votes[i]! : 1;
    if (!(vote >= 0 && vote < Infinity)) throw new RangeError(`robust regression: vote ${i} is ${vote}`);
    sum += vote;
    ws.cumulativeVotes[i] = sum;
    if (vote > 0) voters += 1;
    largestResponse = Math.max(largestResponse, Math.abs(response[i]!));
  }
  if (voters <= p) throw new RangeError(`robust regression: ${voters} rows with a vote, more than ${p} needed`);
  return {
    basis: ws.basis,
    response,
    n,
    p,
    votes,
    votesInAll: sum * (1 - p / voters),
    cumulativeVotes: votes ? ws.cumulativeVotes : undefined,
    smallestScale: Math.max(1e-14 * largestResponse, 1e-290),
  };
}
