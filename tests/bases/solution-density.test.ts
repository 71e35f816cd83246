import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { describe, expect, test } from "vitest";
import {
  apparentDensityFromSolid,
  concentrationAmplification,
  concentrationSlope,
  densityAt,
  massConcentration,
  massRatioAtConcentration,
  type SolutionDensity,
} from "../../pipeline/bases/solution-density.ts";
import { quantity } from "./support.ts";

/** Kell 1975, J. Chem. Eng. Data 20, 97-105: water at 20 °C [kg/m3]. */
const water20 = 998.2041;

/** Laliberté 2009, J. Chem. Eng. Data 54, 1725-1760: apparent density of NaCl at 20 °C. */
function sodiumChlorideDensity(w: number): number {
  const [c0, c1, c2, c3, c4, t] = [
    -0.00324112223655149, 0.0636354335906616, 1.01371399467365, 0.0145951015210159, 3317.34854426537, 20,
  ];
  const apparent = ((c0 * w + c1) * Math.exp(1e-6 * (t + c4) ** 2)) / (w + c2 + c3 * t);
  return 1 / ((1 - w) / water20 + w / apparent);
}

const laliberte: SolutionDensity = {
  kind: "density function",
  name: "Laliberté and Cooper",
  density: sodiumChlorideDensity,
  relativeUncertainty: 0.001,
  maxMassFraction: 0.2659,
};
const additive: SolutionDensity = {
  kind: "additive volumes",
  apparentSoluteDensity: quantity(1200, 120),
  solventDensity: quantity(998.2),
};
const measured: SolutionDensity = { kind: "measured", density: quantity(1100, 1) };

describe.each([
  ["measured", measured],
  ["additive volumes", additive],
  ["density function", laliberte],
] as const)("%s", (_, model) => {
  test.each([1e-9, 1e-6, 1e-3, 0.01, 0.1, 0.3, 0.36])("r = %s comes back from its concentration to 1e-13", (r) => {
    const c = massConcentration(model, r);
    expect(Math.abs(massRatioAtConcentration(model, c) / r - 1)).toBeLessThan(1e-13);
  });

  test("c = w rho(w), and its slope is the derivative of ln c by ln w", () => {
    const w = 0.2;
    const concentration = (fraction: number) => massConcentration(model, fraction / (1 - fraction));
    expect(concentration(w)).toBeCloseTo(w * densityAt(model, w), 9);
    const numeric =
      (Math.log(concentration(w * 1.0001)) - Math.log(concentration(w / 1.0001))) / (2 * Math.log(1.0001));
    expect(concentrationSlope(model, w)).toBeCloseTo(numeric, 6);
  });

  test("nothing holds more solute than there is solution", () => {
    expect(massRatioAtConcentration(model, 2000)).toBeNaN();
  });
});

// Poradnik fizykochemiczny 1974: sodium chloride at 20 °C, mass % and g/L.
test.each([
  [1, 10.053],
  [10, 107.07],
  [20, 229.56],
  [26, 311.272],
])("Laliberté's density gives NaCl %s mass %% from %s g/L to 0.1 %%", (massPercent, gramsPerLitre) => {
  const r = massRatioAtConcentration(laliberte, gramsPerLitre);
  expect(Math.abs((100 * r) / (1 + r) / massPercent - 1)).toBeLessThan(1e-3);
});

test("a density function says nothing beyond its range", () => {
  expect(densityAt(laliberte, 0.27)).toBeNaN();
  expect(massRatioAtConcentration(laliberte, 340)).toBeNaN();
});

// CRC Handbook, 102nd ed., concentrative properties of aqueous solutions at 20 °C: sucrose, mass % and kg/m3; solid 1581 kg/m3.
test.each([
  [10, 1038.1],
  [20, 1081.0],
  [40, 1176.5],
  [60, 1286.4],
])("additive volumes give sucrose %s mass %% its %s kg/m3 within the stated uncertainty", (massPercent, density) => {
  const apparentSoluteDensity = apparentDensityFromSolid(1581);
  const model: SolutionDensity = { kind: "additive volumes", apparentSoluteDensity, solventDensity: quantity(998.2) };
  const w = massPercent / 100;
  const estimated = densityAt(model, w);
  const u =
    (((w * estimated) / apparentSoluteDensity.value) * apparentSoluteDensity.standardUncertainty) /
    apparentSoluteDensity.value;
  expect(Math.abs(estimated / density - 1)).toBeLessThan(2 * u);
});

test("the apparent density is 0.93 of the solid's, u 6 %, in water 9 %, and 1200, u 120, where that is unknown", () => {
  expect(apparentDensityFromSolid(1000)).toMatchObject({ value: 930, standardUncertainty: 55.8 });
  expect(apparentDensityFromSolid(1000, true).standardUncertainty).toBeCloseTo(83.7, 12);
  expect(apparentDensityFromSolid(undefined)).toMatchObject({ value: 1200, standardUncertainty: 120 });
});

test("the amplification is rho/(rho - c)", () => {
  const c = massConcentration(measured, 1.5);
  expect(concentrationAmplification(1.5)).toBeCloseTo(1100 / (1100 - c), 12);
});

const tabulatedPath = fileURLToPath(
  new URL("../../../shared/reference/properties/solution_density_checks.csv", import.meta.url),
);

/**
 * CRC Handbook of Chemistry and Physics, 102nd ed. (2021), concentrative properties of aqueous solutions, at 20 °C.
 * Densities of the solids [kg/m3] from CRC-derived constants in the data files of the chemicals library (MIT).
 */
describe.skipIf(!existsSync(tabulatedPath))(
  "additive volumes against the CRC table (skipped where ../shared is absent)",
  () => {
    const rows = existsSync(tabulatedPath)
      ? (parse(readFileSync(tabulatedPath), { columns: true }) as Record<string, string>[])
      : [];
    const errors = (solute: string, solid: number) =>
      rows
        .filter((row) => row.solute === solute)
        .map((row) => {
          const w = Number(row.mass_percent) / 100;
          const rho2 = apparentDensityFromSolid(solid);
          const rho = densityAt(
            { kind: "additive volumes", apparentSoluteDensity: rho2, solventDensity: quantity(998.2) },
            w,
          );
          const u = (w * rho * rho2.standardUncertainty) / rho2.value ** 2;
          return { error: rho / Number(row.rho_kg_m3) - 1, u };
        });

    test.each([
      ["Sucrose", 1580.5],
      ["Urea", 1323],
      ["Citric acid", 1665],
      ["Oxalic acid", 1900],
      ["D-Mannitol", 1489],
    ])("%s lies within the expanded uncertainty (k = 2) of 6 %% on its apparent density", (solute, solid) => {
      const found = errors(solute, solid);
      expect(found.length).toBeGreaterThanOrEqual(5);
      for (const { error, u } of found) expect(Math.abs(error)).toBeLessThan(2 * u);
    });

    const salts: readonly (readonly [string, number])[] = [
      ["Sodium chloride", 2170],
      ["Potassium chloride", 1988],
      ["Potassium nitrate", 2105],
      ["Sodium nitrate", 2261],
      ["Ammonium chloride", 1519],
      ["Ammonium sulfate", 1770],
      ["Sodium sulfate", 2700],
      ["Potassium sulfate", 2660],
      ["Magnesium sulfate", 2660],
      ["Copper(II) sulfate", 3600],
      ["Calcium chloride", 2150],
      ["Potassium bromide", 2740],
      ["Potassium iodide", 3120],
      ["Sodium carbonate", 2540],
    ];

    test("14 salts lie within the expanded uncertainty (k = 2) of 4 % on the density of the solution in at least 95 % of the rows", () => {
      const found = salts.flatMap(([solute, solid]) => errors(solute, solid));
      const inside = found.filter(({ error }) => Math.abs(error) < 2 * 0.04).length;
      expect(found.length).toBeGreaterThan(150);
      expect(inside / found.length).toBeGreaterThanOrEqual(0.95);
    });
  },
);
