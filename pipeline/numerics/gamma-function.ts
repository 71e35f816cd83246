/**
 * The gamma function in the forms that keep relative precision in tail probabilities: ln Gamma, the error of
 * Stirling's formula, and the deviance term, after Loader's saddle-point evaluation of the Poisson and binomial laws.
 *
 * @see C. Loader, Fast and Accurate Computation of Binomial Probabilities (2000).
 */

const LOG_SQRT_TWO_PI = 0.9189385332046727;

/** Coefficients of Lanczos' approximation for g = 7 and nine terms (from memory; the tests hold them to factorials and half-integer values). */
const LANCZOS_G = 7;
const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
  12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
] as const;

/**
 * ln Gamma(x) for x > 0, absolute error below about 1e-14 times max(1, |ln Gamma|).
 * @throws RangeError unless x is positive and finite.
 */
export function logGamma(x: number): number {
  if (!(x > 0 && x < Infinity)) throw new RangeError(`ln Gamma: ${x} is not a positive finite number`);
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  if (x > 16) return (x - 0.5) * Math.log(x) - x + LOG_SQRT_TWO_PI + stirlingSeries(x);
  let sum = LANCZOS[0] as number;
  for (let k = 1; k < LANCZOS.length; k++) sum += LANCZOS[k]! / (x - 1 + k);
  const t = x - 1 + LANCZOS_G + 0.5;
  return LOG_SQRT_TWO_PI + (x - 0.5) * Math.log(t) - t + Math.log(sum);
}

/** ln Gamma(x + 1) - [(x + 1/2) ln x - x + ln sqrt(2 pi)]: what Stirling's formula misses, for x > 0. */
export function stirlingError(x: number): number {
  if (x > 16) return stirlingSeries(x);
  return logGamma(x + 1) - (x + 0.5) * Math.log(x) + x - LOG_SQRT_TWO_PI;
}

/** x ln(x / m) + m - x without cancellation for x near m; both positive. */
export function devianceTerm(x: number, m: number): number {
  const difference = x - m;
  if (Math.abs(difference) >= 0.1 * (x + m)) return x * Math.log(x / m) - difference;
  const v = difference / (x + m);
  let sum = difference * v;
  let power = 2 * x * v;
  for (let k = 1; k < 1000; k++) {
    power *= v * v;
    const next = sum + power / (2 * k + 1);
    if (next === sum) return next;
    sum = next;
  }
  return sum;
}

/** x^a e^-x / Gamma(a + 1): the Poisson probability extended to real a > 0, x > 0. */
export function poissonTerm(a: number, x: number): number {
  return Math.exp(-stirlingError(a) - devianceTerm(a, x)) / Math.sqrt(2 * Math.PI * a);
}

/** Gamma(a + b + 1) / (Gamma(a + 1) Gamma(b + 1)) x^a y^b for y = 1 - x: the binomial probability for real a, b > 0. */
export function binomialTerm(a: number, b: number, x: number, y: number): number {
  const n = a + b;
  const stirling = stirlingError(n) - stirlingError(a) - stirlingError(b);
  return Math.exp(stirling - devianceTerm(a, n * x) - devianceTerm(b, n * y)) * Math.sqrt(n / (2 * Math.PI * a * b));
}

/** Asymptotic series 1/(12x) - 1/(360x^3) + ... in Bernoulli numbers, to 1e-16 for x > 16. */
function stirlingSeries(x: number): number {
  const y = 1 / (x * x);
  return (1 / 12 - y * (1 / 360 - y * (1 / 1260 - y * (1 / 1680 - y * (1 / 1188 - (y * 691) / 360360))))) / x;
}
