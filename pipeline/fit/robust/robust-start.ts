import { SCREENING_STRIDE } from "../../curves/screening-basis.ts";
import { fitGroupedModel, type GroupedModel } from "../../numerics/grouped-model.ts";
import { medianInPlace } from "../../numerics/order-statistics.ts";
import { modelOf, type RobustWorkspace } from "./robust-workspace.ts";

/** Scale of a deviation within a source, in ln value, while nothing is known yet. */
const START_SD = 0.045;
/** Scale of a difference between sources at the start. */
const START_BETWEEN_SD = 0.09;
/** Squared standardised deviation from which a point costs no more: 3 standard deviations. */
const LOSS_BOUND = 9;
/** Points of a source beyond this many add no weight: ten bad points must not outvote two sources of five good ones. */
const FULL_VOTE = 4;
/** Slopes b1 of ordinary dissolution, 20 +- 30 kJ/mol; breaks ties among few points. Common practice. */
const USUAL_SLOPE = -8;
const USUAL_SLOPE_SD = 12;
const MOST_SLOPES = 48;
/** Variance of an offset that is as good as free, ln units squared. */
export const FREE_OFFSET_VARIANCE = 25;

/**
 * High-breakdown start of one system: candidate slopes come from pairs of points, mostly within a source, so that
 * offsets between sources cannot tilt the curve; each source has its own intercept; the slope with the least bounded
 * loss, counted by source, wins. Then ridge least squares with curvature on the points near it, three times.
 * Leaves the points that agree with their own source's curve in `use`; returns the bounded loss.
 */
export function robustStart(ws: RobustWorkspace): number {
  const slope = bestSlope(ws);
  markNear(ws, slope);
  return refineStart(ws, START_SD, 3);
}

function bestSlope(ws: RobustWorkspace): number {
  let best = 0;
  let bestLoss = Number.POSITIVE_INFINITY;
  const consider = (slope: number) => {
    const loss = slopeLoss(ws, slope, bestLoss);
    if (loss < bestLoss) {
      best = slope;
      bestLoss = loss;
    }
  };
  consider(0);
  consider(-10);
  const spread = spreadOf(ws);
  if (spread < 0.004) return best;
  const within = considerPairs(ws, true, 0.25 * spread, consider);
  if (ws.groups > 1 && within < 12) considerPairs(ws, false, 0.4 * spread, consider);
  return best;
}

/** Range of u over the usable points. */
function spreadOf(ws: RobustWorkspace): number {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (let k = 0; k < ws.rows.n; k++) {
    if (ws.usable[k] === 0) continue;
    const u = ws.rows.design[k * SCREENING_STRIDE + 1]!;
    low = Math.min(low, u);
    high = Math.max(high, u);
  }
  return high - low;
}

/** Slopes of pairs at least `apart` apart, within or across sources, evenly thinned. Returns how many pairs there were. */
function considerPairs(ws: RobustWorkspace, within: boolean, apart: number, consider: (slope: number) => void): number {
  const count = forPairs(ws, within, apart, undefined, 1);
  forPairs(ws, within, apart, consider, Math.max(1, count / MOST_SLOPES));
  return count;
}

function forPairs(
  ws: RobustWorkspace,
  within: boolean,
  apart: number,
  consider: ((slope: number) => void) | undefined,
  step: number,
): number {
  const { design, response, group, n } = ws.rows;
  let count = 0;
  let next = 0;
  for (let i = 0; i < n; i++) {
    if (ws.usable[i] === 0) continue;
    const ui = design[i * SCREENING_STRIDE + 1]!;
    const to = within ? ws.groupStart[group[i]! + 1]! : n;
    for (let j = within ? i + 1 : ws.groupStart[group[i]! + 1]!; j < to; j++) {
      const du = ui - design[j * SCREENING_STRIDE + 1]!;
      if (ws.usable[j] === 0 || (du < apart && du > -apart)) continue;
      if (consider !== undefined && count >= next) {
        consider((response[i]! - response[j]!) / du);
        next += step;
      }
      count++;
    }
  }
  return count;
}

/** Bounded loss of one slope, every source with its median as intercept and at most a full vote. */
function slopeLoss(ws: RobustWorkspace, slope: number, giveUpAt: number): number {
  const { scratch, location } = ws;
  const { design, response } = ws.rows;
  let total = ((slope - USUAL_SLOPE) / USUAL_SLOPE_SD) ** 2;
  let voters = 0;
  for (let g = 0; g < ws.groups; g++) {
    let m = 0;
    for (let k = ws.groupStart[g]!; k < ws.groupStart[g + 1]!; k++) {
      if (ws.usable[k] === 1) scratch[m++] = response[k]! - slope * design[k * SCREENING_STRIDE + 1]!;
    }
    if (m === 0) continue;
    const centre = medianInPlace(scratch, m);
    location[voters++] = centre;
    if (m === 1) continue;
    let loss = 0;
    for (let i = 0; i < m; i++) loss += Math.min(((scratch[i]! - centre) / START_SD) ** 2, LOSS_BOUND);
    total += m > FULL_VOTE ? (loss * FULL_VOTE) / m : loss;
    if (total >= giveUpAt) return total;
  }
  if (voters < 2) return total;
  for (let v = 0; v < voters; v++) scratch[v] = location[v]!;
  const middle = medianInPlace(scratch, voters);
  for (let v = 0; v < voters; v++) total += Math.min(((location[v]! - middle) / START_BETWEEN_SD) ** 2, LOSS_BOUND);
  return total;
}

/** Marks in `use` the points within three start deviations of their source's line. */
function markNear(ws: RobustWorkspace, slope: number): void {
  const { scratch, use } = ws;
  const { design, response } = ws.rows;
  for (let g = 0; g < ws.groups; g++) {
    const [from, to] = [ws.groupStart[g]!, ws.groupStart[g + 1]!];
    let m = 0;
    for (let k = from; k < to; k++) {
      if (ws.usable[k] === 1) scratch[m++] = response[k]! - slope * design[k * SCREENING_STRIDE + 1]!;
    }
    const centre = m === 0 ? 0 : medianInPlace(scratch, m);
    for (let k = from; k < to; k++) {
      const r = response[k]! - slope * design[k * SCREENING_STRIDE + 1]! - centre;
      use[k] = ws.usable[k] === 1 && Math.abs(r) < 3 * START_SD ? 1 : 0;
    }
  }
}

/** Refits the current model with a free offset per source to the points within 3 `sd`, `times` times; bounded loss. */
export function refineStart(ws: RobustWorkspace, sd: number, times: number): number {
  const model = modelOf(ws);
  const { n, variance } = ws.rows;
  variance.fill(sd * sd, 0, n);
  model.groups = ws.groups;
  model.offsetVariance.fill(FREE_OFFSET_VARIANCE, 0, ws.groups);
  let loss = 0;
  for (let time = 0; time < times; time++) {
    fitGroupedModel(model, ws.rows, ws.use);
    loss = 0;
    for (let k = 0; k < n; k++) {
      if (ws.usable[k] === 0) continue;
      const z = residual(ws, model, k) / sd;
      ws.use[k] = Math.abs(z) < 3 ? 1 : 0;
      loss += Math.min(z * z, LOSS_BOUND);
    }
  }
  return loss;
}

/** Residual of a point from the curve of its own source. */
export function residual(ws: RobustWorkspace, model: GroupedModel, k: number): number {
  const { design, response, group } = ws.rows;
  const at = k * SCREENING_STRIDE;
  let fitted = model.offsets[group[k]!]!;
  for (let j = 0; j < model.p; j++) fitted += design[at + j]! * model.coefficients[j]!;
  return response[k]! - fitted;
}
