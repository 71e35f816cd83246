import type { SystemPoints } from "../records/systems.ts";

/** Values that agree to this (ln value), at temperatures that agree to this (K), are one reading written twice. */
const SAME_VALUE = 2e-4;
const SAME_TEMPERATURE_K = 0.011;
/** Equal pairs from which, where they are at least half of a block, the block is a copy; fewer can be chance. */
const LEAST_PAIRS = 3;

/**
 * Points of a source that repeat those of a source before it exactly, in a block that does so for three points or more
 * and for at least half of them: one measurement that is written twice counts once. For independent values with a scatter
 * of 3 % the chance of one such pair is 0.4 %, of three in one block below one in a million.
 *
 * @returns 1 for each repeated point; undefined where there is none
 */
export function repeatedPoints({ n, source, temperatureK, lnValue }: SystemPoints): Uint8Array | undefined {
  let repeated: Uint8Array | undefined;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const same = Math.abs(lnValue[i]! - lnValue[j]!) < SAME_VALUE;
      if (!same || source[j]! >= source[i]! || Math.abs(temperatureK[i]! - temperatureK[j]!) > SAME_TEMPERATURE_K)
        continue;
      repeated ??= new Uint8Array(n);
      repeated[i] = 1;
      break;
    }
  }
  return repeated === undefined ? undefined : onlyCopies(repeated, source);
}

/** Leaves the marks of blocks that are copies alone. */
function onlyCopies(repeated: Uint8Array, source: Int32Array): Uint8Array | undefined {
  const counts = new Map<number, { points: number; pairs: number }>();
  for (const [i, s] of source.entries()) {
    const count = counts.get(s) ?? { points: 0, pairs: 0 };
    counts.set(s, { points: count.points + 1, pairs: count.pairs + repeated[i]! });
  }
  const isCopy = (s: number) => {
    const { points, pairs } = counts.get(s)!;
    return pairs >= LEAST_PAIRS && 2 * pairs >= points;
  };
  const copied = repeated.map((mark, i) => (mark === 1 && isCopy(source[i]!) ? 1 : 0));
  return copied.includes(1) ? copied : undefined;
}
