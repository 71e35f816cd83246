import { describe, expect, test } from "vitest";
import { type ConversionRequest, convertWithSteps } from "../../pipeline/bases/convert.ts";
import { bareVolumeDifference } from "../../pipeline/bases/hub-converter.ts";
import { hubValues } from "../../pipeline/bases/hub-values.ts";
import type { Needs, Quantity } from "../../pipeline/bases/needs.ts";
import { convert, converterOf, quantity, unitOf } from "./support.ts";

/** A molecular solute of 151.16 g/mol in water at 25 °C; densities in kg/m3. */
const needs: Needs = {
  soluteMolarMass: { ...quantity(151.163, 0.008), reference: "IUPAC 2021" },
  solventMolarMass: quantity(18.0153, 0.0004),
  solventDensityAt20C: quantity(998.2067, 0.001),
  solutionDensity: {
    kind: "additive volumes",
    apparentSoluteDensity: quantity(1200, 120),
    solventDensity: quantity(997.047, 0.001),
  },
};

const ask = (value: number, from: string, to: string, more: Partial<ConversionRequest> = {}) =>
  convertWithSteps({ value, from: unitOf(from), to: unitOf(to), needs, ...more });

describe("a conversion explained", () => {
  test("shows every equation, each property with its reference, and each assumption", () => {
    const result = convert(12.3, "mg/mL solution", "mole fraction", needs, { standardUncertainty: 0.3 });
    expect(result.steps.map((step) => step.equation)).toEqual([
      "c = value",
      "1/rho = w/rho2 + (1 - w)/rho1 at w = r/(1 + r)",
      "r = c/(rho - c)",
      "x = (r/M2)/(r/M2 + 1/M1)",
      "value = x",
    ]);
    expect(result.steps.map(({ symbol, unit }) => `${symbol} ${unit}`)).toEqual([
      "c kg/m3",
      "rho kg/m3",
      "r kg/kg",
      "x mol/mol",
      "value mole fraction",
    ]);
    const [c, rho, ratio] = result.steps.map(({ value }) => value);
    expect(ratio).toBeCloseTo((c ?? 0) / ((rho ?? 0) - (c ?? 0)), 14);
    expect(result.steps[1]?.properties.map(({ symbol }) => symbol)).toEqual(["rho2", "rho1"]);
    expect(result.steps[3]?.properties[0]).toMatchObject({ symbol: "M2", value: 151.163, reference: "IUPAC 2021" });
    expect(result.assumptions).toEqual([
      "volume of solution taken at the measuring temperature",
      "solution density by additive volumes, apparent density of the solute 1200 kg/m3, u 120 kg/m3",
    ]);
    expect(result.amplification).toBeCloseTo(1.0125, 4);
    // By hand: r = (12.3/997.047)/(1 - 12.3/1200); x = r/(r + M2/M1).
    const r = 12.3 / 997.047 / (1 - 12.3 / 1200);
    expect(result.value).toBeCloseTo(r / (r + 151.163 / 18.0153), 15);
  });

  test("gives a budget whose squares add up to the uncertainty", () => {
    const { contributions, relativeUncertainty, standardUncertainty, value } = convert(
      12.3,
      "mg/mL solution",
      "mole fraction",
      needs,
      { standardUncertainty: 0.3 },
    );
    expect(contributions.map(({ name }) => name)).toEqual([
      "reported value",
      "apparent density of the solute",
      "density of the solvent",
      "molar mass of the solute",
      "molar mass of the solvent",
    ]);
    expect(Math.hypot(...contributions.map((one) => one.contribution))).toBeCloseTo(relativeUncertainty, 15);
    expect(standardUncertainty).toBeCloseTo(value * relativeUncertainty, 15);
    expect(contributions[0]?.contribution).toBeCloseTo((0.3 / 12.3) * 1.0104 * (1 - value), 4);
    // c/rho2 / (1 - c/rho2) times 10 %: a tenth of a per cent, far below the 2.4 % of the value itself.
    expect(contributions[1]?.contribution).toBeCloseTo(-0.00103, 4);
  });

  test("a molar mass used on both ways cancels", () => {
    const uncertain = { ...needs, soluteMolarMass: quantity(151.163, 15) };
    const { contributions } = convert(0.1, "mol/kg solvent", "mole ratio", uncertain);
    expect(contributions.find(({ name }) => name === "molar mass of the solute")?.contribution).toBe(0);
    const other = convert(0.1, "mol/kg solvent", "g/100 g solvent", uncertain);
    expect(other.relativeUncertainty).toBeCloseTo(15 / 151.163, 12);
  });

  test("a logarithm carries its uncertainty as a relative one of the quantity and back", () => {
    const half = convert(-2, "log10(mol/L)", "mol/kg solvent", needs, { standardUncertainty: 0.05 });
    expect(half.contributions[0]?.relativeUncertainty).toBeCloseTo(0.05 * Math.LN10, 12);
    const back = convert(half.value, "mol/kg solvent", "ln x", needs, {
      standardUncertainty: half.standardUncertainty,
    });
    expect(back.standardUncertainty).toBeCloseTo(0.05 * Math.LN10, 3);
  });
});

describe("what cannot be converted says why", () => {
  test("a missing property is named", () => {
    const without = { solventMolarMass: needs.solventMolarMass };
    expect(ask(3, "g/L solution", "mole fraction", { needs: without })).toEqual({
      kind: "missing",
      missing: ["density of the solution", "molar mass of the solute"],
    });
    expect(ask(3, "mL solvent/g", "g/100 g solvent", { needs: {} })).toEqual({
      kind: "missing",
      missing: ["density of the solvent"],
    });
  });

  test("a bare volume at or above 20 g/L lists its readings", () => {
    expect(ask(35, "mg/mL", "mole fraction")).toEqual({ kind: "open", readings: ["mg/mL solution", "mg/mL solvent"] });
  });

  test.each([
    [0, "g/100 g solvent", /not a positive amount/],
    [-1, "mol/L", /not a positive amount/],
    [100, "% w/w", /must be below 1/],
    [1, "mole fraction", /must be below 1/],
    [0.1, "-ln x", undefined],
    [-0.1, "-ln x", /must be below 1/],
    [1300, "g/L solution", /more than this solution can hold/],
    [Number.POSITIVE_INFINITY, "g/kg solvent", /not a finite number/],
    [Number.NaN, "g/kg solvent", /not a finite number/],
  ])("%s %s", (value, unit, reason) => {
    const result = ask(value, unit, "g/100 g solvent");
    if (reason === undefined) expect(result.kind).toBe("converted");
    else expect(result).toMatchObject({ kind: "impossible", reason: expect.stringMatching(reason) });
  });
});

describe("a bare mg/mL below 20 g/L", () => {
  test("is taken per solution, says so, and carries the difference of the two readings", () => {
    const bare = convert(15, "mg/mL", "g/100 g solvent", needs);
    const perSolution = convert(15, "mg/mL solution", "g/100 g solvent", needs);
    const perSolvent = convert(15, "mg/mL solvent", "g/100 g solvent", needs);
    expect(bare.value).toBe(perSolution.value);
    expect(bare.assumptions[0]).toMatch(/taken per volume of solution/);
    const difference = Math.log(perSolution.value / perSolvent.value);
    expect(bareVolumeDifference(15, needs)).toBeCloseTo(difference, 12);
    expect(bare.contributions[1]).toMatchObject({ name: "volume of solution or of solvent", sensitivity: 1 });
    expect(bare.relativeUncertainty).toBeCloseTo(Math.hypot(difference, perSolution.relativeUncertainty), 12);
  });
});

test("a stated volume temperature goes before 20 °C and drops its assumption", () => {
  const at40 = { ...needs, solventDensityAtVolumeTemperature: quantity(992.2) };
  const cold = convert(10, "g/L solvent", "g/100 g solvent", needs);
  const warm = convert(10, "g/L solvent", "g/100 g solvent", at40);
  expect(warm.value / cold.value).toBeCloseTo(998.2067 / 992.2, 12);
  expect(cold.assumptions).toContain("volume of solvent taken at 20 °C");
  expect(warm.assumptions).toEqual([]);
});

test("a converter reads its properties anew at each call", () => {
  const density = { value: 1000, standardUncertainty: 0 };
  const converter = converterOf("g/L solvent", { solventDensityAt20C: density });
  expect(converter.toHub(10)).toBe(0.01);
  density.value = 500;
  expect(converter.toHub(10)).toBe(0.02);
});

test("the published values of a solution are left out where a property is missing", () => {
  // Saturated sucrose at 20 °C, 203.9 g/100 g water and 1332.7 kg/m3 (Antokolskaya 1964): 2.612 mol/L, x = 0.0969.
  const sucrose: Needs = {
    soluteMolarMass: quantity(342.297),
    solventMolarMass: quantity(18.015),
    solutionDensity: { kind: "measured", density: quantity(1332.7) },
  };
  const values = hubValues(2.039, sucrose);
  expect(values.molesPerLitreSolution).toBeCloseTo(2.6121, 3);
  expect(values.moleFraction).toBeCloseTo(0.09691, 5);
  expect(values.gramsPer100gSolvent).toBeCloseTo(203.9, 12);
  expect(values.milligramsPerMillilitreSolution).toBeCloseTo(894.2, 1);
  expect(hubValues(2.039, {})).toEqual({
    moleFraction: undefined,
    gramsPer100gSolvent: 203.9,
    milligramsPerMillilitreSolution: undefined,
    molesPerLitreSolution: undefined,
  });
});

test("-ln x with a standard uncertainty of 0.3 says that first order is 7 % short", () => {
  // Three-point quadrature of exp(0.3 z) by hand: SD 0.32 against 0.30.
  const { firstOrderDeviation } = convert(9, "-ln x", "mole fraction", needs, { standardUncertainty: 0.3 });
  expect(firstOrderDeviation).toBeCloseTo(0.068, 2);
  expect(convert(9, "-ln x", "mole fraction", needs, { standardUncertainty: 0.01 }).firstOrderDeviation).toBeLessThan(
    1e-3,
  );
  expect(convert(0.99, "mole fraction", "g/g solvent", needs, { standardUncertainty: 0.01 }).firstOrderDeviation).toBe(
    Number.POSITIVE_INFINITY,
  );
});

test("cautions are told in words, and only where there is cause", () => {
  expect(convert(12.3, "mg/mL solution", "g/g solvent", needs, { standardUncertainty: 0.3 }).cautions).toEqual([]);
  expect(convert(700, "mg/mL solution", "g/g solvent", needs).cautions).toEqual([
    "an error of the density reaches the mass ratio 2.7 times amplified: ask for a weighed value",
  ]);
  expect(convert(9, "-ln x", "g/g solvent", needs, { standardUncertainty: 0.3 }).cautions).toEqual([
    "first-order uncertainty is too small by about 6.8 %: the conversion bends within it",
  ]);
  expect(convert(0.99, "w", "g/g solvent", needs, { standardUncertainty: 0.01 }).cautions).toEqual([
    "the uncertainty of the value reaches values that are impossible",
  ]);
});

test("quantities given by the caller are never changed", () => {
  const freeze = (given: Quantity) => Object.freeze({ ...given });
  const frozen = Object.freeze({
    soluteMolarMass: freeze(quantity(151.163, 0.008)),
    solventMolarMass: freeze(quantity(18.0153, 0.0004)),
  });
  expect(() => convert(0.01, "mole fraction", "g/100 g solvent", frozen)).not.toThrow();
});
