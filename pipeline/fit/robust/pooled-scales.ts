import type { PooledScales } from "../../records/fits.ts";

/** Classes of systems with a between-source scatter of their own. */
export const BetweenClass = { general: 0, aqueousSalt: 1, oneTemperature: 2 } as const;

/** Standard deviations of ln value in force until the edition can say better. */
export interface DefaultScales {
  readonly between: number;
  readonly betweenAqueousSalt: number;
  readonly within: number;
}

/** Bins of |z| per unit, and unit range covered: medians are read off a histogram, so the order of rows cannot matter. */
const BINS_PER_UNIT = 64;
const BINS = 8 * BINS_PER_UNIT;
/** 1 / 0.6745: standard deviation of a Gaussian from its median absolute value. */
const MAD_FACTOR = 1.4826;
/** Efficiency of that estimate: degrees of freedom it is worth. */
const MAD_EFFICIENCY = 0.37;
/** Degrees of freedom given to the edition's scatter when a source's is estimated, and to the default for the edition's. */
const PRIOR_DEGREES_OF_FREEDOM = 8;
/** Degrees of freedom given to the default between-source scatter once the edition may speak. */
const BETWEEN_PRIOR_DEGREES_OF_FREEDOM = 2;
const LEAST_SOURCES = 3;
const LEAST_WITHIN = 0.002;
const LEAST_BETWEEN = 0.003;

/** Sums gathered over one pass through the edition. */
export interface ScaleSums {
  readonly histogram: Int32Array;
  readonly count: Int32Array;
  readonly freedom: Float64Array;
  readonly square: Float64Array;
  readonly offsetFreedom: Float64Array;
  readonly sources: readonly Set<number>[];
}

/** Empty sums for `nSources` sources. */
export function createScaleSums(nSources: number): ScaleSums {
  return {
    histogram: new Int32Array(nSources * BINS),
    count: new Int32Array(nSources),
    freedom: new Float64Array(nSources),
    square: new Float64Array(3),
    offsetFreedom: new Float64Array(3),
    sources: [new Set(), new Set(), new Set()],
  };
}

/** Counts one kept point: its |z| and the degrees of freedom it is worth (1 - leverage). */
export function addDeviation(sums: ScaleSums, source: number, absoluteZ: number, freedom: number): void {
  const bin = Math.min(BINS - 1, Math.floor(absoluteZ * BINS_PER_UNIT));
  sums.histogram[source * BINS + bin]!++;
  sums.count[source]!++;
  sums.freedom[source]! += freedom;
}

/**
 * Counts one offset of a sound source: b^2, and 1 - var(b|data)/tau^2, the degrees of freedom it is worth.
 * The offset counts up to three between-source standard deviations: one odd source must not set the edition's scale.
 */
export function addOffset(
  sums: ScaleSums,
  betweenClass: number,
  source: number,
  offset: number,
  variance: number,
  betweenVariance: number,
): void {
  sums.square[betweenClass]! += Math.min(offset * offset, 9 * betweenVariance);
  sums.offsetFreedom[betweenClass]! += Math.max(0, 1 - variance / betweenVariance);
  sums.sources[betweenClass]!.add(source);
}

/** Scales before any data: the typical stated uncertainty of each source, the default between-source scatter. */
export function startScales(statedU: Float64Array, defaults: DefaultScales): PooledScales {
  return {
    within: Float64Array.from(statedU, (u) => Math.min(0.05, Math.max(0.01, u > 0 ? u : defaults.within))),
    between: defaults.between,
    betweenAqueousSalt: defaults.betweenAqueousSalt,
    betweenOneTemperature: defaults.between,
    betweenDegreesOfFreedom: 0,
    betweenAqueousSaltDegreesOfFreedom: 0,
    betweenOneTemperatureDegreesOfFreedom: 0,
  };
}

/**
 * Scales of the next pass. Within a source: 1.4826 median |z| times the scale those z were formed with, shrunk in
 * variance towards the edition's, which is itself shrunk towards the default. Between sources: the fixed point
 * tau^2 = sum b^2 / sum (1 - var(b|data)/tau^2), which solves the restricted-likelihood equation as the
 * method of Paule and Mandel solves its moment equation.
 * @see R. C. Paule, J. Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385, doi 10.6028/jres.087.022;
 *   R. Fellner, Technometrics 28 (1986) 51-60, doi 10.1080/00401706.1986.10488097.
 */
export function nextScales(sums: ScaleSums, now: PooledScales, defaults: DefaultScales): PooledScales {
  const n = now.within.length;
  const own = new Float64Array(n);
  let weight = PRIOR_DEGREES_OF_FREEDOM;
  let logSum = PRIOR_DEGREES_OF_FREEDOM * Math.log(defaults.within);
  for (let s = 0; s < n; s++) {
    if (sums.count[s] === 0) continue;
    own[s] = Math.max(LEAST_WITHIN, now.within[s]! * MAD_FACTOR * medianOf(sums, s));
    const freedom = MAD_EFFICIENCY * sums.freedom[s]!;
    weight += freedom;
    logSum += freedom * Math.log(own[s]!);
  }
  const edition = Math.exp(logSum / weight);
  const within = own.map((sd, s) => {
    const freedom = sums.count[s] === 0 ? 0 : MAD_EFFICIENCY * sums.freedom[s]!;
    return Math.sqrt(
      (freedom * sd * sd + PRIOR_DEGREES_OF_FREEDOM * edition * edition) / (freedom + PRIOR_DEGREES_OF_FREEDOM),
    );
  });
  const general = nextBetween(sums, BetweenClass.general, defaults.between);
  const salt = nextBetween(sums, BetweenClass.aqueousSalt, defaults.betweenAqueousSalt);
  const oneTemperature = nextBetween(sums, BetweenClass.oneTemperature, defaults.between);
  return {
    within,
    between: general.sd,
    betweenAqueousSalt: salt.sd,
    betweenOneTemperature: oneTemperature.sd,
    betweenDegreesOfFreedom: general.freedom,
    betweenAqueousSaltDegreesOfFreedom: salt.freedom,
    betweenOneTemperatureDegreesOfFreedom: oneTemperature.freedom,
  };
}

function nextBetween(sums: ScaleSums, betweenClass: number, standard: number): { sd: number; freedom: number } {
  const freedom = sums.offsetFreedom[betweenClass]!;
  if (sums.sources[betweenClass]!.size < LEAST_SOURCES || freedom < 1) return { sd: standard, freedom: 0 };
  const prior = BETWEEN_PRIOR_DEGREES_OF_FREEDOM;
  const variance = (sums.square[betweenClass]! + prior * standard * standard) / (freedom + prior);
  return { sd: Math.max(LEAST_BETWEEN, Math.sqrt(variance)), freedom };
}

function medianOf(sums: ScaleSums, source: number): number {
  const half = sums.count[source]! / 2;
  let below = 0;
  for (let bin = 0; bin < BINS; bin++) {
    const here = sums.histogram[source * BINS + bin]!;
    if (here > 0 && below + here >= half) return (bin + (half - below) / here) / BINS_PER_UNIT;
    below += here;
  }
  return BINS / BINS_PER_UNIT;
}

/** Degrees of freedom behind the noise of a source's points, the edition's share included. */
export function noiseDegreesOfFreedom(sums: ScaleSums, source: number): number {
  return PRIOR_DEGREES_OF_FREEDOM + MAD_EFFICIENCY * sums.freedom[source]!;
}
