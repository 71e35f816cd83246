import { sourceLetter } from "./figures.ts";
import { type Html, html } from "./html.ts";
import { px } from "./marks.ts";

/** A drawn point in the units of the drawing. */
export interface Spot {
  readonly source: number;
  readonly x: number;
  readonly y: number;
  /** True if the curve uses it: the letter goes to such a point where there is one. */
  readonly usual: boolean;
}

/** Offsets tried for a letter around an end point of its source. */
const OFFSETS: readonly (readonly [number, number])[] = [
  [14, 0],
  [-14, 0],
  [0, -15],
  [0, 16],
  [12, -12],
  [-12, 12],
  [12, 13],
  [-12, -11],
];
/** Points that a letter is kept clear of; beyond this many a plot is full anyway. */
const MOST_SPOTS = 400;

/**
 * The letter of each source beside one of its end points, at the offset that is furthest from other points and letters.
 * `left`, `right`, `top`, `bottom`: edges that no letter may cross.
 */
export function directLabels(
  spots: readonly Spot[],
  edges: { readonly left: number; readonly right: number; readonly top: number; readonly bottom: number },
): Html[] {
  const taken: { x: number; y: number }[] = spots.slice(0, MOST_SPOTS).map(({ x, y }) => ({ x, y }));
  const bySource = new Map<number, Spot[]>();
  for (const spot of spots) {
    const own = bySource.get(spot.source);
    if (own) own.push(spot);
    else bySource.set(spot.source, [spot]);
  }
  const labels: Html[] = [];
  for (const [source, own] of [...bySource].sort(([a], [b]) => a - b)) {
    const kept = own.filter(({ usual }) => usual);
    const byX = (kept.length > 0 ? kept : [...own]).sort((a, b) => a.x - b.x);
    const ends = byX.length > 1 ? [byX.at(-1) as Spot, byX[0] as Spot] : byX;
    const best = clearest(ends, taken, edges);
    if (best === undefined) continue;
    // A letter needs twice the room of a point: it stands twice in the list of what is taken.
    taken.push(best, { x: best.x + 5, y: best.y });
    labels.push(
      html`<text class="letter s${source % 6}" x="${px(best.x)}" y="${px(best.y + 4.5)}">${sourceLetter(source)}</text>`,
    );
  }
  return labels;
}

function clearest(
  ends: readonly Spot[],
  taken: readonly { readonly x: number; readonly y: number }[],
  { left, right, top, bottom }: { left: number; right: number; top: number; bottom: number },
): { x: number; y: number } | undefined {
  let best: { x: number; y: number } | undefined;
  let room = -1;
  for (const end of ends) {
    for (const [dx, dy] of OFFSETS) {
      const [x, y] = [end.x + dx, end.y + dy];
      if (x < left + 6 || x > right - 6 || y < top + 8 || y > bottom - 8) continue;
      let nearest = Number.POSITIVE_INFINITY;
      for (const other of taken) nearest = Math.min(nearest, (other.x - x) ** 2 + (other.y - y) ** 2);
      if (nearest > room) [best, room] = [{ x, y }, nearest];
    }
  }
  return best;
}
