import { campLayer } from "./camp-layer.ts";
import { type CurveLine, curveLayer } from "./curve-layer.ts";
import { significant } from "./figures.ts";
import { bottomAxis, celsiusAxisOnTop, clipped, domainOf, drawing, frameOf, leftAxis } from "./frame.ts";
import { type Html, html } from "./html.ts";
import { pointLayer } from "./point-layer.ts";
import { type DrawnCurve, type DrawnPoint, percentFromLn, type SystemView, titleOf } from "./system-view.ts";
import { transitionLayer } from "./transition-layer.ts";

/** A drawing with what its caption must say. */
export interface PlotPicture {
  readonly svg: Html;
  readonly beyond: number;
  readonly thinned: number;
}

const inverse = (temperatureK: number): number => 1000 / temperatureK;
export const inCelsius = (temperatureK: number): number => temperatureK - 273.15;

/** Least span, K, and how many spans beyond what the curve needs other points may stretch an axis of temperature. */
const [LEAST_SPAN_K, STRETCH] = [30, 0.6];

/**
 * Range of temperatures shown, K: that of the curve and the kept points, stretched for other points that are not far
 * away. A temperature read in the wrong unit must not press a system into a corner of its plot.
 */
export function temperaturesShown({ points, curves }: SystemView): readonly number[] {
  const temperature = (point: DrawnPoint) => point.temperatureK;
  const kept = points.filter(({ state }) => state === "kept").map(temperature);
  const needed = [...kept, ...curves.flatMap(({ temperatureK }) => temperatureK)];
  if (needed.length === 0) return points.map(temperature);
  const [low, high] = [Math.min(...needed), Math.max(...needed)];
  const room = STRETCH * Math.max(high - low, LEAST_SPAN_K);
  return [...needed, ...points.map(temperature).filter((t) => t >= low - room && t <= high + room)];
}

/** The limits of a curve as values: `of` turns ln value into the units of the plot. */
function curveLine(curve: DrawnCurve, across: (temperatureK: number) => number, of: (ln: number) => number): CurveLine {
  const shifted = (half: readonly number[], sign: number) =>
    curve.ln.map((ln, i) => of(ln + sign * (half[i] as number)));
  return {
    x: curve.temperatureK.map(across),
    y: curve.ln.map(of),
    low: shifted(curve.halfCurve, -1),
    high: shifted(curve.halfCurve, 1),
    newLow: shifted(curve.halfNew, -1),
    newHigh: shifted(curve.halfNew, 1),
  };
}

function describe(view: SystemView, what: string): string {
  const counts = new Map<string, number>();
  for (const { state } of view.points) counts.set(state, (counts.get(state) ?? 0) + 1);
  const points = [...counts].map(([state, count]) => `${count} ${state}`).join(", ");
  const curve = view.fit?.curves.map(({ model }) => model).join(", ") || "no curve";
  return `${what}. Measurements: ${points}. Curve: ${curve}. Every value is in the table of measurements below.`;
}

/** ln x (or ln r) against 1000/T with the temperature in °C on top: a van 't Hoff line is straight here. */
export function vantHoffPlot(view: SystemView): PlotPicture {
  const { system, points } = view;
  const curves = view.curves.map((curve) => curveLine(curve, inverse, (ln) => ln));
  const frame = frameOf(
    domainOf(temperaturesShown(view).map(inverse), 0.04),
    domainOf(
      [...points.flatMap((p) => [p.ln, p.lnLow, p.lnHigh]), ...curves.flatMap((c) => [...c.newLow, ...c.newHigh])],
      0.15,
    ),
    52,
    352,
  );
  const letter = system.fitBasis === "ln x" ? "x" : "r";
  const layer = pointLayer(view, frame, (point) => ({
    x: inverse(point.temperatureK),
    y: point.ln,
    low: point.lnLow,
    high: point.lnHigh,
    value: `ln ${letter} = ${significant(point.ln, 4) || `${significant(point.lnLow, 4)} to ${significant(point.lnHigh, 4)}`}`,
  }));
  const name = `ln ${letter} against 1000/T, ${titleOf(system.identity)}`;
  const yLabel = html`ln <tspan class="i">${letter}</tspan>${system.fitBasis === "ln x" ? "  (mole fraction)" : "  (mass ratio, g/g)"}`;
  const svg = drawing("plot-ln", 400, name, describe(view, `Natural logarithm of ${letter} against 1000 K/T`), [
    bottomAxis(frame, html`1000 K / <tspan class="i">T</tspan>`),
    leftAxis(frame, yLabel),
    celsiusAxisOnTop(frame),
    clipped("plot-ln", frame, [
      ...curves.map((curve) => curveLayer(curve, frame)),
      campLayer(view, frame, inverse, (ln) => ln),
      transitionLayer(view, frame, inverse),
    ]),
    layer.marks,
  ]);
  return { svg, beyond: layer.beyond, thinned: layer.thinned };
}

/** How far the plot reaches beyond what the curve and the kept points need, before other points are put on its edge. */
const HEADROOM = 1.6;

/** Upper end of the g/100 g axis: all points, unless a few far ones would press the curve to the ground. */
function upperEnd(points: readonly DrawnPoint[], curves: readonly CurveLine[]): number {
  const top = (values: readonly number[]) => values.reduce((a, b) => (Number.isFinite(b) && b > a ? b : a), 0);
  const all = top(points.flatMap((p) => [p.percent, p.percentLow, p.percentHigh]));
  const needed = top([
    ...points.filter(({ state }) => state === "kept").map(({ percent }) => percent),
    ...curves.flatMap(({ y }) => y.map((value) => 1.15 * value)),
  ]);
  const limits = Math.min(top(curves.flatMap(({ newHigh }) => newHigh)), 1.5 * needed);
  return needed > 0 && all > HEADROOM * needed ? HEADROOM * needed : Math.max(all, limits) || 1;
}

/** g of unsolvated solute per 100 g of solvent against °C: the curve as it is planned with. */
export function solubilityPlot(view: SystemView): PlotPicture {
  const { system, points } = view;
  const curves = view.curves.map((curve) => curveLine(curve, inCelsius, (ln) => percentFromLn(ln, system)));
  const frame = frameOf(
    domainOf(temperaturesShown(view).map(inCelsius), 5),
    [0, 1.05 * upperEnd(points, curves)],
    52,
    352,
  );
  const layer = pointLayer(view, frame, (point) => ({
    x: inCelsius(point.temperatureK),
    y: point.percent,
    low: point.percentLow,
    high: point.percentHigh,
    value: `${significant(point.percent, 4) || `${significant(point.percentLow, 4)} to ${significant(point.percentHigh, 4)}`} g/100 g solvent`,
  }));
  const name = `g/100 g solvent against temperature, ${titleOf(system.identity)}`;
  const svg = drawing("plot-mass", 400, name, describe(view, "Grams of solute per 100 g of solvent against °C"), [
    bottomAxis(frame, html`temperature, °C`),
    leftAxis(frame, html`g / 100 g solvent`),
    clipped("plot-mass", frame, [
      ...curves.map((curve) => curveLayer(curve, frame)),
      campLayer(view, frame, inCelsius, (ln) => percentFromLn(ln, system)),
      transitionLayer(view, frame, inCelsius),
    ]),
    layer.marks,
  ]);
  return { svg, beyond: layer.beyond, thinned: layer.thinned };
}
