import { centredSlope, centredValue, designColumns, type LinearModel } from "../curves/linear-models.ts";
import { generalisedLeastSquares } from "./generalised-least-squares.ts";
import type { KeptPoints } from "./kept-points.ts";
import { randomIntercept } from "./random-intercept.ts";

/** In what the scatter of a source is taken as even: in ln x, or in x itself. */
export type FitWeighting = "relative" | "absolute";

/** A response and its variances within sources, as a linear fit in ln value wants them. */
export interface Weighted {
  readonly response: Float64Array;
  /** Expected variance of the response within its source. */
  readonly variance: Float64Array;
}

/** Within-source scatter (SD of ln value) of a source that the pooled scales say nothing of. */
const UNKNOWN_WITHIN = 0.02;

/**
 * Within-source SD of ln value of each of the system's sources: root mean square of what the screening fit assumed for
 * its points, else the scatter pooled over all its systems.
 */
export function withinBySource(points: KeptPoints, pooledWithin: Float64Array): Float64Array {
  const squares = new Float64Array(points.sources.length);
  const count = new Float64Array(points.sources.length);
  for (let i = 0; i < points.n; i++) {
    const sd = points.noiseSd[i] as number;
    if (!(sd > 0 && sd < Number.POSITIVE_INFINITY)) continue;
    squares[points.block[i] as number]! += sd * sd;
    count[points.block[i] as number]!++;
  }
  return Float64Array.from(points.sources, (source, b) => {
    if ((count[b] as number) > 0) return Math.sqrt((squares[b] as number) / (count[b] as number));
    const pooled = pooledWithin[source];
    return pooled !== undefined && pooled > 0 && pooled < Number.POSITIVE_INFINITY ? pooled : UNKNOWN_WITHIN;
  });
}

/**
 * Variances of ln value for the default weighting.
 *
 * The size of a source's scatter is that of {@link withinBySource}. Its own rows share it out in proportion to
 * their effective variances, u(ln x)^2 + (d ln x/dT)^2 u(T)^2, so that a clear point with an uncertain temperature, or
 * a value near a detection limit, weighs less than its neighbours.
 * @param slopes d ln value/dT at each point, 1/K
 * @param within within-source SD of each source
 * @see Orear, Am. J. Phys. 50 (1982) 912-916, for the effective variance.
 */
export function relativeVariances(points: KeptPoints, slopes: Float64Array, within: Float64Array): Float64Array {
  const { n, lnU, temperatureU, block } = points;
  const variance = new Float64Array(n);
  const mean = new Float64Array(within.length);
  const count = new Float64Array(within.length);
  for (let i = 0; i < n; i++) {
    variance[i] = (lnU[i] as number) ** 2 + ((slopes[i] as number) * (temperatureU[i] as number)) ** 2;
    mean[block[i] as number]! += variance[i] as number;
    count[block[i] as number]!++;
  }
  for (let b = 0; b < within.length; b++) mean[b]! /= (count[b] as number) * (within[b] as number) ** 2;
  for (let i = 0; i < n; i++) variance[i]! /= mean[block[i] as number] as number;
  return variance;
}

/**
 * Response and variances of ln value when least squares shall be taken in the value itself.
 *
 * With fitted values m = exp(eta), the response eta + (x - m)/m with variance c^2/m^2 makes the weighted residual
 * (x - m)/c exactly; c^2 is the mean of (within-source SD times value)^2.
 * @param fitted eta at each point, from the step before
 */
export function absoluteWeighted(points: KeptPoints, fitted: Float64Array, within: Float64Array): Weighted {
  const { n, lnValue, block } = points;
  const response = new Float64Array(n);
  const variance = new Float64Array(n);
  let c2 = 0;
  for (let i = 0; i < n; i++) c2 += ((within[block[i] as number] as number) * Math.exp(lnValue[i] as number)) ** 2 / n;
  for (let i = 0; i < n; i++) {
    const eta = fitted[i] as number;
    response[i] = eta + Math.expm1((lnValue[i] as number) - eta);
    variance[i] = c2 * Math.exp(-2 * eta);
  }
  return { response, variance };
}

/**
 * A first weighted fit without offsets: its slopes turn uncertainties of temperature into uncertainties of ln value.
 *
 * @returns fitted ln value and d ln value/dT at each point; undefined where the design is collinear
 */
export function firstFit(points: KeptPoints, model: LinearModel) {
  const { n, temperatureK, lnValue, lnU, block, sources, centreK } = points;
  const squares = Float64Array.from(lnU, (u) => u * u);
  const K = randomIntercept(squares, block, sources.length, 0);
  const fit = generalisedLeastSquares(K, designColumns(model, temperatureK, centreK), lnValue);
  if (fit === undefined) return undefined;
  const fitted = new Float64Array(n);
  const slopes = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    fitted[i] = centredValue(model, fit.coefficients, temperatureK[i] as number, centreK);
    slopes[i] = centredSlope(model, fit.coefficients, temperatureK[i] as number, centreK);
  }
  return { fitted, slopes };
}
