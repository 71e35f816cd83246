import type { CopiedBlock } from "../../records/repeats.ts";
import type { SystemPoints } from "../../records/systems.ts";
import {
  LARGEST_LOG_CHANCE,
  LEAST_PAIRS,
  logChanceOfEqual,
  logChoose,
  pointsOf,
  sameTemperature,
} from "./copied-blocks.ts";

/** Sources among which the members of a mean are sought: more would give chance too many ways. */
const MOST_SOURCES = 6;
/** A mean in digits coarser than this (ln value) says nothing. */
const COARSEST = 0.005;
const SAME_VALUE = 2e-4;
/** Members this many widths apart at least have a mean that is none of them. */
const SPREAD_WIDTHS = 3;

/**
 * Blocks whose values are the arithmetic mean of those of two or more other sources, to the digits given: at least three
 * values and half of the block, with a chance below 1 in 1000 over all sets of sources tried. Temperatures at which the
 * members themselves are equal say nothing.
 *
 * @param scatter standard deviation, ln value, of the difference between independent measurements by two sources
 * @param rounding half a unit of the last digit of a point, ln value
 */
export function averagedBlocks(of: SystemPoints, scatter: number, rounding: (point: number) => number): CopiedBlock[] {
  const sources = [...new Set(of.source)].sort((a, b) => a - b);
  if (sources.length < 3 || sources.length > MOST_SOURCES) return [];
  return sources.flatMap((source) => {
    const own = pointsOf(of, source);
    if (own.length < LEAST_PAIRS) return [];
    const sets = subsets(sources.filter((other) => other !== source));
    let best: CopiedBlock | undefined;
    for (const from of sets) {
      const block = meanOf(of, own, from, scatter, rounding);
      if (block === undefined || block.logChance + Math.log(sets.length) > LARGEST_LOG_CHANCE) continue;
      if (best === undefined || block.equal.length > best.equal.length) best = { ...block, source };
    }
    return best === undefined ? [] : [best];
  });
}

/** All sets of two or more. */
function subsets(sources: readonly number[]): number[][] {
  const sets: number[][] = [];
  for (let bits = 3; bits < 1 << sources.length; bits++) {
    const set = sources.filter((_, j) => (bits >> j) & 1);
    if (set.length > 1) sets.push(set);
  }
  return sets;
}

/** How many points of a block are the mean of a set of sources; undefined where too few are. */
function meanOf(
  of: SystemPoints,
  own: readonly number[],
  from: readonly number[],
  scatter: number,
  rounding: (point: number) => number,
): CopiedBlock | undefined {
  const compared: number[] = [];
  const equal: number[] = [];
  let logChance = 0;
  for (const i of own) {
    const members = from.map((source) => memberAt(of, source, i));
    if (members.includes(-1)) continue;
    const values = members.map((j) => of.lnValue[j]!);
    const apart = Math.abs(Math.log(values.reduce((sum, y) => sum + Math.exp(y), 0) / values.length) - of.lnValue[i]!);
    // Rounding is looked up only where the value may be the mean.
    const width = apart > COARSEST ? COARSEST : Math.max(SAME_VALUE, rounding(i) + 1e-9);
    if (width > COARSEST || Math.max(...values) - Math.min(...values) < SPREAD_WIDTHS * width) continue;
    compared.push(i);
    if (apart > width) continue;
    equal.push(i);
    logChance += logChanceOfEqual(width, scatter);
  }
  if (equal.length < LEAST_PAIRS || 2 * equal.length < own.length) return undefined;
  return {
    ...{ source: -1, from, points: own.length, compared, equal },
    logChance: logChance + logChoose(compared.length, equal.length),
  };
}

/** The first point of a source at the temperature of another point; -1 where there is none. */
function memberAt(of: SystemPoints, source: number, point: number): number {
  for (let j = 0; j < of.n; j++) if (of.source[j] === source && sameTemperature(of, j, point)) return j;
  return -1;
}
