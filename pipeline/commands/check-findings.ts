import type { Flag } from "../records/fits.ts";
import type { CheckedRow, RepeatedRows } from "../records/generated/check-result.ts";
import type { Merged } from "./check-merged.ts";

/** What screening suspects of a row, in the words of the result. */
export type Suspicion = Partial<
  Pick<
    CheckedRow,
    "suspected_cause" | "cause_detail" | "cause_probability" | "cause_scope" | "proposed_value" | "evidence" | "look_at"
  >
>;

/** Codes of notices on what counts once though it is written more than once. */
const REPEATS = new Set([
  "exact-repeat",
  "one-value-in-two-units",
  "re-reported",
  "averaged-copy",
  "changed-copy",
  "re-reporting-source",
]);

/**
 * What screening says of the new rows once they are among the collection's, by line: the cause, and the value
 * that would fit. What is said of a row itself goes before what is said of its block, that before what is said of the
 * system.
 */
export function suspicionsOf({ edition, source }: Merged): Map<number, Suspicion> {
  const suspicions = new Map<number, Suspicion>();
  const { table } = edition;
  const precise: Readonly<Record<Flag["scope"], number>> = { measurement: 3, block: 2, system: 1, source: 0 };
  for (const flag of [...edition.flags].sort((a, b) => precise[a.scope] - precise[b.scope])) {
    if (flag.severity !== "blocking" || flag.system === undefined || flag.scope === "source") continue;
    if (flag.scope === "block" && flag.source !== source) continue;
    const rows = flag.scope === "measurement" ? [flag.row as number] : (edition.systems[flag.system]?.rows ?? []);
    for (const row of rows)
      if (table.source[row] === source) suspicions.set(table.line[row] as number, suspicionOf(flag));
  }
  return suspicions;
}

function suspicionOf(flag: Flag): Suspicion {
  const cause = flag.suspectedCause as CheckedRow["suspected_cause"];
  return {
    ...(cause === undefined ? {} : { suspected_cause: cause }),
    ...(flag.causeDetail === undefined ? {} : { cause_detail: flag.causeDetail }),
    ...(flag.causeProbability === undefined ? {} : { cause_probability: flag.causeProbability }),
    cause_scope: flag.scope as "measurement" | "block" | "system",
    ...(flag.proposedValue === undefined ? {} : { proposed_value: flag.proposedValue }),
    evidence: flag.evidence,
    look_at: flag.lookAt,
  };
}

/** What of the file the collection holds already, and what it holds twice itself. */
export function repeatsOf({ edition, source }: Merged): RepeatedRows[] {
  const { table, systems } = edition;
  return edition.flags
    .filter((flag) => REPEATS.has(flag.code) && flag.source === source)
    .map((flag) => {
      const system = flag.system === undefined ? undefined : systems[flag.system];
      const block = [...(system?.rows ?? [])].filter((row) => table.source[row] === source);
      const rows = flag.row === undefined ? block : [flag.row];
      return {
        code: flag.code,
        lines: [...new Set(rows.map((row) => table.line[row] as number))].sort((a, b) => a - b),
        system: system?.id ?? "",
        evidence: flag.evidence,
      };
    });
}
