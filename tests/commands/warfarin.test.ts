import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { beforeAll, describe, expect, test } from "vitest";
import type { Edition } from "../../pipeline/records/edition.ts";
import type { Curve } from "../../pipeline/records/fits.ts";
import { editionOf } from "./curated.ts";

// Warfarin sodium 2-propanol solvate in 2-propanol + acetone (table 4) and 2-propanol + acetone + heptane (table 9):
// George De la Rosa et al., J. Chem. Eng. Data 64 (2019) 1399-1413, doi 10.1021/acs.jced.8b00977, with the values that
// their modified Apelblat fits give.
const FILE = fileURLToPath(
  new URL("../../../shared/reference/solubility/04a_warfarin_solvate_mixed_solvents.csv", import.meta.url),
);

const absent = !existsSync(FILE);
if (absent) console.warn(`skipped: the solubilities of a solvate in mixed solvents are not on this machine (${FILE})`);

type Row = Readonly<Record<string, string>>;

/** The solvent of a row in words; the acetone of the ternary mixtures is taken as 9.5 % of the 2-propanol and acetone. */
function solventOf({ paper_table, mass_fraction }: Row): string {
  const w = Number(mass_fraction);
  const percent = (value: number) => Number((100 * value).toFixed(2));
  if (paper_table === "T4") return `2-propanol/acetone ${percent(1 - w)}:${percent(w)} w/w`;
  const rest = 1 - w;
  return `2-propanol/acetone/heptane ${percent(0.905 * rest)}:${percent(0.095 * rest)}:${percent(w)} w/w`;
}

const CARD = JSON.stringify({
  ...{ format: 1, source: "literature-2019", file: "literature-2019.csv", origin: "literature", method: "gravimetric" },
  doi: "10.1021/acs.jced.8b00977",
  columns: {
    solvent: { column: "Solvent" },
    temperature: { column: "T", unit: "K" },
    solubility: { column: "x", unit: "1000 x" },
  },
  // A mole fraction counts formula units of the unsolvated salt.
  constants: { solute: "warfarin sodium", solid_form: "2-propanol solvate", solute_basis: "anhydrous" },
});

describe.skipIf(absent)("a 2-propanol solvate in mixtures that hold 2-propanol", () => {
  let rows: readonly Row[];
  let edition: Edition;

  beforeAll(async () => {
    rows = parse(readFileSync(FILE, "utf8"), { columns: true }) as Row[];
    const lines = rows.map((row) => `${solventOf(row)},${row.T_K},${row.x_exp_1e3}`);
    edition = await editionOf({
      "sources/literature-2019.source.json": CARD,
      "sources/literature-2019.csv": `Solvent,T,x\n${lines.join("\n")}\n`,
    });
  });

  test("is read in full, and each of the eight compositions is a system of its own", () => {
    expect(edition.refused).toEqual([]);
    expect(edition.table.count).toBe(53);
    const [binary, ternary] = ["2-propanol + acetone", "2-propanol + acetone + heptane"];
    const found = edition.systems.map(({ identity, rows: own }) => [
      ...[identity.solidForm, identity.solvent, identity.composition, own.length],
    ]);
    // Mass fractions to 0.005; the guest of the solvate is a component already, and joins it.
    expect(found.sort((a, b) => `${a}`.length - `${b}`.length || (`${a}` < `${b}` ? -1 : 1))).toEqual([
      ["2-propanol solvate", binary, "85:15 w/w", 7],
      ["2-propanol solvate", binary, "89:11 w/w", 6],
      ["2-propanol solvate", binary, "95.5:4.5 w/w", 7],
      ["2-propanol solvate", ternary, "48:5:47 w/w", 6],
      ["2-propanol solvate", ternary, "74:8:18 w/w", 7],
      ["2-propanol solvate", ternary, "82.5:8.5:9 w/w", 7],
      ["2-propanol solvate", ternary, "56.5:6:37.5 w/w", 6],
      ["2-propanol solvate", ternary, "65.5:7:27.5 w/w", 7],
    ]);
  });

  test("keeps the published mole fractions as they are", () => {
    const { table } = edition;
    for (let row = 0; row < table.count; row++) {
      const published = Number(rows[(table.line[row] as number) - 2]?.x_exp_1e3) / 1000;
      expect(table.moleFraction[row]).toBeCloseTo(published, 12);
    }
  });

  test("gives curves that agree with the published fits, and lie no further from the measured values", () => {
    const { table } = edition;
    let worst = 0;
    let [ours, theirs] = [0, 0];
    for (const { index, rows: own } of edition.systems) {
      const curve = edition.fits[index]?.curves[0] as Curve;
      for (const row of own) {
        const x = Math.exp(curve.evaluate(table.temperatureK[row] as number));
        const published = Number(rows[(table.line[row] as number) - 2]?.x_calc_modified_apelblat_1e3) / 1000;
        const measured = table.moleFraction[row] as number;
        worst = Math.max(worst, Math.abs(x / published - 1));
        ours += Math.log(x / measured) ** 2;
        theirs += Math.log(published / measured) ** 2;
      }
    }
    const [own, published] = [ours, theirs].map((sum) => 100 * Math.sqrt(sum / table.count));
    console.info(
      `warfarin solvate: 53 published fitted values, worst difference ${(100 * worst).toFixed(1)} %; ` +
        `RMS of ln x from the measured values ${own?.toFixed(2)} % against ${published?.toFixed(2)} %`,
    );
    expect(worst).toBeLessThan(0.05);
    expect(ours).toBeLessThan(1.5 * theirs);
  });

  test("is refused row by row where nobody says what the solvate was weighed as", async () => {
    const { solute_basis: _, ...constants } = JSON.parse(CARD).constants;
    const open = await editionOf({
      "sources/literature-2019.source.json": JSON.stringify({ ...JSON.parse(CARD), constants }),
      "sources/literature-2019.csv": `Solvent,T,x\n${solventOf(rows[0] as Row)},280.3,1.36\n`,
    });
    expect(open.refused.map(({ code }) => code)).toEqual(["open-hydrate-basis"]);
  });
});
