import { expect, test } from "vitest";
import { groupIntoSystems } from "../../pipeline/group/systems.ts";
import { resolveIdentity } from "../../pipeline/identify/identity.ts";
import { createIdentityRegister, register } from "../../pipeline/identify/source.ts";
import { indexSubstances } from "../../pipeline/identify/substance-tables.ts";
import { usedSubstances } from "../../pipeline/identify/used-substances.ts";
import { createMeasurementTable } from "../../pipeline/records/measurements.ts";
import { smallIndex, tables } from "./literal-tables.ts";

/** The substances listed for rows with these cells, one measurement each. */
function listed(...rows: readonly Readonly<Record<string, string>>[]) {
  const index = smallIndex();
  const all = createIdentityRegister();
  const table = createMeasurementTable(rows.length);
  for (const cells of rows) {
    const found = resolveIdentity(
      (field) => cells[field] ?? "",
      index,
      () => undefined,
    );
    if ("code" in found) throw new Error(found.found);
    table.identity[table.count++] = register(all, found).index;
  }
  return usedSubstances(groupIntoSystems(table, all.identities), all);
}

test("every solute and solvent of a system is listed once, by key in code-unit order, with its role", () => {
  const found = listed(
    { solute: "urea", solvent: "water" },
    { solute: "paracetamol", solvent: "urea" },
    { solute: "acetaminophen", solvent: "water" },
    { solute: "Zx-1", solvent: "ethanol" },
  );
  expect(found.map(({ key, role }) => [key, role])).toEqual([
    ["ethanol", "solvent"],
    ["paracetamol", "solute"],
    ["urea", "solute;solvent"],
    ["water", "solvent"],
    ["zx-1", "solute"],
  ]);
});

test("a solute that is in no table keeps the identifiers its rows gave", () => {
  const [solute] = listed({ solute: "Zx-1", cas: "110-54-3", formula: "C6H14", solvent: "water" });
  expect(solute).toMatchObject({ key: "110-54-3", name: "", cas: "110-54-3", formula: "C6H14" });
  expect(solute?.molarMass).toBeCloseTo(86.178, 3);
});

test("a molar mass that only a later row states serves the earlier rows of its system too", () => {
  const [, solute] = listed(
    { solute: "Zx-1", solvent: "water" },
    { solute: "ZX-1", molar_mass: "150", solvent: "water" },
  );
  expect(solute).toMatchObject({ key: "zx-1", molarMass: 150 });
});

test("a group's own substance is laid over the program's, and what contradicts itself in it is a notice with its place", () => {
  const own = tables([{ name: "HBR-14", role: "solute", formula: "C17H16N2O4", molar_mass: "999" }]);
  const { index, notices } = indexSubstances(tables([{ name: "water", role: "solvent", formula: "H2O" }]), own);
  // C17H16N2O4 is 312.3 g/mol: which of the two is meant is open, so neither is used.
  expect(index.byName("hbr-14")).toMatchObject({ name: "HBR-14", molarMass: undefined });
  expect(notices).toMatchObject([{ code: "substance-left-out", place: { file: "substances.csv", line: 2 } }]);
});
