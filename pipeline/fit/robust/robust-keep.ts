import { SCREENING_STRIDE } from "../../curves/screening-basis.ts";
import {
  deletedDeviations,
  expected,
  expectedVariance,
  fitGroupedModel,
  groupVariance,
} from "../../numerics/grouped-model.ts";
import { apartFromBranches } from "../branches/near-break.ts";
import { FREE_OFFSET_VARIANCE } from "./robust-start.ts";
import { modelOf, type RobustWorkspace } from "./robust-workspace.ts";
import { isMajority, voteBySource } from "./source-vote.ts";

/** Standardised deviation from which a point that also passes its tolerance is left out. */
const FAIL_Z = 4;
const MOST_ROUNDS = 10;
/** A source set apart with fewer usable points than this gets no free offset: it could say nothing about the slope. */
const LEAST_FOR_FREE_OFFSET = 3;

/** Location of every source at the reference temperature, each with a free offset; returns who can vote. */
export function locateSources(ws: RobustWorkspace): number[] {
  const model = modelOf(ws);
  model.groups = ws.groups;
  model.offsetVariance.fill(FREE_OFFSET_VARIANCE, 0, ws.groups);
  fitGroupedModel(model, ws.rows, ws.use);
  const reference = new Float64Array(SCREENING_STRIDE);
  reference[0] = 1;
  const voters: number[] = [];
  for (let g = 0; g < ws.groups; g++) {
    ws.location[g] = model.coefficients[0]! + model.offsets[g]!;
    ws.locationVariance[g] = groupVariance(model, reference, 0, g) + ws.sharedVariance[g]!;
    for (let k = ws.groupStart[g]!; k < ws.groupStart[g + 1]!; k++) {
      if (ws.use[k] === 0) continue;
      voters.push(g);
      break;
    }
  }
  return voters;
}

/**
 * Points that stay: starting from `use`, points of sound sources that agree with the rest are taken back in, the worst
 * failing point of each source is dropped, until nothing changes. In a conflict every source keeps a free offset.
 * Deviations of all rows are left in the workspace; sources set apart are compared with the sound ones.
 */
export function keepPoints(ws: RobustWorkspace, betweenVariance: number, conflict: boolean): void {
  const { rows, use, usable, sound } = ws;
  for (let k = 0; k < rows.n; k++) if (sound[rows.group[k]!] === 0) use[k] = 0;
  for (let round = 0; round < MOST_ROUNDS; round++) {
    fitSound(ws, betweenVariance, conflict);
    let changed = false;
    for (let g = 0; g < ws.groups; g++) {
      if (sound[g] === 0) continue;
      let worst = -1;
      let worstZ = FAIL_Z;
      for (let k = ws.groupStart[g]!; k < ws.groupStart[g + 1]!; k++) {
        if (usable[k] === 0) continue;
        const z = failure(ws, k);
        if (use[k] === 0 && z < FAIL_Z) {
          use[k] = 1;
          changed = true;
        } else if (use[k] === 1 && z >= worstZ) {
          worst = k;
          worstZ = z;
        }
      }
      if (worst < 0) continue;
      use[worst] = 0;
      changed = true;
    }
    if (!changed) return;
  }
  fitSound(ws, betweenVariance, conflict);
}

/** |z| of a point, or 0 where its deviation is within its tolerance, or near a break between the branches. */
export function failure(ws: RobustWorkspace, k: number): number {
  const deviation = Math.abs(apartFromBranches(ws, k));
  return deviation < ws.tolerance[k]! ? 0 : deviation / Math.sqrt(ws.deviationVariance[k]!);
}

/** Fits the used points and fills the deviations of all rows. */
export function fitSound(ws: RobustWorkspace, betweenVariance: number, conflict: boolean): void {
  const model = modelOf(ws);
  model.groups = ws.groups;
  for (let g = 0; g < ws.groups; g++)
    model.offsetVariance[g] = conflict ? FREE_OFFSET_VARIANCE : offsetVariance(ws, g, betweenVariance);
  fitGroupedModel(model, ws.rows, ws.use);
  deletedDeviations(model, ws.rows, ws.use, ws.deviation, ws.deviationVariance);
}

/** Variance of a source's offset: m tau^2 + s^2, as in the published fit, m counting the sound sources and itself. */
export function offsetVariance(ws: RobustWorkspace, g: number, tau2: number): number {
  const m = ws.perLaboratory[g] === 1 ? 1 : ofLaboratory(ws, g, (other) => ws.sound[other] === 1);
  return m * tau2 + ws.sharedVariance[g]!;
}

/** Groups from the laboratory of one group that `counts` admits, and that group itself. */
function ofLaboratory({ groups, sourceOf, laboratoryOf }: RobustWorkspace, g: number, counts: (g: number) => boolean) {
  const own = laboratoryOf[sourceOf[g]!];
  let count = 1;
  for (let other = 0; other < groups; other++)
    if (other !== g && laboratoryOf[sourceOf[other]!] === own && counts(other)) count++;
  return count;
}

/**
 * Whether a source's block fails as a whole against the other sound sources: more than half of its points, compared
 * as a new source. `use` is left as it was. Returns the share of failing points, or 0.
 */
export function blockFailure(ws: RobustWorkspace, g: number, betweenVariance: number): number {
  const { use, usable } = ws;
  const [from, to] = [ws.groupStart[g]!, ws.groupStart[g + 1]!];
  const before = use.slice(from, to);
  use.fill(0, from, to);
  fitSound(ws, betweenVariance, false);
  let count = 0;
  let failed = 0;
  for (let k = from; k < to; k++) {
    if (usable[k] === 0) continue;
    count++;
    if (failure(ws, k) >= FAIL_Z) failed++;
  }
  use.set(before, from);
  return failed * 2 > count ? failed / count : 0;
}

/** Votes, sets apart what fails, keeps points. Returns the camps of a conflict, or undefined where there is none. */
export function settleSources(
  ws: RobustWorkspace,
  betweenVariance: number,
  voteTolerance: number,
): readonly (readonly number[])[] | undefined {
  const { sound } = ws;
  const started = ws.use.slice(0, ws.rows.n);
  const voters = locateSources(ws);
  sound.fill(0, 0, ws.groups);
  for (const g of voters) sound[g] = 1;
  const weight = voteWeights(ws, voters);
  if (voters.length > 1) {
    const vote = voteBySource(voters, ws.location, ws.locationVariance, voteTolerance, weight);
    if (!vote.majority) return conflictOf(ws, betweenVariance, vote.camps);
    sound.fill(0, 0, ws.groups);
    for (const g of vote.camps[0] ?? []) sound[g] = 1;
  }
  for (;;) {
    keepPoints(ws, betweenVariance, false);
    const apart = worstBlock(ws, betweenVariance);
    if (apart === undefined) break;
    const rest = soundGroups(ws).filter((g) => g !== apart);
    ws.use.set(started);
    if (!isMajority(rest, voters, weight)) {
      const others = voters.filter((g) => !rest.includes(g));
      return conflictOf(ws, betweenVariance, [rest, ...others.map((g) => [g])]);
    }
    sound[apart] = 0;
  }
  borrowSlope(ws, betweenVariance);
  return undefined;
}

/** A laboratory has one vote, shared by its sources; undefined where every source is of another laboratory. */
function voteWeights(ws: RobustWorkspace, voters: readonly number[]): Float64Array | undefined {
  if (voters.every((g) => ws.perLaboratory[g] === 1)) return undefined;
  const weight = new Float64Array(ws.groups);
  for (const g of voters) weight[g] = 1 / ofLaboratory(ws, g, (other) => voters.includes(other));
  return weight;
}

function conflictOf(
  ws: RobustWorkspace,
  betweenVariance: number,
  camps: readonly (readonly number[])[],
): readonly (readonly number[])[] {
  ws.sound.fill(1, 0, ws.groups);
  keepPoints(ws, betweenVariance, true);
  return camps;
}

function soundGroups(ws: RobustWorkspace): number[] {
  const groups: number[] = [];
  for (let g = 0; g < ws.groups; g++) if (ws.sound[g] === 1) groups.push(g);
  return groups;
}

/** The sound source whose block fails worst against the others; undefined where none fails or none can be judged. */
function worstBlock(ws: RobustWorkspace, betweenVariance: number): number | undefined {
  const groups = soundGroups(ws);
  if (groups.length < 2) return undefined;
  let suspicious = false;
  for (let k = 0; k < ws.rows.n && !suspicious; k++) {
    suspicious = ws.sound[ws.rows.group[k]!] === 1 && ws.usable[k] === 1 && failure(ws, k) >= FAIL_Z - 1;
  }
  if (!suspicious) return undefined;
  let worst: number | undefined;
  let worstShare = 0;
  for (const g of groups) {
    // A single point that fails is a point, not a block, unless the point is all there is to judge by.
    if (ws.groupStart[g + 1]! - ws.groupStart[g]! < 2) continue;
    const share = blockFailure(ws, g, betweenVariance);
    if (share <= worstShare) continue;
    worst = g;
    worstShare = share;
  }
  fitSound(ws, betweenVariance, false);
  return worst;
}

/**
 * Where the sound sources alone cannot say how the curve runs, sources set apart lend their slope through a free
 * offset of their own. Their deviations stay those of a new source from the curve.
 */
function borrowSlope(ws: RobustWorkspace, betweenVariance: number): void {
  const model = modelOf(ws);
  let kept = 0;
  for (let k = 0; k < ws.rows.n; k++) kept += ws.use[k]!;
  if (kept >= model.p + 2) return;
  const lenders: number[] = [];
  for (let g = 0; g < ws.groups; g++) {
    const [from, to] = [ws.groupStart[g]!, ws.groupStart[g + 1]!];
    if (ws.sound[g] === 1 || to - from < LEAST_FOR_FREE_OFFSET) continue;
    lenders.push(g);
    model.offsetVariance[g] = FREE_OFFSET_VARIANCE;
    for (let k = from; k < to; k++) ws.use[k] = ws.usable[k]!;
  }
  if (lenders.length === 0) return;
  const { design, response, variance } = ws.rows;
  fitGroupedModel(model, ws.rows, ws.use);
  deletedDeviations(model, ws.rows, ws.use, ws.deviation, ws.deviationVariance);
  for (const g of lenders) {
    for (let k = ws.groupStart[g]!; k < ws.groupStart[g + 1]!; k++) {
      const at = k * SCREENING_STRIDE;
      ws.use[k] = 0;
      ws.deviation[k] = response[k]! - expected(model, design, at);
      ws.deviationVariance[k] =
        variance[k]! + offsetVariance(ws, g, betweenVariance) + expectedVariance(model, design, at);
    }
  }
}
