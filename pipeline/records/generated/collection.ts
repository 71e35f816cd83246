// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * collection.json: name, title, steward and settings of a collection.
 */
export interface CollectionCard {
  /**
   * Path of this schema, for editors. No unit.
   */
  $schema?: string;
  /**
   * Version of this file format. No unit.
   */
  format: 1;
  /**
   * Name of the collection: lower-case letters, digits and hyphens, at most 64. No unit.
   */
  name: string;
  /**
   * What the collection is, in one line. Text, no unit.
   */
  title?: string;
  /**
   * Who looks after it; a role rather than a name. Text, no unit.
   */
  steward?: string;
  /**
   * Settings that differ from their defaults, each in the unit its name ends in.
   */
  settings?: CollectionSettings;
}
/**
 * Settings of the collection; what is not given has the default shown. Defaults are common practice.
 */
export interface CollectionSettings {
  /**
   * Temperatures that curves use, K; measurements outside stay in the tables, not fitted. The defaults leave nothing out.
   */
  temperature_window_K?: {
    /**
     * Lowest temperature fitted, K.
     */
    low?: number;
    /**
     * Highest temperature fitted, K.
     */
    high?: number;
  };
  /**
   * Step between the round temperatures of grid.csv, K.
   */
  grid_step_K?: number;
  /**
   * Smallest deviation that is worth a person's time, percent: value and expectation differ by more than the factor 1 + p/100 either way.
   */
  material_threshold_percent?: {
    /**
     * From 10 mg/mL up, percent.
     */
    from_10_mg_per_mL?: number;
    /**
     * From 1 to 10 mg/mL, percent.
     */
    from_1_mg_per_mL?: number;
    /**
     * From 0.1 to 1 mg/mL, percent.
     */
    from_0_1_mg_per_mL?: number;
    /**
     * Below 0.1 mg/mL, percent (a factor 1.6).
     */
    below_0_1_mg_per_mL?: number;
    /**
     * Salts in water, any level, percent.
     */
    aqueous_salts?: number;
  };
  /**
   * The threshold is at least this many standard uncertainties of the value, 1.
   */
  material_threshold_uncertainties?: number;
  /**
   * A value is flagged beyond this factor outside the range of its pharmacopoeia term, 1.
   */
  pharmacopoeia_factor?: number;
  /**
   * Threshold for collections of many solutes near one temperature, in decades of the molar solubility (log10 unit).
   */
  single_temperature_threshold_log10?: number;
  /**
   * Rate q of the Benjamini-Hochberg procedure, a fraction.
   */
  false_discovery_rate?: number;
  /**
   * Standard uncertainty by method where a source states none, percent of the value.
   */
  default_uncertainty_percent?: {
    /**
     * Gravimetry, percent.
     */
    gravimetric?: number;
    /**
     * Titration, percent.
     */
    titration?: number;
    /**
     * Liquid chromatography, percent.
     */
    hplc?: number;
    /**
     * Ultraviolet absorption, percent.
     */
    uv?: number;
    /**
     * Refractive index, percent.
     */
    "refractive-index"?: number;
    /**
     * Isothermal synthetic method, percent.
     */
    "isothermal-synthetic"?: number;
    /**
     * Clear point: the weighed load, percent; its error is in the temperature.
     */
    "clear-point"?: number;
    /**
     * Cloud point: the weighed load, percent; never fitted.
     */
    "cloud-point"?: number;
    /**
     * Kinetic solubility from a stock solution, percent; never fitted.
     */
    "kinetic-from-stock"?: number;
    /**
     * Method not stated, percent.
     */
    unspecified?: number;
    /**
     * Salts in water from a handbook, method not stated, percent.
     */
    handbook_salts?: number;
  };
  /**
   * Part of the gravimetric uncertainty that does not shrink with the value, g/100 g solvent.
   */
  gravimetric_uncertainty_g_per_100g?: number;
  /**
   * Least standard uncertainty by level, any method, percent of the value.
   */
  uncertainty_floor_percent?: {
    /**
     * Below 1 mg/mL, percent.
     */
    below_1_mg_per_mL?: number;
    /**
     * Below 0.1 mg/mL, percent.
     */
    below_0_1_mg_per_mL?: number;
    /**
     * Below 0.01 mg/mL, percent.
     */
    below_0_01_mg_per_mL?: number;
  };
  /**
   * Least standard uncertainty of a reported one, which is repeatability, percent of the value.
   */
  reported_uncertainty_floor_percent?: {
    /**
     * Any solute and solvent, percent.
     */
    general?: number;
    /**
     * Salts in water, percent.
     */
    aqueous_salts?: number;
  };
  /**
   * Standard uncertainty of the temperature where a source states none, K.
   */
  temperature_uncertainty_K?: {
    /**
     * Probe in the solution, K.
     */
    solution?: number;
    /**
     * Probe in the bath, K.
     */
    bath?: number;
    /**
     * Probe in the jacket, K.
     */
    jacket?: number;
    /**
     * Probe not stated, K.
     */
    unspecified?: number;
    /**
     * Clear point heated at 0.3 K/min or slower, K, one-sided.
     */
    clear_point_to_0_3_K_per_min?: number;
    /**
     * Clear point heated at 0.3 to 1 K/min, K, one-sided.
     */
    clear_point_to_1_K_per_min?: number;
    /**
     * Clear point heated faster, or at a rate not stated, K, one-sided.
     */
    clear_point_faster?: number;
  };
  /**
   * Added for a probe in the jacket for each K between it and room temperature, K/K.
   */
  jacket_uncertainty_per_K_from_room?: number;
  /**
   * What `room temperature` means, K.
   */
  room_temperature_K?: {
    /**
     * Lowest, K.
     */
    low?: number;
    /**
     * Highest, K.
     */
    high?: number;
  };
  /**
   * Between-source standard deviation until three sources estimate it, percent of the value.
   */
  between_laboratory_percent?: {
    /**
     * Any solute and solvent, percent.
     */
    general?: number;
    /**
     * Salts in water, percent.
     */
    aqueous_salts?: number;
  };
  /**
   * Standard uncertainty of the composition of a solvent, percent by mass.
   */
  composition_uncertainty_wt_percent?: {
    /**
     * Made up by mass, wt %.
     */
    by_mass?: number;
    /**
     * Made up by volume, wt %.
     */
    by_volume?: number;
    /**
     * Water in `ethanol` without a grade, taken absolute, wt %.
     */
    plain_ethanol_water?: number;
  };
  /**
   * What a fit weighs alike: relative deviations (ln x) or absolute ones (x). Words, no unit.
   */
  fit_weighting?: "relative" | "absolute";
  /**
   * Solvent used beyond the least that dissolves the charge hot, percent.
   */
  planning_excess_solvent_percent?: number;
  /**
   * Headings of columns carried from every source that has them. No unit.
   */
  carry?: string[];
}

/**
 * Settings in force: every one present, defaults filled in.
 */
export interface Settings {
  /**
   * Temperatures that curves use, K; measurements outside stay in the tables, not fitted. The defaults leave nothing out.
   */
  temperature_window_K: {
    /**
     * Lowest temperature fitted, K.
     */
    low: number;
    /**
     * Highest temperature fitted, K.
     */
    high: number;
  };
  /**
   * Step between the round temperatures of grid.csv, K.
   */
  grid_step_K: number;
  /**
   * Smallest deviation that is worth a person's time, percent: value and expectation differ by more than the factor 1 + p/100 either way.
   */
  material_threshold_percent: {
    /**
     * From 10 mg/mL up, percent.
     */
    from_10_mg_per_mL: number;
    /**
     * From 1 to 10 mg/mL, percent.
     */
    from_1_mg_per_mL: number;
    /**
     * From 0.1 to 1 mg/mL, percent.
     */
    from_0_1_mg_per_mL: number;
    /**
     * Below 0.1 mg/mL, percent (a factor 1.6).
     */
    below_0_1_mg_per_mL: number;
    /**
     * Salts in water, any level, percent.
     */
    aqueous_salts: number;
  };
  /**
   * The threshold is at least this many standard uncertainties of the value, 1.
   */
  material_threshold_uncertainties: number;
  /**
   * A value is flagged beyond this factor outside the range of its pharmacopoeia term, 1.
   */
  pharmacopoeia_factor: number;
  /**
   * Threshold for collections of many solutes near one temperature, in decades of the molar solubility (log10 unit).
   */
  single_temperature_threshold_log10: number;
  /**
   * Rate q of the Benjamini-Hochberg procedure, a fraction.
   */
  false_discovery_rate: number;
  /**
   * Standard uncertainty by method where a source states none, percent of the value.
   */
  default_uncertainty_percent: {
    /**
     * Gravimetry, percent.
     */
    gravimetric: number;
    /**
     * Titration, percent.
     */
    titration: number;
    /**
     * Liquid chromatography, percent.
     */
    hplc: number;
    /**
     * Ultraviolet absorption, percent.
     */
    uv: number;
    /**
     * Refractive index, percent.
     */
    "refractive-index": number;
    /**
     * Isothermal synthetic method, percent.
     */
    "isothermal-synthetic": number;
    /**
     * Clear point: the weighed load, percent; its error is in the temperature.
     */
    "clear-point": number;
    /**
     * Cloud point: the weighed load, percent; never fitted.
     */
    "cloud-point": number;
    /**
     * Kinetic solubility from a stock solution, percent; never fitted.
     */
    "kinetic-from-stock": number;
    /**
     * Method not stated, percent.
     */
    unspecified: number;
    /**
     * Salts in water from a handbook, method not stated, percent.
     */
    handbook_salts: number;
  };
  /**
   * Part of the gravimetric uncertainty that does not shrink with the value, g/100 g solvent.
   */
  gravimetric_uncertainty_g_per_100g: number;
  /**
   * Least standard uncertainty by level, any method, percent of the value.
   */
  uncertainty_floor_percent: {
    /**
     * Below 1 mg/mL, percent.
     */
    below_1_mg_per_mL: number;
    /**
     * Below 0.1 mg/mL, percent.
     */
    below_0_1_mg_per_mL: number;
    /**
     * Below 0.01 mg/mL, percent.
     */
    below_0_01_mg_per_mL: number;
  };
  /**
   * Least standard uncertainty of a reported one, which is repeatability, percent of the value.
   */
  reported_uncertainty_floor_percent: {
    /**
     * Any solute and solvent, percent.
     */
    general: number;
    /**
     * Salts in water, percent.
     */
    aqueous_salts: number;
  };
  /**
   * Standard uncertainty of the temperature where a source states none, K.
   */
  temperature_uncertainty_K: {
    /**
     * Probe in the solution, K.
     */
    solution: number;
    /**
     * Probe in the bath, K.
     */
    bath: number;
    /**
     * Probe in the jacket, K.
     */
    jacket: number;
    /**
     * Probe not stated, K.
     */
    unspecified: number;
    /**
     * Clear point heated at 0.3 K/min or slower, K, one-sided.
     */
    clear_point_to_0_3_K_per_min: number;
    /**
     * Clear point heated at 0.3 to 1 K/min, K, one-sided.
     */
    clear_point_to_1_K_per_min: number;
    /**
     * Clear point heated faster, or at a rate not stated, K, one-sided.
     */
    clear_point_faster: number;
  };
  /**
   * Added for a probe in the jacket for each K between it and room temperature, K/K.
   */
  jacket_uncertainty_per_K_from_room: number;
  /**
   * What `room temperature` means, K.
   */
  room_temperature_K: {
    /**
     * Lowest, K.
     */
    low: number;
    /**
     * Highest, K.
     */
    high: number;
  };
  /**
   * Between-source standard deviation until three sources estimate it, percent of the value.
   */
  between_laboratory_percent: {
    /**
     * Any solute and solvent, percent.
     */
    general: number;
    /**
     * Salts in water, percent.
     */
    aqueous_salts: number;
  };
  /**
   * Standard uncertainty of the composition of a solvent, percent by mass.
   */
  composition_uncertainty_wt_percent: {
    /**
     * Made up by mass, wt %.
     */
    by_mass: number;
    /**
     * Made up by volume, wt %.
     */
    by_volume: number;
    /**
     * Water in `ethanol` without a grade, taken absolute, wt %.
     */
    plain_ethanol_water: number;
  };
  /**
   * What a fit weighs alike: relative deviations (ln x) or absolute ones (x). Words, no unit.
   */
  fit_weighting: "relative" | "absolute";
  /**
   * Solvent used beyond the least that dissolves the charge hot, percent.
   */
  planning_excess_solvent_percent: number;
  /**
   * Headings of columns carried from every source that has them. No unit.
   */
  carry: string[];
}

/** Settings of a collection that states none. */
export const DEFAULT_SETTINGS: Settings = {
  "temperature_window_K": {
    "low": 0,
    "high": 5000
  },
  "grid_step_K": 5,
  "material_threshold_percent": {
    "from_10_mg_per_mL": 10,
    "from_1_mg_per_mL": 15,
    "from_0_1_mg_per_mL": 25,
    "below_0_1_mg_per_mL": 60,
    "aqueous_salts": 5
  },
  "material_threshold_uncertainties": 3,
  "pharmacopoeia_factor": 2,
  "single_temperature_threshold_log10": 0.5,
  "false_discovery_rate": 0.01,
  "default_uncertainty_percent": {
    "gravimetric": 1.5,
    "titration": 1,
    "hplc": 3,
    "uv": 4,
    "refractive-index": 3,
    "isothermal-synthetic": 2,
    "clear-point": 1,
    "cloud-point": 1,
    "kinetic-from-stock": 5,
    "unspecified": 5,
    "handbook_salts": 2
  },
  "gravimetric_uncertainty_g_per_100g": 0.005,
  "uncertainty_floor_percent": {
    "below_1_mg_per_mL": 10,
    "below_0_1_mg_per_mL": 20,
    "below_0_01_mg_per_mL": 40
  },
  "reported_uncertainty_floor_percent": {
    "general": 1,
    "aqueous_salts": 0.5
  },
  "temperature_uncertainty_K": {
    "solution": 0.1,
    "bath": 0.3,
    "jacket": 0.5,
    "unspecified": 0.3,
    "clear_point_to_0_3_K_per_min": 0.5,
    "clear_point_to_1_K_per_min": 1,
    "clear_point_faster": 2
  },
  "jacket_uncertainty_per_K_from_room": 0.01,
  "room_temperature_K": {
    "low": 293.15,
    "high": 298.15
  },
  "between_laboratory_percent": {
    "general": 4,
    "aqueous_salts": 1
  },
  "composition_uncertainty_wt_percent": {
    "by_mass": 0.2,
    "by_volume": 0.5,
    "plain_ethanol_water": 0.5
  },
  "fit_weighting": "relative",
  "planning_excess_solvent_percent": 10,
  "carry": []
};
