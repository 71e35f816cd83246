import { describe, expect, test } from "vitest";
import { defaultTemperatureUncertainty } from "../../pipeline/normalise/temperature-uncertainty.ts";
import {
  levelFloor,
  methodUncertainty,
  repeatabilityFloor,
  standardFromReported,
} from "../../pipeline/normalise/value-uncertainty.ts";
import { settingsInForce } from "../../pipeline/records/settings.ts";
import { accepted, refusal } from "./normalised.ts";

const settings = settingsInForce(undefined);

/** Relative standard uncertainty of the mass ratio: that of the mole fraction divided by 1 - x. */
async function ofMassRatio(...parameters: Parameters<typeof accepted>): Promise<number> {
  const row = await accepted(...parameters);
  return row.relativeU / (1 - row.moleFraction);
}

describe("an uncertainty that is not stated (common practice)", () => {
  test.each([
    ["titration", 0.01],
    ["hplc", 0.03],
    ["uv", 0.04],
    ["isothermal-synthetic", 0.02],
    ["unspecified", 0.05],
    ["gravimetric", Math.hypot(0.015, 0.005 / 20)],
  ])("is that of the method: %s", async (method, expected) => {
    expect(methodUncertainty(method, false, 0.2, settings)).toBeCloseTo(expected, 12);
    expect(await ofMassRatio({ method, solubility: "20" })).toBeCloseTo(expected, 6);
    expect((await accepted({ method, solubility: "20" })).assumptions).toContain(`default uncertainty (${method})`);
  });

  test("of a salt in water from a handbook is 2 %, and 5 % for anything else from there", async () => {
    const handbook = { card: { origin: "handbook" as const } };
    expect(await ofMassRatio({ solute: "NaCl", solubility: "36" }, {}, handbook)).toBeCloseTo(0.02, 6);
    expect(await ofMassRatio({ solubility: "20" }, {}, handbook)).toBeCloseTo(0.05, 6);
  });

  test.each([
    [2, 0],
    [0.999, 0.1],
    [0.1, 0.1],
    [0.0999, 0.2],
    [0.01, 0.2],
    [0.00999, 0.4],
  ])("is not below the floor of its level: at %d mg/mL %d", (level, floor) => {
    expect(levelFloor(level, settings)).toBe(floor);
  });

  test("of the best method has the floor of its level all the same, and so has a reported one", async () => {
    const units = { solubility: "mg/mL solution" };
    expect(await ofMassRatio({ method: "titration", solubility: "0.05" }, units)).toBeCloseTo(0.2, 3);
    expect(await ofMassRatio({ uncertainty: "0.0001", solubility: "0.005" }, units)).toBeCloseTo(0.4, 3);
  });

  test("follows the collection's settings", async () => {
    const own = { settings: { default_uncertainty_percent: { hplc: 8 } } };
    expect(await ofMassRatio({ method: "hplc", solubility: "20" }, {}, own)).toBeCloseTo(0.08, 6);
    expect(await ofMassRatio({ method: "uv", solubility: "20" }, {}, own)).toBeCloseTo(0.04, 6);
  });
});

describe("an uncertainty that is stated", () => {
  test.each([
    ["standard", Number.NaN, Number.NaN, 0.6],
    ["expanded", Number.NaN, Number.NaN, 0.3],
    ["expanded", 3, Number.NaN, 0.2],
    ["range", Number.NaN, Number.NaN, 0.6 / Math.sqrt(3)],
    ["standard deviation", Number.NaN, 4, 0.3],
    ["standard deviation", Number.NaN, Number.NaN, 0.6],
  ] as const)("of 0.6 as %s, k = %d, n = %d, is the standard uncertainty %d (GUM 4.2.3, 4.3.7)", (kind, k, n, u) => {
    expect(standardFromReported(0.6, kind, k, n)).toBeCloseTo(u, 12);
  });

  test("is carried to the measurement, in the unit of the value", async () => {
    expect(await ofMassRatio({ solubility: "20", uncertainty: "0.6" })).toBeCloseTo(0.03, 6);
    expect(
      await ofMassRatio({ solubility: "20", uncertainty: "0.6", n: "4" }, {}, { kind: { kind: "standard deviation" } }),
    ).toBeCloseTo(0.015, 6);
    expect(
      await ofMassRatio(
        { solubility: "20", uncertainty: "1.2", coverage_factor: "2.4" },
        {},
        { kind: { kind: "expanded" } },
      ),
    ).toBeCloseTo(0.025, 6);
  });

  test("may be relative, as a fraction or in percent", async () => {
    const relative = { kind: { kind: "standard", relative: true } };
    expect(await ofMassRatio({ solubility: "20", uncertainty: "0.03" }, {}, relative)).toBeCloseTo(0.03, 6);
    expect(await ofMassRatio({ solubility: "20", uncertainty: "3" }, { uncertainty: "%" }, relative)).toBeCloseTo(
      0.03,
      6,
    );
  });

  test("of a logarithm is a relative one: 0.02 in log10 is 4.6 %", async () => {
    const row = await accepted({ solubility: "-1", uncertainty: "0.02" }, { solubility: "log10(mol/L)" });
    expect(row.relativeU).toBeGreaterThan(0.02 * Math.LN10 * 0.99);
    expect(row.relativeU).toBeLessThan(0.02 * Math.LN10 * 1.1);
  });

  test("is repeatability only: not below 1 %, 0.5 % for a salt in water", async () => {
    expect([repeatabilityFloor(false, settings), repeatabilityFloor(true, settings)]).toEqual([0.01, 0.005]);
    expect(await ofMassRatio({ solubility: "20", uncertainty: "0.001" })).toBeCloseTo(0.01, 6);
    expect(await ofMassRatio({ solute: "NaCl", solubility: "36", uncertainty: "0.001" })).toBeCloseTo(0.005, 5);
  });

  test("of zero is taken at the floor, for no measurement is exact", async () => {
    expect(await ofMassRatio({ solubility: "20", uncertainty: "0" })).toBeCloseTo(0.01, 6);
  });

  test.each([
    ["-0.1", "bad-uncertainty"],
    ["20", "bad-uncertainty"],
    ["31", "bad-uncertainty"],
    ["about 1", "not-a-number"],
  ])("of %s at a value of 20 is refused as %s", async (uncertainty, code) => {
    const problem = await refusal({ solubility: "20", uncertainty });
    expect(problem).toMatchObject({ code, place: { column: "uncertainty" } });
  });

  test("with a coverage factor of zero or a count below one is refused", async () => {
    expect((await refusal({ uncertainty: "0.1", coverage_factor: "0" })).code).toBe("bad-uncertainty");
    expect((await refusal({ uncertainty: "0.1", n: "0" })).place.column).toBe("n");
  });
});

describe("a temperature", () => {
  test.each([
    ["25", "°C", 298.15],
    ["298.15", "K", 298.15],
    ["77", "°F", 298.15],
    ["-273", "°C", 0.15],
  ])("of %s %s is %d K", async (temperature, unit, kelvin) => {
    expect((await accepted({ temperature }, { temperature: unit })).temperatureK).toBeCloseTo(kelvin, 9);
  });

  test.each([
    ["-273.15", "°C", "below-absolute-zero"],
    ["-300", "°C", "below-absolute-zero"],
    ["0", "K", "below-absolute-zero"],
    ["-460", "°F", "below-absolute-zero"],
    ["20", "°Ré", "unknown-temperature-unit"],
    ["", "°C", "missing-temperature"],
    ["warm", "°C", "not-a-number"],
  ])("of %j %s is refused as %s", async (temperature, unit, code) => {
    const problem = await refusal({ temperature }, { temperature: unit });
    expect(problem).toMatchObject({ code, place: { column: "temperature", line: 2 } });
  });

  test.each(["room temperature", "RT", "r.t.", "Ambient"])("of %j is the interval 20 to 25 °C", async (temperature) => {
    const row = await accepted({ temperature });
    expect(row.temperatureK).toBeCloseTo(295.65, 9);
    // Standard uncertainty of a uniform distribution over 5 K (GUM 4.3.7): 5/sqrt(12).
    expect(row.temperatureU).toBeCloseTo(1.4434, 4);
    expect(row.assumptions).toContain("room temperature");
  });

  test("states its uncertainty in its own unit, or has that of its probe (common practice)", async () => {
    expect((await accepted({ temperature_uncertainty: "0.05" })).temperatureU).toBeCloseTo(0.05, 12);
    const fahrenheit = { temperature: "°F", temperature_uncertainty: "°F" };
    const row = await accepted({ temperature: "77", temperature_uncertainty: "0.9" }, fahrenheit);
    expect(row.temperatureU).toBeCloseTo(0.5, 12);
    expect((await accepted({ temperature_probe: "solution" })).temperatureU).toBe(0.1);
    expect((await accepted({ temperature_probe: "bath" })).temperatureU).toBe(0.3);
  });

  test("with a negative uncertainty is refused", async () => {
    expect(await refusal({ temperature_uncertainty: "-1" })).toMatchObject({ code: "bad-uncertainty" });
  });

  test("of a jacket is the less sure the further it is from room temperature: 0.5 K + 1 % of the distance", () => {
    expect(defaultTemperatureUncertainty(333.15, "jacket", false, Number.NaN, settings)).toBeCloseTo(0.9, 12);
    expect(defaultTemperatureUncertainty(273.15, "jacket", false, Number.NaN, settings)).toBeCloseTo(0.7, 12);
    expect(defaultTemperatureUncertainty(293.15, "jacket", false, Number.NaN, settings)).toBeCloseTo(0.5, 12);
  });

  test.each([
    [0.1, 0.5],
    [0.3, 0.5],
    [0.31, 1],
    [1, 1],
    [1.5, 2],
    [Number.NaN, 2],
  ])("of a clear point heated at %d K/min has the standard uncertainty %d K", (rate, u) => {
    expect(defaultTemperatureUncertainty(310, "solution", true, rate, settings)).toBe(u);
  });
});
