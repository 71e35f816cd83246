import { join } from "node:path";
import { curate } from "../curate.ts";
import { formatProblem, type Problem } from "../problems/catalogue.ts";
import { safeText } from "../problems/safe-text.ts";
import { openOutputFolder } from "../publish/output-folder.ts";
import { countsOf, noticeOf, sourceCounts } from "../publish/tables/summary.ts";
import { writeWorkingTables } from "../publish/working-tables.ts";
import { readCollection } from "../read/collection.ts";
import { type Edition, flagId } from "../records/edition.ts";
import type { Flag } from "../records/fits.ts";
import type { MergeResult } from "../records/generated/merge-result.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

/** Problems and flags printed before the rest is left to the files. */
const SHOWN = 12;

export interface MergeOptions extends CommonOptions {
  readonly out: string;
  readonly report: boolean;
  readonly version: string;
}

/** `saltern merge COLLECTION --out DIR`: the whole path from files to tables and report. */
export async function merge(dir: string, options: MergeOptions, terminal: Terminal): Promise<ExitCode> {
  // The place of output is checked before the work, so that a wrong one costs no time.
  const folder = openOutputFolder(options.out, dir);
  terminal.onInterrupt(folder.discard);
  terminal.progress("read");
  const collection = await readCollection(dir);
  const { edition } = await curate(collection, options.version, terminal.progress);
  terminal.progress("write");
  writeWorkingTables(edition, folder, options.report);
  folder.commit();

  const counts = countsOf(edition);
  const needsYou = counts.refused > 0;
  const open = join(options.out, options.report ? join("report", "index.html") : "systems.csv");
  if (options.json) terminal.print(JSON.stringify(resultOf(edition, options.out, open, needsYou)));
  tellProblems(edition, options.out, terminal);
  if (!options.json) for (const line of account(edition, open)) terminal.print(line);
  return needsYou ? Exit.needsYou : Exit.done;
}

/** Notices and the first refused readings, on standard error. */
function tellProblems(edition: Edition, out: string, terminal: Terminal): void {
  for (const notice of edition.notices.slice(0, SHOWN)) terminal.tell(`notice: ${formatProblem(notice)}`);
  if (edition.notices.length > SHOWN)
    terminal.tell(`${edition.notices.length - SHOWN} more notices in ${join(out, "summary.json")}`);
  const alike = new Map<string, Problem[]>();
  for (const refused of edition.refused) {
    const same = alike.get(alikeKey(refused));
    if (same) same.push(refused);
    else alike.set(alikeKey(refused), [refused]);
  }
  for (const [first, ...others] of [...alike.values()].slice(0, SHOWN)) {
    terminal.tell(formatProblem(first as Problem));
    if (others.length > 0) terminal.tell(`  and ${others.length} more like it, to line ${others.at(-1)?.place.line}`);
  }
  if (alike.size > SHOWN) terminal.tell(`${alike.size - SHOWN} more kinds of refusal in ${join(out, "refused.csv")}`);
}

/** What refused readings share that are told once: the file, the column and the problem, whatever the number. */
function alikeKey({ code, place, expected }: Problem): string {
  return [place.file, place.column, code, expected].join("\u0000");
}

/** The account for people: sources, systems, what needs a decision first, and at the end the file to open. */
function account(edition: Edition, open: string): string[] {
  const counts = countsOf(edition);
  const width = Math.max(6, ...edition.sources.map(({ name }) => name.length));
  const cell = (value: number | string) => String(value).padStart(9);
  const line = (name: string, ...values: (number | string)[]) => `  ${name.padEnd(width)}${values.map(cell).join("")}`;
  const blocking = edition.flags.filter(({ severity }) => severity === "blocking");
  const rulingOf = (flag: Flag) => edition.rulings.ofFlag.get(edition.flags.indexOf(flag));
  const first = [...blocking].sort((x, y) => Number(rulingOf(x) !== undefined) - Number(rulingOf(y) !== undefined));
  const flagLines = first.slice(0, SHOWN).map((flag) => {
    const cause = flag.suspectedCause ? `. Suspected cause: ${flag.suspectedCause}` : "";
    const ruling = rulingOf(flag);
    const standing = ruling === undefined ? "open" : `settled (${safeText(ruling.id, 20)}, ${ruling.action})`;
    return `  ${standing}: ${safeText(flagId(edition, flag))}: ${safeText(flag.evidence, 400)}${cause}`;
  });
  return [
    safeText(edition.collection.title),
    "",
    line("source", "readings", "accepted", "refused", "missing"),
    ...edition.sources.map((s) => line(s.name, s.readings, s.accepted, s.refused, s.missing)),
    line("all", counts.readings, counts.accepted, counts.refused, counts.missing_cells),
    "",
    `${counts.systems} systems of ${counts.families} families, ${counts.curves} curves, ${counts.intervals} intervals, ${counts.not_fitted} values shown and not fitted`,
    `${counts.flags} flags: ${counts.blocking_flags} need a person, ${blocking.length - counts.blocking_flags} are settled by a ruling, ${counts.flags - blocking.length} are notices`,
    ...flagLines,
    ...(blocking.length > SHOWN ? [`  and ${blocking.length - SHOWN} more in flags.csv`] : []),
    "",
    `open ${open}`,
  ];
}

/** The result for scripts. */
function resultOf(edition: Edition, out: string, open: string, needsYou: boolean): MergeResult {
  return {
    format: 1,
    collection: edition.collection.name,
    output: out,
    open,
    counts: countsOf(edition),
    sources: sourceCounts(edition),
    needs_you: needsYou,
    problems: edition.refused.map(noticeOf),
    notices: edition.notices.map(noticeOf),
  };
}
