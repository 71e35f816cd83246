import { describe, expect, test } from "vitest";
import {
  alcoholByVolume,
  ethanolWaterDensity,
  ethanolWaterDensityAt,
  massFractionFromAlcoholByVolume,
} from "../../pipeline/properties/ethanol-water.ts";
import { solutionDensityModel } from "../../pipeline/properties/solution-density-model.ts";
import { sucroseSolutionDensity } from "../../pipeline/properties/sucrose-density.ts";
import { waterDensityKellRecast } from "../../pipeline/properties/water-density.ts";
import { substance } from "./read-tables.ts";

const model = (solute: string, temperatureK: number) => {
  const found = solutionDensityModel(substance(solute), substance("water"), temperatureK);
  if (found === undefined) throw new Error(`no density of ${solute} at ${temperatureK} K`);
  return found;
};

describe("Salts in water by their apparent-density coefficients", () => {
  // CRC Handbook of Chemistry and Physics, 102nd ed., aqueous solutions at 20 °C: mass %, kg/m3.
  test.each([
    ["sodium chloride", 1, 1005.3, 0.3],
    ["sodium chloride", 5, 1034.0, 0.3],
    ["sodium chloride", 10, 1070.7, 0.3],
    ["sodium chloride", 15, 1108.5, 0.6],
    ["sodium chloride", 20, 1147.8, 0.6],
    ["sodium chloride", 26, 1197.2, 0.6],
    ["potassium nitrate", 10, 1062.7, 0.3],
    ["potassium nitrate", 24, 1162.3, 0.3],
    ["ammonium sulfate", 20, 1115.4, 0.7],
    ["copper(II) sulfate", 8, 1084.2, 0.5],
    ["copper(II) sulfate", 15, 1166.9, 1.8],
  ])("%s %f %% at 20 °C is %f kg/m3", (solute, massPercent, handbook, tolerance) => {
    const { density, relativeUncertainty } = model(solute, 293.15);
    const deviation = Math.abs(density(massPercent / 100) - handbook);
    expect(deviation).toBeLessThan(tolerance);
    expect(deviation).toBeLessThan(3 * relativeUncertainty * handbook);
  });

  test("the density at infinite dilution is that of water", () => {
    expect(model("sodium chloride", 298.15).density(0)).toBeCloseTo(997.0449, 3);
  });

  test("no density is given outside the fitted temperatures, for an unlisted salt or for another solvent", () => {
    const salt = substance("iron(II) sulfate");
    expect(solutionDensityModel(salt, substance("water"), 293.15)).toBeDefined();
    expect(solutionDensityModel(salt, substance("water"), 323.15)).toBeUndefined();
    expect(solutionDensityModel(substance("sodium chloride"), substance("methanol"), 293.15)).toBeUndefined();
    expect(solutionDensityModel(substance("paracetamol"), substance("water"), 293.15)).toBeUndefined();
  });
});

describe("Sucrose in water", () => {
  // CRC Handbook of Chemistry and Physics, 102nd ed., at 20 °C: mass %, kg/m3.
  test.each([
    [5, 1017.8],
    [20, 1081.0],
    [40, 1176.5],
    [60, 1286.4],
    [80, 1411.7],
  ])("%f %% at 20 °C is %f kg/m3 within 0.05 %", (massPercent, handbook) => {
    expect(Math.abs(model("sucrose", 293.15).density(massPercent / 100) / handbook - 1)).toBeLessThan(5e-4);
  });

  test("is water without sucrose, and refuses what lies outside its range", () => {
    expect(sucroseSolutionDensity(0, 35)).toBe(waterDensityKellRecast(35));
    expect(() => sucroseSolutionDensity(0.9, 20)).toThrow(RangeError);
    expect(() => sucroseSolutionDensity(0.5, 120)).toThrow(RangeError);
  });
});

describe("Ethanol and water by the International Alcoholometric Tables", () => {
  // OIML R 22, table of densities at 20 °C, % vol: kg/m3.
  test.each([
    [90, 829.18],
    [91, 825.83],
    [92, 822.39],
    [93, 818.85],
    [94, 815.18],
    [95, 811.38],
    [96, 807.42],
    [97, 803.27],
    [98, 798.9],
    [99, 794.25],
    [100, 789.24],
  ])("%f %% vol has %f kg/m3 at 20 °C", (percentVolume, published) => {
    const massFraction = massFractionFromAlcoholByVolume(percentVolume / 100);
    expect(Math.abs(ethanolWaterDensity(massFraction, 20) - published)).toBeLessThan(0.0055);
  });

  test("95 % vol is 92.41 % by mass", () => {
    // OIML R 22 (European Pharmacopoeia, alcoholometric tables: 92.41).
    expect(Math.abs(massFractionFromAlcoholByVolume(0.95) * 100 - 92.41)).toBeLessThan(0.005);
  });

  test("water of the tables is 998.2012 kg/m3 at 20 °C, not the 998.2067 of the CIPM formula", () => {
    expect(ethanolWaterDensity(0, 20)).toBeCloseTo(998.20123, 8);
  });

  test("mass fraction and strength by volume are inverse to each other", () => {
    for (let percent = 0; percent <= 100; percent += 2.5) {
      expect(alcoholByVolume(massFractionFromAlcoholByVolume(percent / 100))).toBeCloseTo(percent / 100, 9);
    }
  });

  // The formula of OIML R 22 evaluated in three independent public programs: w, °C, kg/m3.
  test.each([
    [0.5, 10, 921.589],
    [0.5, 25, 909.77],
    [0.5, 40, 897.44],
    [0.2, 25, 966.351],
    [1, 25, 784.954],
  ])("w = %f at %f °C is %f kg/m3", (massFraction, t, expected) => {
    expect(Math.abs(ethanolWaterDensity(massFraction, t) - expected)).toBeLessThan(0.001);
  });

  test("refuses what lies outside its range", () => {
    expect(() => ethanolWaterDensity(1.1, 20)).toThrow(RangeError);
    expect(() => ethanolWaterDensity(0.5, 60)).toThrow(RangeError);
    expect(() => massFractionFromAlcoholByVolume(-0.1)).toThrow(RangeError);
    expect(ethanolWaterDensityAt(0.5, 330)).toBeUndefined();
  });
});
