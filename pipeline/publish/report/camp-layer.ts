import { line } from "d3-shape";
import type { CampReading, Curve } from "../../records/fits.ts";
import { sourceLetter } from "./figures.ts";
import { type Frame, RIGHT } from "./frame.ts";
import { type Html, html, raw } from "./html.ts";
import { px } from "./marks.ts";
import type { SystemView } from "./system-view.ts";

/** A reading of sources that disagree with the rest, as the plots and tables show it. */
export interface DrawnCamp extends CampReading {
  /** Letters of its sources: `A` or `B, D`. */
  readonly letters: string;
}

/** Points at which a curve is drawn. */
const STEPS = 36;
/** Most letters told beside a line. */
const MOST_LETTERS = 4;
/** Inks of the lines, one for each reading. */
const INKS = 6;

/** The readings of a system without a majority, each with the letters of its sources; none where the sources agree. */
export function drawnCamps({ fit, sources }: SystemView): readonly DrawnCamp[] {
  return (fit?.campReadings ?? []).map((reading) => {
    const letters = reading.sources.slice(0, MOST_LETTERS).map((source) => sourceLetter(sources.indexOf(source)));
    const more = reading.sources.length > MOST_LETTERS ? ` and ${reading.sources.length - MOST_LETTERS} more` : "";
    return { ...reading, letters: letters.join(", ") + more };
  });
}

function ink({ sources }: SystemView, camp: DrawnCamp): number {
  return sources.indexOf(camp.sources[0] ?? -1) % INKS;
}

/**
 * A broken line for each reading over the temperatures of its own points, with the letters of its sources at its end.
 *
 * @param across place of a temperature, K, in the units of the plot
 * @param of height of an ln value in the units of the plot
 */
export function campLayer(
  view: SystemView,
  frame: Frame,
  across: (temperatureK: number) => number,
  of: (ln: number) => number,
): Html {
  const lines = drawnCamps(view).flatMap((camp) => {
    if (camp.curve === undefined) return [];
    const spots = spotsOf(camp.curve).map(([T, ln]) => [px(frame.x(across(T))), px(frame.y(of(ln)))] as const);
    const drawn = spots.filter(([x, y]) => Number.isFinite(x) && Number.isFinite(y));
    return drawn.length === 0 ? [] : [{ camp, drawn, end: drawn.reduce((a, b) => (b[0] > a[0] ? b : a)) }];
  });
  // The upper line has its name above it, the others below.
  const top = lines.reduce((least, { end }) => Math.min(least, end[1]), Number.POSITIVE_INFINITY);
  return html`${lines.map(({ camp, drawn, end: [x, y] }) => {
    const class_ = `s${ink(view, camp)}`;
    const at = Math.max(frame.top + 16, Math.min(frame.bottom - 6, y === top ? y - 11 : y + 20));
    const path = drawn.length > 1 ? line<readonly [number, number]>().digits(null)(drawn) : `M${x - 14},${y}h28`;
    return html`<path class="camp ${class_}" d="${raw(path ?? "")}"/><text class="campname ${class_}" x="${px(Math.min(x, RIGHT - 4))}" y="${px(at)}">${camp.letters} alone</text>`;
  })}`;
}

function spotsOf({ temperatureRangeK: [low, high], evaluate }: Curve): (readonly [temperatureK: number, ln: number])[] {
  const steps = high > low ? STEPS : 0;
  return Array.from({ length: steps + 1 }, (_, i) => {
    const T = Math.min(high, low + ((high - low) * i) / Math.max(1, steps));
    return [T, evaluate(T)] as const;
  });
}

/** What the broken lines mean, for the legend; nothing where there are none. */
export function campKey(view: SystemView): Html | undefined {
  if (drawnCamps(view).length === 0) return undefined;
  return html`<li><svg class="key" viewBox="-11 -11 22 22" width="22" height="22" aria-hidden="true"><path class="camp s0" d="M-10,0H10"/></svg><span>what sources that agree with one another say by themselves; the sources disagree and no reading is chosen</span></li>`;
}
