import { existsSync, readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import { describe, expect, test } from "vitest";
import { parseFormula } from "../../pipeline/properties/formula.ts";
import { hillFormula } from "../../pipeline/properties/molar-mass.ts";
import { loadSmilesReader } from "../../pipeline/properties/smiles-formula.ts";
import { programIndex } from "./read-tables.ts";

const read = await loadSmilesReader();

describe("A SMILES tells the formula", () => {
  // Formulas follow from the names.
  test.each([
    ["CCO", "C2H6O"],
    ["CC(=O)Nc1ccc(O)cc1", "C8H9NO2"],
    ["Cn1cnc2c1c(=O)n(C)c(=O)n2C", "C8H10N4O2"],
    ["[Na+].[Cl-]", "ClNa"],
    ["[H]O[H]", "H2O"],
    ["[2H]O[2H]", "D2O"],
    ["[As]", "As"],
    ["[As+3]", "As"],
    ["[MgH2]", "H2Mg"],
    ["[NH4+].[O-][N+](=O)=O", "H4N2O3"],
    ["CC[Pb](CC)(CC)CC", "C8H20Pb"],
    ["C[C@H](N)C(O)=O", "C3H7NO2"],
  ])("%s is %s", (smiles, formula) => {
    const composition = read(smiles);
    expect(composition.ok ? composition.formula : composition.message).toBe(formula);
  });

  test("the molar mass is that of the formula by the 2021 atomic weights", () => {
    const composition = read("CC(=O)Nc1ccc(O)cc1");
    expect(composition.ok ? composition.molarMass.value : 0).toBeCloseTo(151.165, 9);
  });

  test.each(["", "C(", "not a structure", "*C", "[13CH4]", "C1CC", "C".repeat(3000)])("%s is refused", (smiles) => {
    expect(read(smiles).ok).toBe(false);
  });

  test("every SMILES of the program's tables has the formula of its row", () => {
    const rows = programIndex.substances.filter(({ smiles, formula }) => smiles !== undefined && formula !== undefined);
    expect(rows.length).toBeGreaterThan(180);
    for (const { name, smiles = "", formula = "" } of rows) {
      const stated = parseFormula(formula);
      const composition = read(smiles);
      // A structure shows whole molecules only: the caffeine hydrate has 0.8 water.
      if (name === "caffeine hydrate") continue;
      expect(composition.ok ? composition.formula : composition.message, name).toBe(
        "fault" in stated ? stated.message : hillFormula(stated.elements),
      );
    }
  });
});

const folder = new URL("../../../shared/datasets/aqsoldb/", import.meta.url);
const present = existsSync(folder);

/** Elements of the formula and proton layers of an InChI, in Hill order; isotopes of hydrogen are counted as H. */
function inchiFormula(inchi: string): string {
  const sum = new Map<string, number>();
  const add = (symbol: string, count: number) => sum.set(symbol, (sum.get(symbol) ?? 0) + count);
  for (const part of (inchi.split("/")[1] ?? "").split(".")) {
    const [, times = "", formula = ""] = /^(\d*)(.*)$/.exec(part) ?? [];
    const parsed = parseFormula(formula);
    if ("fault" in parsed) throw new Error(`${inchi}: ${parsed.message}`);
    for (const [symbol, count] of parsed.elements) add(symbol, count * Number(times || 1));
  }
  add("H", Number(/\/p([+-]\d+)/.exec(inchi)?.[1] ?? 0));
  return hillFormula(sum);
}

/** Hill formula with the isotopes of hydrogen counted as H. */
function plainFormula(composition: ReturnType<typeof read>): string {
  if (!composition.ok) return composition.message;
  const plain = new Map(composition.elements);
  const isotopes = (plain.get("D") ?? 0) + (plain.get("T") ?? 0);
  if (isotopes > 0) plain.set("H", (plain.get("H") ?? 0) + isotopes);
  plain.delete("D");
  plain.delete("T");
  return hillFormula(plain);
}

// Sorkun, Khetan, Er, Scientific Data 6 (2019) 143: SMILES and InChI of the same row. In the rows listed the two do not
// describe one composition: bare atoms and tin(II), to which the InChI gives or from which it takes hydrogen, and
// charged atoms whose hydrogen the InChI lacks.
const DISAGREEING = [
  "[As]",
  "[Si]",
  "[P]",
  "[B]",
  "S=[SnH2]",
  "[SH--].[Cu+].[Cu+]",
  "CC1=CC=C[NH++]([O-])[CH-]1",
  "OC(=O)C1=C[NH++]([O-])[CH-]C=C1",
];

test.skipIf(!present)(
  "19,795 SMILES of nine open data sets (skipped where ../shared is absent) give the formula of their InChI",
  () => {
    let rows = 0;
    const different = new Set<string>();
    for (const set of "ABCDEFGHI") {
      const table: Record<string, string>[] = parse(readFileSync(new URL(`dataset-${set}.csv`, folder)), {
        columns: true,
        bom: true,
      });
      for (const { SMILES = "", InChI = "" } of table) {
        rows++;
        if (plainFormula(read(SMILES)) !== inchiFormula(InChI)) different.add(SMILES);
      }
    }
    expect(rows).toBe(19_795);
    expect([...different].sort()).toEqual([...DISAGREEING].sort());
  },
);
