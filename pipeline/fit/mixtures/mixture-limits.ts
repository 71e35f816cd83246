import { quadraticForm } from "../../curves/coefficient-transformation.ts";
import { limitFactor } from "../limit-factor.ts";
import { type MixtureRegression, rowAt, surfaceValue } from "./mixture-regression.ts";
import type { EstimatedScales } from "./mixture-scales.ts";

/** What the limits of a mixture's surface rest on. */
export interface MixtureLimitBasis {
  /** The flexible surface, whatever model is published. */
  readonly largest: MixtureRegression;
  readonly scales: EstimatedScales;
  /** ln value of the published surface. */
  readonly published: (fraction: number, temperatureK: number) => number;
  readonly oneSource: boolean;
  /** Degrees of freedom of the between-source scatter; 0 = the default setting, taken as given. */
  readonly betweenDegreesOfFreedom: number;
  /** Variance of one measurement by a source not yet seen. */
  readonly newSourceVariance: number;
}

/**
 * Half-widths, ln value, of the 95 % limits of a mixture's surface at a composition and temperature (K).
 *
 * t sqrt(V + L + d^2): V the variance of the flexible surface, with that of a source's offset where only one source was
 * fitted; L the variance by which a composition of its own lies off any such surface; d the distance of the published
 * surface from the flexible one. A new measurement adds its noise and the offset of its source. The degrees of freedom
 * are those of Satterthwaite for the sum.
 * @see Satterthwaite, Biometrics Bull. 2 (1946) 110-114.
 */
export function mixtureLimits(
  basis: MixtureLimitBasis,
  fraction: number,
  temperatureK: number,
): { curve: number; newMeasurement: number } {
  const { largest, scales, oneSource } = basis;
  const row = rowAt(largest, fraction, temperatureK);
  const surface = Math.max(0, quadraticForm(largest.covariance, row, largest.columns));
  const bias = basis.published(fraction, temperatureK) - surfaceValue(largest, fraction, temperatureK);
  const offset = oneSource ? scales.betweenVariance : 0;
  const half = (noise: number, between: number): number => {
    const parts = [
      [surface + noise, scales.noiseDegreesOfFreedom],
      [scales.lackOfFitVariance + bias * bias, scales.lackOfFitDegreesOfFreedom],
      [between, basis.betweenDegreesOfFreedom || Number.POSITIVE_INFINITY],
    ] as const;
    return halfWidth(parts);
  };
  const curve = half(0, offset);
  return { curve, newMeasurement: Math.max(curve, half(basis.newSourceVariance, offset + scales.betweenVariance)) };
}

/**
 * Half-width, ln value, of the 95 % limits of the difference between two compositions at one temperature (K): an offset
 * that both share drops out.
 */
export function differenceHalfWidth(
  { largest, scales, published }: MixtureLimitBasis,
  fraction: number,
  other: number,
  temperatureK: number,
): number {
  const row = rowAt(largest, fraction, temperatureK);
  const minus = rowAt(largest, other, temperatureK);
  for (let j = 0; j < row.length; j++) row[j]! -= minus[j]!;
  const surface = Math.max(0, quadraticForm(largest.covariance, row, largest.columns));
  const distance = (w: number) => published(w, temperatureK) - surfaceValue(largest, w, temperatureK);
  const bias = distance(fraction) - distance(other);
  return halfWidth([
    [surface, scales.noiseDegreesOfFreedom],
    [2 * scales.lackOfFitVariance + bias * bias, scales.lackOfFitDegreesOfFreedom],
  ]);
}

/** t sqrt(sum of variances), with the degrees of freedom of the sum from those of its parts. */
function halfWidth(parts: readonly (readonly [variance: number, degreesOfFreedom: number])[]): number {
  let [variance, inverse] = [0, 0];
  for (const [part, degreesOfFreedom] of parts) {
    variance += part;
    inverse += part ** 2 / degreesOfFreedom;
  }
  return limitFactor(inverse > 0 ? variance ** 2 / inverse : Number.POSITIVE_INFINITY) * Math.sqrt(variance);
}
