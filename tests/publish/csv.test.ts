import { parse } from "csv-parse/sync";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type Cell, csvCell, csvRecord, csvTable } from "../../pipeline/publish/csv.ts";

describe("a cell of an output table (RFC 4180)", () => {
  test.each([
    ["plain", "plain"],
    ["", ""],
    [undefined, ""],
    ["a,b", '"a,b"'],
    ['5" tube', '"5"" tube"'],
    ["two\nlines", '"two\nlines"'],
    ["carriage\rreturn", '"carriage\rreturn"'],
    ["semicolon; tab\t", "semicolon; tab\t"],
    ["  kept  ", "  kept  "],
  ] as [Cell, string][])("%j is written %j", (cell, text) => {
    expect(csvCell(cell)).toBe(text);
  });

  test.each([
    [0, "0"],
    [-0, "0"],
    [Number.NaN, ""],
    [0.1 + 0.2, "0.30000000000000004"],
    [1e21, "1e+21"],
    [5e-324, "5e-324"],
    [100, "100"],
    [-2.5e-7, "-2.5e-7"],
  ])("the number %d is written %j: shortest form that gives the same number back", (number, text) => {
    expect(csvCell(number)).toBe(text);
    if (!Number.isNaN(number)) expect(Number(text)).toBe(number === 0 ? 0 : number);
  });

  test("every number comes back as it was", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (number) => {
        expect(Number(csvCell(number)) === number).toBe(true);
      }),
    );
  });
});

describe("a table", () => {
  const table = (columns: readonly string[], rows: readonly (readonly Cell[])[]) =>
    [...csvTable(columns, rows)].join("");

  test("is a header and records, each ended by one line feed", () => {
    expect(table(["a", "b"], [[1, "x"]])).toBe("a,b\n1,x\n");
    expect(table(["a", "b"], [])).toBe("a,b\n");
  });

  test("comes back from a CSV reader as the texts that went in", () => {
    const text = fc.oneof(fc.string(), fc.constantFrom(",", '"', '""', "\n", "\r\n", "\r", 'a,"b"\n', "'"));
    const rows = fc.integer({ min: 1, max: 6 }).chain((width) =>
      fc.record({
        columns: fc.array(fc.string({ minLength: 1 }), { minLength: width, maxLength: width }),
        cells: fc.array(fc.array(text, { minLength: width, maxLength: width }), { maxLength: 8 }),
      }),
    );
    fc.assert(
      fc.property(rows, ({ columns, cells }) => {
        const back = parse(table(columns, cells), { record_delimiter: "\n", skip_empty_lines: false }) as string[][];
        // One empty cell alone in its record is an empty line, which RFC 4180 cannot tell from no record.
        const written = [columns, ...cells];
        if (columns.length > 1) expect(back).toEqual(written);
      }),
      { numRuns: 300 },
    );
  });

  test("record holds as many cells as were given", () => {
    expect(csvRecord(["a", undefined, Number.NaN, 0])).toBe("a,,,0\n");
  });
});
