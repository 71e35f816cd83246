import { scaleLinear } from "d3-scale";
import { median, percentOff, sourceLetter } from "./figures.ts";
import { bottomAxis, domainOf, drawing, frameOf, LEFT, RIGHT } from "./frame.ts";
import { type Html, html, raw } from "./html.ts";
import { pointClass, pointMark, px } from "./marks.ts";
import { inCelsius, temperaturesShown } from "./plots.ts";
import type { DrawnPoint, SystemView } from "./system-view.ts";

/** Height of the lane of one source, and most lanes drawn. */
const LANE = 60;
const MOST_LANES = 12;
const TOP = 10;
/** Room kept at the edges of a lane for points beyond it. */
const EDGE = 14;
/** Least half-height of a lane, percent. */
const LEAST_PERCENT = 5;

/** Half-height of the lanes: a round number that holds nine in ten of the kept points, at least 5 %. */
function reach(points: readonly DrawnPoint[]): number {
  const sizes = points
    .filter(({ state, deviationPercent }) => state === "kept" && Number.isFinite(deviationPercent))
    .map(({ deviationPercent }) => Math.abs(deviationPercent))
    .sort((a, b) => a - b);
  const most = sizes[Math.min(sizes.length - 1, Math.floor(0.95 * sizes.length))] ?? LEAST_PERCENT;
  const [, round = LEAST_PERCENT] = scaleLinear([0, Math.max(LEAST_PERCENT, 1.1 * most)], [0, 1])
    .nice(4)
    .domain();
  return round;
}

/**
 * Deviation of each point from what the others say, against °C, one lane a source: an offset of a source, a trend and a
 * single slip look different here. Points beyond the lane stand at its edge with an arrow. Undefined where nothing is
 * known of any point.
 */
export function residualPlot(view: SystemView): Html | undefined {
  const drawn = view.points.filter(({ deviationPercent }) => Number.isFinite(deviationPercent));
  const lanes = view.sources.map((_, i) => i).filter((i) => drawn.some(({ source }) => source === i));
  if (lanes.length === 0) return undefined;
  const shown = lanes.slice(0, MOST_LANES);
  const percent = reach(drawn);
  const bottom = TOP + LANE * shown.length;
  const frame = frameOf(domainOf(temperaturesShown(view).map(inCelsius), 5), [0, 1], TOP, bottom);
  const parts = shown.map((source, lane) => {
    const middle = TOP + LANE * (lane + 0.5);
    const y = scaleLinear([-percent, percent], [middle + LANE / 2 - EDGE, middle - LANE / 2 + EDGE]);
    const own = drawn.filter((point) => point.source === source);
    const scale =
      lane > 0
        ? ""
        : html`<text class="tick ly" x="${LEFT - 7}" y="${px(y(percent)) + 4}">+${percent}</text><text class="tick ly" x="${LEFT - 7}" y="${px(y(-percent)) + 4}">&minus;${percent}</text>`;
    const middleValue = percentOff(median(own.map(({ deviationPercent }) => deviationPercent)));
    const marks = own.map((point) =>
      residualMark(
        point,
        px(Math.min(RIGHT, Math.max(LEFT, frame.x(inCelsius(point.temperatureK))))),
        y,
        percent,
        middle,
      ),
    );
    return html`<path class="zero" d="M${LEFT},${middle}H${RIGHT}"/><path class="grid" d="M${LEFT},${middle + LANE / 2}H${RIGHT}"/><text class="letter s${source % 6}" x="18" y="${middle}">${sourceLetter(source)}</text><text class="fine" x="18" y="${middle + 16}">${middleValue}</text>${scale}${marks}`;
  });
  const about = `One lane for each of ${shown.length} sources; the middle line is no deviation, the edges are plus and minus ${percent} percent.`;
  return drawing("plot-residuals", bottom + 48, "Deviations by source, percent, against temperature", about, [
    bottomAxis(frame, html`temperature, °C`),
    html`<path class="axis" d="M${LEFT},${TOP}V${bottom}"/>`,
    ...parts,
  ]);
}

function residualMark(
  point: DrawnPoint,
  x: number,
  y: (value: number) => number,
  percent: number,
  middle: number,
): Html {
  const { deviationPercent: value, source, state, flagged } = point;
  const kind = `rs ${pointClass(source, state)}`;
  const name = `<title>${percentOff(value)} %</title>`;
  if (Math.abs(value) <= percent) {
    const at = px(y(value));
    return html`<g class="${kind}">${raw(name)}<path class="stem" d="M${x},${middle}V${at}"/><g transform="translate(${x},${at})">${pointMark(source, state, flagged, true)}</g></g>`;
  }
  const [edge, tip] = value > 0 ? [px(y(percent)), -12] : [px(y(-percent)), 12];
  return html`<g class="${kind} beyond">${raw(name)}<path class="stem" d="M${x},${middle}V${edge}"/><path class="arrow" d="M${x - 4},${edge + tip * 0.67}L${x},${edge + tip}L${x + 4},${edge + tip * 0.67}"/><g transform="translate(${x},${edge})">${pointMark(source, state, flagged, true)}</g></g>`;
}
