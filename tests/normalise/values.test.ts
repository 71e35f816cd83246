import { describe, expect, test } from "vitest";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import { CARD, HEADER } from "../read/temporary-collection.ts";
import { accepted, normalise, refusal } from "./normalised.ts";

const COPPER = { solute: "copper(II) sulfate", solid_form: "pentahydrate", temperature: "20" };

describe("a hydrate on a per-solvent basis", () => {
  // CuSO4 in water at 20 °C: 20.7 g anhydrous per 100 g water is 36.7 g pentahydrate per 100 g water added and 32.4 g
  // equivalent per 100 g total water (M 159.602 and 249.677 g/mol: R = 1.56437; 20.7 R/(1 - 0.207 (R - 1)) and 20.7 R).
  test("is refused where it is open what was weighed, with the three readings shown", async () => {
    const problem = await refusal({ ...COPPER, solubility: "36.7" });
    expect(problem).toMatchObject({ code: "open-hydrate-basis", place: { line: 2, column: "solute_basis" } });
    expect(problem.found).toContain("anhydrous 36.7");
    expect(problem.found).toContain("hydrate per added solvent 20.7");
    expect(problem.found).toContain("hydrate equivalent per total solvent 23.5");
  });

  test.each([
    ["anhydrous", "20.7"],
    ["hydrate per added solvent", "36.67"],
    ["hydrate equivalent per total solvent", "32.38"],
  ])("stated as %s is one and the same solution", async (solute_basis, solubility) => {
    expect((await accepted({ ...COPPER, solute_basis, solubility })).per100g).toBeCloseTo(20.7, 1);
  });

  test("is refused under a name that stands for a hydrate, form column or not", async () => {
    expect((await refusal({ solute: "CuSO4·5H2O", solubility: "36.7" })).code).toBe("open-hydrate-basis");
  });

  test("is refused for a basis in words that are none of the three", async () => {
    const problem = await refusal({ ...COPPER, solute_basis: "as weighed", solubility: "36.7" });
    expect(problem).toMatchObject({ code: "bad-choice", place: { column: "solute_basis" } });
  });

  test("needs no such statement where no form is named: it counts as unsolvated, and the row says so", async () => {
    const row = await accepted({ ...COPPER, solid_form: "", solubility: "20.7" });
    expect(row.per100g).toBeCloseTo(20.7, 10);
    expect(row.assumptions).toContain("solid form not stated");
  });

  test("is refused as open where the number of guests is not known either, without inventing readings", async () => {
    const problem = await refusal({ solid_form: "channel hydrate", solubility: "3" });
    expect(problem.code).toBe("open-hydrate-basis");
    expect(problem.found).not.toMatch(/NaN|undefined/);
  });
});

describe("a unit", () => {
  test.each([
    ["g/100 g", ["g/100 g solution", "g/100 g solvent"]],
    ["mg/g", ["mg/g solution", "mg/g solvent"]],
    ["ppm", []],
    ["g/100 mL", ["g/100 mL solution", "g/100 mL solvent"]],
  ])("%j leaves the reference open and is refused with the readings it could have", async (unit, readings) => {
    const problem = await refusal({}, { solubility: unit });
    expect(problem.code).toBe("open-unit");
    for (const reading of readings) expect(problem.found).toContain(reading);
  });

  test("that nobody knows is refused, and so is none at all", async () => {
    expect((await refusal({}, { solubility: "furlong" })).code).toBe("unknown-unit");
    const { refused } = await normalise("Compound,Solvent,T,S,U\nparacetamol,water,25,1,\n", {
      columns: {
        solute: { column: "Compound" },
        solvent: { column: "Solvent" },
        temperature: { column: "T", unit: "°C" },
        solubility: { column: "S", unit_column: "U" },
      },
    });
    expect(refused).toMatchObject([{ code: "unknown-unit", found: "no unit of solubility is stated" }]);
  });

  test("of bare mg/mL counts per solution below 20, and the row says so", async () => {
    const [bare, stated] = [
      await accepted({ solubility: "14.5" }, { solubility: "mg/mL" }),
      await accepted({ solubility: "14.5" }, { solubility: "mg/mL solution" }),
    ];
    expect(bare.per100g).toBe(stated.per100g);
    expect(bare.assumptions).toMatch(/solution/);
    expect(bare.relativeU).toBeGreaterThan(stated.relativeU);
  });

  test.each([
    ["20", "mg/mL"],
    ["57", "mg/mL"],
    ["20.0", "g/L"],
  ])("of bare %s %s is refused from 20 g/L up: solution and solvent differ too much", async (solubility, unit) => {
    const problem = await refusal({ solubility }, { solubility: unit });
    expect(problem.code).toBe("open-volume-basis");
    expect(problem.found).toContain("solvent");
  });

  test("that names water is refused for another solvent", async () => {
    expect((await accepted({}, { solubility: "g/100 g water" })).per100g).toBe(1);
    expect((await refusal({ solvent: "ethanol" }, { solubility: "g/100 g water" })).code).toBe("open-unit");
  });
});

describe("a value", () => {
  test.each([
    ["0", "value-not-positive"],
    ["-0.4", "value-not-positive"],
    ["n.m.", "not-a-number"],
    ["NaN", "not-a-number"],
    ["Infinity", "not-a-number"],
    ["0x10", "not-a-number"],
    ["1,234.5", "ambiguous-number"],
    ["1.2e400", "number-out-of-range"],
    ["1e-400", "number-out-of-range"],
  ])("of %j is refused as %s", async (solubility, code) => {
    expect((await refusal({ solubility })).code).toBe(code);
  });

  test.each([
    ["100", "g/100 g solution"],
    ["130", "% w/w"],
    ["1", "mole fraction"],
    ["1.2", "mass fraction"],
    ["100", "mol %"],
    ["1000", "10^3 x"],
    ["0", "ln x"],
    ["-0.1", "-ln x"],
  ])("of %s %s leaves no room for the solvent and is refused", async (solubility, unit) => {
    expect((await refusal({ solubility }, { solubility: unit })).code).toBe("fraction-at-or-above-one");
  });

  test("above 100 is possible per 100 g of solvent, where it is not per 100 g of solution", async () => {
    expect((await accepted({ solubility: "130" })).per100g).toBe(130);
  });

  test("below zero is possible for a logarithm", async () => {
    const row = await accepted({ solubility: "-1" }, { solubility: "log10(mol/L)" });
    expect(row.molPerL).toBeCloseTo(0.1, 6);
  });

  test("that leaves no room for the solvent in its volume is refused, not turned into a negative solvent mass", async () => {
    const problem = await refusal({ solubility: "5000" }, { solubility: "g/L solution" });
    // An assumption about the density stands in the way, so a density is asked for: the value itself may be right.
    expect(problem.code).toBe("no-density");
    expect(problem.found).toContain("assumed apparent density");
  });

  test("with a limit or a range is an interval on every basis, its sides in order", async () => {
    const below = await accepted({ solubility: "<0.05" }, { solubility: "g/100 g solution" });
    expect(below).toMatchObject({ state: "interval", high: 0.05, low: Number.NaN, per100gLow: Number.NaN });
    expect(below.per100gHigh).toBeCloseTo(0.05 / 0.9995, 8);
    const between = await accepted({ solubility: "10 - 30" }, { solubility: "mL solvent/g" });
    expect(between.state).toBe("interval");
    expect(between.per100gLow).toBeLessThan(between.per100gHigh);
  });

  test("in pharmacopoeia terms is the interval of the term, in mL of solvent per g, whatever the card's unit", async () => {
    const row = await accepted({ solubility: "sparingly soluble" }, { solubility: "mg/mL solution" });
    // USP/Ph. Eur.: sparingly soluble, from 30 to 100 mL of solvent for 1 g.
    expect(row).toMatchObject({ state: "interval", low: 30, high: 100 });
    // 1 g in 100 mL and in 30 mL of water of 0.9982 g/mL (20 °C, Tanaka 2001).
    expect(row.per100gLow).toBeCloseTo(100 / 99.82, 3);
    expect(row.per100gHigh).toBeCloseTo(100 / 29.946, 3);
  });

  test("measured with no solid left is a lower bound, and the row says so", async () => {
    const row = await accepted({ solubility: "5", excess_solid: "no" });
    expect(row).toMatchObject({ state: "interval", low: 5, high: Number.NaN });
    expect(row.per100gLow).toBeCloseTo(5, 10);
    expect(row.assumptions).toContain("lower bound");
    expect((await accepted({ solubility: "5", excess_solid: "unknown" })).state).toBe("point");
  });

  test.each(["cloud-point", "kinetic-from-stock"])("from a %s is shown and never fitted", async (method) => {
    expect((await accepted({ method })).state).toBe("not fitted");
  });

  test.each([
    ["method", "guessed"],
    ["excess_solid", "maybe"],
  ])("with %s %j is refused with the words it may have", async (field, word) => {
    expect(await refusal({ [field]: word })).toMatchObject({ code: "bad-choice", place: { column: field } });
  });

  test("outside the temperature window of the settings is kept in the tables and not fitted", async () => {
    const settings = { temperature_window_K: { low: 273.15, high: 323.15 } };
    const hot = await accepted({ temperature: "60" }, {}, { settings });
    expect(hot.state).toBe("not fitted");
    expect(hot.assumptions).toContain("temperature window");
    expect((await accepted({ temperature: "50" }, {}, { settings })).state).toBe("point");
  });
});

describe("what a basis needs", () => {
  const unknown = { solute: "lot 4711" };

  test("a solute without a molar mass is usable in mass bases, with the mass ratio and no mole fraction", async () => {
    const row = await accepted({ ...unknown, solubility: "12" });
    expect(row).toMatchObject({ per100g: 12, moleFraction: Number.NaN, molPerL: Number.NaN });
    expect(row.relativeU).toBeGreaterThan(0);
  });

  test.each(["mole fraction", "mol/kg solvent", "log10(mol/L)"])(
    "a solute without a molar mass is refused in %s, by name of what is missing",
    async (unit) => {
      const problem = await refusal({ ...unknown, solubility: "0.1" }, { solubility: unit });
      expect(problem.code).toBe("no-molar-mass");
      expect(problem.found).toContain("molar mass");
    },
  );

  test("a molar mass stated in the row serves where the tables have none", async () => {
    const row = await accepted({ ...unknown, molar_mass: "200", solubility: "1" }, { solubility: "mol/kg solvent" });
    expect(row.per100g).toBeCloseTo(20, 10);
  });

  test("a volume of solvent outside the range of its density is refused, not extrapolated", async () => {
    const cells = { solvent: "ethanol", temperature: "400", solubility: "3" };
    const problem = await refusal(cells, { solubility: "g/L solution", temperature: "°C" });
    expect(problem.code).toBe("no-density");
    expect(problem.found).toContain("density");
  });

  test("a measured density of the solution goes before every model", async () => {
    const units = { solubility: "g/L solution", solution_density: "g/mL" };
    const row = await accepted({ solubility: "100", solution_density: "1.05" }, units);
    // 100 g in 1050 g of solution: 100/950.
    expect(row.per100g).toBeCloseTo(10_000 / 950, 8);
  });

  test.each([
    ["0.8", "kg/m3", "implausible-density"],
    ["1050", "g/mL", "implausible-density"],
    ["1.05", "lb/gal", "unknown-density-unit"],
  ])("a density of %s %s is refused as %s", async (solution_density, unit, code) => {
    const problem = await refusal({ solution_density }, { solution_density: unit });
    expect(problem).toMatchObject({ code, place: { column: "solution_density" } });
  });

  test("what one row is told by a measured density is not said of the next row, which has none", async () => {
    const card: Partial<SourceCard> = {
      columns: {
        solute: { column: "s" },
        solvent: { column: "l" },
        temperature: { column: "T", unit: "°C" },
        solubility: { column: "c", unit: "g/L solution" },
        solution_density: { column: "d", unit: "g/mL" },
      },
    };
    const [header, first, second] = ["s,l,T,c,d", "paracetamol,ethanol,25,150,0.86", "paracetamol,ethanol,30,170,"];
    const both = await normalise(`${header}\n${first}\n${second}\n`, card);
    const alone = await normalise(`${header}\n${second}\n`, card);
    const reversed = await normalise(`${header}\n${second}\n${first}\n`, card);
    expect({ ...both.rows[1], line: 2 }).toEqual(alone.rows[0]);
    expect({ ...reversed.rows[1], line: 2 }).toEqual(both.rows[0]);
  });

  test("the temperature at which a density is missing is told, whichever row comes first", async () => {
    const rows = ["paracetamol,ethanol,25,150", "paracetamol,ethanol,400,150"];
    const card: Partial<SourceCard> = {
      columns: { ...CARD.columns, solubility: { column: "S", unit: "g/L solution" } },
    };
    for (const order of [rows, rows.toReversed()]) {
      const { refused } = await normalise(`${HEADER}${order.join("\n")}\n`, card);
      expect(refused).toHaveLength(1);
      expect(refused[0]?.found).toContain("400.0 °C");
    }
  });

  test("a density without a unit is refused rather than taken in the likeliest one", async () => {
    expect((await refusal({ solution_density: "1.05" })).code).toBe("unknown-density-unit");
  });
});
