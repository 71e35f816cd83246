import { describe, expect, test } from "vitest";
import { interlaboratoryPrecision, mandelHCritical, mandelKCritical } from "../../pipeline/numerics/interlaboratory.ts";
import { referenceValues, relativeError, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

/** Glucose in serum, material A, eight laboratories in triplicate; ASTM E691-99, table 1. */
const glucoseA = [
  [41.03, 41.45, 41.37],
  [41.17, 42.0, 41.15],
  [41.01, 40.68, 42.66],
  [39.37, 42.37, 42.63],
  [41.88, 41.19, 41.32],
  [43.28, 40.5, 42.28],
  [41.08, 41.27, 39.02],
  [43.36, 42.65, 41.72],
];

describe("glucose in serum", () => {
  test("material A has the published mean 41.52 and s_r = s_R = 1.06", () => {
    const found = interlaboratoryPrecision(glucoseA);
    expect(found.grandMean).toBeCloseTo(41.51833333333333, 10);
    expect(found.repeatabilitySd).toBeCloseTo(1.0632242629536508, 10);
    expect(found.betweenVariance).toBe(0);
    expect(found.reproducibilitySd).toBe(found.repeatabilitySd);
    expect(found.sdOfMeans).toBeCloseTo(0.6061274422021115, 10);
  });

  test("material A has the h and k that the formulas of the practice give", () => {
    const { h, k } = interlaboratoryPrecision(glucoseA);
    const expectedH = [
      -0.3877072438, -0.1292357479, -0.1127375673, -0.1017387803, -0.0907399932, 0.8276587261, -1.751556839,
      1.7460574454,
    ];
    const expectedK = [
      0.2097485202, 0.4562323588, 0.9977213845, 1.7040396419, 0.3448487094, 1.3243859853, 1.1736107431, 0.7735486305,
    ];
    h.forEach((value, i) => {
      expect(value).toBeCloseTo(expectedH[i]!, 9);
      expect(k[i]).toBeCloseTo(expectedK[i]!, 9);
    });
  });

  test("the critical values of the practice for 8 laboratories in triplicate are 2.15 and 2.06 at 0.5 %", () => {
    expect(mandelHCritical(8, 0.005)).toBeCloseTo(2.15, 2);
    expect(mandelKCritical(8, 3, 0.005)).toBeCloseTo(2.06, 2);
  });
});

interface Precision {
  mean: number;
  s_xbar: number;
  s_r: number;
  s_L2: number;
  s_R: number;
  h: number[];
  k: number[];
}
interface GlucoseExample {
  data: { columns: string[]; rows: number[][] };
  expected: { computed: Record<string, Precision> };
}
interface Collection {
  examples: GlucoseExample[];
  tables: { rows: Record<string, number>[] }[];
}
const collection = referenceValues<Collection>("05-interlaboratory.json");

test.skipIf(!collection)(`all five glucose materials agree to 1e-9 ${SKIPPED_WHERE_ABSENT}`, () => {
  const { data, expected } = collection!.examples[0]!;
  data.columns.slice(1).forEach((material, column) => {
    const laboratories = Array.from({ length: 8 }, (_, lab) =>
      data.rows.filter((row) => row[0] === lab + 1).map((row) => row[column + 1]!),
    );
    const found = interlaboratoryPrecision(laboratories);
    const table = expected.computed[material]!;
    expect(relativeError(found.grandMean, table.mean)).toBeLessThan(1e-9);
    expect(relativeError(found.sdOfMeans, table.s_xbar)).toBeLessThan(1e-9);
    expect(relativeError(found.repeatabilitySd, table.s_r)).toBeLessThan(1e-9);
    expect(relativeError(found.betweenVariance, table.s_L2)).toBeLessThan(1e-9);
    expect(relativeError(found.reproducibilitySd, table.s_R)).toBeLessThan(1e-9);
    table.h.forEach((h, i) => {
      expect(found.h[i]).toBeCloseTo(h, 9);
      expect(found.k[i]).toBeCloseTo(table.k[i]!, 9);
    });
  });
});

test.skipIf(!collection)(`the table of critical h and k agrees to 1e-8 ${SKIPPED_WHERE_ABSENT}`, () => {
  for (const row of collection!.tables[0]!.rows) {
    for (const [column, alpha] of [
      ["5pct", 0.05],
      ["1pct", 0.01],
      ["0p5pct", 0.005],
    ] as const) {
      expect(relativeError(mandelHCritical(row.p!, alpha), row[`h_${column}`]!)).toBeLessThan(1e-8);
      for (const n of [2, 3, 4, 5]) {
        expect(relativeError(mandelKCritical(row.p!, n, alpha), row[`k_n${n}_${column}`]!)).toBeLessThan(1e-8);
      }
    }
  }
});

describe("unusual designs", () => {
  test("laboratories that agree to the last digit have h and k of 0", () => {
    expect(
      interlaboratoryPrecision([
        [2, 2],
        [2, 2],
      ]),
    ).toMatchObject({ h: [0, 0], k: [0, 0], reproducibilitySd: 0 });
  });

  test("unequal replicates, single laboratories and single replicates are refused", () => {
    expect(() =>
      interlaboratoryPrecision([
        [1, 2],
        [1, 2, 3],
      ]),
    ).toThrow(/3 replicates beside 2/);
    expect(() => interlaboratoryPrecision([[1, 2]])).toThrow(RangeError);
    expect(() => interlaboratoryPrecision([[1], [2]])).toThrow(RangeError);
    expect(() => interlaboratoryPrecision([])).toThrow(RangeError);
    expect(() => mandelHCritical(2, 0.05)).toThrow(RangeError);
    expect(() => mandelKCritical(3, 1, 0.05)).toThrow(RangeError);
  });
});
