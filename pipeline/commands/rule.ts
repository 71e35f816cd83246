import { join } from "node:path";
import { curate } from "../curate.ts";
import { formatProblem, type Problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { safeText } from "../problems/safe-text.ts";
import { appendRuling, type NewRuling } from "../publish/append-ruling.ts";
import { appliedRuling } from "../publish/edition-document.ts";
import { noticeOf } from "../publish/tables/summary.ts";
import { type Collection, readCollection } from "../read/collection.ts";
import { type Edition, flagId, needsRuling } from "../records/edition.ts";
import type { RuleResult } from "../records/generated/rule-result.ts";
import { type Ruling, rulingPhrase } from "../records/rulings.ts";
import { createTargets, type Target } from "../rule/targets.ts";
import { askRuling, type RuleRequest } from "./ask-ruling.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

export interface RuleOptions extends CommonOptions, RuleRequest {
  readonly version: string;
}

/** Problems of a ruling that keep it from being written. */
const STOPS: ReadonlySet<string> = new Set(["wrong-ruling", "stale-ruling", "correction-impossible"]);

/**
 * `saltern rule COLLECTION TARGET ACTION`: writes down a decision in rulings.csv. The ruling is tried first, so that one
 * which could not be applied is not written.
 */
export async function rule(dir: string, options: RuleOptions, terminal: Terminal): Promise<ExitCode> {
  terminal.progress("read");
  const collection = await readCollection(dir);
  const { edition: before } = await curate(collection, options.version, terminal.progress);
  const targets = createTargets(before, collection.sources);
  const open = before.flags.filter((_, i) => needsRuling(before, i)).map((flag) => flagId(before, flag));
  const { ruling, target } = await askRuling(options, targets, open, terminal);
  const line = { ...ruling, fingerprint: targets.fingerprint(target.rows) };
  const { edition, applied, told } = await tryOut(collection, line, options.version, terminal);
  const id = appendRuling(dir, line);
  const result = resultOf({ before, edition, applied, told, id, file: join(dir, "rulings.csv") });
  if (options.json) terminal.print(JSON.stringify(result));
  else for (const text of account(result, { ...applied, id }, target, before, edition)) terminal.print(text);
  for (const notice of told) terminal.tell(`notice: ${formatProblem(notice)}`);
  return Exit.done;
}

/** Name of a ruling that is not written yet. */
const UNNAMED = "this ruling";

/** Curates the collection as it would be with the ruling. @throws InputError where the ruling could not be applied */
async function tryOut(collection: Collection, ruling: NewRuling, version: string, terminal: Terminal) {
  const number = Math.max(1, ...collection.rulings.map(({ line }) => line)) + 1;
  const row = { file: "rulings.csv", line: number, values: { ...ruling, ruling_id: UNNAMED } };
  const rulings = [...collection.rulings, row];
  const { edition } = await curate({ ...collection, rulings }, version, terminal.progress);
  const told = edition.rulings.problems.filter(({ place }) => place.line === number);
  const stop = told.find(({ code }) => STOPS.has(code));
  const applied = edition.rulings.applied.find(({ line }) => line === number);
  if (stop !== undefined || applied === undefined) throw new InputError(stop ?? (told[0] as Problem));
  return { edition, applied, told };
}

interface Outcome {
  readonly before: Edition;
  readonly edition: Edition;
  readonly applied: Ruling;
  readonly told: readonly Problem[];
  readonly id: string;
  readonly file: string;
}

function resultOf({ before, edition, applied, told, id, file }: Outcome): RuleResult {
  const settled = edition.flags.filter(
    (_, i) => edition.rulings.ofFlag.get(i)?.line === applied.line && !before.rulings.ofFlag.has(i),
  );
  return {
    format: 1,
    ruling: { ...appliedRuling(edition, applied), ruling_id: id },
    file,
    flags_settled: settled.map((flag) => flagId(edition, flag)),
    blocking_flags_left: edition.flags.filter((_, i) => needsRuling(edition, i)).length,
    notices: told.map(noticeOf),
  };
}

/** For people: what was written, what it settles, and what it changes. */
function account(result: RuleResult, ruling: Ruling, target: Target, before: Edition, after: Edition): string[] {
  const { flags_settled: settled, blocking_flags_left: left } = result;
  const measurements = `${target.rows.length} ${target.rows.length === 1 ? "measurement" : "measurements"}`;
  return [
    `${ruling.id} written to ${safeText(result.file)}: ${safeText(ruling.target)} ${safeText(rulingPhrase(ruling), 600)}`,
    `${measurements} judged; ${settled.length === 0 ? "no flag settled" : `settled: ${settled.map((id) => safeText(id)).join(", ")}`}`,
    ...gradeChanges(before, after),
    left === 0
      ? "no blocking flag is without a ruling: the collection can be published"
      : `${left} blocking ${left === 1 ? "flag is" : "flags are"} still without a ruling`,
  ];
}

function gradeChanges(before: Edition, after: Edition): string[] {
  return after.systems.flatMap(({ id, index }) => {
    const [was, is] = [before.grades[index]?.grade, after.grades[index]?.grade];
    return was === is ? [] : [`grade of ${id}: ${was}, now ${is}`];
  });
}
