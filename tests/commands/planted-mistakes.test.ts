import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { copyOf, readTable, saltern, scratch, type Table } from "./saltern.ts";

const folder = scratch();
const out = join(folder, "out");

// datasets/demo/planted-mistakes.csv is written by the program that plants the mistakes, with the true values.
let planted: Table["rows"];
let refused: Table["rows"];
let measurements: Table["rows"];
let flags: ReadonlyMap<string, Readonly<Record<string, string>>>;

// 40 °C typed into a column of K: 40 K, 150 K below the freezing point of ethyl acetate and outside every curve.
const FROZEN = "report-2019-mole-fractions:25";

const place = (row: Readonly<Record<string, string>>) => `${row.source}:${row.line}`;

beforeAll(async () => {
  const copy = copyOf("demo", join(folder, "demo"));
  await saltern(["merge", copy, "--out", out, "--no-report", "--quiet"]);
  planted = readTable(copy, "planted-mistakes.csv").rows;
  refused = readTable(out, "refused.csv").rows;
  measurements = readTable(out, "measurements.csv").rows;
  flags = new Map(readTable(out, "flags.csv").rows.map((row) => [row.flag_id as string, row]));
}, 60_000);

/** Flags that need a person and concern a line of a source, its own or those of its block. */
function blockingFlags(where: string) {
  const ids = measurements.find((row) => row.measurement_id === where)?.flags?.split(";") ?? [];
  return ids.map((id) => flags.get(id)).filter((flag) => flag?.severity === "blocking");
}

describe("of the mistakes planted in datasets/demo", () => {
  test("those that leave a reading open are refused, and nothing else is", () => {
    const expected = planted.filter(({ cause }) => cause === "refused").map(place);
    expect(expected.length).toBeGreaterThan(5);
    expect(refused.map(place).sort()).toEqual(expected.sort());
  });

  test("every refusal says what was found, what was expected and how to mend it, with the raw row", () => {
    for (const row of refused) {
      for (const column of ["code", "found", "expected", "mend", "raw"]) expect(row[column], place(row)).not.toBe("");
    }
  });

  test("the open hydrate bases are refused with the three readings", () => {
    const open = refused.filter(({ code }) => code === "open-hydrate-basis");
    expect(open.map(place)).toEqual(["salts-2026-drying:11", "salts-2026-drying:19"]);
    for (const { found } of open) {
      expect(found).toMatch(/anhydrous .* hydrate per added solvent .* hydrate equivalent per total solvent/);
    }
  });

  test("every one that a majority can show is flagged for a person", () => {
    const wrong = planted.filter(({ cause }) => cause !== "refused").filter((row) => place(row) !== FROZEN);
    // A cloud point is shown and never fitted, so that line 11, typed into its place, is not judged.
    const judged = wrong.filter((row) =>
      ["kept", "set aside"].includes(measurements.find((m) => m.measurement_id === place(row))?.status ?? ""),
    );
    const missed = judged.filter((row) => blockingFlags(place(row)).length === 0);
    console.info(
      `${judged.length - missed.length} of ${judged.length} planted mistakes that can be judged are flagged`,
    );
    expect(judged.length).toBeGreaterThan(30);
    expect(missed.map((row) => `${place(row)} ${row.cause}`)).toEqual([]);
  });

  test("a temperature far below the freezing point of the solvent is told, though no curve reaches so far", () => {
    expect(planted.filter((row) => place(row) === FROZEN).map(({ cause }) => cause)).toEqual(["temperature unit"]);
    expect(measurements.find((row) => row.measurement_id === FROZEN)?.flags).toContain("outside-liquid-range");
  });

  test.each([
    ["archive-2019-notebook", "hydrate basis"],
    ["pilot-plant-2024-titration", "temperature unit"],
    ["harbour-2026-gravimetry", "basis mix-up"],
  ])("a whole block of %s is one flag that names its cause, %s", (source, cause) => {
    const lines = planted.filter((row) => row.source === source && row.cause === cause);
    expect(lines.length).toBeGreaterThan(5);
    const found = new Set(lines.flatMap((row) => blockingFlags(place(row))));
    expect([...found].map((flag) => [flag?.scope, flag?.suspected_cause])).toEqual([["block", cause]]);
  });

  test.each(["power of ten", "dilution factor", "digits transposed"])("a single %s is named as such", (cause) => {
    const lines = planted.filter((row) => row.cause === cause);
    expect(lines.flatMap((row) => blockingFlags(place(row)).map((flag) => flag?.suspected_cause))).toEqual([cause]);
  });

  test("few honest points are flagged: at most one in fifty", () => {
    const wrong = new Set(planted.map(place));
    const honest = measurements.filter((row) => row.status === "kept" && !wrong.has(row.measurement_id as string));
    const blamed = honest.filter((row) => blockingFlags(row.measurement_id as string).length > 0);
    console.info(`${blamed.length} of ${honest.length} honest points are flagged for a person`);
    // The series whose rows were shifted is one block with its own sound first points.
    const outsideShifted = blamed.filter((row) => row.source !== "report-2019-mole-fractions");
    expect(outsideShifted.length).toBeLessThanOrEqual(honest.length / 50);
  });
});
