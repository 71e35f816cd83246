import { execFileSync } from "node:child_process";
import { createHash } from "node:crypto";
import { mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import fc from "fast-check";
import { expect, test } from "vitest";
import { formatProblem } from "../../pipeline/problems/catalogue.ts";
import { readSingleSource } from "../../pipeline/read/source.ts";
import { cellGetter, unitGetter } from "../../pipeline/records/cells.ts";
import { CARD, HEADER, readAccepted, readRefused, temporaryFolder } from "./temporary-collection.ts";

const ROWS = "benzoic acid,ethanol,20,46.8\nbenzoic acid,ethanol,30,56.3\n";

test("every row with a solubility is one reading, with its first physical line and its trimmed cells", async () => {
  const source = await readAccepted(`${HEADER}benzoic acid , ethanol,20,46.8\n\n${ROWS}`);
  expect(source.readings.map(({ line }) => line)).toEqual([2, 4, 5]);
  expect(source.readings[0]?.cells).toEqual(["benzoic acid", "ethanol", "20", "46.8"]);
  expect(source.readingsFound).toBe(3);
  expect(source.refused).toEqual([]);
  expect(source.notices).toEqual([]);
});

test("the fields of a reading come from columns with their unit, from a unit column, or from constants", async () => {
  const source = await readAccepted("S,Unit,Compound,T\n46.8,g/100 g solvent,benzoic acid,20\n", {
    columns: {
      solute: { column: "Compound" },
      temperature: { column: "T", unit: "°C" },
      solubility: { column: "S", unit_column: "Unit" },
    },
    constants: { solvent: "ethanol", uncertainty: { value: 0.02, unit: "%" }, equilibration_h: 24 },
  });
  const [reading] = source.readings;
  const text = (field: string) => (reading === undefined ? "" : cellGetter(source.places, field)(reading));
  const unit = (field: string) => (reading === undefined ? "" : unitGetter(source.places, field)(reading));
  expect(["solute", "solvent", "temperature", "solubility"].map(text)).toEqual([
    "benzoic acid",
    "ethanol",
    "20",
    "46.8",
  ]);
  expect(["temperature", "solubility", "uncertainty"].map(unit)).toEqual(["°C", "g/100 g solvent", "%"]);
  expect([text("uncertainty"), text("equilibration_h"), text("lot")]).toEqual(["0.02", "24", ""]);
});

test("columns that are carried, and those neither named nor carried, are told", async () => {
  const table = "Compound,Solvent,T,S,Remarks,Shelf,\nbenzoic acid,ethanol,20,46.8,slow,A3,x\n";
  const source = await readAccepted(table, { carry: ["Remarks"] });
  expect(source.carried).toEqual([{ heading: "Remarks", index: 4 }]);
  expect(source.columnsNotUsed).toEqual(["Shelf", "(column 7, without a heading)"]);
});

test("the checksum is that of the file as it stands on disk, whatever its encoding", async () => {
  const bytes = Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(HEADER + ROWS, "utf16le")]);
  const source = await readAccepted(bytes);
  expect(source.sha256).toBe(createHash("sha256").update(bytes).digest("hex"));
  expect(source.readings).toHaveLength(2);
});

test("a solubility cell with a missing mark is no reading, but counted; in other fields the mark means not reported", async () => {
  const source = await readAccepted(`${HEADER}a,ethanol,20,n.d.\nb,ethanol,20,\nc,ethanol,-,5\nd,ethanol,20,-\n`);
  expect(source.missingCells).toBe(3);
  expect(source.readings.map(({ line, cells }) => [line, cells[2]])).toEqual([[4, ""]]);
});

test("n.d. is a reading where the card does not list it as a missing mark", async () => {
  const source = await readAccepted(`${HEADER}a,ethanol,20,n.d.\n`, { table: { missing: ["-"] } });
  expect([source.readingsFound, source.missingCells]).toEqual([1, 0]);
});

test("cells that are no numbers stay readings, for the next stage to refuse by name", async () => {
  const values = ["n.m.", '"1,234.5"', "1.2e400", "NaN", "0x10", "-5", "0"];
  const source = await readAccepted(HEADER + values.map((value) => `a,ethanol,20,${value}\n`).join(""));
  expect(source.readings.map(({ cells, valueIndex }) => cells[valueIndex])).toEqual(
    values.map((value) => value.replaceAll('"', "")),
  );
});

test("a row with too few or too many cells refuses its reading alone and shows the row", async () => {
  const source = await readAccepted(`${HEADER}a,ethanol,20\nb,ethanol,20,1\n"c, d",ethanol,20,1,9\n`);
  expect(source.readings.map(({ line }) => line)).toEqual([3]);
  expect(source.refused.map(({ code, place, raw }) => [code, place.line, raw])).toEqual([
    ["ragged-row", 2, "a,ethanol,20"],
    ["ragged-row", 4, '"c, d",ethanol,20,1,9'],
  ]);
  expect(source.readingsFound).toBe(3);
});

test("empty cells beyond the header, empty headings at the end and blank rows refuse nothing", async () => {
  const beyond = await readAccepted(`${HEADER}a,ethanol,20,1,,\n,,,\n   \n,,,,,,\nb,ethanol,30,2\n`);
  expect(beyond.readings.map(({ line }) => line)).toEqual([2, 6]);
  const empty = await readAccepted("Compound,Solvent,T,S,,\na,ethanol,20,1\nb,ethanol,20,1,,\n");
  expect(empty.readingsFound).toBe(2);
  expect([...beyond.refused, ...empty.refused]).toEqual([]);
});

test.each([
  ["no bytes", ""],
  ["blank lines", "\n\r\n  \n"],
  ["a byte-order mark alone", "\ufeff"],
])("an empty file (%s) is refused", async (_, table) => {
  expect((await readRefused(table)).problem.code).toBe("empty-file");
});

test("a file with a header and no row is refused", async () => {
  expect((await readRefused(HEADER)).problem.code).toBe("header-only");
  expect((await readRefused("Compound,Solvent,T,S")).problem.code).toBe("header-only");
});

test("a table in which every solubility is missing is read with a notice", async () => {
  const source = await readAccepted(`${HEADER}a,ethanol,20,n.d.\n`);
  expect(source.notices.map(({ code }) => code)).toEqual(["no-readings"]);
});

test("a column that is missing is told with the heading that is closest to it", async () => {
  const { problem } = await readRefused("compound,Solvent,T,Sol.\na,ethanol,20,1\n");
  expect(problem).toMatchObject({
    code: "missing-column",
    place: { file: expect.stringMatching(/bench\.csv$/), line: 1 },
  });
  expect(problem.found).toContain('"Compound" (did you mean "compound"?)');
  expect(problem.found).toContain('"S"');
});

test("a heading that occurs twice is refused only where the card names it", async () => {
  const { problem } = await readRefused("Compound,Solvent,T,S,S\na,ethanol,20,1,2\n");
  expect(problem).toMatchObject({ code: "duplicate-column", found: '"S" heads columns 4 and 5' });
  const source = await readAccepted("Compound,Solvent,T,S,x,x\na,ethanol,20,1,2,3\n");
  expect(source.readingsFound).toBe(1);
});

test("lines above the header are passed over, whatever they hold", async () => {
  const source = await readAccepted(`Report "of 2026\r\nmade by, bench 4\r\n${HEADER}${ROWS}`, {
    table: { header_line: 3 },
  });
  expect(source.readings.map(({ line }) => line)).toEqual([4, 5]);
  const { problem } = await readRefused(HEADER + ROWS, { table: { header_line: 9 } });
  expect(problem).toMatchObject({ code: "empty-file", found: "nothing follows from line 9 on" });
});

test.each([
  ["LF", "\n"],
  ["CR LF", "\r\n"],
  ["CR", "\r"],
])("lines may end with %s", async (_, end) => {
  const source = await readAccepted((HEADER + ROWS).replaceAll("\n", end));
  expect(source.readings.map(({ line }) => line)).toEqual([2, 3]);
  expect(source.refused).toEqual([]);
});

test("line ends may be mixed within one file", async () => {
  const source = await readAccepted("Compound,Solvent,T,S\r\na,ethanol,20,1\nb,ethanol,20,2\rc,ethanol,20,3");
  expect(source.readings.map(({ line, cells }) => [line, cells[3]])).toEqual([
    [2, "1"],
    [3, "2"],
    [4, "3"],
  ]);
});

test("a quote that is never closed refuses the whole source and names the line where its row begins", async () => {
  const { problem } = await readRefused(`${HEADER}${ROWS}"a,ethanol,20,1\nb,ethanol,20,2\n`);
  expect(problem).toMatchObject({ code: "unclosed-quote", place: { line: 4 } });
});

test("a quote that swallows rows and closes by chance is not taken for a cell", async () => {
  const { problem } = await readRefused(`${HEADER}"a,ethanol,20,1\nb,ethanol,20,2"\nc,ethanol,20,3\n`);
  expect(problem).toMatchObject({ code: "unclosed-quote", place: { line: 2 } });
});

test.each([
  ["in an unquoted cell", 'a 5" tube,ethanol,20,1'],
  ["after a quoted cell", '"a"b,ethanol,20,1'],
])("a stray quote %s refuses the whole source and names the line", async (_, row) => {
  const { problem } = await readRefused(`${HEADER}${ROWS}"two\nlines",ethanol,20,1\n${row}\n${ROWS}`);
  expect(problem).toMatchObject({ code: "stray-quote", place: { line: 6 } });
});

test("quoted cells may hold delimiters, quotes, blanks at their ends and line breaks", async () => {
  const source = await readAccepted(`${HEADER}"a, ""b""", "ethanol\nabsolute " ,20,1\nc,ethanol,20,2\n`);
  expect(source.readings.map(({ line, cells }) => [line, ...cells])).toEqual([
    [2, 'a, "b"', "ethanol\nabsolute", "20", "1"],
    [4, "c", "ethanol", "20", "2"],
  ]);
});

test.each([
  ["unquoted", "x".repeat(10 * 2 ** 20)],
  ["quoted, with line breaks", `"${"x\n".repeat(5 * 2 ** 20)}"`],
  ["of nothing but delimiters", ",".repeat(10 * 2 ** 20)],
])("a row of 10 MB (%s) refuses the source at the line where it stands", async (_, cell) => {
  const { problem } = await readRefused(`${HEADER}${ROWS}${cell},ethanol,20,1\n`);
  expect(problem.code).toBe("oversized-cell");
  expect(problem.place.line).toBe(4);
  expect(formatProblem(problem).length).toBeLessThan(1000);
});

test.each([";", "\t", "|"])("cells may be separated by %j", async (delimiter) => {
  const source = await readAccepted((HEADER + ROWS).replaceAll(",", delimiter));
  expect(source.readings[1]?.cells).toEqual(["benzoic acid", "ethanol", "30", "56.3"]);
});

test("empty cells of a tab-separated table keep their places", async () => {
  const source = await readAccepted("Compound\tSolvent\tT\tS\tx\na\tethanol\t\t1\t\n", {}, "bench.tsv");
  expect(source.readings[0]?.cells).toEqual(["a", "ethanol", "", "1", ""]);
});

test("a delimiter that the card states is not second-guessed", async () => {
  const { problem } = await readRefused(HEADER + ROWS, { table: { delimiter: ";" } });
  expect(problem.code).toBe("missing-column");
});

test("a file saved again by a spreadsheet is read with a notice; CR LF alone is no reason for one", async () => {
  const saved = `\ufeff${(HEADER + ROWS).replaceAll(",", ";").replaceAll("\n", "\r\n")}`;
  const source = await readAccepted(saved);
  expect(source.notices).toMatchObject([
    { code: "resaved-by-spreadsheet", found: "a byte-order mark, semicolons between the cells, line ends CR LF" },
  ]);
  expect((await readAccepted((HEADER + ROWS).replaceAll("\n", "\r\n"))).notices).toEqual([]);
});

test("a decimal comma is found from the numbers, and constants follow it", async () => {
  const card = { ...CARD, columns: { ...CARD.columns }, constants: { molar_mass: 122.12 } };
  const source = await readAccepted("Compound;Solvent;T;S\na;ethanol;20,5;1,234\n", card);
  expect(source.decimal).toBe(",");
  expect(source.places.molar_mass).toEqual({ kind: "constant", text: "122,12" });
  expect((await readAccepted(HEADER + ROWS, card)).places.molar_mass).toEqual({ kind: "constant", text: "122.12" });
});

test("a compressed table is read; its checksum is that of the compressed file", async () => {
  const bytes = gzipSync(HEADER + ROWS);
  const source = await readAccepted(bytes, {}, "bench.csv.gz");
  expect(source.readings).toHaveLength(2);
  expect(source.sha256).toBe(createHash("sha256").update(bytes).digest("hex"));
});

test("a damaged compressed table is refused", async () => {
  expect((await readRefused("no gzip", {}, "bench.csv.gz")).problem.code).toBe("unreadable-file");
  const cut = gzipSync(HEADER + ROWS.repeat(1000)).subarray(0, 60);
  expect((await readRefused(cut, {}, "bench.csv.gz")).problem.code).toBe("unreadable-file");
});

test.each(["bench.xlsx", "bench.jsonl", "bench"])("%s is a kind of file that cannot be read", async (name) => {
  expect((await readRefused(HEADER, {}, name)).problem.code).toBe("unsupported-file-kind");
});

test("a table that is a folder, or that is not there, is refused", async () => {
  const folder = temporaryFolder({});
  mkdirSync(join(folder, "bench.csv"));
  const code = async (name: string) => {
    const read = await readSingleSource(join(folder, name), CARD);
    return read.ok ? "read" : read.refused.problem.code;
  };
  expect(await code("bench.csv")).toBe("unreadable-file");
  expect(await code("none.csv")).toBe("missing-file");
});

test.skipIf(process.platform === "win32")(
  "a pipe in place of a table or card is refused at once, not waited for",
  async () => {
    const folder = temporaryFolder({});
    for (const name of ["bench.csv", "card.json"]) execFileSync("mkfifo", [join(folder, name)]);
    for (const card of [CARD, join(folder, "card.json")]) {
      const read = await readSingleSource(join(folder, "bench.csv"), card);
      expect(read).toMatchObject({ ok: false, refused: { problem: { code: "unreadable-file" } } });
    }
  },
);

test("whatever the bytes, a table is read with its account in order or refused with a reason", async () => {
  const folder = temporaryFolder({});
  const path = join(folder, "bench.csv");
  const part = fc.constantFrom(
    ...["a,ethanol,20,1", '"', ",", "\n", "\r", "\r\n", "\0", ";", "\t", "é", "n.d.", '"a\nb"', "\ufeff"],
  );
  const text = fc.array(part, { maxLength: 30 }).map((parts) => Buffer.from(HEADER + parts.join("")));
  const noise = fc.uint8Array({ maxLength: 60 }).map((bytes) => Buffer.concat([Buffer.from(HEADER), bytes]));
  await fc.assert(
    fc.asyncProperty(fc.oneof(text, noise, fc.uint8Array({ maxLength: 60 })), async (bytes) => {
      writeFileSync(path, bytes);
      const read = await readSingleSource(path, CARD);
      if (!read.ok) {
        const { found, mend, place } = read.refused.problem;
        expect([found.length > 0, mend.length > 0, place.file]).toEqual([true, true, path]);
        return;
      }
      const { readings, refused, readingsFound, missingCells } = read.source;
      expect(readingsFound).toBe(readings.length + refused.length);
      expect(readingsFound + missingCells).toBeGreaterThan(0);
      const lines = [...readings, ...refused.map(({ place }) => ({ line: place.line ?? 0 }))].map(({ line }) => line);
      expect(new Set(lines).size).toBe(lines.length);
    }),
    { numRuns: 400 },
  );
});
