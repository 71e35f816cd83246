import { binomialTerm } from "./gamma-function.ts";

/**
 * Regularised incomplete beta function I_x(a, b), relative error about 1e-13 also where it is tiny.
 *
 * - x, y  with y = 1 - x: both are given, so that neither tail loses digits to the subtraction
 * - a, b  positive
 *
 * The upper tail is I_y(b, a).
 * @see Press et al., Numerical Recipes, 3rd ed. (2007), section 6.4; Abramowitz and Stegun 26.5.8.
 */
export function incompleteBeta(x: number, y: number, a: number, b: number): number {
  if (x <= 0) return 0;
  if (y <= 0) return 1;
  return x < (a + 1) / (a + b + 2) ? betaFraction(x, y, a, b) : 1 - betaFraction(y, x, b, a);
}

/** x^a y^b / B(a, b): the density of the beta law times x y. */
export function betaKernel(x: number, y: number, a: number, b: number): number {
  return (binomialTerm(a, b, x, y) * a * b) / (a + b);
}

/** Continued fraction by the modified Lentz method, for x below the mean. */
function betaFraction(x: number, y: number, a: number, b: number): number {
  const factor = betaKernel(x, y, a, b) / a;
  if (factor === 0) return 0;
  let c = 1;
  let d = lentz(1 - ((a + b) * x) / (a + 1));
  let h = d;
  for (let m = 1; ; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = lentz(1 + even * d);
    c = 1 + even / c;
    h *= c * d;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = lentz(1 + odd * d);
    c = 1 + odd / c;
    const change = c * d;
    h *= change;
    if (Math.abs(change - 1) <= Number.EPSILON) return factor * h;
    if (m > 1e6) throw new RangeError(`incomplete beta: no convergence at x = ${x}, a = ${a}, b = ${b}`);
  }
}

function lentz(value: number): number {
  return 1 / (Math.abs(value) < 1e-300 ? 1e-300 : value);
}
