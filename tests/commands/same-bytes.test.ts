import { mkdirSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { Summary } from "../../pipeline/records/generated/summary.ts";
import { inProcess } from "./in-process.ts";
import { copyOf, type Run, readJson, readTable, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const elsewhere = join(folder, "elsewhere", "deep");

/** Checksums of all files of an edition, and the text of summary.json itself. */
const fingerprint = (out: string) => ({
  files: readJson<Summary>(out, "summary.json").files,
  summary: readFileSync(join(out, "summary.json"), "utf8"),
});

/** Five sources with flags, rulings, mixed solvents and clear points, so that six merges stay quick. */
const KEPT = [
  ...["harbour-2026-gravimetry", "harbour-2026-hplc", "crystal-lab-2025-clear-points"],
  ...["kilo-lab-2026-antisolvent", "solvent-screen-2025-refractometry"],
];

/** A copy of the demo with these sources alone, and the rulings on them. */
function smallDemo(to: string): string {
  copyOf("demo", to);
  for (const name of readdirSync(join(to, "sources"))) {
    if (!KEPT.some((source) => name.startsWith(source))) rmSync(join(to, "sources", name));
  }
  const [header, ...rulings] = readFileSync(join(to, "rulings.csv"), "utf8").trimEnd().split("\n");
  const kept = rulings.filter((line) => KEPT.some((source) => line.split(",")[1]?.startsWith(source)));
  writeFiles(to, { "rulings.csv": `${[header, ...kept].join("\n")}\n` });
  return to;
}

const out = (name: string) => join(folder, "out", name);

let reference: ReturnType<typeof fingerprint>;

beforeAll(async () => {
  mkdirSync(elsewhere, { recursive: true });
  smallDemo(join(folder, "demo"));
  await saltern(["merge", join(folder, "demo"), "--out", out("first")], { env: { TZ: "UTC", LC_ALL: "C" } });
  reference = fingerprint(out("first"));
}, 60_000);

describe("the same collection gives the same bytes", () => {
  test("of tables that hold what they are asked to: flags settled and open, a mixture, a refused reading", () => {
    const rows = (name: string) => readTable(out("first"), name).rows;
    expect(new Set(rows("flags.csv").map(({ ruling }) => ruling !== ""))).toEqual(new Set([true, false]));
    for (const name of ["mixtures.csv", "refused.csv", "planning-cooling.csv"]) {
      expect([name, rows(name).length > 0]).toEqual([name, true]);
    }
  });

  test("when it is merged again, over the tables of the first time, in a process that did other work before", async () => {
    expect((await inProcess(["merge", join(folder, "demo"), "--out", out("first")])).code).toBe(1);
    expect(fingerprint(out("first"))).toEqual(reference);
  });

  test("in another working folder, time zone and locale, by a relative path, in another place", async () => {
    smallDemo(join(elsewhere, "another name"));
    const env = { TZ: "Asia/Kolkata", LANG: "de_DE.UTF-8", LC_ALL: "de_DE.UTF-8", LANGUAGE: "de" };
    const run = await saltern(["merge", "another name", "--out", "../tables"], { cwd: elsewhere, env });
    expect(run.code).toBe(1);
    expect(fingerprint(join(elsewhere, "..", "tables"))).toEqual(reference);
  });

  test("whether the messages are asked for, silenced, or written as JSON", async () => {
    await saltern([
      "merge",
      join(folder, "demo"),
      "--out",
      out("json"),
      "--json",
      "--quiet",
      "--log",
      join(folder, "log"),
    ]);
    expect(fingerprint(out("json"))).toEqual(reference);
  });

  test("with the same tables when no report is wanted", async () => {
    const run: Run = await inProcess(["merge", join(folder, "demo"), "--out", out("bare"), "--no-report"]);
    expect(run.stdout).toMatch(/open .*systems\.csv\n$/);
    expect(fingerprint(out("bare")).files).toEqual(reference.files.filter(({ path }) => !path.startsWith("report/")));
  });

  test("and other bytes once one cell differs, so that this test can fail", async () => {
    const copy = smallDemo(join(folder, "changed"));
    const file = join(copy, "sources", "harbour-2026-gravimetry.csv");
    const text = readFileSync(file, "utf8");
    writeFiles(copy, { "sources/harbour-2026-gravimetry.csv": text.replace("11.63", "11.64") });
    await inProcess(["merge", copy, "--out", out("changed")]);
    expect(fingerprint(out("changed")).files).not.toEqual(reference.files);
  });
});
