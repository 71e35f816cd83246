import { readRegistryNumber } from "./registry-number.ts";

/** A registry number that a faulty text may have been, and the substance the tables list it for. */
export interface SuggestedNumber {
  readonly cas: string;
  readonly name: string | undefined;
}

/** Most suggestions worth reading. */
const MOST = 4;

/**
 * Registry numbers that a faulty text may have been: the originals of a date or of a number without hyphens, listed ones
 * first, else listed numbers that differ by one digit or by one exchange of neighbouring digits. For a question only.
 */
export function suggestedNumbers(
  text: string,
  listed: Iterable<{ readonly cas: string | undefined; readonly name: string }>,
): SuggestedNumber[] {
  const read = readRegistryNumber(text);
  if (read.ok) return [];
  const nameOf = new Map<string, string>();
  for (const { cas, name } of listed) if (cas !== undefined) nameOf.set(cas, name);
  const digits = text.replace(/\D/g, "");
  const near =
    digits.length > 10 ? [] : [...nameOf.keys()].filter((cas) => oneSlip(digits, cas.replaceAll("-", ""))).sort();
  const candidates = read.suggestions.length > 0 ? read.suggestions : near;
  const known = candidates.filter((cas) => nameOf.has(cas));
  const rest = candidates.filter((cas) => !nameOf.has(cas));
  return [...known, ...rest].slice(0, MOST).map((cas) => ({ cas, name: nameOf.get(cas) }));
}

/** One digit replaced, lost or added, or two neighbours exchanged. */
function oneSlip(a: string, b: string): boolean {
  if (Math.abs(a.length - b.length) > 1 || a === b) return false;
  let start = 0;
  while (start < Math.min(a.length, b.length) && a[start] === b[start]) start++;
  let end = 0;
  while (end < Math.min(a.length, b.length) - start && a.at(-1 - end) === b.at(-1 - end)) end++;
  const [left, right] = [a.slice(start, a.length - end), b.slice(start, b.length - end)];
  const exchanged = left.length === 2 && right.length === 2 && left[0] === right[1] && left[1] === right[0];
  return exchanged || Math.max(left.length, right.length) <= 1;
}
