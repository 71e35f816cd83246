import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { describe, expect, test } from "vitest";
import {
  apparentDensityFromLiquid,
  apparentDensityFromSolid,
  densityAt,
  type SolutionDensity,
} from "../../pipeline/bases/solution-density.ts";
import { liquidDensity } from "../../pipeline/properties/liquid-density.ts";
import { solutionDensityModel } from "../../pipeline/properties/solution-density-model.ts";
import { substance } from "./read-tables.ts";

/**
 * Estimated against tabulated densities: how often the error lies within one and within two stated standard
 * uncertainties. A stated standard uncertainty should cover about 68 % and 95 %; more is honest, much less is not.
 */

const reference = (name: string) => fileURLToPath(new URL(`../../../shared/reference/${name}`, import.meta.url));
const files = {
  at20: reference("properties/solution_density_checks.csv"),
  at25: reference("properties/solution_density_25C.csv"),
  sucrose: reference("solubility/02b_saturated_sucrose_density.csv"),
  salt: reference("solubility/05a_nacl_density_molarity_table.csv"),
};
const absent = Object.values(files).filter((file) => !existsSync(file));
const rowsOf = (file: string) =>
  absent.length > 0 ? [] : (parse(readFileSync(file), { columns: true }) as Record<string, string>[]);

const water = substance("water");

interface Check {
  /** Estimated/tabulated - 1. */
  readonly error: number;
  /** Relative standard uncertainty stated of the estimate. */
  readonly u: number;
}

/** Percent of the errors within k stated standard uncertainties, and the largest of them in percent. */
function coverage(checks: readonly Check[]) {
  const within = (k: number) =>
    Math.round((100 * checks.filter(({ error, u }) => Math.abs(error) <= k * u).length) / checks.length);
  const worst = Math.max(...checks.map(({ error }) => 100 * Math.abs(error)));
  return { n: checks.length, once: within(1), twice: within(2), worst: Number(worst.toPrecision(2)) };
}

const tabulated = (solute: string) => rowsOf(files.at20).filter((row) => row.solute === solute);

/** Additive volumes at 20 °C with an apparent density, against the rows of a solute. */
function additive(solute: string, apparent: SolutionDensity & { kind: "additive volumes" }): Check[] {
  const { value, standardUncertainty } = apparent.apparentSoluteDensity;
  return tabulated(solute).flatMap((row) => {
    const w = Number(row.mass_percent) / 100;
    if (w > 0.999) return [];
    const rho = densityAt(apparent, w);
    const ofApparent = (w * rho * standardUncertainty) / value ** 2;
    return [
      { error: rho / Number(row.rho_kg_m3) - 1, u: Math.hypot(ofApparent, apparent.modelRelativeUncertainty ?? 0) },
    ];
  });
}

const at20 = liquidDensity(water, 293.15) ?? { value: Number.NaN, standardUncertainty: 0 };
const published = [
  ...["Sodium chloride", "Potassium chloride", "Potassium nitrate", "Sodium nitrate", "Ammonium chloride"],
  ...["Ammonium sulfate", "Sodium sulfate", "Potassium sulfate", "Magnesium sulfate", "Copper(II) sulfate"],
  ...["Calcium chloride", "Potassium bromide", "Potassium iodide", "Sodium carbonate"],
];
const molecules = ["Sucrose", "Urea", "Citric acid", "Oxalic acid", "D-Mannitol"];
const liquids = [
  ...["Ethanol", "Methanol", "1-Propanol", "2-Propanol", "Acetone", "Glycerol", "Acetic acid", "1,2-Ethanediol"],
];

// CRC Handbook of Chemistry and Physics, 102nd ed. (2021), concentrative properties of aqueous solutions at 20 °C.
describe.skipIf(absent.length > 0)(`solution densities at 20 °C (skipped without ${absent.join(", ")})`, () => {
  const ofModel = (solute: string, temperatureK: number) =>
    solutionDensityModel(substance(solute), water, temperatureK);

  test("by published coefficients (14 salts, sucrose): 85 % within u, 99 % within 2 u, none off by 0.2 %", () => {
    const checks = [...published, "Sucrose"].flatMap((solute) => {
      const model = ofModel(solute, 293.15);
      return tabulated(solute).flatMap((row): Check[] => {
        const w = Number(row.mass_percent) / 100;
        if (model === undefined || w > model.maxMassFraction) return [];
        return [{ error: model.density(w) / Number(row.rho_kg_m3) - 1, u: model.relativeUncertainty }];
      });
    });
    expect(coverage(checks)).toEqual({ n: 177, once: 85, twice: 99, worst: 0.18 });
  });

  test("of molecular solids by additive volumes: 0.93 of the solid's density with u 9 % covers 68 % once, all twice", () => {
    const checks = (inWater: boolean) =>
      molecules.flatMap((solute) =>
        additive(solute, {
          kind: "additive volumes",
          apparentSoluteDensity: apparentDensityFromSolid(substance(solute).solidDensity, inWater),
          solventDensity: at20,
        }),
      );
    expect(coverage(checks(true))).toEqual({ n: 60, once: 68, twice: 100, worst: 4.9 });
    // With the 6 % that hold for other solvents it would be covered once in 3 % of the cases: hence 9 % in water.
    expect(coverage(checks(false))).toMatchObject({ once: 3, twice: 100 });
    // The bias behind it: the tabulated densities are never below the estimate by additive volumes.
    expect(checks(true).every(({ error }) => error < 1e-3)).toBe(true);
  });

  test("of salts without coefficients by additive volumes and 4 % on the density: 89 % once, 97 % twice", () => {
    const checks = published.flatMap((solute) =>
      additive(solute, {
        kind: "additive volumes",
        apparentSoluteDensity: apparentDensityFromSolid(substance(solute).solidDensity, true),
        solventDensity: at20,
        modelRelativeUncertainty: 0.04,
      }),
    );
    const found = coverage(checks);
    expect(found).toMatchObject({ n: 158 });
    expect(found.once).toBeGreaterThanOrEqual(89);
    expect(found.twice).toBeGreaterThanOrEqual(97);
  });

  test("of liquids by additive volumes with their own density, u 8 %: 74 % once, all twice", () => {
    const checks = liquids.flatMap((solute) => {
      const own = liquidDensity(substance(solute), 293.15);
      if (own === undefined) return [];
      const apparentSoluteDensity = apparentDensityFromLiquid(own);
      return additive(solute, { kind: "additive volumes", apparentSoluteDensity, solventDensity: at20 });
    });
    expect(coverage(checks)).toEqual({ n: 119, once: 74, twice: 100, worst: 3.6 });
  });

  test("every one of the 343 rows is used by one of these", () => {
    const solutes = new Set([...published, ...molecules, ...liquids]);
    const known = rowsOf(files.at20).filter(({ solute = "" }) => solutes.has(solute));
    expect([known.length, rowsOf(files.at20).length]).toEqual([343, 343]);
  });

  // Pitzer, Peiper, Busey, J. Phys. Chem. Ref. Data 13 (1984) 1, from memory, not verified.
  test("of sodium chloride at 25 °C lie within the stated 0.05 % of 8 published values", () => {
    const checks = rowsOf(files.at25)
      .filter(({ system, rho_memory }) => system === "NaCl(aq)" && rho_memory !== "")
      .map((row): Check => {
        const model = ofModel("sodium chloride", 298.15);
        const rho = model?.density(Number(row.mass_fraction)) ?? Number.NaN;
        return { error: rho / Number(row.rho_memory) - 1, u: model?.relativeUncertainty ?? Number.NaN };
      });
    expect(coverage(checks)).toEqual({ n: 8, once: 100, twice: 100, worst: 0.049 });
  });

  // The other rows at 25 °C were computed from the very equations: they prove the coefficients, not the physics.
  test("of six solutes at 25 °C agree with an independent evaluation of the same equations to 0.01 kg/m3", () => {
    const names: Readonly<Record<string, string>> = {
      "NaCl(aq)": "sodium chloride",
      "KCl(aq)": "potassium chloride",
      "KNO3(aq)": "potassium nitrate",
      "(NH4)2SO4(aq)": "ammonium sulfate",
      "NH4Cl(aq)": "ammonium chloride",
      "sucrose(aq)": "sucrose",
    };
    const rows = rowsOf(files.at25).filter(({ system = "" }) => names[system] !== undefined);
    expect(rows).toHaveLength(35);
    for (const { system = "", mass_fraction, rho_model } of rows) {
      const found = ofModel(names[system] ?? "", 298.15)?.density(Number(mass_fraction)) ?? Number.NaN;
      expect(Math.abs(found - Number(rho_model)), `${system} ${mass_fraction}`).toBeLessThan(0.01);
    }
  });

  // Poradnik fizykochemiczny, WNT Warszawa 1974.
  test("of sodium chloride at 20 °C lie within the stated 0.05 % of a second table, all 14 rows", () => {
    const model = ofModel("sodium chloride", 293.15);
    const checks = rowsOf(files.salt).map((row): Check => {
      const rho = model?.density(Number(row.mass_percent) / 100) ?? Number.NaN;
      return { error: rho / Number(row.density_20C_kg_m3) - 1, u: model?.relativeUncertainty ?? Number.NaN };
    });
    expect(coverage(checks)).toEqual({ n: 14, once: 100, twice: 100, worst: 0.045 });
  });

  // Antokolskaya 1964, as reprinted in F. A. Mohos, Confectionery and Chocolate Engineering, 2010, table A2.2.
  test("of saturated sucrose: the table prints densities of the cooled syrup, an even 0.25 % above the formula", () => {
    const rows = rowsOf(files.sucrose);
    expect(rows).toHaveLength(21);
    const errorAt = (row: Record<string, string>, temperatureK: number) => {
      const rho = ofModel("sucrose", temperatureK)?.density(Number(row.mass_percent_derived) / 100) ?? Number.NaN;
      return 100 * (rho / Number(row.density_kg_m3) - 1);
    };
    // Read at the temperature of saturation the formula would miss the table by up to 3.6 %, growing with temperature;
    // read at 20 °C by an even 0.25 %: the densities are those at 20 °C. Only the row at 20 °C is a check of physics,
    // and there the two references differ by five times the 0.05 % stated, which rests on the CRC table alone.
    const hot = errorAt(rows.at(-1) ?? {}, 373.15);
    expect(hot).toBeCloseTo(-3.59, 2);
    const standOut = new Set(["25", "30"]); // 0.63 and 0.45 % above: these two rows leave the table's own course
    const cooled = rows.filter(({ T_C = "" }) => !standOut.has(T_C)).map((row) => errorAt(row, 293.15));
    expect(cooled).toHaveLength(19);
    expect(Math.min(...cooled)).toBeGreaterThan(-0.27);
    expect(Math.max(...cooled)).toBeLessThan(-0.18);
    expect(errorAt(rows.find(({ T_C }) => T_C === "20") ?? {}, 293.15)).toBeCloseTo(-0.249, 3);
  });
});
