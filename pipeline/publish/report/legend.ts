import { campKey } from "./camp-layer.ts";
import { counted, sourceLetter } from "./figures.ts";
import { type Html, html, raw, short } from "./html.ts";
import { markPicture } from "./marks.ts";
import type { PointState, SystemView } from "./system-view.ts";

/** What each state means, in the words of the legend. */
const STATES: readonly (readonly [PointState, string])[] = [
  ["left out by the fit", "hollow with a stroke: left out by the robust fit (weight 0), not in the curve"],
  ["interval", "bar or arrow: known as a range only, not in the curve"],
  ["not fitted", "hollow, broken outline: shown, never fitted (its kind of value, or outside the temperature window)"],
  ["set aside", "hollow, struck through: set aside by a ruling"],
];

const LINES: readonly (readonly [svg: string, text: string])[] = [
  ['<path class="curve" d="M-10,0H10"/>', "curve, inside the range of its data only"],
  ['<path class="band" d="M-10,-6H10V6H-10Z"/>', "95 % limits of the curve"],
  [
    '<path class="new" d="M-10,-5H10M-10,5H10"/>',
    "95 % limits of one new measurement, by a source that is not among these",
  ],
];

/** Sources with letter, shape and count, then whatever else the plots show. */
export function legend(view: SystemView): Html {
  const { edition, points, curves } = view;
  const sources = view.sources.map((source, i) => {
    const account = edition.sources[source];
    const own = points.filter((point) => point.source === i).length;
    return html`<li>${markPicture(i, "kept")}<span><b>${sourceLetter(i)}</b> <a href="../sources.html#${account?.name ?? ""}">${account?.name ?? ""}</a>, ${counted(own, "measurement")}${account?.card?.title ? html`: ${short(account.card.title, 160)}` : ""}</span></li>`;
  });
  const states = STATES.filter(([state]) => points.some((point) => point.state === state)).map(
    ([state, text]) => html`<li>${state === "interval" ? intervalKey : markPicture(0, state)}<span>${text}</span></li>`,
  );
  const ringed = points.some(({ flagged }) => flagged)
    ? html`<li>${markPicture(0, "kept", true)}<span>ringed: a flag that needs a person concerns it</span></li>`
    : "";
  const lines =
    curves.length === 0
      ? ""
      : LINES.map(
          ([svg, text]) =>
            html`<li><svg class="key" viewBox="-11 -11 22 22" width="22" height="22" aria-hidden="true">${raw(svg)}</svg><span>${text}</span></li>`,
        );
  return html`<ul class="legend">${sources}</ul><ul class="legend">${states}${ringed}${lines}${campKey(view)}</ul>`;
}

const intervalKey = raw(
  '<svg class="key" viewBox="-11 -11 22 22" width="22" height="22" aria-hidden="true"><g class="s0 interval"><path d="M-5,-8h10M0,-8V8M-5,8h10"/></g></svg>',
);
