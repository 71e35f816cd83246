import type { CopiedBlock } from "../../records/repeats.ts";
import type { SystemPoints } from "../../records/systems.ts";
import { type EqualPair, SAME_TEMPERATURE_K } from "./equal-pairs.ts";

/** Equal pairs from which one source is taken to repeat another; fewer can be chance at the given rounding. */
export const LEAST_PAIRS = 3;
/** ln of the largest chance at which equal values are taken for copies: 1 in 1000. */
export const LARGEST_LOG_CHANCE = -Math.log(1000);

/**
 * Blocks of which at least half, and three values, are those of a source before them. The chance of an independent value
 * being equal is taken as 2 width/(sqrt(2 pi) scatter), of k among n as C(n, k) times the product.
 *
 * @param pairs pairs between sources
 * @param scatter standard deviation, ln value, of the difference between independent measurements by two sources
 */
export function copiedBlocks(of: SystemPoints, pairs: readonly EqualPair[], scatter: number): CopiedBlock[] {
  const twins = new Map<number, Map<number, Map<number, number>>>();
  for (const { later, earlier, width, equal } of pairs) {
    if (!equal) continue;
    const counts = entry(twins, of.source[later]!, () => new Map<number, Map<number, number>>());
    entry(counts, of.source[earlier]!, () => new Map<number, number>()).set(later, width);
  }
  return [...twins].flatMap(([source, counts]) => {
    const own = pointsOf(of, source);
    const most = [...counts].sort((a, b) => b[1].size - a[1].size || a[0] - b[0]);
    for (const [from, widths] of most) {
      const equal = [...widths.keys()].sort((a, b) => a - b);
      const logs = equal.map((i) => logChanceOfEqual(widths.get(i)!, scatter));
      const logChance = logs.reduce((sum, log) => sum + log, logChoose(own.length, equal.length));
      if (equal.length < LEAST_PAIRS || 2 * equal.length < own.length || logChance > LARGEST_LOG_CHANCE) continue;
      const there = pointsOf(of, from);
      const compared = own.filter((i) => there.some((j) => sameTemperature(of, i, j)));
      return [{ source, from: [from], points: own.length, compared, equal, logChance }];
    }
    return [];
  });
}

function entry<K, V>(map: Map<K, V>, key: K, make: () => V): V {
  const known = map.get(key);
  if (known !== undefined) return known;
  const made = make();
  map.set(key, made);
  return made;
}

/** Positions of the points of a source. */
export function pointsOf({ n, source }: SystemPoints, of: number): number[] {
  const points: number[] = [];
  for (let i = 0; i < n; i++) if (source[i] === of) points.push(i);
  return points;
}

export function sameTemperature({ temperatureK }: SystemPoints, i: number, j: number): boolean {
  return Math.abs(temperatureK[i]! - temperatureK[j]!) < SAME_TEMPERATURE_K;
}

/** ln of the chance that an independent value lies within `width` of another, ln value. */
export function logChanceOfEqual(width: number, scatter: number): number {
  return Math.log(Math.min(1, (2 * width) / (Math.sqrt(2 * Math.PI) * scatter)));
}

/** ln of the number of ways to choose k of n. */
export function logChoose(n: number, k: number): number {
  let sum = 0;
  for (let i = 1; i <= k; i++) sum += Math.log((n - k + i) / i);
  return sum;
}
