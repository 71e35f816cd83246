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
   * Posterior probability of the cause among those tried, 0 to 1.
   */
  cause_probability?: number;
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
