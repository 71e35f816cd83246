import { type FittedRange, requireInside } from "./fitted-range.ts";
import { temperaturesOfValue } from "./monotone-inverse.ts";

/**
 * The modified Apelblat equation of a saturated solution: ln x = A + B/T + C ln T
 *
 * - x  mole fraction of the solute [1] (or mass ratio, where no molar mass is known)
 * - T  thermodynamic temperature [K], its number under the logarithm
 * - A [1], B [K], C [1]  fitted with T in kelvin; R C is a constant heat capacity of dissolution
 *
 * Valid between the lowest and highest temperature fitted: B and C nearly cancel, so the curve soon leaves the data.
 * @see Apelblat and Manzurola, J. Chem. Thermodyn. 31 (1999) 85-91.
 */
export interface ModifiedApelblat {
  readonly A: number;
  readonly B: number;
  readonly C: number;
  readonly fittedBetween: FittedRange;
}

/** Number of coefficients. */
export const parameterCount = 3;

/** Distinct temperatures and span (K) below which three coefficients are not fitted: common practice. */
export const fewestTemperatures = 6;
export const smallestSpanK = 30;

/** |C| above which a curve carries a notice: R C would be a heat capacity of 500 J/(mol K); common practice. */
export const largestUsualC = 60;

/**
 * ln x at T (K) by ln x = A + B/T + C ln T.
 *
 * @throws RangeError if T lies outside `fittedBetween` or is not a number.
 * @example lnValue({ A: -100, B: 2000, C: 15, fittedBetween: [280, 340] }, 300) // -7.77660
 */
export function lnValue({ A, B, C, fittedBetween }: ModifiedApelblat, temperatureK: number): number {
  requireInside("modified Apelblat", temperatureK, fittedBetween);
  return A + B / temperatureK + C * Math.log(temperatureK);
}

/**
 * d ln x/dT = (C - B/T)/T, 1/K; zero at T = B/C.
 *
 * @throws RangeError if T (K) lies outside `fittedBetween` or is not a number.
 */
export function slope({ B, C, fittedBetween }: ModifiedApelblat, temperatureK: number): number {
  requireInside("modified Apelblat", temperatureK, fittedBetween);
  return (C - B / temperatureK) / temperatureK;
}

/** Temperatures (K) inside the fitted range at which ln x has the given value: none, one, or two about a turn. */
export function temperaturesAt(curve: ModifiedApelblat, value: number): number[] {
  return temperaturesOfValue((T) => lnValue(curve, T), value, curve.fittedBetween, [curve.B / curve.C]);
}

/**
 * Writes the design row in the centred basis, (1, u, u - ln(1 + u)) with u = T0/T - 1, at position `at` of `row`.
 *
 * The third column is ln(T/T0) less its straight part in 1/T. It is about u^2/2, so the three columns stay far from
 * collinear where 1, 1/T and ln T agree to four digits.
 *
 * @param temperatureK T, K
 * @param centreK T0, K
 */
export function writeDesignRow(row: Float64Array, at: number, temperatureK: number, centreK: number): void {
  const u = (centreK - temperatureK) / temperatureK;
  row[at] = 1;
  row[at + 1] = u;
  row[at + 2] = u - Math.log1p(u);
}

/** Writes the derivative of the design row with respect to T (1/K), -T0/T^2 (0, 1, u/(1 + u)), at `at` of `row`. */
export function writeSlopeRow(row: Float64Array, at: number, temperatureK: number, centreK: number): void {
  const du = -centreK / (temperatureK * temperatureK);
  row[at] = 0;
  row[at + 1] = du;
  row[at + 2] = (du * (centreK - temperatureK)) / centreK;
}

/**
 * Matrix M (3 x 3, row-major) with (A, B, C) = M (a, b, c) for ln x = a + b u + c (u - ln(1 + u)), u = T0/T - 1:
 * A = a - b - c (1 + ln T0), B = T0 (b + c), C = c.
 *
 * @param centreK T0, K
 */
export function publishedFromCentred(centreK: number): Float64Array {
  return Float64Array.of(1, -1, -1 - Math.log(centreK), 0, centreK, centreK, 0, 0, 1);
}
