import fc from "fast-check";
import { expect, test } from "vitest";
import { transformCoefficients } from "../../pipeline/curves/coefficient-transformation.ts";
import {
  lnValue,
  publishedFromCentred,
  slope,
  temperaturesAt,
  writeDesignRow,
} from "../../pipeline/curves/van-t-hoff.ts";
import { expectRelative, numericDerivative } from "./check.ts";

const fittedBetween = [270, 350] as const;

// Paracetamol in ethanol, x = 0.062 at 303.15 K: BigSolDB 2.0, doi 10.1007/s10953-005-9007-8; A and B are a
// least-squares refit in ln x of that series, whose root mean square residual is 0.016.
test("The van 't Hoff line of paracetamol in ethanol gives the measured mole fraction within its scatter", () => {
  const curve = { A: 2.4988946, B: -1607.3229, fittedBetween: [293.15, 313.15] as const };
  expect(lnValue(curve, 303.15)).toBeCloseTo(2.4988946 - 1607.3229 / 303.15, 14);
  expectRelative(Math.exp(lnValue(curve, 303.15)), 0.062, 0.03);
});

const curves = fc.record({
  A: fc.double({ min: -20, max: 20, noNaN: true }),
  B: fc.double({ min: -9000, max: 9000, noNaN: true }),
});
const temperatures = fc.double({ min: 271, max: 349, noNaN: true });

test("The slope of the van 't Hoff line is its numeric derivative", () => {
  fc.assert(
    fc.property(curves, temperatures, (coefficients, T) => {
      const curve = { ...coefficients, fittedBetween };
      const numeric = numericDerivative((t) => lnValue(curve, t), T);
      expect(Math.abs(slope(curve, T) - numeric)).toBeLessThan(1e-8 * (1 + Math.abs(numeric)));
    }),
  );
});

test("The temperature of a solubility read off the van 't Hoff line is the one it was read at", () => {
  fc.assert(
    fc.property(curves, temperatures, (coefficients, T) => {
      fc.pre(Math.abs(coefficients.B) > 1);
      const curve = { ...coefficients, fittedBetween };
      const [found] = temperaturesAt(curve, lnValue(curve, T));
      expect(Math.abs((found as number) - T)).toBeLessThan(1e-6 * (1 + 1000 / Math.abs(coefficients.B)));
    }),
  );
});

test("A solubility outside the fitted range has no temperature on the van 't Hoff line", () => {
  const curve = { A: 2, B: -1500, fittedBetween };
  expect(temperaturesAt(curve, 2 - 1500 / 269)).toEqual([]);
  expect(temperaturesAt({ A: -3, B: 0, fittedBetween }, -3)).toEqual([]);
});

test("The van 't Hoff line refuses temperatures outside its fitted range and says which range that is", () => {
  const curve = { A: 2, B: -1500, fittedBetween };
  expect(() => lnValue(curve, 269.99)).toThrow(/T = 269.99 K is outside the fitted range of the curve, 270 K to 350 K/);
  expect(() => slope(curve, Number.NaN)).toThrow(RangeError);
});

test("Centred coefficients of a van 't Hoff line give the same values as the published ones", () => {
  const [a, b] = [-3.2, -9.7];
  const row = new Float64Array(2);
  const [A, B] = transformCoefficients(publishedFromCentred(305), [a, b], 2) as [number, number];
  for (const T of [270, 301.5, 350]) {
    writeDesignRow(row, 0, T, 305);
    const centred = a * (row[0] as number) + b * (row[1] as number);
    expect(lnValue({ A, B, fittedBetween }, T)).toBeCloseTo(centred, 12);
  }
});
