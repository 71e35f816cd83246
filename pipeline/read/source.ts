import { dirname } from "node:path";
import type { Place } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import type { SourceCard } from "../records/generated/source-card.ts";
import type { RefusedSource, SourceTable } from "../records/readings.ts";
import { cardName, readCard } from "./card-file.ts";
import { fileInside, shownPath } from "./path-inside.ts";
import { readTable } from "./source-table.ts";

/** A source that was read, or one that could not be. */
export type SourceRead =
  | { readonly ok: true; readonly source: SourceTable }
  | { readonly ok: false; readonly refused: RefusedSource };

/** Ends of the names of everything that looks like a table. */
export const TABLE_END = /\.(csv|tsv|txt|xlsx|xls|ods|jsonl)(\.gz)?$/i;

/**
 * Reads the table of one card of a collection; free-standing, so that sources can be read side by side.
 * @param root folder of the collection
 * @param cardPath file of the card; the table's path is relative to its folder
 */
export async function readSource(root: string, card: SourceCard, cardPath: string): Promise<SourceRead> {
  const named: Place = { source: card.source, file: shownPath(root, cardPath), column: "file" };
  return attempt(
    card.source,
    () => card,
    shownPath(root, cardPath),
    async () => {
      const path = fileInside(root, dirname(cardPath), card.file, named);
      return readTable({ path, shown: shownPath(root, path), name: card.source }, card);
    },
  );
}

/**
 * Reads one table outside a collection with a card of its own or that of a known source.
 * @param card path of a card, or a card; its `file` is not followed
 * @param name name of the source in identifiers; that of the card where left out
 */
export async function readSingleSource(path: string, card: string | SourceCard, name?: string): Promise<SourceRead> {
  const standIn = typeof card === "string" ? cardName(card) : card.source;
  let known: SourceCard | undefined;
  return attempt(
    name ?? standIn,
    () => known,
    path,
    async () => {
      known = typeof card === "string" ? readCard(card, card) : card;
      return readTable({ path, shown: path, name: name ?? known.source }, known);
    },
  );
}

/** Runs a reader and turns what it cannot read into a refused source. */
async function attempt(
  name: string,
  card: () => SourceCard | undefined,
  shown: string,
  read: () => Promise<SourceTable>,
): Promise<SourceRead> {
  try {
    return { ok: true, source: await read() };
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    const known = card();
    const { problem: found } = error;
    return {
      ok: false,
      refused: {
        name,
        ...(known === undefined ? {} : { card: known }),
        file: found.place.file || shown,
        problem: found,
      },
    };
  }
}
