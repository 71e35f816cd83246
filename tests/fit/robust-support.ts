import type { SystemPoints } from "../../pipeline/records/systems.ts";

/** A straight van 't Hoff line in ln x with d ln x/dT = 0.03 per K at 25 °C and ln x = -4 there; an invented solute. */
export function lineAt(celsius: number): number {
  return -4 + 0.03 * 298.15 * (1 - 298.15 / (celsius + 273.15));
}

/** Small, fixed scatter that sums to about 0: real series are not exact. */
const SCATTER = [0.01, -0.012, 0.004, 0.011, -0.009, -0.003, 0.008, -0.01, 0.002, -0.001];

/** One source's series on the line: temperatures in °C, a shift of the whole series, shifts of single points by index. */
export interface Series {
  readonly source: number;
  readonly celsius: readonly number[];
  readonly shift?: number;
  readonly faults?: Readonly<Record<number, number>>;
}

/** Points of one system made of such series. */
export function pointsOf(...series: readonly Series[]): SystemPoints {
  const all = series.flatMap(({ source, celsius, shift = 0, faults = {} }) =>
    celsius.map((t, i) => ({
      source,
      t,
      y: lineAt(t) + shift + (faults[i] ?? 0) + SCATTER[(i + 3 * source) % SCATTER.length]!,
    })),
  );
  const reals = (of: (point: (typeof all)[number]) => number) => Float64Array.from(all, of);
  return {
    n: all.length,
    row: Int32Array.from(all, (_, i) => i),
    temperatureK: reals(({ t }) => t + 273.15),
    temperatureU: reals(() => 0.1),
    lnValue: reals(({ y }) => y),
    lnU: reals(() => 0.015),
    source: Int32Array.from(all, ({ source }) => source),
    level: reals(() => 50),
  };
}

/** The points in another order: `order[i]` comes i-th. */
export function reordered(points: SystemPoints, order: readonly number[]): SystemPoints {
  const reals = (column: Float64Array) => Float64Array.from(order, (i) => column[i]!);
  const whole = (column: Int32Array) => Int32Array.from(order, (i) => column[i]!);
  return {
    n: points.n,
    row: whole(points.row),
    temperatureK: reals(points.temperatureK),
    temperatureU: reals(points.temperatureU),
    lnValue: reals(points.lnValue),
    lnU: reals(points.lnU),
    source: whole(points.source),
    level: reals(points.level),
  };
}
