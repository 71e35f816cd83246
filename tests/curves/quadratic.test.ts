import fc from "fast-check";
import { expect, test } from "vitest";
import { transformCoefficients } from "../../pipeline/curves/coefficient-transformation.ts";
import {
  lnValue,
  publishedFromCentred,
  slope,
  temperaturesAt,
  writeDesignRow,
  writeSlopeRow,
} from "../../pipeline/curves/quadratic.ts";
import { numericDerivative } from "./check.ts";

const fittedBetween = [270, 350] as const;
const centred = fc.tuple(
  fc.double({ min: -15, max: 0, noNaN: true }),
  fc.double({ min: -20, max: 10, noNaN: true }),
  fc.double({ min: -100, max: 100, noNaN: true }),
);
const temperatures = fc.double({ min: 271, max: 349, noNaN: true });

function curveOf(coefficients: readonly [number, number, number]) {
  const [A, B, C] = transformCoefficients(publishedFromCentred(310), coefficients, 3) as [number, number, number];
  return { A, B, C, fittedBetween };
}

test("ln x = 1 - 3000/T + 90000/T^2 is -8 at 300 K", () => {
  expect(lnValue({ A: 1, B: -3000, C: 90000, fittedBetween }, 300)).toBeCloseTo(-8, 14);
});

test("Value and slope of the quadratic agree in published and centred form, and the slope with its numeric derivative", () => {
  const row = new Float64Array(3);
  fc.assert(
    fc.property(centred, temperatures, (coefficients, T) => {
      const curve = curveOf(coefficients);
      writeDesignRow(row, 0, T, 310);
      const value = coefficients.reduce((sum, c, j) => sum + c * (row[j] as number), 0);
      expect(Math.abs(lnValue(curve, T) - value)).toBeLessThan(1e-11);
      writeSlopeRow(row, 0, T, 310);
      const derivative = coefficients.reduce((sum, c, j) => sum + c * (row[j] as number), 0);
      expect(Math.abs(slope(curve, T) - derivative)).toBeLessThan(1e-12);
      expect(Math.abs(derivative - numericDerivative((t) => lnValue(curve, t), T, 0.2))).toBeLessThan(1e-7);
    }),
  );
});

test("Among the temperatures of a solubility read off a quadratic is the one it was read at", () => {
  fc.assert(
    fc.property(centred, temperatures, (coefficients, T) => {
      const curve = curveOf(coefficients);
      fc.pre(Math.abs(slope(curve, T)) > 1e-4);
      const found = temperaturesAt(curve, lnValue(curve, T));
      expect(Math.min(...found.map((t) => Math.abs(t - T)))).toBeLessThan(1e-5);
    }),
  );
});

test("A straight line is the quadratic without its last term, also in the inverse", () => {
  const line = { A: 2, B: -1500, C: 0, fittedBetween };
  expect(temperaturesAt(line, 2 - 1500 / 300)).toEqual([300]);
});

test("The quadratic has no temperature for a value beyond its turn, and refuses temperatures outside its range", () => {
  const curve = curveOf([-5, 0, 10]);
  expect(temperaturesAt(curve, -5.001)).toEqual([]);
  expect(() => lnValue(curve, 269)).toThrow(RangeError);
  expect(() => slope(curve, 351)).toThrow(RangeError);
});
