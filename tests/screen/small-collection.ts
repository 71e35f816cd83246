import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { curate } from "../../pipeline/curate.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import { type Edition, flagId, statusOf } from "../../pipeline/records/edition.ts";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";

/** A source of a small collection: its table, and what its card says beyond the headings. */
export interface SmallSource {
  /** Lines below the heading `solute,solvent,T,S`, and the headings of further columns where there are any. */
  readonly rows: readonly (readonly (string | number)[])[];
  readonly headings?: readonly string[];
  readonly columns?: Partial<SourceCard["columns"]>;
  readonly card?: Partial<SourceCard>;
  readonly unit?: string;
}

/** Further tables of a collection by name, such as `substances.csv`. */
export type MoreFiles = Readonly<Record<string, string>>;

/** Curates a collection of these sources, by name, as a merge would; the files are gone afterwards. */
export async function curated(sources: Readonly<Record<string, SmallSource>>, more: MoreFiles = {}): Promise<Edition> {
  const folder = mkdtempSync(join(tmpdir(), "saltern-small-"));
  try {
    writeCollection(folder, sources, more);
    return (await curate(await readCollection(folder), "0.0.0")).edition;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Writes the files of a small collection. */
export function writeCollection(
  folder: string,
  sources: Readonly<Record<string, SmallSource>>,
  more: MoreFiles = {},
): string {
  mkdirSync(join(folder, "sources"), { recursive: true });
  writeFileSync(join(folder, "collection.json"), '{ "format": 1, "name": "small" }');
  for (const [name, text] of Object.entries(more)) writeFileSync(join(folder, name), text);
  for (const [name, { rows, headings = [], columns, card, unit = "g/100 g solvent" }] of Object.entries(sources)) {
    const lines = [["solute", "solvent", "T", "S", ...headings], ...rows];
    writeFileSync(join(folder, "sources", `${name}.csv`), `${lines.map((line) => line.join(",")).join("\n")}\n`);
    const written: SourceCard = {
      ...{ format: 1, source: name, file: `${name}.csv` },
      columns: {
        ...{ solute: { column: "solute" }, solvent: { column: "solvent" } },
        ...{ temperature: { column: "T", unit: "°C" }, solubility: { column: "S", unit } },
        ...columns,
      },
      ...card,
    };
    writeFileSync(join(folder, "sources", `${name}.source.json`), JSON.stringify(written));
  }
  return folder;
}

/** Flags as `CODE@TARGET`, with severity, cause and all else. */
export function flagsOf(edition: Edition) {
  return edition.flags.map((flag) => ({ ...flag, id: flagId(edition, flag) }));
}

/** Flags on a line of a source, its own or those of its block. */
export function flagsAt(edition: Edition, source: string, line: number) {
  const { table, sources, systems } = edition;
  return flagsOf(edition).filter((flag) => {
    if (flag.row !== undefined)
      return sources[table.source[flag.row]!]?.name === source && table.line[flag.row] === line;
    if (flag.source !== undefined && sources[flag.source]?.name !== source) return false;
    if (flag.system === undefined) return true;
    const at = systems[flag.system]!.rows.find((row) => table.line[row] === line);
    return at !== undefined && sources[table.source[at]!]?.name === source;
  });
}

/** Status of a line of a source, as measurements.csv tells it. */
export function statusAt(edition: Edition, source: string, line: number) {
  const { table, sources } = edition;
  for (let row = 0; row < table.count; row++)
    if (sources[table.source[row]!]?.name === source && table.line[row] === line) return statusOf(edition, row);
  return undefined;
}

/** Values of one solute in one solvent as rows of a table. */
export function rowsOf(
  solute: string,
  solvent: string,
  values: readonly (readonly [celsius: number, value: number])[],
) {
  return values.map(([T, S]) => [solute, solvent, T, S]);
}
