import { type CopiedBlock, type CopiedSource, RepeatKind, type Repeats } from "../../records/repeats.ts";
import type { SystemPoints } from "../../records/systems.ts";
import { averagedBlocks } from "./averaged-points.ts";
import { copiedBlocks } from "./copied-blocks.ts";
import { copiedSources, createSourceTally, type SourceTally } from "./copied-sources.ts";
import { type EqualPair, equalPairs, type Written } from "./equal-pairs.ts";

/** What the search needs to know of an edition. */
export interface RepeatContext {
  readonly written: Written;
  readonly nSources: number;
  /** Standard deviation (ln value) of the difference between independent measurements of a system by two sources. */
  readonly scatter: (system: number) => number;
}

/**
 * Finds the readings of an edition that are one measurement written more than once, so that each counts once in votes,
 * curves and grades:
 *
 * - the same number at the same temperature twice in a source (replicates that are told apart are not), or one value in
 *   two units;
 * - blocks that repeat another source to the digits given, at least three values and half of the block, where independent
 *   values would do so with a chance below 1 in 1000;
 * - blocks that give the mean of two or more other sources, by the same measure;
 * - single values of a source that repeats another one all over the edition ({@link copiedSources}).
 *
 * The source that comes first in the edition's list counts.
 *
 * @param points points of each system, by position
 * @param known sources found to repeat others by an earlier search of the whole edition
 * @returns by position of the system, undefined where every point counts; and the sources that repeat others
 */
export function repeatedPoints(
  points: readonly SystemPoints[],
  context: RepeatContext,
  known?: readonly CopiedSource[],
): { repeats: (Repeats | undefined)[]; sources: readonly CopiedSource[] } {
  const tally = createSourceTally(context.nSources);
  const pairs = points.map((of, system) => pairsOf(of, system, context, known === undefined ? tally : undefined));
  const sources = known ?? copiedSources(tally);
  const copied = new Map(sources.map((one) => [`${one.source}:${one.from}`, one]));
  const repeats = points.map((of, system) => {
    const near = pairs[system]!;
    const averages = averagedBlocks(of, context.scatter(system), (i) => context.written.rounding(system, i));
    if (near.length === 0 && averages.length === 0) return undefined;
    return repeatsOf(of, near, averages, copied, context.scatter(system));
  });
  return { repeats, sources };
}

const NOT_TOLD = (): void => {};

/** Pairs that may be one measurement; counted, where asked for. */
function pairsOf(
  of: SystemPoints,
  system: number,
  { written }: RepeatContext,
  tally: SourceTally | undefined,
): EqualPair[] {
  if (of.n < 2) return [];
  const near = equalPairs(of, system, written, tally?.compare ?? NOT_TOLD);
  for (const pair of near) {
    const [later, earlier] = [of.source[pair.later]!, of.source[pair.earlier]!];
    if (later !== earlier) tally?.addPair(later, earlier, pair);
  }
  return near.filter(({ equal, close }) => equal || close);
}

/** Decides which of a system's equal pairs are one measurement. */
function repeatsOf(
  of: SystemPoints,
  pairs: readonly EqualPair[],
  averages: readonly CopiedBlock[],
  copied: ReadonlyMap<string, CopiedSource>,
  scatter: number,
): Repeats | undefined {
  const countedAs = Int32Array.from({ length: of.n }, (_, i) => i);
  const kind = new Uint8Array(of.n);
  const mark = (point: number, as: number, why: number) => {
    if (kind[point] !== RepeatKind.counts) return;
    kind[point] = why;
    countedAs[point] = countedAs[as]!;
  };
  const own = (pair: EqualPair) => of.source[pair.later] === of.source[pair.earlier];
  for (const pair of pairs)
    if (own(pair) && pair.equal)
      mark(pair.later, pair.earlier, pair.sameUnit ? RepeatKind.sameReading : RepeatKind.twoUnits);
  const between = pairs.filter((pair) => !own(pair));
  const blocks = copiedBlocks(of, between, scatter);
  const isCopied = new Map(blocks.map((block) => [block, new Set(block.equal)]));
  for (const [block, equal] of isCopied)
    for (const pair of between)
      if (pair.equal && equal.has(pair.later) && of.source[pair.earlier] === block.from[0])
        mark(pair.later, pair.earlier, RepeatKind.copiedBlock);
  const used = new Set<CopiedSource>();
  for (const pair of between) {
    const source = copied.get(`${of.source[pair.later]}:${of.source[pair.earlier]}`);
    if (source === undefined || kind[pair.later] !== RepeatKind.counts) continue;
    mark(pair.later, pair.earlier, RepeatKind.copiedSource);
    used.add(source);
  }
  const means = averages.filter(({ equal }) => equal.every((i) => kind[i] === RepeatKind.counts));
  for (const { equal, from } of means) for (const i of equal) mark(i, firstOf(of, from, i), RepeatKind.average);
  if (kind.every((why) => why === RepeatKind.counts)) return undefined;
  return { countedAs, kind, blocks: [...blocks, ...means], sources: [...used] };
}

/** First point of the sources behind a mean, at its temperature. */
function firstOf({ n, source, temperatureK }: SystemPoints, from: readonly number[], point: number): number {
  let first = point;
  for (let j = n - 1; j >= 0; j--)
    if (source[j] === from[0] && Math.abs(temperatureK[j]! - temperatureK[point]!) < 0.011) first = j;
  return first;
}
