import type { SourceAccount } from "../records/edition.ts";
import type { Collection } from "./collection.ts";

/** A source before its readings were identified and normalised: `accepted` and `refused` are still open. */
export type OpenAccount = Omit<SourceAccount, "accepted" | "refused">;

/** Accounts of all sources of a collection, those refused as a whole included, sorted by name. */
export function openAccounts({ sources, refusedSources }: Collection): OpenAccount[] {
  const read = sources.map(
    (source): OpenAccount => ({
      name: source.name,
      card: source.card,
      file: source.file,
      sha256: source.sha256,
      readings: source.readingsFound,
      missing: source.missingCells,
      columnsNotUsed: source.columnsNotUsed,
      refusedWhole: false,
    }),
  );
  const refused = refusedSources.map(
    ({ name, card, file }): OpenAccount => ({
      name,
      ...(card === undefined ? {} : { card }),
      file,
      sha256: "",
      readings: 1,
      missing: 0,
      columnsNotUsed: [],
      refusedWhole: true,
    }),
  );
  return [...read, ...refused].sort((a, b) => (a.name < b.name ? -1 : a.name > b.name ? 1 : 0));
}
