import type { SystemPoints } from "../../records/systems.ts";

/** Systems a source (or a class of systems) needs in the sample: its scale is then known to about 2 %. */
const ENOUGH = 400;

/**
 * Systems from which the pooled scales are estimated: all of a small edition; of a large one as many as give every
 * source and every class of systems its share, taken in a fixed scattered order so that no alphabet decides.
 *
 * @returns positions of systems, ascending
 */
export function scaleSample(
  points: readonly SystemPoints[],
  classOf: Uint8Array,
  nSources: number,
  enough = ENOUGH,
): Int32Array {
  const n = points.length;
  const seen = new Int32Array(nSources);
  const seenClass = new Int32Array(256);
  const lastSystem = new Int32Array(nSources).fill(-1);
  const chosen = new Uint8Array(n);
  const step = coprimeStep(n);
  for (let k = 0, s = 0; k < n; k++, s = (s + step) % n) {
    const { source } = points[s]!;
    let wanted = seenClass[classOf[s]!]! < enough;
    for (let i = 0; i < source.length && !wanted; i++) wanted = seen[source[i]!]! < enough;
    if (!wanted) continue;
    chosen[s] = 1;
    seenClass[classOf[s]!]!++;
    for (let i = 0; i < source.length; i++) {
      if (lastSystem[source[i]!] === s) continue;
      lastSystem[source[i]!] = s;
      seen[source[i]!]!++;
    }
  }
  return Int32Array.from([...chosen.keys()].filter((s) => chosen[s] === 1));
}

/** A step near the golden section of n that visits every system once. */
function coprimeStep(n: number): number {
  for (let step = Math.max(1, Math.round(0.618 * n)); ; step++) if (greatestCommonDivisor(step, n) === 1) return step;
}

function greatestCommonDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestCommonDivisor(b, a % b);
}
