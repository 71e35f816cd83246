// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of grid.csv: a curve at a round temperature inside its range. Limits hold at 95 %. A cell that may be empty is a property that may be absent.
 */
export interface GridRow {
  /**
   * Curve; key of curves.csv. No unit.
   */
  curve_id: string;
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Temperature, K; round in °C.
   */
  temperature_K: number;
  /**
   * Mole fraction of the solute, 1; empty where no molar mass is known.
   */
  mole_fraction?: number;
  /**
   * Lower limit of the curve, mole fraction, 1.
   */
  mole_fraction_curve_low?: number;
  /**
   * Upper limit of the curve, mole fraction, 1.
   */
  mole_fraction_curve_high?: number;
  /**
   * Lower limit of a new measurement from a new source, mole fraction, 1.
   */
  mole_fraction_new_low?: number;
  /**
   * Upper limit of a new measurement from a new source, mole fraction, 1.
   */
  mole_fraction_new_high?: number;
  /**
   * g unsolvated solute per 100 g total solvent.
   */
  g_per_100g_solvent: number;
  /**
   * Lower limit of the curve, g/100 g solvent.
   */
  g_per_100g_solvent_curve_low: number;
  /**
   * Upper limit of the curve, g/100 g solvent.
   */
  g_per_100g_solvent_curve_high: number;
  /**
   * Lower limit of a new measurement from a new source, g/100 g solvent.
   */
  g_per_100g_solvent_new_low: number;
  /**
   * Upper limit of a new measurement from a new source, g/100 g solvent.
   */
  g_per_100g_solvent_new_high: number;
  /**
   * mg unsolvated solute per mL solution at this temperature; empty where no density is known.
   */
  mg_per_mL_solution?: number;
  /**
   * Width of the gap between measured temperatures in which this one lies, K; empty up to 25 K.
   */
  data_gap_K?: number;
}

/** Columns of the table, in their order. */
export const GRID_COLUMNS = [
  "curve_id",
  "system",
  "temperature_K",
  "mole_fraction",
  "mole_fraction_curve_low",
  "mole_fraction_curve_high",
  "mole_fraction_new_low",
  "mole_fraction_new_high",
  "g_per_100g_solvent",
  "g_per_100g_solvent_curve_low",
  "g_per_100g_solvent_curve_high",
  "g_per_100g_solvent_new_low",
  "g_per_100g_solvent_new_high",
  "mg_per_mL_solution",
  "data_gap_K"
] as const satisfies readonly (keyof GridRow)[];
