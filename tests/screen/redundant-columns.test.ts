import { beforeAll, describe, expect, test } from "vitest";
import { editionOf, flagsOf } from "../commands/curated.ts";

const card = (source: string, carry: readonly string[]) =>
  JSON.stringify({
    ...{ format: 1, source, file: `${source}.csv` },
    columns: {
      ...{ solute: { column: "Compound" }, solvent: { column: "Solvent" } },
      temperature: { column: "T", unit: "°C" },
      solubility: { column: "S", unit: "mg/mL solvent" },
    },
    carry,
  });

/** Invented clear points of paracetamol: mg per mL, and the mass weighed into 2.5 mL. */
const VALUES = [41.32, 48.05, 55.61, 64.27, 73.94, 85.12, 97.58, 111.7, 127.6, 145.2];
const weighed = (value: number, i: number) => (2.5 * value + ([0.004, -0.003, 0.001][i % 3] as number)).toFixed(2);
const WHOLE = Object.fromEntries(VALUES.map((value, i) => [i, (2.5 * value).toFixed(0)]));
const SLIP = { 4: "188.85" };

function tableWith(solvent: string, changes: Readonly<Record<number, string>> = {}, note = ""): string {
  const lines = VALUES.map((value, i) => {
    const mass = changes[i] ?? weighed(value, i);
    return `paracetamol,${solvent},${5 + 5 * i},${value},${mass},${3 * i + 7},${note}`;
  });
  return `Compound,Solvent,T,S,m / mg,lot,note\n${lines.join("\n")}\n`;
}

/** Each case is a source of its own in a solvent of its own. */
const CASES: Readonly<Record<string, readonly [table: string, carry?: readonly string[]]>> = {
  sound: [tableWith("acetone")],
  slip: [tableWith("ethanol", SLIP)],
  "many-slips": [tableWith("methanol", { 1: "1", 3: "1", 5: "1" })],
  "lot-only": [tableWith("toluene", SLIP), ["lot"]],
  short: [tableWith("heptane", SLIP).split("\n").slice(0, 8).join("\n")],
  "one-value": [
    tableWith("water", SLIP).replace(/water,(\d+),[\d.]+,[\d.]+/g, (row, t) =>
      row.includes("188.85") ? `water,${t},41.32,188.85` : `water,${t},41.32,103.30`,
    ),
  ],
  "whole-mg": [tableWith("1-propanol", WHOLE)],
  "whole-mg-slip": [tableWith("2-propanol", { ...WHOLE, 4: "189" })],
  hostile: [tableWith("acetonitrile", { 4: "n.d.", 6: "", 7: "-3" }, "m / mg=1; x=2")],
};

describe("a carried column that repeats the values in another measure", () => {
  let flags: ReturnType<typeof flagsOf>;
  const told = (source: string) => flags.filter(({ id }) => id.startsWith(`columns-disagree@${source}:`));

  beforeAll(async () => {
    const files = Object.entries(CASES).flatMap(([name, [table, carry = ["m / mg", "lot", "note"]]]) => [
      [`sources/${name}.source.json`, card(name, carry)],
      [`sources/${name}.csv`, table],
    ]);
    flags = flagsOf(await editionOf(Object.fromEntries(files)), "columns-disagree");
  });

  test("is silent where every row follows it to the digits written", () => {
    expect(told("sound")).toEqual([]);
  });

  test("tells a row that breaks the pattern by 2 %, which no curve could show, with both numbers", () => {
    const [flag, ...more] = told("slip");
    expect(more).toEqual([]);
    expect(flag).toMatchObject({ id: "columns-disagree@slip:6", scope: "measurement", severity: "notice" });
    expect(flag?.evidence).toMatch(
      /^73\.94 mg\/mL solvent stands beside m \/ mg = 188\.85, with which 75\.54 would go; in 9 other rows the column is 2\.5 times the value; from the other points the value is [\d.]+ % (above|below), the other would be [\d.]+ % (above|below)$/,
    );
  });

  test("is no pattern where too many rows break it, too few follow, or the numbers have nothing to do with the values", () => {
    for (const source of ["many-slips", "lot-only", "short", "one-value"]) expect(told(source)).toEqual([]);
  });

  test("is compared within its own rounding: a mass in whole mg leaves room for half of one", () => {
    expect(told("whole-mg")).toEqual([]);
    expect(told("whole-mg-slip")).toHaveLength(1);
  });

  test("may hold text, nothing, or hostile headings without any harm", () => {
    expect(told("hostile")).toEqual([]);
  });
});
