import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  chiSquareCdf,
  chiSquareQuantile,
  chiSquareSurvival,
  fCdf,
  fQuantile,
  fSurvival,
  normalCdf,
  normalQuantile,
  normalSurvival,
  studentTCdf,
  studentTQuantile,
  studentTSurvival,
} from "../../pipeline/numerics/distributions.ts";
import { referenceValues, relativeError, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

type Row = readonly [string, number, number | null, number | null, number];

function quantile([law, p, df1, df2]: Row): number {
  if (law === "normal") return normalQuantile(p);
  if (law === "t") return studentTQuantile(p, df1!);
  if (law === "chi2") return chiSquareQuantile(p, df1!);
  return fQuantile(p, df1!, df2!);
}

function tails(law: string, x: number, df1: number | null, df2: number | null): [number, number] {
  if (law === "normal") return [normalCdf(x), normalSurvival(x)];
  if (law === "t") return [studentTCdf(x, df1!), studentTSurvival(x, df1!)];
  if (law === "chi2") return [chiSquareCdf(x, df1!), chiSquareSurvival(x, df1!)];
  return [fCdf(x, df1!, df2!), fSurvival(x, df1!, df2!)];
}

// Computed with mpmath at 40 digits; the quantile is that of the double nearest the probability.
const quantiles: readonly Row[] = [
  ["normal", 0.975, null, null, 1.95996398454005],
  ["normal", 0.999999999, null, null, 5.99780701960164],
  ["normal", 1e-300, null, null, -37.0470962993612],
  ["t", 0.975, 1, null, 12.7062047361747],
  ["t", 0.975, 3, null, 3.18244630528371],
  ["t", 0.975, 10, null, 2.22813885198627],
  ["t", 0.975, 60, null, 2.00029782201426],
  ["t", 0.6, 5, null, 0.267180865704145],
  ["t", 0.99999999, 1, null, 31830988.458436],
];

// As above; lower and upper tail at x.
const tailRows: readonly (readonly [string, number, number | null, number | null, number, number])[] = [
  ["normal", 37.5, null, null, 1, 4.60535300958195e-308],
  ["normal", -1.5, null, null, 0.0668072012688581, 0.933192798731142],
  ["t", 40, 3, null, 0.999982809659605, 1.71903403945793e-5],
  ["t", 10, 50, null, 0.99999999999992, 8.03866734416772e-14],
  ["chi2", 3.84, 1, null, 0.949956478751295, 0.0500435212487051],
  ["chi2", 1e-6, 4, null, 1.24999958333341e-13, 0.999999999999875],
  ["chi2", 1000, 10, null, 1, 1.87029072091595e-208],
  ["f", 4, 1, 10, 0.92661196522926, 0.0733880347707404],
  ["f", 1000, 2, 20, 1, 9.05286954692983e-21],
  ["f", 3.5, 4, 7.5, 0.933682404288002, 0.066317595711998],
];

describe("values computed in 40 digits", () => {
  test.each(quantiles)("the %s quantile at %s (%s, %s) is %s to 1e-12", (...row) => {
    expect(relativeError(quantile(row), row[4])).toBeLessThan(1e-12);
  });

  test.each(tailRows)("the %s law at %s (%s, %s) has tails %s and %s to 1e-12", (law, x, df1, df2, lower, upper) => {
    const [low, high] = tails(law, x, df1, df2);
    expect(relativeError(low, lower)).toBeLessThan(1e-12);
    expect(relativeError(high, upper)).toBeLessThan(1e-12);
  });

  interface Collection {
    quantiles: Row[];
    tails: [string, number, number | null, number | null, number, number][];
  }
  const collection = referenceValues<Collection>("12-distributions.json");

  test.skipIf(!collection)(`all 344 quantiles and 31 pairs of tails agree to 1e-12 ${SKIPPED_WHERE_ABSENT}`, () => {
    for (const row of collection!.quantiles)
      expect(relativeError(quantile(row), row[4]), row.join()).toBeLessThan(1e-12);
    for (const row of collection!.tails) {
      const [law, x, df1, df2, lower, upper] = row;
      const [low, high] = tails(law, x, df1, df2);
      expect(relativeError(low, lower), row.join()).toBeLessThan(1e-12);
      expect(relativeError(high, upper), row.join()).toBeLessThan(1e-12);
    }
  });
});

describe("closed forms", () => {
  const real = (min: number, max: number) => fc.double({ min, max, noNaN: true });

  test("t with 1 degree of freedom is the Cauchy law, with 2 algebraic", () => {
    fc.assert(
      fc.property(real(-50, 50), (t) => {
        expect(studentTCdf(t, 1)).toBeCloseTo(0.5 + Math.atan(t) / Math.PI, 13);
        expect(studentTCdf(t, 2)).toBeCloseTo(0.5 + t / (2 * Math.sqrt(2 + t * t)), 13);
      }),
    );
  });

  test("chi-square with 2 degrees of freedom is exponential", () => {
    fc.assert(
      fc.property(real(1e-6, 1000), (x) => {
        expect(relativeError(chiSquareSurvival(x, 2), Math.exp(-x / 2))).toBeLessThan(1e-12);
        expect(relativeError(chiSquareCdf(x, 2), -Math.expm1(-x / 2))).toBeLessThan(1e-12);
      }),
    );
  });
});

describe("relations", () => {
  const probability = fc.double({ min: 1e-12, max: 1 - 1e-12, noNaN: true });
  const degrees = fc.oneof(fc.integer({ min: 1, max: 300 }), fc.double({ min: 0.5, max: 50, noNaN: true }));

  test("each quantile inverts its distribution function", () => {
    fc.assert(
      fc.property(probability, degrees, degrees, (p, df1, df2) => {
        expect(relativeError(normalCdf(normalQuantile(p)), p)).toBeLessThan(1e-11);
        expect(relativeError(studentTCdf(studentTQuantile(p, df1), df1), p)).toBeLessThan(1e-11);
        expect(relativeError(chiSquareCdf(chiSquareQuantile(p, df1), df1), p)).toBeLessThan(1e-11);
        expect(relativeError(fCdf(fQuantile(p, df1, df2), df1, df2), p)).toBeLessThan(1e-11);
      }),
    );
  });

  test("the upper F quantile is the reciprocal of the lower one with the degrees of freedom exchanged", () => {
    expect(relativeError(fQuantile(0.975, 3, 8), 1 / fQuantile(0.025, 8, 3))).toBeLessThan(1e-13);
  });

  test("the square of a t quantile is an F quantile, and t tends to the normal law", () => {
    expect(relativeError(studentTQuantile(0.975, 7) ** 2, fQuantile(0.95, 1, 7))).toBeLessThan(1e-12);
    expect(studentTQuantile(0.975, Infinity)).toBe(normalQuantile(0.975));
    expect(studentTQuantile(0.975, 1e9)).toBeCloseTo(normalQuantile(0.975), 8);
    expect(studentTSurvival(2, Infinity)).toBe(normalSurvival(2));
  });

  test("a quantile just beside the middle keeps its digits", () => {
    const p = 0.5 + 2 ** -40;
    expect(relativeError(normalQuantile(p), 2 ** -40 * Math.sqrt(2 * Math.PI))).toBeLessThan(1e-12);
  });
});

describe("ends and wrong arguments", () => {
  test("probability 0 and 1 give the ends of the support", () => {
    expect([normalQuantile(0), normalQuantile(0.5), normalQuantile(1)]).toEqual([-Infinity, 0, Infinity]);
    expect([studentTQuantile(0, 3), studentTQuantile(1, 3)]).toEqual([-Infinity, Infinity]);
    expect([chiSquareQuantile(0, 3), fQuantile(1, 2, 3)]).toEqual([0, Infinity]);
  });

  test("infinite and negative arguments give 0 or 1", () => {
    expect([normalCdf(-Infinity), normalCdf(Infinity), studentTCdf(-Infinity, 3), studentTCdf(Infinity, 3)]).toEqual([
      0, 1, 0, 1,
    ]);
    expect([chiSquareCdf(-1, 2), chiSquareSurvival(-1, 2), chiSquareSurvival(Infinity, 2)]).toEqual([0, 1, 0]);
    expect([fCdf(-1, 2, 3), fSurvival(0, 2, 3), fCdf(Infinity, 2, 3), fSurvival(Infinity, 2, 3)]).toEqual([0, 1, 1, 0]);
  });

  test("what has no answer is refused with the reason", () => {
    expect(() => studentTQuantile(0.9, 0)).toThrow("Student t: degrees of freedom must be positive, not 0");
    expect(() => chiSquareCdf(1, Number.NaN)).toThrow(RangeError);
    expect(() => fSurvival(1, 2, -1)).toThrow(/F: degrees/);
    expect(() => normalQuantile(1.1)).toThrow(/between 0 and 1/);
    expect(() => studentTCdf(Number.NaN, 3)).toThrow(/NaN/);
    expect(() => chiSquareQuantile(1e-300, 0.1)).toThrow(/outside/);
  });
});
