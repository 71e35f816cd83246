import fc from "fast-check";
import { expect, test } from "vitest";
import { lnMoleFraction, lnValue, slope, temperaturesAt, writeGradientRow } from "../../pipeline/curves/lambda-h.ts";
import { numericDerivative } from "./check.ts";

const fittedBetween = [270, 350] as const;
const curves = fc.record({
  lambda: fc.double({ min: 0.003, max: 20, noNaN: true }),
  g: fc.double({ min: 500, max: 8000, noNaN: true }),
  meltingPointK: fc.double({ min: 355, max: 600, noNaN: true }),
});
const temperatures = fc.double({ min: 271, max: 349, noNaN: true });

test("The lambda-h value satisfies the equation ln(1 + lambda (1 - x)/x) = lambda h (1/T - 1/Tm)", () => {
  fc.assert(
    fc.property(curves, temperatures, ({ lambda, g, meltingPointK }, T) => {
      const h = g / lambda;
      const x = Math.exp(lnValue({ lambda, h, meltingPointK, fittedBetween }, T));
      expect(x).toBeLessThan(1);
      const left = Math.log1p((lambda * (1 - x)) / x);
      expect(Math.abs(left - g * (1 / T - 1 / meltingPointK))).toBeLessThan(1e-9 * (1 + left));
    }),
  );
});

test("With lambda = 1 the equation is the ideal solubility, ln x = -h (1/T - 1/Tm)", () => {
  const curve = { lambda: 1, h: 3000, meltingPointK: 400, fittedBetween };
  expect(lnValue(curve, 300)).toBeCloseTo(-3000 * (1 / 300 - 1 / 400), 13);
  expect(lnValue(curve, 300)).toBeCloseTo(-2.5, 13);
});

test("The curve meets x = 1 at the melting point and stays finite where exp(v) overflows", () => {
  expect(lnMoleFraction(0.3, 0)).toBeCloseTo(0, 15);
  expect(lnMoleFraction(0.3, 800)).toBeCloseTo(Math.log(0.3) - 800, 10);
  // Both forms of the function meet where it changes from one to the other.
  expect(lnMoleFraction(5, 30.0000001)).toBeCloseTo(lnMoleFraction(5, 29.9999999), 6);
});

test("Slope and gradient of the lambda-h curve are their numeric derivatives", () => {
  const row = new Float64Array(2);
  fc.assert(
    fc.property(curves, temperatures, ({ lambda, g, meltingPointK }, T) => {
      const curve = { lambda, h: g / lambda, meltingPointK, fittedBetween };
      const numeric = numericDerivative((t) => lnValue(curve, t), T, 0.1);
      expect(Math.abs(slope(curve, T) - numeric)).toBeLessThan(1e-7 * (1 + Math.abs(numeric)));
      const t = 1 / T - 1 / meltingPointK;
      writeGradientRow(row, 0, lambda, g * t);
      const byLambda = numericDerivative((l) => lnMoleFraction(Math.exp(l), g * t), Math.log(lambda), 1e-3);
      const byG = numericDerivative((l) => lnMoleFraction(lambda, Math.exp(l) * t), Math.log(g), 1e-3);
      expect(Math.abs((row[0] as number) - byLambda)).toBeLessThan(1e-7);
      expect(Math.abs((row[1] as number) - byG)).toBeLessThan(1e-7 * (1 + Math.abs(byG)));
    }),
  );
});

test("The temperature of a solubility read off the lambda-h curve is the one it was read at", () => {
  fc.assert(
    fc.property(curves, temperatures, ({ lambda, g, meltingPointK }, T) => {
      const curve = { lambda, h: g / lambda, meltingPointK, fittedBetween };
      const [found] = temperaturesAt(curve, lnValue(curve, T));
      expect(Math.abs((found as number) - T)).toBeLessThan(1e-6);
    }),
  );
});

test("The lambda-h curve refuses temperatures outside its fitted range", () => {
  const curve = { lambda: 1, h: 3000, meltingPointK: 400, fittedBetween };
  expect(() => lnValue(curve, 399)).toThrow(/lambda-h: T = 399 K is outside the fitted range/);
  expect(() => slope(curve, 200)).toThrow(RangeError);
});
