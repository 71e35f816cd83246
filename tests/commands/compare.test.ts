import { appendFileSync, copyFileSync, cpSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { CompareResult } from "../../pipeline/records/generated/compare-result.ts";
import { documentErrors } from "../schemas/table-rows.ts";
import { compare, FLAG, publish, rule, writeCollection } from "./ruled-collection.ts";
import { scratch } from "./saltern.ts";

const folder = scratch();
const editions = join(folder, "editions");
const at = (name: string) => join(editions, name);

beforeAll(async () => {
  const place = writeCollection(join(folder, "collection"));
  await rule(place, FLAG, "ask", { date: "2026-03-01" });
  await publish(place, "first", editions);
  await publish(place, "same", editions);
  await rule(place, FLAG, "correct", { correctedValue: "15.0686", evidence: "notebook 3 page 9" });
  await rule(place, "gamma:7", "set aside");
  await publish(place, "second", editions);
}, 120_000);

const compared = async (old: string, now: string) =>
  JSON.parse((await compare(at(old), at(now), { json: true })).stdout) as CompareResult;

describe("two editions that say the same", () => {
  test("differ in nothing but their names: exit 0", async () => {
    const run = await compare(at("first"), at("same"));
    expect(run.code).toBe(0);
    expect(run.stdout).toContain("The systems, grades, curves and measurements are the same.");
    expect(run.stdout).toContain("The tables are the same, byte for byte.");
    expect((await compared("first", "same")).different).toBe(false);
  });
});

describe("an edition after two more rulings", () => {
  test("differs: exit 1, in words a chemist uses, with the ruling behind each change", async () => {
    const run = await compare(at("first"), at("second"));
    expect(run.code).toBe(1);
    expect(run.stdout).toContain("salicylic acid in ethanol: doubtful, now tentative");
    expect(run.stdout).toMatch(
      /Measurements corrected\n {2}alpha:4: salicylic acid in ethanol, 150\.686 g\/100 g solvent at 30\.0 °C; corrected to 15\.0686 by data steward on 2026-04-01: looked at \(R0002\)/,
    );
    expect(run.stdout).toMatch(
      /Measurements set aside\n {2}gamma:7: .* at 60\.0 °C; set aside by data steward .* \(R0003\)/,
    );
  });

  test("and the result as JSON follows its schema", async () => {
    const result = await compared("first", "second");
    expect(documentErrors("compare-result", result)).toEqual([]);
    expect(result.measurements_corrected.map(({ measurement_id }) => measurement_id)).toEqual(["alpha:4"]);
    expect(result.measurements_set_aside.map(({ measurement_id }) => measurement_id)).toEqual(["gamma:7"]);
    expect([result.measurements_added, result.measurements_gone, result.systems_added]).toEqual([[], [], []]);
  });

  test("read backwards tells what was taken back", async () => {
    const result = await compared("second", "first");
    expect(result.measurements_taken_back.map(({ measurement_id }) => measurement_id)).toEqual(["gamma:7"]);
    expect(result.measurements_corrected).toEqual([]);
  });
});

describe("one byte", () => {
  test("changed anywhere in any file of an edition is found and told with the file", async () => {
    for (const name of readdirSync(at("first"))) {
      const copy = join(folder, "damaged");
      cpSync(at("first"), copy, { recursive: true });
      const bytes = readFileSync(join(copy, name));
      const middle = Math.floor(bytes.length / 2);
      bytes[middle] = (bytes[middle] as number) ^ 1;
      writeFileSync(join(copy, name), bytes);
      const run = await compare(copy, at("second"));
      expect([run.code, run.stdout], name).toEqual([2, ""]);
      expect(run.stderr).toContain(`${name}: `);
      expect(run.stderr).toContain("[damaged-edition]");
      rmSync(copy, { recursive: true });
    }
  }, 60_000);

  test("added, a file missing and a file added are found too", async () => {
    const damages = [
      (copy: string) => appendFileSync(join(copy, "grid.csv"), "\n"),
      (copy: string) => rmSync(join(copy, "systems.csv")),
      (copy: string) => copyFileSync(join(copy, "grid.csv"), join(copy, "extra.csv")),
      (copy: string) => appendFileSync(join(copy, "edition.json"), "\n"),
    ];
    for (const damage of damages) {
      const copy = join(folder, "damaged");
      cpSync(at("first"), copy, { recursive: true });
      damage(copy);
      const run = await compare(at("second"), copy);
      expect([run.code, run.stderr.includes("[damaged-edition]")]).toEqual([2, true]);
      rmSync(copy, { recursive: true });
    }
  }, 60_000);
});

test("working tables and folders that hold no edition are refused with 2", async () => {
  const run = await compare(at("first"), join(folder, "collection"));
  expect([run.code, run.stdout]).toEqual([2, ""]);
  expect(run.stderr).toContain("[not-an-edition]");
});
