import { cpSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { curate } from "../../pipeline/curate.ts";
import { readCollection } from "../../pipeline/read/collection.ts";
import type { Edition } from "../../pipeline/records/edition.ts";
import { flagsAt, flagsOf, rowsOf, type SmallSource, writeCollection } from "../screen/small-collection.ts";
import { ROOT, scratch } from "./saltern.ts";

/*
 * Real errors of published tables and real conflicts between them, curated as one collection: the handbook collection
 * with its misprints as printed, and further tables with the errors below. What is not told, and why:
 *
 * - E02, E03  correlations whose authors' own figures are not reproduced: no value is printed that could be read
 * - E09       10 % in g/100 g, 7 % in mole fraction: within four standard deviations of the scatter between salt tables
 * - E24       0.15 mass-% of 27.6 (0.7 % in g/100 g): an eighth of the material threshold of salts in water
 * - E28       a density 0.2 % low: below what a density can be told to be wrong by (3 %)
 * - E31       calculated values in three digits: rounding alone is as large as the scatter of measurements
 */
const folder = scratch();
let edition: Edition;

const inWater = (solute: string, values: readonly (readonly [number, number])[]) => rowsOf(solute, "water", values);
const table = (rows: SmallSource["rows"], unit: string, more: Partial<SmallSource> = {}): SmallSource => ({
  ...{ rows, unit },
  ...more,
  card: { origin: "handbook", ...more.card },
});

// CuSO4·5H2O as the Wikipedia solubility table prints it, g/100 g, basis not stated.
const BLUE_VITRIOL = [
  ...[
    [0, 23.1],
    [10, 27.5],
    [20, 32],
    [30, 37.8],
  ],
  ...[
    [40, 44.6],
    [60, 61.8],
    [80, 83.8],
    [100, 114],
  ],
] as [number, number][];
const asPentahydrate = { headings: ["form"], columns: { solid_form: { column: "form" } } };
const pentahydrate = inWater("CuSO4", BLUE_VITRIOL).map((row) => [...row, "pentahydrate"]);

const PUBLISHED: Readonly<Record<string, SmallSource>> = {
  // W. E. Acree Jr., J. Chem. Eng. Data (2018): the coefficients as published give these mole fractions at x2 = 0 and 1.
  e01: table(
    [
      ["olaparib", "acetonitrile", 25, 12.098],
      ["olaparib", "2-propanol", 25, 17.305],
    ],
    "mole fraction",
    { card: { constants: { molar_mass: 434.46 } } },
  ),
  // F. A. Mohos, Confectionery and Chocolate Engineering (2010), Table A2.2: g/100 g water and density of the saturated
  // solution, kg/m3.
  e06: table(
    [
      ...[
        [15, 197, 1328],
        [20, 203.9, 1332.7],
        [25, 211.4, 1342.7],
        [30, 219.9, 1345.7],
        [35, 228.4, 1348],
      ],
      ...[
        [40, 238.1, 1353.5],
        [45, 248.7, 1359.2],
        [50, 260.4, 1365.1],
        [55, 273.1, 1371.2],
        [60, 287.3, 1377.5],
      ],
    ].map((row) => ["sucrose", "water", ...row]),
    "g/100 g solvent",
    { headings: ["d"], columns: { solution_density: { column: "d", unit: "kg/m3" } } },
  ),
  "e15-added": table(pentahydrate, "g/100 g solvent", {
    ...asPentahydrate,
    card: { constants: { solute_basis: "hydrate per added solvent" } },
  }),
  "e15-open": table(pentahydrate, "g/100 g solvent", asPentahydrate),
  // Potassium alum, Sigma-Aldrich solubility table: 6.01 g/100 g at 20 °C beside 5.67 % by mass.
  "e16-dodecahydrate": table([["KAl(SO4)2", "water", 20, 6.01, "dodecahydrate"]], "g/100 g solvent", asPentahydrate),
  // (NH4)2HPO4, Sigma-Aldrich solubility table, the sign at 80 °C as printed.
  e17: table(
    inWater("(NH4)2HPO4", [
      [0, 57.5],
      [20, 68.6],
      [40, 81.8],
      [60, 97.6],
      [80, -115.5],
    ]),
    "g/100 g solvent",
  ),
  // Vavrinecz's equation with the sign of t^2 as one public file has it; mass %.
  e18: table(
    inWater("sucrose", [
      [20, 65.4],
      [100, 50.3],
    ]),
    "g/100 g solution",
  ),
  // Charles's equation as quoted under the name Vavrinecz; mass %, in the digits of an equation.
  e19: table(
    inWater("sucrose", [
      [20, 65.93],
      [80, 71.69],
    ]),
    "g/100 g solution",
    { card: { constants: { uncertainty: { value: 0.1 } } } },
  ),
  // KNO3, sv.scienceaq.com, g/100 g.
  e20: table(
    inWater("KNO3", [
      [0, 133],
      [20, 198],
      [100, 316],
    ]),
    "g/100 g solvent",
  ),
  // Concentrated acids, scienceaq.com and protocolsonline.com: mass % and mol/L of one row, density in g/cm3.
  acids: table(
    [
      ["hydrochloric acid", "water", 25, 38, 1.18, "% w/w", "HCl"],
      ["hydrochloric acid", "water", 25, 10.47, 1.18, "mol/L", "HCl"],
      ["nitric acid", "water", 20, 36, 1.18, "% w/w", "HNO3"],
      ["nitric acid", "water", 20, 11.6, 1.18, "mol/L", "HNO3"],
      ["perchloric acid", "water", 20, 70, 1.42, "% w/w", "HClO4"],
      ["perchloric acid", "water", 20, 15.7, 1.42, "mol/L", "HClO4"],
    ],
    "",
    {
      headings: ["d", "unit", "f"],
      columns: {
        solubility: { column: "S", unit_column: "unit" },
        solution_density: { column: "d", unit: "g/cm3" },
        formula: { column: "f" },
      },
    },
  ),
  // NH4Cl and KCl, pumpa.in, g/100 g.
  e23: table(
    [
      ...inWater("NH4Cl", [
        [10, 24],
        [20, 37],
        [40, 41],
      ]),
      ...inWater("KCl", [
        [10, 35],
        [20, 35],
      ]),
    ],
    "g/100 g solvent",
  ),
  // BigSolDB 2.0 (doi 10.1038/s41597-025-05559-8), its column in mol/L, which is per litre of pure solvent.
  e25: table(
    [
      ...[
        ["butyl paraben", 281.05, 25.668095382],
        ["butyl paraben", 321.05, 138.917936042],
        ["naphthalene", 304.26, 0.823637012],
      ],
      ...[
        ["naphthalene", 314.52, 1.179317285],
        ["naphthalene", 321.46, 1.594061576],
        ["naphthalene", 325.68, 2.172125684],
      ],
      ...[
        ["naphthalene", 330.43, 2.988648238],
        ["naphthalene", 333.9, 4.183706353],
        ["naphthalene", 337.76, 6.768044855],
      ],
    ].map(([solute = "", T, S = 0]) => [solute, "ethanol", (Number(T) - 273.15).toFixed(2), S]),
    "mol/L solution",
  ),
  // Saturated NaCl, density of the saturated row of a table (Wikipedia user draft), kg/m3.
  e28: table([["NaCl", "water", 20, 26.4, 1197.78]], "g/100 g solution", {
    headings: ["d"],
    columns: { solution_density: { column: "d", unit: "kg/m3" } },
  }),
  // Potter et al., J. Res. U.S. Geol. Survey 5 (1977) 389: their equation for KCl, stated for 100 to 450 °C, at 0 °C.
  e30: table(inWater("KCl", [[0, 27.84]]), "g/100 g solution"),
  // Warfarin sodium 2-propanol solvate, x calculated by the authors (J. Chem. Eng. Data 64 (2019) 1399, Table 4), here as
  // if measured, in 2-propanol.
  e31: table(
    [
      ...[
        [280.3, 1.39],
        [287.1, 1.56],
        [290.8, 1.67],
        [296.6, 1.87],
      ],
      ...[
        [304.9, 2.23],
        [312.5, 2.66],
        [320.4, 3.21],
      ],
    ].map(([T = 0, x = 0]) => ["warfarin sodium", "2-propanol", (T - 273.15).toFixed(2), x]),
    "10^3 x",
    { card: { constants: { formula: "C19H15NaO4" } } },
  ),
};

beforeAll(async () => {
  const collection = join(folder, "collection");
  cpSync(join(ROOT, "datasets", "handbook"), collection, { recursive: true });
  edition = (await curate(await readCollection(writeCollection(collection, PUBLISHED)), "0.0.0")).edition;
}, 60_000);

const CRC98 = "handbook-crc98-mass-percent";

/** Line of a source that holds a value as reported. */
function lineOf(source: string, solute: string, celsius: number): number {
  const { table, sources, systems } = edition;
  for (const { identity, rows } of systems) {
    if (identity.solute !== solute) continue;
    for (const row of rows)
      if (sources[table.source[row]!]?.name === source && Math.abs(table.temperatureK[row]! - 273.15 - celsius) < 0.01)
        return table.line[row]!;
  }
  throw new Error(`${source} has no ${solute} at ${celsius} °C`);
}

/** Codes of the flags on a value. */
function codesAt(source: string, solute: string, celsius: number): string[] {
  return flagsAt(edition, source, lineOf(source, solute, celsius)).map(({ code }) => code);
}

const refusedOf = (source: string) =>
  edition.refused.filter(({ place }) => place.source === source).map(({ code, place }) => [place.line, code] as const);

describe("impossible or open values are refused", () => {
  test("E01: mole fractions of 12 and 17, from coefficients that are wrong by a factor 100", () => {
    expect(refusedOf("e01")).toEqual([
      [2, "fraction-at-or-above-one"],
      [3, "fraction-at-or-above-one"],
    ]);
  });

  test("E17: a negative solubility, the four sound values beside it being kept", () => {
    expect(refusedOf("e17")).toEqual([[6, "value-not-positive"]]);
    expect(edition.sources.find(({ name }) => name === "e17")?.accepted).toBe(4);
  });

  test("E15, E16: a hydrate in g/100 g whose basis is not stated, with the three readings", () => {
    expect(refusedOf("e15-open").map(([, code]) => code)).toEqual(Array(8).fill("open-hydrate-basis"));
    expect(refusedOf("e16-dodecahydrate").map(([, code]) => code)).toEqual(["open-hydrate-basis"]);
    // 20 °C: 32 g/100 g as printed would be 20.5 g anhydrous per 100 g of total water; CRC has 20.7.
    const { found = "" } = edition.refused.find(({ place }) => place.source === "e15-open" && place.line === 4) ?? {};
    expect(found).toContain("hydrate equivalent per total solvent 20.5");
  });

  test("E14: Ce2(SO4)3 with a hydrate's formula and no basis is refused, not set beside the anhydrous table", () => {
    const open = edition.refused.filter(
      ({ code, place, raw = "" }) =>
        code === "open-hydrate-basis" && place.source === "encyclopedia-solubility-table" && raw.includes("Ce2(SO4)3"),
    );
    expect(open).toHaveLength(5);
  });

  test("E25: mol per litre of pure solvent read as of solution is refused where no solution could hold it", () => {
    // 139 mol/L of butyl paraben: the solid itself is about 6 mol/L.
    expect(refusedOf("e25").slice(0, 2)).toEqual([
      [2, "no-density"],
      [3, "no-density"],
    ]);
  });
});

describe("single values that are off are found", () => {
  test.each([
    ["E07", "calcium iodate", 70, CRC98],
    ["E08", "barium chlorate", 20, CRC98],
    ["E10", "silver nitrate", 100, "teaching-table-a"],
    ["E11", "sodium hydroxide", 10, "teaching-table-a"],
    ["E11", "sodium hydroxide", 90, "teaching-table-a"],
    ["E12", "ammonium dihydrogen phosphate", 100, CRC98],
    ["E13", "magnesium sulfate", 0, "teaching-table-a"],
    ["E14", "cerium(III) sulfate", 10, "teaching-table-a"],
    ["E18", "sucrose", 100, "e18"],
    ["E19", "sucrose", 80, "e19"],
    ["E29", "boric acid", 80, "encyclopedia-organic-pages"],
    ["E29", "boric acid", 100, "encyclopedia-organic-pages"],
    ["E30", "potassium chloride", 0, "e30"],
  ])("%s: %s at %s °C in %s needs a person", (_, solute, celsius, source) => {
    const flags = flagsAt(edition, source, lineOf(source, solute, celsius));
    const blocking = flags.filter(({ severity }) => severity === "blocking");
    expect(blocking.map(({ code }) => code)).toContain("off-curve");
  });

  test("E29: boric acid in mass % under g/100 mL is a mistaken basis, no loss in a filter", () => {
    for (const celsius of [80, 100]) {
      const flags = flagsAt(
        edition,
        "encyclopedia-organic-pages",
        lineOf("encyclopedia-organic-pages", "boric acid", celsius),
      );
      const off = flags.find(({ code }) => code === "off-curve");
      expect(off).toMatchObject({
        suspectedCause: "basis mix-up",
        causeDetail: "g/100 mL solvent should read g/100 g solution",
      });
    }
  });

  test("E11: the newer table of NaOH is not blamed for the older one's values", () => {
    for (const celsius of [10, 20, 30]) expect(codesAt(CRC98, "sodium hydroxide", celsius)).not.toContain("off-curve");
  });

  test("E10: the older AgNO3 table is told against the two newer ones that agree, at the very temperatures", () => {
    const told = flagsOf(edition).find(
      ({ code, id }) => code === "off-the-others" && id.includes("teaching-table-a@silver-nitrate"),
    );
    expect(told?.evidence).toMatch(/above those of encyclopedia-solubility-table and handbook-crc98-mass-percent/);
  });

  test("E20: values ten times too large at 0 °C, six times at 20 °C are one finding on the series", () => {
    const flags = flagsAt(edition, "e20", 2);
    expect(flags.map(({ code, scope, severity }) => [code, scope, severity])).toEqual([
      ["block-off-curve", "block", "blocking"],
    ]);
  });

  test("E23: NH4Cl 28 % low and KCl 13 % high at 10 °C in a school table", () => {
    const blocking = [2, 5].map((line) =>
      flagsAt(edition, "e23", line).some(({ severity }) => severity === "blocking"),
    );
    expect(blocking).toEqual([true, true]);
  });

  test("E26: the low run of succinic acid in ethanol at 288 to 293 K is seen as a series that leaves its curve", () => {
    expect(codesAt("open-organics-mole-fraction", "succinic acid", 15)).toContain("off-curve");
  });
});

describe("series that cannot be read as they stand are found", () => {
  test("E04: two artemisinin papers a factor two apart: a conflict, both laid out, nothing set aside", () => {
    const conflict = flagsOf(edition).find(({ id }) => id.startsWith("sources-disagree@artemisinin-in-ethanol"));
    expect(conflict?.severity).toBe("blocking");
    expect(conflict?.evidence).toMatch(/literature-artemisinin-2006 .* open-organics-mole-fraction/);
  });

  test("E15: the pentahydrate taken as weighed per water added is one finding on the series", () => {
    const flags = flagsAt(edition, "e15-added", 4).filter(({ severity }) => severity === "blocking");
    expect(flags).toMatchObject([
      { scope: "block", suspectedCause: "hydrate basis", causeDetail: "mass is hydrate equivalent per total solvent" },
    ]);
  });

  test("E25: the rest of the naphthalene series parts from the mole fractions it was computed from", () => {
    const { table, systems } = edition;
    const system = systems.findIndex(({ id }) => id.startsWith("naphthalene-in-ethanol"));
    const e25 = edition.sources.findIndex(({ name }) => name === "e25");
    const about = edition.flags.filter(
      (flag) => flag.system === system && flag.severity === "blocking" && (flag.source ?? e25) === e25,
    );
    expect(about.length).toBeGreaterThan(0);
    for (const { row } of about) if (row !== undefined) expect(table.reportedValue[row]).toBeGreaterThan(2);
  });

  test("E27: a plateau, and a temperature above the boiling point of ethanol", () => {
    const source = "open-organics-mole-fraction";
    const line = lineOf(source, "2,4-dinitro-L-phenylalanine", 80);
    const flags = flagsAt(edition, source, line);
    expect(flags.map(({ code }) => code).sort()).toEqual(["off-curve", "outside-liquid-range"]);
    expect(flags.find(({ code }) => code === "off-curve")?.suspectedCause).toBe("everything dissolved");
  });

  test("E32: succinic acid from several sources, 58 g/L at 20 °C and 83 at 25 °C: too few points to say which", () => {
    const told = flagsOf(edition).find(({ id }) => id.startsWith("cannot-tell@succinic-acid-in-water"));
    expect(told?.severity).toBe("notice");
  });
});

describe("what no curve shows is found by holding columns and copies against one another", () => {
  test("E05: sucrose at 90 °C, 80.84 mass % where the table it repeats has 80.61", () => {
    const line = lineOf("literature-sokolovsky-1958", "sucrose", 90);
    const changed = flagsAt(edition, "literature-sokolovsky-1958", line).find(({ code }) => code === "changed-copy");
    expect(changed?.evidence).toMatch(/reads 80\.84 where line \d+ reads 80\.61 g\/100 g solution$/);
  });

  test("E06: the density of saturated sucrose at 25 °C off the line of the others", () => {
    const rough = flagsOf(edition).filter(({ code }) => code === "rough-density");
    expect(rough.map(({ id }) => id)).toEqual(["rough-density@e06:4"]);
    expect(rough[0]?.evidence).toContain("1342.7 kg/m3 at 25.0 °C lies 3.5 kg/m3 above");
  });

  test("E21: 38 % hydrochloric acid of density 1.18 is 12.3 mol/L, not 10.47", () => {
    // 10 x 38 x 1.18 / 36.46
    const told = flagsAt(edition, "acids", 3).find(({ code }) => code === "units-contradict");
    expect(told?.evidence).toMatch(/^10\.47 mol\/L stands where 12\.3 would follow; that is 15 % below/);
  });

  test("E22: rows shifted by one in a table of acids: mol/L belongs to the next acid's mass %", () => {
    // 36 % of HNO3 at 1.18 is 6.74 mol/L; 15.7 mol/L of HClO4 at 1.42 would be 111 % by mass.
    const told = flagsAt(edition, "acids", 5).find(({ code }) => code === "units-contradict");
    expect(told?.evidence).toMatch(/^11\.6 mol\/L stands where 6\.74 would follow; that is 72 % above/);
    expect(refusedOf("acids")).toEqual([[7, "fraction-at-or-above-one"]]);
  });
});

describe("what is not told, and why", () => {
  const rowAt = (source: string, solute: string, celsius: number) => {
    const { table, sources } = edition;
    const line = lineOf(source, solute, celsius);
    for (let row = 0; row < table.count; row++)
      if (sources[table.source[row]!]?.name === source && table.line[row] === line) return row;
    throw new Error("no such row");
  };

  test("E09: LiCl at 10 °C, tables 7 % apart in mole fraction, within the scatter between salt tables", () => {
    expect(codesAt(CRC98, "lithium chloride", 10)).not.toContain("off-curve");
    const row = (source: string) => edition.table.moleFraction[rowAt(source, "lithium chloride", 10)]!;
    expect(row("handbook-crc98-molality") / row(CRC98) - 1).toBeCloseTo(0.075, 1);
  });

  test("E24: NaCl at 79.44 °C is off by less than the threshold of 5 %", () => {
    const row = rowAt("brine-table-salt-institute", "sodium chloride", 79.44);
    expect(Math.abs(edition.rowResults.deviationPercent[row]!)).toBeLessThan(1.5);
    expect(codesAt("brine-table-salt-institute", "sodium chloride", 79.44)).not.toContain("off-curve");
  });

  test("E28: a density 0.2 % low is taken as measured", () => {
    expect(flagsAt(edition, "e28", 2).filter(({ code }) => code.includes("density"))).toEqual([]);
  });

  test("E31: calculated values in three digits look like measured ones", () => {
    expect(edition.sources.find(({ name }) => name === "e31")?.accepted).toBe(7);
    expect(flagsAt(edition, "e31", 2).map(({ code }) => code)).not.toContain("calculated-values");
  });
});
