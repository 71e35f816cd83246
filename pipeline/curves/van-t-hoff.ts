import { type FittedRange, insideRange, requireInside } from "./fitted-range.ts";

/**
 * The van 't Hoff equation of a saturated solution: ln x = A + B/T
 *
 * - x  mole fraction of the solute [1] (or mass ratio, where no molar mass is known)
 * - T  thermodynamic temperature [K]
 * - A [1], B [K]  fitted with T in kelvin; -R B is the apparent dissolution enthalpy, taken as constant
 *
 * Holds over a few tens of kelvin; any A and B are admissible (B above 0: solubility falls on heating).
 * @see Grant, Mehdizadeh, Chow and Fairbrother, Int. J. Pharm. 18 (1984) 25-38 (from memory, not verified).
 */
export interface VanTHoff {
  readonly A: number;
  readonly B: number;
  readonly fittedBetween: FittedRange;
}

/** Number of coefficients. */
export const parameterCount = 2;

/**
 * ln x at T (K) by ln x = A + B/T.
 *
 * @throws RangeError if T lies outside `fittedBetween` or is not a number.
 * @example lnValue({ A: 2.4988946, B: -1607.3229, fittedBetween: [293.15, 313.15] }, 303.15) // -2.803177
 */
export function lnValue({ A, B, fittedBetween }: VanTHoff, temperatureK: number): number {
  requireInside("van 't Hoff", temperatureK, fittedBetween);
  return A + B / temperatureK;
}

/**
 * d ln x/dT = -B/T^2, 1/K.
 *
 * @throws RangeError if T (K) lies outside `fittedBetween` or is not a number.
 */
export function slope({ B, fittedBetween }: VanTHoff, temperatureK: number): number {
  requireInside("van 't Hoff", temperatureK, fittedBetween);
  return -B / temperatureK ** 2;
}

/** Temperatures (K) inside the fitted range at which ln x has the given value: T = B/(ln x - A), one or none. */
export function temperaturesAt({ A, B, fittedBetween }: VanTHoff, lnValue: number): number[] {
  return insideRange([B / (lnValue - A)], fittedBetween);
}

/**
 * Writes the design row in the centred basis, (1, u) with u = T0/T - 1, at position `at` of `row`.
 *
 * @param temperatureK T, K
 * @param centreK T0, K; the harmonic mean temperature makes both columns orthogonal
 */
export function writeDesignRow(row: Float64Array, at: number, temperatureK: number, centreK: number): void {
  row[at] = 1;
  row[at + 1] = (centreK - temperatureK) / temperatureK;
}

/** Writes the derivative of the design row with respect to T (1/K), (0, -T0/T^2), at position `at` of `row`. */
export function writeSlopeRow(row: Float64Array, at: number, temperatureK: number, centreK: number): void {
  row[at] = 0;
  row[at + 1] = -centreK / (temperatureK * temperatureK);
}

/**
 * Matrix M (2 x 2, row-major) with (A, B) = M (a, b) for ln x = a + b u, u = T0/T - 1: A = a - b, B = T0 b.
 *
 * @param centreK T0, K
 */
export function publishedFromCentred(centreK: number): Float64Array {
  return Float64Array.of(1, -1, 0, centreK);
}
