import { area, line } from "d3-shape";
import type { Curve, CurveWithout, SourceStanding } from "../../records/fits.ts";
import { percentOff, sourceLetter } from "./figures.ts";
import { bottomAxis, clipped, domainOf, drawing, type Frame, frameOf, LEFT, leftAxis, RIGHT } from "./frame.ts";
import { type Html, html, raw } from "./html.ts";
import { px } from "./marks.ts";
import { inCelsius } from "./plots.ts";
import type { SystemView } from "./system-view.ts";

/** Relative change in percent that a difference of ln values means. */
export const inPercent = (difference: number): number => 100 * Math.expm1(difference);

/** Most sources drawn; all are in the table. */
const MOST_DRAWN = 12;
const [ROW, TOP, STEPS, INKS] = [26, 16, 24, 6];

const ink = (view: SystemView, source: number) => view.sources.indexOf(source) % INKS;
const letterOf = (view: SystemView, source: number) => sourceLetter(view.sources.indexOf(source));

/** Offsets of the sources from the curve of the others, percent, each with its 95 % limits as a bar. */
export function offsetPlot(view: SystemView, standings: readonly SourceStanding[]): Html | undefined {
  const drawn = standings.filter(({ offset }) => Number.isFinite(offset)).slice(0, MOST_DRAWN);
  if (drawn.length === 0) return undefined;
  const bottom = TOP + ROW * drawn.length;
  const ends = drawn.flatMap(({ offset, low, high }) => {
    // Limits from very few points may reach far beyond anything that can be read.
    const reach = Math.max(3 * Math.abs(offset), 0.3);
    return [0, inPercent(Math.max(low, -reach)), inPercent(Math.min(high, reach))];
  });
  const frame = frameOf(domainOf(ends, 1), [0, drawn.length], TOP, bottom);
  const several = new Set(standings.map(({ branch }) => branch)).size > 1;
  const heights = drawn.map((_, i) => TOP + ROW * (i + 0.5));
  const bars = drawn.map(({ source, offset, low, high }, i) => {
    const at = (value: number) => px(frame.x(inPercent(value)));
    const y = heights[i] as number;
    return html`<g class="s${ink(view, source)}"><path class="whisker" d="M${at(low)},${y}H${at(high)}"/><circle class="kept" cx="${at(offset)}" cy="${y}" r="4.5"/></g>`;
  });
  const names = drawn.map(
    ({ source, branch }, i) =>
      html`<text class="campname s${ink(view, source)}" x="${LEFT - 8}" y="${(heights[i] as number) + 4.5}">${letterOf(view, source)}${several ? ` ${branch}` : ""}</text>`,
  );
  const zero = px(frame.x(0));
  const words = drawn
    .map(({ source, offset }) => `${letterOf(view, source)} ${percentOff(inPercent(offset))} %`)
    .join(", ");
  return drawing("plot-offsets", bottom + 50, "Offsets of the sources, percent", `Offset of each source: ${words}`, [
    bottomAxis(frame, html`offset from the curve of the others, %`),
    clipped("plot-offsets", frame, [html`<path class="axis" d="M${zero},${TOP}V${bottom}"/>`, ...bars]),
    ...names,
  ]);
}

interface Change {
  readonly source: number;
  readonly spots: readonly (readonly [celsius: number, percent: number])[];
}

function temperatures(low: number, high: number): number[] {
  return Array.from({ length: STEPS + 1 }, (_, i) => Math.min(high, low + ((high - low) * i) / STEPS));
}

function changeOf(curve: Curve, source: number, left: CurveWithout): Change {
  const low = Math.max(curve.temperatureRangeK[0], left.temperatureRangeK[0]);
  const high = Math.min(curve.temperatureRangeK[1], left.temperatureRangeK[1]);
  if (!(high > low)) return { source, spots: [] };
  const spots = temperatures(low, high).map(
    (T) => [inCelsius(T), inPercent(left.evaluate(T) - curve.evaluate(T))] as const,
  );
  return { source, spots };
}

/** The curve without each source against the published one, percent, over the 95 % limits of the published curve. */
export function withoutPlot(view: SystemView, standings: readonly SourceStanding[]): Html | undefined {
  const curves = view.fit?.curves ?? [];
  const changes = standings.slice(0, MOST_DRAWN).flatMap(({ source, branch, without }) => {
    const curve = curves.find((one) => one.branch === branch);
    return curve === undefined || without === undefined ? [] : [changeOf(curve, source, without)];
  });
  const lines = changes.filter(({ spots }) => spots.length > 0);
  if (lines.length === 0) return undefined;
  const bands = curves
    .filter(({ temperatureRangeK: [low, high] }) => high > low)
    .map(({ temperatureRangeK: [low, high], limits }) =>
      temperatures(low, high).map((T) => [inCelsius(T), limits(T).curve] as const),
    );
  const reach = bands.flat().flatMap(([, half]) => [inPercent(-half), inPercent(Math.min(half, 1))]);
  const frame = frameOf(
    domainOf(
      curves.flatMap(({ temperatureRangeK }) => temperatureRangeK.map(inCelsius)),
      1,
    ),
    domainOf([...reach, ...lines.flatMap(({ spots }) => spots.map(([, percent]) => percent))], 1),
    TOP,
    252,
  );
  const shade = area<readonly [number, number]>(
    ([t]) => px(frame.x(t)),
    ([, half]) => px(frame.y(inPercent(-half))),
    ([, half]) => px(frame.y(inPercent(half))),
  ).digits(null);
  const draw = line<readonly [number, number]>(
    ([t]) => px(frame.x(t)),
    ([, percent]) => px(frame.y(percent)),
  ).digits(null);
  const inside = [
    ...bands.map((band) => raw(`<path class="band" d="${shade(band) ?? ""}"/>`)),
    ...lines.map(({ source, spots }) => raw(`<path class="camp s${ink(view, source)}" d="${draw(spots) ?? ""}"/>`)),
  ];
  return drawing(
    "plot-without",
    300,
    "Curve without each source, percent",
    `${lines.length} curves, each without one source, against the published curve`,
    [
      bottomAxis(frame, html`temperature, °C`),
      leftAxis(frame, html`change, %`),
      clipped("plot-without", frame, inside),
      ...endLabels(view, frame, lines),
    ],
  );
}

/** `without A` at the warm end of each line, kept a line of text apart. */
function endLabels(view: SystemView, frame: Frame, lines: readonly Change[]): Html[] {
  const ends = lines
    .map(({ source, spots }) => ({ source, end: spots.at(-1) as readonly [number, number] }))
    .map(({ source, end: [t, percent] }) => ({
      source,
      x: Math.min(RIGHT - 4, px(frame.x(t))),
      y: px(frame.y(percent)) - 6,
    }))
    .sort((a, b) => a.y - b.y);
  let before = frame.top - 4;
  return ends.map(({ source, x, y }) => {
    before = Math.max(y, before + 15);
    return html`<text class="campname s${ink(view, source)}" x="${x}" y="${px(before)}">without ${letterOf(view, source)}</text>`;
  });
}
