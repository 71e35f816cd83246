import { readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import { substanceIndex } from "../../pipeline/properties/substance-index.ts";
import type { Substance } from "../../pipeline/properties/substances.ts";
import type { PropertyTables, TableRow } from "../../pipeline/properties/table-cells.ts";

const folder = new URL("../../datasets/properties/", import.meta.url);

/** Text of one of the program's own property tables. */
export function tableFile(name: string): string {
  return readFileSync(new URL(name, folder), "utf8");
}

const rows = (name: string): TableRow[] => parse(tableFile(name), { columns: true });

/** The program's own property tables. */
export const programTables: PropertyTables = {
  origin: "datasets/properties",
  substances: rows("substances.csv"),
  solidForms: rows("solid_forms.csv"),
  propertyValues: rows("property-values.csv"),
};

/** Index of the program's own tables. */
export const programIndex = substanceIndex([programTables]);

/** A substance of the program's own tables. @throws Error if there is none of that name. */
export function substance(name: string): Substance {
  const found = programIndex.byName(name);
  if (found === undefined) throw new Error(`${name} is not in the tables`);
  return found;
}
