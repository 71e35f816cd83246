import { scaleLinear, scaleLog } from "d3-scale";
import { area, line } from "d3-shape";
import { measurementId } from "../../records/edition.ts";
import { endLabels, LABEL_ROOM, type LineEnd } from "./end-labels.ts";
import { celsius, significant } from "./figures.ts";
import {
  bottomAxis,
  celsiusAxisOnTop,
  clipped,
  domainOf,
  drawing,
  type Frame,
  frameOf,
  LEFT,
  leftAxis,
  RIGHT,
} from "./frame.ts";
import { escapeText, type Html, html, raw } from "./html.ts";
import { pointClass, pointMark, px } from "./marks.ts";
import type { DrawnMember, MixturePoint, MixtureView } from "./mixture-view.ts";

/** Steps in which a line is drawn. */
const STEPS = 48;
/** Most lines of compositions; the others are in the table. */
const MOST_LINES = 12;
/** Most marks drawn. */
const MOST_POINTS = 1500;
/** Marks of a plot stand off an exact temperature by at most so much, K. */
const NEAR_K = 2.5;

const inverse = (temperatureK: number): number => 1000 / temperatureK;

/** A line of the surface at one composition or one temperature. */
interface SurfaceLine {
  readonly across: readonly number[];
  readonly ln: readonly number[];
  readonly half: readonly number[];
  readonly fractions: readonly number[];
  readonly text: string;
}

function spread(low: number, high: number): number[] {
  return Array.from({ length: STEPS + 1 }, (_, i) => (i === STEPS ? high : low + ((high - low) * i) / STEPS));
}

/** `30 %` of the first solvent. */
export function percentOfFirst(fraction: number): string {
  return `${String(Number((100 * fraction).toFixed(1)))} %`;
}

/** Lines of the surface at the compositions measured. */
function compositionLines({ model, members }: MixtureView): SurfaceLine[] {
  const used = members.filter(({ member }) => model.temperaturesAt(member.fraction) !== undefined);
  const step = Math.ceil(used.length / MOST_LINES);
  return used
    .filter((_, i) => i % step === 0)
    .map(({ member: { fraction } }) => {
      const [low, high] = model.temperaturesAt(fraction) as readonly [number, number];
      const temperatures = spread(low, high);
      return {
        across: temperatures.map(inverse),
        ln: temperatures.map((T) => model.evaluate(fraction, T)),
        half: temperatures.map((T) => model.limits(fraction, T).curve),
        fractions: temperatures.map(() => fraction),
        text: percentOfFirst(fraction),
      };
    });
}

/** Lines of the surface over composition at round temperatures. */
function temperatureLines({ model, temperaturesK }: MixtureView): SurfaceLine[] {
  return temperaturesK.flatMap((T) => {
    const limits = model.fractionsAt(T);
    if (limits === undefined || !(limits[1] > limits[0])) return [];
    const fractions = spread(limits[0], limits[1]);
    return [
      {
        across: fractions.map((w) => 100 * w),
        ln: fractions.map((w) => model.evaluate(w, T)),
        half: fractions.map((w) => model.limits(w, T).curve),
        fractions,
        text: `${celsius(T).replace(/\.0$/, "")} °C`,
      },
    ];
  });
}

/** A frame whose right part is kept for labels. */
function framed(x: readonly [number, number], y: readonly [number, number]): Frame {
  const frame = frameOf(x, y, 52, 352);
  return { ...frame, x: scaleLinear(x, [LEFT, RIGHT - LABEL_ROOM]) };
}

function drawn(one: SurfaceLine, frame: Frame, of: (ln: number, i: number) => number, band: boolean): Html {
  const index = one.across.map((_, i) => i);
  const x = (i: number) => px(frame.x(one.across[i] as number));
  const y = (i: number, shift: number) => px(frame.y(of((one.ln[i] as number) + shift * (one.half[i] as number), i)));
  const finite = (i: number) => Number.isFinite(y(i, 1)) && Number.isFinite(y(i, -1));
  const path = line<number>(x, (i) => y(i, 0)).defined((i) => Number.isFinite(y(i, 0)));
  const shade = area<number>(
    x,
    (i) => y(i, -1),
    (i) => y(i, 1),
  ).defined(finite);
  const under = band ? `<path class="band" d="${shade.digits(null)(index) ?? ""}"/>` : "";
  return raw(`${under}<path class="curve" d="${path.digits(null)(index) ?? ""}"/>`);
}

function ends(lines: readonly SurfaceLine[], frame: Frame, of: (ln: number, one: SurfaceLine, i: number) => number) {
  return lines.flatMap((one): LineEnd[] => {
    const last = one.across.reduce((best, x, i) => (x > (one.across[best] as number) ? i : best), 0);
    const at = { x: frame.x(one.across[last] as number), y: frame.y(of(one.ln[last] as number, one, last)) };
    return Number.isFinite(at.x + at.y) ? [{ ...at, text: one.text }] : [];
  });
}

function mark(view: MixtureView, { mark: shape }: DrawnMember, point: MixturePoint, x: number, y: number): Html {
  if (!Number.isFinite(x + y)) return raw("");
  const state = point.used ? "kept" : "left out by the fit";
  const percent = significant(view.percentOf(point.ln, point.fraction), 4);
  const name = `${measurementId(view.edition, point.row)}: ${percentOfFirst(point.fraction)} ${view.first}, ${celsius(point.temperatureK)} °C, ${percent} g/100 g solvent${point.used ? "" : " (not used by the surface)"}`;
  return html`<g class="pt ${pointClass(shape, state)}" transform="translate(${px(x)},${px(y)})"><title>${escapeTitle(name)}</title>${pointMark(shape, state, false, true)}</g>`;
}

const escapeTitle = (text: string): Html => raw(escapeText(text, 200));

/** Every measurement, or an even choice of them where there are very many. */
function chosen(members: readonly DrawnMember[]): readonly (readonly [DrawnMember, MixturePoint])[] {
  const all = members.flatMap((member) => member.points.map((point) => [member, point] as const));
  const step = Math.ceil(all.length / MOST_POINTS);
  return all.filter((_, i) => i % step === 0);
}

/** ln x (ln r) against 1000/T: one line of the surface a composition, with the measurements. */
export function familyPlot(view: MixtureView): Html {
  const lines = compositionLines(view);
  const points = chosen(view.members);
  const frame = framed(
    domainOf([...lines.flatMap(({ across }) => across), ...points.map(([, p]) => inverse(p.temperatureK))], 0.04),
    domainOf([...lines.flatMap(({ ln }) => ln), ...points.map(([, p]) => p.ln)], 0.15),
  );
  const { letter, first } = view;
  const name = `ln ${letter} against 1000/T at each composition, ${view.title}`;
  const about = `One line a composition, from ${lines[0]?.text ?? ""} to ${lines.at(-1)?.text ?? ""} of ${first} by mass. The values are in the tables below.`;
  const yLabel = html`ln <tspan class="i">${letter}</tspan>${letter === "x" ? "  (mole fraction)" : "  (mass ratio, g/g)"}`;
  return drawing("plot-family", 400, name, about, [
    bottomAxis(frame, html`1000 K / <tspan class="i">T</tspan>`),
    leftAxis(frame, yLabel),
    celsiusAxisOnTop(frame),
    clipped(
      "plot-family",
      frame,
      lines.map((one) => drawn(one, frame, (ln) => ln, false)),
    ),
    ...points.map(([member, p]) => mark(view, member, p, frame.x(inverse(p.temperatureK)), frame.y(p.ln))),
    ...endLabels(
      ends(lines, frame, (ln) => ln),
      frame.top,
      frame.bottom,
    ),
  ]);
}

/** Axis of powers of ten left of the plot: the frame holds decadic logarithms. */
function logAxis({ y, top, bottom }: Frame, label: Html): Html {
  const [low = 0, high = 1] = y.domain();
  const ticks = scaleLog([10 ** low, 10 ** high], [0, 1]).ticks(8);
  const few = ticks.filter((tick) => ticks.length < 9 || /^[125]/.test(tick.toExponential()));
  const marks = few.map((tick) => {
    const at = px(y(Math.log10(tick)));
    return html`<path class="grid" d="M${LEFT},${at}H${RIGHT}"/><text class="tick ly" x="${LEFT - 7}" y="${at + 4}">${String(Number(tick.toPrecision(6)))}</text>`;
  });
  return html`${marks}<path class="axis" d="M${LEFT},${top}V${bottom}"/><text class="label" transform="translate(15,${(top + bottom) / 2}) rotate(-90)">${label}</text>`;
}

/** g/100 g solvent, logarithmic, against the composition: one line a round temperature, with the measurements near it. */
export function compositionPlot(view: MixtureView): Html {
  const lines = temperatureLines(view);
  const near = chosen(view.members).flatMap(([member, point]) => {
    const T = view.temperaturesK.find((t) => Math.abs(t - point.temperatureK) <= NEAR_K);
    return T === undefined || !view.model.temperaturesAt(point.fraction)
      ? []
      : [[member, moved(view, point, T)] as const];
  });
  const log = (ln: number, fraction: number) => Math.log10(view.percentOf(ln, fraction));
  const values = [
    ...lines.flatMap(({ ln, half, fractions }) =>
      ln.flatMap((value, i) => [-1, 0, 1].map((s) => log(value + s * (half[i] as number), fractions[i] as number))),
    ),
    ...near.map(([, point]) => log(point.ln, point.fraction)),
  ];
  const frame = framed(
    domainOf(
      lines.flatMap(({ across }) => across),
      5,
    ),
    domainOf(values, 0.15),
  );
  const name = `Solubility against composition at round temperatures, ${view.title}`;
  const about = `One line a temperature, from ${lines[0]?.text ?? ""} to ${lines.at(-1)?.text ?? ""}, over percent by mass of ${view.first} in the solvent. The values are in the tables below.`;
  return drawing("plot-composition", 400, name, about, [
    bottomAxis(frame, html`${view.first} in the solvent, % by mass`),
    logAxis(frame, html`g / 100 g solvent`),
    clipped(
      "plot-composition",
      frame,
      lines.map((one) => drawn(one, frame, (ln, i) => log(ln, one.fractions[i] as number), true)),
    ),
    ...near.map(([member, p]) => mark(view, member, p, frame.x(100 * p.fraction), frame.y(log(p.ln, p.fraction)))),
    ...endLabels(
      ends(lines, frame, (ln, one, i) => log(ln, one.fractions[i] as number)),
      frame.top,
      frame.bottom,
    ),
  ]);
}

/** A measurement brought to a temperature close by along the surface; as it is where the surface does not reach. */
function moved({ model }: MixtureView, point: MixturePoint, temperatureK: number): MixturePoint {
  const limits = model.temperaturesAt(point.fraction);
  const inside = (T: number) => limits !== undefined && T >= limits[0] && T <= limits[1];
  if (!inside(temperatureK) || !inside(point.temperatureK)) return point;
  const shift = model.evaluate(point.fraction, temperatureK) - model.evaluate(point.fraction, point.temperatureK);
  return { ...point, ln: point.ln + shift };
}
