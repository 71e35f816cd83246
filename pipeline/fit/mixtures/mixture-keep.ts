import { equalVotes, robustRegression } from "../../numerics/robust-regression.ts";
import { memberDeviations } from "./mixture-deletion.ts";
import { allMemberSums, type MemberSums } from "./mixture-information.ts";
import { leftOutJudge } from "./mixture-left-out.ts";
import type { MixturePoints } from "./mixture-points.ts";
import { fitMembers, type MixtureScales } from "./mixture-regression.ts";
import { FLEXIBLE_SURFACE, publishedSurface } from "./mixture-surfaces.ts";

/** A system or point further off than so many standard deviations is dropped; below the second it comes back. */
const [DROP_Z, READMIT_Z] = [4, 3.5];
/** No deviation in ln value below this is a reason to drop anything. */
const LEAST_DEVIATION = 0.1;
/** Scatter of the start, in which a surface without priors may lie so far off sound points, SD of ln value. */
const START_SD = 0.04;
const MOST_ROUNDS = 40;
/** Fall of the residual sum of squares, in variances, from which an exchange is worth it, and most exchanges. */
const LEAST_GAIN = 4;
const MOST_EXCHANGES = 3;
/** Compositions below which a surface with one term fewer than they allow says nothing of any of them. */
const FEWEST_TO_VOTE = 5;
/** Most elemental fits of the start: enough for one clean one among 6 coefficients at a third of bad rows. */
const START_SUBSETS = 500;

/** What a robust choice of points found. */
export interface KeptMixture {
  /** 1 = used by the surface. */
  readonly use: Uint8Array;
  /** Members left out as a whole because the others say otherwise: by how much, ln value. */
  readonly apart: ReadonlyMap<number, number>;
}

/**
 * Which points of a mixture agree on one surface.
 *
 * Starts from an MM-estimate in which every source has one vote (every composition, where there are fewer than three
 * sources), so that many points of one of them outvote nobody. From there one finding at a time: the composition that
 * lies furthest off what the other compositions say (at least three of them must remain), then the point furthest off
 * the surface; what agrees again comes back.
 * @param scales as assumed before the mixture itself has been looked at
 */
export function keepMixture(points: MixturePoints, centreK: number, scales: MixtureScales): KeptMixture {
  const use = start(points, centreK, scales);
  const apart = new Map<number, number>();
  const started = membersInUse(points, use);
  for (const m of membersInUse(points, points.candidate)) if (!started.has(m)) apart.set(m, Number.NaN);
  settle(points, use, apart, centreK, scales);
  for (let round = 0; round < MOST_EXCHANGES; round++) {
    if (!exchange(points, use, apart, centreK, scales)) break;
    settle(points, use, apart, centreK, scales);
  }
  return { use, apart };
}

/** Drops and takes back, one finding at a time, until nothing changes. */
function settle(
  points: MixturePoints,
  use: Uint8Array,
  apart: Map<number, number>,
  centreK: number,
  scales: MixtureScales,
): void {
  for (let round = 0; round < MOST_ROUNDS; round++) {
    if (moveMember(points, use, apart, centreK, scales)) continue;
    if (!movePoints(points, use, apart, centreK, scales)) break;
  }
}

/**
 * Of compositions that contradict each other any may be the wrong ones: takes back one of those left out, or all, and
 * drops another, where the rest then agrees better. Mends a start that left out the sound neighbours of one that is off.
 *
 * @returns true if anything changed
 */
function exchange(
  points: MixturePoints,
  use: Uint8Array,
  apart: Map<number, number>,
  centreK: number,
  scales: MixtureScales,
): boolean {
  if (apart.size === 0) return false;
  const used = membersInUse(points, use);
  // A member left out comes back with all its candidates.
  const sums = allMemberSums(points, points.candidate, FLEXIBLE_SURFACE, centreK, scales);
  const inUse = allMemberSums(points, use, FLEXIBLE_SURFACE, centreK, scales);
  const cost = (members: readonly MemberSums[], left: number) => {
    const fit = fitMembers(points, members, FLEXIBLE_SURFACE, centreK, scales);
    return fit === undefined ? Number.POSITIVE_INFINITY : fit.residualSumOfSquares - fit.n + DROP_Z ** 2 * left;
  };
  let best = { out: -1, back: new Set<number>(), cost: cost(inUse, apart.size) - LEAST_GAIN };
  const choices = [...[...apart.keys()].map((m) => new Set([m])), ...(apart.size > 1 ? [new Set(apart.keys())] : [])];
  for (const back of choices) {
    for (const out of used) {
      const members = inUse.map((one, m) => (back.has(m) ? sums[m]! : one)).filter((_, m) => m !== out);
      const found = cost(members, apart.size - back.size + 1);
      if (found < best.cost) best = { out, back, cost: found };
    }
  }
  if (best.out < 0) return false;
  for (let i = 0; i < points.n; i++) {
    if (points.member[i] === best.out) use[i] = 0;
    else if (best.back.has(points.member[i]!)) use[i] = points.candidate[i]!;
  }
  for (const m of best.back) apart.delete(m);
  apart.set(best.out, Number.NaN);
  return true;
}

/** Points near the high-breakdown surface; all candidates where that surface cannot be told. */
function start(points: MixturePoints, centreK: number, scales: MixtureScales): Uint8Array {
  const all = points.candidate.slice();
  const rows = Int32Array.from(all.keys()).filter((i) => all[i] === 1);
  const compositions = new Set(Array.from(rows, (i) => points.member[i])).size;
  const surface = publishedSurface(Math.min(2, Math.max(0, compositions - 3)));
  const p = surface.p;
  if (compositions < FEWEST_TO_VOTE || rows.length < p + 2) return all;
  const design = new Float64Array(rows.length * p);
  const response = new Float64Array(rows.length);
  rows.forEach((i, k) => {
    const scale = 1 / Math.sqrt(scales.variance[i]! + START_SD ** 2);
    surface.writeRow(design, k * p, points.fraction[i]!, points.temperatureK[i]!, centreK);
    for (let j = 0; j < p; j++) design[k * p + j]! *= scale;
    response[k] = points.lnValue[i]! * scale;
  });
  const voters = points.sources.length > 2 ? points.source : points.member;
  const votes = equalVotes(Int32Array.from(rows, (i) => voters[i]!));
  const fit = robustRegression(design, response, rows.length, p, { votes, maxSubsets: START_SUBSETS });
  if (fit.status === "rank-deficient") return all;
  const sd = Math.max(1, fit.scale);
  rows.forEach((i, k) => {
    const off = Math.abs(fit.residuals[k]!) * Math.sqrt(scales.variance[i]! + START_SD ** 2);
    if (Math.abs(fit.residuals[k]!) > DROP_Z * sd && off > LEAST_DEVIATION) all[i] = 0;
  });
  return all;
}

/** Drops the composition furthest off what the others say, or takes back one that agrees. */
function moveMember(
  points: MixturePoints,
  use: Uint8Array,
  apart: Map<number, number>,
  centreK: number,
  scales: MixtureScales,
): boolean {
  let worst: { member: number; z: number; deviation: number } | undefined;
  const inUse = membersInUse(points, use);
  const sums = allMemberSums(points, use, FLEXIBLE_SURFACE, centreK, scales);
  for (const m of [...inUse, ...apart.keys()]) {
    const others = inUse.size - (inUse.has(m) ? 1 : 0);
    const said = others < 3 ? undefined : leftOutJudge(points, use, sums, m, centreK, scales, "anywhere")();
    if (said === undefined) continue;
    const z = Math.abs(said.meanDeviation) / said.meanSd;
    if (apart.has(m) && (z < READMIT_Z || Math.abs(said.meanDeviation) < LEAST_DEVIATION)) {
      apart.delete(m);
      for (let i = 0; i < points.n; i++) if (points.member[i] === m) use[i] = points.candidate[i]!;
      return true;
    }
    if (apart.has(m)) apart.set(m, said.meanDeviation);
    const off = !apart.has(m) && z > DROP_Z && Math.abs(said.meanDeviation) > LEAST_DEVIATION;
    if (off && !(z <= (worst?.z ?? 0))) worst = { member: m, z, deviation: said.meanDeviation };
  }
  if (worst === undefined) return false;
  apart.set(worst.member, worst.deviation);
  for (let i = 0; i < points.n; i++) if (points.member[i] === worst.member) use[i] = 0;
  return true;
}

function membersInUse({ member }: MixturePoints, use: Uint8Array): Set<number> {
  return new Set(Array.from(member).filter((_, i) => use[i] === 1));
}

/** Drops the worst point of every composition, or takes points back; false where nothing changes. */
function movePoints(
  points: MixturePoints,
  use: Uint8Array,
  apart: ReadonlyMap<number, number>,
  centreK: number,
  scales: MixtureScales,
): boolean {
  const sums = allMemberSums(points, use, FLEXIBLE_SURFACE, centreK, scales);
  const fit = fitMembers(points, sums, FLEXIBLE_SURFACE, centreK, scales);
  if (fit === undefined) return false;
  const [drop, back]: [number[], number[]] = [[], []];
  for (let m = 0; m < points.members; m++) {
    if (apart.has(m)) continue;
    let worst = { i: -1, z: DROP_Z };
    memberDeviations(points, use, m, fit, scales).forEach(({ deviation, sd }, k) => {
      const i = points.start[m]! + k;
      const [off, z] = [Math.abs(deviation), Math.abs(deviation) / sd];
      if (use[i] === 1 && z > worst.z && off > LEAST_DEVIATION) worst = { i, z };
      if (use[i] === 0 && points.candidate[i] === 1 && (z < READMIT_Z || off < LEAST_DEVIATION)) back.push(i);
    });
    if (worst.i >= 0) drop.push(worst.i);
  }
  for (const i of drop) use[i] = 0;
  if (drop.length === 0) for (const i of back) use[i] = 1;
  return drop.length + back.length > 0;
}
