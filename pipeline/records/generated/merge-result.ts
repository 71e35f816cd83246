// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * What `saltern merge --json` prints.
 */
export interface MergeResult {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * Name of the collection. No unit.
   */
  collection: string;
  /**
   * Folder written, as given on the command line. No unit.
   */
  output: string;
  /**
   * File to open first. No unit.
   */
  open: string;
  /**
   * Counts of the whole edition.
   */
  counts: Counts;
  /**
   * Account of every source, sorted by name.
   */
  sources: SourceCounts[];
  /**
   * True where something needs a person (exit code 1). No unit.
   */
  needs_you: boolean;
  /**
   * Readings and sources refused, each with its place.
   */
  problems: Notice[];
  /**
   * Things worth telling that refuse nothing.
   */
  notices: Notice[];
}
/**
 * Counts of the whole edition; readings = accepted + refused.
 */
export interface Counts {
  /**
   * Sources. A count.
   */
  sources: number;
  /**
   * Sources refused as a whole. A count.
   */
  sources_refused: number;
  /**
   * Readings: accepted + refused. A count.
   */
  readings: number;
  /**
   * Readings that became measurements. A count.
   */
  accepted: number;
  /**
   * Readings that did not. A count.
   */
  refused: number;
  /**
   * Cells that hold a mark for no value. A count.
   */
  missing_cells: number;
  /**
   * Measurements kept. A count.
   */
  kept: number;
  /**
   * Measurements set aside. A count.
   */
  set_aside: number;
  /**
   * Measurements known only as a range. A count.
   */
  intervals: number;
  /**
   * Measurements that no curve uses. A count.
   */
  not_fitted: number;
  /**
   * Substances. A count.
   */
  substances: number;
  /**
   * Families. A count.
   */
  families: number;
  /**
   * Systems. A count.
   */
  systems: number;
  /**
   * Curves. A count.
   */
  curves: number;
  /**
   * Flags. A count.
   */
  flags: number;
  /**
   * Blocking flags without a ruling. A count.
   */
  blocking_flags: number;
}
/**
 * Account of one source; readings = accepted + refused.
 */
export interface SourceCounts {
  /**
   * Name of the source. No unit.
   */
  source: string;
  /**
   * Readings: accepted + refused. A count.
   */
  readings: number;
  /**
   * Readings that became measurements. A count.
   */
  accepted: number;
  /**
   * Readings that did not; 1 for a source refused as a whole. A count.
   */
  refused: number;
  /**
   * Cells that hold a mark for no value. A count.
   */
  missing_cells: number;
  /**
   * Headings that the card neither names nor carries. No unit.
   */
  columns_not_used: string[];
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
