import { atomicWeight, hasNoStandardAtomicWeight } from "./atomic-weights.ts";
import { formulaParts } from "./formula-parts.ts";
import { type FormulaFault, formulaFault, type LegibleFormula, legibleFormula } from "./formula-text.ts";

/** Atoms of each element, by symbol; D and T stand for themselves. Counts may be fractions (crystal water). */
export type ElementCounts = ReadonlyMap<string, number>;

/** One part of a formula: `5H2O` in `CuSO4·5H2O`; the counts are those of one unit, without the coefficient. */
export interface FormulaPart {
  readonly text: string;
  readonly coefficient: number;
  readonly elements: ElementCounts;
}

/** A chemical formula that was understood. */
export interface Formula {
  /** As given. */
  readonly text: string;
  readonly parts: readonly FormulaPart[];
  /** All parts together, each with its coefficient. */
  readonly elements: ElementCounts;
  /** Number of elementary charges; 0 for a neutral formula. */
  readonly charge: number;
}

const OPENING = "([{";
const CLOSING = ")]}";

/**
 * Reads a chemical formula: nested brackets, crystal water after `·`, `.`, `*`, `•` or ` x ` with whole or broken
 * counts, Hill formulas with broken counts, charges (`SO4^2-`, `SO4²⁻`, `[Fe(CN)6]4-`, `NH4+`, `Ca2+`), Unicode
 * subscripts, D and T, blanks.
 *
 * What cannot be read in one way only is a fault, told with its character: nothing is guessed. A full stop is read by
 * the rule of {@link formulaParts}; `SO42-` is refused as an ambiguous charge.
 *
 * @example parseFormula("KAl(SO4)2·12H2O") // elements: K 1, Al 1, S 2, O 20, H 24
 */
export function parseFormula(text: string): Formula | FormulaFault {
  const legible = legibleFormula(text);
  if ("fault" in legible) return legible;
  if (legible.text === "") return formulaFault("empty", 1, "no formula");
  const charged = splitCharge(legible);
  if ("fault" in charged) return charged;
  const parts: FormulaPart[] = [];
  const elements = new Map<string, number>();
  for (const part of formulaParts(charged.uncharged)) {
    const parsed = parsePart(part);
    if ("fault" in parsed) return parsed;
    parts.push(parsed);
    addCounts(elements, parsed.elements, parsed.coefficient);
  }
  return { text, parts, elements, charge: charged.charge };
}

function addCounts(into: Map<string, number>, counts: ElementCounts, times: number): void {
  for (const [symbol, count] of counts) into.set(symbol, (into.get(symbol) ?? 0) + count * times);
}

function splitCharge(formula: LegibleFormula): { uncharged: LegibleFormula; charge: number } | FormulaFault {
  const { text, places } = formula;
  const written = /(?:\^(\d*)|\((\d*))?([+-])\)?$/.exec(text);
  if (written === null) return { uncharged: formula, charge: 0 };
  const sign = written[3] === "-" ? -1 : 1;
  const shorten = (length: number) => ({ text: text.slice(0, length), places: places.slice(0, length + 1) });
  const explicit = written[1] ?? written[2];
  if (explicit !== undefined) return { uncharged: shorten(written.index), charge: sign * Number(explicit || 1) };
  const body = text.slice(0, written.index);
  const digits = /\d*$/.exec(body)?.[0] ?? "";
  const bare = body.slice(0, body.length - digits.length);
  if (digits === "") return { uncharged: shorten(body.length), charge: sign };
  if (digits.length === 1 && (/^[A-Z][a-z]?$/.test(bare) || bare.endsWith("]"))) {
    return { uncharged: shorten(bare.length), charge: sign * Number(digits) };
  }
  if (digits.length === 1 && /[A-Za-z]$/.test(bare)) return { uncharged: shorten(body.length), charge: sign };
  const place = places[bare.length] ?? 1;
  return formulaFault("ambiguous charge", place, "a number that may be a count or a charge; write it as in SO4^2-,");
}

interface OpenBracket {
  readonly counts: Map<string, number>;
  readonly bracket: string;
  readonly place: number;
}

function parsePart({ text, places }: LegibleFormula): FormulaPart | FormulaFault {
  const placeOf = (index: number) => places[index] ?? 1;
  if (/^[xny](?![a-z])/.test(text)) {
    return formulaFault("indefinite count", placeOf(0), "an indefinite count; state the number");
  }
  const leading = /^(?:(\d+)\/(\d+)|\d+(?:\.\d+)?|\.\d+)/.exec(text);
  const coefficient = leading === null ? 1 : numberOf(leading);
  if (!(coefficient > 0) || coefficient > 1e6) {
    return formulaFault("zero count", placeOf(0), "a count that is zero or not a number");
  }
  const open: OpenBracket[] = [{ counts: new Map(), bracket: "", place: placeOf(0) }];
  let index = leading?.[0].length ?? 0;
  if (index === text.length)
    return formulaFault("nothing to count", placeOf(index), "an element or bracket is missing");
  while (index < text.length) {
    const step = takeStep(text, index, open, placeOf);
    if (typeof step !== "number") return step;
    index = step;
  }
  const innermost = open.at(-1) as OpenBracket;
  if (open.length > 1) {
    return formulaFault("unbalanced bracket", innermost.place, `"${innermost.bracket}" is never closed, opened`);
  }
  return { text, coefficient, elements: innermost.counts };
}

const numberOf = ([whole, numerator, denominator]: RegExpExecArray): number =>
  numerator === undefined ? Number(whole) : Number(numerator) / Number(denominator);

/** Takes one element or bracket from `text` at `index`; returns the index after it. */
function takeStep(
  text: string,
  index: number,
  open: OpenBracket[],
  placeOf: (index: number) => number,
): number | FormulaFault {
  const character = text.charAt(index);
  const place = placeOf(index);
  if (OPENING.includes(character)) {
    open.push({ counts: new Map(), bracket: character, place });
    return index + 1;
  }
  if (CLOSING.includes(character)) return closeBracket(text, index, open, place);
  if (!/[A-Z]/.test(character)) {
    return formulaFault("unexpected character", place, `unexpected "${character}" (symbols start with a capital)`);
  }
  const symbol = symbolAt(text, index);
  if (atomicWeight(symbol) === undefined) {
    return hasNoStandardAtomicWeight(symbol)
      ? formulaFault("no atomic weight", place, `"${symbol}" has no standard atomic weight, used`)
      : formulaFault("unknown element", place, `"${symbol}" is not an element,`);
  }
  return takeCount(text, index + symbol.length, placeOf, (count) => {
    addCounts(open.at(-1)?.counts as Map<string, number>, new Map([[symbol, count]]), 1);
  });
}

const symbolAt = (text: string, index: number): string => /^[A-Z][a-z]*/.exec(text.slice(index))?.[0] ?? "";

function closeBracket(text: string, index: number, open: OpenBracket[], place: number): number | FormulaFault {
  const closing = text.charAt(index);
  const inner = open.at(-1) as OpenBracket;
  if (open.length < 2 || OPENING.indexOf(inner.bracket) !== CLOSING.indexOf(closing)) {
    return formulaFault("unbalanced bracket", place, `"${closing}" closes no bracket of its kind`);
  }
  if (inner.counts.size === 0) return formulaFault("empty bracket", inner.place, "an empty bracket");
  open.pop();
  return takeCount(
    text,
    index + 1,
    () => place,
    (count) => {
      addCounts(open.at(-1)?.counts as Map<string, number>, inner.counts, count);
    },
  );
}

function takeCount(
  text: string,
  index: number,
  placeOf: (index: number) => number,
  use: (count: number) => void,
): number | FormulaFault {
  const digits = /^\d+(?:\.\d+)?/.exec(text.slice(index))?.[0] ?? "";
  const count = digits === "" ? 1 : Number(digits);
  if (!(count > 0) || count > 1e6) return formulaFault("zero count", placeOf(index), "a count of zero or too large");
  use(count);
  return index + digits.length;
}
