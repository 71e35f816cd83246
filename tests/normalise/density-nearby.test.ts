import { describe, expect, test } from "vitest";
import type { SolutionDensity } from "../../pipeline/bases/solution-density.ts";
import { densityFromNearby } from "../../pipeline/normalise/density-nearby.ts";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import { normaliseTable } from "./tables.ts";

const columns: SourceCard["columns"] = {
  solute: { column: "s" },
  solvent: { column: "l" },
  temperature: { column: "T", unit: "°C" },
  solubility: { column: "c", unit_column: "unit" },
  solution_density: { column: "d", unit: "kg/m3" },
};
const table = (...rows: readonly string[]) => normaliseTable(`s,l,T,c,unit,d\n${rows.join("\n")}\n`, { columns });

describe("a row without a density of its own", () => {
  // CRC Handbook, 102nd ed.: citric acid in water at 20 °C, 28 mass % has 1124.6 kg/m3 and 30 mass % 1134.6 kg/m3,
  // so 29 mass % has 1129.6 kg/m3 and holds 327.58 g/L.
  const measured = "citric acid,water,20,28,% w/w,1124.6";

  test("takes it from a solution of the same system measured nearby, before every model, and says so", async () => {
    const { table: all, assumptions } = await table(measured, "citric acid,water,20,327.58,g/L solution,");
    const { table: alone } = await table("citric acid,water,20,327.58,g/L solution,");
    const r = (row: { massRatio: Float64Array }, i: number) => row.massRatio[i] ?? Number.NaN;
    // With 0.93 of the solid's density the solution seems 1.5 % lighter than it is.
    const w = (i: number, of: { massRatio: Float64Array }) => r(of, i) / (1 + r(of, i));
    expect(w(0, alone) / 0.29).toBeGreaterThan(1.01);
    expect(Math.abs(w(1, all) / 0.29 - 1)).toBeLessThan(0.0035);
    expect(assumptions(1)).toContain(
      "a density measured nearby in the same system, carried by additive volumes, u 0.25 %",
    );
    expect(all.sharedU[1]).toBeLessThan((alone.sharedU[0] ?? 0) / 2);
  });

  test("wherever the measured row stands in the source, and whichever came first", async () => {
    const asked = "citric acid,water,20,327.58,g/L solution,";
    const [before, after] = [await table(measured, asked), await table(asked, measured)];
    expect(after.table.massRatio[0]).toBe(before.table.massRatio[1]);
    expect(after.assumptions(0)).toBe(before.assumptions(1));
  });

  test.each([
    ["more than 5 K away", "citric acid,water,26,327.58,g/L solution,"],
    ["more than 10 % away in composition", "citric acid,water,20,250,g/L solution,"],
    ["another solvent", "citric acid,ethanol,20,327.58,g/L solution,"],
    ["another solid form", "citric acid monohydrate,water,20,1.8,mol/L,"],
  ])("takes none from a solution that is not near: %s", async (_, asked) => {
    const [both, alone] = [await table(measured, asked), await table(asked)];
    expect(both.refused).toEqual([]);
    expect(both.table.massRatio[1]).toBe(alone.table.massRatio[0]);
    expect(both.assumptions(1)).toBe(alone.assumptions(0));
  });

  test("leaves a measured density as it is", async () => {
    const { table: two } = await table(measured, "citric acid,water,20,327.58,g/L solution,1140");
    expect(two.massRatio[1]).toBeCloseTo(327.58 / (1140 - 327.58), 12);
  });

  test("gets its mg/mL from it too where it was weighed", async () => {
    const { table: two } = await table(measured, "citric acid,water,20,29,% w/w,");
    const c = two.massConcentration[1] ?? Number.NaN;
    expect(Math.abs(c / 327.58 - 1)).toBeLessThan(0.0025);
  });

  test("reads back as it was reported, and its budget holds the carried density", async () => {
    const {
      table: two,
      inReportedUnit,
      reread,
      budgetOf,
    } = await table(measured, "citric acid,water,20,327.58,g/L solution,");
    const lnX = Math.log(two.moleFraction[1] ?? Number.NaN);
    expect(inReportedUnit(1, lnX)).toBeCloseTo(327.58, 8);
    expect(reread(1, { kind: "value", value: 327.58 })?.lnValue).toBeCloseTo(lnX, 12);
    const parts = budgetOf(1);
    expect(parts.map(({ name }) => name)).toContain("density model");
    expect(Math.hypot(...parts.map(({ percent }) => percent)) / (100 * (two.relativeU[1] ?? 0))).toBeCloseTo(1, 9);
  });

  test("takes none from a row that is refused", async () => {
    const asked = "citric acid,water,20,327.58,g/L solution,";
    const [both, alone] = [await table("citric acid,water,20,130,% w/w,1124.6", asked), await table(asked)];
    expect(both.refused).toHaveLength(1);
    expect(both.table.massRatio[0]).toBe(alone.table.massRatio[0]);
  });
});

describe("a density carried over", () => {
  const model: SolutionDensity = {
    kind: "additive volumes",
    apparentSoluteDensity: { value: 1300, standardUncertainty: 100 },
    solventDensity: { value: 998, standardUncertainty: 0 },
  };

  test("goes through the measured one, and is the nearest one's where there are several", () => {
    const near = { temperatureK: 298.15, massRatio: 0.5, density: 1150 };
    const far = { temperatureK: 301.15, massRatio: 0.5, density: 1100 };
    const found = densityFromNearby([far, near], 298.15, 0.5, () => model);
    expect(found?.kind === "density function" && found.density(1 / 3)).toBeCloseTo(1150, 9);
  });

  test("is none where the measured density is no density of such a solution", () => {
    const slip = { temperatureK: 298.15, massRatio: 0.5, density: 1800 };
    expect(densityFromNearby([slip], 298.15, 0.5, () => model)).toBeUndefined();
  });

  test("is none without a model to carry it", () => {
    const near = { temperatureK: 298.15, massRatio: 0.5, density: 1150 };
    expect(densityFromNearby([near], 298.15, 0.5, () => undefined)).toBeUndefined();
    expect(densityFromNearby([], 298.15, 0.5, () => model)).toBeUndefined();
  });
});
