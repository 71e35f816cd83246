import {
  type SymbolType,
  symbol,
  symbolCircle,
  symbolCross,
  symbolDiamond,
  symbolSquare,
  symbolStar,
  symbolTriangle,
  symbolWye,
} from "d3-shape";
import { type Html, html, raw } from "./html.ts";
import type { PointState } from "./system-view.ts";

/** Shapes in the order in which sources get them; after these the same shapes come again with a hole. */
const SHAPES: readonly SymbolType[] = [
  symbolCircle,
  symbolSquare,
  symbolTriangle,
  symbolDiamond,
  symbolCross,
  symbolStar,
  symbolWye,
];
/** Inks that go with the shapes; a shape and its ink together repeat after 42 sources only. */
const INKS = 6;

const OUTLINES = SHAPES.map((shape) => symbol(shape, 52).digits(1)() as string);
const SMALL_OUTLINES = SHAPES.map((shape) => symbol(shape, 24).digits(1)() as string);

/** Coordinates to a tenth of a unit, so that the same data give the same bytes. */
export const px = (value: number): number => Math.round(value * 10) / 10;

/** Class names of the states: style and tests go by them. */
export const STATE_CLASS: Readonly<Record<PointState, string>> = {
  kept: "kept",
  "left out by the fit": "left",
  interval: "interval",
  "not fitted": "notfitted",
  "set aside": "aside",
};

/** What marks a state besides its shape: drawn over the shape. */
const STATE_STROKES: Readonly<Record<PointState, string>> = {
  kept: "",
  "left out by the fit": '<path class="over" d="M-7,7L7,-7"/>',
  interval: "",
  "not fitted": "",
  "set aside": '<path class="over" d="M-8,0H8"/>',
};

/** The mark of one point around the origin: shape of its source, filled only where the curve uses it. */
export function pointMark(source: number, state: PointState, flagged: boolean, small = false): Html {
  const outline = (small ? SMALL_OUTLINES : OUTLINES)[source % SHAPES.length] as string;
  const hole = source >= SHAPES.length && state === "kept" ? '<circle class="hole" r="1.8"/>' : "";
  const ring = flagged ? `<circle class="ring" r="${small ? 7 : 9}"/>` : "";
  return raw(`${ring}<path d="${outline}"/>${hole}${STATE_STROKES[state]}`);
}

/** Class of a point or legend entry: ink of the source and state. */
export function pointClass(source: number, state: PointState): string {
  return `s${source % INKS} ${STATE_CLASS[state]}`;
}

/** A mark as a picture of its own, for legends and tables. */
export function markPicture(source: number, state: PointState, flagged = false): Html {
  return html`<svg class="key" viewBox="-11 -11 22 22" width="22" height="22" aria-hidden="true"><g class="${pointClass(source, state)}">${pointMark(source, state, flagged)}</g></svg>`;
}

/** Length of the arrow of an open side, and the least that still shows one. */
const ARROW = 24;
const SHORT_ARROW = 9;

/**
 * An interval from `low` to `high` (heights, NaN where open) at one place: a bar with caps, or an arrow where one side is
 * open. Nothing is drawn beyond the edges: a bar that goes on ends there without a cap.
 */
export function intervalMark(x: number, low: number, high: number, { top, bottom }: Edges): Html {
  const at = px(x);
  const cap = (y: number) => `M${at - 5},${px(y)}h10`;
  const arrow = (y: number, room: number, way: 1 | -1) => {
    const length = px(way * Math.min(ARROW, Math.max(SHORT_ARROW, room)));
    return `${cap(y)}M${at},${px(y)}v${length}m-4,${-6 * way}l4,${6 * way}l4,${-6 * way}`;
  };
  if (Number.isNaN(low)) return raw(`<path d="${arrow(high, bottom - high, 1)}"/>`);
  if (Number.isNaN(high)) return raw(`<path d="${arrow(low, low - top, -1)}"/>`);
  const [from, to] = [Math.min(low, bottom), Math.max(high, top)];
  return raw(`<path d="${from === low ? cap(low) : ""}M${at},${px(from)}V${px(to)}${to === high ? cap(high) : ""}"/>`);
}

/** Upper and lower edge of the room for a mark. */
export interface Edges {
  readonly top: number;
  readonly bottom: number;
}

/** What stands at an edge for an interval that lies beyond it as a whole: a cap with an arrow, up or down. */
export function beyondMark(x: number, { top, bottom }: Edges, above: boolean): Html {
  const [y, way] = above ? [top + ARROW, -1] : [bottom - ARROW, 1];
  return raw(
    `<path d="M${px(x) - 5},${px(y)}h10M${px(x)},${px(y)}v${way * ARROW}m-4,${-6 * way}l4,${6 * way}l4,${-6 * way}m-4,${-4 * way}m-4,${-6 * way}l4,${6 * way}l4,${-6 * way}"/>`,
  );
}
