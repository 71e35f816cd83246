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
  /**
   * Systems without a curve because their sources disagree; absent in files of older programs.
   */
  disagreements?: CurveDisagreement[];
  /**
   * Models over the composition of binary solvents, by id; absent in files of older programs.
   */
  mixtures?: MixtureDocument[];
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
    /**
     * p of as strong a break under one smooth curve, by parametric bootstrap, 1.
     */
    probability?: number;
  };
  /**
   * Where the curve of this named form crosses those of others of its family; absent where it crosses none.
   */
  form_crossings?: FormCrossing[];
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
  /**
   * How the sources of the system stand to one another on this branch; absent where there is one source.
   */
  sources?: CurveSource[];
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
/**
 * A transition between two named forms: the crossing of their curves on the same unsolvated basis.
 */
export interface FormCrossing {
  /**
   * Curve that is crossed. No unit.
   */
  other_curve_id: string;
  /**
   * Temperature of the crossing, K.
   */
  temperature_K: number;
  /**
   * Lower 95 % limit, K; absent where the order is not settled below within the common range.
   */
  low_K?: number;
  /**
   * Upper 95 % limit, K; absent where the order is not settled above within the common range.
   */
  high_K?: number;
  /**
   * Curve of the two that is the lower one, so of the stable form, below the crossing. No unit.
   */
  stable_below: string;
}
/**
 * How one source stands to the others of its system; offsets and influence are differences of ln y.
 */
export interface CurveSource {
  /**
   * Source; key of sources.csv. No unit.
   */
  source: string;
  /**
   * Its points in the curve; 0 where it is left out as a whole. A count.
   */
  n: number;
  /**
   * Its points that the offset rests on: those within the temperatures of the others. A count.
   */
  compared: number;
  /**
   * Mean deviation of its points from the curve of the others, 1; absent where no temperature is in common.
   */
  offset_ln?: number;
  /**
   * Lower 95 % limit of the offset, 1.
   */
  offset_low?: number;
  /**
   * Upper 95 % limit of the offset, 1.
   */
  offset_high?: number;
  /**
   * Largest change of the curve within its range when the source is left out, 1; absent where no curve remains.
   */
  influence_ln?: number;
  /**
   * Curve of the other sources: the published model, or the simplest where their points do not carry it; absent where none can be fitted or the source is not in the curve.
   */
  without?: {
    /**
     * Curve model. Words, no unit.
     */
    model: "van 't Hoff" | "modified Apelblat" | "Buchowski-Ksiazczak lambda-h" | "quadratic in 1/T" | "constant";
    /**
     * Coefficients in the usual form; T in K.
     *
     * Items: One coefficient.
     */
    coefficients: {
      /**
       * Symbol in the equation. No unit.
       */
      name: string;
      /**
       * Value; T in K.
       */
      value: number;
    }[];
    /**
     * Lowest temperature of its points, K.
     */
    T_min_K: number;
    /**
     * Highest temperature of its points, K.
     */
    T_max_K: number;
    /**
     * Its points. A count.
     */
    n: number;
    /**
     * Their sources. A count.
     */
    n_sources: number;
  };
}
/**
 * A system whose sources disagree without a majority: every reading, none chosen.
 */
export interface CurveDisagreement {
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Quantity fitted. Words, no unit.
   */
  fit_basis: "ln x" | "ln r";
  /**
   * Readings, largest group of sources first.
   *
   * @minItems 2
   */
  readings: CurveReading[];
}
/**
 * What one group of sources that agree with one another says; never the published curve.
 */
export interface CurveReading {
  /**
   * Sources; keys of sources.csv. No unit.
   */
  sources: string[];
  /**
   * Curve model; absent where no curve can be fitted. Words, no unit.
   */
  model?: "van 't Hoff" | "modified Apelblat" | "Buchowski-Ksiazczak lambda-h" | "quadratic in 1/T" | "constant";
  /**
   * Coefficients in the usual form; T in K.
   *
   * Items: One coefficient.
   */
  coefficients?: {
    /**
     * Symbol in the equation. No unit.
     */
    name: string;
    /**
     * Value; T in K.
     */
    value: number;
  }[];
  /**
   * Lowest temperature of its points, K.
   */
  T_min_K?: number;
  /**
   * Highest temperature of its points, K.
   */
  T_max_K?: number;
  /**
   * Its points. A count.
   */
  n?: number;
}
/**
 * The model of one solute over a binary solvent with what is needed to evaluate it; y is x or r as fit_basis says, T in K.
 */
export interface MixtureDocument {
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
  model: "Jouyban-Acree-van 't Hoff";
  /**
   * Equation in the letters of the columns; w1 and w2 are mass fractions free of solute, T in K. No unit.
   */
  equation: string;
  /**
   * Quantity fitted. Words, no unit.
   */
  fit_basis: "ln x" | "ln r";
  /**
   * Coefficients A1, B1, A2, B2, J0 ..., each in the unit its equation gives it.
   */
  coefficients: CurveCoefficient[];
  /**
   * Covariance matrix of the coefficients in their order, products of their units.
   */
  covariance: number[][];
  /**
   * Lowest mass fraction of the first solvent in the data, 1.
   */
  w1_min: number;
  /**
   * Highest mass fraction of the first solvent in the data, 1.
   */
  w1_max: number;
  /**
   * Lowest temperature of the points used, K.
   */
  T_min_K: number;
  /**
   * Highest temperature of the points used, K.
   */
  T_max_K: number;
  /**
   * Points used. A count.
   */
  n: number;
  /**
   * Compositions of these points, pure solvents counted. A count.
   */
  n_compositions: number;
  /**
   * Sources of these points. A count.
   */
  n_sources: number;
  /**
   * Root mean square deviation of ln y from the surface, 1.
   */
  rmsd_ln: number;
  /**
   * Average relative deviation of y, percent.
   */
  ard_percent: number;
  /**
   * Standard deviation of ln y by which the curve of a composition lies off the surface, as the limits take it, 1.
   */
  lack_of_fit_sd: number;
  /**
   * Between-source standard deviation of ln y used in the limits, 1.
   */
  between_sd: number;
  /**
   * Degrees of freedom behind between_sd, 1; 0 where the default setting was used.
   */
  between_sd_degrees_of_freedom: number;
  /**
   * AICc, up to a common constant, with 0, 1 ... terms J as far as the compositions carry them, 1; null where too few points define it.
   */
  aicc: (number | null)[];
  /**
   * Corners of the convex hull of the data, each as [w1, T in K], counter-clockwise from the lowest w1: the model holds inside only.
   */
  domain: number[][];
  /**
   * Compositions by ascending w1.
   */
  members: MixtureMember[];
  /**
   * Maxima between the ends at round temperatures; empty where there are none.
   */
  inner_maxima: InnerMaximum[];
  /**
   * Remarks. Text, no unit.
   */
  notices: string[];
  /**
   * Measurements used; keys of measurements.csv.
   */
  measurement_ids: string[];
}
/**
 * One composition of a mixture, or one of its pure solvents.
 */
export interface MixtureMember {
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Mass fraction of the first solvent, mean over its points, 1.
   */
  w1: number;
  /**
   * Points that the surface uses. A count.
   */
  n_used: number;
  /**
   * Mean deviation of these points from the surface, ln y, 1; absent where none is used.
   */
  mean_deviation_ln?: number;
  /**
   * Mean deviation from the surface of the other compositions, ln y, 1; absent for the ends.
   */
  left_out_deviation_ln?: number;
  /**
   * Standard deviation of that, ln y, 1.
   */
  left_out_sd?: number;
  /**
   * Why the surface does not use it; absent where it does. Text, no unit.
   */
  why_not?: string;
}
/**
 * A maximum of the solubility between the ends of the compositions, at one temperature.
 */
export interface InnerMaximum {
  /**
   * Temperature, K.
   */
  temperature_K: number;
  /**
   * Mass fraction of the first solvent at the maximum, 1.
   */
  w1: number;
  /**
   * Lowest mass fraction whose solubility is not told apart from it, 1.
   */
  w1_low: number;
  /**
   * Highest such mass fraction, 1.
   */
  w1_high: number;
  /**
   * ln y there, 1.
   */
  ln_value: number;
  /**
   * Excess of ln y over the higher of the two ends, 1.
   */
  rise_ln: number;
  /**
   * Half-width of its 95 % limits, 1.
   */
  rise_half_width: number;
}
