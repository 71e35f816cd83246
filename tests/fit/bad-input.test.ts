import fc from "fast-check";
import { expect, test } from "vitest";
import { isCurve, publishedCurve } from "../../pipeline/fit/published-curve.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import type { Curve, NoCurve } from "../../pipeline/records/fits.ts";
import type { SystemPoints } from "../../pipeline/records/systems.ts";
import { curveThrough, defaultContext, expectCurve, plainPoints, plainSystem } from "./plain-system.ts";

const T = [278, 284, 290, 296, 302, 308, 314, 320];
const line = (t: number) => -3 - 2500 * (1 / t - 1 / 300);

/** Every number of a curve that a table shows, over its whole range. */
function requireNumbers(outcome: Curve | NoCurve): Curve {
  const curve = expectCurve(outcome);
  const [low, high] = curve.temperatureRangeK;
  const numbers = [low, high, curve.rmsd, curve.ardPercent, curve.betweenSd, curve.withinSd ?? 0];
  for (const { value, standardUncertainty } of curve.coefficients) numbers.push(value, standardUncertainty);
  for (let i = 0; i <= 10; i++) {
    const t = Math.min(high, low + ((high - low) * i) / 10);
    const limits = curve.limits(t);
    numbers.push(curve.evaluate(t), limits.curve, limits.newMeasurement);
    expect(limits.newMeasurement).toBeGreaterThanOrEqual(limits.curve);
  }
  const enthalpy = curve.dissolutionEnthalpy;
  if (enthalpy) numbers.push(enthalpy.value, enthalpy.low, enthalpy.high, enthalpy.temperatureK);
  expect(numbers.filter((number) => !Number.isFinite(number))).toEqual([]);
  return curve;
}

function reasonOf(outcome: Curve | NoCurve): string {
  if (isCurve(outcome)) throw new Error("a curve where none was expected");
  return outcome.reason;
}

test("No points, no kept points and points without numbers give no curve, each with its reason", () => {
  expect(reasonOf(curveThrough(plainPoints([], [])))).toBe("no measurement that a curve could be fitted to");
  const none = curveThrough(plainPoints(T, T.map(line)), {}, Number.NaN, plainSystem(), new Uint8Array(8));
  expect(reasonOf(none)).toBe("none of the 8 points is kept");
  const lost = curveThrough(plainPoints([300, Number.NaN], [Number.NaN, -3]));
  expect(reasonOf(lost)).toMatch(/none of the kept points is usable \(2 without/);
});

test("Sources in conflict give no curve until a person decides", () => {
  const points = plainPoints(T, T.map(line));
  const outcome = publishedCurve(
    { points, kept: new Uint8Array(8).fill(1), agreement: "conflict" },
    { system: plainSystem(), branch: 1, meltingPointK: Number.NaN },
    defaultContext,
  );
  expect(reasonOf(outcome)).toMatch(/sources disagree and none of the readings has a majority/);
});

test("A single measurement is its own curve at its own temperature, with limits from the usual scatter", () => {
  const curve = requireNumbers(curveThrough(plainPoints([298.15], [-4])));
  expect(curve.model).toBe("constant");
  expect(curve.evaluate(298.15)).toBeCloseTo(-4, 14);
  expect(curve.limits(298.15).curve).toBeGreaterThan(1.96 * Math.hypot(0.04, 0.02));
  expect(curve.aicc).toBeNaN();
});

test("All temperatures equal, or within half a kelvin, give a constant", () => {
  const equal = requireNumbers(curveThrough(plainPoints([298.15, 298.15, 298.15], [-4, -4.02, -3.97])));
  expect(equal.model).toBe("constant");
  expect(equal.temperatureRangeK).toEqual([298.15, 298.15]);
  const near = requireNumbers(curveThrough(plainPoints([297.9, 298.15, 298.2, 298.4], [-4, -4.02, -3.97, -4.01])));
  expect(near.model).toBe("constant");
});

test("Temperatures two kelvin apart or more give a line, whatever the scatter", () => {
  expect(requireNumbers(curveThrough(plainPoints([298.15, 300.15], [-4, -3.95]))).model).toBe("van 't Hoff");
});

test("Two temperatures, each by its own source, give a line whose slope knows of both offsets", () => {
  const curve = requireNumbers(curveThrough(plainPoints([283.15, 313.15], [-4, -3], [0, 1])));
  const single = requireNumbers(curveThrough(plainPoints([283.15, 313.15], [-4, -3], [0, 0])));
  expect(curve.coefficients[1]?.standardUncertainty).toBeGreaterThan(
    1.5 * (single.coefficients[1]?.standardUncertainty as number),
  );
});

test("Every point by a source of its own still gives finite limits", () => {
  requireNumbers(curveThrough(plainPoints(T, T.map(line), [0, 1, 2, 3, 4, 5, 6, 7])));
});

test("Uncertainties of zero, infinity or no number do not reach the curve", () => {
  const points = plainPoints(T, T.map(line));
  points.lnU[0] = 0;
  points.lnU[1] = Number.POSITIVE_INFINITY;
  points.lnU[2] = Number.NaN;
  points.temperatureU[3] = Number.POSITIVE_INFINITY;
  points.temperatureU[4] = Number.NaN;
  const curve = requireNumbers(curveThrough(points));
  expect(curve.n).toBe(6);
  expect(curve.notices[0]).toBe("2 of 8 points left out: no finite temperature, value or uncertainty");
});

test("Scales of zero or no number fall back on the usual scatter", () => {
  const scales = { ...defaultContext.scales, within: Float64Array.of(0), between: 0 };
  requireNumbers(curveThrough(plainPoints(T, T.map(line)), { scales }));
  const lost = { ...defaultContext.scales, within: Float64Array.of(Number.NaN) };
  requireNumbers(curveThrough(plainPoints(T, T.map(line)), { scales: lost }));
});

test("Mole fractions of 1e-12 and of 0.99 are fitted like any other", () => {
  const small = T.map((t) => Math.log(1e-12) + line(t) - line(299));
  expect(requireNumbers(curveThrough(plainPoints(T, small), {}, 450)).evaluate(299)).toBeCloseTo(Math.log(1e-12), 6);
  const large = T.map((t) => Math.log(0.99) + 0.0001 * (t - 320));
  const curve = requireNumbers(curveThrough(plainPoints(T, large), {}, 450));
  for (const t of T) expect(curve.evaluate(t)).toBeLessThanOrEqual(0);
  for (const weighting of ["relative", "absolute"] as const) {
    requireNumbers(curveThrough(plainPoints(T, small), { weighting }));
    requireNumbers(curveThrough(plainPoints(T, large), { weighting }));
  }
});

test("Points that lead every model above x = 1 give no curve and say how far", () => {
  const beyond = T.map((t) => 0.02 + 0.001 * (t - 300));
  expect(reasonOf(curveThrough(plainPoints(T, beyond)))).toMatch(
    /van 't Hoff reaches a mole fraction of 1\.0\d+, above 1/,
  );
});

test("Thousands of repeats at one temperature do not drown the others", () => {
  const temperatures = [...Array.from({ length: 5000 }, () => 298.15), 278.15, 318.15];
  const values = temperatures.map((t, i) => line(t) + 0.02 * Math.sin(i * 12.9898));
  const curve = requireNumbers(curveThrough(plainPoints(temperatures, values)));
  expect(curve.model).toBe("van 't Hoff");
  expect(Math.abs(curve.evaluate(278.15) - line(278.15))).toBeLessThan(0.03);
  expect(curve.limits(278.15).curve).toBeGreaterThan(curve.limits(298.15).curve);
});

test("Exact values of a model give that model with finite criteria", () => {
  const curve = requireNumbers(curveThrough(plainPoints(T, T.map(line))));
  expect(curve.model).toBe("van 't Hoff");
  expect(curve.rmsd).toBeLessThan(1e-12);
  expect(Number.isFinite(curve.aicc)).toBe(true);
});

test("Thirty per cent of bad points leave the curve where the good ones are, scattered or at one end", () => {
  const temperatures = Array.from({ length: 20 }, (_, i) => 278.15 + (50 * i) / 19);
  const scattered = (i: number) => i % 10 === 1 || i % 10 === 4 || i % 10 === 7;
  const atOneEnd = (i: number) => i < 6;
  for (const [bad, nSources] of [
    [scattered, 1],
    [scattered, 2],
    [atOneEnd, 1],
  ] as const) {
    const noise = (i: number) => 0.012 * Math.sin(i * 78.233) + (bad(i) ? 0.7 + 0.1 * (i % 3) : 0);
    const points = plainPoints(
      temperatures,
      temperatures.map((t, i) => line(t) + noise(i)),
      temperatures.map((_, i) => i % nSources),
    );
    const { fits, scales } = robustFits([points], [{ aqueousSalt: false }], nSources);
    const [fit] = fits;
    if (fit === undefined) throw new Error("no fit");
    const subject = { system: plainSystem(), branch: 1, meltingPointK: Number.NaN };
    const curve = requireNumbers(publishedCurve(fit, subject, { ...defaultContext, scales }));
    expect(curve.n).toBe(14);
    for (const t of [300, 310, 320]) expect(Math.abs(curve.evaluate(t) - line(t))).toBeLessThan(0.02);
  }
});

const wildPoints: fc.Arbitrary<SystemPoints> = fc
  .array(
    fc.record({
      T: fc.oneof(fc.double({ min: 250, max: 400, noNaN: true }), fc.constantFrom(298.15, 0, -5, Number.NaN, 1e300)),
      y: fc.oneof(fc.double({ min: -30, max: 0, noNaN: true }), fc.constantFrom(Number.NaN, Number.NEGATIVE_INFINITY)),
      source: fc.integer({ min: 0, max: 3 }),
      u: fc.constantFrom(0.001, 0.02, 0.4, 0, Number.NaN, Number.POSITIVE_INFINITY),
      uT: fc.constantFrom(0, 0.1, 2, Number.NaN),
    }),
    { maxLength: 14 },
  )
  .map((rows) => {
    const points = plainPoints(
      rows.map(({ T }) => T),
      rows.map(({ y }) => y),
      rows.map(({ source }) => source),
    );
    rows.forEach(({ u, uT }, i) => {
      points.lnU[i] = u;
      points.temperatureU[i] = uT;
    });
    return points;
  });

test("Whatever the points, the outcome is a curve of finite numbers or a reason", () => {
  fc.assert(
    fc.property(
      wildPoints,
      fc.constantFrom("relative", "absolute"),
      fc.constantFrom(Number.NaN, 420),
      (points, weighting, Tm) => {
        const outcome = curveThrough(points, { weighting: weighting as "relative" | "absolute" }, Tm);
        if (isCurve(outcome)) requireNumbers(outcome);
        else expect(outcome.reason.length).toBeGreaterThan(10);
      },
    ),
    { numRuns: 400 },
  );
});
