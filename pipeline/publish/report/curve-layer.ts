import { area, line } from "d3-shape";
import type { Frame } from "./frame.ts";
import { type Html, html, raw } from "./html.ts";
import { px } from "./marks.ts";

/** A curve in the units of a plot, with both kinds of 95 % limits. */
export interface CurveLine {
  readonly x: readonly number[];
  readonly y: readonly number[];
  readonly low: readonly number[];
  readonly high: readonly number[];
  readonly newLow: readonly number[];
  readonly newHigh: readonly number[];
}

/** Shaded limits of the curve, broken limits of a new measurement, and the curve itself. */
export function curveLayer(curve: CurveLine, frame: Frame): Html {
  return curve.x.length > 1 ? overRange(curve, frame) : atOneTemperature(curve, frame);
}

function overRange(curve: CurveLine, { x, y }: Frame): Html {
  const index = curve.x.map((_, i) => i);
  const places = curve.x.map((value) => px(x(value)));
  const heights = (values: readonly number[]) => values.map((value) => px(y(value)));
  const across = (i: number) => places[i] as number;
  // Coordinates are rounded already; beyond a mole fraction of 1 there is no value, and no line.
  const path = (values: readonly number[]) => {
    const at = heights(values);
    const draw = line<number>(across, (i) => at[i] as number).defined((i) => Number.isFinite(at[i]));
    return draw.digits(null)(index) ?? "";
  };
  const [low, high] = [heights(curve.low), heights(curve.high)];
  const shade = area<number>(
    across,
    (i) => low[i] as number,
    (i) => high[i] as number,
  ).defined((i) => Number.isFinite(high[i]));
  const band = shade.digits(null)(index) ?? "";
  return raw(
    `<path class="band" d="${band}"/><path class="new" d="${path(curve.newLow)}"/><path class="new" d="${path(curve.newHigh)}"/><path class="curve" d="${path(curve.y)}"/>`,
  );
}

/** A constant at one temperature: a dash with its limits as a bar and a broken bar. */
function atOneTemperature(curve: CurveLine, { x, y }: Frame): Html {
  const at = px(x(curve.x[0] as number));
  const height = (values: readonly number[]) => px(y(values[0] as number));
  return html`<path class="band" d="M${at - 12},${height(curve.low)}H${at + 12}V${height(curve.high)}H${at - 12}Z"/><path class="new" d="M${at - 16},${height(curve.newLow)}h32M${at - 16},${height(curve.newHigh)}h32"/><path class="curve" d="M${at - 16},${height(curve.y)}h32"/>`;
}
