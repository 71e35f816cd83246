import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { expect, test } from "vitest";
import { type ConvertOptions, convert } from "../../pipeline/commands/convert.ts";
import type { InputError } from "../../pipeline/problems/input-error.ts";
import type { ConvertResult } from "../../pipeline/records/generated/convert-result.ts";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import { CARD } from "../read/temporary-collection.ts";
import { editionOf } from "./curated.ts";

const card: SourceCard = {
  ...CARD,
  columns: {
    solute: { column: "solute" },
    solvent: { column: "solvent" },
    composition: { column: "composition" },
    composition_basis: { column: "basis" },
    solvent_water_wt_percent: { column: "water" },
    temperature: { column: "T", unit: "°C" },
    solubility: { column: "S", unit_column: "unit" },
  },
};

/** An edition of one source with these rows: solute, solvent, composition, basis, water, T, S, unit. Invented data. */
function editionWith(rows: readonly string[]) {
  const csv = `solute,solvent,composition,basis,water,T,S,unit\n${rows.join("\n")}\n`;
  return editionOf({ "sources/bench.source.json": JSON.stringify(card), "sources/bench.csv": csv });
}

/** ln r rising with T as a heat of solution of 20 kJ/mol makes it, 10 g/100 g at 25 °C. */
const at = (celsius: number) =>
  (10 * Math.exp((20_000 / 8.314462618) * (1 / 298.15 - 1 / (celsius + 273.15)))).toFixed(3);

test("One liquid written in every notation is one system with one curve, and its parts are listed as solvents", async () => {
  // All are 70.0 % mass of ethanol: 76.95 % vol (OIML R 22), 47.71 mol %, and 74.69 % by volume before mixing.
  const notations = [
    "ethanol/water 70:30 w/w,,,",
    "EtOH-H2O (7:3 w/w),,,",
    '"water, ethanol 30:70 by mass",,,',
    "70 wt% aqueous ethanol,,,",
    "ethanol + water,0.7,mass fraction,",
    "ethanol + water,30 % water,mass,",
    "ethanol (76.95 % vol),,,",
    "ethanol + water,76.95,% vol,",
    "ethanol/water x1 = 0.4771,,,",
    "ethanol + water,0.4771,mole fraction,",
    "ethanol/water 74.69:25.31 v/v,,,",
    "ethanol + water,0.7469,volume before mixing,",
    "64-17-5/7732-18-5 70:30 w/w,,,",
    "ethanol,,,30",
  ];
  const edition = await editionWith(
    notations.map((notation, i) => `paracetamol,${notation},${10 + 3 * i},${at(10 + 3 * i)},g/100 g solvent`),
  );
  expect(edition.refused.map(({ found }) => found)).toEqual([]);
  expect(edition.systems).toHaveLength(1);
  const [system] = edition.systems;
  expect(system?.identity).toMatchObject({ solvent: "ethanol + water", composition: "70:30 w/w" });
  expect(system?.rows).toHaveLength(notations.length);
  for (const row of system?.rows ?? []) expect(edition.table.firstFraction[row]).toBeCloseTo(0.7, 3);
  expect(edition.fits[0]?.curves).toHaveLength(1);
  expect(edition.flags).toEqual([]);
  expect(edition.substances.map(({ key, role }) => [key, role])).toEqual([
    ["ethanol", "solvent"],
    ["paracetamol", "solute"],
    ["water", "solvent"],
  ]);
  // Ethanol + water boil from 351.3 K on, their azeotrope; water alone at 373.1 K.
  expect(edition.liquors[0]?.solventBoilingPointK).toBeCloseTo(351.3, 1);
  expect(edition.liquors[0]?.solventHighestBoilingPointK).toBeCloseTo(373.1, 0);
});

test("Wet and dry, and compositions a step apart, are never merged in silence", async () => {
  const edition = await editionWith([
    `paracetamol,ethanol,,,,25,${at(25)},g/100 g solvent`,
    `paracetamol,ethanol,,,0.1,35,${at(35)},g/100 g solvent`,
    `paracetamol,ethanol,,,0.4,35,${at(35)},g/100 g solvent`,
    `paracetamol,ethanol,,,5,35,${at(35)},g/100 g solvent`,
    `paracetamol,ethanol/water 95:5 w/w,,,,45,${at(45)},g/100 g solvent`,
    `paracetamol,ethanol/water 94.5:5.5 w/w,,,,45,${at(45)},g/100 g solvent`,
    `paracetamol,water,,,,45,1.5,g/100 g solvent`,
  ]);
  const counts = edition.systems.map(({ identity, rows }) => [identity.solvent, identity.composition, rows.length]);
  expect(counts.sort()).toEqual([
    ["ethanol + water", "94.5:5.5 w/w", 1],
    ["ethanol + water", "95:5 w/w", 2],
    ["ethanol + water", "99.5:0.5 w/w", 1],
    ["ethanol", "", 2],
    ["water", "", 1],
  ]);
  expect(new Set(edition.systems.map(({ id }) => id)).size).toBe(5);
  expect(new Set(edition.systems.map(({ family }) => family)).size).toBe(5);
});

test("Every way in which a mixture cannot be used is a problem of its own with line, column and a way to mend it", async () => {
  const bad = [
    ["ethanol/water 70:40 v/v,,,", "fractions-do-not-add-up", "solvent"],
    ["ethanol/wter 70:30 v/v,,,", "unknown-mixture-partner", "solvent"],
    ["95 % ethanol,,,", "open-composition", "basis"],
    ["ethanol + water,0.7,,", "open-composition", "basis"],
    ["ethanol + water,120,mass %,", "composition-out-of-range", "composition"],
    ["ethanol/water/acetone/methanol 1:1:1:1 w/w,,,", "too-many-components", "solvent"],
    ["paracetamol/water 1:9 w/w,,,", "solvent-is-solute", "solvent"],
    ["water/toluene 1:1 v/v,,,", "miscibility-gap", "solvent"],
    ["ethanol + water,,,", "missing-composition", "solvent"],
    ["ethanol/water 70:30 w/w,0.5,mass,", "contradictory-composition", "composition"],
    ["ethanol/water,0.6,mass fraction including solute,", "composition-counts-solute", "basis"],
    ["ethanol/water,some,mass,", "unsupported-composition", "composition"],
  ] as const;
  const edition = await editionWith([
    `paracetamol,ethanol/water 70:30 w/w,,,,25,${at(25)},g/100 g solvent`,
    ...bad.map(([cells]) => `paracetamol,${cells},25,40,mg/mL solution`),
  ]);
  expect(edition.refused.map(({ code, place }) => [place.line, code, place.column])).toEqual(
    bad.map(([, code, column], i) => [i + 3, code, column]),
  );
  for (const { found, expected, mend, raw } of edition.refused) {
    expect([found, expected, mend, raw].every((text) => (text ?? "").length > 5)).toBe(true);
  }
  expect(edition.table.count).toBe(1);
});

/** The result of `saltern convert` for paracetamol at 25 °C, or the code of the problem that stops it. */
async function converted(value: string, options: Partial<ConvertOptions>): Promise<ConvertResult | string> {
  const printed: string[] = [];
  const terminal = {
    print: (text: string) => void printed.push(text),
    tell: () => {},
    progress: () => {},
    onInterrupt: () => {},
  };
  const all = { to: "g/100 g solvent", solute: "paracetamol", solvent: "water", temperature: "25 °C", json: true };
  const fault = await convert(value, { ...all, ...options }, terminal).catch(({ problem }: InputError) => problem.code);
  return typeof fault === "string" ? fault : (JSON.parse(printed.join("")) as ConvertResult);
}

test("convert takes a mixture as its solvent, with its contracted density and its exact molar mass", async () => {
  // 70:30 v/v before mixing is 64.85 % mass; OIML R 22: 0.65 has 879.447 kg/m3 at 20 °C, 0.6 891.098.
  const result = await converted("50 mg/mL solvent", { solvent: "ethanol/water 70:30 v/v" });
  if (typeof result === "string") throw new Error(result);
  expect(result.value).toBeCloseTo((100 * 50) / 879.8, 3);
  expect(result.assumptions.join()).toContain("dispensed at 20 °C");
  expect(result.budget?.some(({ name }) => name === "density of the solvent")).toBe(true);
  expect(await converted("50 mg/mL solvent", { solvent: "95 % ethanol" })).toBe("open-composition");
  expect(await converted("50 mg/mL solvent", { solvent: "ethanol/wter 1:1 v/v" })).toBe("unknown-mixture-partner");
});

const WARFARIN = fileURLToPath(
  new URL("../../../shared/reference/solubility/04a_warfarin_solvate_mixed_solvents.csv", import.meta.url),
);

test.skipIf(!existsSync(WARFARIN))(
  "A published solvate in mixtures of its own guest is one system a composition (needs ../shared/reference)",
  async () => {
    // Warfarin sodium 2-propanol solvate in 2-propanol + acetone, and with heptane besides: J. Chem. Eng. Data 64 (2019)
    // 1399. Mass fractions free of solute; three components where that of acetone is held at 0.095.
    const published: Record<string, string>[] = parse(readFileSync(WARFARIN), { columns: true });
    const rows = published.filter((row) => row.x_exp_1e3 !== "");
    const csv = rows.map((row) => {
      const T = (Number(row.T_K) - 273.15).toFixed(2);
      const w = Number(row.mass_fraction);
      const three = row.solvent_and_composition_variable?.includes("heptane");
      const solvent = three ? "2-propanol + acetone + heptane" : "2-propanol + acetone";
      const composition = three ? `${(0.905 - w).toFixed(3)}:0.095:${w}` : `${w} acetone`;
      return `warfarin sodium,${solvent},2-propanol solvate,${composition},${T},${row.x_exp_1e3}`;
    });
    const columns = {
      solute: { column: "solute" },
      solvent: { column: "solvent" },
      solid_form: { column: "form" },
      composition: { column: "w" },
      temperature: { column: "T", unit: "°C" },
      solubility: { column: "x", unit: "10^3 x" },
    };
    const edition = await editionOf({
      "sources/bench.source.json": JSON.stringify({
        ...CARD,
        columns,
        constants: { composition_basis: "mass fraction", solute_basis: "anhydrous" },
      }),
      "sources/bench.csv": `solute,solvent,form,w,T,x\n${csv.join("\n")}\n`,
    });
    expect(edition.refused.map(({ found }) => found)).toEqual([]);
    expect(edition.table.count).toBe(rows.length);
    const distinct = new Set(rows.map((row) => `${row.solvent_and_composition_variable} ${row.mass_fraction}`));
    expect(edition.systems).toHaveLength(distinct.size);
    for (const { identity } of edition.systems) {
      expect(identity.solidForm).toBe("2-propanol solvate");
      expect(identity.solvent).toMatch(/^2-propanol \+ acetone(?: \+ heptane)?$/);
    }
  },
);

test("Which crystal a hydrate former leaves in a mixture with water is left open, not taken from water alone", async () => {
  const edition = await editionWith([
    `theophylline,ethanol/water 80:20 w/w,,,,25,1.5,g/100 g solvent`,
    `theophylline,water,,,,25,0.8,g/100 g solvent`,
  ]);
  const crystal = (solvent: string) => {
    const at = edition.systems.findIndex(({ identity }) => identity.solvent === solvent);
    return edition.liquors[at]?.crystalAt(298.15);
  };
  expect(crystal("ethanol + water")).toBeUndefined();
  expect(crystal("water")?.form).toBe("monohydrate");
});
