import type { RobustWorkspace } from "./robust-workspace.ts";

/** How near in temperature another source's point must be to bear witness, and to speak against, K. */
const [WITNESS_K, CONTRADICTION_K] = [15, 5];

/**
 * Agreement is lack of fit: where the nearest points of the other sound sources deviate to the same side by at least
 * half as much, the curve is wrong and not the point. A source with a point close by that does not deviate speaks
 * against it. Returns the deviation they share (ln value), or 0 where nobody is near or anybody disagrees.
 */
export function sharedDeviation(ws: RobustWorkspace, k: number): number {
  const own = ws.deviation[k]!;
  let shared = Number.POSITIVE_INFINITY;
  for (let g = 0; g < ws.groups; g++) {
    if (ws.sound[g] === 0 || g === ws.rows.group[k]) continue;
    const j = nearest(ws, g, ws.temperatureK[k]!);
    if (j < 0) continue;
    const other = ws.deviation[j]!;
    if (other * own > 0 && Math.abs(other) >= Math.abs(own) / 2) shared = Math.min(shared, Math.abs(other));
    else if (Math.abs(ws.temperatureK[j]! - ws.temperatureK[k]!) <= CONTRADICTION_K) return 0;
  }
  return shared === Number.POSITIVE_INFINITY ? 0 : shared;
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
