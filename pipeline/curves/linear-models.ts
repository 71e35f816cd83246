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

/** The p columns of the centred design, n values each. */
export function designColumns(model: LinearModel, temperatureK: Float64Array, centreK: number): Float64Array[] {
  const p = model.parameterCount;
  const row = new Float64Array(p);
  const columns = Array.from({ length: p }, () => new Float64Array(temperatureK.length));
  for (let i = 0; i < temperatureK.length; i++) {
    model.writeDesignRow(row, 0, temperatureK[i] as number, centreK);
    for (let j = 0; j < p; j++) (columns[j] as Float64Array)[i] = row[j] as number;
  }
  return columns;
}

/** ln value at T (K) from centred coefficients: keeps all digits where A, B/T and C ln T nearly cancel. */
export function centredValue(
  model: LinearModel,
  coefficients: Float64Array,
  temperatureK: number,
  centreK: number,
): number {
  const row = new Float64Array(model.parameterCount);
  model.writeDesignRow(row, 0, temperatureK, centreK);
  return product(row, coefficients);
}

/** d ln value/dT (1/K) at T (K) from centred coefficients. */
export function centredSlope(
  model: LinearModel,
  coefficients: Float64Array,
  temperatureK: number,
  centreK: number,
): number {
  const row = new Float64Array(model.parameterCount);
  model.writeSlopeRow(row, 0, temperatureK, centreK);
  return product(row, coefficients);
}

function product(row: Float64Array, coefficients: Float64Array): number {
  let sum = 0;
  for (let j = 0; j < row.length; j++) sum += (row[j] as number) * (coefficients[j] as number);
  return sum;
}
