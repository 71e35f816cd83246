import type { CurveModel } from "../records/fits.ts";
import * as constant from "./constant.ts";
import type { FittedRange } from "./fitted-range.ts";
import * as lambdaH from "./lambda-h.ts";
import * as modifiedApelblat from "./modified-apelblat.ts";
import * as quadratic from "./quadratic.ts";
import * as vanTHoff from "./van-t-hoff.ts";

/** A curve as a table gives it: model, coefficients in the published form, range. */
export interface PublishedCurve {
  readonly model: CurveModel;
  readonly coefficients: readonly { readonly name: string; readonly value: number }[];
  readonly temperatureRangeK: FittedRange;
}

/** What can be asked of a curve inside its range. */
export interface CurveFunctions {
  /** ln value at T (K). @throws RangeError outside the fitted range. */
  readonly lnValue: (temperatureK: number) => number;
  /** d ln value/dT, 1/K; NaN for a constant. @throws RangeError outside the fitted range. */
  readonly slope: (temperatureK: number) => number;
  /** Temperatures (K) inside the range at which ln value is as given, ascending: none, one or two. */
  readonly temperaturesAt: (lnValue: number) => number[];
}

/**
 * Evaluation, slope and inverse of a curve from its published coefficients alone.
 *
 * Names of the coefficients: A; A, B; A, B, C; lambda, h, Tm. In double precision B and C cancel to about 1e-13 in ln x.
 * @throws RangeError if a coefficient of the model is missing.
 */
export function curveFunctions(curve: PublishedCurve): CurveFunctions {
  const fittedBetween = curve.temperatureRangeK;
  const coefficient = (name: string): number => {
    const found = curve.coefficients.find((c) => c.name === name);
    if (found === undefined) throw new RangeError(`${curve.model}: the coefficient ${name} is missing`);
    return found.value;
  };
  switch (curve.model) {
    case "constant":
      return functionsOf(constant, { A: coefficient("A"), fittedBetween });
    case "van 't Hoff":
      return functionsOf(vanTHoff, { A: coefficient("A"), B: coefficient("B"), fittedBetween });
    case "modified Apelblat":
      return functionsOf(modifiedApelblat, threeCoefficients(coefficient, fittedBetween));
    case "quadratic in 1/T":
      return functionsOf(quadratic, threeCoefficients(coefficient, fittedBetween));
    case "Buchowski-Ksiazczak lambda-h":
      return functionsOf(lambdaH, {
        lambda: coefficient("lambda"),
        h: coefficient("h"),
        meltingPointK: coefficient("Tm"),
        fittedBetween,
      });
  }
}

interface ModelModule<Parameters> {
  readonly lnValue: (parameters: Parameters, temperatureK: number) => number;
  readonly slope: (parameters: Parameters, temperatureK: number) => number;
  readonly temperaturesAt: (parameters: Parameters, lnValue: number) => number[];
}

function functionsOf<Parameters>(model: ModelModule<Parameters>, parameters: Parameters): CurveFunctions {
  return {
    lnValue: (T) => model.lnValue(parameters, T),
    slope: (T) => model.slope(parameters, T),
    temperaturesAt: (value) => model.temperaturesAt(parameters, value),
  };
}

function threeCoefficients(coefficient: (name: string) => number, fittedBetween: FittedRange) {
  return { A: coefficient("A"), B: coefficient("B"), C: coefficient("C"), fittedBetween };
}
