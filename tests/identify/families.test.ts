import { describe, expect, test } from "vitest";
import { groupIntoSystems } from "../../pipeline/group/systems.ts";
import { resolveIdentity } from "../../pipeline/identify/identity.ts";
import { createIdentityRegister, register } from "../../pipeline/identify/source.ts";
import { createMeasurementTable } from "../../pipeline/records/measurements.ts";
import { programIndex as index } from "../properties/read-tables.ts";

type Cells = Readonly<Record<string, string>>;

/** Families with the forms of their systems and the number of rows of each, for rows in water unless told. */
function families(...rows: readonly Cells[]): Record<string, Record<string, number>> {
  const all = createIdentityRegister();
  const table = createMeasurementTable(rows.length);
  for (const cells of rows) {
    const found = resolveIdentity(
      (field) => ({ solvent: "water", ...cells })[field] ?? "",
      index,
      () => undefined,
    );
    if ("code" in found) throw new Error(`${found.code}: ${found.found}`);
    table.identity[table.count++] = register(all, found).index;
  }
  const result: Record<string, Record<string, number>> = {};
  for (const { family, identity, rows: members } of groupIntoSystems(table, all.identities)) {
    const name = family.replace(/-[0-9a-f]{8}$/, "");
    result[name] = { ...result[name], [identity.solidForm]: members.length };
  }
  return result;
}

const forms = (solute: string, ...cells: readonly string[]) =>
  families(...cells.map((solid_form) => ({ solute, solid_form })));

describe("The forms of one solute in one solvent are systems of one family", () => {
  test("one per named form, however it is written, and unspecified apart from all of them", () => {
    expect(forms("sulfamerazine", "Form I", "I", "polymorph I", "form II", "II", "form V", "", "unknown")).toEqual({
      "sulfamerazine-in-water": { "form I": 3, "form II": 2, "form V": 1, unspecified: 2 },
    });
    expect(forms("glycine", "α", "alpha form", "γ", "gamma", "β-form", "")).toEqual({
      "glycine-in-water": { alpha: 2, gamma: 2, beta: 1, unspecified: 1 },
    });
  });

  test("wet and dry apart: anhydrous, hydrate and not stated are three systems", () => {
    expect(forms("theophylline", "anhydrous", "anhydrate", "monohydrate", "·H2O", "")).toEqual({
      "theophylline-in-water": { anhydrous: 2, monohydrate: 2, unspecified: 1 },
    });
    expect(
      families(
        { solute: "theophylline monohydrate" },
        { solute: "theophylline", solid_form: "monohydrate" },
        { solute: "theophylline" },
      ),
    ).toEqual({ "theophylline-in-water": { monohydrate: 2, unspecified: 1 } });
  });

  test("amorphous and crystalline apart, solvates apart from hydrates", () => {
    expect(forms("caffeine", "amorphous", "Amorphous solid", "form II", "ethanol solvate", "hydrate")).toEqual({
      "caffeine-in-water": { amorphous: 2, "form II": 1, "ethanol solvate": 1, hydrate: 1 },
    });
  });

  test("an unlisted form keeps its name; two of them are never one", () => {
    expect(forms("HX-7", "form 1", "Form-1", "form I", "form A", "α", "a")).toEqual({
      "hx-7-in-water": { "form 1": 2, "form I": 1, "form A": 2, alpha: 1 },
    });
  });

  test("a listed form by the other kind of numeral is taken, and the row says so", () => {
    const found = resolveIdentity(
      (field) => ({ solute: "paracetamol", solvent: "water", solid_form: "form 2" })[field] ?? "",
      index,
      () => undefined,
    );
    expect("code" in found ? found.found : found.identity.solidForm).toBe("form II");
    expect("code" in found ? [] : found.assumptions).toEqual(['solid form "form 2" taken as the listed form II']);
    // Progesterone is listed with Arabic numerals.
    expect(forms("progesterone", "form 1", "1", "I")).toEqual({ "progesterone-in-water": { "form 1": 3 } });
  });
});

describe("Media, solvents and stereochemistry are families apart", () => {
  test("racemate and enantiomers, by name or by column", () => {
    const found = families(
      ...[{ solute: "ibuprofen" }, { solute: "rac-ibuprofen" }, { solute: "ibuprofen", stereo: "racemate" }],
      ...[{ solute: "(S)-ibuprofen" }, { solute: "(S)-ibuprofen", stereo: "S" }, { solute: "(R)-ibuprofen" }],
      ...[{ solute: "ibuprofen", stereo: "R" }],
    );
    expect(found).toEqual({
      "ibuprofen-in-water": { unspecified: 3 },
      "s-ibuprofen-in-water": { unspecified: 2 },
      "r-ibuprofen-in-water": { unspecified: 1 },
      "ibuprofen-in-water-r": { unspecified: 1 },
    });
  });

  test("acids, salts and bases, buffers and plain water", () => {
    const found = families(
      ...[
        { solute: "benzoic acid" },
        { solute: "sodium benzoate" },
        { solute: "benzoic acid", medium: "pH 6.8 buffer" },
      ],
      { solute: "benzoic acid", solvent: "ethanol" },
    );
    expect(Object.keys(found).sort()).toEqual([
      ...["benzoic-acid-in-ethanol", "benzoic-acid-in-water", "benzoic-acid-in-water-ph-6-8-buffer"],
      "sodium-benzoate-in-water",
    ]);
  });
});
