/** What can be wrong with a chemical formula. */
export type FormulaFaultKind =
  | "empty"
  | "too long"
  | "unexpected character"
  | "unknown element"
  | "no atomic weight"
  | "unbalanced bracket"
  | "empty bracket"
  | "nothing to count"
  | "zero count"
  | "indefinite count"
  | "blank between digits"
  | "ambiguous charge";

/** Why a text is not a formula, and at which character (1 is the first) of the text as given. */
export interface FormulaFault {
  readonly fault: FormulaFaultKind;
  readonly at: number;
  readonly message: string;
}

/** Builds a fault; the message names the place and ends with the way out. */
export function formulaFault(fault: FormulaFaultKind, at: number, says: string): FormulaFault {
  return { fault, at, message: `${says} at character ${at}` };
}

/** A formula in plain characters: digits, letters, brackets, `·` between the parts, `^` before a written charge. */
export interface LegibleFormula {
  readonly text: string;
  /** Place (1-based) in the original text of every character of `text`, and one beyond the end. */
  readonly places: readonly number[];
}

const SUBSCRIPTS = "₀₁₂₃₄₅₆₇₈₉";
const SUPERSCRIPTS = "⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻";
const PLAIN_OF_SUPERSCRIPTS = "0123456789+-";
const DOTS = new Set(["·", "•", "∙", "⋅", "*", "×", "・", "‧", "●"]);
const DASHES = new Set(["-", "−", "–", "‐", "‑", "﹣", "－"]);
const FRACTIONS: ReadonlyMap<string, string> = new Map([
  ["½", "1/2"],
  ["⅓", "1/3"],
  ["⅔", "2/3"],
  ["¼", "1/4"],
  ["¾", "3/4"],
]);

const PLAIN = /^[A-Za-wyz\d()[\]{}·.+^-]{1,400}$/;

/** Longest text read as a formula: anything longer is not one, and a hostile cell may have a million characters. */
const LONGEST = 400;

/**
 * Folds the ways of writing a formula to one: Unicode subscripts to digits, superscripts to a charge, the dots of
 * crystal water to `·`, a lone `x` between blanks to `·`, blanks away. A blank between two digits is a fault, because
 * closing it up would make `SO4 5H2O` into forty-five oxygens.
 */
export function legibleFormula(original: string): LegibleFormula | FormulaFault {
  // Most formulas are plain: the long way round would only cost time.
  if (PLAIN.test(original))
    return { text: original, places: Array.from({ length: original.length + 1 }, (_, i) => i + 1) };
  const source = [...original.trimEnd()];
  if (source.length > LONGEST) return formulaFault("too long", LONGEST + 1, `longer than ${LONGEST} characters`);
  let text = "";
  const places: number[] = [];
  const put = (characters: string, place: number) => {
    for (const character of characters) {
      text += character;
      places.push(place);
    }
  };
  let blank = false;
  for (const [index, character] of source.entries()) {
    const place = index + 1;
    if (/^[\s\p{Cf}]$/u.test(character)) {
      blank = text !== "";
      continue;
    }
    const plain = plainCharacters(character, source[index - 1], source[index + 1]);
    if (blank && /\d$/.test(text) && /^\d/.test(plain)) {
      return formulaFault("blank between digits", place, "a blank between two digits; write · before crystal water");
    }
    put(plain, place);
    blank = false;
  }
  places.push(source.length + 1);
  return { text, places };
}

function plainCharacters(character: string, before: string | undefined, after: string | undefined): string {
  const subscript = SUBSCRIPTS.indexOf(character);
  if (subscript >= 0) return String(subscript);
  const superscript = SUPERSCRIPTS.indexOf(character);
  if (superscript >= 0) {
    const plain = PLAIN_OF_SUPERSCRIPTS.charAt(superscript);
    return before !== undefined && SUPERSCRIPTS.includes(before) ? plain : `^${plain}`;
  }
  if (DOTS.has(character)) return "·";
  if (DASHES.has(character)) return "-";
  if (character === "⁄") return "/";
  if (character === "x" && after !== undefined && /[\s\d]/.test(after)) return "·";
  return FRACTIONS.get(character) ?? character;
}
