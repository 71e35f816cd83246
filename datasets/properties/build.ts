import { writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { azeotropeRows } from "./azeotropes.ts";
import { electrolyteProperties } from "./electrolyte-properties.ts";
import { excessVolumeRows } from "./excess-volumes.ts";
import { formRows } from "./form-rows.ts";
import { haveReferenceFiles, readReferenceFile, referenceFolder } from "./reference-files.ts";
import { additionalSoluteRows, soluteRow } from "./solute-rows.ts";
import { densityAt20, solventProperties } from "./solvent-properties.ts";
import { solventRow } from "./solvent-rows.ts";
import { type Row, tableText } from "./table-text.ts";

const SUBSTANCE_COLUMNS =
  "name,role,synonyms,cas,inchikey,smiles,formula,molar_mass,melting_point_K,fusion_enthalpy_kJ_per_mol,density_kg_per_m3,hazards,reference".split(
    ",",
  );
const FORM_COLUMNS =
  "solute,form,kind,guest,guest_per_solute,molar_mass,melting_point_K,fusion_enthalpy_kJ_per_mol,density_kg_per_m3,transition_K,to_form,reference".split(
    ",",
  );
const PROPERTY_COLUMNS = "name,property,value,unit,standard_uncertainty,T_min_K,T_max_K,reference".split(",");

/**
 * The three tables of properties as text, from the reference files beside the project and the lists in this folder.
 * Same input, same text.
 */
export function buildTables(): ReadonlyMap<string, string> {
  const solvents = readReferenceFile("solvents.csv");
  const correlations = readReferenceFile("density_correlations.csv");
  const properties = new Map(solvents.map((row) => [row("name"), solventProperties(row, correlations)]));
  const solventRows = solvents.map((row) => solventRow(row, densityAt20(row, properties.get(row("name")) ?? [])));
  const substances = [...solventRows, ...readReferenceFile("solutes.csv").map(soluteRow), ...additionalSoluteRows()];
  const nameByCas = new Map(substances.map((row) => [String(row.cas), String(row.name)]));
  const checks = readReferenceFile("solution_density_checks.csv");
  const electrolytes = readReferenceFile("electrolyte_density_laliberte.csv").flatMap((salt): Row[] => {
    const name = nameByCas.get(salt("cas_rn"));
    // Sucrose has a formula of its own over a wider range.
    return name === undefined || name === "sucrose" ? [] : electrolyteProperties(salt, name, checks);
  });
  const excessVolumes = excessVolumeRows(readReferenceFile("excess_volume_redlich_kister.csv"));
  const propertyRows = [...[...properties.values()].flat(), ...electrolytes, ...excessVolumes, ...azeotropeRows()];
  return new Map([
    ["substances.csv", tableText(SUBSTANCE_COLUMNS, substances)],
    ["solid_forms.csv", tableText(FORM_COLUMNS, formRows(substances))],
    ["property-values.csv", tableText(PROPERTY_COLUMNS, propertyRows)],
  ]);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  if (!haveReferenceFiles) {
    process.stderr.write(`The reference files are not here: ${referenceFolder}\n`);
    process.exitCode = 2;
  } else {
    for (const [name, text] of buildTables()) {
      writeFileSync(new URL(name, import.meta.url), text);
      process.stdout.write(`${name}: ${text.split("\n").length - 2} rows\n`);
    }
  }
}
