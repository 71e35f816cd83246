import { createHash } from "node:crypto";
import { type Place, type Problem, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { DEFAULT_TABLE_FORMAT, type SourceCard } from "../records/generated/source-card.ts";
import type { Reading, SourceTable } from "../records/readings.ts";
import { constantPlaces, type Layout, layOut, namedHeadings } from "./columns.ts";
import { cutIntoRecords } from "./csv-records.ts";
import { findDecimalMark } from "./decimal-mark.ts";
import { findDelimiter } from "./delimiter.ts";
import { asUtf8, type Decoded } from "./encoding.ts";
import { orClose, peek, withoutLines } from "./physical-lines.ts";
import { tableBytes } from "./table-bytes.ts";

/** Bytes looked at to find the delimiter. */
const HEAD_BYTES = 1 << 16;

/** Ends of the names of tables that can be read. */
const READABLE = /\.(csv|tsv|txt)(\.gz)?$/i;

/** Where a table stands and how it is shown in messages. */
export interface TableFile {
  readonly path: string;
  /** Path for messages. */
  readonly shown: string;
  /** Name of the source. */
  readonly name: string;
}

/** What the rows of a table turn into while they are read. */
interface Rows {
  headings: readonly string[];
  layout: Layout;
  /** Rows that hold any text. */
  filled: number;
  missingCells: number;
  readonly readings: Reading[];
  readonly refused: Problem[];
}

/**
 * Reads a table in long shape: every row whose solubility cell is not empty and no missing mark is one reading. Cells are
 * trimmed; missing marks in the other columns that the card takes fields from become empty cells.
 *
 * A row with more or fewer cells than the header refuses its reading alone; lost structure refuses the whole table.
 * @throws InputError where the table as a whole cannot be read
 */
export async function readTable(file: TableFile, card: SourceCard): Promise<SourceTable> {
  const place: Place = { source: file.name, file: file.shown };
  if (!READABLE.test(file.path)) {
    throw new InputError(
      problem("unsupported-file-kind", place, { found: "the name ends in none of .csv, .tsv, .txt" }),
    );
  }
  const format = { ...DEFAULT_TABLE_FORMAT, ...card.table };
  const hash = createHash("sha256");
  const decoded: Decoded = { byteOrderMark: false, crlf: false };
  const text = asUtf8(tableBytes(file.path, hash, place), format.encoding, place, decoded);
  const { head, pieces } = await peek(withoutLines(text, format.header_line - 1), HEAD_BYTES);
  const headerPlace = { ...place, line: format.header_line };
  const named = namedHeadings(card);
  const { delimiter: stated } = format;
  const delimiter = stated === "auto" ? await orClose(text, () => findDelimiter(head, named, headerPlace)) : stated;
  const take = rowTaker(card, { delimiter, missing: new Set(["", ...format.missing]), place });
  await cutIntoRecords(pieces, { delimiter, firstLine: format.header_line, place }, take.row);
  const rows = take.end(format.header_line);

  const { layout, headings, readings, refused, missingCells } = rows;
  const decimal = format.decimal === "auto" ? findDecimalMark(readings, layout.numberIndexes) : format.decimal;
  return {
    ...{ name: file.name, card, file: file.shown, sha256: hash.digest("hex"), decimal, headings },
    places: { ...layout.columnPlaces, ...constantPlaces(card, decimal) },
    ...{ readings, readingsFound: readings.length + refused.length, missingCells, refused },
    notices: notices(rows, place, decoded, delimiter),
    ...{ columnsNotUsed: layout.columnsNotUsed, carried: layout.carried },
  };
}

/** Takes the records of one table, header first, and keeps the account of its readings. */
function rowTaker(
  card: SourceCard,
  { delimiter, missing, place }: { delimiter: string; missing: ReadonlySet<string>; place: Place },
) {
  let rows: Rows | undefined;
  let [least, most] = [0, 0];
  const header = (cells: string[], line: number) => {
    const layout = layOut(card, cells, { ...place, line });
    rows = { headings: cells, layout, filled: 0, missingCells: 0, readings: [], refused: [] };
    // Empty headings at the end need no cells below them.
    least = cells.findLastIndex((heading) => heading !== "") + 1;
    most = cells.length;
  };
  const longest = Math.max(...Array.from(missing, (mark) => mark.length));
  const isMissing = (cell: string) => cell.length <= longest && missing.has(cell);
  const row = (cells: string[], line: number, breaks: number) => {
    if (cells.every((cell) => cell === "")) return;
    if (rows === undefined) return header(cells, line);
    rows.filled++;
    if (cells.length < least || (cells.length > most && cells.some((cell, i) => i >= most && cell !== ""))) {
      // Too many or too few cells and a line break inside one: a quote has swallowed the rows that follow.
      if (breaks > 0) throw swallowed(place, line, breaks);
      rows.refused.push(ragged(cells, place, line, most, delimiter));
      return;
    }
    const { valueIndex, otherIndexes } = rows.layout;
    if (isMissing(cells[valueIndex] ?? "")) {
      rows.missingCells++;
      return;
    }
    for (const index of otherIndexes) if (isMissing(cells[index] ?? "")) cells[index] = "";
    rows.readings.push({ line, cells, valueIndex });
  };
  const end = (headerLine: number): Rows => {
    if (rows === undefined) {
      const found = headerLine === 1 ? "the file holds no text" : `nothing follows from line ${headerLine} on`;
      throw new InputError(problem("empty-file", place, { found }));
    }
    if (rows.filled > 0) return rows;
    throw new InputError(problem("header-only", place, { found: `${rows.headings.length} headings and no row` }));
  };
  return { row, end };
}

function swallowed(place: Place, line: number, breaks: number): InputError {
  const found = `a quoted cell runs over ${breaks + 1} lines, and the row has not as many cells as the header`;
  return new InputError(problem("unclosed-quote", { ...place, line }, { found }));
}

function ragged(cells: readonly string[], place: Place, line: number, width: number, delimiter: string): Problem {
  const found = `the row has ${cells.length} cells, the header ${width}`;
  return problem(
    "ragged-row",
    { ...place, line },
    { found, expected: `${width} cells`, raw: rowText(cells, delimiter) },
  );
}

/** A row as text again, with quotes where they are needed. */
function rowText(cells: readonly string[], delimiter: string): string {
  const quoted = (cell: string) =>
    cell.includes(delimiter) || /["\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
  return cells.map(quoted).join(delimiter);
}

function notices(rows: Rows, place: Place, decoded: Decoded, delimiter: string): Problem[] {
  const told: Problem[] = [];
  const traces = [
    ...(decoded.byteOrderMark ? ["a byte-order mark"] : []),
    ...(delimiter === ";" ? ["semicolons between the cells"] : []),
    ...(decoded.crlf ? ["line ends CR LF"] : []),
  ];
  // CR LF alone is what RFC 4180 prescribes, and semicolons alone may be anybody's choice.
  if (decoded.byteOrderMark || traces.length > 1) {
    told.push(problem("resaved-by-spreadsheet", place, { found: traces.join(", ") }));
  }
  if (rows.readings.length + rows.refused.length === 0) {
    const found = `${rows.missingCells} rows, none with a solubility`;
    told.push(problem("no-readings", place, { found }));
  }
  return told;
}
