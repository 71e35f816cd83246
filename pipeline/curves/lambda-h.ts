import { type FittedRange, insideRange, requireInside } from "./fitted-range.ts";

/**
 * The lambda-h equation of Buchowski and Ksiazczak: ln(1 + lambda (1 - x)/x) = lambda h (1/T - 1/Tm)
 *
 * - x  mole fraction of the solute [1]; the curve meets x = 1 at the melting point, so it never passes it
 * - T  thermodynamic temperature [K], below Tm
 * - Tm melting point of the solid form that was dissolved [K]
 * - lambda [1] above 0, the mean number of associated molecules; h [K] above 0, the enthalpy of solution per mole over R
 *
 * With lambda = 1 it is the ideal solubility ln x = -h (1/T - 1/Tm).
 * @see Buchowski, Ksiazczak and Pietrzyk, J. Phys. Chem. 84 (1980) 975-979.
 */
export interface LambdaH {
  readonly lambda: number;
  readonly h: number;
  readonly meltingPointK: number;
  readonly fittedBetween: FittedRange;
}

/** Number of coefficients that are fitted; the melting point is given. */
export const parameterCount = 2;

/**
 * ln x = ln lambda - ln(exp(v) - 1 + lambda) with v = lambda h (1/T - 1/Tm).
 *
 * @throws RangeError if T (K) lies outside `fittedBetween` or is not a number.
 * @example lnValue({ lambda: 1, h: 3000, meltingPointK: 400, fittedBetween: [280, 340] }, 300) // -2.5
 */
export function lnValue({ lambda, h, meltingPointK, fittedBetween }: LambdaH, temperatureK: number): number {
  requireInside("lambda-h", temperatureK, fittedBetween);
  return lnMoleFraction(lambda, lambda * h * (1 / temperatureK - 1 / meltingPointK));
}

/**
 * ln x as a function of lambda and v = lambda h (1/T - 1/Tm), without overflow for large v.
 *
 * @param lambda association number, above 0
 * @param v exponent [1], at or above 0
 */
export function lnMoleFraction(lambda: number, v: number): number {
  if (v > 30) return Math.log(lambda) - v - Math.log1p((lambda - 1) * Math.exp(-v));
  return -Math.log1p(Math.expm1(v) / lambda);
}

/**
 * d ln x/dT = lambda h / T^2 / (1 + (lambda - 1) exp(-v)), 1/K.
 *
 * @throws RangeError if T (K) lies outside `fittedBetween` or is not a number.
 */
export function slope({ lambda, h, meltingPointK, fittedBetween }: LambdaH, temperatureK: number): number {
  requireInside("lambda-h", temperatureK, fittedBetween);
  const v = lambda * h * (1 / temperatureK - 1 / meltingPointK);
  return (lambda * h) / temperatureK ** 2 / (1 + (lambda - 1) * Math.exp(-v));
}

/** Temperatures (K) inside the fitted range at which ln x has the given value: the equation solved for 1/T. */
export function temperaturesAt({ lambda, h, meltingPointK, fittedBetween }: LambdaH, value: number): number[] {
  const v = Math.log1p(lambda * Math.expm1(-value));
  return insideRange([1 / (1 / meltingPointK + v / (lambda * h))], fittedBetween);
}

/**
 * Writes the gradient of ln x with respect to (ln lambda, ln g), g = lambda h, at position `at` of `row`.
 *
 * d ln x/d ln lambda = (e - 1)/(e - 1 + lambda) and d ln x/d ln g = -v e/(e - 1 + lambda) with e = exp(v): the
 * logarithms keep both coefficients above 0 and of like size.
 *
 * @param lambda association number, above 0
 * @param v exponent g (1/T - 1/Tm) [1], at or above 0
 */
export function writeGradientRow(row: Float64Array, at: number, lambda: number, v: number): void {
  const inverseExponential = Math.exp(-v);
  const denominator = 1 + (lambda - 1) * inverseExponential;
  row[at] = (1 - inverseExponential) / denominator;
  row[at + 1] = -v / denominator;
}

/**
 * Matrix J (2 x 2, row-major) that turns small changes of (ln lambda, ln g), g = lambda h, into changes of
 * (lambda, h): d lambda = lambda d ln lambda, d h = h (d ln g - d ln lambda).
 */
export function publishedFromLogarithms(lambda: number, h: number): Float64Array {
  return Float64Array.of(lambda, 0, -h, h);
}
