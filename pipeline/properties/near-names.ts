import { nameKey } from "./name-key.ts";

/** Longest text compared: a hostile cell may have a million characters. */
const LONGEST = 120;

/** A name made ready for comparing. */
export interface ComparedName {
  readonly name: string;
  readonly skeleton: string;
  /** A bit for each of the letters and digits it holds. */
  readonly letters: number;
}

/** Names made ready once for many comparisons. */
export function comparedNames(names: Iterable<readonly [key: string, name: string]>): ComparedName[] {
  return Array.from(names, ([key, name]) => ({ name, skeleton: skeleton(key), letters: lettersOf(skeleton(key)) }));
}

/**
 * Names close to a text that is no known name, nearest first: for "did you mean", never to be assumed.
 *
 * Distance: insertions, deletions, substitutions and exchanges of neighbours between the folded spellings without
 * hyphens and commas; at most 1 for up to 5 characters, 2 for up to 12, 3 beyond. O(length of text x letters of all
 * names); most names are passed over because more letters are missing than that.
 */
export function nearNames(text: string, names: Iterable<readonly [key: string, name: string]>, most = 3): string[] {
  return nearest(text, comparedNames(names), most);
}

/** As {@link nearNames}, for names made ready before. */
export function nearest(text: string, names: readonly ComparedName[], most = 3): string[] {
  const wanted = skeleton(nameKey(text.slice(0, LONGEST)));
  const limit = wanted.length <= 5 ? 1 : wanted.length <= 12 ? 2 : 3;
  const letters = lettersOf(wanted);
  const found = new Map<string, number>();
  if (wanted.length < 3) return [];
  for (const candidate of names) {
    if (Math.abs(candidate.skeleton.length - wanted.length) > limit) continue;
    if (bits(letters & ~candidate.letters) > limit || bits(candidate.letters & ~letters) > limit) continue;
    const distance = editDistance(wanted, candidate.skeleton, limit);
    const before = found.get(candidate.name) ?? Number.POSITIVE_INFINITY;
    if (distance <= limit && distance < before) found.set(candidate.name, distance);
  }
  return [...found]
    .sort(([a, da], [b, db]) => da - db || (a < b ? -1 : a > b ? 1 : 0))
    .slice(0, most)
    .map(([name]) => name);
}

/** A bit a letter from a to z; other characters share the rest, so that a missing bit is always a missing character. */
function lettersOf(text: string): number {
  let letters = 0;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    letters |= 1 << (code >= 97 && code <= 122 ? code - 97 : 26 + (code % 6));
  }
  return letters;
}

function bits(mask: number): number {
  let rest = mask;
  let count = 0;
  for (; rest !== 0; rest &= rest - 1) count++;
  return count;
}

const skeleton = (key: string): string => key.replace(/[-,]/g, "");

/** Optimal string alignment distance, given up as `limit + 1` once every path is longer. */
function editDistance(a: string, b: string, limit: number): number {
  let beforePrevious: number[] = [];
  let previous = Array.from({ length: b.length + 1 }, (_, index) => index);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const substitution = at(previous, j - 1) + (a[i - 1] === b[j - 1] ? 0 : 1);
      let cost = Math.min(substitution, at(previous, j) + 1, at(current, j - 1) + 1);
      const exchanged = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      if (exchanged) cost = Math.min(cost, at(beforePrevious, j - 2) + 1);
      current.push(cost);
    }
    if (current.every((cost) => cost > limit)) return limit + 1;
    beforePrevious = previous;
    previous = current;
  }
  return at(previous, b.length);
}

const at = (row: readonly number[], index: number): number => row[index] ?? Number.POSITIVE_INFINITY;
