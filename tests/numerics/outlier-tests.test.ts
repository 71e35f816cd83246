import { describe, expect, test } from "vitest";
import {
  cochranCritical,
  cochranTest,
  generalizedEsd,
  grubbsCritical,
  grubbsTest,
} from "../../pipeline/numerics/outlier-tests.ts";
import { referenceValues, relativeError, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

/** Rosner, Technometrics 25 (1983) 165-172; NIST/SEMATECH e-Handbook 1.3.5.17.3. */
const rosner = [
  -0.25, 0.68, 0.94, 1.15, 1.2, 1.26, 1.26, 1.34, 1.38, 1.43, 1.49, 1.49, 1.55, 1.56, 1.58, 1.65, 1.69, 1.7, 1.76, 1.77,
  1.81, 1.91, 1.94, 1.96, 1.99, 2.06, 2.09, 2.1, 2.14, 2.15, 2.23, 2.24, 2.26, 2.35, 2.37, 2.4, 2.47, 2.54, 2.62, 2.64,
  2.9, 2.92, 2.92, 2.93, 3.21, 3.26, 3.3, 3.59, 3.68, 4.3, 4.64, 5.34, 5.42, 6.01,
];

describe("generalized ESD", () => {
  test("finds three outliers among Rosner's 54 values, though the first two steps alone do not reject", () => {
    const { steps, outliers } = generalizedEsd(rosner, 10, 0.05);
    expect(outliers).toBe(3);
    expect(steps.slice(0, 4).map(({ isOutlier }) => isOutlier)).toEqual([false, false, true, false]);
    expect(steps.map(({ value }) => value)).toEqual([6.01, 5.42, 5.34, 4.64, -0.25, 4.3, 3.68, 3.59, 0.68, 3.3]);
    expect(steps.slice(0, 3).map(({ index }) => index)).toEqual([53, 52, 51]);
    // The handbook prints three decimals and truncates.
    const printed = (x: number) => Math.floor(1000 * x) / 1000;
    expect(steps.map(({ statistic }) => printed(statistic))).toEqual([
      3.118, 2.942, 3.179, 2.81, 2.815, 2.848, 2.279, 2.31, 2.101, 2.067,
    ]);
    expect(steps.map(({ critical }) => printed(critical))).toEqual([
      3.158, 3.151, 3.143, 3.136, 3.128, 3.12, 3.111, 3.103, 3.094, 3.085,
    ]);
  });

  test("finds none where all values agree", () => {
    const { steps, outliers } = generalizedEsd([2, 2, 2, 2, 2], 2, 0.05);
    expect(outliers).toBe(0);
    expect(steps.map(({ statistic }) => statistic)).toEqual([0, 0]);
  });

  test("refuses to remove so many that two are not left, and values that are not finite", () => {
    expect(() => generalizedEsd([1, 2, 3, 4], 3, 0.05)).toThrow(/at most 2/);
    expect(() => generalizedEsd([1, 2, Number.NaN, 4], 1, 0.05)).toThrow(/NaN/);
  });
});

describe("Grubbs' test", () => {
  /** Tietjen and Moore, Technometrics 14 (1972) 583-597; e-Handbook 1.3.5.17.1: G 2.4687, critical value 2.032. */
  const masses = [199.31, 199.53, 200.19, 200.82, 201.92, 201.95, 202.18, 245.57];

  test("rejects the largest of eight mass spectrometer values", () => {
    const { statistic, critical, index, isOutlier } = grubbsTest(masses, 0.05, "maximum");
    expect(relativeError(statistic, 2.46876461121245)).toBeLessThan(1e-12);
    expect(relativeError(critical, 2.031652001549952)).toBeLessThan(1e-11);
    expect([index, isOutlier]).toEqual([7, true]);
    expect(grubbsTest(masses, 0.05, "minimum").isOutlier).toBe(false);
  });

  // ISO 5725-2:1994, table 5, two-sided, 1 % and 5 % (from memory, not verified; they agree to the third decimal).
  test.each([
    [3, 1.155, 1.155],
    [5, 1.764, 1.715],
    [8, 2.274, 2.126],
    [10, 2.482, 2.29],
  ])("has the tabulated critical values for %s values", (n, onePercent, fivePercent) => {
    expect(Math.abs(grubbsCritical(n, 0.01) - onePercent)).toBeLessThan(0.001);
    expect(Math.abs(grubbsCritical(n, 0.05) - fivePercent)).toBeLessThan(0.001);
  });

  test("needs three values and a level between 0 and 1", () => {
    expect(() => grubbsTest([1, 2], 0.05)).toThrow(/at least 3/);
    expect(() => grubbsCritical(5, 0)).toThrow(/alpha/);
    expect(() => grubbsCritical(2, 0.05)).toThrow(RangeError);
  });
});

describe("Cochran's test", () => {
  // NMS Chemical and Biological Metrology, Cochran test, 95 % table.
  test.each([
    [2, 2, 0.998],
    [3, 3, 0.871],
    [5, 4, 0.598],
    [9, 2, 0.638],
    [20, 5, 0.192],
  ])("has the tabulated 5 %% value for %s groups of %s", (groups, replicates, published) => {
    expect(Math.abs(cochranCritical(groups, replicates, 0.05) - published)).toBeLessThan(0.001);
  });

  test("calls laboratory 4 of the apricot study a straggler: outside 5 %, inside 1 %", () => {
    // Li and Cardozo, J. AOAC Int. 77 (1994) 687-689, nine laboratories in duplicate.
    const variances = [
      0.374766594, 0.6151828996, 0.3535533906, 1.8526197667, 0.6081118318, 0.2121320344, 0.3676955262, 0.0919238816,
      0.0848528137,
    ].map((sd) => sd ** 2);
    const strict = cochranTest(variances, 2, 0.05);
    expect(strict.statistic).toBeCloseTo(0.7394194, 7);
    expect([strict.index, strict.isOutlier, cochranTest(variances, 2, 0.01).isOutlier]).toEqual([3, true, false]);
  });

  test("has nothing to say of variances that are all 0, and refuses negative ones", () => {
    expect(cochranTest([0, 0, 0], 3, 0.05)).toMatchObject({ statistic: 0, isOutlier: false });
    expect(() => cochranTest([1, -1], 3, 0.05)).toThrow(/variance 1/);
    expect(() => cochranTest([1], 3, 0.05)).toThrow(/1 groups/);
  });
});

interface GrubbsRow {
  n: number;
  one_sided_5pct: number;
  one_sided_1pct: number;
  two_sided_5pct: number;
  two_sided_1pct: number;
}
interface CochranRow {
  groups: number;
  formula_5pct: number[];
  formula_1pct: number[];
}
const collection = referenceValues<{ tables: { name: string; rows: unknown[] }[] }>("04-outlier-tests.json");
const rowsOf = <Row>(name: string) => collection!.tables.find((table) => table.name === name)!.rows as Row[];

test.skipIf(!collection)(`the tables of critical values agree to 1e-8 ${SKIPPED_WHERE_ABSENT}`, () => {
  for (const row of rowsOf<GrubbsRow>("Grubbs critical values")) {
    expect(relativeError(grubbsCritical(row.n, 0.05, "maximum"), row.one_sided_5pct)).toBeLessThan(1e-8);
    expect(relativeError(grubbsCritical(row.n, 0.01, "minimum"), row.one_sided_1pct)).toBeLessThan(1e-8);
    expect(relativeError(grubbsCritical(row.n, 0.05), row.two_sided_5pct)).toBeLessThan(1e-8);
    expect(relativeError(grubbsCritical(row.n, 0.01), row.two_sided_1pct)).toBeLessThan(1e-8);
  }
  for (const { groups, formula_5pct, formula_1pct } of rowsOf<CochranRow>("Cochran C critical values")) {
    [2, 3, 4, 5].forEach((replicates, i) => {
      expect(relativeError(cochranCritical(groups, replicates, 0.05), formula_5pct[i]!)).toBeLessThan(1e-8);
      expect(relativeError(cochranCritical(groups, replicates, 0.01), formula_1pct[i]!)).toBeLessThan(1e-8);
    });
  }
});
