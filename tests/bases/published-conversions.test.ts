import { describe, expect, test } from "vitest";
import type { Needs } from "../../pipeline/bases/needs.ts";
import { convert, quantity, relativeDifference } from "./support.ts";

const water = quantity(18.015);
const molarMassNaCl = quantity(58.443);

function withDensity(soluteMolarMass: number, density: number): Needs {
  return {
    soluteMolarMass: quantity(soluteMolarMass),
    solventMolarMass: water,
    solutionDensity: { kind: "measured", density: quantity(density) },
  };
}

// Sodium chloride solutions: mass %, g/L and mol/L at 20 °C, density at 20 °C [kg/m3].
// Poradnik fizykochemiczny, WNT Warszawa 1974, as given at fizyka.umk.pl/~lab2/tables/NaCl.html.
const sodiumChloride1974: readonly (readonly [number, number, number, number])[] = [
  [1, 10.053, 0.172, 1005.3],
  [2, 20.25, 0.3464, 1012.2],
  [4, 41.072, 0.7026, 1026.8],
  [6, 62.478, 1.0688, 1041.3],
  [8, 84.472, 1.4451, 1055.9],
  [10, 107.07, 1.8317, 1070.7],
  [12, 130.284, 2.2288, 1085.7],
  [14, 154.128, 2.6367, 1100.9],
  [16, 178.592, 3.0553, 1116.2],
  [18, 203.742, 3.4855, 1131.9],
  [20, 229.56, 3.9272, 1147.8],
  [22, 256.08, 4.3808, 1164.0],
  [24, 283.296, 4.8465, 1180.4],
  [26, 311.272, 5.3251, 1197.2],
];

describe("sodium chloride in water, Poradnik fizykochemiczny 1974", () => {
  test.each(sodiumChloride1974)("%s %% w/w is %s g/L and %s mol/L", (massPercent, gramsPerLitre, molar, density) => {
    const needs = withDensity(58.443, density);
    // The table's own g/L differ from mass % times density by up to 0.05 %, its mol/L by up to 0.024 %.
    expect(relativeDifference(convert(massPercent, "% w/w", "g/L solution", needs).value, gramsPerLitre)).toBeLessThan(
      5e-4,
    );
    expect(relativeDifference(convert(massPercent, "% w/w", "mol/L", needs).value, molar)).toBeLessThan(3e-4);
    expect(relativeDifference(convert(gramsPerLitre, "g/L solution", "% w/w", needs).value, massPercent)).toBeLessThan(
      5e-4,
    );
  });
});

// Density [kg/m3], mass fraction, mole fraction, kg/m3, mol/m3, kg per kg solvent, kg per m3 solvent (water of 998.2 kg/m3).
// en.wikipedia.org, User:Jzana/Sodium_Chloride-Water_mixture. Its last row (saturated, 26.4 %) is left out here: the density
// printed there, 1197.78, contradicts its own 315.53 kg/m3 by 0.2 %.
const sodiumChlorideAllUnits: readonly (readonly [number, number, number, number, number, number, number])[] = [
  [1005.34, 0.01, 0.0031, 10.05, 172.0, 0.0101, 10.08],
  [1026.8, 0.04, 0.0127, 41.07, 702.8, 0.0417, 41.59],
  [1055.89, 0.08, 0.0261, 84.47, 1445.4, 0.087, 86.8],
  [1085.66, 0.12, 0.0403, 130.28, 2229.2, 0.1364, 136.12],
  [1116.21, 0.16, 0.0555, 178.59, 3055.9, 0.1905, 190.13],
  [1147.79, 0.2, 0.0715, 229.56, 3927.9, 0.25, 249.55],
  [1180.4, 0.24, 0.0887, 283.3, 4847.4, 0.3158, 315.22],
  [1197.07, 0.26, 0.0977, 311.26, 5325.9, 0.3514, 350.72],
];

describe("sodium chloride in water on every basis", () => {
  test.each(sodiumChlorideAllUnits)(
    "at %s kg/m3 mass fraction %s agrees on all bases",
    (density, w, x, massConcentration, amountConcentration, ratio, perSolventVolume) => {
      const needs = { ...withDensity(58.443, density), solventDensityAt20C: quantity(998.2) };
      const to = (unit: string) => convert(w, "mass fraction", unit, needs).value;
      expect(Math.abs(to("mole fraction") - x)).toBeLessThan(2e-4); // the source's mole fractions drift by 0.00016
      expect(relativeDifference(to("kg/m3 solution"), massConcentration)).toBeLessThan(5e-4);
      expect(relativeDifference(to("mol/m3 solution"), amountConcentration)).toBeLessThan(5e-4);
      expect(Math.abs(to("g/g solvent") - ratio)).toBeLessThan(5e-5);
      expect(relativeDifference(to("g/L solvent"), perSolventVolume)).toBeLessThan(5e-4);
    },
  );
});

// Mass %, density [kg/m3], molar mass as published, published molarity.
const reagents: readonly (readonly [string, number, number, number, number])[] = [
  // A laboratory notes page on concentrated reagents (LaboratoryNotes).
  ["formic acid", 95, 1220, 46.03, 25.179],
  ["acetic acid", 99.6, 1050, 60.05, 17.4],
  ["hydrochloric acid 36 %", 36, 1176, 36.46, 11.61],
  ["hydrochloric acid 37 %", 37, 1200, 36.46, 12.178],
  ["nitric acid", 70, 1413, 63.01, 15.698],
  ["phosphoric acid", 85, 1685, 98.0, 14.615],
  ["sulfuric acid", 95, 1840, 98.07, 17.822],
  ["potassium hydroxide", 45, 1456, 56.11, 11.677],
  ["sodium hydroxide", 50, 1515, 40.0, 18.938],
  // Salt Lake Metals, worked examples.
  ["ammonia", 29, 900, 17.0, 15.35],
  ["perchloric acid", 71, 1600, 100.46, 11.3],
  ["sodium hydroxide 51 %", 51, 1520, 40.0, 19.4],
  ["sulfuric acid 96 %", 96, 1840, 98.08, 18.0],
];

// CRC Handbook, as quoted by a page of Calculator.City: sucrose, mass %, density [kg/m3] and g/L.
test.each([
  [10, 1038.1, 103.81],
  [20, 1081.0, 216.2],
  [30, 1127.0, 338.1],
  [40, 1176.4, 470.56],
  [50, 1229.6, 614.8],
])("sucrose %s %% w/w at %s kg/m3 is %s g/L", (massPercent, density, gramsPerLitre) => {
  const needs = withDensity(342.3, density);
  expect(convert(massPercent, "% w/w", "g/L solution", needs).value).toBeCloseTo(gramsPerLitre, 9);
  expect(convert(gramsPerLitre, "g/L solution", "100 w", needs).value).toBeCloseTo(massPercent, 9);
});

describe("published molarities of reagents", () => {
  test.each(reagents)(
    "%s, %s %% w/w at %s kg/m3, has the published molarity",
    (_, massPercent, density, molarMass, molar) => {
      const needs = withDensity(molarMass, density);
      // Half a unit of the last of three printed digits is up to 0.2 % here.
      expect(relativeDifference(convert(massPercent, "% w/w", "mol/L", needs).value, molar)).toBeLessThan(2e-3);
    },
  );

  // Shifted and wrong rows in circulation (pages of Protocols Online and ScienceAQ): the program must not agree with them.
  test.each([
    ["hydrochloric acid with the values of another acid", 98, 1220, 36.46, 25.9],
    ["nitric acid with the values of hydrochloric acid", 36, 1180, 63.01, 11.6],
    ["perchloric acid with the values of nitric acid", 70, 1420, 100.46, 15.7],
    ["hydrochloric acid divided by its density", 38, 1180, 36.46, 10.47],
  ])("%s is not reproduced", (_, massPercent, density, molarMass, molar) => {
    const needs = withDensity(molarMass, density);
    expect(relativeDifference(convert(massPercent, "% w/w", "mol/L", needs).value, molar)).toBeGreaterThan(0.1);
  });
});

describe("formulas printed with the CRC Handbook table Aqueous Solubility of Inorganic Compounds at Various Temperatures", () => {
  // w2 = m2/(m1 + m2), density in g/cm3, M1 = 18.015 g/mol.
  const rho = 1.1978;
  test.each([0.001, 0.0264, 0.264, 0.5, 0.9])("hold for w2 = %s", (w2) => {
    const needs = withDensity(58.443, 1000 * rho);
    const M2 = 58.443;
    const M1 = 18.015;
    const to = (unit: string) => convert(w2, "mass fraction", unit, needs).value;
    expect(to("mol/L")).toBeCloseTo((1000 * rho * w2) / M2, 11);
    expect(to("mol/kg solvent")).toBeCloseTo((1000 * w2) / (M2 * (1 - w2)), 10);
    expect(to("mole fraction")).toBeCloseTo(w2 / M2 / (w2 / M2 + (1 - w2) / M1), 13);
    expect(to("g/100 g solvent")).toBeCloseTo((100 * w2) / (1 - w2), 10);
  });
});

describe("single published conversions", () => {
  test("the CRC Handbook (98th ed.) gives NaCl at 25 °C as 26.45 mass % and 6.153 mol/kg", () => {
    const needs = { soluteMolarMass: molarMassNaCl };
    expect(convert(6.153, "mol/kg", "% w/w", needs).value).toBeCloseTo(26.45, 2);
    expect(convert(26.45, "% w/w", "mol/kg solvent", needs).value).toBeCloseTo(6.153, 2);
  });

  // en.wikipedia.org, User:Jzana/Sodium_Chloride-Water_mixture, saturated row: 0.358 (cut, not rounded) and 5398.9 mol/m3.
  test("saturated NaCl at 20 °C, 26.4 mass %, is 35.8 g/100 g water, x = 0.0994 and 5.399 mol/L within the row's own 0.25 %", () => {
    const needs = withDensity(58.443, 1197.78);
    const to = (unit: string) => convert(26.4, "% w/w", unit, needs).value;
    expect(relativeDifference(to("g/100 g solvent"), 35.8)).toBeLessThan(2.5e-3);
    expect(relativeDifference(to("mole fraction"), 0.0994)).toBeLessThan(2.5e-3);
    expect(relativeDifference(to("mol/L"), 5.3989)).toBeLessThan(2.5e-3);
  });

  // Antokolskaya 1964, as reprinted in F. A. Mohos, Confectionery and Chocolate Engineering, 2010, table A2.2; M 342.297.
  // Published are g/100 g and the density; the other numbers were computed from them outside this program.
  test("saturated sucrose at 20 °C is 203.9 g/100 g water, 67.09 mass % and, at 1332.7 kg/m3, 2.612 mol/L", () => {
    const needs = withDensity(342.297, 1332.7);
    expect(convert(203.9, "g/100 g solvent", "% w/w", needs).value).toBeCloseTo(67.09, 2);
    expect(convert(203.9, "g/100 g solvent", "mol/L", needs).value).toBeCloseTo(2.6121, 3);
    expect(convert(203.9, "g/100 g solvent", "mol/kg solvent", needs).value).toBeCloseTo(5.9568, 4);
    expect(convert(203.9, "g/100 g solvent", "mole fraction", needs).value).toBeCloseTo(0.09691, 5);
  });

  test("KNO3 at 20 °C: 24 mass % is 31.6 g/100 g water (school worked example, mail.s5g.ru)", () => {
    expect(convert(24, "% w/w", "g/100 g solvent", {}).value).toBeCloseTo(31.58, 2);
    expect(convert(31.6, "g/100 g solvent", "% w/w", {}).value).toBeCloseTo(24.01, 2);
  });

  // F. J. Millero et al., Deep-Sea Res. I 55 (2008) 50-72; from memory, not verified against the source.
  test("reference seawater of 35.16504 g/kg solution has the molality 1.1605813 mol/kg", () => {
    const needs = { soluteMolarMass: quantity(31.4038218) };
    expect(convert(35.16504, "g/kg solution", "mol/kg solvent", needs).value).toBeCloseTo(1.1605813, 6);
  });

  // IUPAC-NIST Solubility Database, system 37_107 (Masterton and Gendrano 1966); compilers take 1 dm3 as 874 g.
  test("water in benzene at 25 °C: 0.0347 mol/L is 0.0715 mass % and x = 3.09e-3", () => {
    const needs: Needs = {
      soluteMolarMass: quantity(18.015),
      solventMolarMass: quantity(78.11),
      solutionDensity: { kind: "measured", density: quantity(874) },
    };
    expect(convert(0.0347, "mol/L", "% w/w", needs).value).toBeCloseTo(0.0715, 4);
    expect(convert(0.0347, "mol/L", "mole fraction", needs).value).toBeCloseTo(0.00309, 5);
    expect(convert(Math.log10(0.0347), "log10(mol/L)", "1000 x", needs).value).toBeCloseTo(3.094, 3);
  });
});
