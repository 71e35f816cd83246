import { describe, expect, test } from "vitest";
import type { Liquor } from "../../pipeline/records/edition.ts";
import { curated, flagsOf, rowsOf } from "./small-collection.ts";
import { type Reading, type Sources, screened, series, thousandX } from "./support.ts";

const WARM = [10, 20, 30, 40, 50];
const good = () => series(WARM);
const alsoGood = () => series([12, 22, 32, 42, 52], (value) => 1.02 * value);

/** A liquor of a molecular solute that melts at 80 °C with 19 kJ/mol, and whose densities nobody knows. */
const LIQUOR: Liquor = {
  massConcentration: () => Number.NaN,
  solventDensity20C: 790,
  solventBoilingPointK: 391,
  solventHighestBoilingPointK: 391,
  solventFreezingPointK: 184,
  formMeltingPointK: 353.15,
  formFusionEnthalpy: 19_000,
  electrolyte: false,
  solvated: false,
  meltingOfSameForm: true,
  crystalAt: () => undefined,
  transitionsK: [],
  hazards: [],
};

const codes = (sources: Sources, liquor: Partial<Liquor> = {}) =>
  screened([sources], { liquor: { ...LIQUOR, ...liquor } }).map(({ code, scope, severity }) => [code, scope, severity]);

describe("the melting point of the solid", () => {
  test("is a limit to temperatures: nothing dissolves from a solid above it", () => {
    const hot = series([10, 30, 50, 70, 79, 85, 90]);
    expect(codes({ a: hot })).toContainEqual(["above-melting-point", "block", "notice"]);
    expect(codes({ a: hot.slice(0, -1) })).toContainEqual(["above-melting-point", "measurement", "notice"]);
    expect(codes({ a: series([10, 30, 50, 70, 79]) })).toEqual([]);
    expect(codes({ a: hot }, { formMeltingPointK: Number.NaN })).toEqual([]);
  });
});

describe("the ideal solubility", () => {
  // At 25 °C ln x_ideal = -(19000/8.314)(1/298.15 - 1/353.15) = -1.19, x = 0.30; ours is 0.018.
  test("may be exceeded by little, and is told where a value stands far above", () => {
    expect(codes({ a: good(), b: alsoGood() })).toEqual([]);
    // A melting enthalpy of 80 kJ/mol puts the ideal mole fraction at 25 °C at 0.007 to 0.016, at 10 °C at 0.001 to 0.006.
    expect(codes({ a: good() }, { formFusionEnthalpy: 80_000 })).toEqual([]);
    // 200 kJ/mol, absurdly: 3e-6 to 4e-5 at 25 °C.
    expect(codes({ a: good() }, { formFusionEnthalpy: 200_000 })).toEqual([
      ["above-ideal-solubility", "block", "notice"],
    ]);
  });

  test("is not asked for of electrolytes, solvates and other forms", () => {
    const far = { formFusionEnthalpy: 200_000 };
    for (const kind of [{ electrolyte: true }, { solvated: true }, { meltingOfSameForm: false }]) {
      expect(codes({ a: good() }, { ...far, ...kind })).toEqual([]);
    }
  });
});

describe("the temperature effect", () => {
  test("is told where it would need more heat than any solid takes up", () => {
    // A factor 20 every 10 K: 8.314 ln 20/(1/283.15 - 1/293.15) = 207 kJ/mol.
    const steep: Reading[] = [0, 10, 20, 30].map((t, i) => [t, Number((0.01 * 20 ** i).toPrecision(4))]);
    const flags = screened([{ a: steep }]).filter(({ code }) => code === "temperature-effect");
    expect(flags).toMatchObject([{ scope: "block", severity: "notice", source: 0 }]);
    expect(flags[0]?.evidence).toMatch(/dissolution enthalpy of 20\d kJ\/mol: no solid dissolves with so much$/);
  });

  test("is told where one source falls and the others rise", () => {
    const falling = good().map(([t], i): Reading => [t, good()[4 - i]![1]]);
    const flags = screened([{ a: good(), b: alsoGood(), falling }]).filter(({ code }) => code === "temperature-effect");
    expect(flags).toMatchObject([{ scope: "block", source: 2 }]);
    expect(flags[0]?.evidence).toMatch(
      /dissolution enthalpy of -\d\d kJ\/mol, against \d\d kJ\/mol by a, \d\d kJ\/mol by b$/,
    );
  });

  test("is let alone where sources differ as sources do, or fall together", () => {
    const flatter = series([11, 21, 31, 41, 51], (value, i) => value * (1.06 - 0.03 * i));
    expect(screened([{ a: good(), b: alsoGood(), flatter }]).map(({ code }) => code)).not.toContain(
      "temperature-effect",
    );
    const falls = (by: number): Reading[] => WARM.map((t) => [t, Number((by * thousandX(60 - t)).toPrecision(4))]);
    expect(screened([{ a: falls(1), b: falls(1.013) }]).map(({ code }) => code)).not.toContain("temperature-effect");
  });
});

describe("values at the very same temperatures", () => {
  // An old table that follows the newer ones to 20 °C and then leaves them.
  const old = series(WARM, (value, i) => value * [1.003, 0.995, 1.12, 1.2, 1.3][i]!);
  const newer = series(WARM, (value) => 1.008 * value);

  test("tell a source that leaves two others which agree", () => {
    const flags = screened([{ a: good(), b: newer, old }]);
    const off = flags.filter(
      ({ code, source }) => ["off-the-others", "off-curve", "block-off-curve"].includes(code) && source === 2,
    );
    expect(off.length).toBeGreaterThan(0);
    expect(flags.filter(({ source }) => source === 0 || source === 1)).toEqual([]);
  });

  test("tell where the only two sources part at a single temperature, and blame neither", () => {
    const few = () => series([10, 25, 40]);
    const other = few().map(([t, x], i): Reading => [t, Number((i === 0 ? 1.12 * x : 1.004 * x).toPrecision(4))]);
    const flags = screened([{ a: few(), other }]);
    expect(flags).toMatchObject([{ scope: "system", code: "sources-part-once", severity: "notice" }]);
    expect(flags[0]?.evidence).toMatch(
      /^at 10\.0 °C a \(11\.\d\) lies 11 % below other \(12\.9\); elsewhere the two agree/,
    );
    expect(screened([{ a: good(), b: newer }])).toEqual([]);
  });
});

describe("a measured density", () => {
  const rows = rowsOf("salicylic acid", "ethanol", [
    [10, 23.2],
    [20, 28.9],
    [30, 35.7],
    [40, 43.6],
    [50, 52.7],
  ]);
  const withDensity = async (densities: readonly number[]) =>
    flagsOf(
      await curated({
        a: {
          rows: rows.map((row, i) => [...row, densities[i]!]),
          headings: ["d"],
          columns: { solution_density: { column: "d", unit: "g/cm3" } },
        },
      }),
    ).map(({ code, scope }) => [code, scope]);

  test("that is no solution's is told; one that may be is not", async () => {
    expect(await withDensity([0.89, 0.9, 0.91, 0.93, 0.94])).toEqual([]);
    // 1.45 g/cm3 is near the solid's.
    expect(await withDensity([0.89, 0.9, 1.45, 0.93, 0.94])).toEqual([["unlikely-density", "measurement"]]);
  });
});
