import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { expect, test, vi } from "vitest";
import { seededRandom } from "../../pipeline/numerics/random.ts";
import { mixtureFormula, mixtureLinks, mixtureList, mixturePage } from "../../pipeline/publish/report/mixture-page.ts";
import { type MixtureReading, readingsOn, textbook } from "../fit/mixture-support.ts";
import { axeViolations, hasChromium, openPage, overflowOf, startBrowser } from "./chromium.ts";
import { mixtureEdition } from "./mixture-edition.ts";

vi.setConfig({ testTimeout: 120_000 });

const COMPOSITIONS = [0, 0.1, 0.2, 0.35, 0.5, 0.65, 0.8, 0.9, 1];
const TEMPERATURES = [278.15, 288.15, 298.15, 308.15, 318.15, 328.15];
const truth = textbook([5, -2200, 1, -2900, 1700, 900, 300]);

function readings(): MixtureReading[] {
  const { normal } = seededRandom(3);
  return readingsOn(COMPOSITIONS, TEMPERATURES, truth, () => 0.02 * normal());
}

const made = mixtureEdition(readings());
const text = mixturePage(made.edition, made.model);

/** Texts of elements of a class, tags taken off. */
function textsOf(page: string, opening: RegExp): string[] {
  return [...page.matchAll(opening)].map(([, inside = ""]) => inside.replace(/<[^>]*>/g, "").trim());
}

/** Numbers of the points of a path. */
function pointsOf(path: string): [number, number][] {
  return [...path.matchAll(/[ML]?(-?[\d.]+),(-?[\d.]+)/g)].map(([, x, y]) => [Number(x), Number(y)]);
}

test("Every composition and every round temperature has its line, named in words at its end", () => {
  const [family = "", composition = ""] = text.split('<svg class="plot"').slice(1);
  expect(textsOf(family, /<text class="end"[^>]*>([^<]*)/g).sort()).toEqual(
    ["0 %", "10 %", "100 %", "20 %", "35 %", "50 %", "65 %", "80 %", "90 %"].sort(),
  );
  expect(textsOf(composition, /<text class="end"[^>]*>([^<]*)/g)).toEqual([
    "55 °C",
    "45 °C",
    "35 °C",
    "25 °C",
    "15 °C",
    "5 °C",
  ]);
  expect(family.match(/<path class="curve"/g)).toHaveLength(9);
  expect(composition.match(/<path class="curve"/g)).toHaveLength(6);
});

test("Lines and marks are drawn where the values are, on a scale read off the axes", () => {
  const composition = text.split('<svg class="plot"')[2] ?? "";
  // Two ticks of the logarithmic axis give the scale of the drawing.
  const ticks = [...composition.matchAll(/<text class="tick ly" x="57" y="([\d.]+)">([\d.]+)</g)].map(
    ([, y, value]) => [Number(y) - 4, Math.log10(Number(value))] as const,
  );
  const [a, b] = [ticks[0]!, ticks.at(-1)!];
  const logAt = (y: number) => a[1] + ((y - a[0]) / (b[0] - a[0])) * (b[1] - a[1]);
  const lines = [...composition.matchAll(/<path class="curve" d="([^"]+)"/g)].map(([, d]) => pointsOf(d!));
  // Pure first solvent, at the right end of the line of 25 °C: x to g/100 g with the molar masses 150 and 40 g/mol.
  const at25 = lines[2]!;
  const x = Math.exp(made.model.evaluate(1, 298.15));
  expect(logAt(at25.at(-1)![1])).toBeCloseTo(Math.log10((100 * x * 150) / ((1 - x) * 40)), 2);
  const x0 = Math.exp(made.model.evaluate(0, 298.15));
  expect(logAt(at25[0]![1])).toBeCloseTo(Math.log10((100 * x0 * 150) / ((1 - x0) * 40)), 2);
  expect(composition.match(/<g class="pt /g)).toHaveLength(54);
});

test("The drawings have a name, a description and their values in tables", () => {
  for (const id of ["plot-family", "plot-composition"]) {
    expect(text).toContain(`id="${id}-name"`);
    expect(text).toContain(`id="${id}-about"`);
  }
  const at = made.model.evaluate(0.5, 298.15);
  const x = Math.exp(at);
  const value = (100 * x * 150) / ((1 - x) * 40);
  expect(text.includes(`>${value.toPrecision(3)}<br>`)).toBe(true);
  expect(text).toMatch(/<th scope="col" class="n">25\.0 °C<\/th>/);
});

test("The maximum between the ends is listed with its limits, and where there is none it is said", () => {
  const rows = textsOf(text, /<tr><th scope="row" class="n">(1\d\.0<\/th>(?:<td class="n">[^<]*<\/td>){6})/g);
  expect(rows).toHaveLength(1);
  const [maximum] = made.model.innerMaxima;
  expect(text).toContain(`<td class="n">${(100 * maximum!.fraction).toFixed(1)}</td>`);
  const plain = mixtureEdition(readingsOn(COMPOSITIONS, TEMPERATURES, textbook([5, -2200, 2, -2900])));
  expect(mixturePage(plain.edition, plain.model)).toContain("the highest is at an end of the compositions measured");
});

test("The formula for a spreadsheet gives the surface back to 0.1 %", () => {
  const formula = mixtureFormula(made.model).slice(1).replaceAll("EXP", "Math.exp").replaceAll("^", "**");
  const evaluate = new Function("w", "t", `return ${formula}`) as (w: number, t: number) => number;
  for (const w of [0, 0.3, 0.8, 1])
    for (const t of [5, 30, 55])
      expect(Math.abs(evaluate(w, t) / Math.exp(made.model.evaluate(w, t + 273.15)) - 1)).toBeLessThan(1e-3);
});

test("A composition that contradicts the others is marked hollow, listed with the reason, and linked to its page", () => {
  const off = readings().map((one) => (one.fraction === 0.35 ? { ...one, lnValue: one.lnValue + 0.5 } : one));
  const { edition, model } = mixtureEdition(off);
  const page = mixturePage(edition, model);
  expect(page).toMatch(/its values lie 6\d % above what the other compositions say/);
  expect(page.match(/<g class="pt s\d left"/g)).toHaveLength(12);
  expect(page).toContain('<a href="../systems/system-3.html">35:65 w/w</a>');
});

test("Links lead from systems and overview to the mixture, and nothing is shown where there is none", () => {
  expect(mixtureLinks([made.model], 3).html).toContain(`href="../mixtures/${made.model.id}.html"`);
  expect(mixtureLinks([made.model], 99).html).toBe("");
  expect(mixtureList([made.model]).html).toContain(`href="mixtures/${made.model.id}.html"`);
  expect(mixtureList([]).html).toBe("");
});

test("Names of solute and solvents cannot become markup", () => {
  const hostile = '<img src=x onerror="window.hit=1">\u202e';
  const { edition, model } = mixtureEdition(readings(), { solute: hostile, medium: hostile });
  const named = { ...model, solvents: [hostile, `${hostile}&`] as const };
  for (const page of [mixturePage(edition, named), mixtureList([named]).html, mixtureLinks([named], 3).html]) {
    expect(page).not.toContain("<img");
    expect(page).not.toContain("\u202e");
  }
});

test.skipIf(!hasChromium)("The page fits at 390 and 1280 px and on paper, and axe-core finds nothing", async () => {
  const folder = mkdtempSync(join(tmpdir(), "saltern-mixture-"));
  const file = join(folder, "mixture.html");
  writeFileSync(file, text);
  const browser = await startBrowser();
  try {
    const { page, faults, requests } = await openPage(browser, file);
    expect(await overflowOf(page)).toBeLessThanOrEqual(0);
    expect(await axeViolations(page)).toEqual([]);
    await page.setViewportSize({ width: 390, height: 844 });
    expect(await overflowOf(page)).toBeLessThanOrEqual(0);
    await page.setViewportSize({ width: 703, height: 990 });
    await page.emulateMedia({ media: "print" });
    expect(await overflowOf(page)).toBeLessThanOrEqual(0);
    expect(faults).toEqual([]);
    expect(requests).toHaveLength(1);
  } finally {
    await browser.close();
    rmSync(folder, { recursive: true, force: true });
  }
});
