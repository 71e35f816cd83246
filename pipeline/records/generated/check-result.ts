// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * What `saltern check --json` prints: a verdict on every row of a new table.
 */
export interface CheckResult {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * Table that was checked, as given on the command line. No unit.
   */
  file: string;
  /**
   * Name of the collection it was checked against. No unit.
   */
  collection: string;
  /**
   * Readings: accepted + refused. A count.
   */
  readings: number;
  /**
   * Readings that got a verdict. A count.
   */
  accepted: number;
  /**
   * Readings refused. A count.
   */
  refused: number;
  /**
   * Rows by verdict. Counts.
   */
  verdicts: {
    /**
     * Rows with the verdict `fits`. A count.
     */
    fits: number;
    /**
     * Rows with the verdict `off the curve`. A count.
     */
    "off the curve": number;
    /**
     * Rows with the verdict `outside the range`. A count.
     */
    "outside the range": number;
    /**
     * Rows with the verdict `new system`. A count.
     */
    "new system": number;
    /**
     * Rows with the verdict `cannot tell`. A count.
     */
    "cannot tell": number;
  };
  /**
   * Rows in the order of the table.
   */
  rows: CheckedRow[];
  /**
   * How the file stands to the other sources, system by system.
   */
  offsets: SystemOffset[];
  /**
   * How the file stands to the others over all systems; absent with fewer than two. Percent and counts.
   */
  pooled_offset?: PooledOffset;
  /**
   * Rows that would count once though they are written more than once.
   */
  repeats: RepeatedRows[];
  /**
   * What the systems of the file would become if it were merged as it is.
   */
  if_merged: MergedSystem[];
  /**
   * Readings refused, each with its place, and the source as a whole where it was.
   */
  problems: Notice[];
  /**
   * Things worth telling that refuse nothing.
   */
  notices: Notice[];
}
/**
 * One reading of the new table with its verdict; expectation and limits are in the reading's own unit.
 */
export interface CheckedRow {
  /**
   * SOURCE:LINE, or SOURCE:LINE:COLUMN. No unit.
   */
  measurement_id: string;
  /**
   * Physical line, the first line being 1.
   */
  line: number;
  /**
   * Heading of the column the value stood in. No unit.
   */
  column: string;
  /**
   * System it belongs to. No unit.
   */
  system: string;
  /**
   * Solute. No unit.
   */
  solute: string;
  /**
   * Solid form, or `unspecified`. No unit.
   */
  solid_form: string;
  /**
   * Solvent. No unit.
   */
  solvent: string;
  /**
   * Temperature, K.
   */
  temperature_K: number;
  /**
   * Value as reported, in reported_unit; the text of an interval.
   */
  reported_value: number | string;
  /**
   * Unit as reported. No unit of its own.
   */
  reported_unit: string;
  /**
   * Value the collection's curve gives, in reported_unit.
   */
  expected_value?: number;
  /**
   * Lower 95 % limit of a new measurement, in reported_unit.
   */
  expected_low?: number;
  /**
   * Upper 95 % limit of a new measurement, in reported_unit.
   */
  expected_high?: number;
  /**
   * 100 (value / expected - 1), percent.
   */
  deviation_percent?: number;
  /**
   * Studentised deviation, in standard deviations.
   */
  z?: number;
  /**
   * Verdict. Words, no unit.
   */
  verdict: "fits" | "off the curve" | "outside the range" | "new system" | "cannot tell";
  /**
   * Likeliest cause; absent where none was sought. Words, no unit.
   */
  suspected_cause?:
    | "power of ten"
    | "dilution factor"
    | "basis mix-up"
    | "temperature unit"
    | "temperature offset"
    | "hydrate basis"
    | "salt or free base"
    | "composition mix-up"
    | "rows shifted"
    | "digits transposed"
    | "value of another solvent"
    | "logarithm base"
    | "calculated value copied"
    | "everything dissolved"
    | "loss on filtration"
    | "solvent lost"
    | "not at equilibrium"
    | "cloud point for clear point"
    | "another solid form"
    | "wet solvent"
    | "no simple cause";
  /**
   * What happened by that cause, in words. No unit.
   */
  cause_detail?: string;
  /**
   * Posterior probability of the cause among those tried, 0 to 1.
   */
  cause_probability?: number;
  /**
   * What the finding is on: this row, all rows of the file in this system, or the system. Words, no unit.
   */
  cause_scope?: "measurement" | "block" | "system";
  /**
   * Value that would fit, in reported_unit.
   */
  proposed_value?: number;
  /**
   * What was seen, in words with figures. No unit.
   */
  evidence: string;
  /**
   * What to look at or measure again; empty where nothing. No unit.
   */
  look_at: string;
}
/**
 * How the file stands to the other sources of one system.
 */
export interface SystemOffset {
  /**
   * System. No unit.
   */
  system: string;
  /**
   * Solute. No unit.
   */
  solute: string;
  /**
   * Solid form, or `unspecified`. No unit.
   */
  solid_form: string;
  /**
   * Solvent with its composition. No unit.
   */
  solvent: string;
  /**
   * Rows compared: those within the curve that are not off by themselves. A count.
   */
  rows: number;
  /**
   * Sources behind the curve. A count.
   */
  other_sources: number;
  /**
   * Mean deviation of the rows from the curve of the collection, percent of the mass ratio (g per g of solvent).
   */
  offset_percent: number;
  /**
   * Lower 95 % limit of the offset, percent.
   */
  low_percent: number;
  /**
   * Upper 95 % limit of the offset, percent.
   */
  high_percent: number;
}
/**
 * Mean of the offsets over systems, every system counting by what is known of it; absent with a single system.
 */
export interface PooledOffset {
  /**
   * Systems compared. A count.
   */
  systems: number;
  /**
   * Mean deviation of the rows from the curve of the collection, percent of the mass ratio (g per g of solvent).
   */
  offset_percent: number;
  /**
   * Lower 95 % limit of the offset, percent.
   */
  low_percent: number;
  /**
   * Upper 95 % limit of the offset, percent.
   */
  high_percent: number;
  /**
   * Standard deviation by which the offsets of systems differ beyond their limits, percent.
   */
  between_systems_percent: number;
}
/**
 * Rows that give what the collection, or the file itself, holds already: they would count once.
 */
export interface RepeatedRows {
  /**
   * Code of the notice: exact-repeat, one-value-in-two-units, re-reported, averaged-copy, changed-copy, re-reporting-source. No unit.
   */
  code: string;
  /**
   * Lines of the file concerned; empty where the whole file is.
   */
  lines: number[];
  /**
   * System; empty where it is the whole file. No unit.
   */
  system: string;
  /**
   * What was seen, in words with figures. No unit.
   */
  evidence: string;
}
/**
 * What one system would become if the file were merged as it is.
 */
export interface MergedSystem {
  /**
   * System. No unit.
   */
  system: string;
  /**
   * Solute. No unit.
   */
  solute: string;
  /**
   * Solid form, or `unspecified`. No unit.
   */
  solid_form: string;
  /**
   * Solvent with its composition. No unit.
   */
  solvent: string;
  /**
   * Model of the curve of the collection; the reason where there is none. No unit.
   */
  curve_before: string;
  /**
   * Model of the curve after; the reason where there is none. No unit.
   */
  curve_after: string;
  /**
   * Points in the curves before. A count.
   */
  points_before: number;
  /**
   * Points in the curves after. A count.
   */
  points_after: number;
  /**
   * Coldest, usual (25 °C, else the middle) and hottest temperature of both curves and the one where they differ most; empty where either is missing.
   */
  changes: CurveChange[];
  /**
   * Grade before; empty for a new system. Words, no unit.
   */
  grade_before: string;
  /**
   * Grade after. Words, no unit.
   */
  grade_after: string;
  /**
   * Highest recovery of a cooling crystallisation at equilibrium before, percent of the charge; absent where none can be planned.
   */
  recovery_before_percent?: number;
  /**
   * The same after, percent of the charge.
   */
  recovery_after_percent?: number;
  /**
   * Flags that would need a person and are not there now. A count.
   */
  new_flags: number;
}
/**
 * The curve at one temperature, before and after.
 */
export interface CurveChange {
  /**
   * Temperature, K.
   */
  temperature_K: number;
  /**
   * Curve of the collection, g/100 g solvent.
   */
  before_g_per_100g_solvent: number;
  /**
   * Curve with the file merged, g/100 g solvent.
   */
  after_g_per_100g_solvent: number;
  /**
   * 100 (after / before - 1), percent.
   */
  change_percent: number;
  /**
   * Half-width of the 95 % limits of the curve before, percent of the fitted quantity.
   */
  half_width_before_percent: number;
  /**
   * The same after, percent.
   */
  half_width_after_percent: number;
}
/**
 * A problem or notice with its place.
 */
export interface Notice {
  /**
   * Code, as the catalogue of problems lists it. No unit.
   */
  code: string;
  /**
   * File, relative to the collection or as given on the command line. No unit.
   */
  file: string;
  /**
   * Source, where there is one. No unit.
   */
  source?: string;
  /**
   * Physical line, the first line being 1.
   */
  line?: number;
  /**
   * Heading of the column, or key of a JSON file. No unit.
   */
  column?: string;
  /**
   * What was found. Text, no unit.
   */
  found: string;
  /**
   * What was expected. Text, no unit.
   */
  expected: string;
  /**
   * How to mend it. Text, no unit.
   */
  mend: string;
}
