import fc from "fast-check";
import * as simple from "simple-statistics";
import { describe, expect, test } from "vitest";
import { normalQuantile } from "../../pipeline/numerics/distributions.ts";
import {
  MAD_TO_SIGMA,
  median,
  medianAbsoluteDeviation,
  medianAbsoluteDeviationInto,
  medianInPlace,
  quantile,
  selectInPlace,
} from "../../pipeline/numerics/order-statistics.ts";

const sample = fc.array(fc.oneof(fc.double({ min: -1e6, max: 1e6, noNaN: true }), fc.integer({ min: -3, max: 3 })), {
  minLength: 1,
  maxLength: 60,
});

describe("against sorting and simple-statistics", () => {
  test("selection finds the k-th smallest and leaves no larger number before it", () => {
    fc.assert(
      fc.property(sample, fc.nat(), (values, any) => {
        const k = any % values.length;
        // Adding 0 turns -0 into 0: the two are equal, and their order is nobody's business.
        const scratch = Float64Array.from(values, (value) => value + 0);
        const sorted = scratch.slice().sort();
        expect(selectInPlace(scratch, values.length, k)).toBe(sorted[k]);
        expect(Math.max(-Infinity, ...scratch.subarray(0, k))).toBeLessThanOrEqual(sorted[k]!);
        expect([...scratch].sort((a, b) => a - b)).toEqual([...sorted]);
      }),
    );
  });

  test("median and median absolute deviation are those of simple-statistics", () => {
    fc.assert(
      fc.property(sample, (values) => {
        expect(median(values)).toBeCloseTo(simple.median(values), 8);
        expect(medianAbsoluteDeviation(values)).toBeCloseTo(simple.medianAbsoluteDeviation(values), 8);
      }),
    );
  });

  test("the middle quantile is the median, the ends are the extremes, and quantiles never fall", () => {
    fc.assert(
      fc.property(sample, fc.double({ min: 0, max: 1, noNaN: true }), (values, probability) => {
        expect(quantile(values, 0.5)).toBeCloseTo(median(values), 8);
        expect(quantile(values, 0)).toBe(Math.min(...values));
        expect(quantile(values, 1)).toBe(Math.max(...values));
        expect(quantile(values, probability)).toBeLessThanOrEqual(quantile(values, Math.min(1, probability + 0.1)));
      }),
    );
  });
});

test("quartiles of the 90 handbook points are those of type 7", () => {
  // Data: NIST/SEMATECH e-Handbook 7.1.6; type 7 quartiles 436.25 and 738.5 computed with R quantile().
  const values = [
    30, 171, 184, 201, 212, 250, 265, 270, 272, 289, 305, 306, 322, 322, 336, 346, 351, 370, 390, 404, 409, 411, 436,
    437, 439, 441, 444, 448, 451, 453, 470, 480, 482, 487, 494, 495, 499, 503, 514, 521, 522, 527, 548, 550, 559, 560,
    570, 572, 574, 578, 585, 592, 592, 607, 616, 618, 621, 629, 637, 638, 640, 656, 668, 707, 709, 719, 737, 739, 752,
    758, 766, 792, 792, 794, 802, 818, 830, 832, 843, 858, 860, 869, 918, 925, 953, 991, 1000, 1005, 1068, 1441,
  ];
  expect([quantile(values, 0.25), median(values), quantile(values, 0.75)]).toEqual([436.25, 559.5, 738.5]);
});

test("the factor of the median absolute deviation is the reciprocal of the upper quartile of the normal law", () => {
  expect(MAD_TO_SIGMA).toBeCloseTo(1 / normalQuantile(0.75), 14);
});

test("only the first n numbers count", () => {
  expect(medianInPlace(Float64Array.of(1, 2, 3, 1000, 1000), 3)).toBe(2);
  expect(medianAbsoluteDeviationInto(new Float64Array(5), [1, 2, 3, 1000], 3, 0)).toBe(2);
});

test("the list itself is not reordered", () => {
  const values = Object.freeze([3, 1, 2]);
  expect([median(values), quantile(values, 0.5), medianAbsoluteDeviation(values)]).toEqual([2, 2, 1]);
  expect(values).toEqual([3, 1, 2]);
});

test("the middle of two huge numbers does not overflow", () => {
  expect(median([-Number.MAX_VALUE / 2, Number.MAX_VALUE / 2])).toBe(0);
});

test("empty lists and probabilities outside 0 to 1 are refused", () => {
  expect(() => median([])).toThrow(RangeError);
  expect(() => medianAbsoluteDeviation([])).toThrow(RangeError);
  expect(() => quantile([1], 1.5)).toThrow(/1.5/);
  expect(() => quantile([1], Number.NaN)).toThrow(RangeError);
});
