import { describe, expect, test } from "vitest";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import { textOf } from "../../pipeline/records/measurements.ts";
import { CARD } from "../read/temporary-collection.ts";
import { accepted, normaliseOne, refusal } from "./normalised.ts";
import { normaliseTable } from "./tables.ts";

const card: SourceCard = {
  ...CARD,
  columns: {
    solute: { column: "s" },
    solvent: { column: "l" },
    solid_form: { column: "f" },
    solute_basis: { column: "b" },
    composition: { column: "c" },
    composition_basis: { column: "cb" },
    solvent_water_wt_percent: { column: "w" },
    temperature: { column: "T", unit: "°C" },
    solubility: { column: "S", unit_column: "u" },
  },
};
const HEADING = "s,l,f,b,c,cb,w,T,S,u\n";

/** Rows written as `solute,solvent,form,basis,composition,basis,water,T,value,unit`, normalised together. */
const table = (...rows: readonly string[]) => normaliseTable(`${HEADING}${rows.join("\n")}\n`, card);

describe("A row in a mixed solvent", () => {
  test("counts the mole fraction with the mean molar mass of the exact composition", async () => {
    // 10 g of 151.165 g/mol beside 70 g of 46.069 and 30 g of 18.015 g/mol.
    const row = await accepted({ solvent: "ethanol/water 70:30 w/w", solubility: "10" });
    const n = 10 / 151.165;
    expect(row.moleFraction).toBeCloseTo(n / (n + 70 / 46.069 + 30 / 18.015), 6);
    const near = await accepted({ solvent: "ethanol/water 70.2:29.8 w/w", solubility: "10" });
    expect(near.moleFraction).toBeCloseTo(n / (n + 70.2 / 46.069 + 29.8 / 18.015), 6);
  });

  test("per volume of solvent takes the mixture as one liquid at 20 °C, contraction counted, and says so", async () => {
    // OIML R 22: 70 % mass of ethanol, 867.611 kg/m3 at 20 °C; without contraction it would be 842.2.
    const row = await accepted(
      { solvent: "ethanol/water 70:30 w/w", solubility: "50" },
      { solubility: "mg/mL solvent" },
    );
    expect(row.per100g).toBeCloseTo((100 * 50) / 867.611, 4);
    expect(row.assumptions).toContain("dispensed at 20 °C");
    expect(row.assumptions).toContain("OIML R 22");
  });

  test("per volume of solution takes the density of the mixture at the temperature of the row", async () => {
    // Solvent 863.342 kg/m3 at 25 °C (OIML R 22), paracetamol's apparent density 0.93 x 1293 kg/m3.
    const row = await accepted(
      { solvent: "ethanol/water 70:30 w/w", solubility: "100" },
      { solubility: "mg/mL solution" },
    );
    const apparent = Number(/apparent density of the solute ([\d.]+)/.exec(row.assumptions)?.[1]);
    expect(apparent).toBeGreaterThan(1000);
    expect(row.per100g / 100).toBeCloseTo(100 / 863.342 / (1 - 100 / apparent), 4);
  });

  test("is less certain in the mole fraction by what its composition leaves open: 0.2 wt % by mass, 0.5 by volume", async () => {
    const { table: rows, budgetOf } = await table(
      "paracetamol,ethanol/water,,,0.7,mass,,25,10,g/100 g solvent",
      "paracetamol,ethanol/water,,,0.7,v/v,,25,10,g/100 g solvent",
      "paracetamol,methanol/water,,,0.001,mass,,25,10,g/100 g solvent",
    );
    expect([...rows.fractionU.slice(0, 3)]).toEqual([0.002, 0.005, 0.001]);
    // d ln M/dw = -M (1/46.069 - 1/18.015); x carries it with the factor 1 - x, ln r not at all.
    const M = 1 / (0.7 / 46.069 + 0.3 / 18.015);
    const ofMass = Math.abs(M * (1 / 46.069 - 1 / 18.015)) * 0.002 * (1 - (rows.moleFraction[0] as number));
    expect(rows.sharedU[0]).toBeCloseTo(ofMass, 4);
    expect(budgetOf(0).find(({ name }) => name === "molar mass of the solvent")?.percent).toBeCloseTo(100 * ofMass, 2);
  });

  test("keeps its exact fractions beside the key it shares with its neighbours", async () => {
    const {
      table: rows,
      reread,
      inReportedUnit,
    } = await table(
      "paracetamol,ethanol/water,,,0.701,mass,,25,50,mg/mL solvent",
      "paracetamol,ethanol/water,,,0.699,mass,,25,50,mg/mL solvent",
      "paracetamol,water/ethanol/acetone,,,20:50:30,mass,,25,50,mg/mL solvent",
      "paracetamol,acetone,,,,,,25,50,mg/mL solvent",
    );
    expect(rows.identity[0]).toBe(rows.identity[1]);
    expect([...rows.firstFraction.slice(0, 4)]).toEqual([0.701, 0.699, 0.3, Number.NaN]);
    expect([rows.secondFraction[0], rows.secondFraction[2]].map((w) => w?.toFixed(3))).toEqual(["0.299", "0.500"]);
    expect(rows.massRatio[0]).not.toBe(rows.massRatio[1]);
    // Read again as it stands each row comes back to itself, by its own density and molar mass.
    for (const row of [0, 1, 2]) {
      const lnX = Math.log(rows.moleFraction[row] as number);
      expect(inReportedUnit(row, lnX)).toBeCloseTo(50, 9);
      const asSolution = reread(row, { kind: "unit", unit: "mg/mL solution" });
      expect(Math.abs((asSolution?.lnValue ?? Number.NaN) - lnX)).toBeLessThan(0.1);
    }
  });

  test("with traces of water stays in the plain solvent but counts them", async () => {
    const { table: rows, assumptions } = await table(
      "paracetamol,acetone,,,,,0.2,25,10,g/100 g solvent",
      "paracetamol,acetone,,,,,,25,10,g/100 g solvent",
      "paracetamol,acetone,,,,,0.3,25,10,g/100 g solvent",
    );
    expect(rows.identity[0]).toBe(rows.identity[1]);
    expect(rows.identity[2]).not.toBe(rows.identity[1]);
    expect(rows.moleFraction[0]).toBeLessThan(rows.moleFraction[1] as number);
    expect(rows.firstFraction[0]).toBe(0.998);
    expect(assumptions(0)).toContain("0.2 wt % water");
  });

  test("of plain ethanol is less certain by 0.5 wt % of water, absolute ethanol is not", async () => {
    const { table: rows } = await table(
      "paracetamol,ethanol,,,,,,25,10,g/100 g solvent",
      "paracetamol,absolute ethanol,,,,,,25,10,g/100 g solvent",
    );
    // 0.5 wt % of water lowers the mean molar mass by 0.5 (46.069/18.015 - 1) % = 0.78 %.
    expect(rows.sharedU[0]).toBeCloseTo(0.005 * (46.069 / 18.015 - 1) * (1 - (rows.moleFraction[0] as number)), 4);
    expect(rows.sharedU[1]).toBeLessThan(1e-4);
    expect(rows.moleFraction[0]).toBe(rows.moleFraction[1]);
  });
});

describe("Fractions that count the solute", () => {
  // 10 g paracetamol, 63 g ethanol and 27 g water: fractions 0.1, 0.63 and 0.27 of the solution, 0.7 of the solvent.
  test.each([
    ["0.63", "mass fraction including solute", "0.1", "mass fraction"],
    ["63:27", "mass %, solute counted", "0.1", "mass fraction"],
    ["0.63", "mass fraction incl. solute", `${100 / 9}`, "g/100 g solvent"],
    ["0.27 water", "mass fraction including the solute", "100", "mg/g solution"],
    [
      `${63 / 46.069 / (63 / 46.069 + 27 / 18.015 + 10 / 151.165)}`,
      "mole fraction including solute",
      `${100 / 9}`,
      "g/100 g solvent",
    ],
    [
      "0.63",
      "mass fraction including solute",
      `${10 / 151.165 / (63 / 46.069 + 27 / 18.015 + 10 / 151.165)}`,
      "mole fraction",
    ],
  ])("%s as %s at %s %s are 0.7 without it", async (composition, basis, value, unit) => {
    const { table: rows, refused } = await table(
      `paracetamol,ethanol/water,,,${composition},"${basis}",,25,${value},${unit}`,
    );
    expect(refused).toEqual([]);
    expect(rows.firstFraction[0]).toBeCloseTo(0.7, 5);
  });

  test("follow the value of each row of a source", async () => {
    const { table: rows } = await table(
      "paracetamol,ethanol/water,,,0.63,mass including solute,,25,0.1,mass fraction",
      "paracetamol,ethanol/water,,,0.63,mass including solute,,35,0.2,mass fraction",
      "paracetamol,ethanol/water,,,0.63,mass including solute,,45,0.4,mass fraction",
    );
    expect(rows.count).toBe(2);
    expect([...rows.firstFraction.slice(0, 2)].map((w) => w.toFixed(4))).toEqual(["0.7000", "0.7875"]);
  });
});

describe("A dissolved solvate", () => {
  test("in aqueous ethanol adds its water to the liquor, whose composition is no longer that of the solvent added", async () => {
    // Citric acid monohydrate, M 210.138 against 192.123 g/mol: 60 g hold 54.856 g of acid and 5.144 g of water. With
    // 100 g of 70:30 the liquor has 70 g of ethanol and 35.144 g of water.
    const row = "citric acid,ethanol/water 70:30 w/w,monohydrate,hydrate per added solvent,,,,25,60,g/100 g solvent";
    const { table: rows, assumptions, refused } = await table(row);
    expect(refused).toEqual([]);
    expect(rows.massRatio[0]).toBeCloseTo(54.856 / 105.144, 4);
    expect(rows.firstFraction[0]).toBeCloseTo(70 / 105.144, 4);
    expect(assumptions(0)).toContain("joins the solvent");
  });

  test("stated per total solvent changes nothing: its composition counts the guest already", async () => {
    const { table: rows, assumptions } = await table(
      "citric acid,ethanol/water 70:30 w/w,monohydrate,anhydrous,,,,25,60,g/100 g solvent",
    );
    expect(rows.firstFraction[0]).toBe(0.7);
    expect(assumptions(0)).toContain("composition taken as that of the total solvent");
  });

  test("whose guest is foreign makes the liquor a mixture, a system apart from the dry solvent", async () => {
    const { table: rows, assumptions } = await table(
      "citric acid,ethanol,monohydrate,hydrate per added solvent,,,,25,60,g/100 g solvent",
      "citric acid,ethanol,monohydrate,hydrate per added solvent,,,,25,2,g/100 g solvent",
    );
    expect(rows.firstFraction[0]).toBeCloseTo(100 / 105.144, 4);
    expect(rows.identity[0]).not.toBe(rows.identity[1]);
    expect(assumptions(0)).toContain("no part of ethanol");
  });
});

describe("What cannot be computed", () => {
  test("is named: a mixture outside the range of its densities", async () => {
    const problem = await refusal(
      { solvent: "ethanol/diethyl ether 1:1 w/w", temperature: "300", solubility: "50" },
      { solubility: "mg/mL solution" },
    );
    expect(problem).toMatchObject({ code: "no-density" });
    expect(problem.found).toContain("diethyl ether + ethanol");
  });

  test("is named in the place of the composition cell", async () => {
    const { refused } = await normaliseOne({
      solvent: "ethanol/water",
      composition: "130",
      composition_basis: "mass %",
    });
    expect(refused).toMatchObject({ code: "composition-out-of-range", place: { line: 2, column: "composition" } });
  });
});

test("A mixture is never taken for the water a unit or a published density is for", async () => {
  const { table: rows } = await table(
    "sucrose,ethanol/water 10:90 w/w,,,,,,25,50,mg/mL solution",
    "sucrose,water,,,,,,25,50,mg/mL solution",
  );
  const assumptions = [0, 1].map((row) => textOf(rows, rows.assumptions[row] as number));
  expect(assumptions[0]).toContain("additive volumes");
  expect(assumptions[1]).not.toContain("additive volumes");
});
