import { mkdirSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import type { Summary } from "../../pipeline/records/generated/summary.ts";
import { cardFor, type Run, readJson, readTable, saltern, scratch, writeFiles } from "./saltern.ts";

const HEADER = "Compound,Solvent,T,S\n";
const ROW = "paracetamol,water,25,1.5\n";

/** One bad source: its table, changes of its card, and what has to become of it. */
interface BadSource {
  readonly what: string;
  readonly table: string | Uint8Array;
  readonly card?: Readonly<Record<string, unknown>>;
  /** Readings accepted, and the codes of what is refused, in the order of the lines. */
  readonly accepted: number;
  readonly codes: readonly string[];
}

const columns = (changes: Readonly<Record<string, unknown>>) => ({
  columns: {
    solute: { column: "Compound" },
    solvent: { column: "Solvent" },
    temperature: { column: "T", unit: "°C" },
    solubility: { column: "S", unit: "g/100 g solvent" },
    ...changes,
  },
});
const unit = (text: string) => columns({ solubility: { column: "S", unit: text } });
const rows = (...lines: readonly string[]) => `${HEADER}${lines.map((line) => `${line}\n`).join("")}`;
const values = (...cells: readonly string[]) => rows(...cells.map((cell) => `paracetamol,water,25,${cell}`));
const bytes = (...parts: readonly (string | readonly number[])[]) =>
  Buffer.concat(parts.map((part) => (typeof part === "string" ? Buffer.from(part, "utf8") : Buffer.from(part))));

const SOURCES: Readonly<Record<string, BadSource>> = {
  empty: { what: "an empty file", table: "", accepted: 0, codes: ["empty-file"] },
  blank: { what: "a file of blank lines", table: "\n\n  \n", accepted: 0, codes: ["empty-file"] },
  "header-only": { what: "a header and no row", table: HEADER, accepted: 0, codes: ["header-only"] },
  "missing-column": {
    what: "a column that the card names and the table has not",
    table: "Compound,Solvent,T\nparacetamol,water,25\n",
    ...{ accepted: 0, codes: ["missing-column"] },
  },
  "duplicate-column": {
    what: "a heading that stands twice",
    table: "Compound,Solvent,T,S,S\nparacetamol,water,25,1,2\n",
    ...{ accepted: 0, codes: ["duplicate-column"] },
  },
  "unknown-columns": {
    what: "columns that the card does not name",
    table: "Compound,Lot,Solvent,T,S,Mood\nparacetamol,4,water,25,1.5,good\n",
    ...{ accepted: 1, codes: [] },
  },
  ragged: {
    what: "rows with too few and too many cells",
    table: rows("paracetamol,water,25", "paracetamol,water,25,1.5,9", ROW.trim()),
    ...{ accepted: 1, codes: ["ragged-row", "ragged-row"] },
  },
  "stray-quote": {
    what: "a quote inside a cell",
    table: rows('para"cetamol,water,25,1.5'),
    ...{ accepted: 0, codes: ["stray-quote"] },
  },
  "unclosed-quote": {
    what: "a quote that is never closed",
    table: rows(ROW.trim(), '"paracetamol,water,25,1.5', ROW.trim()),
    ...{ accepted: 0, codes: ["unclosed-quote"] },
  },
  "bom-crlf": {
    what: "a byte-order mark and CR LF",
    table: bytes([0xef, 0xbb, 0xbf], `${HEADER}${ROW}`.replaceAll("\n", "\r\n")),
    ...{ accepted: 1, codes: [] },
  },
  "mixed-ends": {
    what: "mixed line ends and no last one",
    table: "Compound,Solvent,T,S\r\nparacetamol,water,25,1.5\nparacetamol,water,30,1.8\r\nparacetamol,water,35,2.1",
    ...{ accepted: 3, codes: [] },
  },
  "nul-byte": {
    what: "a NUL byte",
    table: bytes(HEADER, "paracetamol,wa", [0], "ter,25,1.5\n"),
    ...{ accepted: 0, codes: ["nul-byte"] },
  },
  "bad-utf8": {
    what: "bytes that are no UTF-8 where the card says UTF-8",
    table: bytes(HEADER, "parac", [0xff, 0xfe, 0xe9], "tamol,water,25,1.5\n"),
    card: { table: { encoding: "utf-8" } },
    ...{ accepted: 0, codes: ["bad-encoding"] },
  },
  "huge-cell": {
    what: "a cell of 10 MB",
    table: rows(ROW.trim(), `${"x".repeat(10 << 20)},water,25,1.5`),
    ...{ accepted: 0, codes: ["oversized-cell"] },
  },
  numbers: {
    what: "cells that are no solubility",
    table: values('"1,234.5"', "1.2e400", "NaN", "0x10", "-0.2", "0", "n.m.", "1.5"),
    accepted: 1,
    codes: [
      ...["ambiguous-number", "number-out-of-range", "not-a-number", "not-a-number"],
      ...["value-not-positive", "value-not-positive", "not-a-number"],
    ],
  },
  missing: {
    what: "cells that hold a missing mark: counted, and no readings",
    table: values("n.d.", "", "1.5"),
    ...{ accepted: 1, codes: [] },
  },
  "all-of-it": {
    what: "100 % and more",
    table: values("100", "130", "1.5"),
    card: unit("% w/w"),
    ...{ accepted: 1, codes: ["fraction-at-or-above-one", "fraction-at-or-above-one"] },
  },
  cold: {
    what: "temperatures at and below absolute zero",
    table: rows(
      "paracetamol,water,-273.15,1",
      "paracetamol,water,-300,1",
      "paracetamol,water,-5,1",
      "paracetamol,water,,1",
    ),
    ...{ accepted: 1, codes: ["below-absolute-zero", "below-absolute-zero", "missing-temperature"] },
  },
  "unknown-solvent": {
    what: "a solvent that no table knows",
    table: rows("paracetamol,sea of tears,25,1", "paracetamol,ethanl,25,1"),
    ...{ accepted: 0, codes: ["unknown-solvent", "unknown-solvent"] },
  },
  "unknown-unit": {
    what: "a unit that nobody knows",
    table: rows(ROW.trim()),
    card: unit("spoons/cup"),
    ...{ accepted: 0, codes: ["unknown-unit"] },
  },
  "open-unit": {
    what: "a unit that leaves the reference open",
    table: rows(ROW.trim()),
    card: unit("g/100 g"),
    ...{ accepted: 0, codes: ["open-unit"] },
  },
  "outside-by-dots": {
    what: "a card that points out of the collection by ..",
    table: rows(ROW.trim()),
    card: { file: "../../secret.csv" },
    ...{ accepted: 0, codes: ["outside-collection"] },
  },
  "outside-by-root": {
    what: "a card that points out of the collection by an absolute path",
    table: rows(ROW.trim()),
    card: { file: "/etc/passwd" },
    ...{ accepted: 0, codes: ["outside-collection"] },
  },
  "outside-by-link": {
    what: "a symbolic link that leads out of the collection",
    table: rows(ROW.trim()),
    card: { file: "link.csv" },
    ...{ accepted: 0, codes: ["outside-collection"] },
  },
  "missing-file": {
    what: "a card whose table is not there",
    table: rows(ROW.trim()),
    card: { file: "nowhere.csv" },
    ...{ accepted: 0, codes: ["missing-file"] },
  },
  "folder-for-file": {
    what: "a card whose table is a folder",
    table: rows(ROW.trim()),
    card: { file: "folder.csv" },
    ...{ accepted: 0, codes: ["unreadable-file"] },
  },
  "wrong-card": {
    what: "a card with a key that no card has",
    table: rows(ROW.trim()),
    card: { colour: "green" },
    ...{ accepted: 0, codes: ["wrong-card"] },
  },
  hostile: {
    what: "names with escape and bidirectional characters and markup",
    table: rows('"\u001b[31m\u202edrowssap<script>",\u001b]0;x\u0007water,25,1', "\u202e<b>&x,water,25,1"),
    ...{ accepted: 1, codes: ["unknown-solvent"] },
  },
  "shared-name": {
    what: "a source that another card's file is named after",
    table: rows(ROW.trim()),
    ...{ accepted: 1, codes: [] },
  },
};

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
    const result = await saltern(["merge", place, "--out", join(folder, "whole-out")]);
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
    for (const place of ["a-file", "nowhere"]) {
      const { code, stderr } = await saltern(["merge", join(folder, place), "--out", join(folder, "whole-out")]);
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
