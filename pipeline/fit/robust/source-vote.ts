/** What the sources of a system say of one another. */
export interface Vote {
  /** True if one group of agreeing sources is more than half of all. */
  readonly majority: boolean;
  /** Groups of agreeing sources, largest first; the first is the sound one where there is a majority. */
  readonly camps: readonly (readonly number[])[];
}

/**
 * Every laboratory has one vote, however many points it has; sources of one laboratory share it. The largest set of voters whose locations lie within
 * `tolerance` of one another (widened by what the two outermost do not know about themselves) is taken out first, then
 * the largest of the rest, and so on. Between sets of equal size the narrower comes first, then the lower.
 *
 * @param voters numbers of the sources that vote
 * @param location location of each source, ln value at the common reference temperature, by source number
 * @param locationVariance its variance
 * @param tolerance width within which sources agree, ln value
 * @param weight what the vote of each source counts, by source number; absent: 1
 */
export function voteBySource(
  voters: readonly number[],
  location: Float64Array,
  locationVariance: Float64Array,
  tolerance: number,
  weight?: Float64Array,
): Vote {
  const left = [...voters].sort((a, b) => location[a]! - location[b]! || a - b);
  const camps: number[][] = [];
  while (left.length > 0) {
    const [from, to] = widestWindow(left, location, locationVariance, tolerance, weight);
    camps.push(left.splice(from, to - from).sort((a, b) => a - b));
  }
  return { majority: isMajority(camps[0] ?? [], voters, weight), camps };
}

/** Rounding of sums of shares such as a third must not make a majority of a half. */
const ROUNDING = 1e-9;

/** Whether some of the voters carry more than half of all votes. */
export function isMajority(some: readonly number[], voters: readonly number[], weight?: Float64Array): boolean {
  return 2 * votesOf(some, weight) > votesOf(voters, weight) + ROUNDING;
}

function votesOf(voters: readonly number[], weight?: Float64Array): number {
  return weight === undefined ? voters.length : voters.reduce((sum, voter) => sum + weight[voter]!, 0);
}

/** Largest run [from, to) of sorted sources whose ends agree. */
function widestWindow(
  sorted: readonly number[],
  location: Float64Array,
  variance: Float64Array,
  tolerance: number,
  weight?: Float64Array,
): [from: number, to: number] {
  let best: [number, number] = [0, 1];
  let bestWidth = 0;
  let bestVotes = votesOf(sorted.slice(0, 1), weight);
  for (let from = 0; from < sorted.length; from++) {
    for (let to = from + 1; to <= sorted.length; to++) {
      const [a, b] = [sorted[from]!, sorted[to - 1]!];
      const width = location[b]! - location[a]!;
      const blur = a === b ? 0 : 2 * Math.sqrt(variance[a]! + variance[b]!);
      if (width > Math.max(tolerance, tolerance / 2 + blur)) continue;
      const votes = votesOf(sorted.slice(from, to), weight);
      if (votes < bestVotes - ROUNDING || (votes < bestVotes + ROUNDING && width >= bestWidth)) continue;
      best = [from, to];
      bestWidth = width;
      bestVotes = votes;
    }
  }
  return best;
}
