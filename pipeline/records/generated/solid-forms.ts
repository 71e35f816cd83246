// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of solid_forms.csv: a polymorph, hydrate, solvate, salt or co-crystal of a solute. Empty means unknown. A cell that may be empty is a property that may be absent.
 */
export interface SolidFormInputRow {
  /**
   * Solute, by its name in substances.csv. No unit.
   */
  solute: string;
  /**
   * Name of the form. No unit.
   */
  form: string;
  /**
   * Kind of form. Words, no unit.
   */
  kind: "polymorph" | "hydrate" | "solvate" | "salt" | "co-crystal" | "amorphous";
  /**
   * Solvent of crystallisation, counter-ion or co-former. No unit.
   */
  guest?: string;
  /**
   * Guest molecules per formula unit of solute, mol/mol.
   */
  guest_per_solute?: number;
  /**
   * Molar mass of the form per formula unit of solute, g/mol.
   */
  molar_mass?: number;
  /**
   * Melting point of the form, K.
   */
  melting_point_K?: number;
  /**
   * Enthalpy of fusion of the form, kJ/mol.
   */
  fusion_enthalpy_kJ_per_mol?: number;
  /**
   * Density of the solid, kg/m3.
   */
  density_kg_per_m3?: number;
  /**
   * Temperature at which it turns into to_form, K.
   */
  transition_K?: number;
  /**
   * Form it turns into on heating. No unit.
   */
  to_form?: string;
  /**
   * Where these values come from. Text, no unit.
   */
  reference?: string;
}

/** Columns of the table, in their order. */
export const SOLID_FORMS_COLUMNS = [
  "solute",
  "form",
  "kind",
  "guest",
  "guest_per_solute",
  "molar_mass",
  "melting_point_K",
  "fusion_enthalpy_kJ_per_mol",
  "density_kg_per_m3",
  "transition_K",
  "to_form",
  "reference"
] as const satisfies readonly (keyof SolidFormInputRow)[];
