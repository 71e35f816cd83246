/** Rows of a table to be written: column to cell; absent cells are empty. */
export type Row = Readonly<Record<string, string | number | undefined>>;

/** A table as RFC 4180 text with LF line ends and shortest round-trip numbers. */
export function tableText(columns: readonly string[], rows: readonly Row[]): string {
  const lines = rows.map((row) => columns.map((column) => cellText(row[column])).join(","));
  return `${[columns.join(","), ...lines].join("\n")}\n`;
}

function cellText(cell: string | number | undefined): string {
  const text = cell === undefined ? "" : String(cell);
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** A number without the digits that binary arithmetic adds beyond `digits` significant ones. */
export const significant = (value: number, digits: number): number => Number(value.toPrecision(digits));
