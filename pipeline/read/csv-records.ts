import { CsvError, parse } from "csv-parse";
import { type Place, type ProblemCode, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { lineBreaks, MAX_ROW_BYTES } from "./physical-lines.ts";

/** Called for every record: its trimmed cells, its first physical line, and the line breaks inside its cells. */
export type OnRecord = (cells: string[], line: number, breaks: number) => void;

const QUOTE = 0x22;

/** Cells longer than this are not looked up among those seen before. */
const LONGEST_SHARED = 40;

/** Distinct cells of a column remembered; a column with more is taken to be of numbers, and its cells are not shared. */
const MOST_SHARED = 4096;

/** Codes of csv-parse in our words. */
const CODES: Readonly<Record<string, ProblemCode>> = {
  CSV_QUOTE_NOT_CLOSED: "unclosed-quote",
  CSV_INVALID_CLOSING_QUOTE: "stray-quote",
  INVALID_OPENING_QUOTE: "stray-quote",
  CSV_NON_TRIMABLE_CHAR_AFTER_CLOSING_QUOTE: "stray-quote",
  CSV_MAX_RECORD_SIZE: "oversized-cell",
};

/**
 * Cuts a delimited text (RFC 4180, any of LF, CRLF and CR as line end, mixed or not) into records.
 *
 * Lines are counted here, from the breaks inside cells: the parser's own count costs as much as the parsing. Equal cells
 * of a column share one string, which more than halves the memory of a large table.
 *
 * @param pieces checked UTF-8, beginning at physical line `firstLine`
 * @throws InputError `unclosed-quote`, `stray-quote`, `oversized-cell`, with the first line of the record; and whatever
 *   `onRecord` throws
 */
export async function cutIntoRecords(
  pieces: AsyncIterable<Buffer>,
  { delimiter, firstLine, place }: { delimiter: string; firstLine: number; place: Place },
  onRecord: OnRecord,
): Promise<void> {
  let line = firstLine;
  let quotes = false;
  let fault: unknown;
  const share = cellSharing();
  const take = (cells: string[]) => {
    if (fault !== undefined) return;
    const breaks = share(cells, quotes);
    try {
      onRecord(cells, line, breaks);
    } catch (error) {
      fault = error;
    }
    line += 1 + breaks;
  };
  const parser = parse({
    ...{ delimiter, record_delimiter: ["\r\n", "\n", "\r"], relax_column_count: true, max_record_size: MAX_ROW_BYTES },
    ...{ ltrim: true, rtrim: true },
  });
  // Records are taken as they are cut, not through the stream's queue: so the line count is right when an error comes.
  const end = parser.push.bind(parser);
  parser.push = (record: string[] | null) => {
    if (record === null) return end(null);
    take(record);
    return true;
  };
  parser.on("error", (error) => {
    fault ??= asInputError(error, { ...place, line });
  });
  const closed = new Promise((resolve) => parser.on("close", resolve));
  parser.resume();
  for await (const piece of pieces) {
    quotes ||= piece.includes(QUOTE);
    if (!parser.write(piece)) await Promise.race([new Promise((resolve) => parser.once("drain", resolve)), closed]);
    if (fault !== undefined) break;
  }
  if (fault === undefined) parser.end();
  else parser.destroy();
  await closed;
  if (fault !== undefined) throw fault;
}

/**
 * Keeper of the cells of one table: gives equal cells of a column the same string. The function it returns changes the
 * cells in place and tells how many line breaks they hold; without a quote so far (`quoted` false) no cell can hold one,
 * nor a blank at its end, which the parser has taken off.
 */
function cellSharing(): (cells: string[], quoted: boolean) => number {
  const columns: (Map<string, string> | null)[] = [];
  const above: (string | undefined)[] = [];
  return (cells, quoted) => {
    let breaks = 0;
    for (let i = 0; i < cells.length; i++) {
      const raw = cells[i] as string;
      const same = above[i];
      if (raw === same) {
        cells[i] = same;
        continue;
      }
      const inside = quoted ? lineBreaks(raw) : 0;
      breaks += inside;
      const cell = shared(quoted ? raw.trim() : raw, columns, i);
      cells[i] = cell;
      above[i] = inside === 0 ? cell : undefined;
    }
    return breaks;
  };
}

/** The string that stands for all equal cells of a column. */
function shared(cell: string, columns: (Map<string, string> | null)[], column: number): string {
  let seen = columns[column];
  if (seen === null || cell.length > LONGEST_SHARED) return cell;
  if (seen === undefined) {
    seen = new Map();
    columns[column] = seen;
  }
  const same = seen.get(cell);
  if (same !== undefined) return same;
  if (seen.size < MOST_SHARED) seen.set(cell, cell);
  else columns[column] = null;
  return cell;
}

function asInputError(error: unknown, place: Place): unknown {
  const code = error instanceof CsvError ? CODES[error.code] : undefined;
  if (code === undefined) return error;
  const found: Readonly<Partial<Record<ProblemCode, string>>> = {
    "unclosed-quote": "the row that begins here has a quote that is never closed",
    "stray-quote": "the row that begins here has a quote in the middle of a cell",
    "oversized-cell": `the row that begins here is longer than ${MAX_ROW_BYTES} bytes`,
  };
  return new InputError(problem(code, place, { found: found[code] ?? "" }));
}
