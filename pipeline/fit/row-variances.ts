import type { LinearModel } from "../curves/linear-models.ts";
import { leastSquaresInto } from "../numerics/least-squares.ts";
import { type FitWorkspace, mostCoefficients } from "./fit-workspace.ts";
import type { KeptPoints } from "./kept-points.ts";

/** In what the scatter of a source is taken as even: in ln x, or in x itself. */
export type FitWeighting = "relative" | "absolute";

/** Within-source scatter (SD of ln value) of a source that nothing is known of. */
const UNKNOWN_WITHIN = 0.02;

/**
 * Within-source SD of ln value of each of the system's sources: root mean square of what the screening fit assumed for
 * its points, else the scatter pooled over all its systems.
 */
export function withinBySource(ws: FitWorkspace, points: KeptPoints, pooledWithin: Float64Array): number[] {
  const squares = new Array<number>(points.sources.length).fill(0);
  const count = new Array<number>(points.sources.length).fill(0);
  for (let i = 0; i < points.n; i++) {
    const sd = ws.noiseSd[i]!;
    if (!(sd > 0 && sd < Number.POSITIVE_INFINITY)) continue;
    squares[ws.block[i]!]! += sd * sd;
    count[ws.block[i]!]!++;
  }
  return points.sources.map((source, b) => {
    if (count[b]! > 0) return Math.sqrt(squares[b]! / count[b]!);
    const pooled = pooledWithin[source];
    return pooled !== undefined && pooled > 0 && pooled < Number.POSITIVE_INFINITY ? pooled : UNKNOWN_WITHIN;
  });
}

/**
 * Variances of ln value for the default weighting, into `ws.startVariance`.
 *
 * The size of a source's scatter is that of {@link withinBySource}. Its own rows share it out in proportion to
 * their effective variances, u(ln x)^2 + (d ln x/dT)^2 u(T)^2, so that a clear point with an uncertain temperature, or
 * a value near a detection limit, weighs less than its neighbours. Slopes are taken from `ws.slopes`.
 * @param within within-source SD of each source
 * @see Orear, Am. J. Phys. 50 (1982) 912-916, for the effective variance.
 */
export function setRelativeVariances(ws: FitWorkspace, n: number, within: readonly number[]): void {
  const { startVariance: variance, lnU, temperatureU, slopes, block } = ws;
  const mean = new Array<number>(within.length).fill(0);
  const count = new Array<number>(within.length).fill(0);
  for (let i = 0; i < n; i++) {
    variance[i] = lnU[i]! ** 2 + (slopes[i]! * temperatureU[i]!) ** 2;
    mean[block[i]!]! += variance[i]!;
    count[block[i]!]!++;
  }
  for (let b = 0; b < within.length; b++) mean[b]! /= count[b]! * within[b]! ** 2;
  for (let i = 0; i < n; i++) variance[i]! /= mean[block[i]!]!;
}

/**
 * Response and variances of ln value when least squares shall be taken in the value itself, into `ws.response` and
 * `ws.variance`.
 *
 * With fitted values m = exp(eta), the response eta + (x - m)/m with variance c^2/m^2 makes the weighted residual
 * (x - m)/c exactly; c^2 is the mean of (within-source SD times value)^2.
 * @param fitted eta at each point, from the step before
 * @returns false where values or fitted values are so far apart that doubles cannot hold the weights
 */
export function setAbsoluteVariances(
  ws: FitWorkspace,
  n: number,
  within: readonly number[],
  fitted: Float64Array,
): boolean {
  const { lnValue, block, response, variance } = ws;
  let c2 = 0;
  for (let i = 0; i < n; i++) c2 += (within[block[i]!]! * Math.exp(lnValue[i]!)) ** 2 / n;
  for (let i = 0; i < n; i++) {
    const eta = fitted[i]!;
    response[i] = eta + Math.expm1(lnValue[i]! - eta);
    variance[i] = c2 * Math.exp(-2 * eta);
    if (!(variance[i]! > 0 && variance[i]! < Number.MAX_VALUE && Number.isFinite(response[i]!))) return false;
  }
  return true;
}

/**
 * A first fit in ln value, weighted by the stated uncertainties and without offsets: its slopes turn uncertainties of
 * temperature into uncertainties of ln value. Leaves fitted values in `ws.startFitted`, d ln value/dT in `ws.slopes`.
 *
 * @returns false where the design is collinear
 */
export function firstFit(ws: FitWorkspace, { n, centreK }: KeptPoints, model: LinearModel): boolean {
  const { design, temperatureK, lnU, lnValue, startFitted, slopes, variance: weights, leastSquares: ls } = ws;
  const p = model.parameterCount;
  for (let i = 0; i < n; i++) {
    model.writeDesignRow(design, i * p, temperatureK[i]!, centreK);
    weights[i] = 1 / (lnU[i]! * lnU[i]!);
  }
  if (leastSquaresInto(ls, design, lnValue, n, p, weights) < p) return false;
  const row = design.subarray(0, mostCoefficients);
  for (let i = 0; i < n; i++) {
    startFitted[i] = lnValue[i]! - ls.residuals[i]!;
    model.writeSlopeRow(row, 0, temperatureK[i]!, centreK);
    let slope = 0;
    for (let j = 0; j < p; j++) slope += row[j]! * ls.coefficients[j]!;
    slopes[i] = slope;
  }
  return true;
}
