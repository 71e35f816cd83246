import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { mixedMoleFraction, SYSTEMS } from "../../datasets/demo/truth.ts";
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
// A cloud point typed into the place of a clear point and the other way round: only clear points are fitted and judged.
const CLOUD_POINT = "crystal-lab-2025-clear-points:11";

const place = (row: Readonly<Record<string, string>>) => `${row.source}:${row.line}`;

beforeAll(async () => {
  const copy = copyOf("demo", join(folder, "demo"));
  await saltern(["merge", copy, "--out", out, "--no-report", "--quiet"]);
  planted = readTable(copy, "planted-mistakes.csv").rows;
  refused = readTable(out, "refused.csv").rows;
  measurements = readTable(out, "measurements.csv").rows;
  flags = new Map(readTable(out, "flags.csv").rows.map((row) => [row.flag_id as string, row]));
}, 60_000);

/** Flags that concern a line of a source, its own or those of its block. */
function flagsOf(where: string) {
  const ids = measurements.find((row) => row.measurement_id === where)?.flags?.split(";") ?? [];
  return ids.map((id) => flags.get(id)).filter((flag) => flag !== undefined);
}

const blockingFlags = (where: string) => flagsOf(where).filter(({ severity }) => severity === "blocking");

describe("of the mistakes planted in datasets/demo", () => {
  test("those that leave a reading open are refused, and nothing else is", () => {
    const expected = planted.filter(({ cause }) => cause === "refused").map(place);
    expect(expected.length).toBeGreaterThan(5);
    expect(refused.map(place).sort()).toEqual(expected.sort());
  });

  test.each([
    ["formulation-2026-uv:19", "not-a-number"],
    ["formulation-2026-uv:20", "open-unit"],
    ["formulation-2026-uv:21", "open-unit"],
    ["kilo-lab-2026-antisolvent:22", "open-composition"],
    ["pilot-plant-2024-titration:34", "value-not-positive"],
    ["salts-2026-drying:11", "open-hydrate-basis"],
    ["salts-2026-drying:19", "open-hydrate-basis"],
    ["werk-nord-2025-trockenrueckstand:49", "unknown-solvent"],
    ["werk-nord-2025-trockenrueckstand:50", "invalid-registry-number"],
  ])("%s is refused for what was done to it: %s", (where, code) => {
    expect(refused.filter((row) => place(row) === where).map((row) => row.code)).toEqual([code]);
  });

  test("a registry number eaten by a spreadsheet is asked back by name, and nothing is assumed", () => {
    const eaten = refused.find(({ code }) => code === "invalid-registry-number");
    expect(eaten?.found).toContain("02.08.1958");
    expect(eaten?.mend).toContain("58-08-2 (caffeine)");
  });

  test("95 % ethanol without a basis is refused with all that it could mean", () => {
    const open = refused.find(({ code }) => code === "open-composition");
    for (const reading of ["95 % by mass", "92.4 % mass", "93.8 % mass", "98 % mass"])
      expect(open?.found).toContain(reading);
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

  test("every one that is no refusal is found under the cause that was planted", () => {
    const wrong = planted.filter(({ cause }) => cause !== "refused" && cause !== "contradicted range");
    const judged = wrong.filter((row) => place(row) !== CLOUD_POINT);
    const named = judged.filter((row) =>
      flagsOf(place(row)).some(({ suspected_cause }) => suspected_cause === row.cause),
    );
    console.info(`${named.length} of ${judged.length} planted mistakes that can be judged are named`);
    expect(judged.length).toBeGreaterThan(35);
    expect(judged.filter((row) => !named.includes(row)).map((row) => `${place(row)} ${row.cause}`)).toEqual([]);
    expect(measurements.find((row) => row.measurement_id === CLOUD_POINT)?.status).toBe("not fitted");
  });

  test("every one that a majority can show is flagged for a person", () => {
    const wrong = planted.filter(({ cause }) => cause !== "refused" && cause !== "contradicted range");
    const judged = wrong.filter((row) => place(row) !== FROZEN && place(row) !== CLOUD_POINT);
    const missed = judged.filter((row) => blockingFlags(place(row)).length === 0);
    expect(judged.length).toBeGreaterThan(35);
    expect(missed.map((row) => `${place(row)} ${row.cause}`)).toEqual([]);
  });

  test("of the ranges that a curve reaches the one of another solvent contradicts it, the others do not", () => {
    const wrong = planted.filter(({ cause }) => cause === "contradicted range").map(place);
    expect(wrong).toEqual(["formulation-2026-uv:23"]);
    const contradicted = [...flags.values()].filter(({ code }) => /^range-/.test(code as string));
    expect(contradicted.map(({ measurement_id, code }) => [measurement_id, code])).toEqual([
      ["formulation-2026-uv:23", "range-below-curve"],
    ]);
    const words = measurements.filter(({ reported_unit }) => reported_unit === "mL solvent/g");
    expect(words.map(({ measurement_id, status }) => [measurement_id, status])).toEqual([
      ["formulation-2026-uv:18", "interval"],
      ["formulation-2026-uv:22", "interval"],
      ["formulation-2026-uv:23", "interval"],
    ]);
  });

  test("a temperature far below the freezing point of the solvent is told, though no curve reaches so far", () => {
    expect(planted.filter((row) => place(row) === FROZEN).map(({ cause }) => cause)).toEqual(["temperature unit"]);
    expect(measurements.find((row) => row.measurement_id === FROZEN)?.flags).toContain("outside-liquid-range");
  });

  test.each([
    ["archive-2019-notebook", "hydrate basis"],
    ["pilot-plant-2024-titration", "temperature unit"],
    ["harbour-2026-gravimetry", "basis mix-up"],
    ["solvent-screen-2025-refractometry", "composition mix-up"],
  ])("a whole block of %s is one flag that names its cause, %s", (source, cause) => {
    const lines = planted.filter((row) => row.source === source && row.cause === cause);
    expect(lines.length).toBeGreaterThan(4);
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

test("the two solids of HBR-31 are told apart, at the temperature where they change and nowhere else", () => {
  // datasets/demo/truth.ts: ln x of both solids, straight over 1/T, meet where their solubilities are the same.
  const { moleFraction25, enthalpy, otherSolid } = SYSTEMS.harbour31Water;
  const apart = Math.log(otherSolid.moleFraction25 / moleFraction25);
  const meetK = 298.15 / (1 - (apart * 8.314462618e-3 * 298.15) / (enthalpy - otherSolid.enthalpy));
  const curves = readTable(out, "curves.csv").rows;
  const broken = curves.filter(({ transition_K }) => transition_K !== "");
  expect(broken.map(({ system }) => system?.startsWith("hbr-31-in-water"))).toEqual([true]);
  expect(Number(broken[0]?.transition_low_K)).toBeLessThan(meetK);
  expect(Number(broken[0]?.transition_high_K)).toBeGreaterThan(meetK);
  expect(Math.abs(Number(broken[0]?.transition_K) - meetK)).toBeLessThan(1);
});

test("paracetamol over ethanol + water is one surface without the series written the wrong way round", () => {
  const [mixture, ...others] = readTable(out, "mixtures.csv").rows;
  expect(others).toEqual([]);
  expect(mixture).toMatchObject({ solute: "paracetamol", solid_form: "form I", n_compositions: "9" });
  expect(mixture?.notices).toContain("25 % ethanol left out");
  // The most soluble mixture of the invented truth, by a search in steps of 1 %.
  const fractions = Array.from({ length: 101 }, (_, percent) => percent / 100);
  const x = (w: number) => mixedMoleFraction("paracetamolEthanol", "paracetamolWater", w, 20);
  const best = fractions.reduce((top, w) => (x(w) > x(top) ? w : top));
  expect(mixture?.inner_maximum_T_K).toBe("293.15");
  expect(Math.abs(Number(mixture?.inner_maximum_w1) - best)).toBeLessThan(0.05);
});
