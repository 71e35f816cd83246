// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of a substances.csv that a person writes: the program's own or a collection's. Empty means unknown. A cell that may be empty is a property that may be absent.
 */
export interface SubstanceInputRow {
  /**
   * Name that the tables use. No unit.
   */
  name: string;
  /**
   * What it can be. Words, no unit.
   */
  role: "solute" | "solvent" | "solute;solvent";
  /**
   * Other names, `;` between them. No unit.
   */
  synonyms?: string;
  /**
   * CAS registry number, with a right check digit. No unit.
   */
  cas?: string;
  /**
   * Standard InChIKey. No unit.
   */
  inchikey?: string;
  /**
   * SMILES. No unit.
   */
  smiles?: string;
  /**
   * Formula of the unsolvated substance. No unit.
   */
  formula?: string;
  /**
   * Molar mass of the unsolvated substance, g/mol.
   */
  molar_mass?: number;
  /**
   * Melting point of the stable unsolvated form, K.
   */
  melting_point_K?: number;
  /**
   * Enthalpy of fusion of the stable unsolvated form, kJ/mol.
   */
  fusion_enthalpy_kJ_per_mol?: number;
  /**
   * Density of the solid of a solute, of the liquid at 20 °C of a solvent, kg/m3.
   */
  density_kg_per_m3?: number;
  /**
   * Hazards in words, `;` between them. No unit.
   */
  hazards?: string;
  /**
   * Where these values come from. Text, no unit.
   */
  reference?: string;
}

/** Columns of the table, in their order. */
export const SUBSTANCES_COLUMNS = [
  "name",
  "role",
  "synonyms",
  "cas",
  "inchikey",
  "smiles",
  "formula",
  "molar_mass",
  "melting_point_K",
  "fusion_enthalpy_kJ_per_mol",
  "density_kg_per_m3",
  "hazards",
  "reference"
] as const satisfies readonly (keyof SubstanceInputRow)[];
