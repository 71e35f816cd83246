import { existsSync, lstatSync, readdirSync, statSync } from "node:fs";
import { join } from "node:path";
import { type Place, type Problem, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import type { CollectionCard } from "../records/generated/collection.ts";
import type { SourceCard } from "../records/generated/source-card.ts";
import type { RefusedSource, SourceTable, TableRow } from "../records/readings.ts";
import { validateCollectionCard } from "../records/validators.js";
import { CARD_END, cardName, readCard } from "./card-file.ts";
import { readJsonFile } from "./json-file.ts";
import { type PropertyTables, readCollectionTables, readProgramTables } from "./own-tables.ts";
import { fileInside } from "./path-inside.ts";
import { readRulings } from "./rulings-file.ts";
import { schemaProblem } from "./schema-faults.ts";
import { readSource, TABLE_END } from "./source.ts";

/** Everything a collection holds, as it was read. */
export interface Collection {
  /** Folder, as given. */
  readonly dir: string;
  /** collection.json. */
  readonly card: CollectionCard;
  /** Sources in the order of their names (code units). */
  readonly sources: readonly SourceTable[];
  readonly refusedSources: readonly RefusedSource[];
  /** The program's own tables of substances, solid forms and property values. */
  readonly program: PropertyTables;
  /** The collection's own substances and solid forms. */
  readonly own: PropertyTables;
  readonly rulings: readonly TableRow[];
  /** Notices on the collection as a whole; those on a source stand with it. */
  readonly notices: readonly Problem[];
}

/** A card that could be read, with its file. */
interface ReadCard {
  readonly path: string;
  readonly card: SourceCard;
}

const byName = (a: { readonly name: string }, b: { readonly name: string }) =>
  a.name < b.name ? -1 : a.name > b.name ? 1 : 0;

/** Settings and title of a collection. @throws InputError `missing-file`, `not-json` or `wrong-collection` */
export function readCollectionCard(dir: string): CollectionCard {
  const place: Place = { file: "collection.json" };
  if (!existsSync(join(dir, "collection.json"))) {
    const found = existsSync(dir) ? `${dir} has no collection.json` : `there is no folder ${dir}`;
    const details = {
      found,
      expected: "the folder of a collection",
      mend: "name the folder, or start one with saltern new",
    };
    throw new InputError(problem("missing-file", place, details));
  }
  const file = readJsonFile(fileInside(dir, dir, "collection.json", place), place);
  if (validateCollectionCard(file.value)) return file.value;
  const errors = validateCollectionCard.errors ?? [];
  throw new InputError(schemaProblem("wrong-collection", file, "collection.schema.json", errors, place));
}

/**
 * Reads a collection: collection.json, every sources/*.source.json with its table (no sub-folders), the optional
 * substances.csv, solid_forms.csv and rulings.csv, and the program's own tables.
 *
 * A source that cannot be read stops alone and is listed in `refusedSources`.
 * @throws InputError where collection.json or one of the other tables is wrong
 */
export async function readCollection(dir: string): Promise<Collection> {
  const card = readCollectionCard(dir);
  const names = sourceNames(dir);
  const { cards, refused } = readCards(dir, names);
  const sources: SourceTable[] = [];
  for (const { path, card } of cards) {
    const read = await readSource(dir, card, path);
    if (read.ok) sources.push(read.source);
    else refused.push(read.refused);
  }
  const rulings = await readRulings(dir);
  return {
    ...{ dir, card, sources: sources.sort(byName), refusedSources: uniquelyNamed(refused, sources).sort(byName) },
    program: await readProgramTables(),
    own: await readCollectionTables(dir),
    rulings: rulings.rows,
    notices: [...folderNotices(dir, names, cards), ...rulings.notices],
  };
}

/** Refused sources with names of their own: one that bears the name of a source that was read goes by its file. */
function uniquelyNamed(refused: readonly RefusedSource[], sources: readonly SourceTable[]): RefusedSource[] {
  const taken = new Set(sources.map(({ name }) => name));
  return refused.map((source) => {
    const name = taken.has(source.name) ? source.file : source.name;
    taken.add(name);
    return { ...source, name };
  });
}

/** Card of one source of a collection by its name. @throws InputError `unknown-source` or what its card has */
export function readCardNamed(dir: string, source: string): SourceCard {
  const { cards, refused } = readCards(dir, sourceNames(dir));
  const found = cards.find(({ card }) => card.source === source);
  if (found !== undefined) return found.card;
  const wrong = refused.find(({ name }) => name === source);
  if (wrong !== undefined) throw new InputError(wrong.problem);
  const known = cards.map(({ card }) => card.source).sort();
  const details = { found: `there is no source "${source}"`, expected: `one of ${known.join(", ")}` };
  throw new InputError(problem("unknown-source", { file: "sources" }, details));
}

/** Names of everything in sources/, in code-unit order; [] where the folder is missing. */
function sourceNames(dir: string): string[] {
  const folder = join(dir, "sources");
  return existsSync(folder) && statSync(folder).isDirectory() ? readdirSync(folder).sort() : [];
}

/** Reads all cards; of those with one source name only the one whose file has that name too, or the first, is kept. */
function readCards(dir: string, names: readonly string[]): { cards: ReadCard[]; refused: RefusedSource[] } {
  const read: ReadCard[] = [];
  const refused: RefusedSource[] = [];
  for (const name of names.filter((name) => name.endsWith(CARD_END))) {
    const shown = `sources/${name}`;
    try {
      const path = fileInside(dir, join(dir, "sources"), name, { source: cardName(name), file: shown });
      read.push({ path, card: readCard(path, shown) });
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      refused.push({ name: cardName(name), file: shown, problem: error.problem });
    }
  }
  const cards: ReadCard[] = [];
  for (const { path, card } of read) {
    const same = read.filter((other) => other.card.source === card.source);
    const owner = same.find((other) => cardName(other.path) === card.source) ?? same[0];
    if (owner?.path === path) cards.push({ path, card });
    else refused.push(duplicate(path, card, owner?.path ?? ""));
  }
  return { cards, refused };
}

function duplicate(path: string, card: SourceCard, owner: string): RefusedSource {
  const [name, file] = [cardName(path), `sources/${cardName(path)}${CARD_END}`];
  const found = `"${card.source}" is also the name of the source of sources/${cardName(owner)}${CARD_END}`;
  return {
    name,
    card,
    file,
    problem: problem("duplicate-source", { source: name, file, column: "source" }, { found }),
  };
}

/** Notices on what stands in sources/ and was not read. */
function folderNotices(dir: string, names: readonly string[], cards: readonly ReadCard[]): Problem[] {
  const told: Problem[] = [];
  if (!names.some((name) => name.endsWith(CARD_END))) {
    told.push(problem("no-sources", { file: "sources" }, { found: "there is no card in sources/" }));
  }
  const tables = new Set(cards.map(({ card }) => card.file.replace(/^\.\//, "")));
  for (const name of names) {
    const file = `sources/${name}`;
    // Links are not followed: they may lead nowhere or in a circle.
    if (lstatSync(join(dir, "sources", name)).isDirectory()) {
      told.push(problem("subfolder-not-read", { file }, { found: `the folder "${name}"` }));
    } else if (TABLE_END.test(name) && !tables.has(name) && !names.includes(name.replace(TABLE_END, CARD_END))) {
      told.push(problem("table-without-card", { file }, { found: `no card names "${name}"` }));
    }
  }
  return told;
}
