// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of measurements.csv: one accepted measurement, sorted by source, line and column. A cell that may be empty is a property that may be absent.
 */
export interface MeasurementRow {
  /**
   * SOURCE:LINE, or SOURCE:LINE:COLUMN where a row of the source holds several readings. No unit.
   */
  measurement_id: string;
  /**
   * Source it comes from; key of sources.csv. No unit.
   */
  source: string;
  /**
   * First physical line of the record in its file, the first line being 1.
   */
  line: number;
  /**
   * Heading of the column the value stood in. No unit.
   */
  column?: string;
  /**
   * Solute; key of substances.csv. No unit.
   */
  solute: string;
  /**
   * Solid form, or `unspecified`. No unit.
   */
  solid_form: string;
  /**
   * Solvent; components of a mixture joined by ` + `, each a key of substances.csv. No unit.
   */
  solvent: string;
  /**
   * Composition key of a mixed solvent: mass fractions, in the order of the components, to 0.005; empty for a pure one.
   */
  composition?: string;
  /**
   * What else is dissolved; empty for nothing. No unit.
   */
  medium?: string;
  /**
   * Family: the systems of this solute, solvent and medium in any solid form. No unit.
   */
  family: string;
  /**
   * System; key of systems.csv. No unit.
   */
  system: string;
  /**
   * Branch of the system's curve the measurement belongs to, 1 and up; with the system it gives the curve_id. No unit.
   */
  branch?: number;
  /**
   * Temperature, K.
   */
  temperature_K: number;
  /**
   * Value as reported, in reported_unit; the reported text where it is an interval.
   */
  reported_value: number | string;
  /**
   * Unit as reported. No unit of its own.
   */
  reported_unit: string;
  /**
   * Lower limit of an interval, in reported_unit; empty where open or not an interval.
   */
  value_low?: number;
  /**
   * Upper limit of an interval, in reported_unit; empty where open or not an interval.
   */
  value_high?: number;
  /**
   * Mole fraction of the solute, undissociated formula units, 1; empty where no molar mass is known.
   */
  mole_fraction?: number;
  /**
   * g unsolvated solute per 100 g total solvent.
   */
  g_per_100g_solvent?: number;
  /**
   * mg unsolvated solute per mL solution at the measuring temperature; empty where no density is known.
   */
  mg_per_mL_solution?: number;
  /**
   * mol solute per L solution at the measuring temperature; empty where density or molar mass is unknown.
   */
  mol_per_L?: number;
  /**
   * Relative standard uncertainty of the fitted quantity (mole fraction, else mass ratio), a fraction; temperature not included.
   */
  u_rel?: number;
  /**
   * What was assumed to convert the value, `; ` between the parts. No unit.
   */
  assumptions?: string;
  /**
   * Mole fraction the other measurements lead one to expect, 1.
   */
  predicted_mole_fraction?: number;
  /**
   * 100 (value / expected - 1), percent, of the fitted quantity.
   */
  deviation_percent?: number;
  /**
   * Deleted, studentised deviation from the screening fit, in standard deviations.
   */
  z?: number;
  /**
   * Weight in the published curve relative to a full one, 0 to 1.
   */
  weight?: number;
  /**
   * Whether it takes part in the curve. Words, no unit.
   */
  status: "kept" | "set aside" | "interval" | "not fitted";
  /**
   * Flags on the measurement and on its block, `;` between them; keys of flags.csv. No unit.
   */
  flags?: string;
  /**
   * How it was measured. Words, no unit.
   */
  method:
    | "gravimetric"
    | "titration"
    | "hplc"
    | "uv"
    | "refractive-index"
    | "isothermal-synthetic"
    | "clear-point"
    | "cloud-point"
    | "kinetic-from-stock"
    | "unspecified";
  /**
   * Where it was published. Text, no unit.
   */
  reference?: string;
  /**
   * Digital object identifier of that publication. No unit.
   */
  doi?: string;
  /**
   * Carried columns as `heading=value`, `; ` between them. No unit.
   */
  carried?: string;
}

/** Columns of the table, in their order. */
export const MEASUREMENTS_COLUMNS = [
  "measurement_id",
  "source",
  "line",
  "column",
  "solute",
  "solid_form",
  "solvent",
  "composition",
  "medium",
  "family",
  "system",
  "branch",
  "temperature_K",
  "reported_value",
  "reported_unit",
  "value_low",
  "value_high",
  "mole_fraction",
  "g_per_100g_solvent",
  "mg_per_mL_solution",
  "mol_per_L",
  "u_rel",
  "assumptions",
  "predicted_mole_fraction",
  "deviation_percent",
  "z",
  "weight",
  "status",
  "flags",
  "method",
  "reference",
  "doi",
  "carried"
] as const satisfies readonly (keyof MeasurementRow)[];
