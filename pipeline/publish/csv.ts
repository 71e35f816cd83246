/** A cell of an output table. Numbers are written in their shortest form; NaN and undefined as an empty cell. */
export type Cell = string | number | undefined;

const NEEDS_QUOTES = /[",\r\n]/;

/** One cell as RFC 4180 text: shortest round-trip number, `-0` as `0`, quotes only where needed. */
export function csvCell(cell: Cell): string {
  if (typeof cell === "number") return Number.isNaN(cell) ? "" : cell === 0 ? "0" : String(cell);
  if (cell === undefined) return "";
  return NEEDS_QUOTES.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;
}

/** One record with its line feed. */
export function csvRecord(cells: readonly Cell[]): string {
  let line = csvCell(cells[0]);
  for (let i = 1; i < cells.length; i++) line += `,${csvCell(cells[i])}`;
  return `${line}\n`;
}

/** Header and records of a table, record by record, so that a large table never stands in memory as text. */
export function* csvTable(columns: readonly string[], rows: Iterable<readonly Cell[]>): Generator<string> {
  yield csvRecord(columns);
  for (const row of rows) yield csvRecord(row);
}
