// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of the substances.csv that merge writes: a substance that the other tables refer to. A cell that may be empty is a property that may be absent.
 */
export interface SubstanceRow {
  /**
   * Key used in the other tables: the name in the substance tables, else the strongest identifier given. No unit.
   */
  key: string;
  /**
   * Name in the substance tables; empty where the substance is in none of them. No unit.
   */
  name?: string;
  /**
   * What it is in this edition. Words, no unit.
   */
  role: "solute" | "solvent" | "solute;solvent";
  /**
   * CAS registry number. No unit.
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
   * Hazards in words, `;` between them. No unit.
   */
  hazards?: string;
  /**
   * Where these values come from. Text, no unit.
   */
  reference?: string;
}

/** Columns of the table, in their order. */
export const SUBSTANCES_OUT_COLUMNS = [
  "key",
  "name",
  "role",
  "cas",
  "inchikey",
  "smiles",
  "formula",
  "molar_mass",
  "melting_point_K",
  "hazards",
  "reference"
] as const satisfies readonly (keyof SubstanceRow)[];
