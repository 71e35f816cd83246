import { transformCoefficients, transformCovariance } from "../../curves/coefficient-transformation.ts";
import { coefficientNames, lnValue, MOST_TERMS, publishedFromCentred } from "../../curves/jouyban-acree.ts";
import { type MixtureRange, requireInsideMixture } from "../../curves/mixture-range.ts";
import type { MixtureModel } from "../../records/mixtures.ts";
import type { MixturePoints } from "./mixture-points.ts";
import { fitByQr, type MixtureRegression, type MixtureScales, surfaceValue } from "./mixture-regression.ts";
import { publishedSurface } from "./mixture-surfaces.ts";

/** The number of terms J chosen. */
export interface TermChoice {
  readonly terms: number;
  readonly fit: MixtureRegression;
  /** AICc with 0, 1 ... terms, as many as could be fitted; Infinity where the points are too few for it. */
  readonly aicc: readonly number[];
}

/**
 * How many terms J: the smallest AICc of models fitted to the same points under the same scales; J0 from three
 * compositions, J1 from four, J2 from five. Where the points are too few for any AICc the fewest terms stand.
 *
 * @see Hurvich and Tsai, Biometrika 76 (1989) 297-307.
 */
export function chooseTerms(
  points: MixturePoints,
  use: Uint8Array,
  centreK: number,
  scales: MixtureScales,
  compositions: number,
): TermChoice | undefined {
  const aicc: number[] = [];
  let best: { terms: number; fit: MixtureRegression; criterion: number } | undefined;
  for (let terms = 0; terms <= Math.min(MOST_TERMS, compositions - 2); terms++) {
    const fit = fitByQr(points, use, publishedSurface(terms), centreK, scales);
    if (fit === undefined) break;
    const criterion = correctedAkaike(fit);
    aicc.push(criterion);
    if (best === undefined || criterion < best.criterion) best = { terms, fit, criterion };
  }
  return best === undefined ? undefined : { terms: best.terms, fit: best.fit, aicc };
}

/** n (ln(2 pi RSS/n) + 1) + 2 k + 2 k (k + 1)/(n - k - 1), k = p + 1, up to what models of one covariance share. */
function correctedAkaike({ n, residualSumOfSquares, surface }: MixtureRegression): number {
  const k = surface.p + 1;
  if (n - k - 1 <= 0) return Number.POSITIVE_INFINITY;
  const meanSquare = Math.max(residualSumOfSquares / n, 1e-12);
  return n * (Math.log(2 * Math.PI * meanSquare) + 1) + 2 * k + (2 * k * (k + 1)) / (n - k - 1);
}

/** The chosen surface with its coefficients in the usual form. */
export interface PublishedMixture extends Pick<MixtureModel, "coefficients" | "covariance"> {
  /** ln value from the centred coefficients, anywhere. */
  readonly value: (fraction: number, temperatureK: number) => number;
  /** The same inside the range only. @throws RangeError outside it. */
  readonly evaluate: (fraction: number, temperatureK: number, range: MixtureRange) => number;
}

/** Coefficients in the usual form; where a single source was fitted their covariance includes its offset. */
export function publishedMixture(
  fit: MixtureRegression,
  terms: number,
  points: MixturePoints,
  scales: MixtureScales,
): PublishedMixture {
  const { p } = fit.surface;
  const matrix = publishedFromCentred(fit.centreK, terms);
  const values = transformCoefficients(matrix, fit.coefficients, p);
  const centred = Array.from({ length: p * p }, (_, at) => {
    const [i, j] = [Math.floor(at / p), at % p];
    const own = fit.covariance[i * fit.columns + j] as number;
    // An offset of the one source moves both pure solvents alike, as w1 + w2 = 1.
    const moved = points.sources.length === 1 && (i === 0 || i === 2) && (j === 0 || j === 2);
    return moved ? own + scales.betweenVariance : own;
  });
  const covariance = transformCovariance(matrix, centred, p);
  const coefficients = coefficientNames(terms).map((name, j) => ({
    ...{ name, value: values[j] as number },
    standardUncertainty: Math.sqrt(covariance[j * p + j] as number),
  }));
  return {
    ...{ coefficients, covariance },
    value: (fraction, temperatureK) => surfaceValue(fit, fraction, temperatureK),
    evaluate: (fraction, temperatureK, range) => {
      requireInsideMixture("Jouyban-Acree-van 't Hoff", fraction, temperatureK, range);
      return lnValue({ coefficients: values, range }, fraction, temperatureK);
    },
  };
}
