import { pharmacopoeiaTerm } from "../bases/pharmacopoeia.ts";
import type { CellFault } from "../records/cells.ts";
import { type DecimalMark, parseInterval, parseNumber } from "../records/number-text.ts";

/** What a solubility cell says: a number, or a range whose open sides are NaN. */
export type ReportedValue =
  | { readonly kind: "number"; readonly value: number }
  | { readonly kind: "range"; readonly low: number; readonly high: number; readonly term: boolean };

/** Words that set a limit, as the sign they stand for. */
const LIMIT_WORDS: readonly (readonly [words: RegExp, sign: string])[] = [
  [/^(?:less than|below|under)\s+(?=[\d.,])/i, "<"],
  [/^(?:at most|not more than|up to)\s+(?=[\d.,])/i, "≤"],
  [/^(?:more than|greater than|above|over)\s+(?=[\d.,])/i, ">"],
  [/^(?:at least|not less than)\s+(?=[\d.,])/i, "≥"],
];
/** Longest text in which such words are looked for. */
const LONGEST = 200;
const WITHOUT_LIMIT = /^(?:completely |fully |freely )?(?:miscible|infinite|∞)\.?$/i;

/** A limit in words with its sign: `less than 0.05` as `<0.05`; other texts as they are. */
function withSign(text: string): string {
  if (text.length > LONGEST) return text;
  const found = LIMIT_WORDS.find(([words]) => words.test(text));
  return found === undefined ? text : text.replace(found[0], found[1]);
}

/**
 * Reads a solubility cell: a number, `<0.05`, `at least 2`, `0.2-0.4`, or a pharmacopoeia term (then the range is in mL
 * solvent per g). Anything else is a fault; nothing is coerced. `miscible` names no solubility.
 */
export function readReportedValue(text: string, decimal: DecimalMark): ReportedValue | CellFault {
  const number = parseNumber(text, decimal);
  if (number.ok) return { kind: "number", value: number.value };
  const range = parseInterval(withSign(text), decimal);
  if (range?.ok) return { kind: "range", low: range.low ?? Number.NaN, high: range.high ?? Number.NaN, term: false };
  const term = pharmacopoeiaTerm(text);
  if (term !== undefined) {
    return { kind: "range", low: term.from ?? Number.NaN, high: term.to ?? Number.NaN, term: true };
  }
  if (text.length <= LONGEST && WITHOUT_LIMIT.test(text)) {
    const found = `"${text}" says that there is no limit: it names no solubility`;
    const mend = "list the word under missing in the card, or give what was dissolved as a lower bound, such as >1000";
    return { field: "solubility", code: "not-a-number", found, expected: "a number, a range or a limit", mend };
  }
  const fault = range !== undefined && !range.ok ? range : number;
  return { field: "solubility", code: fault.code, found: fault.found };
}
