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
} from "../../pipeline/curves/modified-apelblat.ts";
import { expectRelative, numericDerivative } from "./check.ts";

const fittedBetween = [270, 350] as const;

test("ln x = -100 + 2000/T + 15 ln T is -7.77660 at 300 K", () => {
  const curve = { A: -100, B: 2000, C: 15, fittedBetween: [280, 340] as const };
  expect(lnValue(curve, 300)).toBeCloseTo(-100 + 2000 / 300 + 15 * Math.log(300), 13);
  expect(lnValue(curve, 300)).toBeCloseTo(-7.7766, 5);
});

// Sorbic acid in water, coefficients read in a process-model file (original paper not identified); mole fractions
// computed from them independently of this program.
test("The published Apelblat coefficients of sorbic acid in water give its mole fractions from 10 to 60 °C", () => {
  const curve = { A: -157.137, B: 3505.81, C: 24.1015, fittedBetween: [283.15, 333.15] as const };
  const published = [
    [283.15, 0.000170116],
    [293.15, 0.000257399],
    [298.15, 0.000316614],
    [313.15, 0.000588443],
    [333.15, 0.00133612],
  ] as const;
  for (const [T, x] of published) expectRelative(Math.exp(lnValue(curve, T)), x, 4e-6);
});

const centred = fc.tuple(
  fc.double({ min: -15, max: 0, noNaN: true }),
  fc.double({ min: -20, max: 10, noNaN: true }),
  fc.double({ min: -200, max: 200, noNaN: true }),
);
const temperatures = fc.double({ min: 271, max: 349, noNaN: true });

function curveOf(coefficients: readonly [number, number, number]) {
  const [A, B, C] = transformCoefficients(publishedFromCentred(310), coefficients, 3) as [number, number, number];
  return { A, B, C, fittedBetween };
}

test("The slope of the Apelblat curve is its numeric derivative", () => {
  fc.assert(
    fc.property(centred, temperatures, (coefficients, T) => {
      const curve = curveOf(coefficients);
      const numeric = numericDerivative((t) => lnValue(curve, t), T, 0.2);
      expect(Math.abs(slope(curve, T) - numeric)).toBeLessThan(1e-7);
    }),
  );
});

test("Published Apelblat coefficients give the centred curve back to 1e-10 although they cancel by hundreds", () => {
  const row = new Float64Array(3);
  fc.assert(
    fc.property(centred, temperatures, (coefficients, T) => {
      writeDesignRow(row, 0, T, 310);
      const value = coefficients.reduce((sum, c, j) => sum + c * (row[j] as number), 0);
      expect(Math.abs(lnValue(curveOf(coefficients), T) - value)).toBeLessThan(1e-10);
      writeSlopeRow(row, 0, T, 310);
      const derivative = coefficients.reduce((sum, c, j) => sum + c * (row[j] as number), 0);
      expect(Math.abs(slope(curveOf(coefficients), T) - derivative)).toBeLessThan(1e-12);
    }),
  );
});

test("Among the temperatures of a solubility read off an Apelblat curve is the one it was read at", () => {
  fc.assert(
    fc.property(centred, temperatures, (coefficients, T) => {
      const curve = curveOf(coefficients);
      fc.pre(Math.abs(slope(curve, T)) > 1e-4);
      const found = temperaturesAt(curve, lnValue(curve, T));
      expect(Math.min(...found.map((t) => Math.abs(t - T)))).toBeLessThan(1e-6);
    }),
  );
});

test("A curve that turns inside its range meets one solubility at two temperatures, and none beyond the turn", () => {
  // Turns at B/C = 310 K.
  const curve = { A: 0, B: -310 * 40, C: -40, fittedBetween };
  const below = lnValue(curve, 310) - 0.05;
  const [first, second] = temperaturesAt(curve, below) as [number, number];
  expect(first).toBeLessThan(310);
  expect(second).toBeGreaterThan(310);
  expect(lnValue(curve, first)).toBeCloseTo(below, 10);
  expect(lnValue(curve, second)).toBeCloseTo(below, 10);
  expect(temperaturesAt(curve, lnValue(curve, 310) + 1e-6)).toEqual([]);
});

test("The Apelblat curve refuses temperatures outside its fitted range", () => {
  const curve = { A: -100, B: 2000, C: 15, fittedBetween };
  expect(() => lnValue(curve, 350.001)).toThrow(/modified Apelblat: T = 350.001 K is outside the fitted range/);
  expect(() => slope(curve, 0)).toThrow(RangeError);
});
