/** A source that repeats another one's values over the whole edition, found where both report one temperature. */
export interface CopiedSource {
  readonly source: number;
  readonly from: number;
  /** Values of the source that stand beside one of the other at the same temperature, and those of them that are equal. */
  readonly compared: number;
  readonly equal: number;
  /** Equal values expected by chance among the compared. */
  readonly byChance: number;
}

/** A block of a system that gives the values of others. */
export interface CopiedBlock {
  /** Positions in the edition's list: the source, and the one it repeats or those whose mean it gives. */
  readonly source: number;
  readonly from: readonly number[];
  /** Points of the block, those of them that could be compared, and those that are equal (positions among the points). */
  readonly points: number;
  readonly compared: readonly number[];
  readonly equal: readonly number[];
  /** ln of the chance that as many independent values are equal to the digits given. */
  readonly logChance: number;
}

/** Which points of a system are one measurement written more than once, and count once. */
export interface Repeats {
  /**
   * For each point the one that counts in its stead: itself where it counts; for the mean of others the first of them.
   */
  readonly countedAs: Int32Array;
  /** Why a point does not count: 0 it counts, else one of {@link RepeatKind}. */
  readonly kind: Uint8Array;
  readonly blocks: readonly CopiedBlock[];
  /** What the edition says of the sources behind single equal values; empty where no such value is here. */
  readonly sources: readonly CopiedSource[];
}

/** Why a point does not count. */
export const RepeatKind = {
  counts: 0,
  /** The same number in the same unit stands in its source before. */
  sameReading: 1,
  /** The same value in another unit stands in its source before. */
  twoUnits: 2,
  /** Its block repeats another source. */
  copiedBlock: 3,
  /** Its source repeats another one all over the edition. */
  copiedSource: 4,
  /** Its block gives the mean of other sources. */
  average: 5,
} as const;
