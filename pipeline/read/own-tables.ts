import { createHash } from "node:crypto";
import { existsSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { type Place, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { PROPERTY_VALUES_COLUMNS } from "../records/generated/property-values.ts";
import { RULINGS_COLUMNS } from "../records/generated/rulings.ts";
import { SOLID_FORMS_COLUMNS } from "../records/generated/solid-forms.ts";
import { SUBSTANCES_COLUMNS } from "../records/generated/substances.ts";
import type { TableRow } from "../records/readings.ts";
import { cutIntoRecords } from "./csv-records.ts";
import { findDelimiter } from "./delimiter.ts";
import { asUtf8 } from "./encoding.ts";
import { didYouMean } from "./near-miss.ts";
import { fileInside } from "./path-inside.ts";
import { orClose, peek } from "./physical-lines.ts";
import { tableBytes } from "./table-bytes.ts";

/** Columns of a table that stands beside the sources; those not needed may be left out. */
interface TableKind {
  readonly columns: readonly string[];
  readonly needed: readonly string[];
}

/** The tables that stand beside the sources, by file name. */
const KINDS = {
  "substances.csv": { columns: SUBSTANCES_COLUMNS, needed: ["name", "role"] },
  "solid_forms.csv": { columns: SOLID_FORMS_COLUMNS, needed: ["solute", "form", "kind"] },
  "property-values.csv": { columns: PROPERTY_VALUES_COLUMNS, needed: ["name", "property", "value", "unit"] },
  "rulings.csv": {
    columns: RULINGS_COLUMNS,
    needed: ["ruling_id", "target", "action", "reason", "by", "date", "fingerprint"],
  },
} as const satisfies Record<string, TableKind>;

/** Tables of substances and their properties, as rows of text. */
export interface PropertyTables {
  /** Whose tables they are, for messages. */
  readonly origin: string;
  readonly substances: readonly TableRow[];
  readonly solidForms: readonly TableRow[];
  readonly propertyValues: readonly TableRow[];
}

/** Folder of the program's own tables; the same depth below the project for the source and the compiled program. */
const PROPERTIES = fileURLToPath(new URL("../../datasets/properties/", import.meta.url));

let ownTables: Promise<PropertyTables> | undefined;

/**
 * The program's own tables of substances, solid forms and property values; read once, for they are part of the program.
 * @throws InputError where one is damaged
 */
export function readProgramTables(): Promise<PropertyTables> {
  ownTables ??= readPropertyTables(PROPERTIES);
  return ownTables;
}

async function readPropertyTables(folder: string): Promise<PropertyTables> {
  return {
    origin: "datasets/properties",
    substances: await readOwnTable(folder, "substances.csv", "datasets/properties/"),
    solidForms: await readOwnTable(folder, "solid_forms.csv", "datasets/properties/"),
    propertyValues: await readOwnTable(folder, "property-values.csv", "datasets/properties/"),
  };
}

/** The collection's own substances and solid forms, where it has any. @throws InputError where one cannot be followed */
export async function readCollectionTables(root: string): Promise<PropertyTables> {
  return {
    origin: "collection",
    substances: await readOwnTable(root, "substances.csv"),
    solidForms: await readOwnTable(root, "solid_forms.csv"),
    propertyValues: [],
  };
}

/**
 * A table that stands beside the sources, [] where the collection has none. Columns may stand in any order.
 * @param shown what goes before the file's name in messages
 * @throws InputError where anything in it cannot be followed: half a table of substances would mislead in silence
 */
export async function readOwnTable(root: string, name: keyof typeof KINDS, shown = ""): Promise<TableRow[]> {
  const place: Place = { file: `${shown}${name}` };
  if (!existsSync(join(root, name))) return [];
  const path = fileInside(root, root, name, place);
  return readRows(path, place, KINDS[name]);
}

async function readRows(path: string, place: Place, kind: TableKind): Promise<TableRow[]> {
  const { columns } = kind;
  const text = asUtf8(tableBytes(path, createHash("sha256"), place), "auto", place);
  const { head, pieces } = await peek(text, 1 << 16);
  const delimiter = await orClose(text, () => findDelimiter(head, columns, place));
  const rows: TableRow[] = [];
  let headings: readonly string[] | undefined;
  let positions: readonly number[] = [];
  await cutIntoRecords(pieces, { delimiter, firstLine: 1, place }, (cells, line) => {
    if (cells.every((cell) => cell === "")) return;
    if (headings === undefined) {
      const checked = checkedHeadings(cells, kind, { ...place, line });
      headings = checked;
      positions = columns.map((column) => checked.indexOf(column));
      return;
    }
    checkWidth(cells, headings, { ...place, line });
    const values = Object.fromEntries(columns.map((column, i) => [column, cells[positions[i] ?? -1] ?? ""]));
    rows.push({ file: place.file, line, values });
  });
  return rows;
}

function checkedHeadings(headings: readonly string[], { needed, columns }: TableKind, place: Place): readonly string[] {
  const wrong = (column: string, found: string) =>
    new InputError(
      problem("wrong-table", { ...place, column }, { found, expected: `the columns ${columns.join(", ")}` }),
    );
  const missing = needed.find((column) => !headings.includes(column));
  if (missing !== undefined) {
    throw wrong(missing, `the table has no column "${missing}"${didYouMean(missing, headings)}`);
  }
  for (const [i, heading] of headings.entries()) {
    if (heading !== "" && !columns.includes(heading)) {
      throw wrong(heading, `"${heading}" is not a column of this table${didYouMean(heading, columns)}`);
    }
    if (heading !== "" && headings.indexOf(heading) !== i)
      throw wrong(heading, `the column "${heading}" is there twice`);
  }
  return headings;
}

/** Empty cells beyond the last heading are let pass; other differences leave open which value stands where. */
function checkWidth(cells: readonly string[], headings: readonly string[], place: Place): void {
  const surplus = cells.slice(headings.length).some((cell) => cell !== "");
  if (cells.length >= headings.length && !surplus) return;
  const found = `the row has ${cells.length} cells, the header ${headings.length}`;
  throw new InputError(problem("wrong-table", place, { found, expected: `${headings.length} cells` }));
}
