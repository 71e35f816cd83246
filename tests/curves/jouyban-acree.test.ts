import fc from "fast-check";
import { expect, test } from "vitest";
import { transformCoefficients } from "../../pipeline/curves/coefficient-transformation.ts";
import {
  coefficientNames,
  lnValue,
  PURE_COEFFICIENTS,
  publishedFromCentred,
  writeDesignRow,
} from "../../pipeline/curves/jouyban-acree.ts";
import {
  cornersOf,
  fractionLimits,
  fractionLimitsAt,
  isInside,
  mixtureRange,
  temperatureLimits,
} from "../../pipeline/curves/mixture-range.ts";

const everywhere = mixtureRange([0, 0, 1, 1], [270, 350, 270, 350]);

/** The equation term by term, as a reader would write it down. */
function byHand([A1 = 0, B1 = 0, A2 = 0, B2 = 0, J0 = 0, J1 = 0, J2 = 0]: readonly number[], w1: number, T: number) {
  const w2 = 1 - w1;
  return w1 * (A1 + B1 / T) + w2 * (A2 + B2 / T) + ((w1 * w2) / T) * (J0 + J1 * (w1 - w2) + J2 * (w1 - w2) ** 2);
}

const coefficients = fc.integer({ min: 0, max: 3 }).chain((terms) => {
  const real = (size: number) => fc.double({ min: -size, max: size, noNaN: true });
  return fc
    .tuple(real(20), real(9000), real(20), real(9000))
    .chain((pure) => fc.array(real(3000), { minLength: terms, maxLength: terms }).map((J) => [...pure, ...J]));
});
const fractions = fc.double({ min: 0.01, max: 0.99, noNaN: true });
const temperatures = fc.double({ min: 271, max: 349, noNaN: true });

test("The equation gives the sum of its terms, whatever number of terms J it has", () => {
  fc.assert(
    fc.property(coefficients, fractions, temperatures, (all, w, T) => {
      expect(lnValue({ coefficients: all, range: everywhere }, w, T)).toBeCloseTo(byHand(all, w, T), 10);
    }),
  );
  // Worked by hand: 0.5 (5 - 2000/298.15) + 0.5 (1 - 2500/298.15) + 0.25 x 800/298.15.
  const model = { coefficients: [5, -2000, 1, -2500, 800], range: everywhere };
  expect(lnValue(model, 0.5, 298.15)).toBeCloseTo(-3.8757337, 7);
});

test("At the two ends of the composition the equation is the van 't Hoff line of that solvent", () => {
  const model = { coefficients: [5, -2000, 1, -2500, 800, 300, 100], range: everywhere };
  expect(lnValue(model, 1, 300)).toBeCloseTo(5 - 2000 / 300, 12);
  expect(lnValue(model, 0, 300)).toBeCloseTo(1 - 2500 / 300, 12);
});

test("The centred design row times centred coefficients is the published form", () => {
  fc.assert(
    fc.property(coefficients, fractions, temperatures, (centred, w, T) => {
      const terms = centred.length - PURE_COEFFICIENTS;
      const row = new Float64Array(centred.length);
      writeDesignRow(row, 0, w, T, 305, terms);
      const fromRow = centred.reduce((sum, value, j) => sum + value * (row[j] as number), 0);
      const published = transformCoefficients(publishedFromCentred(305, terms), centred, centred.length);
      const size = centred.reduce((sum, value) => sum + Math.abs(value), 1);
      expect(Math.abs(fromRow - byHand(published, w, T))).toBeLessThan(1e-11 * size);
      expect(coefficientNames(terms)).toHaveLength(centred.length);
    }),
  );
});

const data = fc.array(
  fc.record({ w: fc.double({ min: 0, max: 1, noNaN: true }), T: fc.double({ min: 270, max: 350, noNaN: true }) }),
  { minLength: 3, maxLength: 30 },
);

test("The range holds every measurement, every point between two of them, and nothing beyond their extremes", () => {
  fc.assert(
    fc.property(data, fc.double({ min: 0, max: 1, noNaN: true }), (points, share) => {
      const range = mixtureRange(
        points.map(({ w }) => w),
        points.map(({ T }) => T),
      );
      for (const { w, T } of points) expect(isInside(range, w, T)).toBe(true);
      const [a, b] = [points[0]!, points[1]!];
      const between = [a.w + share * (b.w - a.w), a.T + share * (b.T - a.T)] as const;
      const limits = temperatureLimits(range, between[0])!;
      // Two measurements at nearly the same composition make an edge as steep as rounding allows.
      if (Math.abs(a.w - b.w) > 1e-6) {
        expect(limits[0]).toBeLessThan(between[1] + 1e-6);
        expect(limits[1]).toBeGreaterThan(between[1] - 1e-6);
      }
      const temperaturesK = points.map(({ T }) => T);
      expect(isInside(range, a.w, Math.max(...temperaturesK) + 1e-6)).toBe(false);
      expect(isInside(range, a.w, Math.min(...temperaturesK) - 1e-6)).toBe(false);
      const [low, high] = fractionLimits(range);
      expect(temperatureLimits(range, low - 1e-6)).toBeUndefined();
      expect(temperatureLimits(range, high + 1e-6)).toBeUndefined();
      expect(fractionLimitsAt(range, Math.max(...temperaturesK) + 1e-6)).toBeUndefined();
    }),
  );
});

test("Where the hot corner was not measured it lies outside, although composition and temperature alone do not", () => {
  // Pure second solvent up to 310 K, pure first up to 350 K.
  const range = mixtureRange([0, 0, 1, 1], [280, 310, 280, 350]);
  expect(temperatureLimits(range, 0.5)).toEqual([280, 330]);
  expect(fractionLimitsAt(range, 330)).toEqual([0.5, 1]);
  expect(isInside(range, 0.2, 330)).toBe(false);
  expect(cornersOf(range).map(({ fraction, temperatureK }) => [fraction, temperatureK])).toEqual([
    [0, 280],
    [1, 280],
    [1, 350],
    [0, 310],
  ]);
  expect(cornersOf(mixtureRange([0.5, 0.5], [300, 300]))).toHaveLength(1);
  const model = { coefficients: [5, -2000, 1, -2500], range };
  expect(() => lnValue(model, 0.2, 330)).toThrow(
    "Jouyban-Acree-van 't Hoff: T = 330 K is outside the fitted range at mass fraction 0.2, 280 K to 318 K",
  );
  expect(() => lnValue(model, 1.01, 300)).toThrow(
    "Jouyban-Acree-van 't Hoff: mass fraction 1.01 is outside the compositions fitted, 0 to 1",
  );
  for (const bad of [Number.NaN, Number.POSITIVE_INFINITY, -1]) {
    expect(() => lnValue(model, bad, 300)).toThrow(RangeError);
    expect(() => lnValue(model, 0.5, bad)).toThrow(RangeError);
  }
});

test("A range of no measurement, or of one that is not finite, is refused", () => {
  expect(() => mixtureRange([], [])).toThrow("no measurement");
  expect(() => mixtureRange([0.5, Number.NaN], [300, 310])).toThrow("not finite");
});
