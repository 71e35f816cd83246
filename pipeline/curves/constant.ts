import { type FittedRange, requireInside } from "./fitted-range.ts";

/**
 * A solubility known at one temperature: ln x = A.
 *
 * A [1] is a consensus value; `fittedBetween` [K] holds the temperatures it was measured at, at most half a kelvin
 * apart, so that the change of solubility between them is small against the scatter.
 */
export interface Constant {
  readonly A: number;
  readonly fittedBetween: FittedRange;
}

/** Number of coefficients. */
export const parameterCount = 1;

/**
 * ln x at T: the consensus value itself.
 *
 * @throws RangeError if T (K) lies outside `fittedBetween`: one temperature says nothing about another.
 */
export function lnValue({ A, fittedBetween }: Constant, temperatureK: number): number {
  requireInside("constant", temperatureK, fittedBetween);
  return A;
}

/**
 * d ln x/dT, 1/K: not known from one temperature, hence NaN rather than a zero that would be believed.
 *
 * @throws RangeError if T (K) lies outside `fittedBetween`.
 */
export function slope({ fittedBetween }: Constant, temperatureK: number): number {
  requireInside("constant", temperatureK, fittedBetween);
  return Number.NaN;
}

/** Temperatures (K) of a given ln x: none, because one temperature fixes no temperature of saturation. */
export function temperaturesAt(_constant: Constant, _lnValue: number): number[] {
  return [];
}

/** Writes the design row of the model, (1), at position `at` of `row`. */
export function writeDesignRow(row: Float64Array, at: number, _temperatureK: number, _centreK: number): void {
  row[at] = 1;
}

/** Writes the derivative of the design row with respect to T: nothing is known of it, taken as 0. */
export function writeSlopeRow(row: Float64Array, at: number, _temperatureK: number, _centreK: number): void {
  row[at] = 0;
}

/** Matrix (1 x 1) that turns centred into published coefficients: the identity. */
export function publishedFromCentred(_centreK: number): Float64Array {
  return Float64Array.of(1);
}
