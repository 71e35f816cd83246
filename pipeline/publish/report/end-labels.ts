import { RIGHT } from "./frame.ts";
import { type Html, html } from "./html.ts";
import { px } from "./marks.ts";

/** A line that ends at a place of the drawing, with the words for it. */
export interface LineEnd {
  readonly x: number;
  readonly y: number;
  readonly text: string;
}

/** Least distance between two labels, drawing units: a line of text at narrow width. */
const GAP = 17;
/** Room for labels right of the lines. */
export const LABEL_ROOM = 62;

/**
 * Labels of lines in a column right of where they end, moved apart where they would touch, each joined to its line by a
 * thin stroke: no line is told by its colour.
 *
 * @param top, bottom edges that no label may cross; with more labels than there is room for every second one is left out,
 *   and so on
 */
export function endLabels(ends: readonly LineEnd[], top: number, bottom: number): Html[] {
  const sorted = [...ends].sort((a, b) => a.y - b.y);
  const step = Math.max(1, Math.ceil((sorted.length * GAP) / (bottom - top)));
  const shown = sorted.filter((_, i) => i % step === 0);
  const heights = apart(
    shown.map(({ y }) => y),
    top + GAP / 2,
    bottom - GAP / 2,
  );
  const column = RIGHT - LABEL_ROOM + 12;
  return shown.map(({ x, y, text }, i) => {
    const at = heights[i] as number;
    return html`<path class="leader" d="M${px(x + 2)},${px(y)}L${column - 4},${px(at)}"/><text class="end" x="${column}" y="${px(at + 4.5)}">${text}</text>`;
  });
}

/** Heights at least {@link GAP} apart and inside the edges, as near to the wanted ones as a pass each way brings them. */
function apart(wanted: readonly number[], top: number, bottom: number): number[] {
  const heights = wanted.map((y) => Math.min(bottom, Math.max(top, y)));
  for (let i = 1; i < heights.length; i++)
    heights[i] = Math.max(heights[i] as number, (heights[i - 1] as number) + GAP);
  const last = heights.length - 1;
  if (last >= 0 && (heights[last] as number) > bottom) {
    heights[last] = bottom;
    for (let i = last - 1; i >= 0; i--) heights[i] = Math.min(heights[i] as number, (heights[i + 1] as number) - GAP);
  }
  return heights;
}
