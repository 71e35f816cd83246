import type { CopiedSource } from "../../records/repeats.ts";
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
 * nine tenths of them beyond chance ({@link expectedByChance}).
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

/** Density at its middle over that between half a and one and a half standard deviations: what a flat density leaves out. */
const PEAKED = 1.6;

/**
 * Equal pairs expected among independent values, from the pairs that are plainly no copies, {@link APART_WIDTHS} widths apart
 * and more. Where most of those lie beyond {@link NEAR_WIDTHS} widths the density is flat in between, and the near ones
 * tell it; where they lie nearer, as in tables that agree closely, their median distance tells the scatter
 * (1.4826 times the median, as of a normal distribution).
 */
function expectedByChance({ distances, compared, near, widths, apart }: Counts): number {
  if (near === 0) return 0;
  const fromNeighbours = apart / (NEAR_WIDTHS - APART_WIDTHS);
  const width = widths / near;
  const first = Math.max(0, Math.ceil((Math.log(APART_WIDTHS * width) - LOWEST) * BINS_PER_UNIT));
  const beyond = distances.subarray(first);
  let rank = beyond.reduce((sum, count) => sum + count, 0) / 2;
  if (rank === 0) return fromNeighbours;
  const bin = beyond.findIndex((count) => {
    rank -= count;
    return rank <= 0;
  });
  const median = Math.exp(LOWEST + (first + bin + 0.5) / BINS_PER_UNIT);
  if (median > NEAR_WIDTHS * width) return fromNeighbours;
  const each = Math.min(1, (2 * width) / (Math.sqrt(2 * Math.PI) * 1.4826 * median));
  return Math.max(fromNeighbours, PEAKED * each * compared);
}
