import { chiSquareQuantile } from "../numerics/distributions.ts";
import { leastSquares } from "../numerics/least-squares.ts";
import { generalisedLeastSquares } from "./generalised-least-squares.ts";
import type { KeptPoints } from "./kept-points.ts";
import { randomIntercept, whiten } from "./random-intercept.ts";

/**
 * Degrees of freedom granted to the pooled within-source scatter when a system's own residuals are joined to it.
 *
 * Few, so that a system that scatters more than its sources usually do widens its limits; enough, so that the limits
 * of six points do not rest on three residuals. Chosen by the coverage simulation in tests/benchmarks.
 */
export const pooledDegreesOfFreedom = 4;

/** Probability below which the sources of a system count as further apart than the pooled between-source scatter. */
const WIDENING_LEVEL = 0.01;

/** Scales of one system: pooled ones, moderated by its own residuals. */
export interface SystemScale {
  /** Factor on the expected variances within sources. */
  readonly varianceFactor: number;
  /** Degrees of freedom of that factor. */
  readonly degreesOfFreedom: number;
  /** What the system's own residuals say: sum of squares over expected variances, and its degrees of freedom. */
  readonly own: { readonly sumOfSquares: number; readonly degreesOfFreedom: number };
  /** tau^2 used for this system. */
  readonly betweenVariance: number;
  /** True if its sources lie so far apart that the pooled tau was raised. */
  readonly widened: boolean;
}

/**
 * Scales of one system from residuals about the largest admissible model.
 *
 * Within sources: residuals with a free offset per source, moderated towards the pooled scatter,
 * s^2 = (d0 + q)/(d0 + d). Between sources: the pooled tau^2, raised to the Mandel-Paule value where the offsets of the
 * sources exceed what it allows at the 1 % level.
 * @param columns centred design of the largest admissible model, the intercept first
 * @param variance expected variance of each point within its source
 * @param lastSd standard deviation of the last coefficient before the data; Infinity where it is fitted freely
 * @see Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3, for the moderated variance.
 * @see Paule and Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385.
 */
export function systemScale(
  points: KeptPoints,
  columns: readonly Float64Array[],
  response: Float64Array,
  variance: Float64Array,
  lastSd: number,
  pooledBetweenVariance: number,
): SystemScale {
  const own = withinSources(points, columns, response, variance, lastSd);
  const degreesOfFreedom = pooledDegreesOfFreedom + own.degreesOfFreedom;
  const varianceFactor = (pooledDegreesOfFreedom + own.sumOfSquares) / degreesOfFreedom;
  const between = betweenScale(points, columns, response, variance, varianceFactor, lastSd, pooledBetweenVariance);
  return { varianceFactor, degreesOfFreedom, own, ...between };
}

/** The pooled tau^2, raised where the offsets of the sources exceed what it allows. */
function betweenScale(
  points: KeptPoints,
  columns: readonly Float64Array[],
  response: Float64Array,
  variance: Float64Array,
  varianceFactor: number,
  lastSd: number,
  pooled: number,
): { betweenVariance: number; widened: boolean } {
  const { block, sources } = points;
  if (sources.length < 2) return { betweenVariance: pooled, widened: false };
  const scaled = variance.map((v) => v * varianceFactor);
  const within = withinSources(points, columns, response, scaled, lastSd);
  const known = lastSd < Number.POSITIVE_INFINITY ? 1 : 0;
  const apart = points.n + known - columns.length - within.degreesOfFreedom;
  const excess = (tau2: number): number => {
    const K = randomIntercept(scaled, block, sources.length, tau2);
    const fit = generalisedLeastSquares(K, columns, response, lastSd);
    return fit === undefined ? 0 : fit.residualSumOfSquares - within.sumOfSquares;
  };
  const widened = apart > 0 && excess(pooled) > chiSquareQuantile(1 - WIDENING_LEVEL, apart);
  return { betweenVariance: widened ? raised(excess, apart, pooled) : pooled, widened };
}

/** Weighted residuals about the model with a free offset per source. */
function withinSources(
  points: KeptPoints,
  columns: readonly Float64Array[],
  response: Float64Array,
  variance: Float64Array,
  lastSd: number,
): { sumOfSquares: number; degreesOfFreedom: number } {
  const { n, block, sources } = points;
  const p = columns.length - 1;
  const K = randomIntercept(variance, block, sources.length, Number.POSITIVE_INFINITY);
  const sums = new Float64Array(sources.length);
  const centred = new Float64Array(n + 1);
  whiten(K, response, sums, centred, 0, 1);
  const rows = n + (lastSd < Number.POSITIVE_INFINITY ? 1 : 0);
  const design = new Float64Array(rows * p);
  design[rows * p - 1] = 1 / lastSd;
  for (let j = 0; j < p; j++) whiten(K, columns[j + 1] as Float64Array, sums, design, j, p);
  const fit = leastSquares(design, centred, rows, p);
  const degreesOfFreedom = Math.max(0, rows - sources.length - fit.rank);
  return { sumOfSquares: fit.residualSumOfSquares, degreesOfFreedom };
}

/** tau^2 at which the excess falls to its expectation, by bisection; never below the pooled value. */
function raised(excess: (tau2: number) => number, expected: number, pooled: number): number {
  let low = pooled;
  let high = Math.max(pooled, 1e-6) * 4;
  while (excess(high) > expected && high < 1e3) high *= 4;
  for (let halving = 0; halving < 30; halving++) {
    const middle = Math.sqrt(Math.max(low, 1e-9) * high);
    if (excess(middle) > expected) low = middle;
    else high = middle;
  }
  return high;
}
