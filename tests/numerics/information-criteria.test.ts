import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  informationCriteria,
  leaveOneOutResiduals,
  predictedResidualSumOfSquares,
} from "../../pipeline/numerics/information-criteria.ts";
import { leastSquares } from "../../pipeline/numerics/least-squares.ts";
import { referenceValues, relativeError, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

/** Vapour pressure of mercury; R datasets::pressure from 20 C on, Weast, CRC Handbook (1973). */
const celsius = [20, 40, 60, 80, 100, 120, 140, 160, 180, 200, 220, 240, 260, 280, 300, 320, 340, 360];
const mmHg = [0.0012, 0.006, 0.03, 0.09, 0.27, 0.75, 1.85, 4.2, 8.8, 17.3, 32.1, 57, 96, 157, 247, 376, 558, 806];

const powers = (p: number) => celsius.map((t) => [1, 300 / (t + 273.15), Math.log((t + 273.15) / 300), t].slice(0, p));

function criteria(rows: number[][], response: number[]) {
  const [n, p] = [rows.length, rows[0]!.length];
  const solved = leastSquares(Float64Array.from(rows.flat()), Float64Array.from(response), n, p);
  return {
    ...informationCriteria(solved.residualSumOfSquares, n, p),
    press: predictedResidualSumOfSquares(solved.residuals, solved.leverages),
  };
}

describe("models of ln p of mercury against R 4.2.2", () => {
  // AICc, BIC, PRESS for a + b/T, + c ln T, + d T.
  test.each([
    [2, -51.9177074129, -50.9608778535, 0.0586394669284],
    [3, -55.6736835996, -55.1891196449, 0.0407752343642],
    [4, -53.1520549931, -53.7001962036, 0.0410019018735],
  ])("with %s coefficients", (p, aicc, bic, press) => {
    const found = criteria(powers(p), mmHg.map(Math.log));
    expect(found.aicc).toBeCloseTo(aicc, 8);
    expect(found.bic).toBeCloseTo(bic, 8);
    expect(relativeError(found.press, press)).toBeLessThan(1e-8);
  });
});

interface Model {
  n: number;
  p: number;
  rss: number;
  logLik: number;
  AIC: number;
  AICc: number;
  BIC: number;
}
const collection =
  referenceValues<Record<"mtcars" | "pressure", { models: Record<string, Model> }>>("10-model-selection.json");

test.skipIf(!collection)(`all models of both data sets agree with R ${SKIPPED_WHERE_ABSENT}`, () => {
  for (const { models } of [collection!.mtcars, collection!.pressure]) {
    for (const [name, model] of Object.entries(models)) {
      const found = informationCriteria(model.rss, model.n, model.p);
      expect(found.logLikelihood, name).toBeCloseTo(model.logLik, 7);
      expect(found.aic, name).toBeCloseTo(model.AIC, 7);
      expect(found.aicc, name).toBeCloseTo(model.AICc, 7);
      expect(found.bic, name).toBeCloseTo(model.BIC, 7);
    }
  }
});

test("the leave-one-out residual is that of the fit without the row, with weights too", () => {
  const row = fc.record({
    x: fc.integer({ min: -50, max: 50 }),
    y: fc.double({ min: -9, max: 9, noNaN: true }),
    w: fc.double({ min: 0.1, max: 5, noNaN: true }),
  });
  fc.assert(
    fc.property(fc.uniqueArray(row, { selector: ({ x }) => x, minLength: 4, maxLength: 9 }), (rows) => {
      const fitTo = (list: typeof rows) =>
        leastSquares(
          Float64Array.from(list.flatMap(({ x }) => [1, x])),
          Float64Array.from(list, ({ y }) => y),
          list.length,
          2,
          Float64Array.from(list, ({ w }) => w),
        );
      const { residuals, leverages } = fitTo(rows);
      const left = leaveOneOutResiduals(residuals, leverages);
      let press = 0;
      rows.forEach(({ x, y, w }, i) => {
        const [a, b] = fitTo(rows.filter((_, k) => k !== i)).coefficients;
        expect(left[i]).toBeCloseTo(y - a! - b! * x, 7);
        press += w * (y - a! - b! * x) ** 2;
      });
      const weights = Float64Array.from(rows, ({ w }) => w);
      expect(relativeError(predictedResidualSumOfSquares(residuals, leverages, weights), press)).toBeLessThan(1e-7);
    }),
  );
});

describe("limits", () => {
  test("too few points for AICc, a perfect fit, and a point that stands alone", () => {
    expect(informationCriteria(1, 4, 2).aicc).toBe(Infinity);
    expect(informationCriteria(1, 5, 2).aicc).toBeLessThan(Infinity);
    expect(informationCriteria(0, 9, 2).aicc).toBe(-Infinity);
    expect(leaveOneOutResiduals(Float64Array.of(0), Float64Array.of(1))[0]).toBe(Infinity);
    expect(predictedResidualSumOfSquares(Float64Array.of(0, 1), Float64Array.of(1, 0.5))).toBe(Infinity);
    expect(predictedResidualSumOfSquares(Float64Array.of(0, 1), Float64Array.of(1, 0.5), Float64Array.of(0, 1))).toBe(
      4,
    );
  });

  test("a sum of squares that is negative or not finite is refused", () => {
    expect(() => informationCriteria(-1, 5, 2)).toThrow(RangeError);
    expect(() => informationCriteria(Number.NaN, 5, 2)).toThrow(RangeError);
    expect(() => informationCriteria(1, 0, 2)).toThrow(/0 rows/);
  });
});
