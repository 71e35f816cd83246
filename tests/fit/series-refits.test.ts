import { existsSync, readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { curveThrough, expectCurve, plainPoints, plainSystem } from "./plain-system.ts";

/** Published curve of one series of mole fractions with even uncertainties and temperatures taken as exact. */
function curveOf(series: readonly (readonly [T: number, x: number])[]) {
  const T = series.map(([t]) => t);
  const lnX = series.map(([, x]) => Math.log(x));
  return expectCurve(curveThrough(plainPoints(T, lnX, [], 0.02, 0)));
}

// Series: BigSolDB 2.0 (Sci. Data 12 (2025) 1236). Coefficients and average relative deviations: ordinary least squares
// in ln x, computed independently of this program.
test("Paracetamol in ethanol: five points over 20 K give the van 't Hoff line of ordinary least squares", () => {
  // doi 10.1007/s10953-005-9007-8
  const series = [
    ...([
      [293.15, 0.05045],
      [298.15, 0.0546],
      [303.15, 0.062],
      [308.15, 0.067],
      [313.15, 0.0705],
    ] as const),
  ];
  const curve = curveOf(series);
  expect(curve.model).toBe("van 't Hoff");
  expect(curve.coefficients[0]?.value).toBeCloseTo(2.4988946, 6);
  expect(curve.coefficients[1]?.value).toBeCloseTo(-1607.3229, 3);
  expect(curve.rmsd).toBeCloseTo(0.01608, 4);
  expect(curve.ardPercent).toBeCloseTo(1.464, 3);
  expect((curve.dissolutionEnthalpy?.value ?? 0) / 1000).toBeCloseTo(13.364, 3);
});

test("Artemisinin in ethanol: nine points that bend give the Apelblat curve of ordinary least squares", () => {
  // doi 10.1021/je100125x
  const series = [
    ...([
      [284.15, 0.00236],
      [289.15, 0.00305],
      [295.15, 0.00412],
      [298.15, 0.00475],
      [304.15, 0.00631],
    ] as const),
    ...([
      [309.15, 0.00796],
      [314.15, 0.01],
      [319.15, 0.01249],
      [323.15, 0.01487],
    ] as const),
  ];
  const curve = curveOf(series);
  expect(curve.model).toBe("modified Apelblat");
  expect(curve.coefficients[0]?.value).toBeCloseTo(-49.812336, 4);
  expect(curve.coefficients[1]?.value).toBeCloseTo(-1668.7823, 2);
  expect(curve.coefficients[2]?.value).toBeCloseTo(8.786162, 5);
  expect(curve.rmsd).toBeCloseTo(0.001401, 6);
  expect(curve.ardPercent).toBeCloseTo(0.101, 3);
});

const folder = new URL("../../../shared/reference/solubility/", import.meta.url);
const present = existsSync(new URL("04b_organic_solubility_data.csv", folder));

function read(file: string): string[][] {
  const lines = readFileSync(new URL(file, folder), "utf8").trim().split("\n").slice(1);
  return lines.map((line) =>
    line
      .trim()
      .replace(/"[^"]*"/g, (quoted) => quoted.replaceAll(",", ";"))
      .split(","),
  );
}

test.skipIf(!present)("No published series is fitted worse than by least squares (needs ../shared/reference)", () => {
  const data = read("04b_organic_solubility_data.csv");
  const refits = read("04c_reference_refits_computed_here.csv");
  expect(refits).toHaveLength(30);
  for (const refit of refits) {
    const series = data
      .filter((row) => row[0] === refit[0] && row[1] === refit[1] && row[5] === refit[2])
      .map((row) => [Number(row[2]), Number(row[3])] as const);
    expect(series).toHaveLength(Number(refit[3]));
    const curve = curveOf(series);
    const [straight, bent] = [Number(refit[10]), Number(refit[15])];
    // The quadratic has no refit of its own; it must at least better the line.
    const reference = curve.model === "modified Apelblat" ? bent : straight;
    expect(curve.ardPercent, refit.slice(0, 3).join(" ")).toBeLessThanOrEqual(reference + 0.0006);
    if (curve.model === "van 't Hoff") {
      expect((curve.coefficients[0]?.value ?? 0) / Number(refit[6])).toBeCloseTo(1, 6);
      expect((curve.coefficients[1]?.value ?? 0) / Number(refit[7])).toBeCloseTo(1, 6);
    }
    if (curve.model === "modified Apelblat")
      expect((curve.coefficients[2]?.value ?? 0) / Number(refit[13])).toBeCloseTo(1, 5);
  }
});

interface Correlation {
  readonly id: string;
  readonly valid_T_C?: readonly [number, number];
  readonly coefficients: Readonly<Record<string, number>>;
}

test.skipIf(!present)("Published correlations are followed inside their ranges (needs ../shared/reference)", () => {
  const all: Correlation[] = JSON.parse(readFileSync(new URL("03_published_correlations.json", folder), "utf8"));
  // Largest deviation of ln r allowed: the correlations are polynomials of up to fifth degree, ours have three terms.
  const tried = [
    ["sucrose-water-vavrinecz1962", 0.005],
    ["nacl-water-sterner1988", 0.002],
    ["kno3-water-miller-rawlings1994", 0.025],
    ["k2so4-water-mullin-gaska1969", 0.004],
  ] as const;
  for (const [id, tolerance] of tried) {
    const { coefficients, valid_T_C } = all.find((correlation) => correlation.id === id) as Correlation;
    const [low, high] = valid_T_C as readonly [number, number];
    const celsius = Array.from({ length: 12 }, (_, i) => low + ((Math.min(high, 100) - low) * i) / 11);
    const a = Object.values(coefficients);
    const scale = id.includes("sterner") ? 100 : 1;
    const lnR = celsius.map((t) => {
      const value = a.reduce((sum, c, power) => sum + c * (t / scale) ** power, 0);
      return Math.log(id.startsWith("kno3") || id.startsWith("k2so4") ? value : value / (100 - value));
    });
    const points = plainPoints(
      celsius.map((t) => t + 273.15),
      lnR,
      [],
      0.02,
      0,
    );
    const curve = expectCurve(curveThrough(points, {}, Number.NaN, plainSystem(0, "ln r")));
    const worst = Math.max(
      ...lnR.map((value, i) => Math.abs(value - curve.evaluate(points.temperatureK[i] as number))),
    );
    expect(worst, `${id}: ${curve.model}`).toBeLessThan(tolerance);
  }
});
