import { type Problem, problem } from "../problems/catalogue.ts";
import { parseNumber } from "../records/number-text.ts";
import type { TableRow } from "../records/readings.ts";
import { RULING_ACTIONS, type RulingAction, type RulingText } from "../records/rulings.ts";

/** A line of rulings.csv read: the ruling, or why it cannot be followed; and what was read with a doubt. */
export interface ReadRuling {
  readonly ruling?: RulingText;
  readonly problems: readonly Problem[];
}

/** Fields that every ruling needs. */
const NEEDED = ["ruling_id", "target", "action", "reason", "by", "date", "fingerprint"] as const;

/** Reads one line of rulings.csv. Nothing is guessed: what cannot be followed is told with its line and not applied. */
export function readRuling({ file, line, values }: TableRow): ReadRuling {
  const told: Problem[] = [];
  const text = (field: string) => values[field] ?? "";
  const refuse = (column: string, found: string, expected: string): ReadRuling => ({
    problems: [problem("wrong-ruling", { file, line, column }, { found, expected })],
  });
  for (const field of NEEDED) if (text(field) === "") return refuse(field, "the cell is empty", `a ${field}`);
  const action = text("action");
  if (!isAction(action)) return refuse("action", `"${action}" is no action`, `one of ${RULING_ACTIONS.join(", ")}`);
  const corrects = text("corrected_value") !== "" || text("corrected_unit") !== "";
  if (action === "correct" && !corrects) {
    return refuse("corrected_value", "neither a value nor a unit is given", "corrected_value, corrected_unit or both");
  }
  if (action === "correct" && text("evidence") === "") {
    return refuse("evidence", "a correction without evidence", EVIDENCE);
  }
  if (action !== "correct" && corrects) {
    return refuse("corrected_value", `a corrected value beside "${action}"`, "an empty cell, or the action correct");
  }
  const value = correctedValue(text("corrected_value"));
  if (typeof value === "string") return refuse("corrected_value", value, "a number, written with a point");
  const date = isoDate(text("date"));
  if (date === undefined) return refuse("date", `"${text("date")}" is no date`, "a date written YYYY-MM-DD");
  if (date.doubt !== undefined) {
    told.push(
      problem("resaved-by-spreadsheet", { file, line, column: "date" }, { found: date.doubt, mend: DATE_MEND }),
    );
  }
  return {
    problems: told,
    ruling: {
      ...{ id: text("ruling_id"), line, target: text("target"), action, date: date.text },
      ...(value === undefined ? {} : { correctedValue: value }),
      ...(text("corrected_unit") === "" ? {} : { correctedUnit: text("corrected_unit") }),
      ...{ reason: text("reason"), evidence: text("evidence"), by: text("by"), fingerprint: text("fingerprint") },
    },
  };
}

/** What counts as evidence for a correction. */
export const EVIDENCE =
  "a notebook page, the author's reply, a printed erratum or a measurement repeated; statistics alone justify only set aside";
const DATE_MEND = "write dates YYYY-MM-DD, and keep the column as text when a spreadsheet saves the file";

function isAction(text: string): text is RulingAction {
  return (RULING_ACTIONS as readonly string[]).includes(text);
}

/** The number, undefined for an empty cell, a phrase where it is none. A decimal comma is read unless it could group thousands. */
function correctedValue(text: string): number | undefined | string {
  if (text === "") return undefined;
  const read = parseNumber(text, ".");
  if (read.ok) return read.value;
  const comma = /,\d{3}$/.test(text) ? read : parseNumber(text, ",");
  return comma.ok ? comma.value : read.found;
}

/** A date with what is doubtful about it. */
interface ReadDate {
  readonly text: string;
  readonly doubt?: string;
}

/**
 * A date as YYYY-MM-DD. A spreadsheet's own spellings are read where they can be read in one way only: `20.03.2026` has
 * the day first; `3/20/2026` and `20/3/2026` tell by a number above 12. `3/4/2026` stays as it is written.
 */
export function isoDate(text: string): ReadDate | undefined {
  const iso = /^(\d{4})-(\d{1,2})-(\d{1,2})$/.exec(text);
  if (iso !== null) return valid(iso[1], iso[2], iso[3], undefined);
  const dotted = /^(\d{1,2})\.(\d{1,2})\.(\d{4})$/.exec(text);
  if (dotted !== null) return valid(dotted[3], dotted[2], dotted[1], `the date is written ${text}`);
  const slashed = /^(\d{1,2})[/-](\d{1,2})[/-](\d{4})$/.exec(text);
  if (slashed === null) return undefined;
  const [, a = "", b = "", year] = slashed;
  if (Number(a) <= 12 && Number(b) <= 12 && Number(a) !== Number(b)) {
    return { text, doubt: `the date ${text} can be read with the day or the month first` };
  }
  const dayFirst = Number(a) > 12;
  return valid(year, dayFirst ? b : a, dayFirst ? a : b, `the date is written ${text}`);
}

function valid(year = "", month = "", day = "", doubt: string | undefined): ReadDate | undefined {
  const [m, d] = [Number(month), Number(day)];
  const leap = Number(year) % 4 === 0 && (Number(year) % 100 !== 0 || Number(year) % 400 === 0);
  const days = [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][m - 1] ?? 0;
  if (d < 1 || d > days) return undefined;
  const two = (n: number) => String(n).padStart(2, "0");
  return { text: `${year}-${two(m)}-${two(d)}`, ...(doubt === undefined ? {} : { doubt }) };
}
