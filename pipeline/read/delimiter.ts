import { parse } from "csv-parse/sync";
import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";

/** Characters that may separate cells. */
const CANDIDATES = [",", ";", "\t", "|"] as const;
export type Delimiter = (typeof CANDIDATES)[number];

const NAMES: Readonly<Record<Delimiter, string>> = { ",": "comma", ";": "semicolon", "\t": "tab", "|": "vertical bar" };

/** Rows looked at below the header. */
const SAMPLE_ROWS = 20;

/** Rows of the beginning of a table as one delimiter would cut them; [] where its quotes make no sense. */
function cut(head: string, delimiter: Delimiter, rows: number): string[][] {
  try {
    return parse(head, {
      ...{ delimiter, to: rows, record_delimiter: ["\r\n", "\n", "\r"], relax_column_count: true, relax_quotes: true },
      ...{ ltrim: true, rtrim: true },
    });
  } catch {
    // The head may end inside a quoted cell.
    return rows > 1 ? cut(head, delimiter, 1) : [];
  }
}

/** True if all rows that have any text have as many cells as the header. */
function isEven(rows: readonly (readonly string[])[]): boolean {
  const width = rows[0]?.length ?? 0;
  return width > 1 && rows.every((row) => row.length === width || row.every((cell) => cell === ""));
}

/**
 * Which character separates the cells of a table. The headings that the card names decide: the delimiter under which
 * most of them are found; where that leaves a choice, the one under which the first rows are even.
 *
 * @param head beginning of the table, from its header on
 * @param wanted headings that must be there
 * @throws InputError `ambiguous-delimiter` where two delimiters do equally well
 */
export function findDelimiter(head: string, wanted: readonly string[], place: Place): Delimiter {
  const tried = CANDIDATES.map((delimiter) => {
    const rows = cut(head, delimiter, SAMPLE_ROWS + 1);
    const headings = new Set(rows[0]);
    const found = wanted.filter((heading) => headings.has(heading)).length;
    return { delimiter, found, width: rows[0]?.length ?? 0, even: isEven(rows) };
  });
  const most = Math.max(...tried.map(({ found }) => found));
  const left = tried.filter(({ found }) => found === most);
  const [only, ...others] = left;
  if (only !== undefined && others.length === 0) return only.delimiter;
  const even = left.filter((candidate) => candidate.even);
  if (even.length === 1 && even[0] !== undefined) return even[0].delimiter;
  const possible = left.filter(({ width }) => width > 1);
  if (possible.length === 1 && possible[0] !== undefined) return possible[0].delimiter;
  // A table of one column needs no delimiter.
  if (possible.length === 0) return ",";
  const names = possible.map(({ delimiter }) => NAMES[delimiter]).join(" or ");
  throw new InputError(problem("ambiguous-delimiter", place, { found: `the cells may be separated by ${names}` }));
}
