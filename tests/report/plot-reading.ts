/** A point as it stands in the drawing: place (NaN for an interval, which has two), classes, text of its tooltip. */
export interface ReadPoint {
  readonly x: number;
  readonly y: number;
  readonly classes: readonly string[];
  readonly title: string;
}

type Ticks = readonly (readonly [value: number, place: number])[];

/** What a reader takes from a plot: labelled ticks of its axes, and its points. Places are in units of the drawing. */
export interface ReadPlot {
  readonly below: Ticks;
  readonly left: Ticks;
  readonly above: Ticks;
  readonly labels: readonly string[];
  readonly points: readonly ReadPoint[];
}

const plain = (markup: string): string =>
  markup
    .replace(/<[^>]*>/g, "")
    .replaceAll("&minus;", "-")
    .replaceAll("&lt;", "<")
    .replaceAll("&gt;", ">")
    .replaceAll("&quot;", '"')
    .replaceAll("&#39;", "'")
    .replaceAll("&amp;", "&");

/** Reads a plot of a page from its markup, by its labels alone. @throws Error where the page has no such plot */
export function readPlot(page: string, id: string): ReadPlot {
  const svg = new RegExp(`<svg class="plot" id="${id}".*?</svg>`, "s").exec(page)?.[0];
  if (svg === undefined) throw new Error(`no plot ${id} on this page`);
  const ticks = (kind: string, along: "x" | "y"): Ticks =>
    Array.from(svg.matchAll(new RegExp(`<text class="tick ${kind}" x="([^"]+)" y="([^"]+)">([^<]*)</text>`, "g"))).map(
      ([, x, y, text]) => [Number(plain(text ?? "").replaceAll(",", "")), Number(along === "x" ? x : y)],
    );
  const points = Array.from(
    svg.matchAll(/<g class="(pt [^"]*)"(?: transform="translate\(([^,]+),([^)]+)\)")?><title>([^<]*)<\/title>/g),
  );
  return {
    below: ticks("bx", "x"),
    left: ticks("ly", "y"),
    above: ticks("tx", "x"),
    labels: Array.from(svg.matchAll(/<text class="label"[^>]*>(.*?)<\/text>/g)).map(([, text]) => plain(text ?? "")),
    points: points.map(([, classes = "", x, y, title = ""]) => ({
      x: Number(x),
      y: Number(y),
      classes: classes.split(" "),
      title: plain(title),
    })),
  };
}

/** Value at a place, by the straight line through the first and last labelled tick. */
export function valueAt(ticks: Ticks, place: number): number {
  const [first, last] = [ticks[0], ticks.at(-1)];
  if (first === undefined || last === undefined || first === last) throw new Error("an axis needs two labels");
  return first[0] + ((place - first[1]) / (last[1] - first[1])) * (last[0] - first[0]);
}

/** Distance between the first and last label of an axis, in its unit. */
export function spanOf(ticks: Ticks): number {
  return Math.abs((ticks.at(-1)?.[0] ?? Number.NaN) - (ticks[0]?.[0] ?? Number.NaN));
}
