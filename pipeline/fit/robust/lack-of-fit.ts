import type { RobustWorkspace } from "./robust-workspace.ts";

/** How near in temperature another source's point must be to bear witness, and to speak against, K. */
const [WITNESS_K, CONTRADICTION_K] = [15, 5];

/** No curve through sound points is off by more than this, ln value: a larger deviation is a slip, whoever else has one. */
const MOST_SHARED = Math.LN2;
/** Deviations are one where they differ by at most this many standard deviations. */
const ALIKE_Z = 3;

/**
 * Agreement is lack of fit: where the nearest points of the other sound sources deviate to the same side by at least
 * half as much, and by no more and no less than their uncertainty and the distance in temperature allow, the curve is
 * wrong and not the point. A source with a point close by that does not deviate speaks against it. Returns the
 * deviation they share (ln value), or 0 where nobody is near, anybody disagrees, or the deviation passes a factor 2.
 */
export function sharedDeviation(ws: RobustWorkspace, k: number): number {
  const own = ws.deviation[k]!;
  if (Math.abs(own) > MOST_SHARED) return 0;
  let shared = Number.POSITIVE_INFINITY;
  for (let g = 0; g < ws.groups; g++) {
    if (ws.sound[g] === 0 || g === ws.rows.group[k]) continue;
    const j = nearest(ws, g, ws.temperatureK[k]!);
    if (j < 0) continue;
    const other = ws.deviation[j]!;
    if (other * own > 0 && Math.abs(other) >= Math.abs(own) / 2 && areAlike(ws, k, j))
      shared = Math.min(shared, Math.abs(other));
    else if (Math.abs(ws.temperatureK[j]! - ws.temperatureK[k]!) <= CONTRADICTION_K) return 0;
  }
  return shared === Number.POSITIVE_INFINITY ? 0 : shared;
}

/** Whether two deviations are one, but for their uncertainty and the part of the reach of a witness that lies between them. */
function areAlike({ deviation, deviationVariance, temperatureK }: RobustWorkspace, k: number, j: number): boolean {
  const [own, other] = [deviation[k]!, deviation[j]!];
  const reach = Math.abs(temperatureK[k]! - temperatureK[j]!) / WITNESS_K;
  const drift = reach * Math.max(Math.abs(own), Math.abs(other));
  return Math.abs(own - other) <= ALIKE_Z * Math.sqrt(deviationVariance[k]! + deviationVariance[j]!) + drift;
}

function nearest(ws: RobustWorkspace, g: number, temperatureK: number): number {
  let best = -1;
  let bestGap = WITNESS_K;
  for (let j = ws.groupStart[g]!; j < ws.groupStart[g + 1]!; j++) {
    const gap = Math.abs(ws.temperatureK[j]! - temperatureK);
    if (ws.usable[j] === 0 || gap > bestGap) continue;
    best = j;
    bestGap = gap;
  }
  return best;
}
