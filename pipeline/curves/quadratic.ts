import { type FittedRange, insideRange, requireInside } from "./fitted-range.ts";

/**
 * A quadratic in reciprocal temperature: ln x = A + B/T + C/T^2
 *
 * - x  mole fraction of the solute [1] (or mass ratio, where no molar mass is known)
 * - T  thermodynamic temperature [K]
 * - A [1], B [K], C [K^2]  fitted with T in kelvin; the dissolution enthalpy -R (B + 2 C/T) is linear in 1/T
 *
 * Valid between the lowest and highest temperature fitted.
 * @see Grant, Mehdizadeh, Chow and Fairbrother, Int. J. Pharm. 18 (1984) 25-38, who compare forms with an enthalpy
 * that changes with temperature (from memory, not verified).
 */
export interface Quadratic {
  readonly A: number;
  readonly B: number;
  readonly C: number;
  readonly fittedBetween: FittedRange;
}

/** Number of coefficients. */
export const parameterCount = 3;

/**
 * ln x at T (K) by ln x = A + B/T + C/T^2.
 *
 * @throws RangeError if T lies outside `fittedBetween` or is not a number.
 * @example lnValue({ A: 1, B: -3000, C: 90000, fittedBetween: [280, 340] }, 300) // -8
 */
export function lnValue({ A, B, C, fittedBetween }: Quadratic, temperatureK: number): number {
  requireInside("quadratic in 1/T", temperatureK, fittedBetween);
  return A + (B + C / temperatureK) / temperatureK;
}

/**
 * d ln x/dT = -(B + 2 C/T)/T^2, 1/K; zero at T = -2 C/B.
 *
 * @throws RangeError if T (K) lies outside `fittedBetween` or is not a number.
 */
export function slope({ B, C, fittedBetween }: Quadratic, temperatureK: number): number {
  requireInside("quadratic in 1/T", temperatureK, fittedBetween);
  return -(B + (2 * C) / temperatureK) / temperatureK ** 2;
}

/**
 * Temperatures (K) inside the fitted range at which ln x has the given value: none, one, or two about a turn.
 *
 * The roots of C z^2 + B z + A - ln x = 0 in z = 1/T, by the form that does not subtract nearly equal numbers.
 */
export function temperaturesAt({ A, B, C, fittedBetween }: Quadratic, value: number): number[] {
  const discriminant = B * B - 4 * C * (A - value);
  if (!(discriminant >= 0)) return [];
  const q = -(B + (B < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2;
  return insideRange([C / q, q / (A - value)], fittedBetween);
}

/**
 * Writes the design row in the centred basis, (1, u, u^2) with u = T0/T - 1, at position `at` of `row`.
 *
 * @param temperatureK T, K
 * @param centreK T0, K
 */
export function writeDesignRow(row: Float64Array, at: number, temperatureK: number, centreK: number): void {
  const u = (centreK - temperatureK) / temperatureK;
  row[at] = 1;
  row[at + 1] = u;
  row[at + 2] = u * u;
}

/** Writes the derivative of the design row with respect to T (1/K), -T0/T^2 (0, 1, 2 u), at position `at` of `row`. */
export function writeSlopeRow(row: Float64Array, at: number, temperatureK: number, centreK: number): void {
  const du = -centreK / (temperatureK * temperatureK);
  row[at] = 0;
  row[at + 1] = du;
  row[at + 2] = (2 * du * (centreK - temperatureK)) / temperatureK;
}

/**
 * Matrix M (3 x 3, row-major) with (A, B, C) = M (a, b, c) for ln x = a + b u + c u^2, u = T0/T - 1:
 * A = a - b + c, B = T0 (b - 2 c), C = T0^2 c.
 *
 * @param centreK T0, K
 */
export function publishedFromCentred(centreK: number): Float64Array {
  return Float64Array.of(1, -1, 1, 0, centreK, -2 * centreK, 0, 0, centreK * centreK);
}
