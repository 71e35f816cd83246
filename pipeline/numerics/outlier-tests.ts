import { mean, sampleStandardDeviation } from "simple-statistics";
import { fQuantile, studentTQuantile } from "./distributions.ts";

/** Which ends of the sample a test looks at. */
export type Side = "both" | "maximum" | "minimum";

/** Verdict on the most extreme value of a sample or the largest of several variances. */
export interface OutlierTest {
  readonly statistic: number;
  readonly critical: number;
  /** Position, in the list given, of the value tested. */
  readonly index: number;
  readonly isOutlier: boolean;
}

/** One removal of the generalized ESD procedure. */
export interface EsdStep extends OutlierTest {
  readonly value: number;
}

/**
 * Grubbs' test for one outlier in a normal sample: G = |extreme - mean| / SD.
 * A sample without spread has statistic 0.
 * @throws RangeError with fewer than three values, one that is not finite, or alpha outside (0, 1).
 * @see Grubbs, Technometrics 11 (1969) 1-21; NIST/SEMATECH e-Handbook 1.3.5.17.1.
 */
export function grubbsTest(values: readonly number[], alpha: number, side: Side = "both"): OutlierTest {
  requireSample("Grubbs test", values);
  const centre = mean([...values]);
  const index = mostExtreme(values, centre, side);
  const deviation = Math.abs(values[index]! - centre);
  const statistic = deviation > 0 ? deviation / sampleStandardDeviation([...values]) : 0;
  const critical = grubbsCritical(values.length, alpha, side);
  return { statistic, critical, index, isOutlier: statistic > critical };
}

/**
 * Critical value of Grubbs' G: (n - 1) / sqrt(n) sqrt(t^2 / (n - 2 + t^2)), t the upper alpha / n point of Student's
 * law with n - 2 degrees of freedom (alpha / (2n) for both sides).
 * @throws RangeError if n is below 3 or alpha outside (0, 1).
 */
export function grubbsCritical(n: number, alpha: number, side: Side = "both"): number {
  requireAlpha("Grubbs test", alpha);
  if (!(n >= 3)) throw new RangeError(`Grubbs test: at least 3 values are needed, not ${n}`);
  const t = studentTQuantile(alpha / (side === "both" ? 2 * n : n), n - 2);
  return ((n - 1) / Math.sqrt(n)) * Math.sqrt((t * t) / (n - 2 + t * t));
}

/**
 * Generalized extreme Studentized deviate test for up to `most` outliers, both sides: removes the most extreme value
 * again and again; the outliers are those up to the last step whose statistic exceeds its critical value.
 * @throws RangeError if `most` leaves fewer than 2 values after the last removal, or as {@link grubbsTest}.
 * @see Rosner, Technometrics 25 (1983) 165-172.
 */
export function generalizedEsd(
  values: readonly number[],
  most: number,
  alpha: number,
): { readonly steps: readonly EsdStep[]; readonly outliers: number } {
  requireSample("generalized ESD", values);
  if (!(Number.isInteger(most) && most >= 1 && most <= values.length - 2)) {
    throw new RangeError(`generalized ESD: at most ${values.length - 2} outliers among ${values.length}, not ${most}`);
  }
  const left = values.map((_, index) => index);
  const steps: EsdStep[] = [];
  let outliers = 0;
  for (let step = 1; step <= most; step++) {
    const sample = left.map((index) => values[index]!);
    const test = grubbsTest(sample, alpha, "both");
    const [index] = left.splice(test.index, 1);
    steps.push({ ...test, index: index!, value: values[index!]! });
    if (test.isOutlier) outliers = step;
  }
  return { steps, outliers };
}

/**
 * Cochran's test whether the largest of several variances, each of `replicates` values, is too large:
 * C = largest / sum. Variances that are all 0 have statistic 0.
 * @throws RangeError with fewer than two variances, one that is negative or not finite, or as {@link cochranCritical}.
 * @see ISO 5725-2:1994, clause 7.3.3.
 */
export function cochranTest(variances: readonly number[], replicates: number, alpha: number): OutlierTest {
  let index = 0;
  let sum = 0;
  variances.forEach((variance, i) => {
    if (!(variance >= 0 && variance < Infinity)) throw new RangeError(`Cochran test: variance ${i} is ${variance}`);
    if (variance > variances[index]!) index = i;
    sum += variance;
  });
  const critical = cochranCritical(variances.length, replicates, alpha);
  const statistic = sum > 0 ? variances[index]! / sum : 0;
  return { statistic, critical, index, isOutlier: statistic > critical };
}

/**
 * Critical value of Cochran's C for `groups` variances: 1 / (1 + (groups - 1) / F), F the upper alpha / groups point with
 * replicates - 1 and (groups - 1)(replicates - 1) degrees of freedom; a bound, exact where C exceeds 1/2.
 * @throws RangeError with fewer than two groups or replicates, or alpha outside (0, 1).
 */
export function cochranCritical(groups: number, replicates: number, alpha: number): number {
  requireAlpha("Cochran test", alpha);
  if (!(groups >= 2 && replicates >= 2)) {
    throw new RangeError(`Cochran test: ${groups} groups of ${replicates}; at least 2 of 2 are needed`);
  }
  const df = replicates - 1;
  const reciprocal = fQuantile(alpha / groups, (groups - 1) * df, df);
  return 1 / (1 + (groups - 1) * reciprocal);
}

function mostExtreme(values: readonly number[], centre: number, side: Side): number {
  const distance = (value: number) =>
    side === "both" ? Math.abs(value - centre) : side === "maximum" ? value - centre : centre - value;
  let best = 0;
  for (let i = 1; i < values.length; i++) if (distance(values[i]!) > distance(values[best]!)) best = i;
  return best;
}

function requireSample(name: string, values: readonly number[]): void {
  if (values.length < 3) throw new RangeError(`${name}: at least 3 values are needed, not ${values.length}`);
  for (const value of values) if (!Number.isFinite(value)) throw new RangeError(`${name}: a value is ${value}`);
}

function requireAlpha(name: string, alpha: number): void {
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`${name}: alpha lies between 0 and 1, not ${alpha}`);
}
