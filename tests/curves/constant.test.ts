import { expect, test } from "vitest";
import { lnValue, slope, temperaturesAt } from "../../pipeline/curves/constant.ts";

const curve = { A: -4.2, fittedBetween: [297.9, 298.4] as const };

test("A constant gives its value at the temperature it was measured at and nowhere else", () => {
  expect(lnValue(curve, 298.15)).toBe(-4.2);
  expect(() => lnValue(curve, 300)).toThrow(/constant: T = 300 K is outside the fitted range/);
});

test("A constant knows no slope and no temperature of saturation", () => {
  expect(slope(curve, 298.15)).toBeNaN();
  expect(() => slope(curve, 300)).toThrow(RangeError);
  expect(temperaturesAt(curve, -4.2)).toEqual([]);
});
