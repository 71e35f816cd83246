import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { beforeAll, describe, expect, test } from "vitest";
import type { Edition } from "../../pipeline/records/edition.ts";
import { editionOf, flagsOf } from "./curated.ts";

// Aqueous solubility of inorganic compounds at various temperatures, CRC Handbook of Chemistry and Physics: 91st ed. (2010)
// in g/100 g of water, from the public repository newfound-materials/aqueous-solubility-data (MIT), and 98th ed. (2017) in
// mass %, from chicolucio/solutions (MIT). One handbook, so the two are no independent measurements.
const TABLES = fileURLToPath(new URL("../../../shared/datasets/inorganic-salts-water/", import.meta.url));
const CELSIUS = [0, 10, 20, 25, 30, 40, 50, 60, 70, 80, 90, 100];

const absent = !existsSync(TABLES);
if (absent) console.warn(`skipped: the two inorganic tables are not on this machine (${TABLES})`);

type Row = Readonly<Record<string, string>>;
const records = (name: string) => parse(readFileSync(TABLES + name, "utf8"), { columns: true }) as Row[];

/** A wide table as a long one: formula, temperature and value of every cell that is not empty, in order. */
function long(name: string, formula: string, headingOf: (celsius: number) => string): string {
  const lines = records(name).flatMap((row) =>
    CELSIUS.flatMap((t) => (row[headingOf(t)] ? [`${row[formula]},${t},${row[headingOf(t)]}`] : [])),
  );
  return `Compound,T,S\n${lines.join("\n")}\n`;
}

const card = (source: string, unit: string) =>
  JSON.stringify({
    ...{ format: 1, source, file: `${source}.csv`, origin: "handbook", licence: "MIT" },
    columns: {
      ...{ solute: { column: "Compound" }, formula: { column: "Compound" } },
      ...{ temperature: { column: "T", unit: "°C" }, solubility: { column: "S", unit } },
    },
    constants: { solvent: "water" },
  });

describe.skipIf(absent)("two wide tables of inorganic salts in water", () => {
  let edition: Edition;
  /** Values of both sources in g/100 g of water by system and temperature. */
  const cells = new Map<string, { grams?: number; massPercent?: number }>();

  beforeAll(async () => {
    edition = await editionOf({
      "sources/grams.source.json": card("grams", "g/100 g solvent"),
      "sources/grams.csv": long("grams-per-100g-water.csv", "formula", (t) => `solubility_${t}C`),
      "sources/mass-percent.source.json": card("mass-percent", "% w/w"),
      "sources/mass-percent.csv": long("mass-percent.csv", "Formula", (t) => `${t}`),
    });
    const { table, systems } = edition;
    for (const system of systems) {
      for (const row of system.rows) {
        const key = `${system.id} ${table.temperatureK[row]}`;
        const which = edition.sources[table.source[row] as number]?.name === "grams" ? "grams" : "massPercent";
        cells.set(key, { ...cells.get(key), [which]: 100 * (table.massRatio[row] as number) });
      }
    }
  });

  test("resolve every one of their 316 formulas to a substance with a name", () => {
    const solutes = edition.substances.filter(({ role }) => role.includes("solute"));
    expect(solutes).toHaveLength(316);
    expect(solutes.filter(({ name }) => name === "")).toEqual([]);
    expect(edition.systems).toHaveLength(316);
  });

  test("lose one cell each: barium hydroxide at 80 °C, where the handbook's 100 % is no solubility", () => {
    expect(edition.refused.map(({ place, code, raw }) => [place.source, code, raw])).toEqual([
      ["grams", "not-a-number", "Ba(OH)2 | 80 | inf"],
      ["mass-percent", "fraction-at-or-above-one", "Ba(OH)2 | 80 | 100.0"],
    ]);
    expect(edition.sources.map(({ readings, accepted }) => [readings, accepted])).toEqual([
      [2578, 2577],
      [2578, 2577],
    ]);
  });

  test("agree within 2 % in each of the 2,577 common cells after conversion", () => {
    const both = [...cells].flatMap(([key, { grams, massPercent }]) =>
      grams === undefined || massPercent === undefined ? [] : [{ key, off: Math.abs(grams / massPercent - 1) }],
    );
    expect(both).toHaveLength(2577);
    const worst = both.reduce((a, b) => (b.off > a.off ? b : a));
    console.info(`inorganic tables: worst of ${both.length} cells ${(100 * worst.off).toFixed(3)} % (${worst.key})`);
    expect(worst.off).toBeLessThan(0.02);
  });

  test("are told as one report of the other, and no block of either as off the curve", () => {
    const told = new Set(flagsOf(edition, "re-reported").map(({ system }) => system));
    // Three pairs or more are needed to tell copies from chance.
    const long = edition.systems.filter(({ rows }) => rows.length >= 6);
    console.info(`inorganic tables: re-reported told for ${told.size} of ${long.length} salts with 3 cells or more`);
    expect(long).toHaveLength(237);
    expect(told.size).toBeGreaterThan(0.9 * long.length);
    expect(flagsOf(edition, "block-off-curve")).toEqual([]);
  });

  test("are never said to disagree, for at every temperature they read the same", () => {
    expect(flagsOf(edition, "sources-disagree", "sources-part-once").map(({ id }) => id)).toEqual([]);
  });
});
