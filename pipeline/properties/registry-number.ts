import { digitsOnly, originalsOfDate } from "./registry-number-originals.ts";

/** A CAS Registry Number that passed its check digit, in its usual spelling. */
export interface RegistryNumber {
  readonly ok: true;
  readonly cas: string;
}

/** Why a text is not a CAS Registry Number. */
export interface RegistryNumberFault {
  readonly ok: false;
  readonly fault: "shape" | "check digit" | "date";
  readonly message: string;
  /** Registry numbers the text may have been, with the right check digit: to be confirmed, never assumed. */
  readonly suggestions: readonly string[];
}

/**
 * Reads a CAS Registry Number: 2 to 7 digits, 2 digits, check digit. Dashes of every kind, blanks around it, a leading
 * "CAS" and the apostrophe by which a spreadsheet marks a text are folded; nothing else is.
 *
 * Check digit: the digits left of it, numbered 1, 2, 3 ... from right to left; the sum of digit times number, modulo 10.
 * A spreadsheet reads `7758-02-3` as a date; such cells are recognised, in any way of writing a date, and the likely
 * originals suggested. So are numbers that lost their hyphens or were padded with zeros.
 *
 * @example readRegistryNumber("7732-18-5") // { ok: true, cas: "7732-18-5" }
 * @example readRegistryNumber("03/02/7758") // fault "date", suggestions ["7758-02-3"]
 * @see CAS, Check Digit Verification of CAS Registry Numbers.
 */
export function readRegistryNumber(text: string): RegistryNumber | RegistryNumberFault {
  const folded = text
    .replace(/[‐‑‒–—−﹣－]/g, "-")
    .replace(/\p{Cf}/gu, "")
    .trim()
    .replace(/^['’]\s*/, "")
    .replace(/^CAS(?:[ -]?RN|[ -]?No\.?|[ -]?number|-?#)?[ :.]*/i, "")
    .replace(/^\[(.*)\]$/, "$1");
  const shape = SHAPE.exec(folded);
  if (shape === null) return notOfShape(folded);
  const [, first = "", second = "", digit = ""] = shape;
  const expected = checkDigit(first + second);
  if (Number(digit) === expected) return { ok: true, cas: folded };
  const message = `the check digit of ${folded} should be ${expected}: a digit is wrong or two are exchanged`;
  return { ok: false, fault: "check digit", message, suggestions: [] };
}

const SHAPE = /^([1-9]\d{1,6})-(\d\d)-(\d)$/;

/** True for a CAS Registry Number of the right shape and check digit (see {@link readRegistryNumber}). */
export function isRegistryNumber(text: string): boolean {
  return readRegistryNumber(text).ok;
}

/** Check digit of the digits in front of it: sum over i of i times the i-th digit from the right, modulo 10. */
function checkDigit(digits: string): number {
  let sum = 0;
  for (let position = 1; position <= digits.length; position++) {
    sum += position * Number(digits.at(-position));
  }
  return sum % 10;
}

/** Registry number of a first and second block with its check digit. */
const completed = (first: string, second: string): string => `${first}-${second}-${checkDigit(first + second)}`;

/** The text as a registry number if its digits are one once the hyphens are set, else nothing. */
function hyphenated(digits: string): string[] {
  const cas = `${digits.slice(0, -3)}-${digits.slice(-3, -1)}-${digits.slice(-1)}`;
  return SHAPE.test(cas) && completed(digits.slice(0, -3), digits.slice(-3, -1)) === cas ? [cas] : [];
}

function notOfShape(text: string): RegistryNumberFault {
  const originals = originalsOfDate(text)?.flatMap(({ first, second, digit }) => {
    const cas = completed(first, second);
    // A spreadsheet knows no day 0.
    return !cas.endsWith("-0") && (digit === undefined || cas.endsWith(`-${digit}`)) ? [cas] : [];
  });
  const suggestions = [...new Set(originals ?? [])];
  const bare = hyphenated(digitsOnly(text));
  // A whole number can be both: a number without its hyphens, or the day count by which a spreadsheet keeps a date.
  const plainDate = originals !== undefined && /[A-Za-z]|\d{4}/.test(text) && !/^\d+$/.test(text);
  if (plainDate || (suggestions.length > 0 && bare.length === 0)) {
    const likely = suggestions.length === 0 ? "" : `, likely ${suggestions.join(" or ")}`;
    const message = `a registry number that a spreadsheet turned into a date${likely}: format the column as text`;
    return { ok: false, fault: "date", message, suggestions };
  }
  const message = "not of the shape of a registry number: 2 to 7 digits, hyphen, 2 digits, hyphen, 1 digit";
  return { ok: false, fault: "shape", message, suggestions: [...bare, ...suggestions] };
}
