import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import type { SourceAccount } from "../records/edition.ts";
import type { InputFile } from "../records/generated/edition.ts";
import { CARD_END } from "./card-file.ts";

const PROGRAM = fileURLToPath(new URL("../../", import.meta.url));
const PROGRAM_TABLES = "datasets/properties";
const OWN = ["collection.json", "substances.csv", "solid_forms.csv", "rulings.csv"];

function hashed(of: InputFile["of"], root: string, path: string): InputFile[] {
  const file = join(root, path);
  if (!existsSync(file) || !statSync(file).isFile()) return [];
  return [{ of, path, sha256: createHash("sha256").update(readFileSync(file)).digest("hex") }];
}

/**
 * SHA-256 of everything a collection is read from but its tables of measurements: its card, own tables, rulings, source
 * cards, and the program's own property tables; sorted by owner and path.
 */
export function hashSmallInputs(dir: string): InputFile[] {
  const sources = join(dir, "sources");
  const names = existsSync(sources) && statSync(sources).isDirectory() ? readdirSync(sources) : [];
  const cards = names.filter((name) => name.endsWith(CARD_END)).map((name) => `sources/${name}`);
  const tables = readdirSync(join(PROGRAM, PROGRAM_TABLES)).filter((name) => name.endsWith(".csv"));
  return [
    ...[...OWN, ...cards].sort().flatMap((path) => hashed("collection", dir, path)),
    ...tables.sort().flatMap((name) => hashed("program", PROGRAM, `${PROGRAM_TABLES}/${name}`)),
  ];
}

/**
 * Every file an edition is made from, with the SHA-256 of what was read.
 * @param before {@link hashSmallInputs} taken before the collection was read
 * @throws InputError `collection-changed` where a file is not what it was then
 */
export function inputFiles(dir: string, before: readonly InputFile[], sources: readonly SourceAccount[]): InputFile[] {
  const after = hashSmallInputs(dir);
  const key = ({ of, path, sha256 }: InputFile) => `${of} ${path} ${sha256}`;
  const known = new Set(before.map(key));
  const changed = [...after.filter((file) => !known.has(key(file))), ...missing(before, after)][0];
  if (changed !== undefined) {
    const found = `${changed.path} changed while the collection was read`;
    throw new InputError(problem("collection-changed", { file: changed.path }, { found }));
  }
  const listed = new Set(after.map(({ path }) => path));
  const tables = sources
    .filter(({ file }) => !listed.has(file))
    .flatMap(({ file, sha256 }) => (sha256 === "" ? hashed("collection", dir, file) : tableOf(file, sha256)));
  const order = ({ of, path }: InputFile) => `${of} ${path}`;
  return [...after, ...tables].sort((a, b) => (order(a) < order(b) ? -1 : 1));
}

const tableOf = (path: string, sha256: string): InputFile[] => [{ of: "collection", path, sha256 }];

function missing(before: readonly InputFile[], after: readonly InputFile[]): InputFile[] {
  const now = new Set(after.map(({ of, path }) => `${of} ${path}`));
  return before.filter(({ of, path }) => !now.has(`${of} ${path}`));
}
