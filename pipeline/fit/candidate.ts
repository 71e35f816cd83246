import { quadraticForm, transformCoefficients, transformCovariance } from "../curves/coefficient-transformation.ts";
import { centredSlope, centredValue, designColumns, type LinearModel } from "../curves/linear-models.ts";
import type { CurveModel } from "../records/fits.ts";
import { type GeneralisedFit, generalisedLeastSquares, leaveOneOut } from "./generalised-least-squares.ts";
import type { KeptPoints } from "./kept-points.ts";
import { logDeterminant, type RandomIntercept, randomIntercept } from "./random-intercept.ts";
import { absoluteWeighted, type FitWeighting, type Weighted } from "./row-variances.ts";

/** What all models of a system are fitted under, so that their criteria can be compared. */
export interface CommonFit {
  readonly points: KeptPoints;
  readonly weighting: FitWeighting;
  /** Response and variances for the weighting in ln value; start values for the weighting in value. */
  readonly start: Weighted;
  /** Fitted ln value of the start. */
  readonly startFitted: Float64Array;
  readonly within: Float64Array;
  /** Factor on the variances, from the system's own residuals. */
  readonly varianceFactor: number;
  /** tau^2; used in the fit only with two sources or more, because one source cannot tell offset from curve. */
  readonly betweenVariance: number;
}

/** A model fitted to the kept points. */
export interface Candidate {
  readonly model: CurveModel;
  readonly parameterCount: number;
  readonly lnValue: (temperatureK: number) => number;
  /** d ln value/dT, 1/K. */
  readonly slope: (temperatureK: number) => number;
  /** ln value less fitted value at each kept point. */
  readonly residuals: Float64Array;
  /** Infinity where there are fewer than p + 3 points. */
  readonly aicc: number;
  readonly leaveOneOut: number;
  /** Standard error of ln value at one temperature (K) less that at another; 0 for a model that cannot turn. */
  readonly standardErrorOfRise: (fromK: number, toK: number) => number;
  readonly published: {
    readonly names: readonly string[];
    readonly values: Float64Array;
    /** p x p, row-major; the offset between sources included. */
    readonly covariance: Float64Array;
  };
}

/** The fit of a linear model in its centred basis, before it is compared. */
export interface LinearFit extends GeneralisedFit {
  readonly model: LinearModel;
  readonly columns: readonly Float64Array[];
  readonly K: RandomIntercept;
  /** ln value less fitted value. */
  readonly lnResiduals: Float64Array;
}

const MOST_ITERATIONS = 50;

/** Least residual variance, as a share of the expected one, that a criterion distinguishes from an exact fit. */
const LEAST_SHARE = 1e-12;

/** Covariance of the points of a common fit, from variances of the weighting in force. */
export function pointCovariance(common: CommonFit, variance: Float64Array): RandomIntercept {
  const { block, sources } = common.points;
  const scaled = variance.map((v) => v * common.varianceFactor);
  return randomIntercept(scaled, block, sources.length, sources.length > 1 ? common.betweenVariance : 0);
}

/**
 * Fits a linear model under the common covariance: once in ln value; in the value itself by Gauss-Newton steps.
 *
 * @param lastSd standard deviation of the last coefficient before the data; Infinity where it is fitted freely
 * @returns undefined where the design is collinear or the iteration does not settle
 */
export function fitLinear(
  common: CommonFit,
  model: LinearModel,
  lastSd = Number.POSITIVE_INFINITY,
): LinearFit | undefined {
  const { points, weighting } = common;
  const columns = designColumns(model, points.temperatureK, points.centreK);
  let weighted = common.start;
  let fitted = common.startFitted;
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
    if (weighting === "absolute") weighted = absoluteWeighted(points, fitted, common.within);
    const K = pointCovariance(common, weighted.variance);
    const fit = generalisedLeastSquares(K, columns, weighted.response, lastSd);
    if (fit === undefined) return undefined;
    let change = 0;
    const next = new Float64Array(points.n);
    for (let i = 0; i < points.n; i++) {
      next[i] = (weighted.response[i] as number) - (fit.residuals[i] as number);
      change = Math.max(change, Math.abs((next[i] as number) - (fitted[i] as number)));
    }
    fitted = next;
    if (weighting === "relative" || change < 1e-11) {
      const lnResiduals = points.lnValue.map((y, i) => y - (next[i] as number));
      return { ...fit, model, columns, K, lnResiduals };
    }
    if (!Number.isFinite(change)) return undefined;
  }
  return undefined;
}

/** What the choice needs to know of a linear fit. */
export function linearCandidate(common: CommonFit, fit: LinearFit): Candidate {
  const { model, coefficients } = fit;
  const { centreK } = common.points;
  const p = model.parameterCount;
  const matrix = model.publishedFromCentred(centreK);
  return {
    model: model.name,
    parameterCount: p,
    lnValue: (T) => centredValue(model, coefficients, T, centreK),
    slope: (T) => centredSlope(model, coefficients, T, centreK),
    residuals: fit.lnResiduals,
    aicc: correctedAkaike(common, fit.K, fit.residualSumOfSquares, fit.lnResiduals, p),
    leaveOneOut: leaveOneOut(fit.K, fit.columns, fit.covariance, fit.residuals),
    standardErrorOfRise: (fromK, toK) => {
      const from = new Float64Array(p);
      const to = new Float64Array(p);
      model.writeDesignRow(from, 0, fromK, centreK);
      model.writeDesignRow(to, 0, toK, centreK);
      for (let j = 0; j < p; j++) to[j]! -= from[j] as number;
      return Math.sqrt(Math.max(0, quadraticForm(fit.covariance, to)));
    },
    published: {
      names: model.coefficientNames,
      values: transformCoefficients(matrix, coefficients),
      covariance: transformCovariance(matrix, covarianceWithOffset(common, fit.covariance), p),
    },
  };
}

/**
 * Covariance of centred coefficients with the offset between sources in it.
 *
 * One source leaves the fit as it is, but its unknown offset moves the intercept: tau^2 joins that variance.
 */
export function covarianceWithOffset(common: CommonFit, covariance: Float64Array): Float64Array {
  if (common.points.sources.length > 1) return covariance;
  const out = Float64Array.from(covariance);
  out[0]! += common.betweenVariance;
  return out;
}

/**
 * AICc of a fit in ln value by its weighted residuals: n (ln(2 pi RSS/n) + 1) + ln det K + 2 k + 2 k (k + 1)/(n - k - 1),
 * where k counts the variance besides the p coefficients.
 *
 * A fit in the value itself is brought to the same measure by the Jacobian of the logarithm.
 * @returns Infinity where n is below p + 3, so that the correction is not defined
 * @see Hurvich and Tsai, Biometrika 76 (1989) 297-307.
 */
export function correctedAkaike(
  common: CommonFit,
  K: RandomIntercept,
  residualSumOfSquares: number,
  lnResiduals: Float64Array,
  p: number,
): number {
  const n = lnResiduals.length;
  const k = p + 1;
  if (n - k - 1 <= 0) return Number.POSITIVE_INFINITY;
  let jacobian = 0;
  if (common.weighting === "absolute") for (const residual of lnResiduals) jacobian -= 2 * residual;
  const meanSquare = Math.max(residualSumOfSquares / n, LEAST_SHARE);
  const deviance = n * (Math.log(2 * Math.PI * meanSquare) + 1) + logDeterminant(K) + jacobian;
  return deviance + 2 * k + (2 * k * (k + 1)) / (n - k - 1);
}
