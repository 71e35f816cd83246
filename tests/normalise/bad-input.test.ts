import { describe, expect, test } from "vitest";
import { accepted, refusal } from "./normalised.ts";

/** What must be said of each: the code, the column, something of the numbers, and something to do about it. */
describe("bad input is a named problem with its place and a remedy", () => {
  test("a molar mass that contradicts the formula", async () => {
    const problem = await refusal({ molar_mass: "169.18" });
    expect(problem).toMatchObject({ code: "contradictory-molar-mass", place: { line: 2, column: "molar_mass" } });
    // Paracetamol C8H9NO2: 151.165 g/mol (IUPAC 2021 atomic weights).
    expect(problem.found).toMatch(/169\.18 g\/mol.*151\.16/);
    expect(problem.mend).toMatch(/hydrate.*salt/);
  });

  test("a hydrate without its water count, once it is needed", async () => {
    const cells = { solid_form: "channel hydrate", solute_basis: "hydrate per added solvent" };
    const problem = await refusal(cells);
    expect(problem).toMatchObject({ code: "unknown-guest-count", place: { line: 2 } });
    expect(problem.mend).toMatch(/count.*solid_forms\.csv/);
    expect(problem.found).not.toMatch(/NaN|undefined/);
    // Where the mass is that of the unsolvated solute, no count is needed.
    expect((await accepted({ ...cells, solute_basis: "anhydrous" })).per100g).toBe(1);
  });

  test("a density of 0.8 kg/m3, a slip of the unit", async () => {
    const problem = await refusal({ solution_density: "0.8" }, { solution_density: "kg/m3" });
    expect(problem).toMatchObject({ code: "implausible-density", place: { line: 2, column: "solution_density" } });
    expect(problem.mend).toContain("g/mL");
  });

  test.each(["1.2", "1"])("an uncertainty of %s at a value of 1", async (uncertainty) => {
    const problem = await refusal({ uncertainty });
    expect(problem).toMatchObject({ code: "bad-uncertainty", place: { line: 2, column: "uncertainty" } });
    expect(problem.found).toContain("as large as the value itself");
  });

  test("a volume that says neither of what nor at which temperature, above 20 g/L", async () => {
    const problem = await refusal({ solubility: "57" }, { solubility: "g/L" });
    expect(problem).toMatchObject({ code: "open-volume-basis", place: { line: 2, column: "solubility" } });
    expect(problem.expected).toBe("one of g/L solution, g/L solvent");
    expect(problem.mend).toMatch(/in full.*volume_temperature/);
  });
});

describe("what weakens a row is said on the row", () => {
  test("an amplification above 2 asks for a weighed value", async () => {
    const units = { solubility: "g/L solution" };
    const urea = { solute: "urea", temperature: "60" };
    const rich = await accepted({ ...urea, solubility: "750" }, units);
    expect(rich.per100g).toBeGreaterThan(100);
    expect(rich.assumptions).toContain("ask for a weighed value");
    expect((await accepted({ ...urea, solubility: "400" }, units)).assumptions).not.toContain("weighed value");
    // Weighed, the same solution needs no density.
    expect((await accepted({ ...urea, solubility: "200" })).assumptions).not.toContain("weighed value");
  });

  test("an uncertainty too large for first order says by how much", async () => {
    const units = { solubility: "log10(mol/L)" };
    const wide = await accepted({ solubility: "-3", uncertainty: "0.3" }, units);
    expect(wide.assumptions).toMatch(/first-order uncertainty is too small by about \d+ %/);
    expect((await accepted({ solubility: "-3", uncertainty: "0.03" }, units)).assumptions).not.toContain("first-order");
  });

  test("the temperature of a volume that states none is an assumption, and none once it is stated", async () => {
    const units = { solubility: "g/L solution", volume_temperature: "°C" };
    const open = await accepted({ solubility: "15" }, units);
    expect(open.assumptions).toContain("volume of solution taken at the measuring temperature");
    const stated = await accepted({ solubility: "15", temperature: "60", volume_temperature: "20" }, units);
    const hot = await accepted({ solubility: "15", temperature: "60" }, units);
    expect(stated.assumptions).not.toContain("volume of solution taken");
    // Water at 60 °C is 1.5 % lighter than at 20 °C (983.2 against 998.2 kg/m3): the same g/L is more per kg when hot.
    expect(hot.per100g / stated.per100g).toBeCloseTo(998.2 / 983.2, 3);
    const cold = await accepted({ solubility: "15" }, { ...units, solubility: "g/L solvent" });
    expect(cold.assumptions).toContain("volume of solvent taken at 20 °C");
  });
});
