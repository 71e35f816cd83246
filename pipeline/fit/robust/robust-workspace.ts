import {
  BROKEN_COEFFICIENTS,
  HINGED_COEFFICIENTS,
  SCREENING_STRIDE,
  SMOOTH_COEFFICIENTS,
  setScreeningPrior,
  writeScreeningBasis,
} from "../../curves/screening-basis.ts";
import { createGroupedModel, type GroupedModel, type GroupedRows } from "../../numerics/grouped-model.ts";
import { medianInPlace } from "../../numerics/order-statistics.ts";
import { type SystemPoints, sharedVarianceOf } from "../../records/systems.ts";

/** One system laid out for the robust fit: points ordered by source, sources numbered 0 to `groups` - 1. */
export interface RobustWorkspace {
  readonly rows: GroupedRows;
  /** Position in the system's points of each row here. */
  readonly order: Int32Array;
  readonly temperatureK: Float64Array;
  /** |deviation| in ln value from which a point may be left out. */
  readonly tolerance: Float64Array;
  /** 1 = may enter the fit at all. */
  readonly usable: Uint8Array;
  readonly use: Uint8Array;
  readonly deviation: Float64Array;
  readonly deviationVariance: Float64Array;
  readonly scratch: Float64Array;
  /** Position in the edition's list of the source behind each group. */
  readonly sourceOf: Int32Array;
  /** First row of each group, and n behind the last. */
  readonly groupStart: Int32Array;
  /** 1 = the group belongs to the sound majority. */
  readonly sound: Uint8Array;
  /** Variance of ln value that the points of each group share. */
  readonly sharedVariance: Float64Array;
  /** Sources of this system from the laboratory of each group, itself included. */
  readonly perLaboratory: Float64Array;
  readonly location: Float64Array;
  readonly locationVariance: Float64Array;
  groups: number;
  centreK: number;
  /** Subtracted from ln value: their median. */
  shift: number;
  breakK: number;
  /** True if the break was tested. */
  tested: boolean;
  readonly smooth: GroupedModel;
  /** With a break that only protects points, and with one that was tested, at which the curvature changes too. */
  readonly hinged: GroupedModel;
  readonly broken: GroupedModel;
  readonly groupOfSource: Int32Array;
  /** Laboratory of each source of the edition, as a number of its own. */
  readonly laboratoryOf: Int32Array;
}

/** Room temperature, K. */
const ROOM_K = 296;
/** ln of the ratio to the usual temperature beyond which a temperature takes no part: K read as °C, say. */
const FAR_K = Math.log(1.5);

/** Laboratories as numbers: equal for sources of one stated laboratory, and a number of its own where none is stated. */
function laboratoryNumbers(nSources: number, laboratories: readonly string[]): Int32Array {
  const first = new Map<string, number>();
  return Int32Array.from({ length: nSources }, (_, source) => {
    const name = laboratories[source] ?? "";
    if (name === "") return source;
    const known = first.get(name);
    if (known === undefined) first.set(name, source);
    return known ?? source;
  });
}

/**
 * A workspace for systems of up to `capacity` points from `nSources` sources.
 *
 * @param laboratories laboratory of each source; "" = not stated
 */
export function createRobustWorkspace(
  capacity: number,
  nSources: number,
  laboratories: readonly string[] = [],
): RobustWorkspace {
  const reals = () => new Float64Array(capacity);
  const groups = Math.max(1, Math.min(capacity, nSources)) + 1;
  const [smooth, hinged, broken] = [
    createGroupedModel(SMOOTH_COEFFICIENTS, groups),
    createGroupedModel(HINGED_COEFFICIENTS, groups),
    createGroupedModel(BROKEN_COEFFICIENTS, groups),
  ];
  setScreeningPrior(smooth);
  setScreeningPrior(hinged);
  setScreeningPrior(broken);
  return {
    rows: {
      n: 0,
      design: new Float64Array(capacity * SCREENING_STRIDE),
      stride: SCREENING_STRIDE,
      response: reals(),
      variance: reals(),
      group: new Int32Array(capacity),
    },
    order: new Int32Array(capacity),
    temperatureK: reals(),
    tolerance: reals(),
    usable: new Uint8Array(capacity),
    use: new Uint8Array(capacity),
    deviation: reals(),
    deviationVariance: reals(),
    scratch: reals(),
    sourceOf: new Int32Array(groups),
    groupStart: new Int32Array(groups + 1),
    sound: new Uint8Array(groups),
    sharedVariance: new Float64Array(groups),
    perLaboratory: new Float64Array(groups),
    location: new Float64Array(groups),
    locationVariance: new Float64Array(groups),
    groups: 0,
    centreK: 298.15,
    shift: 0,
    breakK: Number.NaN,
    tested: false,
    smooth,
    hinged,
    broken,
    groupOfSource: new Int32Array(nSources).fill(-1),
    laboratoryOf: laboratoryNumbers(nSources, laboratories),
  };
}

/** The model in use: with a break where the system has one. */
export function modelOf(ws: RobustWorkspace): GroupedModel {
  if (Number.isNaN(ws.breakK)) return ws.smooth;
  return ws.tested ? ws.broken : ws.hinged;
}

/**
 * Lays out one system. Variances, tolerances and the basis are filled by the caller's next steps; `usable` says which
 * points have finite numbers and are not excluded by `excluded`.
 */
export function loadSystem(ws: RobustWorkspace, points: SystemPoints, excluded: Uint8Array | undefined): void {
  const { rows, order, sourceOf, groupStart, groupOfSource, scratch, usable } = ws;
  const n = points.n;
  rows.n = n;
  ws.groups = 0;
  for (let i = 0; i < n; i++) {
    const source = points.source[i]!;
    if (groupOfSource[source] === -1) {
      groupOfSource[source] = ws.groups;
      sourceOf[ws.groups++] = source;
    }
  }
  groupStart.fill(0, 0, ws.groups + 1);
  for (let i = 0; i < n; i++) groupStart[groupOfSource[points.source[i]!]! + 1]!++;
  for (let g = 0; g < ws.groups; g++) groupStart[g + 1]! += groupStart[g]!;
  for (let i = 0; i < n; i++) {
    const g = groupOfSource[points.source[i]!]!;
    order[groupStart[g]!++] = i;
  }
  for (let g = ws.groups; g > 0; g--) groupStart[g] = groupStart[g - 1]!;
  groupStart[0] = 0;
  let finite = 0;
  let sumT = 0;
  const usualK = usualTemperature(points, scratch);
  for (let g = 0; g < ws.groups; g++) {
    groupOfSource[sourceOf[g]!] = -1;
    for (let k = groupStart[g]!; k < groupStart[g + 1]!; k++) {
      const i = order[k]!;
      const T = points.temperatureK[i]!;
      const y = points.lnValue[i]!;
      rows.group[k] = g;
      ws.temperatureK[k] = T;
      rows.response[k] = y;
      const ok = Math.abs(Math.log(T / usualK)) < FAR_K && Math.abs(y) < 1e3 && excluded?.[i] !== 1;
      usable[k] = ok ? 1 : 0;
      if (!ok) continue;
      scratch[finite++] = y;
      sumT += T;
    }
  }
  ws.centreK = finite > 0 ? sumT / finite : 298.15;
  ws.shift = finite > 0 ? medianInPlace(scratch, finite) : 0;
  for (let k = 0; k < n; k++) rows.response[k]! -= ws.shift;
  loadOffsetParts(ws, points);
}

/** What is known of the offset of each group: the variance its points share, and how many groups its laboratory has. */
function loadOffsetParts(ws: RobustWorkspace, points: SystemPoints): void {
  const { order, groups, groupStart, sharedVariance, perLaboratory, sourceOf, laboratoryOf } = ws;
  for (let g = 0; g < groups; g++) {
    const [from, to] = [groupStart[g]!, groupStart[g + 1]!];
    let sum = 0;
    for (let k = from; k < to; k++) sum += sharedVarianceOf(points, order[k]!);
    sharedVariance[g] = sum / (to - from);
    const laboratory = laboratoryOf[sourceOf[g]!]!;
    let count = 0;
    for (let other = 0; other < groups; other++) if (laboratoryOf[sourceOf[other]!] === laboratory) count++;
    perLaboratory[g] = count;
  }
}

/**
 * Temperature about which a system is taken to be measured, K; NaN where there is none above 0 K. Where temperatures lie
 * too far apart for one curve, that of the source whose median is nearest to room temperature: which source has more
 * points says nothing about whose scale is wrong.
 */
function usualTemperature({ n, temperatureK, source }: SystemPoints, scratch: Float64Array): number {
  let [low, high] = [Number.POSITIVE_INFINITY, 0];
  for (let i = 0; i < n; i++) {
    const T = temperatureK[i]!;
    if (!(T > 0 && T < 1e5)) continue;
    low = Math.min(low, T);
    high = Math.max(high, T);
  }
  if (Math.log(high / low) < FAR_K) return Math.sqrt(low * high);
  let usual = Number.NaN;
  for (const one of new Set(source)) {
    let count = 0;
    for (let i = 0; i < n; i++) {
      const T = temperatureK[i]!;
      if (source[i] === one && T > 0 && T < 1e5) scratch[count++] = T;
    }
    if (count === 0) continue;
    const median = medianInPlace(scratch, count);
    const nearer = Math.abs(Math.log(median / ROOM_K)) < Math.abs(Math.log(usual / ROOM_K));
    if (Number.isNaN(usual) || nearer) usual = median;
  }
  return usual;
}

/** Fills the basis for the system's temperatures, with the break at `breakK` (NaN = none). */
export function fillBasis(ws: RobustWorkspace, breakK: number): void {
  ws.breakK = breakK;
  const { design } = ws.rows;
  for (let k = 0; k < ws.rows.n; k++) {
    const T = ws.temperatureK[k]!;
    if (T > 0 && T < 1e5) writeScreeningBasis(T, ws.centreK, breakK, design, k * SCREENING_STRIDE);
    else design.fill(0, k * SCREENING_STRIDE, (k + 1) * SCREENING_STRIDE);
  }
}
