import { measurementId } from "../../records/edition.ts";
import { directLabels, type Spot } from "./direct-labels.ts";
import { celsius, sourceLetter } from "./figures.ts";
import { type Frame, LEFT, RIGHT } from "./frame.ts";
import { escapeText, type Html, html, raw } from "./html.ts";
import { beyondMark, intervalMark, pointClass, pointMark, px } from "./marks.ts";
import type { DrawnPoint, SystemView } from "./system-view.ts";

/** Most points drawn in one plot: every one that is not kept, and an even choice of the rest. */
const MOST_POINTS = 1500;
/** From so many points on, the marks are small. */
const MANY_POINTS = 120;

/** Where a point stands in one plot; NaN where it cannot be drawn there. */
export interface Placed {
  readonly x: number;
  readonly y: number;
  readonly low: number;
  readonly high: number;
  /** Value with its unit, for the tooltip. */
  readonly value: string;
}

/** Marks of the points with their tooltips, and the letters of the sources. */
export interface PointLayer {
  readonly marks: Html;
  /** Points beyond an edge, drawn on it with an arrow. */
  readonly beyond: number;
  /** Points that are not drawn because there are too many. */
  readonly thinned: number;
}

/** Every point that is not kept, and as many of the others, evenly chosen, as there is room for. */
function chosenPoints(points: readonly DrawnPoint[]): readonly DrawnPoint[] {
  if (points.length <= MOST_POINTS) return points;
  const special = points.filter((point) => point.state !== "kept" || point.flagged).slice(0, MOST_POINTS);
  const usual = points.filter((point) => point.state === "kept" && !point.flagged);
  const room = Math.max(0, MOST_POINTS - special.length);
  const step = usual.length / Math.max(1, Math.min(room, usual.length));
  const even = Array.from({ length: Math.min(room, usual.length) }, (_, i) => usual[Math.floor(i * step)]);
  return [...even.filter((point) => point !== undefined), ...special];
}

/** Room between an edge and the mark of a point that lies beyond it. */
const INSET = 17;

/** Where a point beyond the frame stands instead, and the way its arrow turns; undefined for a point inside. */
function beyondEdge(
  { top, bottom }: Frame,
  x: number,
  y: number,
): { x: number; y: number; degrees: number } | undefined {
  const [dx, dy] = [x < LEFT - 1 ? -1 : x > RIGHT + 1 ? 1 : 0, y < top - 1 ? -1 : y > bottom + 1 ? 1 : 0];
  if (dx === 0 && dy === 0) return undefined;
  const inside = (value: number, low: number, high: number) => Math.min(high, Math.max(low, value));
  return {
    x: dx === 0 ? x : inside(x, LEFT + INSET, RIGHT - INSET),
    y: dy === 0 ? y : inside(y, top + INSET, bottom - INSET),
    degrees: Math.round((Math.atan2(dx, -dy) * 180) / Math.PI),
  };
}

/** Draws the points of a system into a frame. `place` gives the position of a point in data units. */
export function pointLayer(view: SystemView, frame: Frame, place: (point: DrawnPoint) => Placed): PointLayer {
  const chosen = chosenPoints(view.points);
  const small = chosen.length > MANY_POINTS;
  const spots: Spot[] = [];
  let beyond = 0;
  const marks = chosen.map((point): Html => {
    const at = place(point);
    const x = frame.x(at.x);
    const name = `<title>${escapeText(tooltip(view, point, at.value), 200)}</title>`;
    const kind = `pt ${pointClass(point.source, point.state)}`;
    if (point.state === "interval") {
      const [low, high] = [frame.y(at.low), frame.y(at.high)];
      const open = (height: number) => (Number.isFinite(height) ? height : Number.NaN);
      if (Number.isNaN(open(low)) && Number.isNaN(open(high))) return raw("");
      if (x < LEFT || x > RIGHT) return raw("");
      const [above, below] = [open(low) < frame.top - 1, open(high) > frame.bottom + 1];
      if (above || below) beyond++;
      const mark = above || below ? beyondMark(x, frame, above) : intervalMark(x, open(low), open(high), frame);
      return html`<g class="${kind}${above || below ? " beyond" : ""}">${raw(name)}${mark}</g>`;
    }
    const y = frame.y(at.y);
    if (!Number.isFinite(x) || !Number.isFinite(y)) return raw("");
    const mark = pointMark(point.source, point.state, point.flagged, small);
    const edge = beyondEdge(frame, x, y);
    if (edge === undefined) {
      spots.push({ source: point.source, x, y, usual: point.state === "kept" });
      return html`<g class="${kind}" transform="translate(${px(x)},${px(y)})">${raw(name)}${mark}</g>`;
    }
    beyond++;
    return html`<g class="${kind} beyond" transform="translate(${px(edge.x)},${px(edge.y)})">${raw(name)}${mark}<path class="arrow" transform="rotate(${edge.degrees})" d="M-4,-11L0,-16L4,-11"/></g>`;
  });
  const labels = directLabels(spots, { left: LEFT, right: RIGHT, top: frame.top, bottom: frame.bottom });
  return { marks: html`${marks}${labels}`, beyond, thinned: view.points.length - chosen.length };
}

function tooltip({ edition }: SystemView, point: DrawnPoint, value: string): string {
  const flagged = point.flagged ? ", flagged" : "";
  return `${sourceLetter(point.source)}  ${measurementId(edition, point.row)}: ${celsius(point.temperatureK)} °C, ${value} (${point.state}${flagged})`;
}
