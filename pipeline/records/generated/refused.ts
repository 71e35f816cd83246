// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of refused.csv: a reading that did not become a measurement, or a source refused as a whole. A cell that may be empty is a property that may be absent.
 */
export interface RefusedRow {
  /**
   * Source; key of sources.csv. No unit.
   */
  source: string;
  /**
   * First physical line of the record in its file; empty where the whole source is meant and no line is at fault.
   */
  line?: number;
  /**
   * Heading of the column, or key of the card, at fault. No unit.
   */
  column?: string;
  /**
   * Code of the problem, as the catalogue of problems lists it. No unit.
   */
  code: string;
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
  /**
   * The row as it stands in the file. Text, no unit.
   */
  raw?: string;
}

/** Columns of the table, in their order. */
export const REFUSED_COLUMNS = [
  "source",
  "line",
  "column",
  "code",
  "found",
  "expected",
  "mend",
  "raw"
] as const satisfies readonly (keyof RefusedRow)[];
