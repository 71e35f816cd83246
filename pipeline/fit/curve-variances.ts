import { quadraticForm } from "../curves/coefficient-transformation.ts";
import type { LinearFit } from "./candidate.ts";

/** Where the variance of a limit comes from. */
export interface LimitScales {
  /** Degrees of freedom of the scatter within sources. */
  readonly withinDegreesOfFreedom: number;
  /** tau^2 and its degrees of freedom; 0 = the default setting, taken as given. */
  readonly betweenVariance: number;
  readonly betweenDegreesOfFreedom: number;
  /** Mean variance that the points of a source share here (densities, molar masses): a new source has its own. */
  readonly sharedVariance: number;
  /** Variance of a single measurement within a source whose noise is not known. */
  readonly newSourceVariance: number;
  /** True if only one source was fitted: its offset is then not in the covariance of the coefficients. */
  readonly oneSource: boolean;
}

/** A variance and its effective degrees of freedom. */
export interface Variance {
  readonly value: number;
  readonly degreesOfFreedom: number;
}

/**
 * Variances of linear functions of a fitted curve, split by origin: scatter within sources and offsets between them.
 *
 * The degrees of freedom are those of Satterthwaite for the sum of the two parts.
 * @see Satterthwaite, Biometrics Bull. 2 (1946) 110-114.
 */
export interface CurveVariances {
  /** Of ln value at T (K). */
  readonly ofCurve: (temperatureK: number) => Variance;
  /** Of ln value of a new measurement at T (K) by a new source. */
  readonly ofNewMeasurement: (temperatureK: number) => Variance;
  /** Of d ln value/dT at T (K). */
  readonly ofSlope: (temperatureK: number) => Variance;
}

/** @param largest fit of the model that the limits rest on, whatever model is published */
export function curveVariances(largest: LinearFit, scales: LimitScales): CurveVariances {
  const { model, covariance, withinPart, centreK } = largest;
  const p = model.parameterCount;
  const row = new Float64Array(p);
  const newOffset = scales.betweenVariance + scales.sharedVariance;
  const offset = scales.oneSource ? newOffset : 0;
  const sum = (moreWithin: number, moreBetween: number): Variance => {
    // Where weights differ by many orders of magnitude the forms cancel; neither part may leave 0 to the whole.
    const whole = Math.max(0, quadraticForm(covariance, row, p));
    const within = Math.min(whole, Math.max(0, quadraticForm(withinPart, row, p)));
    return sumOfParts(within + moreWithin, whole - within + moreBetween, scales);
  };
  return {
    ofCurve: (T) => {
      model.writeDesignRow(row, 0, T, centreK);
      return sum(0, offset);
    },
    ofNewMeasurement: (T) => {
      model.writeDesignRow(row, 0, T, centreK);
      return sum(scales.newSourceVariance, offset + newOffset);
    },
    ofSlope: (T) => {
      model.writeSlopeRow(row, 0, T, centreK);
      return sum(0, 0);
    },
  };
}

/** Sum of a variance within and one between sources, with Satterthwaite's degrees of freedom. */
export function sumOfParts(
  within: number,
  between: number,
  scales: Pick<LimitScales, "withinDegreesOfFreedom" | "betweenDegreesOfFreedom">,
): Variance {
  const value = within + between;
  const ofWithin = within ** 2 / scales.withinDegreesOfFreedom;
  const ofBetween = scales.betweenDegreesOfFreedom > 0 ? between ** 2 / scales.betweenDegreesOfFreedom : 0;
  const inverse = ofWithin + ofBetween;
  return { value, degreesOfFreedom: inverse > 0 ? value ** 2 / inverse : Number.POSITIVE_INFINITY };
}
