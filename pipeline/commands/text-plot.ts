/** One point of a plot made of characters. */
export interface TextPoint {
  readonly x: number;
  readonly y: number;
  /** One character. */
  readonly mark: string;
}

/** What a plot made of characters shows. */
export interface TextPlot {
  readonly xLabel: string;
  readonly yLabel: string;
  readonly points: readonly TextPoint[];
  /** Drawn as dots, below the points. */
  readonly curve: readonly { readonly x: number; readonly y: number }[];
}

const [COLUMNS, ROWS] = [60, 16];
/** Mark of a place that points of several marks share. */
const SEVERAL = "*";
/** A logarithmic axis is used where values span more than this factor. */
const WIDE_FACTOR = 25;

const label = (value: number): string => String(Number(value.toPrecision(3)));

/** Ends of an axis; a single value gets room on both sides. */
function ends(values: readonly number[]): readonly [number, number] {
  const [low, high] = [Math.min(...values), Math.max(...values)];
  if (high > low) return [low, high];
  const room = Math.abs(low) > 0 ? 0.1 * Math.abs(low) : 1;
  return [low - room, high + room];
}

/**
 * A small plot as lines of text: points by their mark, `*` where several sources share a place, the curve as dots. The
 * upright axis is logarithmic where the values span more than a factor 25, and says so. No lines where nothing is finite.
 */
export function textPlot({ xLabel, yLabel, points, curve }: TextPlot): string[] {
  const usable = <P extends { readonly x: number; readonly y: number }>(all: readonly P[]) =>
    all.filter(({ x, y }) => Number.isFinite(x) && Number.isFinite(y) && y > 0);
  const [drawn, dots] = [usable(points), usable(curve)];
  const all = [...drawn, ...dots];
  if (all.length === 0) return [];
  const heights = all.map(({ y }) => y);
  const logarithmic = Math.max(...heights) > WIDE_FACTOR * Math.min(...heights);
  const scale = (y: number) => (logarithmic ? Math.log(y) : y);
  const [left, right] = ends(all.map(({ x }) => x));
  const [bottom, top] = ends(heights.map(scale));
  const cells = Array.from({ length: ROWS }, () => new Array<string>(COLUMNS).fill(" "));
  const put = (x: number, y: number, mark: string) => {
    const row = cells[Math.round(((top - scale(y)) / (top - bottom)) * (ROWS - 1))];
    const column = Math.round(((x - left) / (right - left)) * (COLUMNS - 1));
    if (row === undefined) return;
    const before = row[column];
    row[column] = before === " " || before === "." || before === mark ? mark : SEVERAL;
  };
  for (const { x, y } of dots) put(x, y, ".");
  for (const { x, y, mark } of drawn) put(x, y, mark);
  const value = (row: number) => {
    const y = top - ((top - bottom) * row) / (ROWS - 1);
    return label(logarithmic ? Math.exp(y) : y);
  };
  const gutter = Math.max(...[0, 5, 10, ROWS - 1].map((row) => value(row).length));
  const lines = cells.map((row, i) => {
    const tick = i % 5 === 0 ? value(i).padStart(gutter) : " ".repeat(gutter);
    return `${tick} ${i % 5 === 0 ? "+" : "|"}${row.join("")}`.trimEnd();
  });
  const middle = label((left + right) / 2);
  const foot =
    label(left).padEnd(COLUMNS / 2 - Math.ceil(middle.length / 2)) +
    middle.padEnd(COLUMNS / 2 + Math.ceil(middle.length / 2) - label(right).length) +
    label(right);
  return [
    `${yLabel}${logarithmic ? " (logarithmic)" : ""}`,
    ...lines,
    `${" ".repeat(gutter)} +${"-".repeat(COLUMNS)}`,
    `${" ".repeat(gutter + 2)}${foot}`,
    `${" ".repeat(gutter + 2)}${xLabel.padStart(Math.floor((COLUMNS + xLabel.length) / 2))}`,
  ];
}
