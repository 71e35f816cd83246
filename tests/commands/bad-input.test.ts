import { mkdirSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { Summary } from "../../pipeline/records/generated/summary.ts";
import { bytes, HEADER, ROW, SOURCES } from "./bad-sources.ts";
import { inProcess } from "./in-process.ts";
import { cardFor, type Run, readJson, readTable, saltern, scratch, writeFiles } from "./saltern.ts";

const folder = scratch();
const collection = join(folder, "collection");
const out = join(folder, "out");
let run: Run;
let summary: Summary;
let refused: readonly Readonly<Record<string, string>>[];

beforeAll(async () => {
  writeFiles(folder, { "secret.csv": `${HEADER}${ROW}` });
  writeFiles(collection, { "collection.json": JSON.stringify({ format: 1, name: "bad-input" }) });
  for (const [name, { table, card }] of Object.entries(SOURCES)) {
    // The card of one source stands in a file of another name, whose own card is broken.
    const file = name === "shared-name" ? "other-name" : name;
    writeFiles(collection, { [`sources/${name}.csv`]: table, [`sources/${file}.source.json`]: cardFor(name, card) });
  }
  symlinkSync(join(folder, "secret.csv"), join(collection, "sources", "link.csv"));
  mkdirSync(join(collection, "sources", "folder.csv"));
  writeFiles(collection, {
    "sources/broken-json.source.json": '{\n  "format": 1,\n  "source": "broken-json",\n  "columns": {,}\n}\n',
    "sources/shared-name.source.json": "{",
    "sources/not-utf8.source.json": bytes('{ "title": "', [0xff, 0xe9], '" }'),
  });
  run = await saltern(["merge", collection, "--out", out]);
  summary = readJson<Summary>(out, "summary.json");
  refused = readTable(out, "refused.csv").rows;
}, 60_000);

const accountOf = (source: string) => summary.sources.filter((account) => account.source === source);

describe("a collection of bad sources is merged: each stops alone", () => {
  test("the command ends with 1, without a stack trace, and with every message on standard error", () => {
    expect(run.code).toBe(1);
    expect(run.stderr).not.toMatch(/^\s+at .*[:(]\d+/m);
    expect(run.stderr).not.toContain("a fault in saltern");
    expect(run.stdout).toContain("open ");
  });

  test("no reading is lost: readings = accepted + refused for every source, and none is below zero", () => {
    for (const { source, readings, accepted, refused: lost } of summary.sources) {
      expect([source, readings, accepted >= 0, lost >= 0]).toEqual([source, accepted + lost, true, true]);
    }
    expect(summary.counts.readings).toBe(summary.counts.accepted + summary.counts.refused);
    expect(refused).toHaveLength(summary.counts.refused);
  });

  test.each(Object.entries(SOURCES).map(([name, bad]) => [bad.what, name, bad] as const))(
    "%s",
    (_, name, { accepted, codes }) => {
      const lines = refused.filter(
        (row) => row.source === name && !(name === "shared-name" && row.code === "not-json"),
      );
      expect(lines.map(({ code }) => code)).toEqual(codes);
      expect(accountOf(name)[0]).toMatchObject({ accepted });
      for (const row of lines) expect([row.found, row.expected, row.mend].includes("")).toBe(false);
    },
  );

  test("malformed JSON of a card: line and column are told, and its source alone stops", () => {
    expect(refused.filter(({ source }) => source === "broken-json")).toMatchObject([{ code: "not-json" }]);
    expect(run.stderr + JSON.stringify(refused)).toMatch(/broken-json[\s\S]*(line 4|:4|"4")/);
    expect(refused.find(({ source }) => source === "broken-json")?.line).toBe("4");
  });

  test("a card that is not text stops its source alone", () => {
    expect(refused.filter(({ source }) => source === "not-utf8")).toHaveLength(1);
  });

  test("columns neither named nor carried are listed", () => {
    expect(accountOf("unknown-columns")[0]?.columns_not_used).toEqual(["Lot", "Mood"]);
  });

  test("missing marks are counted as such", () => {
    expect(accountOf("missing")[0]).toMatchObject({ readings: 1, missing_cells: 2 });
  });

  test("an unclosed quote names the line it begins in, and no row of its source gets through", () => {
    expect(refused.find(({ source }) => source === "unclosed-quote")?.line).toBe("3");
  });

  test("a name near to a solvent's is suggested", () => {
    const mends = refused.filter(({ source }) => source === "unknown-solvent").map(({ mend }) => mend);
    expect(mends[1]).toContain("ethanol");
  });

  test("escape and bidirectional characters of the data reach the terminal as visible codes only", () => {
    const shown = `${run.stdout}${run.stderr}`.replaceAll("\n", "");
    expect(shown.match(/[\p{Cc}\p{Cf}]/gu) ?? []).toEqual([]);
  });

  test("a message stays short, though the cell has 10 MB", () => {
    expect(Math.max(...run.stderr.split("\n").map((line) => line.length))).toBeLessThan(1500);
    expect(Math.max(...refused.map(({ raw = "" }) => raw.length))).toBeLessThan(100_000);
  });
});

describe("what stops the whole command with 2", () => {
  const attempt = async (files: Readonly<Record<string, string>>) => {
    const place = join(folder, "whole");
    rmSync(place, { recursive: true, force: true });
    writeFiles(place, files);
    const result = await inProcess(["merge", place, "--out", join(folder, "whole-out")]);
    expect(result.stderr).not.toMatch(/^\s+at .*[:(]\d+/m);
    return result;
  };

  test.each([
    ["no collection.json", { "notes.txt": "x" }, /collection\.json/],
    ["a collection.json that is not JSON", { "collection.json": '{\n "format": 1,\n}' }, /collection\.json:3/],
    ["an empty collection.json", { "collection.json": "" }, /collection\.json/],
    ["a key twice", { "collection.json": '{"format":1,"name":"a","name":"b"}' }, /name/],
    ["a format of the future", { "collection.json": '{"format":99,"name":"a"}' }, /format/],
    [
      "a setting that does not exist",
      { "collection.json": '{"format":1,"name":"a","settings":{"grid_step":5}}' },
      /grid_step/,
    ],
    [
      "a substance table without its columns",
      { "collection.json": '{"format":1,"name":"a"}', "substances.csv": "a,b\n1,2\n" },
      /substances\.csv/,
    ],
  ] as [string, Record<string, string>, RegExp][])("%s", async (_, files, told) => {
    const { code, stdout, stderr } = await attempt(files);
    expect([code, stdout]).toEqual([2, ""]);
    expect(stderr).toMatch(told);
    expect(stderr).toMatch(/to mend: /);
  });

  test("a collection that is a file, or does not exist", async () => {
    writeFileSync(join(folder, "a-file"), "x");
    for (const [place, start] of [
      ["a-file", inProcess],
      ["nowhere", saltern],
    ] as const) {
      const { code, stderr } = await start(["merge", join(folder, place), "--out", join(folder, "whole-out")]);
      expect([place, code]).toEqual([place, 2]);
      expect(stderr).not.toContain("a fault in saltern");
    }
  });

  test("a collection without any source is merged all the same, with a notice: it is empty, not wrong", async () => {
    const { code, stderr } = await attempt({ "collection.json": '{"format":1,"name":"a"}' });
    expect(code).toBe(0);
    expect(stderr).toContain("no-sources");
  });
});
