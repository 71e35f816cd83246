import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { algorithmA } from "../../pipeline/numerics/algorithm-a.ts";
import { referenceValues, relativeError, SKIPPED_WHERE_ABSENT } from "./reference-values.ts";

/** Copper in wholemeal flour; Analytical Methods Committee, Analyst 114 (1989) 1693-1702. One value is 28.95. */
const copper = [
  2.9, 3.1, 3.4, 3.4, 3.7, 3.7, 2.8, 2.5, 2.4, 2.4, 2.7, 2.2, 5.28, 3.37, 3.03, 3.03, 28.95, 3.77, 3.4, 2.2, 3.5, 3.6,
  3.7, 3.7,
];

describe("Algorithm A", () => {
  test("gives creosote oil 20.412 and 1.070 where the ordinary mean is 20.5", () => {
    // ISO 5725-5:1998, creosote oil, level 5 cell means; result computed to convergence with the factor 1.134.
    const found = algorithmA([24.14, 20.155, 19.5, 20.3, 20.705, 17.57, 20.1, 20.94, 21.185]);
    expect(relativeError(found.mean, 20.412142857142857)).toBeLessThan(1e-9);
    expect(relativeError(found.sd, 1.0698397029558773)).toBeLessThan(1e-9);
    expect(relativeError(found.meanUncertainty, 0.4457665428982822)).toBeLessThan(1e-9);
  });

  test("is hardly moved by a value ten times too large", () => {
    const found = algorithmA(copper);
    expect(relativeError(found.mean, 3.2055659227311044)).toBeLessThan(1e-9);
    expect(relativeError(found.sd, 0.6741501000281032)).toBeLessThan(1e-9);
  });

  interface Example {
    data: number[];
    expected: { algorithm_A_1p134?: { x_star: number; s_star: number; u_x: number } };
  }
  const collection = referenceValues<{ examples: Example[] }>("05-interlaboratory.json");

  test.skipIf(!collection)(`all examples agree to 1e-9 ${SKIPPED_WHERE_ABSENT}`, () => {
    const examples = collection!.examples.filter(({ expected }) => expected.algorithm_A_1p134);
    expect(examples.length).toBeGreaterThanOrEqual(4);
    for (const { data, expected } of examples) {
      const found = algorithmA(data);
      expect(relativeError(found.mean, expected.algorithm_A_1p134!.x_star)).toBeLessThan(1e-9);
      expect(relativeError(found.sd, expected.algorithm_A_1p134!.s_star)).toBeLessThan(1e-9);
    }
  });

  test("moves with shift and scale of the values", () => {
    const sample = fc.array(fc.integer({ min: -100, max: 100 }), { minLength: 4, maxLength: 20 });
    fc.assert(
      fc.property(sample, (values) => {
        const plain = algorithmA(values);
        const moved = algorithmA(values.map((value) => 8 * value + 1024));
        expect(moved.mean).toBeCloseTo(8 * plain.mean + 1024, 6);
        expect(moved.sd).toBeCloseTo(8 * plain.sd, 6);
      }),
    );
  });

  test("starts from the ordinary SD where more than half of the values agree", () => {
    const found = algorithmA([5, 5, 5, 5, 5, 9]);
    expect(found.mean).toBeGreaterThan(5);
    expect(found.mean).toBeLessThan(5.7);
  });

  test("has SD 0 for equal values and for one, and refuses none or what is not finite", () => {
    expect(algorithmA([3, 3, 3])).toMatchObject({ mean: 3, sd: 0, meanUncertainty: 0 });
    expect(algorithmA([3])).toMatchObject({ mean: 3, sd: 0 });
    expect(() => algorithmA([])).toThrow(RangeError);
    expect(() => algorithmA([1, Number.NaN])).toThrow(RangeError);
  });
});
