// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

import type { Settings } from "./collection.ts";

/**
 * edition.json: what an edition is, what it was made from, what it consists of.
 */
export interface EditionDocument {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * Name of the edition. No unit.
   */
  edition: string;
  /**
   * As given, else the newest date among source cards and rulings. No unit.
   */
  date: string;
  /**
   * Version of the program that wrote it. No unit.
   */
  program_version: string;
  /**
   * The collection published.
   */
  collection: EditionCollection;
  /**
   * Counts of the whole edition.
   */
  counts: Counts;
  /**
   * Settings in force, defaults filled in; each in the unit its name ends in.
   */
  settings: Settings;
  /**
   * The edition that CHANGES.md compares with, where one was named.
   */
  since?: EditionBefore;
  /**
   * Rulings in force, in the order of rulings.csv.
   */
  rulings: AppliedRuling[];
  /**
   * Every file the edition was made from, by owner and path.
   */
  inputs: InputFile[];
  /**
   * Every other file of the edition, by path.
   */
  outputs: OutputFile[];
  /**
   * SHA-256 of this file with this value left empty, hexadecimal. No unit.
   */
  sha256: string;
}
/**
 * The collection published.
 */
export interface EditionCollection {
  /**
   * Name of the collection. No unit.
   */
  name: string;
  /**
   * Title of the collection. Text, no unit.
   */
  title: string;
  /**
   * Who answers for it. Text, no unit.
   */
  steward: string;
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
 * The edition that CHANGES.md compares with.
 */
export interface EditionBefore {
  /**
   * Its name. No unit.
   */
  edition: string;
  /**
   * The checksum in its edition.json, hexadecimal. No unit.
   */
  sha256: string;
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
 * A file the edition was made from.
 */
export interface InputFile {
  /**
   * Whose file it is: the collection's, or the program's own tables. Words, no unit.
   */
  of: "collection" | "program";
  /**
   * Path in the collection, or in the program, with forward slashes. No unit.
   */
  path: string;
  /**
   * SHA-256 of the file as it stood, hexadecimal. No unit.
   */
  sha256: string;
}
/**
 * A file of the edition.
 */
export interface OutputFile {
  /**
   * Path in the edition's folder, with forward slashes. No unit.
   */
  path: string;
  /**
   * Size, bytes.
   */
  bytes: number;
  /**
   * SHA-256, hexadecimal. No unit.
   */
  sha256: string;
}
