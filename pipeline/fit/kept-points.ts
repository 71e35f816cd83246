import type { SystemPoints } from "../records/systems.ts";

/** The points a curve is fitted to: parallel arrays, in row order, sources numbered 0 to nBlocks - 1. */
export interface KeptPoints {
  readonly n: number;
  /** T, K, and its standard uncertainty, K. */
  readonly temperatureK: Float64Array;
  readonly temperatureU: Float64Array;
  /** ln x or ln r, and its standard uncertainty without the part from T. */
  readonly lnValue: Float64Array;
  readonly lnU: Float64Array;
  /** Scatter within its source that the screening fit assumed, SD of ln value; NaN where not stated. */
  readonly noiseSd: Float64Array;
  /** Which source: position in `sources`. */
  readonly block: Int32Array;
  /** Positions of the sources in the edition's list, in order of first row. */
  readonly sources: readonly number[];
  /** Temperatures more than {@link sameTemperatureK} apart; 1 where all lie within {@link oneTemperatureSpanK}. */
  readonly distinctTemperatures: number;
  readonly lowK: number;
  readonly highK: number;
  /** Harmonic mean temperature T0, K: centre of the basis. */
  readonly centreK: number;
  /** Points left out because T or ln value is no finite number, or their uncertainty is infinite. */
  readonly unusable: number;
}

/** Temperatures closer than this (K) count as one: thermostats and thermometers differ by as much. */
export const sameTemperatureK = 0.5;

/** A span (K) below this determines no slope: at 3 % per kelvin the scatter of the points is as large. */
export const oneTemperatureSpanK = 2;

/** Standard uncertainty of ln value taken where a point states none or zero (5 %, the default of an unstated method). */
const UNSTATED_U = 0.05;

/**
 * Collects the kept points of a system. Never throws: points that no fit can use are counted in `unusable`.
 *
 * @param points the system's points
 * @param kept 1 = stays in the published curve, by point
 * @param noiseSd scatter within its source that the screening fit assumed for each point, SD of ln value
 */
export function keptPoints(points: SystemPoints, kept: Uint8Array, noiseSd?: Float64Array): KeptPoints {
  const chosen: number[] = [];
  let unusable = 0;
  for (let i = 0; i < points.n; i++) {
    if (kept[i] !== 1) continue;
    if (usable(points, i)) chosen.push(i);
    else unusable++;
  }
  const n = chosen.length;
  const take = (column: Float64Array): Float64Array => {
    const out = new Float64Array(n);
    for (let i = 0; i < n; i++) out[i] = column[chosen[i] as number] as number;
    return out;
  };
  const temperatureK = take(points.temperatureK);
  const temperatureU = take(points.temperatureU);
  const lnU = take(points.lnU);
  for (let i = 0; i < n; i++) {
    if (!((temperatureU[i] as number) > 0)) temperatureU[i] = 0;
    if (!((lnU[i] as number) > 0)) lnU[i] = UNSTATED_U;
  }
  const { block, sources } = numberSources(points.source, chosen);
  return {
    ...{ n, temperatureK, temperatureU, lnU, block, sources, unusable },
    lnValue: take(points.lnValue),
    noiseSd: noiseSd === undefined ? new Float64Array(n).fill(Number.NaN) : take(noiseSd),
    ...temperatureCover(temperatureK),
  };
}

function usable(points: SystemPoints, i: number): boolean {
  const T = points.temperatureK[i] as number;
  return (
    T > 0 &&
    T < Number.POSITIVE_INFINITY &&
    Number.isFinite(points.lnValue[i]) &&
    points.lnU[i] !== Number.POSITIVE_INFINITY &&
    points.temperatureU[i] !== Number.POSITIVE_INFINITY
  );
}

function numberSources(source: Int32Array, chosen: readonly number[]): { block: Int32Array; sources: number[] } {
  const block = new Int32Array(chosen.length);
  const sources: number[] = [];
  const numbers = new Map<number, number>();
  for (let i = 0; i < chosen.length; i++) {
    const position = source[chosen[i] as number] as number;
    let number = numbers.get(position);
    if (number === undefined) {
      number = sources.length;
      sources.push(position);
      numbers.set(position, number);
    }
    block[i] = number;
  }
  return { block, sources };
}

function temperatureCover(temperatureK: Float64Array) {
  const sorted = Float64Array.from(temperatureK).sort();
  let distinctTemperatures = 0;
  let last = Number.NEGATIVE_INFINITY;
  let reciprocals = 0;
  for (const T of sorted) {
    reciprocals += 1 / T;
    if (T - last <= sameTemperatureK) continue;
    distinctTemperatures++;
    last = T;
  }
  const lowK = sorted[0] ?? Number.NaN;
  const highK = sorted.at(-1) ?? Number.NaN;
  if (highK - lowK < oneTemperatureSpanK) distinctTemperatures = 1;
  // Rounding must not carry the mean of equal temperatures past them.
  const centreK = Math.min(highK, Math.max(lowK, sorted.length / reciprocals));
  return { distinctTemperatures, lowK, highK, centreK };
}
