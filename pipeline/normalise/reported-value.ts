import { pharmacopoeiaTerm } from "../bases/pharmacopoeia.ts";
import type { CellFault } from "../records/cells.ts";
import { type DecimalMark, parseInterval, parseNumber } from "../records/number-text.ts";

/** What a solubility cell says: a number, or a range whose open sides are NaN. */
export type ReportedValue =
  | { readonly kind: "number"; readonly value: number }
  | { readonly kind: "range"; readonly low: number; readonly high: number; readonly term: boolean };

/**
 * Reads a solubility cell: a number, `<0.05`, `0.2-0.4`, or a pharmacopoeia term (then the range is in mL solvent per g).
 * Anything else is a fault; nothing is coerced.
 */
export function readReportedValue(text: string, decimal: DecimalMark): ReportedValue | CellFault {
  const number = parseNumber(text, decimal);
  if (number.ok) return { kind: "number", value: number.value };
  const range = parseInterval(text, decimal);
  if (range?.ok) return { kind: "range", low: range.low ?? Number.NaN, high: range.high ?? Number.NaN, term: false };
  const term = pharmacopoeiaTerm(text);
  if (term !== undefined) {
    return { kind: "range", low: term.from ?? Number.NaN, high: term.to ?? Number.NaN, term: true };
  }
  const fault = range !== undefined && !range.ok ? range : number;
  return { field: "solubility", code: fault.code, found: fault.found };
}
