/** Mark between whole and decimal digits in the numbers of a source. */
export type DecimalMark = "." | ",";

/** A number read from text, or why the text is none; `found` is a phrase for a message. */
export type NumberText =
  | { readonly ok: true; readonly value: number }
  | {
      readonly ok: false;
      readonly code: "not-a-number" | "ambiguous-number" | "number-out-of-range";
      readonly found: string;
    };

/** A value known only as a range; a side that is open is absent. */
export type IntervalText =
  | { readonly ok: true; readonly low?: number; readonly high?: number }
  | (NumberText & { ok: false });

// Both patterns match in linear time: a hostile cell may have a million digits.
const WITH_POINT = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?$/;
const WITH_COMMA = /^[+-]?(?:\d+(?:,\d*)?|,\d+)(?:[eE][+-]?\d+)?$/;

/** No measured value needs more characters; longer texts are refused unread. */
const MAX_LENGTH = 400;

/**
 * A number from the text of one trimmed cell: `12`, `-1.5`, `+2`, `.5`, `5.`, `1e-3`, `1.2E+05`; with a comma where
 * `decimal` is `,`. The true minus sign (U+2212) and `1.2×10^-3`, `1.2 x 10^-3`, `1.2·10⁻³` are read as well.
 *
 * Refused, never guessed: hexadecimal, NaN and Infinity, thousands separators, the other decimal mark, blanks inside, and
 * what a double cannot hold (`1.2e400`, or `1e-400`, which would become 0).
 */
export function parseNumber(text: string, decimal: DecimalMark): NumberText {
  if (text.length > MAX_LENGTH) return notANumber(text);
  if (decimal === ".") {
    if (WITH_POINT.test(text)) return storable(text, text);
  } else if (WITH_COMMA.test(text)) return storable(text.replace(",", "."), text);
  const plain = withPlainExponent(text);
  const read = plain === text ? undefined : parseNumber(plain, decimal);
  return read?.ok ? read : refuse(plain, text);
}

/**
 * A range from the text of one trimmed cell: `<0.05`, `≤ 0.05`, `>1`, `>= 1`, `0.2-0.4`, `0.2 – 0.4`, `0.2 to 0.4`.
 * @returns undefined where the text has not the form of a range (try {@link parseNumber}); a problem where its limits are
 *   no numbers or the first is above the second.
 */
export function parseInterval(text: string, decimal: DecimalMark): IntervalText | undefined {
  if (text.length > MAX_LENGTH) return undefined;
  const limit = /^(<=?|=<|≤|⩽|>=?|=>|≥|⩾)\s*(\S.*)$/.exec(text);
  if (limit !== null) {
    const [, sign = "", rest = ""] = limit;
    const read = parseNumber(rest, decimal);
    if (!read.ok) return read;
    return /[<≤⩽]/.test(sign) ? { ok: true, high: read.value } : { ok: true, low: read.value };
  }
  const range = RANGE.exec(text);
  if (range === null) return undefined;
  const [low, high] = [parseNumber(range[1] ?? "", decimal), parseNumber(range[2] ?? "", decimal)];
  if (!low.ok) return low;
  if (!high.ok) return high;
  if (low.value <= high.value) return { ok: true, low: low.value, high: high.value };
  return { ok: false, code: "not-a-number", found: `${quoted(text)} is a range whose first limit is above its second` };
}

const NUMBER_LIKE = "[+\\-\u2212]?(?:\\d[\\d.,]*|[.,]\\d[\\d.,]*)(?:[eE][+\\-\u2212]?\\d+)?";
const RANGE = new RegExp(`^(${NUMBER_LIKE})\\s*(?:[-\u2013\u2014]|to)\\s*(${NUMBER_LIKE})$`);

/** Value of a text that has the form of a number, unless a double cannot hold it. */
function storable(plain: string, text: string): NumberText {
  const value = Number(plain);
  // A value of 0 from a text with a digit other than 0 is an underflow, not a zero.
  const lost = !Number.isFinite(value) || (value === 0 && /[1-9]/.test(plain.split(/[eE]/, 1)[0] ?? ""));
  return lost
    ? { ok: false, code: "number-out-of-range", found: `${quoted(text)} is beyond what can be stored` }
    : { ok: true, value };
}

const SUPERSCRIPTS = "⁰¹²³⁴⁵⁶⁷⁸⁹";

/** The true minus sign as `-`, and a typeset power of ten as an exponent; other texts as they are. */
function withPlainExponent(text: string): string {
  const minus = text.replaceAll("\u2212", "-");
  const power = /^([^\s×x·*]+)\s?[×x·*]\s?10(?:\^([+-]?\d+)|([⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+))$/.exec(minus);
  if (power === null) return minus;
  const [, mantissa = "", caret, raised = ""] = power;
  // A mantissa with an exponent of its own would be two powers of ten: leave it to be refused.
  if (/[eE]/.test(mantissa)) return text;
  const digits = [...raised].map((c) => (c === "⁻" ? "-" : c === "⁺" ? "+" : String(SUPERSCRIPTS.indexOf(c))));
  return `${mantissa}e${caret ?? digits.join("")}`;
}

const SEPARATED = /^[+-]?\d{1,3}(?:([,.'’ \u00a0\u2009\u202f])\d{3})(?:\1\d{3})*(?:([.,])\d*)?$/;
const OTHER_MARK = /^[+-]?\d*([.,])\d*(?:[eE][+-]?\d+)?$/;

/** Why a text is no number: thousands separators and the other decimal mark are told apart from plain nonsense. */
function refuse(text: string, shown: string): NumberText {
  const mark = OTHER_MARK.exec(text)?.[1];
  const separator = SEPARATED.exec(text);
  if (separator?.[1] !== undefined && separator[1] !== separator[2]) {
    const whole = text.replaceAll(separator[1], "").replace(",", ".");
    const other = mark === undefined ? "" : ` or as ${text.replace(mark, ".")}`;
    return ambiguous(`${quoted(shown)} can be read as ${whole} (with a thousands separator)${other}`);
  }
  if (mark !== undefined && /\d/.test(text)) {
    const [plain, without] = [text.replace(mark, "."), text.replace(mark, "")];
    const name = mark === "," ? "comma" : "point";
    const why = `the numbers of this source are not read with a decimal ${name}`;
    return ambiguous(`${quoted(shown)} can be read as ${plain} or as ${without}: ${why}`);
  }
  return notANumber(shown);
}

const quoted = (text: string) => `"${text.length > 80 ? `${text.slice(0, 80)}…` : text}"`;
const ambiguous = (found: string): NumberText => ({ ok: false, code: "ambiguous-number", found });
const notANumber = (text: string): NumberText => ({
  ok: false,
  code: "not-a-number",
  found: text === "" ? "the cell is empty" : `${quoted(text)} is not a number`,
});
