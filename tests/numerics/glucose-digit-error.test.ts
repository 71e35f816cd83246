import { describe, expect, test } from "vitest";
import { interlaboratoryPrecision, mandelKCritical } from "../../pipeline/numerics/interlaboratory.ts";
import { cochranTest, grubbsTest } from "../../pipeline/numerics/outlier-tests.ts";

/**
 * Glucose in serum, material C, eight laboratories in triplicate; ASTM E691-99, table 1, as a public data file holds it
 * (GLUCOSE2.DAT): laboratory 4 has 148.30 where 138.30 gives the published mean 134.73, s_r 1.54 and s_R 2.15.
 */
const COPY = [
  [132.66, 133.83, 133.1],
  [132.92, 136.9, 136.4],
  [132.61, 135.8, 135.36],
  [138.5, 148.3, 135.69],
  [131.9, 134.14, 133.76],
  [137.21, 135.14, 137.5],
  [130.97, 131.59, 134.92],
  [135.46, 135.14, 133.63],
];
const AS_PUBLISHED = COPY.map((laboratory) => laboratory.map((value) => (value === 148.3 ? 138.3 : value)));

const variances = (laboratories: readonly (readonly number[])[]) =>
  laboratories.map((values) => {
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1);
  });

describe("one digit wrong in a copy of an interlaboratory table", () => {
  test("is found by Cochran's test at 1 %, and points to the laboratory", () => {
    const { statistic, critical, index, isOutlier } = cochranTest(variances(COPY), 3, 0.01);
    expect(statistic).toBeCloseTo(0.7253, 4);
    // ISO 5725-2:1994, table 4: 0.615 for eight laboratories in triplicate (from memory, not verified).
    expect(critical).toBeCloseTo(0.615, 3);
    expect([index, isOutlier]).toEqual([3, true]);
  });

  test("is found by Mandel's k, and is the one value of the laboratory that stands out", () => {
    const { k } = interlaboratoryPrecision(COPY);
    expect(k.flatMap((value, i) => (value > mandelKCritical(8, 3, 0.005) ? [i] : []))).toEqual([3]);
    expect(grubbsTest(COPY.flat(), 0.01)).toMatchObject({ index: 10, isOutlier: true });
  });

  test("leaves nothing to find once it is put right, and the published figures follow", () => {
    expect(cochranTest(variances(AS_PUBLISHED), 3, 0.05).isOutlier).toBe(false);
    expect(grubbsTest(AS_PUBLISHED.flat(), 0.05).isOutlier).toBe(false);
    const { grandMean, repeatabilitySd, reproducibilitySd } = interlaboratoryPrecision(AS_PUBLISHED);
    expect([grandMean, repeatabilitySd, reproducibilitySd].map((value) => value.toFixed(2))).toEqual([
      "134.73",
      "1.54",
      "2.15",
    ]);
  });
});
