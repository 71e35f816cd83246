import { expect, test } from "vitest";
import { transformCovariance } from "../../pipeline/curves/coefficient-transformation.ts";
import { publishedFromCentred } from "../../pipeline/curves/modified-apelblat.ts";
import { curveFunctions } from "../../pipeline/curves/published-curve-functions.ts";
import type { CurveModel } from "../../pipeline/records/fits.ts";

const temperatureRangeK = [280, 340] as const;

function curve(model: CurveModel, values: Readonly<Record<string, number>>) {
  const coefficients = Object.entries(values).map(([name, value]) => ({ name, value }));
  return curveFunctions({ model, coefficients, temperatureRangeK });
}

test("Every model is evaluated from its published coefficients by name", () => {
  expect(curve("constant", { A: -3 }).lnValue(300)).toBe(-3);
  expect(curve("van 't Hoff", { A: 2, B: -1500 }).lnValue(300)).toBe(-3);
  expect(curve("quadratic in 1/T", { A: 1, B: -3000, C: 90000 }).lnValue(300)).toBeCloseTo(-8, 14);
  expect(curve("modified Apelblat", { A: -100, B: 2000, C: 15 }).lnValue(300)).toBeCloseTo(-7.7766, 5);
  const lambdaH = curve("Buchowski-Ksiazczak lambda-h", { lambda: 1, h: 3000, Tm: 400 });
  expect(lambdaH.lnValue(300)).toBeCloseTo(-2.5, 13);
  expect(lambdaH.temperaturesAt(-2.5)[0]).toBeCloseTo(300, 9);
});

test("A missing coefficient is named", () => {
  expect(() => curve("Buchowski-Ksiazczak lambda-h", { lambda: 1, h: 3000 })).toThrow(/the coefficient Tm is missing/);
});

test("The covariance of published coefficients gives the variance of ln x that the centred one gives", () => {
  const T0 = 308;
  const centred = [4e-4, 1e-5, -2e-3, 1e-5, 3e-2, 0.1, -2e-3, 0.1, 40];
  const published = transformCovariance(publishedFromCentred(T0), centred, 3);
  for (const T of [280, 308, 340]) {
    const u = T0 / T - 1;
    const ofCentred = form(centred, [1, u, u - Math.log1p(u)]);
    expect(form(published, [1, 1 / T, Math.log(T)]) / ofCentred).toBeCloseTo(1, 6);
  }
});

function form(covariance: readonly number[], row: readonly number[]): number {
  let sum = 0;
  for (let i = 0; i < 3; i++)
    for (let j = 0; j < 3; j++) sum += (row[i] as number) * (covariance[3 * i + j] as number) * (row[j] as number);
  return sum;
}
