import { spawn } from "node:child_process";
import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { CheckResult } from "../../pipeline/records/generated/check-result.ts";
import type { ConvertResult } from "../../pipeline/records/generated/convert-result.ts";
import { documentErrors } from "../schemas/table-rows.ts";
import { COMMAND, cardFor, copyOf, type Run, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const demo = join(folder, "demo");
const COMMANDS = ["new", "merge", "check", "convert"];

// One good row and one that is refused, for what has nothing to do with the data.
const small = join(folder, "small");

beforeAll(() => {
  copyOf("demo", demo);
  writeFiles(small, {
    "collection.json": '{ "format": 1, "name": "small" }',
    "sources/bench.csv": "Compound,Solvent,T,S\nparacetamol,water,25,1.5\nparacetamol,water,30,n.m.\n",
    "sources/bench.source.json": cardFor("bench"),
  });
});

/** A run that ended as expected; its messages are shown where it did not. */
function ended({ code, stdout, stderr }: Run, expected: number): void {
  expect(code, `${stdout}\n${stderr}`).toBe(expected);
}

describe("the help", () => {
  test("of the program names every command, a first way through, and the exit codes, on standard output", async () => {
    const run = await saltern(["--help"]);
    ended(run, 0);
    expect(run.stderr).toBe("");
    for (const command of COMMANDS) expect(run.stdout).toMatch(new RegExp(`^  ${command} `, "m"));
    expect(run.stdout).toContain("Usage: saltern");
    expect(run.stdout).toMatch(/Exit codes?:\s+0 [\s\S]*\b1 [\s\S]*\b2 [\s\S]*\b3 [\s\S]*\b130 /);
  });

  test.each(COMMANDS)("of %s tells its usage, every option, and the exit codes", async (command) => {
    const run = await saltern([command, "--help"]);
    ended(run, 0);
    expect(run.stderr).toBe("");
    expect(run.stdout).toContain(`Usage: saltern ${command}`);
    for (const option of ["--json", "--quiet", "--log"]) expect(run.stdout).toContain(option);
    expect(run.stdout).toMatch(/exit codes?/i);
  });

  test("of the program comes quickly: it loads no command and no table", async () => {
    const started = performance.now();
    for (let i = 0; i < 3; i++) await saltern(["--help"]);
    const each = (performance.now() - started) / 3;
    console.info(`saltern --help: ${each.toFixed(0)} ms`);
    // 200 ms on a free machine; here the other tests run at the same time.
    expect(each).toBeLessThan(1000);
  });

  test("tells the version as package.json has it", async () => {
    const { version } = JSON.parse(readFileSync(new URL("../../package.json", import.meta.url), "utf8"));
    expect((await saltern(["--version"])).stdout).toBe(`${version}\n`);
  });
});

describe("what the command does not understand ends with 2 and a message, and does nothing", () => {
  test.each([
    ["no command", []],
    ["an unknown command", ["melt"]],
    ["an unknown option of the program", ["--fast"]],
    ["an unknown option of a command", ["merge", "x", "--out", "y", "--fast"]],
    ["a missing argument", ["merge", "--out", "y"]],
    ["a missing option", ["merge", "x"]],
    ["an option without its value", ["merge", "x", "--out"]],
    ["an argument too many", ["merge", "x", "y", "--out", "z"]],
    ["two options that exclude each other", ["check", "f", "--collection", "c", "--card", "a", "--like", "b"]],
  ])("%s", async (_, arguments_) => {
    const run = await saltern(arguments_, { cwd: folder });
    ended(run, 2);
    expect(run.stdout).toBe("");
    expect(run.stderr).not.toBe("");
    expect(run.stderr).not.toMatch(/^\s+at /m);
    expect(readdirSync(folder).sort()).not.toContain("y");
  });

  test("a command that does not exist is answered with the near one", async () => {
    expect((await saltern(["merg", "x"])).stderr).toMatch(/merge/);
  });
});

describe("saltern new", () => {
  test("starts a collection that merges with 0, with every reading accepted", async () => {
    const collection = join(folder, "My Group's Salts");
    const started = await saltern(["new", collection]);
    ended(started, 0);
    expect(started.stdout).toContain("merge");
    const merged = await saltern(["merge", collection, "--out", join(folder, "new-out"), "--json"]);
    ended(merged, 0);
    const { counts, needs_you, notices } = JSON.parse(merged.stdout);
    expect(needs_you).toBe(false);
    expect(notices).toEqual([]);
    expect(counts).toMatchObject({ readings: 11, accepted: 11, refused: 0, missing_cells: 1, curves: 2 });
  });

  test("brings the schemas along, and files that keep them", async () => {
    const collection = join(folder, "with-schemas");
    ended(await saltern(["new", collection, "--quiet"]), 0);
    const card = JSON.parse(readFileSync(join(collection, "collection.json"), "utf8"));
    expect(existsSync(join(collection, card.$schema))).toBe(true);
    expect(documentErrors("collection", card)).toEqual([]);
    for (const name of readdirSync(join(collection, "sources")).filter((file) => file.endsWith(".json"))) {
      const source = JSON.parse(readFileSync(join(collection, "sources", name), "utf8"));
      expect(documentErrors("source-card", source)).toEqual([]);
      expect(existsSync(join(collection, "sources", source.$schema))).toBe(true);
    }
    expect(readdirSync(join(collection, "schemas")).every((name) => name.endsWith(".schema.json"))).toBe(true);
  });

  test("never writes into a folder in use, nor over a file", async () => {
    writeFiles(folder, { "used/letter.txt": "dear", "just-a-file": "x" });
    for (const place of ["used", "just-a-file", "just-a-file/below"]) {
      const run = await saltern(["new", join(folder, place)]);
      ended(run, 3);
      expect(run.stderr).toMatch(/to mend: /);
      expect(run.stderr).not.toContain("a fault in saltern");
    }
    expect(readdirSync(join(folder, "used"))).toEqual(["letter.txt"]);
  });
});

describe("what every command has", () => {
  test("--quiet leaves standard error empty, also where something is refused", async () => {
    const run = await saltern(["merge", small, "--out", join(folder, "quiet-out"), "--quiet"]);
    ended(run, 1);
    expect(run.stderr).toBe("");
    expect(run.stdout).toContain("open ");
  });

  test("--json puts one JSON document on standard output and nothing else", async () => {
    const run = await saltern(["merge", small, "--out", join(folder, "json-out"), "--json"]);
    ended(run, 1);
    expect(documentErrors("merge-result", JSON.parse(run.stdout))).toEqual([]);
    expect(run.stdout.trim().split("\n")).toHaveLength(1);
    expect(run.stderr).toContain("to mend: ");
  });

  test("--log keeps the messages in a file, also with --quiet, and a log that cannot be written ends with 3", async () => {
    const [out, log] = [join(folder, "log-out"), join(folder, "run.log")];
    ended(await saltern(["merge", small, "--out", out, "--quiet", "--log", log]), 1);
    expect(readFileSync(log, "utf8")).toContain("to mend: ");
    const failed = await saltern(["merge", small, "--out", out, "--log", join(folder, "no", "such", "folder.log")]);
    ended(failed, 3);
    expect(failed.stderr).toContain("log");
  });

  test("a reader that goes away after the first line is no fault: nothing is said, and the tables are written", async () => {
    const out = join(folder, "head-out");
    const stderr = await new Promise<string>((resolve) => {
      const child = spawn(process.execPath, [COMMAND, "merge", small, "--out", out, "--quiet"]);
      let text = "";
      child.stderr.setEncoding("utf8").on("data", (piece: string) => {
        text += piece;
      });
      child.stdout.once("data", () => child.stdout.destroy());
      child.on("close", () => resolve(text));
    });
    expect(stderr).toBe("");
    expect(existsSync(join(out, "summary.json"))).toBe(true);
  });

  test("a reader that is gone before the first line is no fault either", async () => {
    const out = join(folder, "gone-out");
    const stderr = await new Promise<string>((resolve) => {
      const child = spawn(process.execPath, [COMMAND, "merge", small, "--out", out, "--quiet"]);
      let text = "";
      child.stderr.setEncoding("utf8").on("data", (piece: string) => {
        text += piece;
      });
      child.stdout.destroy();
      child.on("close", () => resolve(text));
    });
    expect(stderr).toBe("");
    expect(existsSync(join(out, "summary.json"))).toBe(true);
  });
});

describe("saltern check", () => {
  const file = join(folder, "new-rows", "new.csv");
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
    ended(await saltern(["check", good, "--collection", demo, "--like", "harbour-2026-gravimetry"]), 0);
    expect(readdirSync(demo, { recursive: true }).sort()).toEqual(before);
  });

  test("reads the card beside the file, or the one named", async () => {
    writeFiles(join(folder, "beside"), {
      "mine.csv": "Compound,Solvent,T,S\nsalicylic acid,ethyl acetate,25,23\n",
      "mine.source.json": cardFor("mine"),
    });
    for (const more of [[], ["--card", join(folder, "beside", "mine.source.json")]]) {
      ended(await saltern(["check", join(folder, "beside", "mine.csv"), "--collection", demo, ...more]), 0);
    }
  });

  test.each([
    ["no card at all", ["check", "FILE", "--collection", "DEMO"]],
    ["a source that the collection has not", ["check", "FILE", "--collection", "DEMO", "--like", "nobody"]],
    ["a card that is not there", ["check", "FILE", "--collection", "DEMO", "--card", "nowhere.json"]],
    [
      "a table that is not there",
      ["check", "nowhere.csv", "--collection", "DEMO", "--like", "harbour-2026-gravimetry"],
    ],
    [
      "a collection that is not there",
      ["check", "FILE", "--collection", "nowhere", "--like", "harbour-2026-gravimetry"],
    ],
  ])("ends with 2 for %s", async (_, arguments_) => {
    const run = await saltern(
      arguments_.map((text) => (text === "FILE" ? file : text === "DEMO" ? demo : text)),
      { cwd: folder },
    );
    ended(run, 2);
    expect(run.stderr).toMatch(/to mend: /);
  });
});

describe("saltern convert", () => {
  const convert = (value: string, to: string, more: readonly string[] = [], temperature = "20 °C") => {
    const solute = more.includes("--solute") ? [] : ["--solute", "KNO3"];
    return saltern([
      "convert",
      value,
      "--to",
      to,
      ...solute,
      "--solvent",
      "water",
      "--temperature",
      temperature,
      ...more,
    ]);
  };

  test("prints value, uncertainty, steps and assumptions, for people and as JSON", async () => {
    const text = await convert("31.6 g/100 g solvent", "mole fraction");
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

  test("shows both readings of an open unit, chooses none, and ends with 2", async () => {
    const run = await convert("31.6 g/100 g", "mole fraction");
    ended(run, 2);
    expect(run.stdout).toMatch(/g\/100 g solution = .*\n.*g\/100 g solvent = /);
  });

  test.each([
    ["a unit that nobody knows", "3 spoons", "mole fraction"],
    ["a number that is none", "three g/100 g solvent", "mole fraction"],
    ["a value below zero", "-3 g/100 g solvent", "mole fraction"],
    ["more than all of the solution", "120 g/100 g solution", "mole fraction"],
    ["a target that leaves the basis open", "3 g/100 g solvent", "g/100 mL"],
  ])("ends with 2 for %s", async (_, value, to) => {
    const run = await saltern([
      ...["convert", "--to", to, "--solute", "KNO3", "--solvent", "water", "--temperature", "20 °C", "--", value],
    ]);
    ended(run, 2);
    expect(run.stderr).toMatch(/to mend: /);
  });

  test("refuses an open hydrate basis with the three readings, and takes a stated one", async () => {
    const copper = ["--solute", "copper(II) sulfate", "--solid-form", "pentahydrate"];
    const open = await convert("36.7 g/100 g solvent", "g/100 g solvent", copper);
    ended(open, 2);
    expect(open.stderr).toContain("hydrate per added solvent 20.7");
    const stated = [...copper, "--solute-basis", "hydrate per added solvent", "--json"];
    const run = await convert("36.7 g/100 g solvent", "g/100 g solvent", stated);
    expect(JSON.parse(run.stdout).value).toBeCloseTo(20.7, 1);
  });
});
