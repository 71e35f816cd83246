// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of mixtures.csv: one solute in one solid form over the composition of a binary solvent. A cell that may be empty is a property that may be absent.
 */
export interface MixtureRow {
  /**
   * Readable id of solute, solid form, two solvents and medium. No unit.
   */
  mixture: string;
  /**
   * Solute; key of substances.csv. No unit.
   */
  solute: string;
  /**
   * Solid form, or unspecified. No unit.
   */
  solid_form: string;
  /**
   * Solvent whose mass fraction is w1; key of substances.csv. No unit.
   */
  first_solvent: string;
  /**
   * Solvent whose mass fraction is w2 = 1 - w1; key of substances.csv. No unit.
   */
  second_solvent: string;
  /**
   * Medium; empty for none. No unit.
   */
  medium?: string;
  /**
   * Model; empty where there is none. Words, no unit.
   */
  model?: "Jouyban-Acree-van 't Hoff";
  /**
   * Why there is no model; empty where there is one. Text, no unit.
   */
  no_model?: string;
  /**
   * Equation in the letters of the columns; w1 and w2 are mass fractions free of solute, T in K. No unit.
   */
  equation?: string;
  /**
   * Quantity fitted. Words, no unit.
   */
  fit_basis?: "ln x" | "ln r";
  /**
   * Coefficient A1, 1.
   */
  A1?: number;
  /**
   * Standard uncertainty of A1, 1.
   */
  u_A1?: number;
  /**
   * Coefficient B1, K.
   */
  B1?: number;
  /**
   * Standard uncertainty of B1, K.
   */
  u_B1?: number;
  /**
   * Coefficient A2, 1.
   */
  A2?: number;
  /**
   * Standard uncertainty of A2, 1.
   */
  u_A2?: number;
  /**
   * Coefficient B2, K.
   */
  B2?: number;
  /**
   * Standard uncertainty of B2, K.
   */
  u_B2?: number;
  /**
   * Coefficient J0; empty where the compositions do not carry it, K.
   */
  J0?: number;
  /**
   * Standard uncertainty of J0, K.
   */
  u_J0?: number;
  /**
   * Coefficient J1; empty where the compositions do not carry it, K.
   */
  J1?: number;
  /**
   * Standard uncertainty of J1, K.
   */
  u_J1?: number;
  /**
   * Coefficient J2; empty where the compositions do not carry it, K.
   */
  J2?: number;
  /**
   * Standard uncertainty of J2, K.
   */
  u_J2?: number;
  /**
   * Lowest mass fraction of the first solvent in the data, 1.
   */
  w1_min?: number;
  /**
   * Highest mass fraction of the first solvent in the data, 1.
   */
  w1_max?: number;
  /**
   * Lowest temperature of the points used, K.
   */
  T_min_K?: number;
  /**
   * Highest temperature of the points used, K.
   */
  T_max_K?: number;
  /**
   * Points used. A count.
   */
  n?: number;
  /**
   * Compositions of these points, pure solvents counted. A count.
   */
  n_compositions?: number;
  /**
   * Sources of these points. A count.
   */
  n_sources?: number;
  /**
   * Root mean square deviation of ln y from the surface, 1.
   */
  rmsd_ln?: number;
  /**
   * Average relative deviation of y, percent.
   */
  ard_percent?: number;
  /**
   * Standard deviation of ln y by which the curve of a composition lies off the surface, as the limits take it, 1.
   */
  lack_of_fit_sd?: number;
  /**
   * Between-source standard deviation of ln y used in the limits, 1.
   */
  between_sd?: number;
  /**
   * Mass fraction of the first solvent where the solubility passes through a maximum between the ends, at the temperature of the next column, 1; empty where it does not.
   */
  inner_maximum_w1?: number;
  /**
   * Round temperature nearest to 25 °C at which there is such a maximum, K.
   */
  inner_maximum_T_K?: number;
  /**
   * Systems over this binary by ascending w1; keys of systems.csv, `; ` between them. No unit.
   */
  systems: string;
  /**
   * Remarks, `; ` between them. Text, no unit.
   */
  notices?: string;
}

/** Columns of the table, in their order. */
export const MIXTURES_COLUMNS = [
  "mixture",
  "solute",
  "solid_form",
  "first_solvent",
  "second_solvent",
  "medium",
  "model",
  "no_model",
  "equation",
  "fit_basis",
  "A1",
  "u_A1",
  "B1",
  "u_B1",
  "A2",
  "u_A2",
  "B2",
  "u_B2",
  "J0",
  "u_J0",
  "J1",
  "u_J1",
  "J2",
  "u_J2",
  "w1_min",
  "w1_max",
  "T_min_K",
  "T_max_K",
  "n",
  "n_compositions",
  "n_sources",
  "rmsd_ln",
  "ard_percent",
  "lack_of_fit_sd",
  "between_sd",
  "inner_maximum_w1",
  "inner_maximum_T_K",
  "systems",
  "notices"
] as const satisfies readonly (keyof MixtureRow)[];
