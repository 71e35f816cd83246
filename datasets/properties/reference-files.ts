import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";

/** Folder of the reference files: beside the project, not part of it. */
export const referenceFolder = fileURLToPath(new URL("../../../shared/reference/properties/", import.meta.url));

/** True where the reference files can be read on this machine. */
export const haveReferenceFiles = existsSync(referenceFolder);

/** One row of a reference file; an absent column reads as an empty cell. */
export type ReferenceRow = (column: string) => string;

/** Rows of a CSV file of the reference folder. */
export function readReferenceFile(name: string): ReferenceRow[] {
  const rows: Record<string, string>[] = parse(readFileSync(referenceFolder + name), { columns: true, bom: true });
  return rows.map((row) => (column) => (row[column] ?? "").trim());
}
