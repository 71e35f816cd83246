import { screeningSlope } from "../../curves/screening-basis.ts";
import { medianInPlace } from "../../numerics/order-statistics.ts";
import { ownLnU, type SystemPoints } from "../../records/systems.ts";
import { BetweenClass } from "./pooled-scales.ts";
import { startAtBreak, startWithBranches } from "./robust-branch.ts";
import { loadSystem, modelOf, type RobustWorkspace } from "./robust-workspace.ts";

/** What the robust fit must know of a system beyond its points. */
export interface RobustSystem {
  readonly aqueousSalt: boolean;
  /** The solvent is water, where a solid often changes its hydrate: the search for a break then starts earlier. */
  readonly water?: boolean;
  /** 1 = the point takes no part in the fit (outside the liquid range, say); it still gets a deviation. */
  readonly excluded?: Uint8Array;
  /** Temperature of a break that was tested, or is about to be, K; else one that protects points is looked for. */
  readonly breakK?: number;
}

/** What is found once for each system and used in every pass over the edition; points of all systems one after another. */
export interface PreparedEdition {
  /** First point of each system in the flat arrays. */
  readonly first: Int32Array;
  /** 1 = agrees with its own source's curve in the high-breakdown start. */
  readonly use: Uint8Array;
  /** Stated standard uncertainty of each point in ln value, its own part, that of the temperature included. */
  readonly statedU: Float64Array;
  /** Temperature of the break, K; NaN = none. By system. */
  readonly breakK: Float64Array;
  readonly betweenClass: Uint8Array;
  /** Median of `statedU` over each source. */
  readonly typicalU: Float64Array;
}

/** Standard uncertainty of ln value where none is known. */
const UNSTATED_U = 0.05;
/** Spans below this count as one temperature, K. */
export const ONE_TEMPERATURE_SPAN_K = 3;

/** Runs the high-breakdown start of every system. */
export function prepareEdition(
  ws: RobustWorkspace,
  points: readonly SystemPoints[],
  perSystem: readonly RobustSystem[],
  nSources: number,
): PreparedEdition {
  const first = new Int32Array(points.length + 1);
  points.forEach(({ n }, s) => {
    first[s + 1] = first[s]! + n;
  });
  const total = first[points.length]!;
  const prepared = {
    first,
    use: new Uint8Array(total),
    statedU: new Float64Array(total),
    breakK: new Float64Array(points.length),
    betweenClass: new Uint8Array(points.length),
  };
  points.forEach((system, s) => {
    const about = perSystem[s];
    loadSystem(ws, system, about?.excluded);
    ws.tested = about?.breakK !== undefined;
    if (about?.breakK === undefined) startWithBranches(ws, about?.water === true || about?.aqueousSalt === true);
    else startAtBreak(ws, about.breakK);
    prepared.breakK[s] = ws.breakK;
    prepared.betweenClass[s] = classOf(ws, about?.aqueousSalt === true);
    for (let k = 0; k < system.n; k++) prepared.use[first[s]! + ws.order[k]!] = ws.use[k]!;
    stateUncertainties(ws, system, prepared.statedU, first[s]!);
  });
  return { ...prepared, typicalU: typicalUncertainty(points, first, prepared.statedU, nSources) };
}

function classOf(ws: RobustWorkspace, aqueousSalt: boolean): number {
  if (aqueousSalt) return BetweenClass.aqueousSalt;
  return spanK(ws) < ONE_TEMPERATURE_SPAN_K ? BetweenClass.oneTemperature : BetweenClass.general;
}

/** Temperatures covered by the usable points, K. */
export function spanK(ws: RobustWorkspace): number {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  for (let k = 0; k < ws.rows.n; k++) {
    if (ws.usable[k] === 0) continue;
    low = Math.min(low, ws.temperatureK[k]!);
    high = Math.max(high, ws.temperatureK[k]!);
  }
  return high > low ? high - low : 0;
}

/** Combines a point's own u(ln value) with the slope of the start times u(T). */
function stateUncertainties(ws: RobustWorkspace, points: SystemPoints, out: Float64Array, at: number): void {
  const { coefficients } = modelOf(ws);
  for (let k = 0; k < points.n; k++) {
    const i = ws.order[k]!;
    const uValue = ownLnU(points, i);
    const uT = points.temperatureU[i]!;
    const own = uValue > 0 && uValue < 10 ? uValue : UNSTATED_U;
    const slope = screeningSlope(coefficients[1]!, coefficients[2]!, points.temperatureK[i]!, ws.centreK);
    const fromT = uT > 0 && uT < 100 && Math.abs(slope) < 1 ? slope * uT : 0;
    out[at + i] = Math.sqrt(own * own + fromT * fromT);
  }
}

function typicalUncertainty(
  points: readonly SystemPoints[],
  first: Int32Array,
  statedU: Float64Array,
  nSources: number,
): Float64Array {
  const start = new Int32Array(nSources + 1);
  for (const { n, source } of points) for (let i = 0; i < n; i++) start[source[i]! + 1]!++;
  for (let s = 0; s < nSources; s++) start[s + 1]! += start[s]!;
  const end = start.slice();
  const bySource = new Float64Array(statedU.length);
  points.forEach(({ n, source }, s) => {
    for (let i = 0; i < n; i++) bySource[end[source[i]!]!++] = statedU[first[s]! + i]!;
  });
  return Float64Array.from({ length: nSources }, (_, s) =>
    start[s + 1]! > start[s]! ? medianInPlace(bySource.subarray(start[s]!, start[s + 1]!)) : Number.NaN,
  );
}
