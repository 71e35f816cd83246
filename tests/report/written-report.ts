import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { curate } from "../../pipeline/curate.ts";
import { openOutputFolder } from "../../pipeline/publish/output-folder.ts";
import { writeWorkingTables } from "../../pipeline/publish/working-tables.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import type { Edition } from "../../pipeline/records/edition.ts";

/** Tables and report of a collection, written to a folder of its own. */
export interface WrittenReport {
  /** Folder of the tables; the report is `report/` in it. */
  readonly folder: string;
  readonly edition: Edition;
  readonly remove: () => void;
}

/** Curates a collection and writes its tables and report. */
export async function writeReport(collection: string): Promise<WrittenReport> {
  const { edition } = await curate(await readCollection(collection), "test");
  const parent = mkdtempSync(join(tmpdir(), "saltern-report-"));
  const folder = join(parent, "out");
  const output = openOutputFolder(folder, collection);
  writeWorkingTables(edition, output, true);
  output.commit();
  return { folder, edition, remove: () => rmSync(parent, { recursive: true, force: true }) };
}
