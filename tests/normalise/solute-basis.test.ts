import { describe, expect, test } from "vitest";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import type { TableRow } from "../../pipeline/records/readings.ts";
import { normaliseTable } from "./tables.ts";

const columns: SourceCard["columns"] = {
  solute: { column: "s" },
  solid_form: { column: "f" },
  solvent: { column: "l" },
  temperature: { column: "T", unit: "°C" },
  solubility: { column: "c", unit_column: "unit" },
  solute_basis: { column: "b" },
};

/** Solid forms of a group's own: a hydrochloride of lidocaine, M 270.80 against 234.34 g/mol of the base. */
const own: readonly TableRow[] = [
  {
    file: "solid_forms.csv",
    line: 2,
    values: {
      ...{
        solute: "lidocaine",
        form: "hydrochloride",
        kind: "salt",
        guest: "hydrogen chloride",
        guest_per_solute: "1",
      },
      ...{ molar_mass: "270.80", melting_point_K: "", fusion_enthalpy_kJ_per_mol: "", density_kg_per_m3: "" },
      ...{ transition_K: "", to_form: "", reference: "invented for this test; molar mass from the formula" },
    },
  },
];
const table = (...rows: readonly string[]) =>
  normaliseTable(`s,f,l,T,c,unit,b\n${rows.join("\n")}\n`, { columns }, own);

const per100g = async (row: string) => {
  const { table: rows, refused } = await table(row);
  if (rows.count !== 1) throw new Error(JSON.stringify(refused));
  return 100 * (rows.massRatio[0] ?? Number.NaN);
};

// The three readings of one number, by mass balance with M from the IUPAC 2021 atomic weights (abridged).
describe.each([
  ["copper(II) sulfate", "pentahydrate", 159.6, 249.68, 36.7],
  ["sodium sulfate", "decahydrate", 142.04, 322.19, 44],
  ["citric acid", "monohydrate", 192.12, 210.14, 60],
  ["oxalic acid", "dihydrate", 90.03, 126.07, 14.3],
])("%s %s, %d against %d g/mol: %d g/100 g solvent", (solute, form, unsolvated, crystal, value) => {
  const dry = value * (unsolvated / crystal);
  test.each([
    ["anhydrous", value],
    ["hydrate per added solvent", (100 * dry) / (100 + value - dry)],
    ["hydrate equivalent per total solvent", dry],
  ])("as %s is %d g unsolvated per 100 g total solvent", async (basis, expected) => {
    const found = await per100g(`${solute},${form},water,25,${value},g/100 g solvent,${basis}`);
    expect(Math.abs(found / expected - 1)).toBeLessThan(2e-4);
  });

  test("without a basis is refused and shows all three", async () => {
    const { refused } = await table(`${solute},${form},water,25,${value},g/100 g solvent,`);
    expect(refused).toMatchObject([{ code: "open-hydrate-basis", place: { line: 2, column: "b" } }]);
    for (const r of [value, (100 * dry) / (100 + value - dry), dry]) {
      const shown = Number(
        (refused[0]?.found.match(/[\d.]+(?=,| g anh)/g) ?? []).find((n) => Math.abs(Number(n) / r - 1) < 0.005),
      );
      expect(shown, `${r} in ${refused[0]?.found}`).toBeGreaterThan(0);
    }
  });
});

describe("a crystal solvent that is no part of the solvent", () => {
  test("joins it all the same, and the row says that its liquor is a mixture", async () => {
    const { table: rows, assumptions } = await table(
      "citric acid,monohydrate,ethanol,25,60,g/100 g solvent,hydrate per added solvent",
    );
    // 60 g monohydrate bring 5.145 g of water into 100 g of ethanol.
    expect(rows.massRatio[0]).toBeCloseTo((60 * 192.12) / 210.14 / 105.145, 4);
    expect(assumptions(0)).toContain("the crystal's water is no part of ethanol: the liquor is a mixture");
  });

  test("is not said of water in water", async () => {
    const { assumptions } = await table(
      "citric acid,monohydrate,water,25,60,g/100 g solvent,hydrate per added solvent",
    );
    expect(assumptions(0)).not.toContain("mixture");
  });
});

describe("a salt and its free base", () => {
  test("reported as base, per base, is taken as it stands; as salt, it is converted by their molar masses", async () => {
    const row = (value: number, basis: string) => `lidocaine,hydrochloride,water,25,${value},g/100 g solvent,${basis}`;
    expect(await per100g(row(20, "anhydrous"))).toBeCloseTo(20, 10);
    const asSalt = await per100g(row(20, "hydrate equivalent per total solvent"));
    expect(asSalt / ((20 * 234.34) / 270.8)).toBeCloseTo(1, 4);
  });

  test("counts the same formula units, so an amount needs no basis", async () => {
    const { table: rows } = await table("lidocaine,hydrochloride,water,25,0.5,mol/kg solvent,");
    expect(100 * (rows.massRatio[0] ?? 0)).toBeCloseTo(0.05 * 234.34, 2);
  });

  test("without a basis is refused, for the two masses differ by 16 %", async () => {
    const { refused } = await table("lidocaine,hydrochloride,water,25,20,g/100 g solvent,");
    expect(refused).toMatchObject([{ code: "open-salt-basis", place: { line: 2, column: "b" } }]);
    expect(refused[0]?.mend).toContain("solute_basis");
  });

  test("is no hydrate: nothing of it is per added solvent", async () => {
    const { refused } = await table("lidocaine,hydrochloride,water,25,20,g/100 g solvent,hydrate per added solvent");
    expect(refused).toMatchObject([{ code: "bad-choice" }]);
    expect(refused[0]?.found).toContain("does not join the solvent");
  });
});
