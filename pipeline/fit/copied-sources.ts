import type { CopiedSource } from "../records/repeats.ts";
import { type EqualPair, NEAR_WIDTHS } from "./equal-pairs.ts";

/** Equal values from which a source is taken to repeat another, and the largest share of them that chance may explain. */
const [LEAST_EQUAL, LARGEST_CHANCE_SHARE] = [5, 0.1];
/** From this many widths on a pair is no copy, and tells how densely independent values lie. */
const APART_WIDTHS = 3;
/** The distances of pairs are counted in bins of a quarter in ln distance, from this ln distance on. */
const [BINS, BINS_PER_UNIT, LOWEST] = [64, 4, -12];

interface Counts {
  readonly source: number;
  readonly from: number;
  /** Pairs at one temperature by ln of their distance, and how many there are. */
  readonly distances: Int32Array;
  compared: number;
  /** Pairs within {@link NEAR_WIDTHS} widths, and the sum of those widths. */
  near: number;
  widths: number;
  equal: number;
  /** Pairs between {@link APART_WIDTHS} and {@link NEAR_WIDTHS} widths apart. */
  apart: number;
}

/** Counts of pairs of points by source and the source before it. */
export interface SourceTally {
  /** Adds a pair at one temperature, so far apart in ln value. */
  readonly compare: (later: number, earlier: number, apart: number) => void;
  /** Adds a near pair. */
  readonly addPair: (later: number, earlier: number, pair: EqualPair) => void;
  readonly counts: () => readonly Counts[];
}

/** @param nSources number of sources in the edition's list */
export function createSourceTally(nSources: number): SourceTally {
  const known = new Map<number, Counts>();
  const countsOf = (source: number, from: number): Counts => {
    const key = source * nSources + from;
    let counts = known.get(key);
    if (counts === undefined) {
      const distances = new Int32Array(BINS);
      counts = { source, from, distances, compared: 0, near: 0, widths: 0, equal: 0, apart: 0 };
      known.set(key, counts);
    }
    return counts;
  };
  return {
    compare: (later, earlier, apart) => {
      const counts = countsOf(later, earlier);
      const bin = Math.floor((Math.log(apart) - LOWEST) * BINS_PER_UNIT);
      counts.distances[Math.min(BINS - 1, Math.max(0, bin))]!++;
      counts.compared++;
    },
    addPair: (later, earlier, { width, apart, equal, close }) => {
      const counts = countsOf(later, earlier);
      counts.near++;
      counts.widths += width;
      if (equal || close) counts.equal++;
      else if (apart > APART_WIDTHS * width) counts.apart++;
    },
    counts: () => [...known.values()],
  };
}

/**
 * Sources whose values are those of a source before them far more often than chance would have it: at least five, and
 * nine tenths of them beyond chance. Chance is the larger of two figures: what the scatter of the pairs that are not equal
 * says (1.4826 times their median distance, as of a normal distribution), and what the number of pairs says that lie near
 * without being equal.
 */
export function copiedSources(tally: SourceTally): CopiedSource[] {
  return tally
    .counts()
    .map((counts) => {
      const { source, from, compared, equal } = counts;
      return { source, from, compared, equal, byChance: expectedByChance(counts) };
    })
    .filter(({ equal, byChance }) => equal >= LEAST_EQUAL && byChance <= LARGEST_CHANCE_SHARE * equal)
    .sort((a, b) => a.source - b.source || a.from - b.from);
}

function expectedByChance({ distances, compared, near, widths, equal, apart }: Counts): number {
  if (near === 0) return 0;
  const fromNeighbours = apart / (NEAR_WIDTHS - APART_WIDTHS);
  const unequal = compared - equal;
  if (unequal === 0) return fromNeighbours;
  // Equal pairs are the nearest ones: the median of the others lies so far up.
  let rank = equal + unequal / 2;
  const bin = distances.findIndex((count) => {
    rank -= count;
    return rank <= 0;
  });
  const scatter = 1.4826 * Math.exp(LOWEST + (bin + 0.5) / BINS_PER_UNIT);
  const each = Math.min(1, (2 * widths) / near / (Math.sqrt(2 * Math.PI) * scatter));
  return Math.max(fromNeighbours, each * compared);
}
