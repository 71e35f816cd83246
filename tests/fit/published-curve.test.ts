import { expect, test } from "vitest";
import { curveFunctions } from "../../pipeline/curves/published-curve-functions.ts";
import type { Curve } from "../../pipeline/records/fits.ts";
import { curveThrough, defaultContext, expectCurve, plainPoints, plainSystem } from "./plain-system.ts";

const T = [278.15, 283.15, 288.15, 293.15, 298.15, 303.15, 308.15, 313.15, 318.15, 323.15];
const jitter = [0.011, -0.014, 0.006, 0.017, -0.012, -0.008, 0.013, 0.004, -0.016, 0.009];
const line = (t: number) => -3.1 - 2900 * (1 / t - 1 / 300);
const lnX = T.map((t, i) => line(t) + (jitter[i] as number));

const scales = {
  ...defaultContext.scales,
  ...{ between: 0.03, betweenDegreesOfFreedom: 24 },
};

test("A curve carries id, range, counts, deviations and the between-source scatter its limits rest on", () => {
  const curve = expectCurve(curveThrough(plainPoints(T, lnX), { scales, laboratories: ["bench 4"] }));
  expect(curve).toMatchObject({
    ...{ curveId: "solute-in-solvent-0-1", system: 0, branch: 1, model: "van 't Hoff", fitBasis: "ln x" },
    ...{ n: 10, nSources: 1, nLaboratories: 1, betweenSd: 0.03, betweenDegreesOfFreedom: 24 },
    temperatureRangeK: [278.15, 323.15],
  });
  const residuals = T.map((t, i) => (lnX[i] as number) - curve.evaluate(t));
  expect(curve.rmsd).toBeCloseTo(Math.sqrt(residuals.reduce((sum, r) => sum + r * r, 0) / 10), 14);
  const relative = residuals.map((r) => Math.abs(1 - Math.exp(-r)));
  expect(curve.ardPercent).toBeCloseTo(10 * relative.reduce((sum, r) => sum + r, 0), 12);
  expect(curve.withinSd).toBeGreaterThan(0.008);
  expect(curve.withinSd).toBeLessThan(0.018);
  expect(curve.runnersUp.map(({ model }) => model)).toEqual(["modified Apelblat", "quadratic in 1/T"]);
});

test("Published coefficients in double precision give the curve back to 1e-11 in ln x", () => {
  const bent = T.map((t) => line(t) + 40 * (300 / t - 1 - Math.log(300 / t)));
  const curve = expectCurve(curveThrough(plainPoints(T, bent)));
  expect(curve.model).toBe("modified Apelblat");
  const published = curveFunctions(curve);
  for (const t of T) expect(Math.abs(published.lnValue(t) - curve.evaluate(t))).toBeLessThan(1e-11);
});

test("A curve is never evaluated outside the temperatures of its kept points", () => {
  const curve = expectCurve(curveThrough(plainPoints(T, lnX)));
  expect(() => curve.evaluate(278.1)).toThrow(/278.15 K to 323.15 K/);
  expect(() => curve.limits(324)).toThrow(RangeError);
});

test("Points that the screening fit leaves out move neither curve nor range", () => {
  const points = plainPoints([...T, 350], [...lnX, 5]);
  const kept = new Uint8Array(11).fill(1, 0, 10);
  const outcome = curveThrough(points, {}, Number.NaN, plainSystem(), kept);
  const alone = expectCurve(curveThrough(plainPoints(T, lnX)));
  expect(expectCurve(outcome).coefficients).toEqual(alone.coefficients);
  expect(expectCurve(outcome).temperatureRangeK).toEqual([278.15, 323.15]);
});

test("Laboratories carry the weight: twenty points of one source do not outvote four sources of three", () => {
  const low = Array.from({ length: 20 }, (_, i) => 280 + 2 * i);
  const high = [0, 1, 2, 3].flatMap(() => [282, 300, 318]);
  const source = [...low.map(() => 0), ...high.map((_, i) => 1 + Math.floor(i / 3))];
  const values = [...low.map((t) => line(t) - 0.05), ...high.map(line)];
  const curve = expectCurve(curveThrough(plainPoints([...low, ...high], values, source), { scales }));
  const shift = curve.evaluate(300) - line(300);
  // Equal weight for five sources would put it at -0.010; equal weight for points at -0.031.
  expect(shift).toBeGreaterThan(-0.0125);
  expect(shift).toBeLessThan(-0.009);
  expect(curve.nSources).toBe(5);
  expect(curve.nLaboratories).toBe(5);
});

test("Sources of one laboratory count as one laboratory, unstated ones each for themselves", () => {
  const points = plainPoints(T, lnX, [0, 0, 1, 1, 2, 2, 3, 3, 4, 4]);
  const curve = expectCurve(curveThrough(points, { laboratories: ["north", "south", "north", "", ""] }));
  expect(curve.nLaboratories).toBe(4);
});

test("An error of a clear point's temperature takes weight from it through the slope of the curve", () => {
  const temperatures = [280, 290, 300, 310, 320];
  const values = temperatures.map((t) => line(t));
  values[4] = (values[4] as number) + 0.1;
  const even = plainPoints(temperatures, values);
  const clear = plainPoints(temperatures, values);
  clear.temperatureU[4] = 2;
  const [pulled, held] = [expectCurve(curveThrough(even)), expectCurve(curveThrough(clear))];
  // Slope 2900/T^2 = 0.028 per K: 2 K are 5.7 % beside a stated 2 %, so the weight falls to 0.04/(0.04 + 0.32) = 0.11.
  const deviation = (curve: Curve) => Math.abs(curve.evaluate(300) - line(300));
  expect(deviation(held)).toBeLessThan(0.35 * deviation(pulled));
});

test("One temperature gives a consensus value in which sources weigh as sources", () => {
  // Three sources at 25 °C; tau = 3 %, within 2 %.
  const source = [0, 0, 0, 0, 0, 0, 1, 2];
  const values = [-3, -3.01, -2.99, -3, -3.01, -2.99, -2.94, -2.94];
  const points = plainPoints(
    source.map(() => 298.15),
    values,
    source,
    0.02,
    0,
  );
  const oneTemperature = { betweenOneTemperature: 0.03, betweenOneTemperatureDegreesOfFreedom: 24 };
  const curve = expectCurve(curveThrough(points, { scales: { ...scales, ...oneTemperature } }));
  expect(curve.model).toBe("constant");
  // Random-effects mean with weights 1/(tau^2 + s^2/n), s^2 = (4 * 0.02^2 + own scatter)/(4 + 5) of the six points.
  const s2 = (4 * 4e-4 + 4e-4) / 9;
  const [many, single] = [1 / (9e-4 + s2 / 6), 1 / (9e-4 + s2)];
  const expected = (many * -3 + 2 * single * -2.94) / (many + 2 * single);
  expect(curve.evaluate(298.15)).toBeCloseTo(expected, 6);
  expect(curve.coefficients[0]?.standardUncertainty).toBeCloseTo((many + 2 * single) ** -0.5, 6);
  expect(curve.dissolutionEnthalpy).toBeUndefined();
  expect(curve.betweenDegreesOfFreedom).toBe(24);
});

test("Sources further apart than the pooled scatter allows widen the limits and say so", () => {
  const source = T.map((_, i) => i % 3);
  const apart = T.map((t, i) => line(t) + 0.02 * (jitter[i] as number) + [-0.16, 0, 0.16][i % 3]!);
  const near = T.map((t, i) => line(t) + (jitter[i] as number));
  const wide = expectCurve(curveThrough(plainPoints(T, apart, source), { scales }));
  const usual = expectCurve(curveThrough(plainPoints(T, near, source), { scales }));
  expect(usual.betweenSd).toBe(0.03);
  expect(wide.betweenSd).toBeGreaterThan(0.1);
  expect(wide.betweenSd).toBeLessThan(0.3);
  expect(wide.notices.join()).toMatch(/lie further apart than usual: between-source SD raised to 1\d\.\d\d %/);
  expect(wide.limits(300).curve).toBeGreaterThan(3 * usual.limits(300).curve);
});

test("The dissolution enthalpy is -R d ln x/d(1/T) at the harmonic mean temperature, inside its limits", () => {
  const exact = expectCurve(
    curveThrough(
      plainPoints(
        T,
        T.map((t) => line(t)),
      ),
    ),
  );
  expect(exact.dissolutionEnthalpy?.value).toBeCloseTo(8.314462618 * 2900, 4);
  expect(exact.dissolutionEnthalpy?.temperatureK).toBeCloseTo(10 / T.reduce((sum, t) => sum + 1 / t, 0), 9);
  const curve = expectCurve(curveThrough(plainPoints(T, lnX)));
  const { value, low, high } = curve.dissolutionEnthalpy as NonNullable<Curve["dissolutionEnthalpy"]>;
  expect(low).toBeLessThan(8.314462618 * 2900);
  expect(high).toBeGreaterThan(8.314462618 * 2900);
  expect(high - value).toBeCloseTo(value - low, 6);
});

test("Notices tell how few points bear a curve, why no richer model was tried, and a large C", () => {
  const two = expectCurve(curveThrough(plainPoints([283.15, 313.15], [-4, -3])));
  expect(two.model).toBe("van 't Hoff");
  expect(two.notices).toEqual([
    "two temperatures only: the straight line between them cannot be checked",
    "2 points and 2 coefficients withstand no bad point",
    "no degree of freedom within sources: the limits rest on the scatter usual in these sources",
    "no three-coefficient model tried: 2 temperatures over 30.0 K (needs 6 over 30 K)",
    "one source: the limits contain a between-source SD of 4.00 % (default setting)",
  ]);
  expect(two.withinSd).toBeUndefined();
  const T6 = [278.15, 288.15, 298.15, 308.15, 318.15, 328.15];
  const bent = T6.map((t) => line(t) + 90 * (300 / t - 1 - Math.log(300 / t)));
  const six = expectCurve(curveThrough(plainPoints(T6, bent)));
  expect(six.model).toBe("modified Apelblat");
  expect(six.notices[0]).toBe("6 points and 3 coefficients withstand one bad point");
  expect(six.notices.join()).toMatch(/\|C\| = 90.0 is above 60/);
  expect(six.withinSd).toBeUndefined();
});

test("Lambda-h is tried where the melting point is known, and never on a mass ratio", () => {
  const models = (curve: Curve) => [curve.model, ...curve.runnersUp.map(({ model }) => model)].sort();
  const points = plainPoints(T, lnX);
  expect(models(expectCurve(curveThrough(points, {}, 440)))).toContain("Buchowski-Ksiazczak lambda-h");
  expect(models(expectCurve(curveThrough(points, {}, 300)))).not.toContain("Buchowski-Ksiazczak lambda-h");
  const ratio = curveThrough(points, {}, 440, plainSystem(0, "ln r"));
  expect(models(expectCurve(ratio))).not.toContain("Buchowski-Ksiazczak lambda-h");
});

test("The same points give the same curve whatever was fitted before", () => {
  const first = expectCurve(curveThrough(plainPoints(T, lnX), {}, 440));
  curveThrough(plainPoints([300, 310, 320], [-1, -0.8, -0.7]));
  const again = expectCurve(curveThrough(plainPoints(T, lnX), {}, 440));
  expect(again.coefficients).toEqual(first.coefficients);
  expect(again.covariance).toEqual(first.covariance);
  expect(again.limits(300)).toEqual(first.limits(300));
});
