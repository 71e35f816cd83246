import { sampleStandardDeviation } from "simple-statistics";
import { fQuantile, studentTQuantile } from "./distributions.ts";
import { oneWayAnalysis } from "./one-way-analysis.ts";

/** Precision of a method from p laboratories with n replicates each, and Mandel's consistency statistics. */
export interface InterlaboratoryPrecision {
  readonly laboratoryMeans: readonly number[];
  readonly laboratorySds: readonly number[];
  readonly grandMean: number;
  /** SD of the laboratory means. */
  readonly sdOfMeans: number;
  /** s_r: root mean square of the laboratory SDs. */
  readonly repeatabilitySd: number;
  /** s_L^2 = max(0, SD of means^2 - s_r^2 / n) */
  readonly betweenVariance: number;
  /** s_R = sqrt(s_L^2 + s_r^2) */
  readonly reproducibilitySd: number;
  /** Mandel's h, (laboratory mean - grand mean) / SD of means; 0 where all means agree. */
  readonly h: readonly number[];
  /** Mandel's k, laboratory SD / s_r; 0 where no laboratory scatters. */
  readonly k: readonly number[];
}

/**
 * Repeatability, reproducibility and Mandel's h and k of one material, all laboratories with the same number of
 * replicates.
 * @throws RangeError unless there are two or more laboratories with the same number, two or more, of finite values.
 * @see ASTM E691-99; ISO 5725-2:1994, clause 7.
 */
export function interlaboratoryPrecision(laboratories: readonly (readonly number[])[]): InterlaboratoryPrecision {
  const replicates = laboratories[0]?.length ?? 0;
  for (const values of laboratories) {
    if (values.length !== replicates) {
      throw new RangeError(`interlaboratory precision: ${values.length} replicates beside ${replicates}`);
    }
  }
  const analysis = oneWayAnalysis(laboratories);
  const { groupMeans, grandMean } = analysis;
  const laboratorySds = laboratories.map((values) => sampleStandardDeviation([...values]));
  const sdOfMeans = sampleStandardDeviation([...groupMeans]);
  const repeatabilityVariance = analysis.within.meanSquare;
  const repeatabilitySd = Math.sqrt(repeatabilityVariance);
  const betweenVariance = Math.max(0, sdOfMeans ** 2 - repeatabilityVariance / replicates);
  return {
    laboratoryMeans: groupMeans,
    laboratorySds,
    grandMean,
    sdOfMeans,
    repeatabilitySd,
    betweenVariance,
    reproducibilitySd: Math.sqrt(betweenVariance + repeatabilityVariance),
    h: groupMeans.map((value) => (sdOfMeans > 0 ? (value - grandMean) / sdOfMeans : 0)),
    k: laboratorySds.map((sd) => (repeatabilitySd > 0 ? sd / repeatabilitySd : 0)),
  };
}

/**
 * Two-sided critical value of Mandel's h for p laboratories: (p - 1) t / sqrt(p (t^2 + p - 2)), t with p - 2 degrees of
 * freedom.
 * @throws RangeError if p is below 3 or alpha outside (0, 1).
 */
export function mandelHCritical(laboratories: number, alpha: number): number {
  const p = laboratories;
  requireDesign(p >= 3 && alpha > 0 && alpha < 1, p, alpha);
  const t = -studentTQuantile(alpha / 2, p - 2);
  return ((p - 1) * t) / Math.sqrt(p * (t * t + p - 2));
}

/**
 * Critical value of Mandel's k for p laboratories with n replicates: sqrt(p F / (F + p - 1)), F the upper alpha point
 * with n - 1 and (p - 1)(n - 1) degrees of freedom.
 * @throws RangeError if p or n is below 2 or alpha outside (0, 1).
 */
export function mandelKCritical(laboratories: number, replicates: number, alpha: number): number {
  const p = laboratories;
  requireDesign(p >= 2 && replicates >= 2 && alpha > 0 && alpha < 1, p, alpha);
  const df = replicates - 1;
  const f = 1 / fQuantile(alpha, (p - 1) * df, df);
  return Math.sqrt((p * f) / (f + p - 1));
}

function requireDesign(holds: boolean, laboratories: number, alpha: number): void {
  if (!holds) throw new RangeError(`Mandel statistics: ${laboratories} laboratories and alpha ${alpha} have none`);
}
