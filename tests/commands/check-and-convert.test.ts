import { readdirSync, rmSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { CheckResult } from "../../pipeline/records/generated/check-result.ts";
import type { ConvertResult } from "../../pipeline/records/generated/convert-result.ts";
import { documentErrors } from "../schemas/table-rows.ts";
import { inProcess } from "./in-process.ts";
import { cardFor, copyOf, ended, type Run, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const demo = join(folder, "demo");

beforeAll(() => {
  copyOf("demo", demo);
  // Three sources are enough here: check curates the collection twice.
  const kept = ["harbour-2026-gravimetry", "harbour-2026-hplc", "crystal-lab-2025-clear-points"];
  for (const name of readdirSync(join(demo, "sources"))) {
    if (!kept.some((source) => name.startsWith(source))) rmSync(join(demo, "sources", name));
  }
  rmSync(join(demo, "rulings.csv"));
});

describe("saltern check", () => {
  const file = join(folder, "new-rows", "new.csv");
  const places: Readonly<Record<string, string>> = { FILE: file, DEMO: demo, NOWHERE: join(folder, "nowhere") };
  // Paracetamol form I in ethanol of the demo: about 17.92 g/100 g solvent at 25 °C.
  const table = [
    "Compound,Form,Solvent,T,S,u(S),n,Solid checked by,Remarks",
    "paracetamol,form I,ethanol,25,18.1,,,,",
    "paracetamol,form I,ethanol,25,181,,,,",
    "paracetamol,form I,ethanol,150,18.1,,,,",
    "paracetamol,form I,methanol,25,18.1,,,,",
    "paracetamol,form I,sea of tears,25,18.1,,,,",
  ];
  let run: Run;
  let result: CheckResult;

  beforeAll(async () => {
    writeFiles(join(folder, "new-rows"), { "new.csv": `${table.join("\n")}\n` });
    run = await saltern(["check", file, "--collection", demo, "--like", "harbour-2026-gravimetry", "--json"]);
    result = JSON.parse(run.stdout) as CheckResult;
  }, 60_000);

  test("gives a verdict on every row, and ends with 1 where a row is off or refused", () => {
    ended(run, 1);
    expect(documentErrors("check-result", result)).toEqual([]);
    expect(result.rows.map(({ line, verdict }) => [line, verdict])).toEqual([
      [2, "fits"],
      [3, "off the curve"],
      [4, "outside the range"],
      [5, "new system"],
    ]);
    expect([result.readings, result.accepted, result.refused]).toEqual([5, 4, 1]);
    expect(result.problems).toMatchObject([{ code: "unknown-solvent", line: 6 }]);
  });

  test("tells what was expected, with its limits, in the unit of the row", () => {
    const { expected_value = 0, expected_low = 0, expected_high = 0, reported_unit } = result.rows[1] ?? {};
    expect(expected_value).toBeCloseTo(18, 0);
    expect(expected_low).toBeLessThan(expected_value);
    expect(expected_high).toBeGreaterThan(expected_value);
    expect(reported_unit).toBe("g/100 g solvent");
  });

  test("ends with 0 where every row fits, and changes nothing of the collection", async () => {
    const before = readdirSync(demo, { recursive: true }).sort();
    writeFiles(join(folder, "new-rows"), { "good.csv": `${table.slice(0, 2).join("\n")}\n` });
    const good = join(folder, "new-rows", "good.csv");
    ended(await inProcess(["check", good, "--collection", demo, "--like", "harbour-2026-gravimetry"]), 0);
    expect(readdirSync(demo, { recursive: true }).sort()).toEqual(before);
  });

  test("reads the card beside the file, or the one named", async () => {
    writeFiles(join(folder, "beside"), {
      "mine.csv": "Compound,Solvent,T,S\nsalicylic acid,ethyl acetate,25,23\n",
      "mine.source.json": cardFor("mine"),
    });
    for (const more of [[], ["--card", join(folder, "beside", "mine.source.json")]]) {
      ended(await inProcess(["check", join(folder, "beside", "mine.csv"), "--collection", demo, ...more]), 0);
    }
  });

  test.each([
    ["no card at all", ["check", "FILE", "--collection", "DEMO"]],
    ["a source that the collection has not", ["check", "FILE", "--collection", "DEMO", "--like", "nobody"]],
    ["a card that is not there", ["check", "FILE", "--collection", "DEMO", "--card", "NOWHERE"]],
    ["a table that is not there", ["check", "NOWHERE", "--collection", "DEMO", "--like", "harbour-2026-gravimetry"]],
    [
      "a collection that is not there",
      ["check", "FILE", "--collection", "NOWHERE", "--like", "harbour-2026-gravimetry"],
    ],
  ])("ends with 2 for %s", async (_, arguments_) => {
    const run = await inProcess(arguments_.map((text) => places[text] ?? text));
    ended(run, 2);
    expect(run.stderr).toMatch(/to mend: /);
  });

  test("ends with 2 as a program too, in any working folder", async () => {
    const more = ["--collection", "demo", "--like", "harbour-2026-gravimetry"];
    const run = await saltern(["check", "nowhere.csv", ...more], { cwd: folder });
    ended(run, 2);
    expect(run.stderr).toMatch(/to mend: /);
  });
});

describe("saltern convert", () => {
  const asked = (value: string, to: string, more: readonly string[] = []) => {
    const solute = more.includes("--solute") ? [] : ["--solute", "KNO3"];
    return ["convert", value, "--to", to, ...solute, "--solvent", "water", "--temperature", "20 °C", ...more];
  };
  const convert = (...of: Parameters<typeof asked>) => inProcess(asked(...of));

  test("prints value, uncertainty, steps and assumptions, for people and as JSON", async () => {
    const text = await saltern(asked("31.6 g/100 g solvent", "mole fraction"));
    ended(text, 0);
    for (const word of ["mole fraction", "standard uncertainty", "steps", "assumptions"]) {
      expect(text.stdout).toContain(word);
    }
    const json = await convert("31.6 g/100 g solvent", "mole fraction", ["--json"]);
    const result = JSON.parse(json.stdout) as ConvertResult;
    expect(documentErrors("convert-result", result)).toEqual([]);
    // (31.6/101.102)/(31.6/101.102 + 100/18.015), molar masses from the atomic weights of IUPAC 2021.
    expect(result.value).toBeCloseTo(0.0533, 4);
  });

  test("shows both readings of an open unit, chooses none, and ends with 1", async () => {
    const run = await convert("31.6 g/100 g", "mole fraction");
    ended(run, 1);
    expect(run.stdout).toMatch(/g\/100 g solution .*\n.*g\/100 g solvent /);
  });

  test.each([
    ["a unit that nobody knows", "3 spoons", "mole fraction"],
    ["a number that is none", "three g/100 g solvent", "mole fraction"],
    ["a value below zero", "-3 g/100 g solvent", "mole fraction"],
    ["more than all of the solution", "120 g/100 g solution", "mole fraction"],
    ["a target that leaves the basis open", "3 g/100 g solvent", "g/100 mL"],
  ])("ends with 2 for %s", async (_, value, to) => {
    const run = await inProcess([
      ...["convert", "--to", to, "--solute", "KNO3", "--solvent", "water", "--temperature", "20 °C", "--", value],
    ]);
    ended(run, 2);
    expect(run.stderr).toMatch(/to mend: /);
  });

  test("shows the three readings of an open hydrate basis, ends with 1, and takes a stated one", async () => {
    const copper = ["--solute", "copper(II) sulfate", "--solid-form", "pentahydrate"];
    const open = await convert("36.7 g/100 g solvent", "g/100 g solvent", copper);
    ended(open, 1);
    expect(open.stderr).toContain("hydrate per added solvent 20.7");
    const stated = [...copper, "--solute-basis", "hydrate per added solvent", "--json"];
    const run = await convert("36.7 g/100 g solvent", "g/100 g solvent", stated);
    expect(JSON.parse(run.stdout).value).toBeCloseTo(20.7, 1);
  });
});
