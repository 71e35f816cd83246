import { existsSync, readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import { describe, expect, test } from "vitest";
import { buildTables } from "../../datasets/properties/build.ts";
import { haveReferenceFiles } from "../../datasets/properties/reference-files.ts";
import { readRegistryNumber } from "../../pipeline/properties/registry-number.ts";
import { programIndex, programTables, substance, tableFile } from "./read-tables.ts";

describe("The program's own tables", () => {
  test("hold no contradiction", () => {
    expect(programIndex.faults).toEqual([]);
  });

  test("have at least 97 solvents, 200 solutes and 150 solid forms", () => {
    const { substances } = programIndex;
    expect(substances.filter(({ roles }) => roles.includes("solvent")).length).toBeGreaterThanOrEqual(97);
    expect(substances.filter(({ roles }) => roles.includes("solute")).length).toBeGreaterThanOrEqual(200);
    expect(programTables.solidForms.length).toBeGreaterThanOrEqual(150);
  });

  test("give every row a reference, a molar mass and a right registry number if any", () => {
    for (const { name, cas, molar_mass, reference } of programTables.substances) {
      expect(reference, name).not.toBe("");
      expect(Number(molar_mass), name).toBeGreaterThan(1);
      if (cas !== "") expect(readRegistryNumber(cas ?? "").ok, `${name} ${cas}`).toBe(true);
    }
    for (const { solute, reference } of programTables.solidForms) expect(reference, solute).not.toBe("");
    for (const { name, property, reference } of programTables.propertyValues)
      expect(reference, `${name} ${property}`).not.toBe("");
  });

  test("use every registry number once", () => {
    const numbers = programTables.substances.map(({ cas }) => cas).filter((cas) => cas !== "");
    expect(new Set(numbers).size).toBe(numbers.length);
  });

  // Values that circulate and are wrong, as told by the survey of the sources: each must be absent or right.
  test("do not repeat wrong values in circulation", () => {
    expect(substance("fumaric acid").meltingPointK).toBeGreaterThan(550);
    expect(substance("adipic acid").fusionEnthalpy).toBe(36_300);
    expect(substance("ethylparaben").fusionEnthalpy).toBeLessThan(40_000);
    expect(substance("sodium sulfate").meltingPointK).toBeGreaterThan(1150);
    expect(substance("caffeine hydrate").meltingPointK).toBeUndefined();
    expect(substance("glycine").solidDensity).toBe(1607);
    expect(substance("propylparaben").solidDensity).toBeUndefined();
    expect(substance("2-methyltetrahydrofuran").properties.get("ich_q3c_class")?.value).toBe(3);
    expect(substance("anisole").properties.get("ich_q3c_class")?.value).toBe(3);
    expect(substance("tert-butanol").properties.get("ich_q3c_class")?.value).toBe(2);
    expect(substance("sodium thiosulfate").meltingPointK).toBeUndefined();
  });

  test("have every transition lead to a form of the same solute", () => {
    for (const { name, solidForms } of programIndex.substances) {
      for (const { form, toForm } of solidForms) {
        if (toForm !== undefined)
          expect(
            solidForms.map((other) => other.form),
            `${name} ${form}`,
          ).toContain(toForm);
      }
    }
  });

  test("have molar masses of hydrates that equal those of their own rows", () => {
    for (const { name, formOf, molarMass } of programIndex.substances) {
      if (formOf === undefined) continue;
      const parent = substance(formOf.substance);
      const form = programIndex.formOf(parent, formOf.form);
      expect(form?.molarMass ?? 0, name).toBeCloseTo(molarMass ?? 1, 3);
    }
  });

  test.skipIf(!haveReferenceFiles)(
    "are what the build program would write now (skipped where ../shared is absent)",
    () => {
      for (const [name, text] of buildTables()) expect(tableFile(name) === text, `${name} is stale`).toBe(true);
    },
  );
});

const solubility = new URL("../../../shared/reference/solubility/", import.meta.url);
const salts = new URL("../../../shared/datasets/inorganic-salts-water/grams-per-100g-water.csv", import.meta.url);

test.skipIf(!existsSync(solubility))(
  "Every solute of the published solubility tables is known (skipped where ../shared is absent)",
  () => {
    const tables: [file: URL, column: string][] = [
      [new URL("01a_salts_water_crc98.csv", solubility), "solute_anhydrous"],
      [new URL("01b_salts_water_crc98_molality.csv", solubility), "solute"],
      [new URL("01c_salts_water_other_tables.csv", solubility), "solute"],
      [new URL("02_organics_water.csv", solubility), "solute"],
      [new URL("04a_warfarin_solvate_mixed_solvents.csv", solubility), "solute"],
      [new URL("04b_organic_solubility_data.csv", solubility), "solute"],
      [salts, "formula"],
    ];
    const unknown = new Set<string>();
    for (const [file, column] of tables) {
      const rows: Record<string, string>[] = parse(readFileSync(file), { columns: true, bom: true });
      for (const row of rows) {
        const name = (row[column] ?? row.name ?? "").replace(/ \(WS\.IPA\)$/, "");
        if (programIndex.resolve(name)?.substance.molarMass === undefined) unknown.add(name);
      }
    }
    expect([...unknown]).toEqual([]);
  },
);
