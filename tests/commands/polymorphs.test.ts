import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { beforeAll, describe, expect, test } from "vitest";
import { commonRangeK, crossingOf, differenceAt } from "../../pipeline/curves/compare-curves.ts";
import { comparedCurveOf } from "../../pipeline/publish/form-crossings.ts";
import type { Edition } from "../../pipeline/records/edition.ts";
import type { Curve } from "../../pipeline/records/fits.ts";
import { editionOf, flagsOf, systemOfForm } from "./curated.ts";

// Sulfamerazine forms I, II and V in acetonitrile + water 80:20 (v/v), clear points against mg charged per mL of solvent;
// experimental data of the BEST-CSP benchmark, supporting information on polymorphs I, II and V (CC BY-SA 4.0).
const FILE = fileURLToPath(
  new URL("../../../shared/datasets/polymorphs/sulfamerazine-clear-points.csv", import.meta.url),
);
const [CHARGED, WEIGHED] = ["conc / mg mL-1 (solvent charged)", "amount / mg"];

const absent = !existsSync(FILE);
if (absent) console.warn(`skipped: the clear points of three polymorphs are not on this machine (${FILE})`);

const card = (solubility: string, carried: string) =>
  JSON.stringify({
    ...{ format: 1, source: "clear-points", file: "clear-points.csv", origin: "open-dataset" },
    ...{ licence: "CC BY-SA 4.0", method: "clear-point" },
    columns: {
      ...{ solute: { column: "solute" }, solid_form: { column: "solid form" }, solvent: { column: "solvent" } },
      temperature: { column: "clear point / °C", unit: "°C" },
      solubility: { column: solubility, unit: "mg/mL solvent" },
    },
    carry: [carried, "note"],
  });

const merged = (solubility: string, carried: string) =>
  editionOf({
    "sources/clear-points.source.json": card(solubility, carried),
    "sources/clear-points.csv": readFileSync(FILE, "utf8"),
  });

describe.skipIf(absent)("three polymorphs of sulfamerazine by clear points", () => {
  let edition: Edition;
  const curveOf = (form: string) => edition.fits[systemOfForm(edition, form).index]?.curves[0] as Curve;
  const compared = (form: string) => comparedCurveOf(edition, curveOf(form));

  beforeAll(async () => {
    edition = await merged(CHARGED, WEIGHED);
  });

  test("are three systems of one family, in one mixture of solvents, with a curve each", () => {
    expect(edition.refused).toEqual([]);
    expect(edition.systems.map(({ identity, rows }) => [identity.solidForm, rows.length])).toEqual([
      ["form I", 24],
      ["form II", 17],
      ["form V", 14],
    ]);
    expect(new Set(edition.systems.map(({ family }) => family)).size).toBe(1);
    expect(new Set(edition.systems.map(({ identity }) => identity.solvent))).toEqual(new Set(["acetonitrile + water"]));
    expect(edition.fits.map(({ curves }) => curves.length)).toEqual([1, 1, 1]);
    expect(flagsOf(edition, "sources-disagree", "block-off-curve", "off-curve")).toEqual([]);
  });

  test("lie apart: form V below form I at every temperature of both, by more than the limits", () => {
    const range = commonRangeK(compared("form I"), compared("form V"));
    expect(range).toBeDefined();
    const [low, high] = range as readonly [number, number];
    for (let i = 0; i <= 10; i++) {
      const { lnRatio, half } = differenceAt(compared("form I"), compared("form V"), low + ((high - low) * i) / 10);
      expect(lnRatio).toBeGreaterThan(half);
    }
  });

  test("cross, forms I and II, between 40 and 55 °C: form II is the stable one of the two in the cold", () => {
    const crossing = crossingOf(compared("form I"), compared("form II"));
    expect(crossing?.firstLowerWhenCold).toBe(false);
    const celsius = (T = Number.NaN) => T - 273.15;
    console.info(
      `sulfamerazine I and II cross at ${[crossing?.temperatureK, crossing?.lowK, crossing?.highK].map((T) => celsius(T).toFixed(1)).join(", ")} °C`,
    );
    expect(celsius(crossing?.lowK)).toBeGreaterThan(40);
    expect(celsius(crossing?.temperatureK)).toBeGreaterThan(44);
    expect(celsius(crossing?.temperatureK)).toBeLessThan(51);
    expect(celsius(crossing?.highK)).toBeLessThan(55);
  });

  test("cross, forms II and V, near 40 °C: so form V lies apart from form II on either side of that", () => {
    const crossing = crossingOf(compared("form II"), compared("form V"));
    const celsius = (T = Number.NaN) => T - 273.15;
    expect(crossing?.firstLowerWhenCold).toBe(true);
    expect(celsius(crossing?.lowK)).toBeGreaterThan(30);
    expect(celsius(crossing?.highK)).toBeLessThan(50);
  });

  test("have five slips between two columns of the file, four of them known; all are told, whichever column is read", async () => {
    const other = await merged(WEIGHED, CHARGED);
    for (const each of [edition, other]) {
      const flags = flagsOf(each, "columns-disagree");
      // Lines of the file: form I 6.03 for 6.78 and 8.24 for 8.37; form V 40.098, 49.6615 and 44.6785 for 39.098, 48.6615
      // and 43.7085. The second stands in no list of known slips.
      expect(flags.map(({ row }) => each.table.line[row as number])).toEqual([18, 19, 53, 54, 55]);
      expect(flags.every(({ severity, scope }) => severity === "notice" && scope === "measurement")).toBe(true);
    }
    // What the curve says of the two numbers of one line: the column of concentrations is the sound one.
    const evidence = flagsOf(edition, "columns-disagree")[0]?.evidence ?? "";
    expect(evidence).toMatch(
      /from the other points the value is 0\.\d % (above|below), the other would be 1[01] % below$/,
    );
  });

  test("hide those slips from any curve: with the slips in the values no point is off by more than the threshold", async () => {
    const other = await merged(WEIGHED, CHARGED);
    expect(flagsOf(other, "off-curve", "block-off-curve")).toEqual([]);
  });
});
