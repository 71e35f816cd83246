// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * What `saltern rule --json` prints.
 */
export interface RuleResult {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * The ruling as it was written.
   */
  ruling: AppliedRuling;
  /**
   * File it was appended to. No unit.
   */
  file: string;
  /**
   * Flags it settles; keys of flags.csv. No unit.
   */
  flags_settled: string[];
  /**
   * Blocking flags of the collection without a ruling. A count.
   */
  blocking_flags_left: number;
  /**
   * Notices on this ruling.
   */
  notices: Notice[];
}
/**
 * A ruling in force.
 */
export interface AppliedRuling {
  /**
   * Name of the ruling; key of the collection's rulings.csv. No unit.
   */
  ruling_id: string;
  /**
   * What it is on. No unit.
   */
  target: string;
  /**
   * What is decided. Words, no unit.
   */
  action: "keep" | "set aside" | "correct" | "ask";
  /**
   * Value put in place of the reported one, in corrected_unit.
   */
  corrected_value?: number;
  /**
   * Unit put in place of the reported one. No unit of its own.
   */
  corrected_unit?: string;
  /**
   * Why. Text, no unit.
   */
  reason: string;
  /**
   * Notebook page, author's reply, printed erratum or measurement repeated. Text, no unit.
   */
  evidence?: string;
  /**
   * Who decided. Text, no unit.
   */
  by: string;
  /**
   * When, YYYY-MM-DD. No unit.
   */
  date: string;
  /**
   * Measurements it decides, those that a narrower or later ruling decides left out; keys of measurements.csv. No unit.
   */
  measurement_ids: string[];
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
