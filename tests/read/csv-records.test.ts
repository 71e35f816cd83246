import fc from "fast-check";
import { expect, test } from "vitest";
import { cutIntoRecords } from "../../pipeline/read/csv-records.ts";
import { asUtf8 } from "../../pipeline/read/encoding.ts";

/** A stream of the bytes of a text, cut into pieces of some length. */
async function* inPieces(text: string, length: number): AsyncGenerator<Buffer> {
  const bytes = Buffer.from(text, "utf8");
  for (let from = 0; from < bytes.length; from += length) yield bytes.subarray(from, from + length);
}

async function records(text: string, length: number): Promise<{ cells: string[]; line: number }[]> {
  const place = { file: "a.csv" };
  const found: { cells: string[]; line: number }[] = [];
  const pieces = asUtf8(inPieces(text, length), "auto", place);
  await cutIntoRecords(pieces, { delimiter: ",", firstLine: 1, place }, (cells, line) => found.push({ cells, line }));
  return found;
}

const lineEnd = fc.constantFrom("\n", "\r\n", "\r");
const cell = fc.array(fc.constantFrom("a", "é", "😀", ",", '""', " ", "\n", "\r\n", "\r", "7"), { maxLength: 6 });

test("cells and first physical lines are right for any quoted cells, line ends, and cuts of the stream", async () => {
  const row = fc.record({ cells: fc.array(cell, { minLength: 2, maxLength: 4 }), end: lineEnd });
  await fc.assert(
    fc.asyncProperty(fc.array(row, { minLength: 1, maxLength: 6 }), fc.integer({ min: 1, max: 9 }), async (rows, n) => {
      let text = "";
      const expected: { cells: string[]; line: number }[] = [];
      for (const { cells, end } of rows) {
        const written = cells.map((parts) => `"${parts.join("")}"`);
        // The line of a row is one more than the line ends before it, counted on the text as a whole.
        const line = (text.match(/\r\n|\r|\n/g) ?? []).length + 1;
        expected.push({ cells: cells.map((parts) => parts.join("").replaceAll('""', '"').trim()), line });
        text += written.join(",") + end;
      }
      expect(await records(text, n)).toEqual(expected);
    }),
    { numRuns: 300 },
  );
});

test("equal cells of a column are one string, in whatever order they come, and stay what they are", async () => {
  const lines = Array.from({ length: 9000 }, (_, i) => `s${i % 3},${i},"q ${i % 2}"`);
  const found = await records(lines.join("\n"), 1000);
  expect(found.map(({ cells }) => cells.join())).toEqual(lines.map((line) => line.replaceAll('"', "")));
});

test("what the taker of the records throws comes out, and nothing hangs", async () => {
  const place = { file: "a.csv" };
  const pieces = asUtf8(inPieces("a,b\n".repeat(1000), 100), "auto", place);
  const thrown = cutIntoRecords(pieces, { delimiter: ",", firstLine: 1, place }, (_, line) => {
    if (line === 3) throw new RangeError("enough");
  });
  await expect(thrown).rejects.toThrow("enough");
});
