/** One row of a table as read: column name to cell, empty for unknown. */
export type TableRow = Readonly<Record<string, string>>;

/** The tables a set of substances comes from. `origin` names them in faults. */
export interface PropertyTables {
  readonly origin: string;
  readonly substances: readonly TableRow[];
  readonly solidForms: readonly TableRow[];
  readonly propertyValues: readonly TableRow[];
}

export type TableName = "substances" | "solid_forms" | "property-values";

export type TableFaultKind =
  | "no name"
  | "not a number"
  | "not allowed"
  | "formula"
  | "molar mass contradicts formula"
  | "registry number"
  | "inchikey"
  | "duplicate name"
  | "duplicate identifier"
  | "unknown substance"
  | "incomplete correlation";

/** Something wrong or contradictory in a table: where it stands and what it says. The value concerned is left out. */
export interface TableFault {
  readonly origin: string;
  readonly table: TableName;
  /** 0-based index of the row in its table. */
  readonly row: number;
  readonly column: string;
  readonly name: string;
  readonly kind: TableFaultKind;
  readonly message: string;
}

/** A row with its place. */
export interface PlacedRow {
  readonly origin: string;
  readonly table: TableName;
  readonly row: number;
  readonly cells: TableRow;
}

export type Report = (fault: TableFault) => void;

/** Text of a cell without outer blanks; undefined if empty. */
export function textCell({ cells }: PlacedRow, column: string): string | undefined {
  const text = (cells[column] ?? "").trim();
  return text === "" ? undefined : text;
}

/** Entries of a `;` list. */
export function listCell(row: PlacedRow, column: string): string[] {
  return (textCell(row, column) ?? "")
    .split(";")
    .map((entry) => entry.trim())
    .filter((entry) => entry !== "");
}

/** A number in a cell, in plain or exponent digits; undefined if empty, or reported and undefined if not a number. */
export function numberCell(row: PlacedRow, column: string, report: Report): number | undefined {
  const text = textCell(row, column);
  if (text === undefined) return undefined;
  if (isNumberText(text)) return Number(text);
  report(faultAt(row, column, "not a number", `"${text}" is not a number`));
  return undefined;
}

/** True for a finite number in plain or exponent digits, and nothing else. */
export function isNumberText(text: string): boolean {
  return /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/.test(text) && Number.isFinite(Number(text));
}

/** A number that must be above zero. */
export function positiveCell(row: PlacedRow, column: string, report: Report): number | undefined {
  const number = numberCell(row, column, report);
  if (number === undefined || number > 0) return number;
  report(faultAt(row, column, "not allowed", `${number} is not above 0`));
  return undefined;
}

/** Builds a fault of one cell. */
export function faultAt(row: PlacedRow, column: string, kind: TableFaultKind, message: string): TableFault {
  const name = (row.cells.name ?? row.cells.solute ?? "").trim();
  return { origin: row.origin, table: row.table, row: row.row, column, name, kind, message };
}
