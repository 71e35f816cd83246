import type { Problem } from "../../problems/catalogue.ts";
import { curvesOf, type Edition, needsRuling, statusOf } from "../../records/edition.ts";
import type { Counts, Notice, SourceCounts, Summary, WrittenFile } from "../../records/generated/summary.ts";

/** Counts of a whole edition. */
export function countsOf(edition: Edition): Counts {
  const { sources, systems, flags, table } = edition;
  const sum = (of: "readings" | "accepted" | "refused" | "missing") =>
    sources.reduce((total, source) => total + source[of], 0);
  const status = { kept: 0, "set aside": 0, interval: 0, "not fitted": 0 };
  for (let row = 0; row < table.count; row++) status[statusOf(edition, row)]++;
  return {
    sources: sources.length,
    sources_refused: sources.filter(({ refusedWhole }) => refusedWhole).length,
    readings: sum("readings"),
    accepted: sum("accepted"),
    refused: sum("refused"),
    missing_cells: sum("missing"),
    kept: status.kept,
    set_aside: status["set aside"],
    intervals: status.interval,
    not_fitted: status["not fitted"],
    substances: edition.substances.length,
    families: new Set(systems.map(({ family }) => family)).size,
    systems: systems.length,
    curves: curvesOf(edition).length,
    flags: flags.length,
    blocking_flags: flags.filter((_, i) => needsRuling(edition, i)).length,
  };
}

/** Account of every source, sorted by name. */
export function sourceCounts({ sources }: Edition): SourceCounts[] {
  return sources.map(({ name, readings, accepted, refused, missing, columnsNotUsed }) => ({
    source: name,
    readings,
    accepted,
    refused,
    missing_cells: missing,
    columns_not_used: [...columnsNotUsed],
  }));
}

/** A problem as the JSON documents write it. */
export function noticeOf({ code, place, found, expected, mend }: Problem): Notice {
  return {
    code,
    file: place.file,
    ...(place.source === undefined ? {} : { source: place.source }),
    ...(place.line === undefined ? {} : { line: place.line }),
    ...(place.column === undefined ? {} : { column: place.column }),
    found,
    expected,
    mend,
  };
}

/** The document `summary.json`: no clock, no machine, no path outside the edition. */
export function summaryOf(edition: Edition, files: readonly WrittenFile[]): Summary {
  return {
    format: 1,
    program_version: edition.programVersion,
    collection: edition.collection,
    counts: countsOf(edition),
    sources: sourceCounts(edition),
    settings: edition.settings,
    notices: edition.notices.map(noticeOf),
    files: [...files],
  };
}
