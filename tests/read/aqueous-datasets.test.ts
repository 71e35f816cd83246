import { existsSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { expect, test } from "vitest";
import { readSingleSource } from "../../pipeline/read/source.ts";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";

// Sorkun, Khetan, Er: AqSolDB, Scientific Data 6 (2019) 143, doi 10.1038/s41597-019-0151-1, data CC0; nine sets A to I.
const FOLDER = fileURLToPath(new URL("../../../shared/datasets/aqsoldb/", import.meta.url));
const absent = !existsSync(FOLDER);
if (absent) console.warn(`skipped: the nine aqueous data sets are not on this machine (${FOLDER})`);

const CARD: SourceCard = {
  format: 1,
  source: "set",
  file: "set.csv",
  columns: {
    solute: { column: "Name" },
    inchikey: { column: "InChIKey" },
    smiles: { column: "SMILES" },
    solubility: { column: "Solubility", unit: "log10(mol/L)" },
  },
  constants: { solvent: "water", temperature: { value: 25, unit: "°C" } },
};

test.skipIf(absent)("nine open aqueous sets: 19,795 readings of 9,982 solutes, none lost", async () => {
  const solutes = new Set<string>();
  let readings = 0;
  for (const set of "ABCDEFGHI") {
    const read = await readSingleSource(`${FOLDER}dataset-${set}.csv`, CARD);
    if (!read.ok) throw new Error(read.refused.problem.found);
    const { source } = read;
    expect([source.refused, source.missingCells, source.decimal]).toEqual([[], 0, "."]);
    readings += source.readingsFound;
    for (const { cells } of source.readings) solutes.add(cells[3] ?? "");
  }
  expect([readings, solutes.size]).toEqual([19_795, 9_982]);
});

// The note beside the file speaks of 24 rows; it holds 25.
test.skipIf(absent)("the raw extract with a byte-order mark and a unit column: 25 readings", async () => {
  const read = await readSingleSource(`${FOLDER}raw-extract-A.csv`, {
    ...CARD,
    columns: {
      solute: { column: "Name" },
      cas: { column: "CAS" },
      temperature: { column: "Temp", unit: "°C" },
      solubility: { column: "OriginalSol", unit_column: "Metric" },
    },
    constants: { solvent: "water" },
  });
  expect(read).toMatchObject({ ok: true, source: { readingsFound: 25, columnsNotUsed: [] } });
});
