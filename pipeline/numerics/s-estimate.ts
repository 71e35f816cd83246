import { BREAKDOWN_TUNING, bisquareCurvatures, bisquareWeights, mScale, scaleIsBelow } from "./bisquare.ts";
import { drawSubset, elementalFit, nextSubset, numberOfSubsets, usualNumberOfSubsets } from "./elemental-subsets.ts";
import { residualsInto } from "./least-squares.ts";
import { MAD_TO_SIGMA, medianAbsoluteDeviationInto } from "./order-statistics.ts";
import type { RandomSource } from "./random.ts";
import {
  createStepWorkspace,
  reweightedStep,
  type StepState,
  type StepWorkspace,
  takeStepBack,
} from "./reweighted-step.ts";

/** How many of the best elemental fits are improved before one is chosen, and by how many steps. */
const CANDIDATES = 8;
const IMPROVING_STEPS = 2;
const MAX_STEPS = 200;

/** Relative tolerance of the scale, and of a residual's change in units of the scale. */
const TOLERANCE = 1e-10;
const SETTLED = 1e-7;

/** The data of one robust fit, in an orthonormal basis of the design's columns. */
export interface RobustData {
  /** Row-major n x p with orthonormal columns. */
  readonly basis: Float64Array;
  readonly response: Float64Array;
  readonly n: number;
  readonly p: number;
  /** Votes of the rows, at least 0; one each where absent. */
  readonly votes: Float64Array | undefined;
  /** Running sum of the votes, where there are votes. */
  readonly cumulativeVotes: Float64Array | undefined;
  /** (1 - p / n') times the sum of votes, n' the rows with a vote; n - p without votes. */
  readonly votesInAll: number;
  /** Scales below this are rounding error of an exact fit. */
  readonly smallestScale: number;
}

/** Buffers for {@link sEstimate}; the result stands in `coefficients` (of the basis), `residuals` and `scale`. */
export interface SEstimateWorkspace {
  readonly coefficients: Float64Array;
  readonly residuals: Float64Array;
  readonly weights: Float64Array;
  readonly curvatures: Float64Array;
  scale: number;
  readonly step: StepWorkspace;
  readonly scratch: Float64Array;
  readonly rows: Int32Array;
  readonly columnSize: Float64Array;
  readonly candidates: readonly Float64Array[];
  readonly candidateScales: Float64Array;
}

/** Buffers for fits of at most `maxRows` rows and `maxColumns` columns. */
export function createSEstimateWorkspace(maxRows: number, maxColumns: number): SEstimateWorkspace {
  return {
    coefficients: new Float64Array(maxColumns),
    residuals: new Float64Array(maxRows),
    weights: new Float64Array(maxRows),
    curvatures: new Float64Array(maxRows),
    scale: Number.NaN,
    step: createStepWorkspace(maxColumns),
    scratch: new Float64Array(Math.max(maxRows, maxColumns * (maxColumns + 1))),
    rows: new Int32Array(maxColumns),
    columnSize: new Float64Array(maxColumns),
    candidates: Array.from({ length: CANDIDATES }, () => new Float64Array(maxColumns)),
    candidateScales: new Float64Array(CANDIDATES),
  };
}

/**
 * S-estimate of regression: the coefficients whose residuals have the smallest bisquare M-scale (breakdown 1/2).
 *
 * Starts from elemental fits, all of them where there are at most `maxSubsets`, else that many random ones, and from
 * the least-squares fit. The best few are improved by reweighting, the best of these until it settles.
 * Returns the scale, 0 for an exact fit of most votes.
 * @see Salibian-Barrera and Yohai, J. Comput. Graph. Stat. 15 (2006) 414-427.
 */
export function sEstimate(
  ws: SEstimateWorkspace,
  data: RobustData,
  random: () => RandomSource,
  maxSubsets: number = usualNumberOfSubsets(data.p),
): number {
  const { n, p } = data;
  measureColumns(ws, data);
  ws.candidateScales.fill(Infinity);
  projectResponse(ws, data);
  offer(ws, data);
  if (numberOfSubsets(n, p) <= maxSubsets) offerAllSubsets(ws, data);
  else offerRandomSubsets(ws, data, random(), maxSubsets);
  for (let k = 0; k < CANDIDATES; k++) improve(ws, data, k);
  ws.scale = settle(ws, data, indexOfSmallest(ws.candidateScales));
  return ws.scale;
}

/** Coefficients of the least-squares fit, Q'y. */
function projectResponse(ws: SEstimateWorkspace, { basis, response, n, p }: RobustData): void {
  ws.coefficients.fill(0, 0, p);
  for (let i = 0; i < n; i++) for (let j = 0; j < p; j++) ws.coefficients[j]! += basis[i * p + j]! * response[i]!;
}

function offerAllSubsets(ws: SEstimateWorkspace, data: RobustData): void {
  const { n, p } = data;
  for (let k = 0; k < p; k++) ws.rows[k] = k;
  do offerSubset(ws, data);
  while (nextSubset(ws.rows, n, p));
}

/** Subsets of dependent rows do not count, but end the search when draws are ten times as many as wanted. */
function offerRandomSubsets(ws: SEstimateWorkspace, data: RobustData, random: RandomSource, wanted: number): void {
  let found = 0;
  for (let draws = 0; found < wanted && draws < 10 * wanted; draws++) {
    drawSubset(ws.rows, data.n, data.p, random, data.cumulativeVotes);
    if (offerSubset(ws, data)) found += 1;
  }
}

function offerSubset(ws: SEstimateWorkspace, data: RobustData): boolean {
  const { coefficients, scratch, rows, columnSize } = ws;
  if (!elementalFit(coefficients, scratch, rows, data.basis, data.response, data.p, columnSize)) return false;
  offer(ws, data);
  return true;
}

/** Keeps `coefficients` if their scale is below that of the worst candidate; most are dismissed by one pass. */
function offer(ws: SEstimateWorkspace, data: RobustData): void {
  const { coefficients, residuals, candidateScales, candidates, scratch } = ws;
  const { n, p, votes, votesInAll, smallestScale } = data;
  residualsInto(residuals, data.basis, data.response, coefficients, n, p);
  const worst = indexOfLargest(candidateScales);
  let start = candidateScales[worst]!;
  if (start < Infinity) {
    if (!scaleIsBelow(residuals, n, votesInAll, start, votes)) return;
  } else start = MAD_TO_SIGMA * medianAbsoluteDeviationInto(scratch, residuals, n, 0);
  candidateScales[worst] = mScale(residuals, n, votesInAll, start, smallestScale, 1e-3, votes);
  copy(candidates[worst]!, coefficients, p);
}

/** A few steps of reweighted least squares from candidate k, each of which lowers the scale; replaces the candidate. */
function improve(ws: SEstimateWorkspace, data: RobustData, k: number): void {
  const { coefficients, weights, candidateScales, candidates } = ws;
  const state = stateAt(ws, data, k);
  let scale = candidateScales[k]!;
  for (let step = 0; step < IMPROVING_STEPS && scale > 0 && scale < Infinity; step++) {
    bisquareWeights(weights, state.residuals, data.n, BREAKDOWN_TUNING * scale, data.votes);
    if (Number.isNaN(reweightedStep(ws.step, state, weights, weights))) break;
    scale = scaleOf(ws, data, scale, 1e-3);
  }
  candidateScales[k] = scale;
  copy(candidates[k]!, coefficients, data.p);
}

/**
 * Goes from candidate k to the minimum of the scale, by Newton steps where they lower it and reweighting (which always
 * does, but slowly) elsewhere. The result stands in `coefficients` and `residuals`; returns the scale.
 */
function settle(ws: SEstimateWorkspace, data: RobustData, k: number): number {
  const { weights, curvatures } = ws;
  const { n, votes } = data;
  const state = stateAt(ws, data, k);
  let scale = scaleOf(ws, data, ws.candidateScales[k]!, TOLERANCE);
  for (let step = 0; step < MAX_STEPS && scale > 0; step++) {
    const cutoff = BREAKDOWN_TUNING * scale;
    bisquareWeights(weights, state.residuals, n, cutoff, votes);
    bisquareCurvatures(curvatures, state.residuals, n, cutoff, votes);
    let change = reweightedStep(ws.step, state, weights, curvatures);
    let next = Number.isNaN(change) ? Infinity : scaleOf(ws, data, scale, TOLERANCE);
    if (next > scale * (1 + TOLERANCE)) {
      if (!Number.isNaN(change)) takeStepBack(ws.step, state);
      change = reweightedStep(ws.step, state, weights, weights);
      if (Number.isNaN(change)) break;
      next = scaleOf(ws, data, scale, TOLERANCE);
    }
    scale = next;
    if (change <= SETTLED * scale) break;
  }
  return scale;
}

/** Sets `coefficients` and `residuals` to those of candidate k. */
function stateAt(ws: SEstimateWorkspace, { basis, response, n, p }: RobustData, k: number): StepState {
  const { coefficients, residuals, candidates } = ws;
  copy(coefficients, candidates[k]!, p);
  residualsInto(residuals, basis, response, coefficients, n, p);
  return { basis, coefficients, residuals, n, p };
}

function scaleOf(ws: SEstimateWorkspace, data: RobustData, start: number, tolerance: number): number {
  return mScale(ws.residuals, data.n, data.votesInAll, start, data.smallestScale, tolerance, data.votes);
}

function measureColumns(ws: SEstimateWorkspace, { basis, n, p }: RobustData): void {
  for (let j = 0; j < p; j++) {
    let size = 0;
    for (let i = 0; i < n; i++) size = Math.max(size, Math.abs(basis[i * p + j]!));
    ws.columnSize[j] = size;
  }
}

function copy(target: Float64Array, source: Float64Array, count: number): void {
  for (let k = 0; k < count; k++) target[k] = source[k]!;
}

function indexOfLargest(values: Float64Array): number {
  let best = 0;
  for (let k = 1; k < values.length; k++) if (values[k]! > values[best]!) best = k;
  return best;
}

function indexOfSmallest(values: Float64Array): number {
  let best = 0;
  for (let k = 1; k < values.length; k++) if (values[k]! < values[best]!) best = k;
  return best;
}
