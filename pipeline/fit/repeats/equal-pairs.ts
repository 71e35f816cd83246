import type { SystemPoints } from "../../records/systems.ts";

/** How the value of a point was written. */
export interface Written {
  /** Half a unit of the last digit given, in ln value. */
  readonly rounding: (system: number, point: number) => number;
  /** Unit as reported, by number. */
  readonly unit: (system: number, point: number) => number;
  /** Replicate as stated, by number; 0 where none is. */
  readonly replicate: (system: number, point: number) => number;
  /** Whether the value was written as a logarithm. */
  readonly logarithm: (system: number, point: number) => boolean;
}

/** Values without digits of their own, as computed: equal to the last digit or not at all. */
export const AS_COMPUTED: Written = {
  rounding: () => 0,
  unit: () => 0,
  replicate: () => 0,
  logarithm: () => false,
};

/** Two points of a system at one temperature whose values are near. */
export interface EqualPair {
  /** Positions of the points; the later one is of the later source, or the later row of one source. */
  readonly later: number;
  readonly earlier: number;
  /** How near two writings of one value come by rounding alone, ln value. */
  readonly width: number;
  /** How far apart they are, ln value. */
  readonly apart: number;
  /** Equal to the digits given. */
  readonly equal: boolean;
  /** Logarithms within 0.01: re-reported values differ by as much through molar masses and rounding. */
  readonly close: boolean;
  readonly sameUnit: boolean;
}

/** Values that agree to this part are the same number, whatever units they were written in. */
const SAME_VALUE = 2e-4;
/** Values in digits coarser than this say nothing by being equal: 1 %, or two decimals of a logarithm. */
const COARSEST = 0.0125;
/** 0.01 of a decadic logarithm, in ln value. */
export const CLOSE_LOGARITHM = 0.01 * Math.LN10 + 1e-9;
/** Temperatures that agree to this (K) are the same reading. */
export const SAME_TEMPERATURE_K = 0.011;
/** Pairs up to this many widths apart tell how often independent values come near. */
export const NEAR_WIDTHS = 9;
/** Beyond this (ln value) no two writings of one value lie, and no pair is looked at. */
const FARTHEST = NEAR_WIDTHS * CLOSE_LOGARITHM;

/**
 * Pairs of points at one temperature whose values lie within {@link NEAR_WIDTHS} widths of one another.
 *
 * @param onCompared told the sources of every pair at one temperature, however far apart its values
 */
export function equalPairs(
  of: SystemPoints,
  system: number,
  written: Written,
  onCompared: (later: number, earlier: number, apart: number) => void,
): EqualPair[] {
  const { n, temperatureK, lnValue, source } = of;
  const pairs: EqualPair[] = [];
  for (let i = 1; i < n; i++) {
    for (let j = 0; j < i; j++) {
      if (!(Math.abs(temperatureK[i]! - temperatureK[j]!) < SAME_TEMPERATURE_K)) continue;
      const [later, earlier] = source[i]! >= source[j]! ? [i, j] : [j, i];
      const ofOneSource = source[i] === source[j];
      const apart = Math.abs(lnValue[i]! - lnValue[j]!);
      if (!ofOneSource) onCompared(source[later]!, source[earlier]!, apart);
      if (!(apart < FARTHEST)) continue;
      const pair = pairOf(system, later, earlier, apart, ofOneSource, written);
      if (pair !== undefined) pairs.push(pair);
    }
  }
  return pairs;
}

function pairOf(
  system: number,
  later: number,
  earlier: number,
  apart: number,
  ofOneSource: boolean,
  written: Written,
): EqualPair | undefined {
  const sameUnit = written.unit(system, later) === written.unit(system, earlier);
  if (ofOneSource) {
    const [a, b] = [written.replicate(system, later), written.replicate(system, earlier)];
    if (a !== b) return undefined;
  }
  const rounding = Math.max(written.rounding(system, later), written.rounding(system, earlier));
  const width = Math.max(SAME_VALUE, rounding + 1e-9);
  // In one source and unit only the very same number is the same reading.
  const equal = ofOneSource && sameUnit ? apart < 1e-9 : width <= COARSEST && apart <= width;
  const logarithms = !ofOneSource && written.logarithm(system, later) && written.logarithm(system, earlier);
  if (ofOneSource && !equal) return undefined;
  const reach = logarithms ? CLOSE_LOGARITHM : width;
  if (width > COARSEST || apart > NEAR_WIDTHS * reach) return undefined;
  return { later, earlier, width: reach, apart, equal, close: logarithms && apart <= CLOSE_LOGARITHM, sameUnit };
}
