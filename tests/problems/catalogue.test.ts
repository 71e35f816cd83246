import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { formatProblem, kinds, problem } from "../../pipeline/problems/catalogue.ts";
import { InputError } from "../../pipeline/problems/input-error.ts";
import { catalogueAsMarkdown } from "../../pipeline/problems/readme-text.ts";

test("a problem is printed as place, what was found, what was expected and how to mend it", () => {
  const found = problem(
    "not-a-number",
    { source: "a", file: "sources/a.csv", line: 14, column: "S" },
    { found: '"n.m." is not a number', expected: "a number", mend: "correct the cell" },
  );
  expect(formatProblem(found)).toBe(
    'sources/a.csv:14 column S: "n.m." is not a number [not-a-number]\n  expected a number\n  to mend: correct the cell',
  );
});

test("what a problem does not say itself comes from the catalogue", () => {
  const found = problem("empty-file", { file: "a.csv" }, { found: "0 bytes" });
  expect(found.expected).toBe(kinds["empty-file"].expected);
  expect(found.mend).toBe(kinds["empty-file"].mend);
  expect(formatProblem(found).split("\n")[0]).toBe("a.csv: 0 bytes [empty-file]");
});

test("escape and bidirectional characters from data are made visible in every part of a printed problem", () => {
  const hostile = "\u001b[31m\u202eevil\u0007\r\n";
  const place = { file: hostile, line: 1, column: hostile };
  const text = formatProblem(
    problem("not-a-number", place, { found: hostile, expected: hostile, mend: hostile, raw: hostile }),
  );
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what must not be there
  expect(text.replaceAll("\n  ", " ")).not.toMatch(/[\u0000-\u001f\u202a-\u202e]/);
  expect(text).toContain("\\x1b[31m\\u{202e}evil\\x07\\r\\n");
});

test("a cell of a million characters does not fill the screen", () => {
  const found = problem("not-a-number", { file: "a.csv" }, { found: "9".repeat(1_000_000) });
  expect(formatProblem(found).length).toBeLessThan(1000);
  expect(found.found).toContain("(1000000 characters)");
});

test("every kind of problem says what is wrong, what was expected and how to mend it", () => {
  for (const [code, kind] of Object.entries(kinds)) {
    expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
    expect(kind.meaning, code).toMatch(/^[A-Z].*\.$/s);
    for (const phrase of [kind.expected, kind.mend]) {
      expect(phrase.length, code).toBeGreaterThan(5);
      expect(phrase, code).not.toMatch(/\.$/);
    }
  }
});

test("README.md of the problems agrees with the catalogue", () => {
  const readme = readFileSync(new URL("../../pipeline/problems/README.md", import.meta.url), "utf8");
  expect(readme, "run: npx tsx pipeline/problems/write-readme.ts").toBe(catalogueAsMarkdown());
});

test("an input error carries its problem", () => {
  const found = problem("missing-file", { file: "a.csv" }, { found: "there is no file" });
  expect(new InputError(found)).toMatchObject({ problem: found, message: "there is no file", name: "InputError" });
});
