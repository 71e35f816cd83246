import { type ProblemCode, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { safeText } from "../problems/safe-text.ts";
import type { NewRuling } from "../publish/append-ruling.ts";
import { RECOMMENDED, RULING_ACTIONS, type RulingAction } from "../records/rulings.ts";
import { EVIDENCE, isoDate } from "../rule/ruling-text.ts";
import type { Target, Targets } from "../rule/targets.ts";
import type { Terminal } from "./terminal.ts";

/** What was given on the command line; what is missing is asked for at a terminal. */
export interface RuleRequest {
  readonly target?: string;
  readonly action?: string;
  readonly by?: string;
  readonly reason?: string;
  readonly evidence?: string;
  readonly correctedValue?: string;
  readonly correctedUnit?: string;
  readonly date?: string;
}

/** A ruling to be written, without its fingerprint, and what it is on. */
export interface AskedRuling {
  readonly ruling: NewRuling & { readonly target: string };
  readonly target: Target;
}

/** Open flags listed before the question for the target. */
const LISTED = 12;

const MEANINGS: Readonly<Record<RulingAction, string>> = {
  keep: "the value stands as reported; the robust fit goes on weighing it",
  "set aside": "stays in the tables, leaves the curves",
  correct: "read with another value or unit; needs evidence",
  ask: "the origin is asked; the flag holds no edition back, but counts as open in the grade",
};

function stop(argument: string, code: ProblemCode, found: string, expected?: string): never {
  const details = expected === undefined ? { found } : { found, expected };
  throw new InputError(problem(code, { file: `saltern rule, ${argument}` }, details));
}

/**
 * Completes and checks a ruling before it is tried.
 * @param open ids of the flags that need a ruling
 * @throws InputError `missing-argument` off a terminal, `unknown-target`, `bad-argument`
 */
export async function askRuling(
  request: RuleRequest,
  targets: Targets,
  open: readonly string[],
  terminal: Terminal,
): Promise<AskedRuling> {
  const answer = async (argument: string, given: string | undefined, question: string, expected: string) => {
    const text = given?.trim() ?? (terminal.ask === undefined ? "" : await terminal.ask(question));
    return text === "" ? stop(argument, "missing-argument", `${argument} is missing`, expected) : text;
  };
  if (request.target === undefined && terminal.ask !== undefined) tellOpen(open, terminal);
  const name = await answer("TARGET", request.target, "On which flag, measurement, block or source? ", TARGETS);
  const target = targetNamed(name, targets, open);
  if (request.action === undefined && terminal.ask !== undefined) {
    for (const action of RULING_ACTIONS) terminal.tell(`  ${action}: ${MEANINGS[action]}`);
  }
  const action = actionOf(await answer("ACTION", request.action, "What is decided? ", RULING_ACTIONS.join(", ")));
  const corrected = action === "correct" ? await correction(request, target, terminal) : noCorrection(request);
  const reason = await answer("--reason", request.reason, "Why? ", "the reason, in a sentence");
  const evidence =
    action === "correct"
      ? await answer("--evidence", request.evidence, "On what evidence? ", EVIDENCE)
      : request.evidence;
  const by = await answer("--by", request.by, "Who decides? ", "the name or role of a person");
  const rest = { reason, evidence: evidence?.trim() ?? "", by, date: dateOf(request.date) };
  return { ruling: { target: name, action, ...corrected, ...rest }, target };
}

const TARGETS = "the id of a flag or measurement, SOURCE@SYSTEM, or the name of a source";

function tellOpen(open: readonly string[], terminal: Terminal): void {
  terminal.tell(open.length === 0 ? "No flag needs a ruling." : "Flags that need a ruling:");
  for (const id of open.slice(0, LISTED)) terminal.tell(`  ${safeText(id)}`);
  if (open.length > LISTED) terminal.tell(`  and ${open.length - LISTED} more in flags.csv`);
}

function targetNamed(name: string, targets: Targets, open: readonly string[]): Target {
  const target = targets.find(name);
  const flagged =
    target?.flagCode === undefined || target.flagCode === RECOMMENDED || targets.flagNamed(name) !== undefined;
  if (target !== undefined && flagged) return target;
  const found = target === undefined ? `"${name}" names nothing in the collection` : `there is no flag "${name}"`;
  const place = name.slice(name.indexOf("@") + 1);
  const near = open.filter((id) => id.includes(place)).slice(0, 3);
  return stop("TARGET", "unknown-target", found, near.length > 0 ? `perhaps ${near.join(", ")}` : TARGETS);
}

function actionOf(text: string): RulingAction {
  const plain = text.toLowerCase().replace("-", " ");
  const action = RULING_ACTIONS.find((known) => known === plain);
  return action ?? stop("ACTION", "bad-argument", `"${text}" is no action`, `one of ${RULING_ACTIONS.join(", ")}`);
}

/** Value and unit of a correction: one measurement may have both, several only another unit. */
async function correction(
  { correctedValue, correctedUnit }: RuleRequest,
  target: Target,
  terminal: Terminal,
): Promise<{ corrected_value: string; corrected_unit: string }> {
  const several = target.rows.length > 1;
  const ask = async (given: string | undefined, question: string) =>
    given?.trim() ?? (terminal.ask === undefined ? "" : await terminal.ask(question));
  const asksNothing = correctedValue !== undefined || correctedUnit !== undefined;
  const value =
    asksNothing || several
      ? (correctedValue?.trim() ?? "")
      : await ask(undefined, "Correct value (empty: as reported)? ");
  const unit = asksNothing
    ? (correctedUnit?.trim() ?? "")
    : await ask(undefined, "Correct unit (empty: as reported)? ");
  if (value === "" && unit === "") {
    stop("--corrected-value", "missing-argument", "neither a corrected value nor a corrected unit is given");
  }
  return { corrected_value: value, corrected_unit: unit };
}

function noCorrection({ correctedValue, correctedUnit }: RuleRequest): Record<never, string> {
  if (correctedValue === undefined && correctedUnit === undefined) return {};
  return stop("--corrected-value", "bad-argument", "a corrected value or unit is for the action correct alone");
}

/** The date given, else today's here: the only clock of a ruling. */
function dateOf(given: string | undefined): string {
  if (given === undefined) {
    const now = new Date();
    return [now.getFullYear(), now.getMonth() + 1, now.getDate()].map((n) => String(n).padStart(2, "0")).join("-");
  }
  const date = isoDate(given.trim());
  if (date === undefined || date.doubt !== undefined) {
    return stop("--date", "bad-argument", `"${given}" is not a date`, "a date written YYYY-MM-DD");
  }
  return date.text;
}
