import { mkdirSync, symlinkSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { expect, test } from "vitest";
import { readCardNamed, readCollection, readCollectionCard } from "../../pipeline/read/collection.ts";
import { CARD, collectionWith, HEADER, temporaryFolder } from "./temporary-collection.ts";

const TABLE = `${HEADER}benzoic acid,ethanol,20,46.8\n`;
const card = (source: string, file = `${source}.csv`) => JSON.stringify({ ...CARD, source, file });
const codes = (problems: readonly { readonly code: string }[]) => problems.map(({ code }) => code);

test("the collection that new users start from is read without a word", async () => {
  const starter = fileURLToPath(new URL("../../datasets/starter/", import.meta.url));
  const { sources, refusedSources, notices } = await readCollection(starter);
  expect(sources.map(({ name, readingsFound, missingCells }) => [name, readingsFound, missingCells])).toEqual([
    ["example-2026-gravimetry", 11, 1],
  ]);
  expect([...refusedSources, ...notices]).toEqual([]);
});

test("sources come in the order of their names, each with its file relative to the collection", async () => {
  const folder = collectionWith(
    TABLE,
    {},
    {
      "sources/z.source.json": card("z", "./z.tsv"),
      "sources/z.tsv": TABLE.replaceAll(",", "\t"),
      "sources/a9.source.json": card("a9"),
      "sources/a9.csv": TABLE,
    },
  );
  const { sources, card: own, notices } = await readCollection(folder);
  expect(sources.map(({ name, file }) => [name, file])).toEqual([
    ["a9", "sources/a9.csv"],
    ["bench", "sources/bench.csv"],
    ["z", "sources/z.tsv"],
  ]);
  expect(own).toEqual({ format: 1, name: "test" });
  expect(notices).toEqual([]);
});

test("a wrong card stops its source alone", async () => {
  const more = { "sources/wrong.source.json": "{ 1", "sources/wrong.csv": TABLE, "sources/also.source.json": "{}" };
  const { sources, refusedSources, notices } = await readCollection(collectionWith(TABLE, {}, more));
  expect(sources.map(({ name }) => name)).toEqual(["bench"]);
  expect(refusedSources.map(({ name, file, problem }) => [name, file, problem.code])).toEqual([
    ["also", "sources/also.source.json", "wrong-card"],
    ["wrong", "sources/wrong.source.json", "not-json"],
  ]);
  expect(notices).toEqual([]);
});

test.each([
  ["../../outside.csv", "outside-collection"],
  ["../../../../../etc/passwd", "outside-collection"],
  ["/etc/passwd", "outside-collection"],
  ["C:\\outside.csv", "outside-collection"],
  ["none.csv", "missing-file"],
  [".", "unreadable-file"],
])("a card that points to %s is refused: %s", async (file, code) => {
  const { sources, refusedSources } = await readCollection(collectionWith(TABLE, { file }));
  expect(sources).toEqual([]);
  expect(refusedSources).toMatchObject([{ name: "bench", problem: { code, place: { column: "file" } } }]);
});

test("a table elsewhere inside the collection may be named", async () => {
  const folder = collectionWith("", { file: "../tables/x.csv" }, { "tables/x.csv": TABLE });
  expect((await readCollection(folder)).sources).toMatchObject([{ file: "tables/x.csv", readingsFound: 1 }]);
});

test("symbolic links out of the collection are not followed, for tables, folders, cards or the tables beside them", async () => {
  const outside = temporaryFolder({
    "t.csv": TABLE,
    "c.source.json": card("c"),
    "substances.csv": "name,role\nx,solute\n",
  });
  const folder = collectionWith("", { file: "link.csv" }, { "sources/in.source.json": card("in", "far/t.csv") });
  symlinkSync(join(outside, "t.csv"), join(folder, "sources/link.csv"));
  symlinkSync(outside, join(folder, "sources/far"));
  symlinkSync(join(outside, "c.source.json"), join(folder, "sources/c.source.json"));
  symlinkSync("loop.source.json", join(folder, "sources/loop.source.json"));
  const { refusedSources } = await readCollection(folder);
  expect(refusedSources.map(({ name, problem }) => [name, problem.code])).toEqual([
    ["bench", "outside-collection"],
    ["c", "outside-collection"],
    ["in", "outside-collection"],
    ["loop", "missing-file"],
  ]);
  symlinkSync(join(outside, "substances.csv"), join(folder, "substances.csv"));
  await expect(readCollection(folder)).rejects.toMatchObject({ problem: { code: "outside-collection" } });
});

test("of two cards with one source name the one whose file has that name is read, the other refused", async () => {
  const more = { "sources/a-copy.source.json": card("bench", "bench.csv") };
  const { sources, refusedSources } = await readCollection(collectionWith(TABLE, {}, more));
  expect(sources).toMatchObject([{ name: "bench" }]);
  expect(refusedSources).toMatchObject([{ name: "a-copy", problem: { code: "duplicate-source" } }]);
});

test("tables without a card and sub-folders are told, other files are left alone", async () => {
  const folder = collectionWith(
    TABLE,
    {},
    {
      "sources/alone.csv": TABLE,
      "sources/book.xlsx": "PK",
      "sources/README.md": "notes",
      "sources/deep/bench2.source.json": card("bench2"),
    },
  );
  const { sources, notices } = await readCollection(folder);
  expect(sources).toHaveLength(1);
  expect(notices.map(({ code, place }) => [code, place.file])).toEqual([
    ["table-without-card", "sources/alone.csv"],
    ["table-without-card", "sources/book.xlsx"],
    ["subfolder-not-read", "sources/deep"],
  ]);
});

test("a collection without sources is read with a notice", async () => {
  const folder = temporaryFolder({ "collection.json": '{ "format": 1, "name": "new" }' });
  expect(codes((await readCollection(folder)).notices)).toEqual(["no-sources"]);
  mkdirSync(join(folder, "sources"));
  expect(codes((await readCollection(folder)).notices)).toEqual(["no-sources"]);
});

test.each([
  ["no such folder", undefined, "missing-file"],
  ["malformed", "{", "not-json"],
  ["an unknown key", '{ "format": 1, "name": "a", "setings": {} }', "wrong-collection"],
  ["a setting that does not exist", '{ "format": 1, "name": "a", "settings": { "grid": 5 } }', "wrong-collection"],
  ["a list", "[]", "wrong-collection"],
])("a collection.json that is wrong (%s) stops everything", async (_, text, code) => {
  const folder = temporaryFolder(text === undefined ? {} : { "collection.json": text });
  const dir = text === undefined ? join(folder, "none") : folder;
  expect(() => readCollectionCard(dir)).toThrow(
    expect.objectContaining({ problem: expect.objectContaining({ code }) }),
  );
  await expect(readCollection(dir)).rejects.toMatchObject({ problem: { code } });
});

test("own substances, solid forms and rulings are rows of text with their lines; columns may be left out or moved", async () => {
  const folder = collectionWith(
    TABLE,
    {},
    {
      "substances.csv": 'role,name,synonyms\nsolute,"N,N-x","a;b"\n\nsolvent,y,\n',
      "solid_forms.csv": "solute;form;kind\ny;II;polymorph\n",
      "rulings.csv": "ruling_id,target,action,reason,by,date,fingerprint\nr1,bench:2,keep,seen,steward,2026-03-14,ab\n",
    },
  );
  const { own, rulings } = await readCollection(folder);
  expect(own.substances.map(({ line, values }) => [line, values.name, values.synonyms, values.cas])).toEqual([
    [2, "N,N-x", "a;b", ""],
    [4, "y", "", ""],
  ]);
  expect(own.solidForms).toMatchObject([
    { line: 2, values: { solute: "y", form: "II", kind: "polymorph", guest: "" } },
  ]);
  expect(rulings).toMatchObject([{ file: "rulings.csv", line: 2, values: { target: "bench:2", evidence: "" } }]);
});

test.each([
  ["a column that is not known", "name,role,synonims\nx,solute,y\n", "wrong-table", 'did you mean "synonyms"'],
  ["a column that is missing", "name\nx\n", "wrong-table", 'no column "role"'],
  ["a column given twice", "name,role,name\nx,solute,y\n", "wrong-table", "twice"],
  ["a row that is too short", "name,role,cas\nx,solute\n", "wrong-table", "2 cells, the header 3"],
  ["a quote that is never closed", 'name,role\n"x,solute\n', "unclosed-quote", ""],
])("own substances with %s stop everything: half a table would mislead in silence", async (_, text, code, found) => {
  const folder = collectionWith(TABLE, {}, { "substances.csv": text });
  await expect(readCollection(folder)).rejects.toMatchObject({
    problem: { code, found: expect.stringContaining(found) },
  });
});

test("the card of one source can be asked for by name; an unknown name is told with the known ones", () => {
  const folder = collectionWith(TABLE, {}, { "sources/bad.source.json": "{" });
  expect(readCardNamed(folder, "bench").source).toBe("bench");
  expect(() => readCardNamed(folder, "bad")).toThrow(expect.objectContaining({ name: "InputError" }));
  expect(() => readCardNamed(folder, "banch")).toThrow('there is no source "banch"');
});
