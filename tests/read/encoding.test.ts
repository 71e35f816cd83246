import { expect, test } from "vitest";
import { HEADER, readAccepted, readRefused } from "./temporary-collection.ts";

const TABLE = `${HEADER}café,éthanol,20,1\nb,ethanol “99 %”,30,2\n`;
const names = ["café", "b"];

/** UTF-16 with the bytes of every unit exchanged. */
const bigEndian = (text: string) => Buffer.from(text, "utf16le").swap16();

test.each([
  ["UTF-8", Buffer.from(TABLE)],
  ["UTF-8 with a byte-order mark", Buffer.from(`\ufeff${TABLE}`)],
  ["UTF-16 LE with a byte-order mark", Buffer.from(`\ufeff${TABLE}`, "utf16le")],
  ["UTF-16 BE with a byte-order mark", bigEndian(`\ufeff${TABLE}`)],
])("%s is recognised", async (_, bytes) => {
  const source = await readAccepted(bytes);
  expect(source.headings[0]).toBe("Compound");
  expect(source.readings.map(({ cells }) => cells[0])).toEqual(names);
});

// Bytes of é, “ and ” in each encoding: windows-1252 and macintosh as listed in the WHATWG Encoding Standard.
test.each([
  ["windows-1252", { é: 0xe9, "“": 0x93, "”": 0x94 }],
  ["macintosh", { é: 0x8e, "“": 0xd2, "”": 0xd3 }],
] as const)("%s is read where the card states it", async (encoding, codes) => {
  const table: Readonly<Record<string, number>> = codes;
  const bytes = Uint8Array.from(TABLE, (character) => table[character] ?? character.charCodeAt(0));
  const source = await readAccepted(bytes, { table: { encoding } });
  expect(source.readings.map(({ cells }) => [cells[0], cells[1]])).toEqual([
    ["café", "éthanol"],
    ["b", "ethanol “99 %”"],
  ]);
  const { problem } = await readRefused(bytes);
  expect(problem).toMatchObject({ code: "bad-encoding", place: { line: 2 } });
  expect(problem.mend).toContain("windows-1252");
});

test("bytes that are no UTF-8 are refused with the line and what it would be in windows-1252", async () => {
  const start = Buffer.from(`${HEADER}${"a,ethanol,20,1\r\n".repeat(40_000)}`);
  const bytes = Buffer.concat([start, Buffer.from("caf\xe9,ethanol,20,1\nb,ethanol,20,1\n", "latin1")]);
  const { problem } = await readRefused(bytes);
  expect(problem).toMatchObject({ code: "bad-encoding", place: { line: 40_002 } });
  expect(problem.found).toContain('"café,ethanol,20,1"');
});

test("a character cut off at the end of the file is refused", async () => {
  const bytes = Buffer.from(`${HEADER}a,ethanol,20,1\né`).subarray(0, -1);
  expect((await readRefused(bytes)).problem).toMatchObject({ code: "bad-encoding", place: { line: 3 } });
});

test("bytes that the encoding of the card does not know are refused with the line", async () => {
  const bytes = Buffer.concat([Buffer.from(`${HEADER}a,ethanol,20,1\n`), Buffer.from([0x81, 0x20, 0x0a])]);
  const { problem } = await readRefused(bytes, { table: { encoding: "shift_jis" } });
  expect(problem).toMatchObject({ code: "bad-encoding", place: { line: 3 } });
});

test("a NUL byte is refused with its line", async () => {
  const { problem } = await readRefused(`${HEADER}a,ethanol,20,1\nb\0,ethanol,20,1\n`);
  expect(problem).toMatchObject({ code: "nul-byte", place: { line: 3 } });
});

test.each([
  ["utf-16le", Buffer.from(TABLE, "utf16le")],
  ["utf-16be", bigEndian(TABLE)],
] as const)(
  "%s without a byte-order mark is refused with that encoding as the remedy, and then read",
  async (encoding, bytes) => {
    const { problem } = await readRefused(bytes);
    expect(problem.code).toBe("nul-byte");
    expect(problem.mend).toContain(`"encoding": "${encoding}"`);
    const source = await readAccepted(bytes, { table: { encoding } });
    expect(source.readings.map(({ line, cells }) => [line, cells[0]])).toEqual([
      [2, "café"],
      [3, "b"],
    ]);
  },
);

test("a binary file is refused, not read", async () => {
  const bytes = Uint8Array.from({ length: 5000 }, (_, i) => (i * 37) % 256);
  expect(["nul-byte", "bad-encoding"]).toContain((await readRefused(bytes)).problem.code);
});
