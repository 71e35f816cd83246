import { readFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import type { Edition } from "../../pipeline/records/edition.ts";
import { flagId } from "../../pipeline/records/edition.ts";
import type { CurvesFile } from "../../pipeline/records/generated/curves-json.ts";
import { type WrittenReport, writeReport } from "../report/written-report.ts";
import { documentErrors } from "../schemas/table-rows.ts";
import { curated, type SmallSource, writeCollection } from "../screen/small-collection.ts";
import { copyOf, scratch } from "./saltern.ts";

const folder = scratch();

/** g/100 g solvent of an invented curve: 22 kJ/mol, 10 at 25 °C. */
const onCurve = (celsius: number) => 10 * Math.exp((22_000 / 8.314) * (1 / 298.15 - 1 / (celsius + 273.15)));
const SCATTER = [1.006, 0.995, 1.004, 0.993, 1.002, 1.005, 0.996, 0.999];

/** A series of caffeine in ethyl acetate, invented: values off by a fixed small scatter and by a factor. */
function series(
  celsius: readonly number[],
  factor: (celsius: number) => number = () => 1,
  card: SmallSource["card"] = {},
): SmallSource {
  const rows = celsius.map((t, i) => [
    ...["caffeine", "ethyl acetate", t],
    Number((onCurve(t) * (SCATTER[(i * 3 + celsius.length) % 8] as number) * factor(t)).toPrecision(5)),
  ]);
  return { rows, card: { method: "gravimetric", ...card } };
}

const blocking = (edition: Edition) =>
  edition.flags.filter(({ severity }) => severity === "blocking").map((flag) => flagId(edition, flag).split("@"));

const WARM = [5, 12, 19, 26, 33, 40, 47, 54];

describe("artemisinin in ethanol, where two papers lie a factor of two apart", () => {
  let written: WrittenReport;
  let edition: Edition;
  let page: string;

  beforeAll(async () => {
    const artemisinin = (rows: readonly (readonly [kelvin: number, x: number])[], doi: string): SmallSource => ({
      rows: rows.map(([T, x]) => ["artemisinin", "ethanol", T, x]),
      unit: "mole fraction",
      columns: { temperature: { column: "T", unit: "K" } },
      card: { origin: "literature", reported_by: `authors of ${doi}`, doi, method: "unspecified" },
    });
    const collection = writeCollection(join(folder, "artemisinin"), {
      // doi 10.1021/je0603426 and 10.1021/je100125x, as listed in BigSolDB 2.0 (Krasnov et al., Sci. Data 12 (2025) 1236).
      older: artemisinin(
        [
          [303.2, 0.002973],
          [313.2, 0.004567],
          [323.2, 0.008006],
          [343.2, 0.01588],
        ],
        "10.1021/je0603426",
      ),
      newer: artemisinin(
        [
          ...([
            [284.15, 0.00236],
            [289.15, 0.00305],
            [295.15, 0.00412],
            [298.15, 0.00475],
          ] as const),
          ...([
            [304.15, 0.00631],
            [309.15, 0.00796],
            [314.15, 0.01],
            [319.15, 0.01249],
            [323.15, 0.01487],
          ] as const),
        ],
        "10.1021/je100125x",
      ),
    });
    written = await writeReport(collection);
    edition = written.edition;
    const id = edition.systems[0]?.id ?? "";
    page = readFileSync(join(written.folder, "report", "systems", `${id}.html`), "utf8");
  });
  afterAll(() => written.remove());

  test("is one blocking flag on the system, with both readings on both bases and their ratio", () => {
    expect(edition.flags).toHaveLength(1);
    expect(edition.flags[0]).toMatchObject({ scope: "system", code: "sources-disagree", severity: "blocking" });
    const { evidence = "", lookAt = "" } = edition.flags[0] ?? {};
    expect(evidence).toMatch(
      /older \(4 points, unspecified\) reads 0\.00\d+ mole fraction \(\d\.\d+ g\/100 g solvent\)/,
    );
    expect(evidence).toMatch(
      /newer \(9 points, unspecified\) reads 0\.0\d+ mole fraction \(\d\.\d+ g\/100 g solvent\)/,
    );
    expect(evidence).toMatch(/1\d\d % above the first|[45]\d % below the first/);
    expect(lookAt).toMatch(/more stable form/);
  });

  test("has no curve, nothing is set aside, and each reading keeps its points", () => {
    const [fit] = edition.fits;
    expect(fit?.robust.agreement).toBe("conflict");
    expect(fit?.curves).toEqual([]);
    expect(edition.rulings.setAside.size).toBe(0);
    expect(fit?.campReadings?.map(({ curve }) => curve?.n).sort()).toEqual([4, 9]);
    const [a, b] = (fit?.campReadings ?? []).map(({ curve }) => curve?.evaluate(313.2) ?? Number.NaN) as [
      number,
      number,
    ];
    // The published comparison (refit of the newer at the older one's temperatures): ratio 0.48 at 313.2 K.
    expect(Math.exp(-Math.abs(a - b))).toBeCloseTo(0.48, 1);
  });

  test("shows both curves as broken lines with their names in both plots, and the readings side by side", () => {
    expect(page.match(/<path class="camp s\d" d="M[^"]{60,}"/g)).toHaveLength(4);
    for (const name of ["A alone", "B alone"]) expect(page.match(new RegExp(`>${name}</text>`, "g"))).toHaveLength(2);
    expect(page).not.toContain('class="curve"');
    expect(page).toContain("no reading is chosen");
    const table = page.slice(page.indexOf("What each reading gives"), page.indexOf("Who reports what"));
    expect(table).toMatch(/<th scope="row" class="n">40\.0<\/th>/);
    expect(table).toMatch(/2\.\d+ \(1\.\d+ to 2\.\d+\)|0\.\d+ \(0\.\d+ to 0\.\d+\)/);
    const origins = page.slice(page.indexOf("Who reports what"));
    for (const doi of ["10.1021/je0603426", "10.1021/je100125x"]) expect(origins).toContain(`doi ${doi}`);
    expect(origins).toContain("not stated");
  });

  test("stands in curves.json among the disagreements, with both readings and no curve", () => {
    const file = JSON.parse(readFileSync(join(written.folder, "curves.json"), "utf8")) as CurvesFile;
    expect(documentErrors("curves-json", file)).toEqual([]);
    expect(file.curves).toEqual([]);
    expect(file.disagreements).toMatchObject([{ system: edition.systems[0]?.id, fit_basis: "ln x" }]);
    expect(file.disagreements?.[0]?.readings.map(({ sources, n }) => [sources, n])).toEqual(
      expect.arrayContaining([
        [["newer"], 9],
        [["older"], 4],
      ]),
    );
  });
});

describe("three sources, one of them odd", () => {
  test("higher: the odd one is named, the curve is that of the others, and nothing else is flagged", async () => {
    const edition = await curated({
      north: series(WARM),
      south: series([8, 15, 22, 29, 36, 43, 50]),
      west: series([10, 17, 24, 31, 38, 45], () => 1.37),
    });
    expect(blocking(edition)).toEqual([["block-off-curve", "west", edition.systems[0]?.id]]);
    expect(edition.fits[0]?.curves[0]?.n).toBe(15);
    const west = edition.fits[0]?.standings?.().find(({ source }) => edition.sources[source]?.name === "west");
    expect(west).toMatchObject({ n: 0, influence: 0 });
    expect(west?.offset).toBeCloseTo(Math.log(1.37), 1);
  });

  test("by no more than its kind usually is: nobody is named", async () => {
    const edition = await curated({
      north: series(WARM),
      south: series([8, 15, 22, 29, 36, 43, 50]),
      west: series([10, 17, 24, 31, 38, 45], () => 1.05),
    });
    expect(blocking(edition)).toEqual([]);
    expect(edition.fits[0]?.curves[0]?.n).toBe(21);
  });

  test.each([
    ["parallel to the curve", () => 0.7],
    ["drifting from it smoothly", (celsius: number) => Math.exp(-0.1 - 0.012 * (celsius - 5))],
  ])("lower, %s: it may be the more stable form, and that blocks", async (_, factor) => {
    const edition = await curated({
      north: series(WARM),
      south: series([8, 15, 22, 29, 36, 43, 50]),
      west: series(WARM, factor),
    });
    const [flag] = edition.flags;
    expect(blocking(edition)).toEqual([["possible-more-stable-form", "west", edition.systems[0]?.id]]);
    expect(flag?.evidence).toMatch(/a majority is no proof of stability/);
    expect(flag?.lookAt).toMatch(/XRPD/);
  });

  test("lower but scattered wildly: that is no other solid", async () => {
    const wild = [0.95, 0.35, 0.8, 0.3, 0.9, 0.4, 0.75, 0.33];
    const edition = await curated({
      north: series(WARM),
      south: series([8, 15, 22, 29, 36, 43, 50]),
      west: series(WARM, (celsius) => wild[WARM.indexOf(celsius)] as number),
    });
    const codes = new Set(blocking(edition).map(([code]) => code));
    expect(codes.size).toBeGreaterThan(0);
    expect(codes).not.toContain("possible-more-stable-form");
  });
});

describe("two sources of one laboratory against another laboratory", () => {
  const sources = (second: string) => ({
    north: series(WARM, () => 1.6, { laboratory: "bench 1" }),
    south: series([8, 15, 22, 29, 36, 43, 50], () => 1.6, { laboratory: second }),
    west: series([10, 17, 24, 31, 38, 45], () => 1, { laboratory: "bench 3" }),
  });

  test("are no majority: the system is contested and no curve is chosen", async () => {
    const edition = await curated(sources("bench 1"));
    expect(blocking(edition)).toEqual([["sources-disagree", edition.systems[0]?.id]]);
    expect(edition.fits[0]?.curves).toEqual([]);
    expect(edition.fits[0]?.campReadings).toHaveLength(2);
  });

  test("are one where they come from two laboratories", async () => {
    const edition = await curated(sources("bench 2"));
    expect(blocking(edition).map(([, target]) => target)).toEqual(["west"]);
    expect(edition.fits[0]?.curves[0]).toMatchObject({ n: 15, nLaboratories: 2 });
  });
});

test("What the values of one source share in their unit stands whole in the limits of its curve", async () => {
  // Bare mg/mL may be per volume of solution or of solvent: every value of the column shares the difference.
  const { table, fits, scales } = await curated({
    north: { ...series([5, 12, 19, 26, 33]), unit: "mg/mL" },
  });
  const shared = table.sharedU[0] as number;
  expect(shared).toBeGreaterThan(0.002);
  const [fit] = fits;
  expect(fit?.robust.points.sharedLnU?.[0]).toBe(shared);
  const mean = Math.sqrt(table.sharedU.slice(0, 5).reduce((sum, s) => sum + s * s, 0) / 5);
  const variance = scales.between ** 2 + mean ** 2;
  expect(fit?.curves[0]?.limits(292.15).curve).toBeGreaterThan(1.96 * Math.sqrt(variance));
});

describe("the demo collection", () => {
  let written: WrittenReport;
  beforeAll(async () => {
    written = await writeReport(copyOf("demo", join(folder, "demo")));
  }, 60_000);
  afterAll(() => written.remove());

  const read = (name: string) => readFileSync(join(written.folder, name), "utf8");
  const several = () =>
    written.edition.systems.find(({ index }) => (written.edition.fits[index]?.standings?.().length ?? 0) >= 3);

  test("tells on the page of a system how each source stands to the others, with both plots", () => {
    const system = several();
    const page = read(`report/systems/${system?.id}.html`);
    const section = page.slice(page.indexOf('<h2 id="sources">'), page.indexOf('<h2 id="planning'));
    for (const standing of written.edition.fits[system?.index ?? 0]?.standings?.() ?? [])
      expect(section).toContain(written.edition.sources[standing.source]?.name);
    expect(section).toMatch(/(\+|&minus;)\d+(\.\d)? \((\+|&minus;)?\d+(\.\d)? to (\+|&minus;)?\d+(\.\d)?\)/);
    for (const id of ["plot-offsets", "plot-without"]) expect(section).toContain(`id="${id}"`);
    expect(section).toContain("without A</text>");
    expect(section).toContain("../methods.html#sources");
  });

  test("tells on the page of the sources where each lies against the others", () => {
    expect(read("report/sources.html")).toMatch(
      /<dt>Against other sources<\/dt><dd>\d+ comparisons?, in the middle [+−]?\d/,
    );
  });

  test("carries the standings in curves.json, by the schema", () => {
    const file = JSON.parse(read("curves.json")) as CurvesFile;
    expect(documentErrors("curves-json", file)).toEqual([]);
    expect(file.disagreements).toEqual([]);
    for (const curve of file.curves) {
      if (curve.n_sources < 2) continue;
      expect(curve.sources?.filter(({ n }) => n > 0)).toHaveLength(curve.n_sources);
      expect(curve.sources?.reduce((sum, { n }) => sum + n, 0)).toBe(curve.n);
      for (const { offset_ln, offset_low, offset_high } of curve.sources ?? [])
        if (offset_ln !== undefined) expect([offset_low! < offset_ln, offset_ln < offset_high!]).toEqual([true, true]);
    }
    expect(file.curves.some(({ sources }) => sources !== undefined)).toBe(true);
  });

  test("explains weighting, variance components, limits and offsets on the page of methods, with references", () => {
    const page = read("report/methods.html");
    for (const id of ["weighting", "components", "limits", "sources"]) expect(page).toContain(`<h3 id="${id}">`);
    for (const author of ["Paule", "Fellner", "Henderson", "Smyth", "Satterthwaite"]) expect(page).toContain(author);
    expect(page).toContain(`${(100 * written.edition.scales.between).toPrecision(3)} %`);
    // Every citation leads to an entry of the list.
    for (const [, anchor] of page.matchAll(/href="#(ref-\d+)"/g)) expect(page).toContain(`<li id="${anchor}">`);
  });
});
