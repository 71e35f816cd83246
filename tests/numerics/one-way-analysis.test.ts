import { mean, sampleStandardDeviation } from "simple-statistics";
import { describe, expect, test } from "vitest";
import { oneWayAnalysis } from "../../pipeline/numerics/one-way-analysis.ts";
import { referenceValues, relativeError, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

describe("certified values of the NIST analysis of variance sets", () => {
  /** Simon and Lesage, Comput. Stat. Data Anal. 8 (1989) 325-332: nine groups of 21 about a large constant. */
  const simonLesage = (constant: number) =>
    [0.4, 0.3, 0.5, 0.3, 0.5, 0.3, 0.5, 0.3, 0.5].map((centre) => [
      constant + centre,
      ...Array.from({ length: 20 }, (_, i) => constant + centre + (i % 2 === 0 ? -0.1 : 0.1)),
    ]);

  test.each([
    [1, 1e-12],
    [1e6, 1e-9],
    [1e12, 1e-3], // 10^12 + 0.4 has four decimals in a double
  ])("values about %s give F = 21, 1.68 between and 1.8 within to a relative error of %s", (constant, tolerance) => {
    const { f, between, within, rSquared } = oneWayAnalysis(simonLesage(constant));
    expect(relativeError(between.sumOfSquares, 1.68)).toBeLessThan(tolerance);
    expect(relativeError(within.sumOfSquares, 1.8)).toBeLessThan(tolerance);
    expect(relativeError(f, 21)).toBeLessThan(tolerance);
    expect(relativeError(rSquared, 0.482758620689655)).toBeLessThan(tolerance);
    expect([between.degreesOfFreedom, within.degreesOfFreedom]).toEqual([8, 180]);
  });

  interface Pattern {
    first: number;
    then_repeat: number[];
    times: number;
  }
  interface Collection {
    univariate: {
      name: string;
      y?: number[];
      y_pattern?: Pattern;
      y_digits?: string;
      certified: { mean: number; sd: number };
    }[];
    anova: {
      name: string;
      groups?: Record<string, number[]>;
      groups_pattern?: Record<string, Pattern>;
      certified: { between: { sum_of_squares: number }; within: { sum_of_squares: number }; f: number };
    }[];
  }
  const collection = referenceValues<Collection>("03-nist-strd-univariate-anova.json");
  const spread = ({ first, then_repeat, times }: Pattern) => [
    first,
    ...Array.from({ length: times }, () => then_repeat).flat(),
  ];
  // Where the data of a set differ in late digits only, doubles hold just so many of those.
  const tolerances: Record<string, number> = {
    SmLs04: 1e-9,
    SmLs07: 1e-3,
    AtmWtAg: 1e-9,
    NumAcc3: 1e-9,
    NumAcc4: 1e-7,
  };

  test.skipIf(!collection)(`all seven analyses of variance agree ${SKIPPED_WHERE_ABSENT}`, () => {
    for (const { name, groups, groups_pattern, certified } of collection!.anova) {
      const values = groups ? Object.values(groups) : Object.values(groups_pattern!).map(spread);
      const { f, between, within } = oneWayAnalysis(values);
      const tolerance = tolerances[name] ?? 1e-12;
      expect(relativeError(f, certified.f), name).toBeLessThan(tolerance);
      expect(relativeError(between.sumOfSquares, certified.between.sum_of_squares), name).toBeLessThan(tolerance);
      expect(relativeError(within.sumOfSquares, certified.within.sum_of_squares), name).toBeLessThan(tolerance);
    }
  });

  test.skipIf(!collection)(
    `mean and SD of simple-statistics, used beside it, agree too ${SKIPPED_WHERE_ABSENT}`,
    () => {
      for (const { name, y, y_pattern, y_digits, certified } of collection!.univariate) {
        const values = y ?? (y_pattern ? spread(y_pattern) : [...y_digits!].map(Number));
        expect(relativeError(mean(values), certified.mean), name).toBeLessThan(1e-14);
        expect(relativeError(sampleStandardDeviation(values), certified.sd), name).toBeLessThan(
          tolerances[name] ?? 1e-12,
        );
      }
    },
  );
});

describe("small cases", () => {
  test("two groups give the square of Student's t", () => {
    // t = (3 - 1) / (s sqrt(1/2 + 1/2)), s^2 = (2 + 2) / 2: F = 2 with 1 and 2 degrees of freedom, P = 0.292893.
    const { f, probability } = oneWayAnalysis([
      [0, 2],
      [2, 4],
    ]);
    expect(f).toBeCloseTo(2, 14);
    expect(probability).toBeCloseTo(1 - Math.SQRT1_2, 12);
  });

  test("no scatter within gives F infinite and probability 0, no scatter at all neither", () => {
    expect(
      oneWayAnalysis([
        [1, 1],
        [2, 2],
      ]),
    ).toMatchObject({ f: Infinity, probability: 0 });
    expect(
      oneWayAnalysis([
        [1, 1],
        [1, 1],
      ]),
    ).toMatchObject({ f: Number.NaN, probability: Number.NaN });
  });

  test("one group, an empty one, groups of one value each and values that are not finite are refused", () => {
    expect(() => oneWayAnalysis([[1, 2]])).toThrow(/1 groups/);
    expect(() => oneWayAnalysis([[1, 2], []])).toThrow(/empty/);
    expect(() => oneWayAnalysis([[1], [2]])).toThrow(/repeat/);
    expect(() =>
      oneWayAnalysis([
        [1, 2],
        [Infinity, 2],
      ]),
    ).toThrow(/Infinity/);
  });
});
