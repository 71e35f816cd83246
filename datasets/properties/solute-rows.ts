import { type AdditionalSolute, additionalOrganics, additionalSalts } from "./additional-solutes.ts";
import { citation, joinReferences, MEMORY } from "./citations.ts";
import { type Correction, corrections } from "./corrections.ts";
import { saltHazards } from "./hazard-words.ts";
import { listedSalts } from "./listed-salts.ts";
import type { ReferenceRow } from "./reference-files.ts";
import { saltNames } from "./salt-names.ts";
import { massOf } from "./solvent-rows.ts";
import type { Row } from "./table-text.ts";

/** Names of the program where the source has another; the name of a hydrate is that of the solute and of its form. */
const RENAMED: ReadonlyMap<string, string> = new Map([
  ["alpha-lactose monohydrate", "lactose monohydrate"],
  ["caffeine monohydrate", "caffeine hydrate"],
]);

const MORE_SYNONYMS: ReadonlyMap<string, string> = new Map([
  ["lactose monohydrate", "alpha-lactose monohydrate"],
  ["caffeine hydrate", "caffeine monohydrate;caffeine 4/5-hydrate"],
  ["sodium acetate", "NaC2H3O2;CH3COONa;NaCH3COO;NaOAc"],
  ["trisodium citrate dihydrate", "sodium citrate dihydrate"],
  ["potassium aluminium sulfate dodecahydrate", "alum;potassium aluminum sulfate dodecahydrate;AlK(SO4)2·12H2O"],
  ["potassium aluminium sulfate", "potassium aluminum sulfate;AlK(SO4)2"],
  ["sodium sulfate", "sodium sulphate"],
  ["copper(II) sulfate", "copper sulfate;copper(II) sulphate;copper sulphate"],
  ["copper(II) sulfate pentahydrate", "copper sulfate pentahydrate"],
  ["iron(II) sulfate", "ferrous sulfate"],
  ["magnesium sulfate", "magnesium sulphate"],
  ["sulfamethazine", "sulphamethazine"],
  ["butylparaben", "butyl paraben"],
  ["methylparaben", "methyl paraben"],
  ["ethylparaben", "ethyl paraben"],
  ["propylparaben", "propyl paraben"],
  ["boric acid", "B(OH)3"],
  ["DL-malic acid", "malic acid"],
  ["disodium tetraborate", "sodium tetraborate"],
  ["disodium hydrogen phosphate", "disodium phosphate;sodium hydrogen phosphate"],
  ["potassium dihydrogen phosphate", "monopotassium phosphate"],
  ["ammonium dihydrogen phosphate", "monoammonium phosphate"],
]);

/** Formula of the caffeine hydrate by its measured stoichiometry. */
const REWRITTEN: ReadonlyMap<string, string> = new Map([["caffeine hydrate", "C8H10N4O2·0.8H2O"]]);

/** The row of a solute of the reference file in substances.csv, with the corrections applied. */
export function soluteRow(row: ReferenceRow): Row {
  const source = row("name");
  const name = RENAMED.get(source) ?? source;
  const written = REWRITTEN.get(name) ?? row("formula_written").replace(/\.(?=[\d.]*H2O$)/, "·");
  const formula = written || row("formula_hill");
  const synonyms = [...row("synonyms").split(";"), ...(MORE_SYNONYMS.get(name) ?? "").split(";")];
  const melting = corrected(source, "melting_point_K", row("melting_point_K"), row("melting_source"));
  const fusion = corrected(
    source,
    "fusion_enthalpy_kJ_per_mol",
    row("enthalpy_fusion_kJ_mol"),
    row("enthalpy_fusion_source"),
  );
  const density = corrected(source, "density_kg_per_m3", row("solid_density_kg_m3"), row("density_source"));
  return {
    name,
    role: "solute",
    synonyms: [...new Set(synonyms.filter((text) => text !== "" && text !== name))].join(";"),
    cas: row("cas_rn"),
    inchikey: row("inchikey_computed") || row("inchikey_read"),
    smiles: row("smiles"),
    formula,
    molar_mass: massOf(formula),
    melting_point_K: melting.value,
    fusion_enthalpy_kJ_per_mol: fusion.value,
    density_kg_per_m3: density.value,
    hazards: row("formula_written") === "" ? "" : saltHazards(row("formula_written")),
    reference: joinReferences([
      `names and registry number: ${row("name_cas_source").startsWith("from memory") ? MEMORY : citation(row("name_cas_source"))}`,
      "molar mass: IUPAC 2021 atomic weights",
      said("melting point", melting),
      said("enthalpy of fusion", fusion),
      said("density", density),
    ]),
  };
}

interface Value {
  readonly value: string | number | undefined;
  readonly reference: string;
}

function corrected(name: string, column: Correction["column"], read: string, source: string): Value {
  const correction = corrections.get(name)?.find((entry) => entry.column === column);
  if (correction !== undefined) {
    return {
      value: correction.value,
      reference: correction.value === undefined ? `left empty (${correction.why})` : correction.why,
    };
  }
  return { value: read, reference: read === "" ? "" : citation(source) };
}

const said = (what: string, { reference }: Value): string => (reference === "" ? "" : `${what}: ${reference}`);

/** Rows of the solutes beyond the reference file. */
export function additionalSoluteRows(): Row[] {
  const names = saltNames();
  const named = new Set(additionalSalts.map(({ formula }) => formula));
  const further = listedSalts
    .filter((formula) => !named.has(formula))
    .map((formula): AdditionalSolute => ({ name: names.get(formula) ?? formula, formula, cas: "", synonyms: "" }));
  return [
    ...additionalSalts.map((solute) => additionalRow(solute, saltHazards(solute.formula))),
    ...additionalOrganics.map((solute) => additionalRow(solute, "")),
    ...further.map((solute) => additionalRow(solute, saltHazards(solute.formula))),
  ];
}

function additionalRow({ name, formula, cas, synonyms, smiles }: AdditionalSolute, hazards: string): Row {
  const identity =
    cas === "" ? "formula from the name" : "formula and registry number from memory, check digit verified";
  return {
    name,
    role: "solute",
    synonyms,
    cas,
    smiles,
    formula,
    molar_mass: massOf(formula),
    hazards,
    reference: joinReferences([
      identity,
      "molar mass: IUPAC 2021 atomic weights",
      hazards === "" ? "" : "hazard classes: from memory, not verified",
    ]),
  };
}
