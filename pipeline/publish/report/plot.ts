import { scaleLinear } from "d3-scale";
import {
  area,
  line,
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

/** One measured point. */
export interface PlotPoint {
  readonly x: number;
  readonly y: number;
  /** Position of its source in `Plot.sources`: decides the shape. */
  readonly source: number;
  /** True if a flag says the point lies off the curve. */
  readonly off: boolean;
  /** Tooltip. */
  readonly label: string;
}

/** One stretch of curve, with the 95 % limits of the curve and of a new measurement. */
export interface PlotCurve {
  readonly x: readonly number[];
  readonly y: readonly number[];
  readonly low: readonly number[];
  readonly high: readonly number[];
  readonly outerLow: readonly number[];
  readonly outerHigh: readonly number[];
}

export interface Plot {
  readonly title: string;
  readonly xLabel: string;
  readonly yLabel: string;
  readonly points: readonly PlotPoint[];
  readonly curves: readonly PlotCurve[];
  /** Names of the sources, for the legend. */
  readonly sources: readonly string[];
}

const SHAPES: readonly SymbolType[] = [
  symbolCircle,
  symbolSquare,
  symbolTriangle,
  symbolDiamond,
  symbolCross,
  symbolWye,
  symbolStar,
];
const WIDTH = 720;
const HEIGHT = 400;
const MARGIN = { top: 14, right: 16, bottom: 48, left: 72 };
const LEGEND_ROW = 20;

/** Lowest and highest of all numbers, with a margin of 4 % at each end; a single value gets a margin of 1. */
function extent(values: readonly number[]): [number, number] {
  const finite = values.filter(Number.isFinite);
  const [low, high] = [Math.min(...finite), Math.max(...finite)];
  const margin = high > low ? 0.04 * (high - low) : 1;
  return [low - margin, high + margin];
}

/** Coordinates to a hundredth of a pixel, so that the same data give the same bytes. */
const px = (value: number): number => Math.round(value * 100) / 100;

/** Path data of a source's shape. */
function shapePath(source: number): string {
  return symbol(SHAPES[source % SHAPES.length], 62).digits(2)() as string;
}

/** A plot as SVG: points by source told apart by shape and legend, off-curve points crossed out, curve with its limits. */
export function plotSvg(plot: Plot): Html {
  const { points, curves, sources } = plot;
  const height = HEIGHT + LEGEND_ROW * Math.ceil(sources.length / 2);
  const x = scaleLinear(extent([...points.map((p) => p.x), ...curves.flatMap((c) => c.x)]), [
    MARGIN.left,
    WIDTH - MARGIN.right,
  ]);
  const y = scaleLinear(
    extent([...points.map((p) => p.y), ...curves.flatMap((c) => [...c.outerLow, ...c.outerHigh])]),
    [HEIGHT - MARGIN.bottom, MARGIN.top],
  );
  const curveParts = curves.map((curve) => {
    const at = (values: readonly number[]) => (i: number) => px(y(values[i] as number));
    const index = curve.x.map((_, i) => i);
    const across = (i: number) => px(x(curve.x[i] as number));
    const path = (values: readonly number[]) => line<number>(across, at(values))(index) ?? "";
    const band = area<number>(across, at(curve.low), at(curve.high))(index) ?? "";
    return html`<path class="band" d="${band}"/><path class="outer" d="${path(curve.outerLow)}"/><path class="outer" d="${path(
      curve.outerHigh,
    )}"/><path class="curve" d="${path(curve.y)}"/>`;
  });
  const xTicks = x.ticks(7).map(
    (
      tick,
    ) => html`<line class="grid" x1="${px(x(tick))}" x2="${px(x(tick))}" y1="${MARGIN.top}" y2="${HEIGHT - MARGIN.bottom}"/>
<text x="${px(x(tick))}" y="${HEIGHT - MARGIN.bottom + 18}" text-anchor="middle">${x.tickFormat(7)(tick)}</text>`,
  );
  const yTicks = y.ticks(6).map(
    (
      tick,
    ) => html`<line class="grid" x1="${MARGIN.left}" x2="${WIDTH - MARGIN.right}" y1="${px(y(tick))}" y2="${px(y(tick))}"/>
<text x="${MARGIN.left - 8}" y="${px(y(tick)) + 4}" text-anchor="end">${y.tickFormat(6)(tick)}</text>`,
  );
  const marks = points.map((p) => {
    const place = `translate(${px(x(p.x))},${px(y(p.y))})`;
    const cross = p.off ? raw('<path class="off" d="M-9,-9L9,9M-9,9L9,-9"/>') : raw("");
    return html`<g transform="${place}"><title>${p.label}</title><path class="point" d="${shapePath(p.source)}"/>${cross}</g>`;
  });
  const legend = sources.map((name, i) => {
    const place = `translate(${MARGIN.left + (i % 2) * 320},${HEIGHT + 10 + LEGEND_ROW * Math.floor(i / 2)})`;
    const short = name.length > 36 ? `${name.slice(0, 35)}…` : name;
    return html`<g transform="${place}"><path class="point" d="${shapePath(i)}"/><text x="14" y="5">${short}</text></g>`;
  });
  return html`<svg viewBox="0 0 ${WIDTH} ${height}" width="${WIDTH}" height="${height}" role="img" aria-label="${plot.title}">
${xTicks}${yTicks}
<line class="axis" x1="${MARGIN.left}" x2="${WIDTH - MARGIN.right}" y1="${HEIGHT - MARGIN.bottom}" y2="${HEIGHT - MARGIN.bottom}"/>
<line class="axis" x1="${MARGIN.left}" x2="${MARGIN.left}" y1="${MARGIN.top}" y2="${HEIGHT - MARGIN.bottom}"/>
<text x="${(MARGIN.left + WIDTH - MARGIN.right) / 2}" y="${HEIGHT - 10}" text-anchor="middle">${plot.xLabel}</text>
<text transform="translate(18,${(MARGIN.top + HEIGHT - MARGIN.bottom) / 2}) rotate(-90)" text-anchor="middle">${plot.yLabel}</text>
${curveParts}${marks}${legend}
</svg>`;
}
