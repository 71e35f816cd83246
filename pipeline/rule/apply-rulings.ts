import { type Problem, problem } from "../problems/catalogue.ts";
import type { Flag } from "../records/fits.ts";
import type { TableRow } from "../records/readings.ts";
import {
  type Correct,
  type CorrectedRow,
  isDecision,
  NO_RULINGS,
  RECOMMENDED,
  type Ruling,
  type Rulings,
  type TargetScope,
} from "../records/rulings.ts";
import { contradict, placeRuling } from "./place-ruling.ts";
import { readRuling } from "./ruling-text.ts";
import type { TargetInput, Targets } from "./targets.ts";

/** From narrow to broad: a ruling on one measurement is an exception to one on its block. */
const BREADTH: Readonly<Record<TargetScope, number>> = { measurement: 0, block: 1, system: 2, source: 3 };

/**
 * What the rulings of a collection come to: which rows are set aside or corrected, which flags are settled, which grades
 * are confirmed. Of two rulings on the same row the narrower one holds, of two equally narrow ones the later line; where
 * those say different things both are named.
 *
 * @param lines lines of rulings.csv
 * @param correct reads a row again with another value or unit
 */
export function applyRulings(
  lines: readonly TableRow[],
  input: TargetInput,
  targets: Targets,
  correct: Correct,
): Rulings {
  if (lines.length === 0) return NO_RULINGS;
  const problems: Problem[] = [];
  const applied: Ruling[] = [];
  const corrections = new Map<Ruling, ReadonlyMap<number, CorrectedRow>>();
  const lineOf = new Map<string, number>();
  for (const line of lines) {
    const { ruling: text, problems: told } = readRuling(line);
    problems.push(...told);
    if (text === undefined) continue;
    const before = lineOf.get(text.id);
    if (before !== undefined) problems.push(sameId(line, text.id, before));
    lineOf.set(text.id, line.line);
    const placed = placeRuling(text, line.file, targets, correct);
    problems.push(...placed.problems);
    if (placed.ruling === undefined) continue;
    applied.push(placed.ruling);
    corrections.set(placed.ruling, placed.corrected);
  }
  const file = lines[0]?.file ?? "";
  const decided = decideRows(applied, (later, earlier) => problems.push(contradiction(file, later, earlier)));
  const setAside = new Map<number, Ruling>();
  const corrected = new Map<number, { ruling: Ruling; row: CorrectedRow }>();
  for (const [row, ruling] of decided) {
    const reading = corrections.get(ruling)?.get(row);
    if (ruling.action === "set aside") setAside.set(row, ruling);
    if (reading !== undefined) corrected.set(row, { ruling, row: reading });
  }
  return {
    applied,
    decided,
    setAside,
    corrected,
    ofFlag: settledFlags(input, targets, applied, setAside),
    recommended: recommendations(input, applied),
    problems,
  };
}

function sameId({ file, line }: TableRow, id: string, before: number): Problem {
  const found = `${id} is also the name of the ruling of line ${before}`;
  return problem("same-ruling-id", { file, line, column: "ruling_id" }, { found });
}

function contradiction(file: string, later: Ruling, earlier: Ruling): Problem {
  const found =
    `${later.id} (line ${later.line}, ${later.by}) says ${later.action} of ${later.target}, ` +
    `${earlier.id} (line ${earlier.line}, ${earlier.by}) says ${earlier.action} of ${earlier.target}`;
  return problem("contradicting-rulings", { file, line: later.line }, { found });
}

/** The decision in force for every row that has one; `keep` counts, for it may be an exception to a broader ruling. */
function decideRows(applied: readonly Ruling[], onContradiction: (later: Ruling, earlier: Ruling) => void) {
  const decided = new Map<number, Ruling>();
  const told = new Set<string>();
  for (const ruling of applied) {
    if (!isDecision(ruling) || ruling.flagCode === RECOMMENDED) continue;
    for (const row of ruling.rows) {
      const before = decided.get(row);
      if (before !== undefined && BREADTH[before.scope] < BREADTH[ruling.scope]) continue;
      decided.set(row, ruling);
      if (before === undefined || before.scope !== ruling.scope || !contradict(ruling, before)) continue;
      const pair = `${ruling.line} ${before.line}`;
      if (!told.has(pair)) onContradiction(ruling, before);
      told.add(pair);
    }
  }
  return decided;
}

/** The ruling that settles each flag ruled on, by position of the flag. A decision goes before a question. */
function settledFlags(
  input: TargetInput,
  targets: Targets,
  applied: readonly Ruling[],
  setAside: ReadonlyMap<number, Ruling>,
): Map<number, Ruling> {
  const covered = new Map(applied.map((ruling) => [ruling, new Set(ruling.rows)]));
  const settled = new Map<number, Ruling>();
  input.flags.forEach((flag, i) => {
    const rows = targets.rowsOfFlag(flag);
    const on = applied.filter((ruling) => settles(ruling, flag, rows, covered.get(ruling) as ReadonlySet<number>));
    const narrowFirst = (a: Ruling, b: Ruling) => BREADTH[a.scope] - BREADTH[b.scope] || b.line - a.line;
    const [ruling] = [...on.filter(isDecision).sort(narrowFirst), ...on.sort(narrowFirst)];
    const found = ruling ?? (flag.scope === "system" ? oneSourceLeft(input, rows, setAside) : undefined);
    if (found !== undefined) settled.set(i, found);
  });
  return settled;
}

/** A ruling settles a flag that is its target, and every flag on what it sets aside, corrects, or judges as a whole. */
function settles(ruling: Ruling, flag: Flag, rows: readonly number[], covered: ReadonlySet<number>): boolean {
  if (ruling.flagCode === RECOMMENDED || rows.length === 0) return false;
  const changesRows = ruling.action === "set aside" || ruling.action === "correct";
  const named = ruling.flagCode === flag.code && ruling.scope === flag.scope;
  return (named || changesRows || ruling.flagCode === undefined) && rows.every((row) => covered.has(row));
}

/** The last ruling that set rows of a system aside, where they leave a single source: then no sources disagree. */
function oneSourceLeft(
  { table }: TargetInput,
  rows: readonly number[],
  setAside: ReadonlyMap<number, Ruling>,
): Ruling | undefined {
  const left = new Set(rows.filter((row) => !setAside.has(row)).map((row) => table.source[row]));
  if (left.size > 1) return undefined;
  return rows
    .map((row) => setAside.get(row))
    .reduce((last, r) => (r && r.line > (last?.line ?? 0) ? r : last), undefined);
}

/** Systems whose recommendation is confirmed, by position; the later line holds. */
function recommendations({ systems }: TargetInput, applied: readonly Ruling[]): Map<number, Ruling> {
  const position = new Map(systems.map(({ id, index }) => [`${RECOMMENDED}@${id}`, index]));
  const confirmed = new Map<number, Ruling>();
  for (const ruling of applied) {
    const system = position.get(ruling.target);
    if (system !== undefined) confirmed.set(system, ruling);
  }
  return confirmed;
}
