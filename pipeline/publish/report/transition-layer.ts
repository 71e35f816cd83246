import { celsius } from "./figures.ts";
import type { Frame } from "./frame.ts";
import { type Html, html } from "./html.ts";
import { px } from "./marks.ts";
import type { SystemView } from "./system-view.ts";

/** Room a label needs beside its line, in the units of the drawing. */
const LABEL_ROOM = 150;

/** A broken upright line where the two branches meet, its 95 % limits as a bracket at the foot, and what it is in words. */
export function transitionLayer(
  { fit }: SystemView,
  { x, top, bottom }: Frame,
  across: (temperatureK: number) => number,
): Html {
  if (fit?.transition === undefined) return html``;
  const { temperatureK, low, high } = fit.transition;
  const [left = 0, right = 0] = x.range();
  const at = px(x(across(temperatureK)));
  const ends = [px(x(across(low))), px(x(across(high)))].map((end) => Math.min(Math.max(end, left), right));
  const [from, to] = [Math.min(...ends), Math.max(...ends)];
  const foot = px(bottom - 6);
  const before = at + LABEL_ROOM > right;
  return html`<g class="transition"><path d="M${at},${px(bottom)}V${px(top)}"/><path class="limits" d="M${from},${foot - 4}v8M${from},${foot}H${to}M${to},${foot - 4}v8"/><text x="${before ? at - 6 : at + 6}" y="${px(top + 14)}"${before ? html` text-anchor="end"` : ""}>solid changes, ${celsius(temperatureK)} °C</text></g>`;
}
