import type { Problem } from "../problems/catalogue.ts";

/** What a person can decide. */
export const RULING_ACTIONS = ["keep", "set aside", "correct", "ask"] as const;
export type RulingAction = (typeof RULING_ACTIONS)[number];

/** Code of the target `recommended@SYSTEM`: a `keep` on it confirms the grade `recommended` of the system by name. */
export const RECOMMENDED = "recommended";

/** A line of rulings.csv that can be followed: what was decided, why, by whom and when. */
export interface RulingText {
  readonly id: string;
  /** Line of rulings.csv, 1-based. */
  readonly line: number;
  readonly target: string;
  readonly action: RulingAction;
  /** Number that replaces the reported one; absent where the reported number stands. Only for `correct`. */
  readonly correctedValue?: number;
  /** Unit that replaces the reported one; absent where the reported unit stands. Only for `correct`. */
  readonly correctedUnit?: string;
  readonly reason: string;
  /** "" where none is given. */
  readonly evidence: string;
  readonly by: string;
  /** YYYY-MM-DD; as written where it can be read in two ways. */
  readonly date: string;
  readonly fingerprint: string;
}

/** How much a target covers. */
export type TargetScope = "measurement" | "block" | "system" | "source";

/** A ruling in force, with what it judges. */
export interface Ruling extends RulingText {
  readonly scope: TargetScope;
  /** Rows of the measurement table judged, ascending. */
  readonly rows: readonly number[];
  /** Code of the flag, where the target is the id of one. */
  readonly flagCode?: string;
  /** Line of the source that the ruling has followed its measurement to; absent where the line is the one judged. */
  readonly movedToLine?: number;
}

/** A row as it reads with the value or unit that a ruling puts in place of the reported one. */
export interface CorrectedRow {
  readonly state: number;
  readonly valueLow: number;
  readonly valueHigh: number;
  readonly massRatioLow: number;
  readonly massRatioHigh: number;
  readonly massRatio: number;
  readonly moleFraction: number;
  readonly massConcentration: number;
  readonly molPerL: number;
  readonly relativeU: number;
  readonly sharedU: number;
  /** Assumptions of the corrected reading. */
  readonly assumptions: string;
  /** Value and unit used, as text. */
  readonly corrected: string;
}

/** Why a correction cannot be followed: a phrase. */
export interface ImpossibleCorrection {
  readonly impossible: string;
}

/** A row read again with another number (undefined: the reported one) and unit (undefined: the reported one). */
export type Correct = (
  row: number,
  value: number | undefined,
  unit: string | undefined,
) => CorrectedRow | ImpossibleCorrection;

/** What the rulings of a collection come to. */
export interface Rulings {
  /** Rulings in force, in the order of rulings.csv. */
  readonly applied: readonly Ruling[];
  /** Rows decided on, each with the ruling that holds: the narrowest, then the latest. `keep` decides too. */
  readonly decided: ReadonlyMap<number, Ruling>;
  /** Rows set aside, each with the ruling that does. */
  readonly setAside: ReadonlyMap<number, Ruling>;
  /** Rows corrected, each with its ruling and the row as it then reads. */
  readonly corrected: ReadonlyMap<number, { readonly ruling: Ruling; readonly row: CorrectedRow }>;
  /** Flags ruled on, by position in the edition's list. */
  readonly ofFlag: ReadonlyMap<number, Ruling>;
  /** Systems whose grade `recommended` a person confirms, by position. */
  readonly recommended: ReadonlyMap<number, Ruling>;
  /** Rulings not applied, moved, contradictory: each with its line of rulings.csv. */
  readonly problems: readonly Problem[];
}

/** The rulings of a collection that has none. */
export const NO_RULINGS: Rulings = {
  applied: [],
  decided: new Map(),
  setAside: new Map(),
  corrected: new Map(),
  ofFlag: new Map(),
  recommended: new Map(),
  problems: [],
};

/** True for a ruling that decides; `ask` leaves the question open, though it is in hand. */
export function isDecision({ action }: RulingText): boolean {
  return action !== "ask";
}

/** A ruling in one phrase: `set aside by data steward on 2026-03-20: cold filter, notebook 12 page 34 (R0003)`. */
export function rulingPhrase({ action, by, date, reason, evidence, id }: RulingText): string {
  const done = { keep: "kept", "set aside": "set aside", correct: "corrected", ask: "asked about" }[action];
  return `${done} by ${by} on ${date}: ${reason}${evidence === "" ? "" : `; evidence: ${evidence}`} (${id})`;
}
