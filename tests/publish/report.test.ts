import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { reportPages } from "../../pipeline/publish/report/report.ts";
import { STYLE } from "../../pipeline/publish/report/style.ts";
import { readPlot, spanOf, valueAt } from "../report/plot-reading.ts";
import { type WrittenReport, writeReport } from "../report/written-report.ts";

const demo = fileURLToPath(new URL("../../datasets/demo/", import.meta.url));
/** A point stands where its label says within this part of the axis: the coordinates are rounded to a tenth. */
const TENTH = 0.001;

let report: WrittenReport;
let rows: Record<string, string | undefined>[];
const systemPage = (id: string) => readFileSync(join(report.folder, "report", "systems", `${id}.html`), "utf8");

beforeAll(async () => {
  report = await writeReport(demo);
  rows = parse(readFileSync(join(report.folder, "measurements.csv"), "utf8"), { columns: true });
});
afterAll(() => report?.remove());

/** Class of the mark that a row of measurements.csv must have. */
function markOf({
  status,
  weight,
}: Record<string, string | undefined>): "kept" | "left" | "interval" | "notfitted" | "aside" {
  if (status === "set aside") return "aside";
  if (status === "interval") return "interval";
  if (status === "not fitted") return "notfitted";
  return weight === "0" ? "left" : "kept";
}

test("each plot holds exactly the measurements of its system in measurements.csv, each with the mark of its status", () => {
  const seen = { kept: 0, left: 0, interval: 0, notfitted: 0, aside: 0 };
  for (const { id } of report.edition.systems) {
    const own = rows.filter(({ system }) => system === id);
    for (const plot of ["plot-ln", "plot-mass"]) {
      const { points } = readPlot(systemPage(id), plot);
      expect(points, `${plot} of ${id}`).toHaveLength(own.length);
      for (const row of own) {
        const point = points.find(({ title }) => title.includes(` ${row.measurement_id}: `));
        expect(point?.classes, row.measurement_id).toContain(markOf(row));
        seen[markOf(row)]++;
      }
    }
  }
  for (const mark of ["kept", "left", "interval", "notfitted"] as const) expect(seen[mark], mark).toBeGreaterThan(0);
});

test("each point of g/100 g solvent against °C stands where the labels of the axes say", () => {
  let checked = 0;
  for (const { id } of report.edition.systems) {
    const { below, left, labels, points } = readPlot(systemPage(id), "plot-mass");
    expect(labels).toEqual(["temperature, °C", "g / 100 g solvent"]);
    for (const row of rows.filter(({ system, status }) => system === id && status !== "interval")) {
      const point = points.find(({ title }) => title.includes(` ${row.measurement_id}: `));
      if (point === undefined || point.classes.includes("beyond")) continue;
      const celsius = Number(row.temperature_K) - 273.15;
      expect(Math.abs(valueAt(below, point.x) - celsius) / spanOf(below), row.measurement_id).toBeLessThan(TENTH);
      // The text of a tick stands 4 units below its line.
      const height = valueAt(left, point.y + 4);
      expect(Math.abs(height - Number(row.g_per_100g_solvent)) / spanOf(left), row.measurement_id).toBeLessThan(
        2 * TENTH,
      );
      checked++;
    }
  }
  expect(checked).toBeGreaterThan(300);
});

test("each point of ln x against 1000/T stands where the labels say, and the °C axis above agrees with the one below", () => {
  for (const { id } of report.edition.systems) {
    const { below, left, above, labels, points } = readPlot(systemPage(id), "plot-ln");
    expect(labels).toEqual(["1000 K / T", "ln x  (mole fraction)", "temperature, °C"]);
    for (const [celsius, place] of above) {
      expect(Math.abs(valueAt(below, place) - 1000 / (celsius + 273.15)) / spanOf(below)).toBeLessThan(TENTH);
    }
    for (const row of rows.filter(({ system, status }) => system === id && status !== "interval")) {
      const point = points.find(({ title }) => title.includes(` ${row.measurement_id}: `));
      if (point === undefined || point.classes.includes("beyond")) continue;
      const inverse = 1000 / Number(row.temperature_K);
      expect(Math.abs(valueAt(below, point.x) - inverse) / spanOf(below), row.measurement_id).toBeLessThan(TENTH);
      const ln = Math.log(Number(row.mole_fraction));
      expect(Math.abs(valueAt(left, point.y + 4) - ln) / spanOf(left), row.measurement_id).toBeLessThan(2 * TENTH);
    }
  }
});

test("a page tells every measurement with its line, and every flag of the system with its evidence", () => {
  for (const system of report.edition.systems) {
    const page = systemPage(system.id);
    const table = /<table class="measurements">.*?<\/table>/s.exec(page)?.[0] ?? "";
    expect(table.match(/<th scope="row"/g) ?? [], system.id).toHaveLength(system.rows.length);
    const flags = report.edition.flags.filter((flag) => flag.system === system.index);
    expect(page.match(/<div class="flag/g) ?? [], system.id).toHaveLength(flags.length);
  }
});

test("the same edition gives the same bytes, and every internal link leads to a page and an anchor that exist", () => {
  const first = new Map(reportPages(report.edition));
  for (const [name, text] of reportPages(report.edition)) expect(first.get(name) === text, name).toBe(true);
  expect([...first.keys()].sort()).toEqual(
    readdirSync(join(report.folder, "report"), { recursive: true })
      .map(String)
      .filter((name) => name.endsWith(".html"))
      .sort(),
  );
  for (const [name, text] of first) {
    for (const [, link = ""] of text.matchAll(/<a [^>]*href="([^"]*)"/g)) {
      const url = new URL(link, `file:///${name}`);
      const target = first.get(decodeURIComponent(url.pathname.slice(1)));
      expect(target, `${link} on ${name}`).toBeDefined();
      if (url.hash !== "") expect(target, `${link} on ${name}`).toContain(`id="${url.hash.slice(1)}"`);
    }
  }
});

describe("the inks of the style", () => {
  /** Relative luminance and contrast: WCAG 2.2, definitions. */
  const luminance = (hex: string) => {
    const [r = 0, g = 0, b = 0] = [1, 3, 5].map((i) => {
      const c = Number.parseInt(hex.slice(i, i + 2), 16) / 255;
      return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
    });
    return 0.2126 * r + 0.7152 * g + 0.0722 * b;
  };
  const contrast = (a: string, b: string) => {
    const [dark = 0, light = 0] = [luminance(a), luminance(b)].sort((x, y) => x - y);
    return (light + 0.05) / (dark + 0.05);
  };
  const schemes = Array.from(STYLE.matchAll(/:root\{[^}]*--paper:[^}]*\}/g)).map(([text]) => {
    const inks = new Map(Array.from(text.matchAll(/--([a-z0-9]+):(#[0-9a-f]{3,6})/g), ([, name, hex]) => [name, hex]));
    return inks as Map<string, string>;
  });

  // WCAG 2.2 AA: 4.5 for text (success criterion 1.4.3), which covers the 3 for marks (1.4.11).
  test("stand out from the paper by at least 4.5 in light, in dark and in print", () => {
    expect(schemes).toHaveLength(3);
    for (const inks of schemes) {
      const long = (hex = "") => (hex.length === 4 ? `#${[...hex.slice(1)].map((c) => c + c).join("")}` : hex);
      const paper = long(inks.get("paper"));
      for (const name of ["ink", "soft", "link", "mark", "s0", "s1", "s2", "s3", "s4", "s5"]) {
        expect(contrast(long(inks.get(name)), paper), name).toBeGreaterThanOrEqual(4.5);
      }
    }
  });
});
