import { poissonTerm } from "./gamma-function.ts";
import { betaKernel, incompleteBeta } from "./incomplete-beta.ts";
import { lowerIncompleteGamma, upperIncompleteGamma } from "./incomplete-gamma.ts";
import { type PositiveLaw, quantileOfPositiveLaw } from "./quantile-search.ts";

/**
 * Normal, Student t, chi-square and F laws: distribution function P(X <= x), survival function P(X > x) and quantile,
 * to about 1e-12 relative in either tail. Degrees of freedom are positive reals.
 * @see Abramowitz and Stegun, Handbook of Mathematical Functions (1964), chapter 26.
 */

/** P(Z <= z) of the standard normal law. @throws RangeError if z is NaN, as all functions here do. */
export function normalCdf(z: number): number {
  requireNumber("normal", z);
  return z > 0 ? 1 - upperIncompleteGamma(0.5, (z * z) / 2) / 2 : upperIncompleteGamma(0.5, (z * z) / 2) / 2;
}

/** P(Z > z) of the standard normal law. */
export function normalSurvival(z: number): number {
  return normalCdf(-z);
}

/** z with P(Z <= z) = probability. @throws RangeError unless the probability lies in [0, 1]. */
export function normalQuantile(probability: number): number {
  return symmetricQuantile("normal", probability, (inside, outside) =>
    Math.sqrt(quantileOfPositiveLaw(chiSquareLaw(1), inside, outside, 1)),
  );
}

/** P(T <= t) of Student's law. @throws RangeError unless df > 0. */
export function studentTCdf(t: number, df: number): number {
  return studentTSurvival(-t, df);
}

/** P(T > t) of Student's law. @throws RangeError unless df > 0. */
export function studentTSurvival(t: number, df: number): number {
  requirePositive("Student t", df);
  requireNumber("Student t", t);
  if (df === Infinity) return normalSurvival(t);
  const half = fSurvival(t * t, 1, df) / 2;
  return t > 0 ? half : 1 - half;
}

/**
 * t with P(T <= t) = probability; df may be Infinity (normal law).
 * @throws RangeError unless df > 0 and the probability lies in [0, 1].
 */
export function studentTQuantile(probability: number, df: number): number {
  requirePositive("Student t", df);
  if (df === Infinity) return normalQuantile(probability);
  const law = fLaw(1, df);
  return symmetricQuantile("Student t", probability, (inside, outside) =>
    Math.sqrt(quantileOfPositiveLaw(law, inside, outside, 1)),
  );
}

/** P(X <= x) of the chi-square law. @throws RangeError unless df > 0. */
export function chiSquareCdf(x: number, df: number): number {
  requirePositive("chi-square", df);
  requireNumber("chi-square", x);
  return lowerIncompleteGamma(df / 2, x / 2);
}

/** P(X > x) of the chi-square law. @throws RangeError unless df > 0. */
export function chiSquareSurvival(x: number, df: number): number {
  requirePositive("chi-square", df);
  requireNumber("chi-square", x);
  return upperIncompleteGamma(df / 2, x / 2);
}

/** x with P(X <= x) = probability. @throws RangeError unless df > 0 and the probability lies in [0, 1]. */
export function chiSquareQuantile(probability: number, df: number): number {
  requirePositive("chi-square", df);
  requireProbability("chi-square", probability);
  return quantileOfPositiveLaw(chiSquareLaw(df), probability, 1 - probability, df);
}

/** P(X <= x) of the F law with df1 and df2 degrees of freedom. @throws RangeError unless both are positive. */
export function fCdf(x: number, df1: number, df2: number): number {
  requirePositive("F", df1, df2);
  requireNumber("F", x);
  return fLaw(df1, df2).lower(x);
}

/** P(X > x) of the F law with df1 and df2 degrees of freedom. @throws RangeError unless both are positive. */
export function fSurvival(x: number, df1: number, df2: number): number {
  requirePositive("F", df1, df2);
  requireNumber("F", x);
  return fLaw(df1, df2).upper(x);
}

/**
 * x with P(X <= x) = probability for the F law. For a small upper tail alpha use 1 / fQuantile(alpha, df2, df1).
 * @throws RangeError unless both degrees of freedom are positive and the probability lies in [0, 1].
 */
export function fQuantile(probability: number, df1: number, df2: number): number {
  requirePositive("F", df1, df2);
  requireProbability("F", probability);
  return quantileOfPositiveLaw(fLaw(df1, df2), probability, 1 - probability, 1);
}

function chiSquareLaw(df: number): PositiveLaw {
  const a = df / 2;
  return {
    lower: (x) => lowerIncompleteGamma(a, x / 2),
    upper: (x) => upperIncompleteGamma(a, x / 2),
    kernel: (x) => a * poissonTerm(a, x / 2),
  };
}

/** For F at x, (d1 x) / (d1 x + d2) has the beta law; its complement is computed on its own, not by subtraction. */
function fLaw(df1: number, df2: number): PositiveLaw {
  const a = df1 / 2;
  const b = df2 / 2;
  const ratio = df1 / df2;
  const share = (x: number) => 1 / (1 + 1 / (ratio * x));
  const rest = (x: number) => 1 / (1 + ratio * x);
  return {
    lower: (x) => (x > 0 ? incompleteBeta(share(x), rest(x), a, b) : 0),
    upper: (x) => (x > 0 ? incompleteBeta(rest(x), share(x), b, a) : 1),
    kernel: (x) => betaKernel(share(x), rest(x), a, b),
  };
}

/** Quantile of a law symmetric about 0 from that of its absolute value, given P(|X| <= x) and P(|X| > x). */
function symmetricQuantile(
  name: string,
  probability: number,
  absoluteQuantile: (inside: number, outside: number) => number,
): number {
  requireProbability(name, probability);
  if (probability === 0.5) return 0;
  const tail = probability < 0.5 ? probability : 1 - probability;
  const size = absoluteQuantile(1 - 2 * tail, 2 * tail);
  return probability < 0.5 ? -size : size;
}

function requirePositive(name: string, ...degreesOfFreedom: number[]): void {
  for (const df of degreesOfFreedom) {
    if (!(df > 0)) throw new RangeError(`${name}: degrees of freedom must be positive, not ${df}`);
  }
}

function requireNumber(name: string, x: number): void {
  if (Number.isNaN(x)) throw new RangeError(`${name}: no probability belongs to NaN`);
}

function requireProbability(name: string, probability: number): void {
  if (!(probability >= 0 && probability <= 1)) {
    throw new RangeError(`${name}: a probability lies between 0 and 1, not ${probability}`);
  }
}
