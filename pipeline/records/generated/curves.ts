// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of curves.csv: one fitted curve; y is x (mole fraction) or r (g unsolvated solute per g total solvent) as fit_basis says, T in K. A cell that may be empty is a property that may be absent.
 */
export interface CurveRow {
  /**
   * System and branch number. No unit.
   */
  curve_id: string;
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Branch of the system, 1 and up. No unit.
   */
  branch: number;
  /**
   * Curve model. Words, no unit.
   */
  model: "van 't Hoff" | "modified Apelblat" | "Buchowski-Ksiazczak lambda-h" | "quadratic in 1/T" | "constant";
  /**
   * Equation with the coefficients as the columns name them; lambda is a and h is b. No unit.
   */
  equation: string;
  /**
   * Quantity fitted. Words, no unit.
   */
  fit_basis: "ln x" | "ln r";
  /**
   * First coefficient; 1 in every model.
   */
  a: number;
  /**
   * Standard uncertainty of a, in the unit of a.
   */
  u_a: number;
  /**
   * Second coefficient, K: of 1/T, or h of the lambda-h equation; empty for a constant.
   */
  b?: number;
  /**
   * Standard uncertainty of b, K.
   */
  u_b?: number;
  /**
   * Third coefficient: of ln T, 1, or of 1/T^2, K^2; empty where the model has two.
   */
  c?: number;
  /**
   * Standard uncertainty of c, in the unit of c.
   */
  u_c?: number;
  /**
   * Covariance of a and b, the product of their units.
   */
  cov_ab?: number;
  /**
   * Covariance of a and c, the product of their units.
   */
  cov_ac?: number;
  /**
   * Covariance of b and c, the product of their units.
   */
  cov_bc?: number;
  /**
   * Lowest temperature of the points kept: the curve ends here, K.
   */
  T_min_K: number;
  /**
   * Highest temperature of the points kept: the curve ends here, K.
   */
  T_max_K: number;
  /**
   * Points kept. A count.
   */
  n: number;
  /**
   * Sources of these points. A count.
   */
  n_sources: number;
  /**
   * Laboratories of these points. A count.
   */
  n_laboratories: number;
  /**
   * Root mean square deviation of ln y, 1.
   */
  rmsd_ln: number;
  /**
   * Average relative deviation of y, percent.
   */
  ard_percent: number;
  /**
   * Residual standard deviation of ln y within sources, 1; empty below 5 degrees of freedom.
   */
  within_sd?: number;
  /**
   * Between-source standard deviation of ln y used in the limits, 1.
   */
  between_sd: number;
  /**
   * Degrees of freedom behind it, 1; 0 where the default setting was used.
   */
  between_sd_degrees_of_freedom: number;
  /**
   * AICc by least squares on the points kept, 1; empty where too few points define it.
   */
  aicc?: number;
  /**
   * Models tried and not chosen, each with the reason, `; ` between them. No unit.
   */
  runners_up?: string;
  /**
   * Apparent enthalpy of dissolution at the temperature beside it, kJ/mol; empty for a constant.
   */
  dissolution_enthalpy_kJ_per_mol?: number;
  /**
   * Lower 95 % limit of it, kJ/mol.
   */
  dissolution_enthalpy_low?: number;
  /**
   * Upper 95 % limit of it, kJ/mol.
   */
  dissolution_enthalpy_high?: number;
  /**
   * Harmonic mean of the temperatures of the points kept, K.
   */
  dissolution_enthalpy_temperature_K?: number;
  /**
   * Temperature of the transition at the warm end of the branch, K; empty where there is none.
   */
  transition_K?: number;
  /**
   * Lower 95 % limit of it, K.
   */
  transition_low_K?: number;
  /**
   * Upper 95 % limit of it, K.
   */
  transition_high_K?: number;
  /**
   * p of as strong a break under one smooth curve, by parametric bootstrap, 1; below 0.01 where a transition is published.
   */
  transition_probability?: number;
  /**
   * Remarks on the fit, `; ` between them. No unit.
   */
  notices?: string;
  /**
   * Grade proposed. Words, no unit.
   */
  grade: "recommended" | "tentative" | "doubtful" | "rejected";
  /**
   * Criteria of the grade, each with its number, `; ` between them. No unit.
   */
  grade_reasons: string;
}

/** Columns of the table, in their order. */
export const CURVES_COLUMNS = [
  "curve_id",
  "system",
  "branch",
  "model",
  "equation",
  "fit_basis",
  "a",
  "u_a",
  "b",
  "u_b",
  "c",
  "u_c",
  "cov_ab",
  "cov_ac",
  "cov_bc",
  "T_min_K",
  "T_max_K",
  "n",
  "n_sources",
  "n_laboratories",
  "rmsd_ln",
  "ard_percent",
  "within_sd",
  "between_sd",
  "between_sd_degrees_of_freedom",
  "aicc",
  "runners_up",
  "dissolution_enthalpy_kJ_per_mol",
  "dissolution_enthalpy_low",
  "dissolution_enthalpy_high",
  "dissolution_enthalpy_temperature_K",
  "transition_K",
  "transition_low_K",
  "transition_high_K",
  "transition_probability",
  "notices",
  "grade",
  "grade_reasons"
] as const satisfies readonly (keyof CurveRow)[];
