import { spawn } from "node:child_process";
import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { documentErrors } from "../schemas/table-rows.ts";
import { inProcess } from "./in-process.ts";
import { COMMAND, cardFor, ended, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const COMMANDS = ["new", "merge", "check", "convert"];

// One good row and one that is refused, for what has nothing to do with the data.
const small = join(folder, "small");

beforeAll(() => {
  writeFiles(small, {
    "collection.json": '{ "format": 1, "name": "small" }',
    "sources/bench.csv": "Compound,Solvent,T,S\nparacetamol,water,25,1.5\nparacetamol,water,30,n.m.\n",
    "sources/bench.source.json": cardFor("bench"),
  });
});

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
    const run = await inProcess([command, "--help"]);
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
    const run = await inProcess(arguments_);
    ended(run, 2);
    expect(run.stdout).toBe("");
    expect(run.stderr).not.toBe("");
    expect(run.stderr).not.toMatch(/^\s+at /m);
    expect(existsSync("y")).toBe(false);
  });

  test.each([
    ["no command", []],
    ["an unknown option of a command", ["merge", "x", "--out", "y", "--fast"]],
  ])("%s, as a program too", async (_, arguments_) => {
    const run = await saltern(arguments_, { cwd: folder });
    ended(run, 2);
    expect(run.stdout).toBe("");
    expect(run.stderr).not.toBe("");
    expect(run.stderr).not.toMatch(/^\s+at /m);
    expect(readdirSync(folder)).not.toContain("y");
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
    const merged = await inProcess(["merge", collection, "--out", join(folder, "new-out"), "--json"]);
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
      const run = await inProcess(["new", join(folder, place)]);
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
