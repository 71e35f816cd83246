import { mkdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { Summary } from "../../pipeline/records/generated/summary.ts";
import { copyOf, type Run, readJson, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const elsewhere = join(folder, "elsewhere", "deep");

/** Checksums of all files of an edition, and the text of summary.json itself. */
const fingerprint = (out: string) => ({
  files: readJson<Summary>(out, "summary.json").files,
  summary: readFileSync(join(out, "summary.json"), "utf8"),
});

const out = (name: string) => join(folder, "out", name);

let reference: ReturnType<typeof fingerprint>;

beforeAll(async () => {
  mkdirSync(elsewhere, { recursive: true });
  copyOf("demo", join(folder, "demo"));
  await saltern(["merge", join(folder, "demo"), "--out", out("first")], { env: { TZ: "UTC", LC_ALL: "C" } });
  reference = fingerprint(out("first"));
}, 60_000);

describe("the same collection gives the same bytes", () => {
  test("when it is merged again, over the tables of the first time", async () => {
    expect((await saltern(["merge", join(folder, "demo"), "--out", out("first")])).code).toBe(1);
    expect(fingerprint(out("first"))).toEqual(reference);
  });

  test("in another working folder, time zone and locale, by a relative path, in another place", async () => {
    copyOf("demo", join(elsewhere, "another name"));
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
    const run: Run = await saltern(["merge", join(folder, "demo"), "--out", out("bare"), "--no-report"]);
    expect(run.stdout).toMatch(/open .*systems\.csv\n$/);
    expect(fingerprint(out("bare")).files).toEqual(reference.files.filter(({ path }) => !path.startsWith("report/")));
  });

  test("and other bytes once one cell differs, so that this test can fail", async () => {
    const copy = copyOf("demo", join(folder, "changed"));
    const file = join(copy, "sources", "harbour-2026-gravimetry.csv");
    const text = readFileSync(file, "utf8");
    writeFiles(copy, { "sources/harbour-2026-gravimetry.csv": text.replace("11.63", "11.64") });
    await saltern(["merge", copy, "--out", out("changed")]);
    expect(fingerprint(out("changed")).files).not.toEqual(reference.files);
  });
});
