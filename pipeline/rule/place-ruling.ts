import { type Place, type Problem, type ProblemCode, problem } from "../problems/catalogue.ts";
import {
  type Correct,
  type CorrectedRow,
  isDecision,
  RECOMMENDED,
  type Ruling,
  type RulingText,
} from "../records/rulings.ts";
import type { Target, Targets } from "./targets.ts";

/** A ruling on the rows it judges, or why it is not applied; and what is worth telling of it. */
export interface PlacedRuling {
  readonly ruling?: Ruling;
  /** For `correct`: every row judged as it then reads. */
  readonly corrected: ReadonlyMap<number, CorrectedRow>;
  readonly problems: readonly Problem[];
}

const NOTHING: ReadonlyMap<number, CorrectedRow> = new Map();

/**
 * Finds what a ruling judges. Where its fingerprint no longer matches but exactly one other line of the source does, the
 * ruling follows it and says so; else it is stale and not applied.
 * @param file name of the rulings for messages
 */
export function placeRuling(ruling: RulingText, file: string, targets: Targets, correct: Correct): PlacedRuling {
  const place: Place = { file, line: ruling.line };
  const not = (code: ProblemCode, found: string): PlacedRuling => ({
    corrected: NOTHING,
    problems: [problem(code, place, { found: `${ruling.id} on ${ruling.target}: ${found}` })],
  });
  const target = targets.find(ruling.target);
  const found = followed(ruling, target, targets);
  if (typeof found === "string") return not("stale-ruling", found);
  const several = found.rows.length > 1;
  if (several && ruling.correctedValue !== undefined) {
    return not("wrong-ruling", `one corrected value for ${found.rows.length} measurements; give a unit alone`);
  }
  if (found.flagCode === RECOMMENDED && ruling.action !== "keep") {
    return not("wrong-ruling", `"${ruling.action}" is no answer to a recommendation; to confirm it the action is keep`);
  }
  const corrected = new Map<number, CorrectedRow>();
  if (ruling.action === "correct") {
    for (const row of found.rows) {
      const read = correct(row, ruling.correctedValue, ruling.correctedUnit);
      if ("impossible" in read) return not("correction-impossible", read.impossible);
      corrected.set(row, read);
    }
  }
  const problems: Problem[] = [];
  if (found.movedToLine !== undefined) {
    const told = `${ruling.id} on ${ruling.target}: the line it judged is now line ${found.movedToLine}`;
    problems.push(problem("ruling-moved", place, { found: told }));
  } else if (concernsNoFlag(ruling, found, targets)) {
    const told = `${ruling.id} on ${ruling.target}: this flag is not raised any more`;
    problems.push(problem("ruling-without-flag", place, { found: told }));
  }
  return { ruling: { ...ruling, ...found }, corrected, problems };
}

/** The target whose reported fields are those judged, or a phrase that says why there is none. */
function followed(
  { target: text, fingerprint }: RulingText,
  target: Target | undefined,
  targets: Targets,
): (Target & { readonly movedToLine?: number }) | string {
  if (target !== undefined && targets.fingerprint(target.rows) === fingerprint) return target;
  const source = targets.sourceOf(text);
  if (source === undefined) {
    return target === undefined
      ? "the collection has nothing of this name"
      : `what it judged has changed since: ${target.rows.length} measurements now, none of the same fingerprint`;
  }
  const same = source.rows.filter((row) => row !== target?.rows[0] && targets.fingerprint([row]) === fingerprint);
  const [row] = same;
  if (row === undefined || same.length > 1) {
    const others = same.length === 0 ? "no other line" : `${same.length} other lines`;
    return `the line is not what was judged, and ${others} of ${source.name} is`;
  }
  const flagCode = target?.flagCode ?? (text.includes("@") ? text.slice(0, text.indexOf("@")) : undefined);
  return {
    scope: "measurement",
    rows: [row],
    ...(flagCode === undefined ? {} : { flagCode }),
    movedToLine: targets.lineOf(row),
  };
}

/** True where a flag alone was kept or asked about, and is not raised. */
function concernsNoFlag({ action, target }: RulingText, { flagCode }: Target, targets: Targets): boolean {
  const changesRows = action === "set aside" || action === "correct";
  return !changesRows && flagCode !== undefined && flagCode !== RECOMMENDED && targets.flagNamed(target) === undefined;
}

/** True if two rulings on the same rows say different things. `ask` contradicts nothing: an answer follows it. */
export function contradict(a: Ruling, b: Ruling): boolean {
  if (!isDecision(a) || !isDecision(b)) return false;
  return a.action !== b.action || a.correctedValue !== b.correctedValue || a.correctedUnit !== b.correctedUnit;
}
