import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { onTestFinished } from "vitest";
import { readSingleSource } from "../../pipeline/read/source.ts";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import type { RefusedSource, SourceTable } from "../../pipeline/records/readings.ts";

/** Files by path; text is written as UTF-8, bytes as they are. */
export type Files = Readonly<Record<string, string | Uint8Array>>;

/** A folder with these files that is removed when the test ends. */
export function temporaryFolder(files: Files): string {
  const folder = mkdtempSync(join(tmpdir(), "saltern-test-"));
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }));
  for (const [name, content] of Object.entries(files)) {
    mkdirSync(dirname(join(folder, name)), { recursive: true });
    writeFileSync(join(folder, name), content);
  }
  return folder;
}

/** A card for a table with the headings Compound, Solvent, T and S. */
export const CARD: SourceCard = {
  format: 1,
  source: "bench",
  file: "bench.csv",
  columns: {
    solute: { column: "Compound" },
    solvent: { column: "Solvent" },
    temperature: { column: "T", unit: "°C" },
    solubility: { column: "S", unit: "g/100 g solvent" },
  },
};

export const HEADER = "Compound,Solvent,T,S\n";

/** A collection folder with one source, `bench`, whose card is {@link CARD} with some changes. */
export function collectionWith(table: string | Uint8Array, card: object = {}, more: Files = {}): string {
  return temporaryFolder({
    "collection.json": JSON.stringify({ format: 1, name: "test" }),
    "sources/bench.source.json": JSON.stringify({ ...CARD, ...card }, null, 2),
    "sources/bench.csv": table,
    ...more,
  });
}

/** Reads a table with {@link CARD}, some of it changed. */
async function read(table: string | Uint8Array, card: Partial<SourceCard>, name: string) {
  const folder = temporaryFolder({ [name]: table });
  return readSingleSource(join(folder, name), { ...CARD, ...card });
}

/** The source that comes out of a table. @throws where the table is refused as a whole */
export async function readAccepted(
  table: string | Uint8Array,
  card: Partial<SourceCard> = {},
  name = "bench.csv",
): Promise<SourceTable> {
  const result = await read(table, card, name);
  if (!result.ok) throw new Error(`refused: ${result.refused.problem.code}: ${result.refused.problem.found}`);
  const { source } = result;
  if (source.readingsFound !== source.readings.length + source.refused.length) throw new Error("a reading was lost");
  return source;
}

/** The refusal of a table that cannot be read. @throws where it is read after all */
export async function readRefused(
  table: string | Uint8Array,
  card: Partial<SourceCard> = {},
  name = "bench.csv",
): Promise<RefusedSource> {
  const result = await read(table, card, name);
  if (result.ok) throw new Error(`read, with ${result.source.readings.length} readings`);
  return result.refused;
}
