// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of planning-cooling.csv: a cooling crystallisation planned from one curve; figures are empty, with a reason, where data end. Limits hold at 95 %. A cell that may be empty is a property that may be absent.
 */
export interface PlanningCoolingRow {
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Curve it is planned from; key of curves.csv; empty where the system has none. No unit.
   */
  curve_id?: string;
  /**
   * Solid form that crystallises: the one stable at the cold end. No unit.
   */
  crystal_form?: string;
  /**
   * Hot end: temperature of the highest solubility allowed, K.
   */
  T_hot_K?: number;
  /**
   * Cold end, K.
   */
  T_cold_K?: number;
  /**
   * Solubility at the hot end, g unsolvated solute per 100 g total solvent.
   */
  hot_g_per_100g_solvent?: number;
  /**
   * Solubility at the cold end, g unsolvated solute per 100 g total solvent.
   */
  cold_g_per_100g_solvent?: number;
  /**
   * Crystals at the cold end, percent of the charge, from a solution saturated at the hot end.
   */
  max_recovery_equilibrium_percent?: number;
  /**
   * Lower limit of it, percent.
   */
  max_recovery_equilibrium_percent_low?: number;
  /**
   * Upper limit of it, percent.
   */
  max_recovery_equilibrium_percent_high?: number;
  /**
   * Solvent beyond the least that dissolves the charge hot, percent, as the settings say.
   */
  excess_solvent_percent?: number;
  /**
   * Crystals at the cold end with that excess of solvent, percent of the charge.
   */
  working_recovery_percent?: number;
  /**
   * Solvent at 20 °C to add, mL per g of crystals charged; the crystals' own solvent is counted.
   */
  solvent_mL_per_g?: number;
  /**
   * Crystals in the slurry at the cold end, percent by mass.
   */
  solids_cold_percent?: number;
  /**
   * Charge left in the liquor with that excess of solvent, percent.
   */
  loss_to_liquor_percent?: number;
  /**
   * Temperature at which the working solution is just saturated, K.
   */
  saturation_temperature_K?: number;
  /**
   * Cautions, `; ` between them. No unit.
   */
  cautions?: string;
  /**
   * What the figures leave out. Text, no unit.
   */
  note: string;
  /**
   * Why the figures are empty. Text, no unit.
   */
  blank_reason?: string;
}

/** Columns of the table, in their order. */
export const PLANNING_COOLING_COLUMNS = [
  "system",
  "curve_id",
  "crystal_form",
  "T_hot_K",
  "T_cold_K",
  "hot_g_per_100g_solvent",
  "cold_g_per_100g_solvent",
  "max_recovery_equilibrium_percent",
  "max_recovery_equilibrium_percent_low",
  "max_recovery_equilibrium_percent_high",
  "excess_solvent_percent",
  "working_recovery_percent",
  "solvent_mL_per_g",
  "solids_cold_percent",
  "loss_to_liquor_percent",
  "saturation_temperature_K",
  "cautions",
  "note",
  "blank_reason"
] as const satisfies readonly (keyof PlanningCoolingRow)[];
