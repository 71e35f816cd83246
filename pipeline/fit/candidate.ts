import { quadraticForm, transformCoefficients, transformCovariance } from "../curves/coefficient-transformation.ts";
import { centredSlope, centredValue, type LinearModel, setDesignColumns } from "../curves/linear-models.ts";
import { informationCriteria } from "../numerics/information-criteria.ts";
import type { CurveModel } from "../records/fits.ts";
import type { FitWorkspace } from "./fit-workspace.ts";
import { generalisedLeastSquares, leaveOneOut, withinPart } from "./generalised-least-squares.ts";
import type { KeptPoints } from "./kept-points.ts";
import { logDeterminant, setRandomIntercept } from "./random-intercept.ts";
import { type FitWeighting, setAbsoluteVariances } from "./row-variances.ts";

/** What all models of a system are fitted under, so that their criteria can be compared; the rest is in the workspace. */
export interface CommonFit {
  readonly points: KeptPoints;
  readonly weighting: FitWeighting;
  /** Within-source SD of each source, expected. */
  readonly within: readonly number[];
  /** Factor on the expected variances, from the system's own residuals. */
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
  /** r' K^-1 r under the common covariance. */
  readonly residualSumOfSquares: number;
  /** Infinity where there are fewer than p + 3 points. */
  readonly aicc: number;
  readonly leaveOneOut: number;
  /** Standard error of ln value at one temperature (K) less that at another; 0 for a model that cannot turn. */
  readonly standardErrorOfRise: (fromK: number, toK: number) => number;
  /** Published coefficients, and their covariance (row-major) with the offset between sources included. */
  readonly published: () => {
    readonly names: readonly string[];
    readonly values: readonly number[];
    readonly covariance: readonly number[];
  };
}

/** A linear model fitted in its centred basis. */
export interface LinearFit {
  readonly model: LinearModel;
  readonly centreK: number;
  readonly coefficients: readonly number[];
  readonly covariance: readonly number[];
  /** Part of the covariance that comes from scatter within sources. */
  readonly withinPart: readonly number[];
  readonly residualSumOfSquares: number;
  readonly aicc: number;
  readonly leaveOneOut: number;
}

const MOST_ITERATIONS = 100;
/** Longest step of a fitted ln value in the Gauss-Newton iteration: a factor e in the value. */
const LONGEST_STEP = 1;

/** Least residual variance, as a share of the expected one, that a criterion distinguishes from an exact fit. */
const LEAST_SHARE = 1e-12;

/** Sets the covariance of the points of a common fit from the variances of the weighting in force. */
export function setPointCovariance(ws: FitWorkspace, common: CommonFit, variance: Float64Array): void {
  const { points, varianceFactor, betweenVariance } = common;
  const { n, sources } = points;
  if (sources.length > 1)
    setRandomIntercept(ws.common, n, sources.length, variance, varianceFactor, betweenVariance, points);
  else setRandomIntercept(ws.common, n, 1, variance, varianceFactor, 0);
}

/**
 * Fits a linear model under the common covariance: once in ln value; in the value itself by Gauss-Newton steps.
 *
 * @param lastSd standard deviation of the last coefficient before the data; Infinity where it is fitted freely
 * @returns undefined where the design is collinear or the iteration does not settle
 */
export function fitLinear(
  ws: FitWorkspace,
  common: CommonFit,
  model: LinearModel,
  lastSd = Number.POSITIVE_INFINITY,
): LinearFit | undefined {
  const { points, weighting, within } = common;
  const { n, centreK } = points;
  const p = model.parameterCount;
  const relative = weighting === "relative";
  const response = relative ? ws.lnValue : ws.response;
  setDesignColumns(ws.columns, model, ws.temperatureK, n, centreK);
  for (let i = 0; i < n; i++) ws.fitted[i] = ws.startFitted[i]!;
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
    if (!relative && !setAbsoluteVariances(ws, n, within, ws.fitted)) return undefined;
    setPointCovariance(ws, common, relative ? ws.startVariance : ws.variance);
    const fit = generalisedLeastSquares(ws, ws.common, response, p, lastSd);
    if (fit === undefined) return undefined;
    const change = moveFitted(ws, response, n, relative ? Number.POSITIVE_INFINITY : LONGEST_STEP);
    if (!relative && change > 1e-11) continue;
    return {
      model,
      centreK,
      coefficients: fit.coefficients,
      covariance: fit.covariance,
      withinPart: withinPart(ws, ws.common, fit.covariance, p),
      residualSumOfSquares: fit.residualSumOfSquares,
      aicc: correctedAkaike(ws, common, fit.residualSumOfSquares, p),
      leaveOneOut: leaveOneOut(ws, ws.common, fit.covariance, p),
    };
  }
  return undefined;
}

/**
 * Moves `ws.fitted` to the fit just made, no point further than `longest`, and returns the largest change asked for.
 *
 * Far from the minimum a full Gauss-Newton step in the value itself may overshoot by orders of magnitude.
 */
function moveFitted(ws: FitWorkspace, response: Float64Array, n: number, longest: number): number {
  let change = 0;
  for (let i = 0; i < n; i++) change = Math.max(change, Math.abs(response[i]! - ws.residuals[i]! - ws.fitted[i]!));
  const share = Math.min(1, longest / change);
  for (let i = 0; i < n; i++) {
    const fitted = response[i]! - ws.residuals[i]!;
    ws.fitted[i] = share < 1 ? ws.fitted[i]! + share * (fitted - ws.fitted[i]!) : fitted;
  }
  return change;
}

/** What the choice needs to know of a linear fit. */
export function linearCandidate(common: CommonFit, fit: LinearFit): Candidate {
  const { model, coefficients, covariance, centreK, aicc, leaveOneOut } = fit;
  const p = model.parameterCount;
  return {
    model: model.name,
    parameterCount: p,
    residualSumOfSquares: fit.residualSumOfSquares,
    aicc,
    leaveOneOut,
    lnValue: (T) => centredValue(model, coefficients, T, centreK),
    slope: (T) => centredSlope(model, coefficients, T, centreK),
    standardErrorOfRise: (fromK, toK) => {
      const [from, to] = [new Float64Array(p), new Float64Array(p)];
      model.writeDesignRow(from, 0, fromK, centreK);
      model.writeDesignRow(to, 0, toK, centreK);
      for (let j = 0; j < p; j++) to[j]! -= from[j]!;
      return Math.sqrt(Math.max(0, quadraticForm(covariance, to, p)));
    },
    published: () => {
      const matrix = model.publishedFromCentred(centreK);
      return {
        names: model.coefficientNames,
        values: transformCoefficients(matrix, coefficients, p),
        covariance: transformCovariance(matrix, withOffset(common, covariance), p),
      };
    },
  };
}

/** Covariance of centred coefficients with the offset of a single source: the fit stays, its intercept is less sure. */
function withOffset(common: CommonFit, covariance: readonly number[]): readonly number[] {
  if (common.points.sources.length > 1) return covariance;
  return [covariance[0]! + loneOffsetVariance(common), ...covariance.slice(1)];
}

/** Variance of the offset of a single source, which the fit cannot tell from the curve: tau^2 and what its points share. */
export function loneOffsetVariance({ points, betweenVariance }: Pick<CommonFit, "points" | "betweenVariance">): number {
  return betweenVariance + (points.sharedVariance[0] ?? 0);
}

/**
 * AICc of the fit just made (covariance `ws.common`, fitted values `ws.fitted`) by its weighted residuals:
 * n (ln(2 pi RSS/n) + 1) + ln det K + 2 k + 2 k (k + 1)/(n - k - 1), where k counts the variance besides the p
 * coefficients. A fit in the value itself is brought to the same measure by the Jacobian of the logarithm.
 *
 * @returns Infinity where n is below p + 3, so that the correction is not defined
 * @see Hurvich and Tsai, Biometrika 76 (1989) 297-307.
 */
export function correctedAkaike(ws: FitWorkspace, common: CommonFit, residualSumOfSquares: number, p: number): number {
  const n = common.points.n;
  const { aicc } = informationCriteria(Math.max(residualSumOfSquares, n * LEAST_SHARE), n, p);
  if (aicc === Number.POSITIVE_INFINITY) return aicc;
  let jacobian = 0;
  if (common.weighting === "absolute") for (let i = 0; i < n; i++) jacobian += 2 * (ws.fitted[i]! - ws.lnValue[i]!);
  return aicc + logDeterminant(ws.common) + jacobian;
}
