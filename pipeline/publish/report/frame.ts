import { type ScaleLinear, scaleLinear } from "d3-scale";
import { type Html, html, raw } from "./html.ts";
import { px } from "./marks.ts";

/** Size of a plot's drawing, in its own units; the page scales it. */
export const WIDTH = 520;
export const LEFT = 64;
export const RIGHT = WIDTH - 14;

/** Scales and edges of one plot. */
export interface Frame {
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number>;
  readonly top: number;
  readonly bottom: number;
}

/** Lowest and highest of the finite numbers with 5 % of room at each end; `least` is the room around a single value. */
export function domainOf(values: readonly number[], least: number): [low: number, high: number] {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of values) {
    if (!Number.isFinite(value)) continue;
    if (value < low) low = value;
    if (value > high) high = value;
  }
  if (low > high) return [0, 1];
  const room = Math.max(0.05 * (high - low), high - low > 1e-9 ? 0 : least);
  return [low - room, high + room];
}

/** A frame over two domains, between the heights `top` and `bottom`. */
export function frameOf(
  x: readonly [number, number],
  y: readonly [number, number],
  top: number,
  bottom: number,
): Frame {
  return { x: scaleLinear(x, [LEFT, RIGHT]), y: scaleLinear(y, [bottom, top]), top, bottom };
}

/** Axis below the plot with its grid lines and label. */
export function bottomAxis({ x, top, bottom }: Frame, label: Html): Html {
  const format = x.tickFormat(6);
  const ticks = x.ticks(6).map((tick) => {
    const at = px(x(tick));
    return html`<path class="grid" d="M${at},${top}V${bottom}"/><text class="tick bx" x="${at}" y="${bottom + 19}">${format(tick)}</text>`;
  });
  return html`${ticks}<path class="axis" d="M${LEFT},${bottom}H${RIGHT}"/><text class="label" x="${(LEFT + RIGHT) / 2}" y="${bottom + 40}">${label}</text>`;
}

/** Axis left of the plot with its grid lines and label. */
export function leftAxis({ y, top, bottom }: Frame, label: Html): Html {
  const format = y.tickFormat(6);
  const ticks = y.ticks(6).map((tick) => {
    const at = px(y(tick));
    return html`<path class="grid" d="M${LEFT},${at}H${RIGHT}"/><text class="tick ly" x="${LEFT - 7}" y="${at + 4}">${format(tick)}</text>`;
  });
  return html`${ticks}<path class="axis" d="M${LEFT},${top}V${bottom}"/><text class="label" transform="translate(15,${(top + bottom) / 2}) rotate(-90)">${label}</text>`;
}

/** Least room between two labels of the upper axis. */
const LEAST_GAP = 30;

/** Axis above a plot against 1000/T that tells the temperature in °C at round values. */
export function celsiusAxisOnTop({ x, top }: Frame): Html {
  const [low = 0, high = 1] = x.domain();
  const toCelsius = (inverse: number) => 1000 / inverse - 273.15;
  const ticks = scaleLinear([toCelsius(high), toCelsius(low)], [0, 1]).ticks(6);
  let before = Number.POSITIVE_INFINITY;
  const marks = ticks.map((t) => {
    const at = px(x(1000 / (t + 273.15)));
    // Ticks crowd at the warm end, where 1000/T runs slowly.
    if (before - at < LEAST_GAP) return raw("");
    before = at;
    return html`<path class="axis" d="M${at},${top}v-5"/><text class="tick tx" x="${at}" y="${top - 10}">${String(t).replace("-", "−")}</text>`;
  });
  return html`<path class="axis" d="M${LEFT},${top}H${RIGHT}"/>${marks}<text class="label" x="${(LEFT + RIGHT) / 2}" y="${top - 28}">temperature, °C</text>`;
}

/** A whole drawing with its name and description for those who cannot see it. */
export function drawing(id: string, height: number, name: string, description: string, parts: readonly Html[]): Html {
  return html`<svg class="plot" id="${id}" viewBox="0 0 ${WIDTH} ${height}" width="${WIDTH}" height="${height}" role="img" aria-labelledby="${id}-name ${id}-about"><title id="${id}-name">${name}</title><desc id="${id}-about">${description}</desc>${parts}</svg>`;
}

/** A clip to the inside of the frame, and a group drawn under it. */
export function clipped(id: string, { top, bottom }: Frame, inside: readonly Html[]): Html {
  return html`<clipPath id="${id}-inside"><rect x="${LEFT}" y="${top}" width="${RIGHT - LEFT}" height="${bottom - top}"/></clipPath><g clip-path="url(#${raw(id)}-inside)">${inside}</g>`;
}
