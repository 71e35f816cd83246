// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * What `saltern publish --json` prints.
 */
export interface PublishResult {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * Name of the collection. No unit.
   */
  collection: string;
  /**
   * Name of the edition. No unit.
   */
  edition: string;
  /**
   * True where the edition was written; false where it is held back (exit code 1). No unit.
   */
  published: boolean;
  /**
   * Folder of the edition. No unit.
   */
  output: string;
  /**
   * Date of the edition. No unit.
   */
  date: string;
  /**
   * Counts of the whole edition.
   */
  counts: Counts;
  /**
   * Blocking flags without a ruling, each with the command that settles it.
   */
  to_settle: FlagToSettle[];
  /**
   * Notices on the collection and its rulings.
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
 * A blocking flag without a ruling.
 */
export interface FlagToSettle {
  /**
   * Flag; key of flags.csv. No unit.
   */
  flag_id: string;
  /**
   * What was seen. Text, no unit.
   */
  evidence: string;
  /**
   * Command that settles it, once action, name and reason are filled in. No unit.
   */
  command: string;
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
