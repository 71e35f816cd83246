import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { curate } from "../../pipeline/curate.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import { type Edition, flagId } from "../../pipeline/records/edition.ts";
import { RULINGS_COLUMNS } from "../../pipeline/records/generated/rulings.ts";
import { createTargets } from "../../pipeline/rule/targets.ts";
import { CARD, type Files } from "../read/temporary-collection.ts";

/** Invented solubilities near those of a van 't Hoff line, g/100 g solvent, at 10, 20, 30, 40, 50 and 60 °C. */
const CELSIUS = [10, 20, 30, 40, 50, 60];
const LEVEL = [8.2, 11.2, 15.1, 20.0, 26.0, 33.4];

/** Lines of a table: each value times a factor, with a little scatter so that no two lines are alike. */
export function series(factor: number, changes: Readonly<Record<number, string>> = {}): string[] {
  return CELSIUS.map((t, i) => {
    const value = (LEVEL[i] as number) * factor * (1 + 0.004 * (((i * 7) % 5) - 2));
    return `salicylic acid,ethanol,${t},${changes[i] ?? value.toFixed(3)}`;
  });
}

const card = (source: string) => JSON.stringify({ ...CARD, source, file: `${source}.csv`, laboratory: source });
const HEADER = "Compound,Solvent,T,S";

/** Files of a collection with the sources alpha, beta and gamma; a fault ten times too large in line 4 of alpha. */
export function threeSources(changes: Files = {}): Files {
  const table = (lines: readonly string[]) => `${[HEADER, ...lines].join("\n")}\n`;
  return {
    "collection.json": JSON.stringify({ format: 1, name: "test" }),
    "sources/alpha.source.json": card("alpha"),
    "sources/alpha.csv": table(series(1, { 2: "151.3" })),
    "sources/beta.source.json": card("beta"),
    "sources/beta.csv": table(series(1.01)),
    "sources/gamma.source.json": card("gamma"),
    "sources/gamma.csv": table(series(0.99)),
    ...changes,
  };
}

/** rulings.csv with these lines; cells by column, the rest filled in where they are needed. */
export function rulingsFile(rulings: readonly Readonly<Record<string, string>>[]): string {
  const lines = rulings.map((ruling, i) => {
    const cells: Record<string, string> = {
      ...{ ruling_id: `R${String(i + 1).padStart(4, "0")}`, reason: "looked at", by: "data steward" },
      ...{ date: "2026-04-01", ...ruling },
    };
    return RULINGS_COLUMNS.map((column) => cells[column] ?? "").join(",");
  });
  return `${[RULINGS_COLUMNS.join(","), ...lines].join("\n")}\n`;
}

const known = new Map<string, ReturnType<typeof curateFiles>>();

/** A collection made of these files, read and curated; equal files are curated once. */
function curated(files: Files): ReturnType<typeof curateFiles> {
  const key = JSON.stringify(files);
  const result = known.get(key) ?? curateFiles(files);
  known.set(key, result);
  return result;
}

async function curateFiles(files: Files) {
  const folder = mkdtempSync(join(tmpdir(), "saltern-rule-"));
  try {
    for (const [name, content] of Object.entries(files)) {
      mkdirSync(dirname(join(folder, name)), { recursive: true });
      writeFileSync(join(folder, name), content);
    }
    const collection = await readCollection(folder);
    return { collection, edition: (await curate(collection, "test")).edition };
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** The edition of a collection made of these files. */
export async function editionOf(files: Files): Promise<Edition> {
  return (await curated(files)).edition;
}

/** Fingerprint of a target in a collection made of these files. @throws where there is no such target */
export async function fingerprintIn(files: Files, target: string): Promise<string> {
  const { collection, edition } = await curated(files);
  const targets = createTargets(edition, collection.sources);
  const found = targets.find(target);
  if (found === undefined)
    throw new Error(`no target ${target} among ${edition.systems.map(({ id }) => id).join(", ")}`);
  return targets.fingerprint(found.rows);
}

/** Row of a measurement by `SOURCE:LINE`. */
export function rowNamed(edition: Edition, id: string): number {
  const [name, line] = id.split(":");
  for (let row = 0; row < edition.table.count; row++) {
    const source = edition.sources[edition.table.source[row] as number]?.name;
    if (source === name && edition.table.line[row] === Number(line)) return row;
  }
  throw new Error(`no measurement ${id}`);
}

/** Ids of the flags of an edition. */
export const flagIds = (edition: Edition) => edition.flags.map((flag) => flagId(edition, flag));
