/** A source of the demo as it goes to disk: card, table layout and rows, with the planted mistakes kept beside them. */
import type { Mistake, Reported } from "./measure.ts";
import { inWords } from "./truth.ts";

/** One line of a table; a mistake stays out of the file and goes into the list of planted mistakes. */
export interface Row {
  readonly cells: readonly string[];
  /** What the row measures, for the list of mistakes. */
  readonly about: string;
  readonly mistake?: Mistake;
}

/** A table with its card. */
export interface SourceFile {
  /** The source card; `source` and `file` name the two files. */
  readonly card: { readonly source: string; readonly file: string } & Readonly<Record<string, unknown>>;
  readonly delimiter: "," | ";" | "\t";
  readonly lineEnd: "\n" | "\r\n";
  readonly byteOrderMark: boolean;
  /** Lines above the headings. */
  readonly preamble: readonly string[];
  readonly headings: readonly string[];
  readonly rows: readonly Row[];
}

/** Comma, LF and headings on the first line. */
export const COMMA_TABLE = { delimiter: ",", lineEnd: "\n", byteOrderMark: false, preamble: [] } as const;

/** A row typed by hand, not measured from the invented truth. */
export function typedRow(cells: readonly string[], mistake?: Mistake): Row {
  const about = cells
    .filter((cell) => cell !== "")
    .slice(0, 3)
    .join(", ");
  return mistake ? { cells, about, mistake } : { cells, about };
}

/** Rows of a measured series, each laid out by `cells`. */
export function measuredRows(readings: readonly Reported[], cells: (reading: Reported) => readonly string[]): Row[] {
  return readings.map((reading) => {
    const about = `${inWords(reading.system)} at ${reading.celsius} °C`;
    const row = { cells: cells(reading), about };
    return reading.mistake ? { ...row, mistake: reading.mistake } : row;
  });
}

/** Line of a row in the file, counted from 1. */
export function lineOfRow(file: SourceFile, index: number): number {
  return file.preamble.length + 2 + index;
}

/** The whole table as text (RFC 4180 quoting). */
export function tableText(file: SourceFile): string {
  const record = (cells: readonly string[]) => cells.map((cell) => quoted(cell, file.delimiter)).join(file.delimiter);
  for (const { cells, about } of file.rows) {
    if (cells.length !== file.headings.length)
      throw new Error(`${file.card.source}: ${about} has ${cells.length} cells`);
  }
  const lines = [...file.preamble, record(file.headings), ...file.rows.map((row) => record(row.cells))];
  return `${file.byteOrderMark ? "\uFEFF" : ""}${lines.join(file.lineEnd)}${file.lineEnd}`;
}

function quoted(cell: string, delimiter: string): string {
  return cell.includes(delimiter) || /["\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
}

/** The opening of every laboratory card of the demo. */
export function laboratoryCard(source: string, title: string, reporter: string, laboratory: string, date: string) {
  return {
    format: 1,
    source,
    title: `${title} (invented)`,
    origin: "laboratory",
    reported_by: reporter,
    laboratory,
    date,
    reference: null,
    doi: null,
    licence: "invented data, free to use",
  };
}

/** A card as strict JSON, one property a line and one column a line, as people write them. */
export function cardText(card: Readonly<Record<string, unknown>>): string {
  const entries = Object.entries({ $schema: "../../../schemas/source-card.schema.json", ...card });
  const lines = entries.map(([key, value]) => `  ${JSON.stringify(key)}: ${propertyText(key, value)}`);
  return `{\n${lines.join(",\n")}\n}\n`;
}

function propertyText(key: string, value: unknown): string {
  if (key !== "columns" || !isObject(value)) return inline(value);
  const lines = Object.entries(value).map(([field, place]) => `    ${JSON.stringify(field)}: ${inline(place)}`);
  return `{\n${lines.join(",\n")}\n  }`;
}

function inline(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(inline).join(", ")}]`;
  if (!isObject(value)) return JSON.stringify(value);
  const members = Object.entries(value).map(([key, member]) => `${JSON.stringify(key)}: ${inline(member)}`);
  return `{ ${members.join(", ")} }`;
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}
