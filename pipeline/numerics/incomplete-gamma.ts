import { poissonTerm } from "./gamma-function.ts";

/**
 * Regularised lower incomplete gamma function P(a, x) = 1/Gamma(a) integral from 0 to x of t^(a-1) e^-t dt,
 * relative error about 1e-14 also where it is tiny. a > 0; 0 for x of 0 or less.
 * @see Press et al., Numerical Recipes, 3rd ed. (2007), section 6.2; Abramowitz and Stegun 6.5.29, 6.5.31.
 */
export function lowerIncompleteGamma(a: number, x: number): number {
  if (!(x > 0)) return 0;
  if (x === Infinity) return 1;
  return x < a + 1 ? lowerSeries(a, x) : 1 - upperFraction(a, x);
}

/** Regularised upper incomplete gamma function Q(a, x) = 1 - P(a, x), relative error about 1e-14 also in the far tail. */
export function upperIncompleteGamma(a: number, x: number): number {
  if (!(x > 0)) return 1;
  if (x === Infinity) return 0;
  return x < a + 1 ? 1 - lowerSeries(a, x) : upperFraction(a, x);
}

/** P = x^a e^-x / Gamma(a + 1) sum of x^k / ((a + 1) ... (a + k)) */
function lowerSeries(a: number, x: number): number {
  let sum = 1;
  let term = 1;
  for (let k = 1; term > sum * 1e-17; k++) {
    term *= x / (a + k);
    sum += term;
  }
  return sum * poissonTerm(a, x);
}

/** Q by its continued fraction, evaluated with the modified Lentz method. */
function upperFraction(a: number, x: number): number {
  const factor = a * poissonTerm(a, x);
  if (factor === 0) return 0;
  let b = x + 1 - a;
  let c = Infinity;
  let d = 1 / b;
  let h = d;
  for (let k = 1; ; k++) {
    const numerator = -k * (k - a);
    b += 2;
    d = 1 / (numerator * d + b);
    c = b + numerator / c;
    const change = c * d;
    h *= change;
    if (Math.abs(change - 1) <= Number.EPSILON) return factor * h;
    if (k > 1e6) throw new RangeError(`incomplete gamma: no convergence at a = ${a}, x = ${x}`);
  }
}
