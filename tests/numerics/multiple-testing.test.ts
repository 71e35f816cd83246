import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { benjaminiHochberg, benjaminiHochbergThreshold } from "../../pipeline/numerics/multiple-testing.ts";
import { referenceValues, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

/** Benjamini and Hochberg, J. R. Stat. Soc. B 57 (1995) 289-300, section 4.1: 15 comparisons of treatments. */
const published = [
  0.0001, 0.0004, 0.0019, 0.0095, 0.0201, 0.0278, 0.0298, 0.0344, 0.0459, 0.324, 0.4262, 0.5719, 0.6528, 0.759, 1,
];

describe("the example of 1995", () => {
  test("rejects four hypotheses at a rate of 0.05, the largest p-value being 0.0095", () => {
    expect([...benjaminiHochberg(published)].filter((p) => p <= 0.05)).toHaveLength(4);
    expect(benjaminiHochbergThreshold(published, 0.05)).toBe(0.0095);
  });

  test("has the adjusted p-values of R p.adjust", () => {
    const expected = [
      0.0015, 0.003, 0.0095, 0.035625, 0.0603, 0.0638571428571, 0.0638571428571, 0.0645, 0.0765, 0.486, 0.581181818182,
      0.714875, 0.753230769231, 0.813214285714, 1,
    ]; // R 4.2.2 stats::p.adjust(method = "BH")
    benjaminiHochberg(published).forEach((p, i) => {
      expect(p).toBeCloseTo(expected[i]!, 11);
    });
  });
});

interface Collection {
  examples: { name: string; data: { p: number[] }; expected: { p_adjust: { BH: number[] } } }[];
}
const collection = referenceValues<Collection>("11-multiple-testing.json");

test.skipIf(!collection)(`unordered and tied p-values agree with R as well ${SKIPPED_WHERE_ABSENT}`, () => {
  for (const { name, data, expected } of collection!.examples) {
    benjaminiHochberg(data.p).forEach((p, i) => {
      expect(p, name).toBeCloseTo(expected.p_adjust.BH[i]!, 11);
    });
  }
});

test("threshold and adjusted values reject the same tests, in whatever order they come", () => {
  const probability = fc.oneof(fc.double({ min: 0, max: 1, noNaN: true }), fc.constantFrom(0, 0.001, 0.01, 0.02, 0.05));
  fc.assert(
    fc.property(fc.array(probability, { maxLength: 40 }), fc.constantFrom(0.01, 0.05, 0.2), (pValues, q) => {
      const threshold = benjaminiHochbergThreshold(pValues, q);
      const adjusted = benjaminiHochberg(pValues);
      pValues.forEach((p, i) => {
        expect(adjusted[i]! <= q).toBe(p <= threshold);
        expect(adjusted[i]).toBeGreaterThanOrEqual(p);
      });
    }),
  );
});

test("of no tests none is rejected, and what is no probability is refused", () => {
  expect(benjaminiHochberg([])).toHaveLength(0);
  expect(benjaminiHochbergThreshold([], 0.05)).toBe(-1);
  expect(() => benjaminiHochberg([0.1, 1.2])).toThrow("p-value 1 is 1.2");
  expect(() => benjaminiHochbergThreshold([0.1, Number.NaN], 0.05)).toThrow(RangeError);
  expect(() => benjaminiHochbergThreshold([0.1], 2)).toThrow(/rate/);
});

test("tests that are only counted give the same limit as tests that are listed", () => {
  // The fifteen p-values of Benjamini and Hochberg (1995), section 3.2; the six smallest listed, the rest counted.
  const smallest = [0.0001, 0.0004, 0.0019, 0.0095, 0.0201, 0.0278];
  expect(benjaminiHochbergThreshold(smallest, 0.05, 15)).toBe(0.0095);
  expect(benjaminiHochbergThreshold([0.04, 0.05], 0.05)).toBe(0.05);
  expect(benjaminiHochbergThreshold([], 0.05, 0)).toBe(-1);
});
