import { type Edition, flagId, measurementId } from "../../records/edition.ts";
import type { Cell } from "../csv.ts";

/** Rows of `flags.csv`, in the order of the edition's flags. */
export function* flagRows(edition: Edition): Generator<Cell[]> {
  for (const [i, flag] of edition.flags.entries()) {
    const ruling = edition.rulings.ofFlag.get(i);
    const source = flag.row === undefined ? flag.source : edition.table.source[flag.row];
    yield [
      flagId(edition, flag),
      flag.scope,
      flag.row === undefined ? "" : measurementId(edition, flag.row),
      source === undefined ? "" : edition.sources[source]?.name,
      flag.row === undefined ? "" : edition.table.line[flag.row],
      flag.system === undefined ? "" : edition.systems[flag.system]?.id,
      flag.code,
      flag.severity,
      flag.suspectedCause,
      flag.causeDetail,
      flag.causeProbability,
      flag.proposedValue,
      flag.evidence,
      flag.lookAt,
      ruling && `${ruling.id} ${ruling.action}`,
    ];
  }
}

/** Rows of `refused.csv`: one per refused reading, one per source refused as a whole. */
export function* refusedRows(edition: Edition): Generator<Cell[]> {
  for (const { code, place, found, expected, mend, raw } of edition.refused) {
    yield [place.source, place.line, place.column, code, found, expected, mend, raw];
  }
}
