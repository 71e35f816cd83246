import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { parse } from "csv-parse/sync";
import { expect, test } from "vitest";
import { pharmacopoeiaTerm } from "../../pipeline/bases/pharmacopoeia.ts";

// USP General Notices 5.30; European Pharmacopoeia 1.4: parts (mL) of solvent for one part (g) of solute.
test.each([
  ["very soluble", undefined, 1],
  ["freely soluble", 1, 10],
  ["Soluble", 10, 30],
  ["sparingly  soluble", 30, 100],
  ["Slightly soluble.", 100, 1000],
  ["very slightly soluble", 1000, 10000],
  ["practically insoluble", 10000, undefined],
  ["insoluble", 10000, undefined],
  ["Practically insoluble, or insoluble", 10000, undefined],
])("%s needs between %s and %s mL of solvent per g", (text, from, to) => {
  expect(pharmacopoeiaTerm(text)).toMatchObject({ from, to });
});

test.each(["miscible", "dissolves", "12.3", "", "not soluble"])("%s is no term", (text) => {
  expect(pharmacopoeiaTerm(text)).toBeUndefined();
});

const FILE = fileURLToPath(
  new URL("../../../shared/reference/solubility/05d_descriptive_solubility_terms.csv", import.meta.url),
);
const absent = !existsSync(FILE);
if (absent) console.warn(`skipped: the table of descriptive terms is not on this machine (${FILE})`);

test.skipIf(absent)("all seven classes of the pharmacopoeias are read with their parts of solvent", () => {
  const rows = parse(readFileSync(FILE, "utf8"), { columns: true }) as Record<string, string>[];
  expect(rows).toHaveLength(7);
  const parts = (text = "") => (text === "" ? undefined : Number(text));
  for (const row of rows) {
    const { from, to } = pharmacopoeiaTerm(row.term ?? "") ?? {};
    expect([row.term, from, to]).toEqual([
      row.term,
      parts(row.parts_solvent_per_part_solute_from),
      parts(row.parts_to),
    ]);
    // g per L of solvent is 1000 divided by mL per g.
    if (from !== undefined) expect(1000 / from).toBeCloseTo(Number(row.approx_g_per_L_upper_derived), 3);
    if (to !== undefined) expect(1000 / to).toBeCloseTo(Number(row.approx_g_per_L_lower_derived), 3);
  }
});
