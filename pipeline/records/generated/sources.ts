// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of sources.csv: one source with its account, readings = accepted + refused. A cell that may be empty is a property that may be absent.
 */
export interface SourceRow {
  /**
   * Name of the source, unique in the collection. No unit.
   */
  source: string;
  /**
   * What it is, in one line. Text, no unit.
   */
  title?: string;
  /**
   * Kind of source; empty where its card does not say. Words, no unit.
   */
  origin?: "laboratory" | "literature" | "open-dataset" | "handbook";
  /**
   * Who reports the values. Text, no unit.
   */
  reported_by?: string;
  /**
   * Where they were measured. Text, no unit.
   */
  laboratory?: string;
  /**
   * When, as the card says. No unit.
   */
  date?: string;
  /**
   * How they were measured, as the card says for the whole source. Words, no unit.
   */
  method?:
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
   * Where they were published. Text, no unit.
   */
  reference?: string;
  /**
   * Digital object identifier of that publication. No unit.
   */
  doi?: string;
  /**
   * Terms under which the values may be passed on. Text, no unit.
   */
  licence?: string;
  /**
   * Table of the source, relative to the collection. No unit.
   */
  file: string;
  /**
   * SHA-256 of the table as it stands on disk; empty where it was not read to its end. No unit.
   */
  sha256?: string;
  /**
   * Readings found: accepted + refused. A count.
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
   * Cells that hold a mark for no value; not readings. A count.
   */
  missing_cells: number;
  /**
   * Whether the source was refused as a whole. Words, no unit.
   */
  refused_whole: "yes" | "no";
  /**
   * Scatter of ln value within the source, pooled over its systems and shrunk towards the edition's, 1.
   */
  within_sd?: number;
  /**
   * Headings that the card neither names nor carries, `;` between them. No unit.
   */
  columns_not_used?: string;
}

/** Columns of the table, in their order. */
export const SOURCES_COLUMNS = [
  "source",
  "title",
  "origin",
  "reported_by",
  "laboratory",
  "date",
  "method",
  "reference",
  "doi",
  "licence",
  "file",
  "sha256",
  "readings",
  "accepted",
  "refused",
  "missing_cells",
  "refused_whole",
  "within_sd",
  "columns_not_used"
] as const satisfies readonly (keyof SourceRow)[];
