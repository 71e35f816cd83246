import { ownLnU, type SystemPoints, sharedVarianceOf } from "../records/systems.ts";
import type { FitWorkspace } from "./fit-workspace.ts";
import type { OffsetParts } from "./random-intercept.ts";

/**
 * What the kept points of a system cover. The points themselves stand in the workspace: T, u(T), ln value, u(ln value),
 * noise and source of n points, in row order, sources numbered 0 and up; u(ln value) is the point's own part.
 */
export interface KeptPoints extends OffsetParts {
  readonly n: number;
  /** Positions of the sources in the edition's list, in order of first row. */
  readonly sources: readonly number[];
  /** Temperatures more than {@link sameTemperatureK} apart; 1 where all lie within {@link oneTemperatureSpanK}. */
  readonly distinctTemperatures: number;
  readonly lowK: number;
  readonly highK: number;
  /** Harmonic mean temperature T0, K: centre of the basis. */
  readonly centreK: number;
  /** Points left out because T or ln value is no finite number, or an uncertainty is infinite. */
  readonly unusable: number;
}

/** Temperatures closer than this (K) count as one: thermostats and thermometers differ by as much. */
export const sameTemperatureK = 0.5;

/** A span (K) below this determines no slope: at 3 % per kelvin the scatter of the points is as large. */
export const oneTemperatureSpanK = 2;

/** No solution is this hot (K), and no ratio of amounts this far from 1 (ln): such numbers are no measurements. */
const BEYOND_MATTER_K = 1e5;
const BEYOND_COUNTING = 1e3;

/** Standard uncertainty of ln value taken where a point states none or zero (5 %, the default of an unstated method). */
const UNSTATED_U = 0.05;

/**
 * Loads the kept points of a system into the workspace. Never throws: points that no fit can use are counted.
 *
 * @param points the system's points
 * @param kept 1 = stays in the published curve, by point
 * @param noiseSd scatter within its source that the screening fit assumed for each point, SD of ln value
 * @param laboratories laboratory of each source, by position in the edition's list; "" = not stated, one of its own
 */
export function loadKeptPoints(
  ws: FitWorkspace,
  points: SystemPoints,
  kept: Uint8Array,
  noiseSd: Float64Array | undefined,
  laboratories: readonly string[] = [],
): KeptPoints {
  const sources: number[] = [];
  const count: number[] = [];
  const sharedVariance: number[] = [];
  let n = 0;
  let unusable = 0;
  let reciprocals = 0;
  for (let i = 0; i < points.n; i++) {
    if (kept[i] !== 1) continue;
    if (!usable(points, i)) {
      unusable++;
      continue;
    }
    const uT = points.temperatureU[i]!;
    const u = ownLnU(points, i);
    ws.temperatureK[n] = points.temperatureK[i]!;
    ws.temperatureU[n] = Math.max(0, Number.isNaN(uT) ? 0 : uT);
    ws.lnValue[n] = points.lnValue[i]!;
    ws.lnU[n] = u > 0 ? u : UNSTATED_U;
    ws.noiseSd[n] = noiseSd === undefined ? Number.NaN : noiseSd[i]!;
    const b = numberOf(sources, points.source[i]!);
    ws.block[n] = b;
    count[b] = (count[b] ?? 0) + 1;
    const mean = sharedVariance[b] ?? 0;
    sharedVariance[b] = mean + (sharedVarianceOf(points, i) - mean) / count[b];
    reciprocals += 1 / points.temperatureK[i]!;
    n++;
  }
  const cover = temperatureCover(ws, n);
  // Rounding must not carry the mean of equal temperatures past them.
  const centreK = Math.min(cover.highK, Math.max(cover.lowK, n / reciprocals));
  const { distinctTemperatures, lowK, highK } = cover;
  const perLaboratory = sourcesPerLaboratory(sources, laboratories);
  return { n, sources, perLaboratory, sharedVariance, distinctTemperatures, lowK, highK, centreK, unusable };
}

/** How many of these sources come from the laboratory of each, itself included; one where none is stated. */
export function sourcesPerLaboratory(sources: readonly number[], laboratories: readonly string[]): number[] {
  return sources.map((source) => {
    const own = laboratories[source] ?? "";
    return own === "" ? 1 : sources.filter((other) => laboratories[other] === own).length;
  });
}

function usable(points: SystemPoints, i: number): boolean {
  const T = points.temperatureK[i]!;
  return (
    T > 0 &&
    T < BEYOND_MATTER_K &&
    Math.abs(points.lnValue[i]!) < BEYOND_COUNTING &&
    points.lnU[i]! !== Number.POSITIVE_INFINITY &&
    points.temperatureU[i]! !== Number.POSITIVE_INFINITY
  );
}

/** Number of a source among those met so far; rows of one source mostly follow each other. */
function numberOf(sources: number[], source: number): number {
  const known = sources.lastIndexOf(source);
  return known >= 0 ? known : sources.push(source) - 1;
}

function temperatureCover({ temperatureK, fitted: sorted }: FitWorkspace, n: number) {
  if (n === 0) return { distinctTemperatures: 0, lowK: Number.NaN, highK: Number.NaN };
  for (let i = 0; i < n; i++) sorted[i] = temperatureK[i]!;
  sorted.subarray(0, n).sort();
  const lowK = sorted[0]!;
  const highK = sorted[n - 1]!;
  if (highK - lowK < oneTemperatureSpanK) return { distinctTemperatures: 1, lowK, highK };
  let distinctTemperatures = 0;
  let last = Number.NEGATIVE_INFINITY;
  for (let i = 0; i < n; i++) {
    if (sorted[i]! - last <= sameTemperatureK) continue;
    distinctTemperatures++;
    last = sorted[i]!;
  }
  return { distinctTemperatures, lowK, highK };
}
