import { describe, expect, test } from "vitest";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import { normaliseTable } from "./tables.ts";

const columns: SourceCard["columns"] = {
  solute: { column: "s" },
  solvent: { column: "l" },
  temperature: { column: "T", unit: "°C" },
  solubility: { column: "c", unit: "g/L solution" },
  uncertainty: { column: "u", unit: "%", kind: "standard", relative: true },
};

/** A series of paracetamol in ethanol by volume of solution, all rows near 200 g/L, u 1 % each. */
const series = (n: number) =>
  `s,l,T,c,u\n${Array.from({ length: n }, (_, i) => `paracetamol,ethanol,25,${200 + (i % 3)},1`).join("\n")}\n`;

describe("the part of an uncertainty that the rows of a source share", () => {
  test("is that of the properties: one density model stands behind every row, so a mean does not average it out", async () => {
    const n = 100;
    const { table } = await normaliseTable(series(n), { columns });
    expect(table.count).toBe(n);
    const rows = Array.from({ length: n }, (_, row) => row);
    const own = rows.map((row) =>
      Math.sqrt((table.relativeU[row] as number) ** 2 - (table.sharedU[row] as number) ** 2),
    );
    const shared = rows.map((row) => table.sharedU[row] as number);
    // c = 200 g/L, 0.93 x 1293 kg/m3 ± 6 %: d ln r = c/(rho2 - c) d ln rho2, near 1.2 %, times 1 - x.
    expect(shared[0]).toBeGreaterThan(0.01);
    expect(shared[0]).toBeLessThan(0.015);
    // Variance of the mean of n rows: own parts average, the shared part stays whole.
    const mean = (parts: readonly number[]) => parts.reduce((sum, part) => sum + part, 0) / n;
    const independent = Math.sqrt(rows.reduce((sum, row) => sum + (table.relativeU[row] as number) ** 2, 0)) / n;
    const correlated = Math.hypot(Math.hypot(...own) / n, mean(shared));
    expect(correlated).toBeGreaterThan(shared[0] as number);
    expect(correlated / independent).toBeGreaterThan(5);
    expect(Math.hypot(...own) / n).toBeLessThan(0.0013);
  });

  test("is the same for one row and for many, and leaves the reported part to the row", async () => {
    const { table } = await normaliseTable(series(1), { columns });
    const { table: other } = await normaliseTable(series(1).replace(",1\n", ",2\n"), { columns });
    expect(other.sharedU[0]).toBe(table.sharedU[0]);
    const ownOf = ({ relativeU, sharedU }: typeof table) =>
      Math.sqrt((relativeU[0] ?? 0) ** 2 - (sharedU[0] ?? 0) ** 2);
    expect(ownOf(other) / ownOf(table)).toBeCloseTo(2, 9);
  });

  test("holds no density that was measured on the very solution: that is the row's own", async () => {
    const measured = { ...columns, solution_density: { column: "d", unit: "g/mL" } };
    const { table } = await normaliseTable("s,l,T,c,u,d\nparacetamol,absolute ethanol,25,200,1,0.86\n", {
      columns: measured,
    });
    // What is left are the two molar masses.
    expect(table.sharedU[0]).toBeLessThan(1e-4);
    expect(table.relativeU[0]).toBeGreaterThan(0.01);
  });

  test("holds the open reading of a bare mg/mL, which one column has for all its rows", async () => {
    const bare = { ...columns, solubility: { column: "c", unit: "mg/mL" } };
    const [open, stated] = [
      await normaliseTable("s,l,T,c,u\nparacetamol,water,25,15,1\n", { columns: bare }),
      await normaliseTable("s,l,T,c,u\nparacetamol,water,25,15,1\n", { columns }),
    ];
    // 15 g/L per solution against per solvent: about c/rho2 = 1.25 % apart.
    expect(open.table.sharedU[0]).toBeGreaterThan(0.01);
    expect(stated.table.sharedU[0]).toBeLessThan(0.002);
  });

  test("of a mass per mass is nothing but molar masses", async () => {
    const mass = { ...columns, solubility: { column: "c", unit: "g/100 g solvent" } };
    const { table } = await normaliseTable("s,l,T,c,u\nparacetamol,absolute ethanol,25,20,1\n", { columns: mass });
    expect(table.sharedU[0]).toBeGreaterThan(0);
    expect(table.sharedU[0]).toBeLessThan(1e-4);
  });
});

describe("the budget of a row", () => {
  test.each([
    ["g/L solution", 200],
    ["mg/mL", 15],
    ["g/100 g solvent", 23],
    ["mole fraction", 0.05],
    ["-ln x", 3],
    ["mol/L", 1.2],
    ["mL solvent/g", 5],
    ["log10(mol/L)", -0.1],
  ])("in %s adds up to the uncertainty of the row", async (unit, value) => {
    const of = { ...columns, solubility: { column: "c", unit } };
    const { table, budgetOf } = await normaliseTable(`s,l,T,c,u\nparacetamol,ethanol,25,${value},2\n`, { columns: of });
    const parts = budgetOf(0);
    const sum = Math.hypot(...parts.map(({ percent }) => percent));
    expect(sum / (100 * (table.relativeU[0] ?? Number.NaN))).toBeCloseTo(1, 9);
    expect(parts.map(({ percent }) => percent)).toEqual(parts.map(({ percent }) => percent).toSorted((a, b) => b - a));
    expect(parts.map(({ name }) => name)).toContain("reported value");
  });

  test("names the temperature through the slope of the curve: 0.1 K at 3 % per K is 0.3 %", async () => {
    const probe = { ...columns, temperature_probe: { column: "p" } };
    const { budgetOf } = await normaliseTable("s,l,T,c,u,p\nparacetamol,ethanol,25,200,1,solution\n", {
      columns: probe,
    });
    expect(budgetOf(0).some(({ name }) => name === "temperature")).toBe(false);
    const temperature = budgetOf(0, 0.03).find(({ name }) => name === "temperature");
    expect(temperature?.percent).toBeCloseTo(0.3, 12);
  });

  test("of a hydrate and of a measured density holds their parts", async () => {
    const of: SourceCard["columns"] = {
      ...columns,
      solid_form: { column: "f" },
      solute_basis: { column: "b" },
      solution_density: { column: "d", unit: "g/mL" },
    };
    const csv = "s,l,T,c,u,f,b,d\ncopper(II) sulfate,water,20,300,1,pentahydrate,hydrate per added solvent,1.17\n";
    const { table, budgetOf } = await normaliseTable(csv, { columns: of });
    const parts = budgetOf(0);
    expect(parts.map(({ name }) => name)).toContain("density of the solution");
    expect(Math.hypot(...parts.map(({ percent }) => percent)) / (100 * (table.relativeU[0] ?? 0))).toBeCloseTo(1, 9);
  });

  test("of an interval has no parts", async () => {
    const { budgetOf } = await normaliseTable("s,l,T,c,u\nparacetamol,ethanol,25,<200,\n", { columns });
    expect(budgetOf(0)).toEqual([]);
  });
});
