import { join } from "node:path";
import { expect, test } from "vitest";
import type { Problem } from "../../pipeline/problems/catalogue.ts";
import { InputError } from "../../pipeline/problems/input-error.ts";
import { readCard } from "../../pipeline/read/card-file.ts";
import { CARD, temporaryFolder } from "./temporary-collection.ts";

/** The problem of a card that cannot be followed. */
function problemOf(text: string | Uint8Array): Problem {
  const path = join(temporaryFolder({ "bench.source.json": text }), "bench.source.json");
  try {
    readCard(path, "sources/bench.source.json");
  } catch (error) {
    if (error instanceof InputError) return error.problem;
    throw error;
  }
  throw new Error("the card was read");
}

/** A card as written by hand: one key a line. */
const written = (changes: object) => JSON.stringify({ ...CARD, ...changes }, null, 2);

test("a card is read as it stands", () => {
  const path = join(temporaryFolder({ "a.source.json": `\ufeff${written({ title: "Grün" })}` }), "a.source.json");
  expect(readCard(path, "a.source.json")).toEqual({ ...CARD, title: "Grün" });
});

test.each([
  [
    "a comma too many",
    '{\n  "format": 1,\n}',
    3,
    1,
    "a key in double quotes is expected, or there is a comma too many",
  ],
  ["a comma missing", '{\n  "format": 1\n  "source": "a"\n}', 3, 3, "a comma is expected"],
  ["a comment", '{\n  // mine\n  "format": 1\n}', 2, 3, "a comment, which strict JSON does not allow"],
  ["single quotes", "{\n  'format': 1\n}", 2, 3, "a word or character that JSON does not know"],
  ["a brace missing", '{\n  "format": 1', 2, 14, "a closing brace } is expected"],
  ["text after the end", "{}\n{}", 2, 1, "something follows after the end of the value"],
  ["a key given twice", '{\n  "format": 1,\n  "format": 2\n}', 3, 3, "the key is given twice"],
])("malformed JSON (%s) is told with line and column", (_, text, line, column, why) => {
  const problem = problemOf(text);
  expect(problem).toMatchObject({ code: "not-json", place: { file: "sources/bench.source.json", line } });
  expect(problem.found).toBe(`at line ${line}, column ${column}: ${why}`);
});

test.each([
  ["an empty file", "", "not-json"],
  ["a number with a leading zero", '{ "format": 01 }', "not-json"],
  ["brackets nested a hundred thousand deep", "[".repeat(100_000), "not-json"],
  ["a file larger than a megabyte", `{ "a": "${"x".repeat(2 ** 20)}" }`, "not-json"],
  ["bytes that are no UTF-8", Uint8Array.of(0x7b, 0xe9, 0x7d), "bad-encoding"],
])("%s is refused", (_, text, code) => {
  expect(problemOf(text).code).toBe(code);
});

test("brackets inside a text do not count as nesting", () => {
  const path = join(
    temporaryFolder({ "a.source.json": written({ title: `\\" ${"[{".repeat(200)}` }) }),
    "a.source.json",
  );
  expect(readCard(path, "a.source.json").title).toContain("[{[{");
});

test("a key that is not known is told with its line and the known key that is closest", () => {
  const problem = problemOf(written({ licnce: "internal" }));
  expect(problem).toMatchObject({ code: "wrong-card", place: { line: 21, column: "licnce" } });
  expect(problem.found).toBe('"licnce" is not a key of the file (did you mean "licence"?)');
  expect(problem.expected).toContain("licence");
});

test("a field that is misspelt under columns is told with the field that was meant", () => {
  const { solubility, ...others } = CARD.columns;
  const problem = problemOf(written({ columns: { ...others, solubilty: solubility } }));
  expect(problem.found).toBe('"solubilty" is not a key of columns (did you mean "solubility"?)');
});

test.each([
  [{ format: 2 }, "format", "format is 2", "1"],
  [{ origin: "lab" }, "origin", 'origin is "lab"', 'one of "laboratory", "literature", "open-dataset", "handbook"'],
  [{ table: { header_line: 0 } }, "header_line", "table.header_line is 0", "a number >= 1"],
  [{ table: { encoding: "utf-7" } }, "encoding", 'table.encoding is "utf-7"', 'one of "auto"'],
  [{ file: 7 }, "file", "file is 7", "a value of type text"],
  [{ date: "14.03.2026" }, "date", 'date is "14.03.2026"', "a date such as 2026-03-14, 2026-03 or 2026"],
  [{ carry: ["a", "a"] }, "carry", 'carry is ["a","a"]', "every entry once"],
])(
  "a value that cannot be followed (%j) is told with its key, what was found and what was expected",
  (change, key, found, expected) => {
    const problem = problemOf(written(change));
    expect(problem).toMatchObject({ code: "wrong-card", place: { column: key }, found });
    expect(problem.expected).toContain(expected);
  },
);

test("a key that is needed and missing is told", () => {
  const { file: _, ...card } = CARD;
  expect(problemOf(JSON.stringify(card))).toMatchObject({ code: "wrong-card", found: 'the file has no "file"' });
});

test("a unit and a unit column for one column are refused", () => {
  const columns = { ...CARD.columns, solubility: { column: "S", unit: "g/L", unit_column: "U" } };
  expect(problemOf(written({ columns })).expected).toContain("not both");
});

test("all faults of a card are told at once, in the order of the file", () => {
  const problem = problemOf(written({ format: 3, method: "hand", zzz: 1 }));
  expect(problem.place).toMatchObject({ line: 2, column: "format" });
  expect(problem.found).toMatch(/^format is 3; line 21: method is "hand" \(expected one of .*\); line 22: "zzz"/);
});

test.each(["Harbour", "-a", "a b", "a".repeat(65), "../a", ""])("%j is no name for a source", (source) => {
  expect(problemOf(written({ source }))).toMatchObject({
    code: "bad-source-name",
    place: { column: "source", line: 3 },
  });
});

test("a field that is both a column and a constant is refused", () => {
  const problem = problemOf(written({ constants: { solvent: "ethanol" } }));
  expect(problem).toMatchObject({ code: "wrong-card", place: { column: "solvent", line: 22 } });
  expect(problem.found).toBe('"solvent" is both a column and a constant');
});

test.each([
  ["solute", "the card does not say where the solute stands"],
  ["solvent", "the card does not say where the solvent stands"],
  ["temperature", "the card does not say where the temperature stands"],
  ["solubility", "the card names no solubility column"],
])("a card without %s is refused", (field, found) => {
  const columns = Object.fromEntries(Object.entries(CARD.columns).filter(([name]) => name !== field));
  expect(problemOf(written({ columns }))).toMatchObject({ code: "wrong-card", found });
});

test("a solute may be known by an identifier instead of a name", () => {
  const columns = { ...CARD.columns, solute: undefined, cas: { column: "CAS" } };
  const path = join(temporaryFolder({ "a.source.json": written({ columns }) }), "a.source.json");
  expect(readCard(path, "a.source.json").columns.cas).toEqual({ column: "CAS" });
});
