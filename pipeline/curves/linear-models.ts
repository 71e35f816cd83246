import type { CurveModel } from "../records/fits.ts";
import * as constant from "./constant.ts";
import * as modifiedApelblat from "./modified-apelblat.ts";
import * as quadratic from "./quadratic.ts";
import * as vanTHoff from "./van-t-hoff.ts";

/** A model that is linear in its coefficients, as a fit sees it. */
export interface LinearModel {
  readonly name: CurveModel;
  /** Names of the published coefficients. */
  readonly coefficientNames: readonly string[];
  readonly parameterCount: number;
  /** Writes the centred design row at a temperature (K) for a centre T0 (K). */
  readonly writeDesignRow: (row: Float64Array, at: number, temperatureK: number, centreK: number) => void;
  /** Writes the derivative of that row with respect to T, 1/K. */
  readonly writeSlopeRow: (row: Float64Array, at: number, temperatureK: number, centreK: number) => void;
  /** Matrix that turns centred into published coefficients, row-major. */
  readonly publishedFromCentred: (centreK: number) => Float64Array;
}

/** ln x = A. */
export const CONSTANT: LinearModel = { name: "constant", coefficientNames: ["A"], ...constant };
/** ln x = A + B/T. */
export const VAN_T_HOFF: LinearModel = { name: "van 't Hoff", coefficientNames: ["A", "B"], ...vanTHoff };
/** ln x = A + B/T + C ln T. */
export const MODIFIED_APELBLAT: LinearModel = {
  name: "modified Apelblat",
  coefficientNames: ["A", "B", "C"],
  ...modifiedApelblat,
};
/** ln x = A + B/T + C/T^2. */
export const QUADRATIC: LinearModel = { name: "quadratic in 1/T", coefficientNames: ["A", "B", "C"], ...quadratic };

/** Scratch of the functions below, none of which calls another. */
const row = new Float64Array(3);

/**
 * Writes the p columns of the centred design, n values each, over the first values of `columns`.
 *
 * @param temperatureK T of at least n points, K
 * @param centreK T0, K
 */
export function setDesignColumns(
  columns: readonly Float64Array[],
  model: LinearModel,
  temperatureK: Float64Array,
  n: number,
  centreK: number,
): void {
  for (let i = 0; i < n; i++) {
    model.writeDesignRow(row, 0, temperatureK[i]!, centreK);
    for (let j = 0; j < model.parameterCount; j++) columns[j]![i] = row[j]!;
  }
}

/** ln value at T (K) from centred coefficients: keeps all digits where A, B/T and C ln T nearly cancel. */
export function centredValue(
  model: LinearModel,
  coefficients: ArrayLike<number>,
  temperatureK: number,
  centreK: number,
): number {
  model.writeDesignRow(row, 0, temperatureK, centreK);
  return product(coefficients, model.parameterCount);
}

/** d ln value/dT (1/K) at T (K) from centred coefficients. */
export function centredSlope(
  model: LinearModel,
  coefficients: ArrayLike<number>,
  temperatureK: number,
  centreK: number,
): number {
  model.writeSlopeRow(row, 0, temperatureK, centreK);
  return product(coefficients, model.parameterCount);
}

function product(coefficients: ArrayLike<number>, p: number): number {
  let sum = 0;
  for (let j = 0; j < p; j++) sum += row[j]! * coefficients[j]!;
  return sum;
}
