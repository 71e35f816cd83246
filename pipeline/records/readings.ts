import type { Problem } from "../problems/catalogue.ts";
import type { SourceCard } from "./generated/source-card.ts";
import type { DecimalMark } from "./number-text.ts";

/** Every field a measurement may have. The first four are needed; the rest raise the grade or settle the basis. */
export const FIELDS = [
  ...["solute", "solvent", "temperature", "solubility"],
  ...["cas", "inchikey", "smiles", "formula", "molar_mass", "solid_form", "solute_basis"],
  ...["composition", "composition_basis", "solvent_grade", "solvent_water_wt_percent", "medium", "pH_final", "stereo"],
  ...["lot", "solute_purity"],
  ...["uncertainty", "coverage_factor", "n", "temperature_uncertainty", "temperature_probe", "solution_density"],
  ...["volume_temperature", "equilibration_h", "approach", "heating_rate_K_per_min", "filter_temperature"],
  ...["excess_solid", "solid_before", "solid_after", "solid_check", "drying", "assay_after"],
  ...["method", "replicate", "measured_on", "reference", "doi", "note"],
] as const;

/** Where a field of a source comes from: a column of the table, or one value for the whole source. */
export type FieldPlace =
  | {
      readonly kind: "column";
      /** Heading as written in the file. */
      readonly heading: string;
      /** 0-based position in `Reading.cells`. */
      readonly index: number;
      /** Unit stated in the card, if any. */
      readonly unit?: string;
      /** 0-based position of the column that holds the unit, if the unit varies by row. */
      readonly unitIndex?: number;
    }
  | { readonly kind: "constant"; readonly text: string; readonly unit?: string };

/** Where every field of a source comes from; a field that is absent was not reported. */
export type FieldPlaces = Readonly<Record<string, FieldPlace>>;

/** One solubility cell that could become a measurement, with the row it stands in. */
export interface Reading {
  /** First physical line of the record in its file, 1-based. */
  readonly line: number;
  /** All cells of the row, trimmed, in the order of the file's columns. */
  readonly cells: readonly string[];
  /** 0-based position of the solubility cell; wide tables have several readings a row. */
  readonly valueIndex: number;
  /** The field values that this reading has instead of its source's `places` (temperature of a wide column, say). */
  readonly own?: FieldPlaces;
}

/** A source as it was read: its readings, those refused on the way, and where every field comes from. */
export interface SourceTable {
  /** Name of the source, unique in the collection. */
  readonly name: string;
  readonly card: SourceCard;
  /** Path of the table relative to the collection, with forward slashes, for messages. */
  readonly file: string;
  /** SHA-256 of the table file as it stands on disk, lower-case hexadecimal. */
  readonly sha256: string;
  /** Decimal mark of the numbers, from the card or found in the number columns. */
  readonly decimal: DecimalMark;
  /** Headings of the table as written. */
  readonly headings: readonly string[];
  readonly places: FieldPlaces;
  readonly readings: readonly Reading[];
  /** Readings found in the file, those refused while reading included: readings + refused by the reader. */
  readonly readingsFound: number;
  /** Solubility cells that hold one of the card's missing marks: not readings, but counted. */
  readonly missingCells: number;
  /** Problems that refused a reading while the file was read. */
  readonly refused: readonly Problem[];
  /** Things worth telling that refuse nothing. */
  readonly notices: readonly Problem[];
  /** Headings that the card neither names nor carries. */
  readonly columnsNotUsed: readonly string[];
  /** Positions of the columns that the card carries through to the tables. */
  readonly carried: readonly { readonly heading: string; readonly index: number }[];
}

/** A source that could not be read at all (wrong card, lost structure), with the one problem that says why. */
export interface RefusedSource {
  readonly name: string;
  readonly card?: SourceCard;
  readonly file: string;
  readonly problem: Problem;
}

/** One line of a table of substances, solid forms, property values or rulings, as text. */
export interface TableRow {
  /** File for messages: relative to the collection, or to the program's own folder of properties. */
  readonly file: string;
  /** First physical line, 1-based. */
  readonly line: number;
  /** Trimmed text of every column the table may have; "" where the table leaves it out. */
  readonly values: Readonly<Record<string, string>>;
}
