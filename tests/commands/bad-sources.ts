/** Headings that the cards of these sources name. */
export const HEADER = "Compound,Solvent,T,S\n";
/** A row with which nothing is wrong. */
export const ROW = "paracetamol,water,25,1.5\n";

/** One bad source: its table, changes of its card, and what has to become of it. */
export interface BadSource {
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
/** Texts and bytes one after the other. */
export const bytes = (...parts: readonly (string | readonly number[])[]) =>
  Buffer.concat(parts.map((part) => (typeof part === "string" ? Buffer.from(part, "utf8") : Buffer.from(part))));

/** Every kind of bad source, by the name it goes by in the collection. */
export const SOURCES: Readonly<Record<string, BadSource>> = {
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
    ...{ accepted: 1, codes: ["unknown-mixture-partner"] },
  },
  "shared-name": {
    what: "a source that another card's file is named after",
    table: rows(ROW.trim()),
    ...{ accepted: 1, codes: [] },
  },
};
