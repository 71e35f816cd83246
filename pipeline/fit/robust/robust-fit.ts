import { BROKEN_COEFFICIENTS } from "../../curves/screening-basis.ts";
import { groupVariance } from "../../numerics/grouped-model.ts";
import { medianInPlace } from "../../numerics/order-statistics.ts";
import type { Agreement, PooledScales, RobustFit } from "../../records/fits.ts";
import { type CopiedSource, RepeatKind, type Repeats } from "../../records/repeats.ts";
import type { SystemPoints } from "../../records/systems.ts";
import { apartFromBranches } from "../branches/near-break.ts";
import { AS_COMPUTED, type Written } from "../repeats/equal-pairs.ts";
import { repeatedPoints } from "../repeats/repeated-points.ts";
import { sharedDeviation } from "./lack-of-fit.ts";
import {
  addDeviation,
  addOffset,
  BetweenClass,
  createScaleSums,
  type DefaultScales,
  nextScales,
  noiseDegreesOfFreedom,
  type ScaleSums,
  startScales,
} from "./pooled-scales.ts";
import { failure, offsetVariance, settleSources } from "./robust-keep.ts";
import { type PreparedEdition, prepareEdition, type RobustSystem, spanK } from "./robust-prepare.ts";
import { createRobustWorkspace, fillBasis, loadSystem, modelOf, type RobustWorkspace } from "./robust-workspace.ts";
import { scaleSample } from "./scale-sample.ts";

export type { RobustSystem } from "./robust-prepare.ts";

export interface RobustOptions {
  /** Standard deviations of ln value in force until the edition can estimate them. */
  readonly defaults?: Partial<DefaultScales>;
  /** Material threshold of a point: the smallest |deviation| in ln value worth a person's time. Default 0.12. */
  readonly threshold?: (system: number, point: number) => number;
  /** How values were written, for telling copies; without it only values equal as computed are copies. */
  readonly written?: Written;
  /** Passes over the edition; the scales are re-estimated between them. Default 4. */
  readonly passes?: number;
  /** Laboratory of each source, by position in the edition's list; "" = not stated, one of its own. */
  readonly laboratories?: readonly string[];
  /** What an earlier fit of the whole edition pooled: then nothing is estimated again, for fitting a few systems anew. */
  readonly pooled?: PooledFit;
}

/** What a fit of a whole edition has pooled over its systems. */
export interface PooledFit {
  readonly scales: PooledScales;
  /** Median stated uncertainty of ln value, by source. */
  readonly typicalU: Float64Array;
  readonly sums: ScaleSums;
  /** Sources that repeat others all over the edition. */
  readonly copies: readonly CopiedSource[];
}

type Threshold = (system: number, point: number) => number;
type Camps = readonly (readonly number[])[] | undefined;

const DEFAULTS: DefaultScales = { between: 0.04, betweenAqueousSalt: 0.01, within: 0.02 };
/** A deviation above this, ln value, may leave a fit even where it would not be flagged. */
const LEAVE_OUT = 0.12;
/** How far above its source's typical point a point may be taken to scatter. */
const WIDEST_SHAPE = 4;
/** Sources agree within this many between-source standard deviations, or within this many material thresholds. */
const VOTE_SDS = 4.5;
const VOTE_THRESHOLDS = 1.15;
/** Standardised deviation from which the other sources are asked whether the curve is wrong there. */
const DOUBTFUL_Z = 2;
/** Spans below these (K) determine no slope, or no curvature. */
const SLOPE_SPAN_K = 2;
const CURVATURE_SPAN_K = 30;

/**
 * Robust screening fits of all systems of an edition and the scales pooled over them. A high-breakdown start whose
 * slopes come from within sources; a vote by source; then one Gaussian model a system with an offset per source and a
 * prior on curvature, in which points are dropped or taken back on their deleted deviations; between the passes the
 * scatter within each source and between sources is re-estimated from the whole edition.
 *
 * The result does not depend on the order of a system's points, but for rounding. Points that are not finite, are
 * excluded or repeat an earlier source exactly take no part; what can be said of them is said.
 *
 * @param points points of each system, by position of the system
 * @param perSystem what else must be known of each
 * @param nSources number of sources in the edition
 * @returns fits by position of the system, the scales of the last pass, and all that was pooled in it
 */
export function robustFits(
  points: readonly SystemPoints[],
  perSystem: readonly RobustSystem[],
  nSources: number,
  options: RobustOptions = {},
): { fits: RobustFit[]; scales: PooledScales; pooled: PooledFit } {
  const defaults = { ...DEFAULTS, ...options.defaults };
  const threshold = options.threshold ?? (() => LEAVE_OUT);
  const capacity = points.reduce((most, { n }) => Math.max(most, n), 1);
  const ws = createRobustWorkspace(capacity, nSources, options.laboratories);
  const { pooled } = options;
  const { repeats, sources: copies } = repeatedPoints(
    points,
    {
      ...{ written: options.written ?? AS_COMPUTED, nSources },
      scatter: (s) => independentScatter(defaults, perSystem[s]?.aqueousSalt === true),
    },
    pooled?.copies,
  );
  const systems = perSystem.map((about, s) => onceOnly(about, repeats[s]));
  const fresh = prepareEdition(ws, points, systems, nSources);
  const prepared = { ...fresh, typicalU: pooled?.typicalU ?? fresh.typicalU };
  const sample = pooled === undefined ? scaleSample(points, prepared.betweenClass, nSources) : [];
  let scales = pooled?.scales ?? startScales(prepared.typicalU, defaults);
  let sums = pooled?.sums ?? createScaleSums(nSources);
  const passes = pooled === undefined ? (options.passes ?? 4) : 1;
  for (let pass = 1; pass < passes; pass++) {
    sums = createScaleSums(nSources);
    for (const s of sample) {
      const between = betweenOf(scales, prepared.betweenClass[s]!);
      const camps = settle(ws, points[s]!, s, systems[s], prepared, scales, threshold);
      gather(ws, sums, prepared.betweenClass[s]!, between, camps !== undefined);
    }
    scales = nextScales(sums, scales, defaults);
  }
  const room = fitRoom(prepared.first[points.length]!);
  const fits = points.map((system, s) => {
    const camps = settle(ws, system, s, systems[s], prepared, scales, threshold);
    const between = betweenOf(scales, prepared.betweenClass[s]!);
    return toFit(ws, system, s, camps, between, sums, repeats[s], room(prepared.first[s]!, prepared.first[s + 1]!));
  });
  return { fits, scales, pooled: { scales, typicalU: prepared.typicalU, sums, copies } };
}

/** The system with the points left out that count elsewhere. */
function onceOnly(about: RobustSystem, repeats: Repeats | undefined): RobustSystem {
  if (repeats === undefined) return about;
  const excluded = repeats.kind.map((kind, i) => (kind === RepeatKind.counts ? (about.excluded?.[i] ?? 0) : 1));
  return { ...about, excluded };
}

/** Standard deviation (ln value) of the difference between independent measurements by two sources, by the defaults. */
function independentScatter({ between, betweenAqueousSalt, within }: DefaultScales, aqueousSalt: boolean): number {
  const one = aqueousSalt ? betweenAqueousSalt : between;
  return Math.SQRT2 * Math.hypot(one, Math.min(within, one));
}

/** Whether a source has nothing of its own here: it is neither sound nor apart. */
function isCopy(ws: RobustWorkspace, g: number, repeats: Repeats | undefined): boolean {
  if (repeats === undefined) return false;
  for (let k = ws.groupStart[g]!; k < ws.groupStart[g + 1]!; k++)
    if (repeats.kind[ws.order[k]!] === RepeatKind.counts) return false;
  return true;
}

/** Between-source standard deviation of a class of systems. */
function betweenOf(scales: PooledScales, betweenClass: number): number {
  if (betweenClass === BetweenClass.aqueousSalt) return scales.betweenAqueousSalt;
  return betweenClass === BetweenClass.oneTemperature ? scales.betweenOneTemperature : scales.between;
}

/** Lays a system out with the scales in force and decides which sources and points stay; camps of a conflict. */
function settle(
  ws: RobustWorkspace,
  points: SystemPoints,
  s: number,
  about: RobustSystem | undefined,
  prepared: PreparedEdition,
  scales: PooledScales,
  threshold: Threshold,
): Camps {
  loadSystem(ws, points, about?.excluded);
  ws.tested = about?.breakK !== undefined;
  fillBasis(ws, prepared.breakK[s]!);
  const at = prepared.first[s]!;
  let usable = 0;
  for (let k = 0; k < points.n; k++) {
    const i = ws.order[k]!;
    const source = points.source[i]!;
    const shape = prepared.statedU[at + i]! / prepared.typicalU[source]!;
    ws.rows.variance[k] = (scales.within[source]! * Math.min(WIDEST_SHAPE, Math.max(1, shape))) ** 2;
    const material = threshold(s, i);
    ws.tolerance[k] = Math.min(LEAVE_OUT, material);
    ws.use[k] = prepared.use[at + i]!;
    if (ws.usable[k] === 1) ws.scratch[usable++] = material;
  }
  if (usable === 0) return undefined;
  const between = betweenOf(scales, prepared.betweenClass[s]!);
  const typicalThreshold = medianInPlace(ws.scratch, usable);
  return settleSources(ws, between ** 2, Math.max(VOTE_THRESHOLDS * typicalThreshold, VOTE_SDS * between));
}

/** Adds what a settled system says about the scales. */
function gather(ws: RobustWorkspace, sums: ScaleSums, betweenClass: number, between: number, conflict: boolean): void {
  const model = modelOf(ws);
  for (let k = 0; k < ws.rows.n; k++) {
    if (ws.use[k] === 0) continue;
    const freedom = ws.rows.variance[k]! / ws.deviationVariance[k]!;
    if (freedom < 0.05) continue;
    const z = Math.abs(ws.deviation[k]!) / Math.sqrt(ws.deviationVariance[k]!);
    addDeviation(sums, ws.sourceOf[ws.rows.group[k]!]!, z, freedom);
  }
  if (conflict) return;
  let sound = 0;
  for (let g = 0; g < ws.groups; g++) sound += ws.sound[g]!;
  if (sound < 2) return;
  for (let g = 0; g < ws.groups; g++) {
    // Two sources of one laboratory say nothing of how far laboratories lie apart.
    if (ws.sound[g] === 0 || ws.perLaboratory[g]! > 1) continue;
    const share = between ** 2 / offsetVariance(ws, g, between ** 2);
    const variance = share ** 2 * groupVariance(model, NO_ROW, 0, g) + (1 - share) * between ** 2;
    addOffset(sums, betweenClass, ws.sourceOf[g]!, share * model.offsets[g]!, variance, between ** 2);
  }
}

/** A row of zeros: the variance of a group's offset alone, given the data, is that of this row. */
const NO_ROW = new Float64Array(BROKEN_COEFFICIENTS);

/** Columns of results for all points, handed out system by system: one allocation instead of five a system. */
function fitRoom(total: number) {
  const kept = new Uint8Array(total);
  const [predicted, deviation, deviationSd, noiseSd] = Array.from({ length: 4 }, () =>
    new Float64Array(total).fill(Number.NaN),
  ) as [Float64Array, Float64Array, Float64Array, Float64Array];
  return (from: number, to: number) => ({
    kept: kept.subarray(from, to),
    predicted: predicted.subarray(from, to),
    deviation: deviation.subarray(from, to),
    deviationSd: deviationSd.subarray(from, to),
    noiseSd: noiseSd.subarray(from, to),
  });
}

/** Takes a settled system out of the workspace into a record. */
function toFit(
  ws: RobustWorkspace,
  points: SystemPoints,
  system: number,
  camps: Camps,
  between: number,
  sums: ScaleSums,
  repeats: Repeats | undefined,
  fit: ReturnType<ReturnType<typeof fitRoom>>,
): RobustFit {
  const n = points.n;
  const sources: [sound: number[], apart: number[]] = [[], []];
  for (let g = 0; g < ws.groups; g++) {
    if (!isCopy(ws, g, repeats)) sources[ws.sound[g] === 1 ? 0 : 1].push(ws.sourceOf[g]!);
  }
  let kept = 0;
  for (let k = 0; k < n; k++) {
    const i = ws.order[k]!;
    const failed = ws.usable[k] === 1 && ws.sound[ws.rows.group[k]!] === 1 && failure(ws, k) > DOUBTFUL_Z;
    const shared = failed && camps === undefined ? sharedDeviation(ws, k) : 0;
    fit.kept[i] = ws.use[k] === 1 || shared > 0 ? 1 : 0;
    kept += ws.use[k]!;
    fit.noiseSd[i] = Math.sqrt(ws.rows.variance[k]!);
    if (!Number.isFinite(ws.deviation[k])) continue;
    fit.predicted[i] = points.lnValue[i]! - ws.deviation[k]!;
    fit.deviation[i] = ws.deviation[k]!;
    const ofBranches = ws.deviation[k]! - apartFromBranches(ws, k);
    fit.deviationSd[i] = Math.sqrt(ws.deviationVariance[k]! + shared * shared + ofBranches * ofBranches);
  }
  const ascending = (list: readonly number[]) => [...list].sort((a, b) => a - b);
  return {
    system,
    points,
    ...fit,
    agreement: camps !== undefined ? "conflict" : agreementOf(ws, kept),
    betweenSd: between,
    breakTemperatureK: ws.breakK,
    breakTested: ws.tested,
    degreesOfFreedom: freedomOf(ws, sums),
    soundSources: camps === undefined ? ascending(sources[0]) : [],
    apartSources: camps === undefined ? ascending(sources[1]) : [],
    camps: (camps ?? []).map((camp) => ascending(camp.map((g) => ws.sourceOf[g]!))),
    ...(repeats === undefined ? {} : { repeats }),
  };
}

/**
 * "cannot tell" where fewer points are left than p + 2 (one source) or p + 1, p being the number of coefficients that
 * the temperature span can determine.
 */
function agreementOf(ws: RobustWorkspace, kept: number): Agreement {
  const span = spanK(ws);
  const p = span < SLOPE_SPAN_K ? 1 : span < CURVATURE_SPAN_K ? 2 : 3;
  let sound = 0;
  for (let g = 0; g < ws.groups; g++) sound += ws.sound[g]!;
  return kept < p + (sound < 2 ? 2 : 1) ? "cannot tell" : "agreed";
}

/** Degrees of freedom for judging deviations: harmonic mean over the sources. */
function freedomOf(ws: RobustWorkspace, sums: ScaleSums): number {
  let reciprocal = 0;
  for (let g = 0; g < ws.groups; g++) reciprocal += 1 / noiseDegreesOfFreedom(sums, ws.sourceOf[g]!);
  return ws.groups === 0 ? 0 : ws.groups / reciprocal;
}
