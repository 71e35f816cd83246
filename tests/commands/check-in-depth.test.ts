import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { check } from "../../pipeline/commands/check.ts";
import type { CheckedRow, CheckResult } from "../../pipeline/records/generated/check-result.ts";
import { documentErrors } from "../schemas/table-rows.ts";
import { here } from "./ruled-collection.ts";
import { cardFor, ROOT, type Run, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const DEMO = join(ROOT, "datasets", "demo");

/** Checks invented readings, g/100 g solvent, against the demo collection; as a chemist sees it, and as data. */
async function checked(rows: readonly string[], json: boolean): Promise<Run> {
  writeFiles(folder, {
    "june.csv": `Compound,Form,Solvent,T,S\n${rows.join("\n")}\n`,
    "june.source.json": cardFor("june", {
      columns: {
        ...{ solute: { column: "Compound" }, solid_form: { column: "Form" }, solvent: { column: "Solvent" } },
        ...{ temperature: { column: "T", unit: "°C" }, solubility: { column: "S", unit: "g/100 g solvent" } },
      },
      method: "gravimetric",
    }),
  });
  const options = { collection: DEMO, version: "0.0.0", json, quiet: true };
  return here((terminal) => check(join(folder, "june.csv"), options, terminal));
}

// Invented, near the demo's own invented curves: paracetamol in ethanol loses more and more from 50 °C on, as through a
// cold filter; benzoic acid in toluene is a third low throughout; one value of a new system has two digits swapped.
const SHEET = [
  ...["10,13.2", "20,16.3", "30,20.1", "40,24.6", "50,25.1", "60,27.0"].map((v) => `paracetamol,form I,ethanol,${v}`),
  ...["10,17.0", "20,20.8", "30,25.7", "40,31.2"].map((v) => `salicylic acid,,ethyl acetate,${v}`),
  ...["10,44.1", "20,51.7", "25,65.6", "30,60.4", "40,70.2", "50,81.4", "60,93.8"].map(
    (v) => `salicylic acid,,methanol,${v}`,
  ),
  ...["10,3.31", "20,4.98", "30,7.41", "40,10.9"].map((v) => `benzoic acid,,toluene,${v}`),
];

describe("a lab sheet against the demo", () => {
  let result: CheckResult;
  let run: Run;
  const at = (line: number) => result.rows.find((row) => row.line === line) as CheckedRow;
  const merged = (solute: string, solvent: string) =>
    result.if_merged.find((one) => one.solute === solute && one.solvent === solvent);

  beforeAll(async () => {
    run = await checked(SHEET, true);
    result = JSON.parse(run.stdout) as CheckResult;
  }, 60_000);

  test("needs a person, and tells everything in the form that its schema describes", () => {
    expect(run.code).toBe(1);
    expect(documentErrors("check-result", result)).toEqual([]);
  });

  test("names the cause of rows that leave the curve together at the hot end", () => {
    for (const line of [6, 7]) {
      expect(at(line)).toMatchObject({
        verdict: "off the curve",
        suspected_cause: "loss on filtration",
        cause_scope: "measurement",
      });
      expect(at(line).look_at).toContain("filter");
    }
    expect(at(7).deviation_percent).toBeCloseTo(-25, 0);
  });

  test("finds a row that is off among the rows of a new system, with its cause", () => {
    expect(at(14)).toMatchObject({ verdict: "new system", suspected_cause: "digits transposed" });
    expect(at(14).cause_detail).toBe("65.6 should read 56.6");
    expect(at(13).cause_scope).toBeUndefined();
  });

  test("tells how the file stands to the others, system by system, with limits", () => {
    const of = (solute: string) => result.offsets.find((one) => one.solute === solute);
    const good = of("salicylic acid");
    expect(good?.rows).toBe(4);
    expect(good?.low_percent).toBeLessThan(0);
    expect(good?.high_percent).toBeGreaterThan(0);
    const low = of("benzoic acid");
    // Mean of the four deviations in ln value, as a percentage.
    const lines = [19, 20, 21, 22].map((line) => Math.log1p((at(line).deviation_percent as number) / 100));
    expect(low?.offset_percent).toBeCloseTo(100 * Math.expm1(lines.reduce((a, b) => a + b) / 4), 6);
    expect(low?.high_percent).toBeLessThan(-20);
    // Salicylic acid in methanol has nothing to stand beside.
    expect(result.offsets).toHaveLength(3);
    expect(result.pooled_offset?.systems).toBe(3);
    expect(result.pooled_offset?.between_systems_percent).toBeGreaterThan(10);
  });

  test("tells what curves, grades and planning would become", () => {
    const paracetamol = merged("paracetamol", "ethanol");
    expect(paracetamol?.changes.length).toBeGreaterThanOrEqual(3);
    for (const {
      before_g_per_100g_solvent: was,
      after_g_per_100g_solvent: is,
      change_percent,
    } of paracetamol?.changes ?? []) {
      expect(change_percent).toBeCloseTo(100 * (is / was - 1), 9);
    }
    expect(paracetamol).toMatchObject({ grade_before: "tentative", grade_after: "doubtful" });
    expect(paracetamol?.points_after).toBe((paracetamol?.points_before ?? 0) + 4);
    expect(paracetamol?.recovery_before_percent).toBeGreaterThan(50);
    expect(paracetamol?.new_flags).toBe(2);
    expect(merged("salicylic acid", "methanol")).toMatchObject({ curve_before: "new system", points_before: 0 });
    expect(merged("salicylic acid", "methanol")?.recovery_before_percent).toBeUndefined();
    expect(merged("salicylic acid", "ethyl acetate")).toMatchObject({ grade_after: "tentative", new_flags: 0 });
  });

  test("is told for people in less than a screen and a half, one finding on a series once", async () => {
    const { stdout, code } = await checked(SHEET, false);
    expect(code).toBe(1);
    const lines = stdout.split("\n");
    expect(lines.length).toBeLessThan(60);
    expect(stdout).toMatch(/suspected loss on filtration: .*, probability \d\.\d\d/);
    expect(stdout).toMatch(/^lines 19 to 22: off the curve, all of one kind: benzoic acid in toluene$/m);
    expect(stdout).toMatch(
      /^ {2}benzoic acid in toluene: -3\d\.\d % \(95 % limits -\d\d\.\d % to -\d\d\.\d %\), 4 rows/m,
    );
    expect(stdout).toMatch(
      /^ {2}paracetamol \(form I\) in ethanol: most at .* -> .* g\/100 g solvent \([+-]\d\.\d %\), /m,
    );
    expect(stdout).toMatch(
      /grade tentative -> doubtful; recovery \d\d\.\d % -> \d\d\.\d %; 2 more flags need a person$/m,
    );
  });
});

describe("a file that repeats the collection", () => {
  test("is told so, and would not count again", async () => {
    // Lines 2 to 8 of harbour-2026-gravimetry in the demo.
    const values = [
      [5, 11.63],
      [10, 13.22],
      [20, 16.75],
      [25, 17.92],
      [30, 20.01],
      [40, 25.23],
      [50, 30.1],
    ];
    const run = await checked(
      values.map(([T, S]) => `paracetamol,form I,ethanol,${T},${S}`),
      true,
    );
    expect(run.code).toBe(0);
    const { repeats, if_merged: merged } = JSON.parse(run.stdout) as CheckResult;
    expect(repeats).toMatchObject([{ code: "re-reported", lines: [2, 3, 4, 5, 6, 7, 8] }]);
    expect(repeats[0]?.evidence).toContain("harbour-2026-gravimetry");
    expect(merged[0]?.points_after).toBe(merged[0]?.points_before);
    for (const { change_percent } of merged[0]?.changes ?? []) expect(Math.abs(change_percent)).toBeLessThan(0.1);
  });
});

test("A name with a letter of another script is told with its line, and a mixture with its composition", async () => {
  const { stdout, stderr } = await checked(
    ["p\u0430racetamol,form I,ethanol,25,18.2", "paracetamol,form I,ethanol/water 76:24 w/w,30,28.5"],
    false,
  );
  expect(stderr).toMatch(/^notice: .*june\.csv:2: .*Cyrillic "\u0430" \(U\+0430\).*\[look-alike-letters\]/m);
  expect(stdout).toContain("paracetamol (form I) in ethanol + water (76:24 w/w) at 30.0 °C");
});
