import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { expect, test } from "vitest";
import { limitFactor } from "../../pipeline/fit/limit-factor.ts";
import { studentTQuantile } from "../../pipeline/numerics/distributions.ts";
import { curveThrough, defaultContext, expectCurve, plainPoints } from "./plain-system.ts";

// Two-sided 95 % points of Student's t, standard tables.
test("The factor of a limit is the tabulated t value, and the normal one for infinite degrees of freedom", () => {
  for (const [df, t] of [
    [1, 12.706],
    [2, 4.303],
    [3, 3.182],
    [4, 2.776],
    [10, 2.228],
    [30, 2.042],
  ] as const)
    expect(limitFactor(df)).toBeCloseTo(t, 3);
  expect(limitFactor(Number.POSITIVE_INFINITY)).toBeCloseTo(1.959964, 6);
});

test("Between the tabulated degrees of freedom the factor is interpolated to 1e-6", () => {
  for (let df = 2; df < 400; df *= 1.037)
    expect(Math.abs(limitFactor(df) - studentTQuantile(0.975, df))).toBeLessThan(1e-6 * limitFactor(df));
});

const T = [278, 284, 290, 296, 302, 308, 314, 320];

test("The limits of a one-source curve contain the between-source part, and those of a new measurement twice", () => {
  const lnX = T.map((t, i) => -3 - 2500 * (1 / t - 1 / 300) + (i % 2 === 0 ? 0.01 : -0.01));
  const scales = { ...defaultContext.scales, between: 1e-6 };
  const without = expectCurve(curveThrough(plainPoints(T, lnX), { scales })).limits(299);
  const { curve, newMeasurement } = expectCurve(curveThrough(plainPoints(T, lnX))).limits(299);
  // With tau at its default of 4 %, taken as given, the normal factor nearly applies.
  expect(curve).toBeGreaterThan(1.96 * 0.04);
  expect(curve).toBeLessThan(2.1 * Math.hypot(0.04, without.curve / 1.96));
  expect(newMeasurement).toBeGreaterThan(1.96 * 0.04 * Math.SQRT2);
});

test("Fewer degrees of freedom of the between-source scatter widen the limits", () => {
  const lnX = T.map((t) => -3 - 2500 * (1 / t - 1 / 300));
  const width = (betweenDegreesOfFreedom: number) =>
    expectCurve(
      curveThrough(plainPoints(T, lnX), { scales: { ...defaultContext.scales, betweenDegreesOfFreedom } }),
    ).limits(299).curve;
  expect(width(3)).toBeGreaterThan(1.4 * width(300));
  expect(width(300)).toBeGreaterThan(width(0));
});

test("Limits of a line widen with the bend that its few points cannot show", () => {
  const scales = { ...defaultContext.scales, between: 1e-6 };
  const relativeWidth = (halfSpan: number) => {
    const temperatures = [300 - halfSpan, 300, 300 + halfSpan];
    const lnX = temperatures.map((t) => -3 - 2500 * (1 / t - 1 / 300));
    return expectCurve(curveThrough(plainPoints(temperatures, lnX), { scales })).limits(300 + halfSpan / 2).curve;
  };
  // The scatter of the points alone would give the same width half way between them, whatever their distance.
  expect(relativeWidth(40)).toBeGreaterThan(1.15 * relativeWidth(5));
});

test("95 % limits hold the truth in 92 to 98 of 100 systems of ten points by two sources", () => {
  const generator = xoroshiro128plus(11);
  const uniform = () => uniformFloat64(generator);
  const gaussian = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  const temperatures = Array.from({ length: 10 }, (_, i) => 278 + 5.5 * i);
  const scales = { ...defaultContext.scales, between: 0.03, betweenDegreesOfFreedom: 200 };
  let [inside, insideNew, runs] = [0, 0, 0];
  for (let run = 0; run < 1500; run++) {
    const c = 6 * gaussian();
    const offsets = [0.03 * gaussian(), 0.03 * gaussian(), 0.03 * gaussian()] as const;
    const truth = (t: number) => -4 - 9 * (300 / t - 1) + c * (300 / t - 1 - Math.log(300 / t));
    const lnX = temperatures.map((t, i) => truth(t) + offsets[i % 2 === 0 ? 0 : 1] + 0.02 * gaussian());
    const source = temperatures.map((_, i) => i % 2);
    const curve = expectCurve(curveThrough(plainPoints(temperatures, lnX, source), { scales }));
    for (const t of [278, 290, 303, 327.5]) {
      const error = truth(t) - curve.evaluate(t);
      const limits = curve.limits(t);
      runs++;
      if (Math.abs(error) <= limits.curve) inside++;
      if (Math.abs(error + offsets[2] + 0.02 * gaussian()) <= limits.newMeasurement) insideNew++;
    }
  }
  for (const hits of [inside, insideNew]) {
    expect(hits / runs).toBeGreaterThan(0.92);
    expect(hits / runs).toBeLessThan(0.98);
  }
});
