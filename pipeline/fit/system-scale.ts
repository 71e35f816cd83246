import { chiSquareQuantile } from "../numerics/distributions.ts";
import { leastSquaresInto } from "../numerics/least-squares.ts";
import type { FitWorkspace } from "./fit-workspace.ts";
import { generalisedLeastSquares } from "./generalised-least-squares.ts";
import { type OffsetParts, setRandomIntercept, whiten } from "./random-intercept.ts";

/**
 * Degrees of freedom granted to the pooled within-source scatter when a system's own residuals are joined to it.
 *
 * Few, so that a system that scatters more than its sources usually do widens its limits; enough, so that the limits
 * of six points do not rest on three residuals. Chosen by the coverage simulation in tests/benchmarks.
 */
export const pooledDegreesOfFreedom = 4;

/** Probability below which the sources of a system count as further apart than the pooled between-source scatter. */
const WIDENING_LEVEL = 0.01;

/** Model, coefficients and points that the scales of a system are read from. */
export interface ScaleBasis {
  readonly n: number;
  readonly nSources: number;
  /** Number of columns in `ws.columns`, the intercept first. */
  readonly p: number;
  /** Standard deviation of the last coefficient before the data; Infinity where it is fitted freely. */
  readonly lastSd: number;
  /** What is known of the offsets besides tau^2. */
  readonly parts: OffsetParts;
}

/** Scales of one system: pooled ones, moderated by its own residuals. */
export interface SystemScale {
  /** Factor on the expected variances within sources. */
  readonly varianceFactor: number;
  /** Degrees of freedom of that factor. */
  readonly degreesOfFreedom: number;
  /** What the system's own residuals say: sum of squares over expected variances, and its degrees of freedom. */
  readonly own: OwnScatter;
  /** tau^2 used for this system. */
  readonly betweenVariance: number;
  /** True if its sources lie so far apart that the pooled tau was raised. */
  readonly widened: boolean;
}

interface OwnScatter {
  readonly sumOfSquares: number;
  readonly degreesOfFreedom: number;
}

/**
 * Scales of one system from residuals about the model its limits rest on (`ws.columns`).
 *
 * Within sources: residuals with a free offset per source, moderated towards the pooled scatter,
 * s^2 = (d0 + q)/(d0 + d). Between sources: the pooled tau^2, raised to the Mandel-Paule value where the offsets of the
 * sources exceed what it allows at the 1 % level.
 * @param response ln value in the weighting in force
 * @param variance expected variance of each point within its source
 * @see Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3, for the moderated variance.
 * @see Paule and Mandel, J. Res. Natl. Bur. Stand. 87 (1982) 377-385.
 */
export function systemScale(
  ws: FitWorkspace,
  basis: ScaleBasis,
  response: Float64Array,
  variance: Float64Array,
  pooledBetweenVariance: number,
): SystemScale {
  const own = withinSources(ws, basis, response, variance, 1);
  const degreesOfFreedom = pooledDegreesOfFreedom + own.degreesOfFreedom;
  const varianceFactor = (pooledDegreesOfFreedom + own.sumOfSquares) / degreesOfFreedom;
  const { betweenVariance, widened } = betweenScale(
    ws,
    basis,
    response,
    variance,
    varianceFactor,
    pooledBetweenVariance,
  );
  return { varianceFactor, degreesOfFreedom, own, betweenVariance, widened };
}

/** The pooled tau^2, raised where the offsets of the sources exceed what it allows. */
function betweenScale(
  ws: FitWorkspace,
  basis: ScaleBasis,
  response: Float64Array,
  variance: Float64Array,
  varianceFactor: number,
  pooled: number,
): { betweenVariance: number; widened: boolean } {
  const { n, nSources, p, lastSd, parts } = basis;
  if (nSources < 2) return { betweenVariance: pooled, widened: false };
  const within = withinSources(ws, basis, response, variance, varianceFactor);
  const apart = n + (lastSd < Number.POSITIVE_INFINITY ? 1 : 0) - p - within.degreesOfFreedom;
  const excess = (tau2: number): number => {
    setRandomIntercept(ws.common, n, nSources, variance, varianceFactor, tau2, parts);
    const fit = generalisedLeastSquares(ws, ws.common, response, p, lastSd);
    return fit === undefined ? 0 : fit.residualSumOfSquares - within.sumOfSquares;
  };
  const widened = apart > 0 && excess(pooled) > upperChiSquare(apart);
  return { betweenVariance: widened ? raised(excess, apart, pooled) : pooled, widened };
}

const upperChiSquares: number[] = [];

/** The chi-square value exceeded with the probability of {@link WIDENING_LEVEL}; kept, as few degrees of freedom occur. */
function upperChiSquare(degreesOfFreedom: number): number {
  upperChiSquares[degreesOfFreedom] ??= chiSquareQuantile(1 - WIDENING_LEVEL, degreesOfFreedom);
  return upperChiSquares[degreesOfFreedom];
}

/** Weighted residuals about the model with a free offset per source, variances times `factor`. */
function withinSources(
  ws: FitWorkspace,
  { n, nSources, p, lastSd }: ScaleBasis,
  response: Float64Array,
  variance: Float64Array,
  factor: number,
): OwnScatter {
  const { free, design, whitened, columns, leastSquares: ls } = ws;
  const slopes = p - 1;
  const known = lastSd < Number.POSITIVE_INFINITY;
  const rows = n + (known ? 1 : 0);
  setRandomIntercept(free, n, nSources, variance, factor, Number.POSITIVE_INFINITY);
  design.fill(0, n * slopes, rows * slopes);
  whitened[n] = 0;
  whiten(free, response, whitened, 0, 1);
  for (let j = 0; j < slopes; j++) whiten(free, columns[j + 1]!, design, j, slopes);
  if (known) design[rows * slopes - 1] = 1 / lastSd;
  const rank = leastSquaresInto(ls, design, whitened, rows, slopes);
  let sumOfSquares = 0;
  for (let i = 0; i < rows; i++) sumOfSquares += ls.residuals[i]! * ls.residuals[i]!;
  return { sumOfSquares, degreesOfFreedom: Math.max(0, rows - nSources - rank) };
}

/** tau^2 at which the excess falls to its expectation, by bisection; never below the pooled value. */
function raised(excess: (tau2: number) => number, expected: number, pooled: number): number {
  let low = Math.max(pooled, 1e-9);
  let high = Math.max(pooled, 1e-6) * 4;
  while (excess(high) > expected && high < 1e3) high *= 4;
  for (let halving = 0; halving < 30; halving++) {
    const middle = Math.sqrt(low * high);
    if (excess(middle) > expected) low = middle;
    else high = middle;
  }
  return high;
}
