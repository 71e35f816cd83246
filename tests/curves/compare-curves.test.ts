import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type ComparedCurve, commonRangeK, crossingOf, differenceAt } from "../../pipeline/curves/compare-curves.ts";

/** A straight line in 1/T through ln y = `at` at 300 K, of enthalpy over R `slope` (K), with constant limits. */
function line(
  ...[at, slope, half, range, sources = [0], sharedVariance = 0]: [
    at: number,
    slope: number,
    half: number,
    range: readonly [number, number],
    sources?: readonly number[],
    sharedVariance?: number,
  ]
): ComparedCurve {
  return {
    curve: {
      evaluate: (T) => {
        if (T < range[0] || T > range[1]) throw new RangeError("outside");
        return at + slope * (1 / 300 - 1 / T);
      },
      limits: () => ({ curve: half, newMeasurement: 2 * half }),
      temperatureRangeK: range,
      betweenSd: 0.02,
    },
    sources: new Set(sources),
    sharedVariance,
  };
}

describe("the difference of two curves", () => {
  test("has limits that add in squares where no source is common", () => {
    const [a, b] = [line(-4, 3000, 0.03, [280, 340], [0]), line(-4.2, 3200, 0.04, [280, 340], [1, 2])];
    const { lnRatio, half } = differenceAt(a, b, 300);
    expect(lnRatio).toBeCloseTo(0.2, 12);
    expect(half).toBeCloseTo(0.05, 12);
  });

  test("loses the offset of a source that measured both: 2 z^2 tau^2 m/(na nb) less", () => {
    const half = 0.06;
    const [a, b] = [line(-4, 3000, half, [280, 340], [7]), line(-4.2, 3200, half, [280, 340], [7])];
    expect(differenceAt(a, b, 300).half ** 2).toBeCloseTo(2 * half ** 2 - 2 * 1.959964 ** 2 * 0.02 ** 2, 8);
    const [e, f] = [line(-4, 3000, 0.2, [280, 340], [7], 0.01), line(-4, 3000, 0.2, [280, 340], [7], 0.008)];
    expect(differenceAt(e, f, 300).half ** 2).toBeCloseTo(2 * 0.2 ** 2 - 2 * 1.959964 ** 2 * (0.02 ** 2 + 0.008), 8);
    const [c, d] = [line(-4, 3000, half, [280, 340], [1, 2]), line(-4.2, 3200, half, [280, 340], [2, 3])];
    expect(differenceAt(c, d, 300).half ** 2).toBeCloseTo(2 * half ** 2 - (2 * 1.959964 ** 2 * 0.02 ** 2) / 4, 8);
  });

  test("keeps some width even where all of it would cancel", () => {
    const [a, b] = [line(-4, 3000, 0.001, [280, 340], [7]), line(-4.2, 3200, 0.001, [280, 340], [7])];
    expect(differenceAt(a, b, 300).half).toBeGreaterThan(0);
  });

  test("is nobody's guess outside the common range", () => {
    const [a, b] = [line(-4, 3000, 0.03, [280, 300]), line(-4, 3000, 0.03, [310, 340])];
    expect(commonRangeK(a, b)).toBeUndefined();
    expect(crossingOf(a, b)).toBeUndefined();
    expect(() => differenceAt(a, b, 305)).toThrow(RangeError);
    expect(commonRangeK(a, line(-4, 1, 0.03, [300, 340]))).toEqual([300, 300]);
  });
});

describe("the crossing of two curves", () => {
  test("lies where they are equal, with the limits that the algebra gives", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 295, max: 325, noNaN: true }),
        fc.double({ min: 500, max: 3000, noNaN: true }),
        fc.double({ min: 0.002, max: 0.02, noNaN: true }),
        (T, difference, half) => {
          // b is steeper and equals a at T: b lies lower in the cold.
          const a = line(-4, 3000, half, [280, 340], [0]);
          const b = line(-4 + difference * (1 / T - 1 / 300), 3000 + difference, half, [280, 340], [1]);
          const crossing = crossingOf(a, b);
          const reach = (Math.SQRT2 * half) / difference;
          const limit = (shift: number) => 1 / (1 / T + shift);
          expect(crossing?.temperatureK).toBeCloseTo(T, 6);
          expect(crossing?.firstLowerWhenCold).toBe(false);
          const [low, high] = [limit(reach), limit(-reach)];
          if (low > 280) expect(crossing?.lowK).toBeCloseTo(low, 6);
          else expect(crossing?.lowK).toBeNaN();
          if (high < 340) expect(crossing?.highK).toBeCloseTo(high, 6);
          else expect(crossing?.highK).toBeNaN();
        },
      ),
      { numRuns: 200 },
    );
  });

  test("does not depend on which curve is named first", () => {
    const [a, b] = [line(-4, 3000, 0.01, [280, 340]), line(-4.01, 4200, 0.015, [285, 335], [1])];
    const [one, other] = [crossingOf(a, b), crossingOf(b, a)];
    expect(other).toEqual({ ...one, firstLowerWhenCold: !one?.firstLowerWhenCold });
  });

  test("is not claimed where the limits settle the order on neither side, or where there is none", () => {
    expect(crossingOf(line(-4, 3000, 0.3, [280, 340]), line(-4, 3200, 0.3, [280, 340], [1]))).toBeUndefined();
    expect(crossingOf(line(-4, 3000, 0.01, [280, 340]), line(-5, 3200, 0.01, [280, 340], [1]))).toBeUndefined();
    expect(crossingOf(line(-4, 3000, 0.01, [300, 300]), line(-4, 3200, 0.01, [280, 340], [1]))).toBeUndefined();
  });
});
