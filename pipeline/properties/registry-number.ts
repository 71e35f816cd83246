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
  /** Registry numbers the text may have been before a spreadsheet made a date of it: to be confirmed, never assumed. */
  readonly suggestions: readonly string[];
}

const MONTHS = "jan feb mar apr may jun jul aug sep oct nov dec".split(" ");

/**
 * Reads a CAS Registry Number: 2 to 7 digits, 2 digits, check digit. Dashes of every kind, blanks around it and a
 * leading "CAS" are folded; nothing else is.
 *
 * Check digit: the digits left of it, numbered 1, 2, 3 ... from right to left; the sum of digit times number, modulo 10.
 * A spreadsheet reads `7758-02-3` as a date; such cells are recognised and the likely originals suggested.
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
    .replace(/^CAS(?:[ -]?RN|[ -]?No\.?|[ -]?number|-?#)?[ :.]*/i, "")
    .replace(/^\[(.*)\]$/, "$1");
  const shape = /^([1-9]\d{1,6})-(\d\d)-(\d)$/.exec(folded);
  if (shape === null) return notOfShape(folded);
  const [, first = "", second = "", digit = ""] = shape;
  const expected = checkDigit(first + second);
  if (Number(digit) === expected) return { ok: true, cas: folded };
  const message = `the check digit of ${folded} should be ${expected}: a digit is wrong or two are exchanged`;
  return { ok: false, fault: "check digit", message, suggestions: [] };
}

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

function notOfShape(text: string): RegistryNumberFault {
  const suggestions = originalsOfDate(text);
  if (suggestions !== undefined) {
    const likely = suggestions.length === 0 ? "" : `, likely ${suggestions.join(" or ")}`;
    const message = `a registry number that a spreadsheet turned into a date${likely}: format the column as text`;
    return { ok: false, fault: "date", message, suggestions };
  }
  const message = "not of the shape of a registry number: 2 to 7 digits, hyphen, 2 digits, hyphen, 1 digit";
  return { ok: false, fault: "shape", message, suggestions: [] };
}

/** Registry numbers Y-MM-D that a spreadsheet would show as this date; undefined if the text is no date. */
function originalsOfDate(text: string): string[] | undefined {
  const date = /^(\d{1,4})[-/. ]+(\d{1,2}|[A-Za-z]{3,9})[-/. ]+(\d{1,4})(?:[ T]0{1,2}:00(?::00)?)?$/.exec(text);
  if (date === null) return undefined;
  const [, first = "", middle = "", last = ""] = date;
  const month = MONTHS.indexOf(middle.slice(0, 3).toLowerCase()) + 1;
  const m = month > 0 ? month : Number(middle);
  const readings =
    first.length === 4
      ? [{ year: first, month: m, day: Number(last) }]
      : [
          { year: last, month: m, day: Number(first) },
          ...(month > 0 ? [] : [{ year: last, month: Number(first), day: m }]),
        ];
  const possible = readings.filter((r) => r.year.length === 4 && isMonth(r.month) && r.day >= 1 && r.day <= 31);
  if (possible.length === 0) return undefined;
  // The day was the check digit, so that it is one digit.
  const candidates = possible.flatMap(({ year, month: number, day }) => {
    const second = String(number).padStart(2, "0");
    const blocks = firstBlocks(year).filter((block) => checkDigit(block + second) === day);
    return blocks.map((block) => `${block}-${second}-${day}`);
  });
  return [...new Set(candidates)];
}

const isMonth = (month: number): boolean => month >= 1 && month <= 12;

/** A year from 1930 to 2029 may stand for a two-digit first block that the spreadsheet completed. */
const firstBlocks = (year: string): string[] =>
  Number(year) >= 1930 && Number(year) <= 2029 ? [year, year.slice(2)] : [year];
