import { expect, test } from "vitest";
import { logSum } from "../../pipeline/screen/causes/log-sum.ts";

test("the logarithm of a sum neither overflows nor takes nothing for something undefined", () => {
  expect(logSum([Math.log(2), Math.log(3)])).toBeCloseTo(Math.log(5), 14);
  expect(logSum([1000, 1000])).toBeCloseTo(1000 + Math.LN2, 10);
  expect(logSum([-2000, Number.NEGATIVE_INFINITY])).toBe(-2000);
  // A way that is impossible altogether stays impossible.
  expect(logSum([Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY])).toBe(Number.NEGATIVE_INFINITY);
});
