import { mean, median, medianAbsoluteDeviation, sampleStandardDeviation } from "simple-statistics";

/** Robust mean and SD of a list, by {@link algorithmA}. */
export interface RobustSummary {
  readonly mean: number;
  readonly sd: number;
  /** 1.25 sd / sqrt(n), the uncertainty of the mean. */
  readonly meanUncertainty: number;
  readonly iterations: number;
}

/**
 * Algorithm A: mean and SD of values drawn in to within 1.5 SD of the mean, again and again until both settle. Starts
 * from the median and 1.483 times the median absolute deviation; where that is 0, from the ordinary SD.
 * Constants as in the standard (1.483, 1.134). All values equal gives SD 0.
 * @throws RangeError if the list is empty or holds a number that is not finite; one value gives SD 0.
 * @see ISO 13528:2015, annex C.3.
 */
export function algorithmA(values: readonly number[]): RobustSummary {
  const n = values.length;
  if (n === 0 || !values.every(Number.isFinite)) throw new RangeError("Algorithm A: finite values are needed");
  let { centre, sd } = startOfAlgorithmA(values);
  let iterations = 0;
  while (sd > 0 && iterations < 1000) {
    iterations += 1;
    const reach = 1.5 * sd;
    const drawnIn = values.map((value) => Math.min(Math.max(value, centre - reach), centre + reach));
    const nextCentre = mean(drawnIn);
    const nextSd = 1.134 * sampleStandardDeviation(drawnIn);
    const settled = Math.abs(nextCentre - centre) + Math.abs(nextSd - sd) <= 1e-13 * sd;
    centre = nextCentre;
    sd = nextSd;
    if (settled) break;
  }
  return { mean: centre, sd, meanUncertainty: (1.25 * sd) / Math.sqrt(n), iterations };
}

function startOfAlgorithmA(values: readonly number[]): { centre: number; sd: number } {
  const centre = median([...values]);
  const sd = 1.483 * medianAbsoluteDeviation([...values]);
  return { centre, sd: sd > 0 || values.length < 2 ? sd : sampleStandardDeviation([...values]) };
}
