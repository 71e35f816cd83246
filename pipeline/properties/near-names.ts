import { nameKey } from "./name-key.ts";

/** Longest text compared: a hostile cell may have a million characters. */
const LONGEST = 120;

/**
 * Names close to a text that is no known name, nearest first: for "did you mean", never to be assumed.
 *
 * Distance: insertions, deletions, substitutions and exchanges of neighbours between the folded spellings without
 * hyphens and commas; at most 1 for up to 5 characters, 2 for up to 12, 3 beyond. O(length of text x letters of all
 * names).
 */
export function nearNames(text: string, names: Iterable<readonly [key: string, name: string]>, most = 3): string[] {
  const wanted = skeleton(nameKey(text.slice(0, LONGEST)));
  const limit = wanted.length <= 5 ? 1 : wanted.length <= 12 ? 2 : 3;
  const nearest = new Map<string, number>();
  if (wanted.length < 3) return [];
  for (const [key, name] of names) {
    const candidate = skeleton(key);
    if (Math.abs(candidate.length - wanted.length) > limit) continue;
    const distance = editDistance(wanted, candidate, limit);
    if (distance <= limit && distance < (nearest.get(name) ?? Number.POSITIVE_INFINITY)) nearest.set(name, distance);
  }
  return [...nearest]
    .sort(([a, da], [b, db]) => da - db || (a < b ? -1 : a > b ? 1 : 0))
    .slice(0, most)
    .map(([name]) => name);
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
