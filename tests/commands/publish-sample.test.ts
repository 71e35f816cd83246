import { existsSync, readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { SAMPLE } from "../../datasets/demo/sample-edition.ts";
import type { EditionDocument } from "../../pipeline/records/generated/edition.ts";
import { publish } from "./ruled-collection.ts";
import { ROOT, type Run, readJson, readTable, scratch } from "./saltern.ts";

const folder = scratch();
const sample = join(ROOT, "reports", "demo");
const again = join(folder, SAMPLE.edition);
const HOW = "run: npx tsx datasets/demo/sample-edition.ts";
let run: Run;

beforeAll(async () => {
  const { version } = JSON.parse(readFileSync(join(ROOT, "package.json"), "utf8")) as { version: string };
  run = await publish(join(ROOT, "datasets", "demo"), SAMPLE.edition, folder, { ...SAMPLE, version });
}, 60_000);

describe("the sample edition of the demo collection", () => {
  test("is published again from its collection, no flag holding it back", () => {
    // 1 and not 0: the demo has readings that are refused on purpose.
    expect(run.code, run.stdout).toBe(1);
    expect(run.stdout, HOW).toContain("edition demo of 2026-04-13 published");
    expect(existsSync(again)).toBe(true);
  });

  test("has the same files, byte for byte, as those kept in reports/demo", () => {
    expect(readdirSync(sample).sort(), HOW).toEqual(readdirSync(again).sort());
    const differing = readdirSync(again).filter(
      (name) => !readFileSync(join(sample, name)).equals(readFileSync(join(again, name))),
    );
    expect(differing, HOW).toEqual([]);
  });

  test("is small enough to be kept under version control", () => {
    const bytes = readdirSync(sample).reduce((sum, name) => sum + statSync(join(sample, name)).size, 0);
    expect(bytes).toBeLessThan(2_000_000);
  });

  test("shows every action: each ruling of rulings.csv is in force, none is stale", () => {
    const { rulings } = readJson<EditionDocument>(again, "edition.json");
    expect(rulings).toHaveLength(readTable(join(ROOT, "datasets", "demo"), "rulings.csv").rows.length);
    expect(new Set(rulings.map(({ action }) => action))).toEqual(new Set(["keep", "set aside", "correct", "ask"]));
    expect(run.stderr).not.toMatch(/\[(stale-ruling|wrong-ruling|contradicting-rulings|correction-impossible)\]/);
  });

  test("has every grade: recommended where confirmed by name, doubtful with a question open or ranges alone", () => {
    const { rows } = readTable(again, "systems.csv");
    const graded = (grade: string) =>
      rows
        .filter((row) => row.grade === grade)
        .map(({ solute, solvent, composition }) => [solute, solvent, composition]);
    expect(graded("recommended")).toEqual([["copper(II) sulfate", "water", ""]]);
    expect(graded("doubtful")).toEqual([
      ["caffeine", "ethyl acetate", ""],
      ["ibuprofen", "water", ""],
    ]);
    // The one series of this composition is set aside, so that nothing is left to fit.
    expect(graded("rejected")).toEqual([["paracetamol", "ethanol + water", "25:75 w/w"]]);
  });
});
