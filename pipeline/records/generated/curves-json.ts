// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * curves.json: every curve in full.
 */
export interface CurvesFile {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * Version of the program that wrote it. No unit.
   */
  program_version: string;
  /**
   * Curves, by system and branch.
   */
  curves: CurveDocument[];
}
/**
 * One curve with what is needed to evaluate it and its limits; y is x or r as fit_basis says, T in K.
 */
export interface CurveDocument {
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
   * Equation with the names of the coefficients. No unit.
   */
  equation: string;
  /**
   * Quantity fitted. Words, no unit.
   */
  fit_basis: "ln x" | "ln r";
  /**
   * Coefficients, each in the unit its equation gives it.
   */
  coefficients: CurveCoefficient[];
  /**
   * Covariance matrix of the coefficients in their order, products of their units.
   */
  covariance: number[][];
  /**
   * Lowest temperature of the points kept, K.
   */
  T_min_K: number;
  /**
   * Highest temperature of the points kept, K.
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
   * Residual standard deviation of ln y within sources, 1; absent below 5 degrees of freedom.
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
   * AICc by least squares on the points kept, 1; absent where too few points define it.
   */
  aicc?: number;
  /**
   * Models tried and not chosen.
   */
  runners_up: CurveRunnerUp[];
  /**
   * Apparent enthalpy of dissolution, kJ/mol; absent for a constant.
   */
  dissolution_enthalpy?: {
    /**
     * Value, kJ/mol.
     */
    kJ_per_mol: number;
    /**
     * Lower limit, kJ/mol.
     */
    low: number;
    /**
     * Upper limit, kJ/mol.
     */
    high: number;
    /**
     * Temperature it holds at, K.
     */
    temperature_K: number;
  };
  /**
   * Ideal solubility and activity coefficient of an unsolvated non-electrolyte at the middle of the range, each as a bracket from no heat-capacity term to the full one; absent where `no_ideal_solubility` says why.
   */
  ideal_solubility?: {
    /**
     * Temperature it holds at, K.
     */
    temperature_K: number;
    /**
     * Ideal mole fraction without heat-capacity term, 1.
     */
    low: number;
    /**
     * Ideal mole fraction with the full heat-capacity term, 1.
     */
    high: number;
    /**
     * Lower activity coefficient against the supercooled melt, 1.
     */
    activity_coefficient_low: number;
    /**
     * Upper activity coefficient against the supercooled melt, 1.
     */
    activity_coefficient_high: number;
  };
  /**
   * Why no ideal solubility is given. Text, no unit.
   */
  no_ideal_solubility?: string;
  /**
   * Transition at the warm end of the branch, K; absent where there is none.
   */
  transition?: {
    /**
     * Temperature, K.
     */
    temperature_K: number;
    /**
     * Lower limit, K.
     */
    low_K: number;
    /**
     * Upper limit, K.
     */
    high_K: number;
  };
  /**
   * Remarks on the fit. No unit.
   */
  notices: string[];
  /**
   * Grade proposed. Words, no unit.
   */
  grade: "recommended" | "tentative" | "doubtful" | "rejected";
  /**
   * Criteria of the grade, each with its number. No unit.
   */
  grade_reasons: string[];
  /**
   * Measurements kept; keys of measurements.csv. No unit.
   */
  measurement_ids: string[];
}
/**
 * One coefficient.
 */
export interface CurveCoefficient {
  /**
   * Symbol in the equation. No unit.
   */
  name: string;
  /**
   * Value; T in K.
   */
  value: number;
  /**
   * Standard uncertainty, in the unit of the value.
   */
  standard_uncertainty: number;
}
/**
 * A model that was tried and not chosen.
 */
export interface CurveRunnerUp {
  /**
   * Model. Words, no unit.
   */
  model: "van 't Hoff" | "modified Apelblat" | "Buchowski-Ksiazczak lambda-h" | "quadratic in 1/T" | "constant";
  /**
   * AICc by least squares on the common set of points, 1.
   */
  aicc?: number;
  /**
   * Root mean square leave-one-out residual of ln y, 1.
   */
  leave_one_out?: number;
  /**
   * Why it was passed over. Text, no unit.
   */
  why: string;
}
