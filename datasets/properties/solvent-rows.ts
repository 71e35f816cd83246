import { parseFormula } from "../../pipeline/properties/formula.ts";
import { molarMass } from "../../pipeline/properties/molar-mass.ts";
import { citation, joinReferences } from "./citations.ts";
import { hazardWords } from "./hazard-words.ts";
import type { ReferenceRow } from "./reference-files.ts";
import { type Row, significant } from "./table-text.ts";

/** Synonyms that are no names, or trade names. */
const NOT_A_NAME = /\bis CAS\b|\(avoid\)|cellosolve|trilene/i;

/** Further common names. */
const MORE_SYNONYMS: ReadonlyMap<string, string> = new Map([
  ["water", "distilled water;deionised water;demineralised water"],
  ["ethanol", "anhydrous ethanol"],
  ["2-propanol", "propan-2-ol;iso-propanol"],
  ["1-propanol", "propan-1-ol"],
  ["1-butanol", "butan-1-ol"],
  ["2-butanol", "butan-2-ol"],
  ["1-octanol", "octan-1-ol"],
  ["tert-butanol", "2-methylpropan-2-ol"],
  ["2-methyl-1-propanol", "2-methylpropan-1-ol"],
  ["acetone", "propan-2-one"],
  ["2-butanone", "butan-2-one;butanone"],
  ["4-methyl-2-pentanone", "4-methylpentan-2-one"],
  ["diethyl ether", "ethoxyethane"],
  ["methyl tert-butyl ether", "2-methoxy-2-methylpropane"],
  ["tetrahydrofuran", "oxolane"],
  ["N-methyl-2-pyrrolidone", "1-methylpyrrolidin-2-one;N-methylpyrrolidin-2-one"],
  ["dichloromethane", "CH2Cl2"],
  ["chloroform", "trichloromethane"],
  ["carbon tetrachloride", "tetrachloromethane"],
  ["ethylene glycol", "ethane-1,2-diol"],
  ["propylene glycol", "propane-1,2-diol"],
  ["glycerol", "propane-1,2,3-triol"],
  ["dimethyl sulfoxide", "methylsulfinylmethane;dimethylsulfoxide"],
  ["diisopropyl ether", "2-isopropoxypropane"],
]);

/** Molar mass [g/mol] of a formula, to 0.0001 g/mol. @throws Error if it cannot be read. */
export function massOf(formula: string): number {
  const parsed = parseFormula(formula);
  if ("fault" in parsed) throw new Error(`${formula}: ${parsed.message}`);
  return Math.round(molarMass(parsed).value * 1e4) / 1e4;
}

/** The row of a solvent in substances.csv. `density20` is the density of the liquid at 20 °C [kg/m3]. */
export function solventRow(row: ReferenceRow, density20: number | undefined): Row {
  const synonyms = [
    ...row("synonyms").split(";"),
    row("iupac_name"),
    ...(MORE_SYNONYMS.get(row("name")) ?? "").split(";"),
  ];
  const names = synonyms.filter((name) => name !== "" && name !== row("name") && !NOT_A_NAME.test(name));
  return {
    name: row("name"),
    role: "solvent",
    synonyms: [...new Set(names)].join(";"),
    cas: row("cas_rn"),
    inchikey: row("inchikey_computed") || row("inchikey_read"),
    smiles: row("smiles"),
    formula: row("formula_hill"),
    molar_mass: massOf(row("formula_hill")),
    melting_point_K: row("melting_point_K"),
    density_kg_per_m3: density20 === undefined ? undefined : significant(density20, 5),
    hazards: hazardWords(row("hazard_codes")),
    reference: joinReferences([
      "names and registry number: identifier tables of chemicals",
      "molar mass: IUPAC 2021 atomic weights",
      row("melting_point_K") === "" ? "" : `melting point: ${citation(row("melting_source"))}`,
      density20 === undefined ? "" : "density at 20 °C: see property-values.csv",
      "hazard classes: from memory, not verified",
    ]),
  };
}
