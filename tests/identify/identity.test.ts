import { describe, expect, test } from "vitest";
import { type ResolvedIdentity, resolveIdentity } from "../../pipeline/identify/identity.ts";
import { loadStructureReader } from "../../pipeline/properties/smiles-structure.ts";
import type { CellFault } from "../../pipeline/records/cells.ts";
import { smallIndex } from "./literal-tables.ts";

const index = smallIndex();
const readStructure = await loadStructureReader();

/** Outcome for the cells given; the solute is paracetamol and the solvent water unless told. */
function outcome(cells: Readonly<Record<string, string>>): ResolvedIdentity | CellFault {
  const all: Readonly<Record<string, string>> = { solute: "paracetamol", solvent: "water", ...cells };
  return resolveIdentity((field) => all[field] ?? "", index, readStructure);
}

function identified(cells: Readonly<Record<string, string>>): ResolvedIdentity {
  const found = outcome(cells);
  if ("code" in found) throw new Error(`refused: ${found.code}: ${found.found}`);
  return found;
}

function refused(cells: Readonly<Record<string, string>>): CellFault {
  const found = outcome(cells);
  if (!("code" in found)) throw new Error(`accepted as ${found.identity.solute}`);
  return found;
}

describe("a solute", () => {
  test.each([
    ["name", { solute: "paracetamol" }],
    ["synonym, whatever its case", { solute: "Acetaminophen" }],
    ["registry number in the solute's own column", { solute: "103-90-2" }],
    ["InChIKey in the solute's own column", { solute: "RZVAJINKPMORJF-UHFFFAOYSA-N" }],
    ["registry number beside a name that is not known", { solute: "lot 4711", cas: "103-90-2" }],
    ["structure beside a name that is not known", { solute: "lot 4711", smiles: "CC(=O)Nc1ccc(O)cc1" }],
  ])("of the tables is found by its %s", (_, cells) => {
    expect(identified(cells).identity).toMatchObject({ solute: "paracetamol", solidForm: "unspecified" });
  });

  test("that is in no table is keyed by its strongest identifier: InChIKey, registry number, SMILES, name", () => {
    const inchikey = "VLKZOEOYAKHREP-UHFFFAOYSA-N";
    const all = { solute: "lot 7", smiles: "CCCCCC", cas: "110-54-3", inchikey };
    expect(identified(all).identity.solute).toBe(inchikey);
    expect(identified({ ...all, inchikey: "" }).identity.solute).toBe("110-54-3");
    expect(identified({ ...all, inchikey: "", cas: "" }).identity.solute).toBe("CCCCCC");
    expect(identified({ solute: "lot 7" }).identity.solute).toBe("lot 7");
  });

  test("that is in no table has the molar mass of its formula, else of its structure, else as stated, else none", () => {
    const mass = (cells: Readonly<Record<string, string>>) =>
      identified({ solute: "lot 7", ...cells }).identity.soluteMolarMass;
    // 6 x 12.011 + 14 x 1.008 with the atomic weights of IUPAC 2021, abridged to five digits.
    expect(mass({ formula: "C6H14" })).toBeCloseTo(86.178, 3);
    expect(mass({ smiles: "CCCCCC" })).toBeCloseTo(86.178, 3);
    expect(mass({ molar_mass: "301.5" })).toBe(301.5);
    expect(mass({})).toBeNaN();
  });

  test("is refused where no cell says what it is", () => {
    expect(refused({ solute: "" })).toMatchObject({ field: "solute", code: "missing-solute" });
  });

  test("is refused where its name stands for two substances, and both are told", () => {
    const fault = refused({ solute: "acid A" });
    expect(fault).toMatchObject({ field: "solute", code: "unresolved-identity" });
    expect(fault.found).toContain("tartaric acid");
    expect(fault.found).toContain("malic acid");
  });

  test("is refused for a registry number whose check digit is wrong, not looked up by its name instead", () => {
    expect(refused({ cas: "103-90-3" })).toMatchObject({ field: "cas", code: "invalid-registry-number" });
  });

  test("is refused for a formula that cannot be read, where the formula is needed", () => {
    expect(refused({ solute: "lot 7", formula: "C6H(" })).toMatchObject({ field: "formula", code: "invalid-formula" });
  });

  test.each(["-5", "0", "NaN", "abc", "1e999", "0x10"])("is refused for the molar mass %j", (molar_mass) => {
    expect(refused({ solute: "lot 7", molar_mass })).toMatchObject({ field: "molar_mass", code: "not-a-number" });
  });

  test("is refused where its molar mass is not that of its formula, as when it is that of the hydrate", () => {
    // CuSO4 159.60, CuSO4·5H2O 249.68 g/mol (IUPAC 2021 atomic weights).
    const fault = refused({ solute: "copper sulfate", molar_mass: "249.68" });
    expect(fault).toMatchObject({ field: "molar_mass", code: "contradictory-molar-mass" });
    expect(fault.found).toContain("159.6");
    expect(identified({ solute: "copper sulfate", molar_mass: "159.6" }).identity.soluteMolarMass).toBeCloseTo(
      159.6,
      1,
    );
  });

  test("whose name and identifier stand for two substances follows the identifier, and both readings are kept", () => {
    const { identity, solute } = identified({ solute: "caffeine", inchikey: "RZVAJINKPMORJF-UHFFFAOYSA-N" });
    expect(identity.solute).toBe("paracetamol");
    expect(solute.remarks.map(({ code }) => code)).toEqual(["identifier-over-name"]);
    expect(solute.remarks[0]?.found).toContain("caffeine");
    expect(solute.remarks[0]?.found).toContain("paracetamol");
  });

  test("whose InChIKey differs in stereochemistry only stays a substance of its own, and the listed one is told", () => {
    const { identity, solute } = identified({ solute: "caffeine", inchikey: "RYYVLZVUVIJVGH-ABCDEFGHSA-N" });
    expect(identity.solute).toBe("RYYVLZVUVIJVGH-ABCDEFGHSA-N");
    expect(solute.remarks.map(({ code }) => code)).toEqual(["stereochemistry-differs"]);
    expect(solute.remarks[0]?.found).toContain("caffeine");
  });
});

describe("a solid form", () => {
  test("is unspecified where none is stated, in whatever words", () => {
    for (const solid_form of ["", "unspecified", "Unknown", "not stated", "n/a"]) {
      expect(identified({ solid_form }).identity.solidForm).toBe("unspecified");
    }
  });

  test("of the tables is found by its name, with or without the word form", () => {
    expect(identified({ solid_form: "form II" }).identity.solidForm).toBe("form II");
    expect(identified({ solid_form: "II" }).identity.solidForm).toBe("form II");
  });

  test("that is in no table is kept under its own name: two forms are never merged in silence", () => {
    expect(identified({ solid_form: "form  Z" }).identity.solidForm).toBe("form Z");
  });

  test("is read from the solute's name where that stands for a hydrate, and the solute is the unsolvated one", () => {
    for (const solute of ["blue vitriol", "CuSO4·5H2O", "copper(II) sulfate pentahydrate"]) {
      const { identity, form } = identified({ solute });
      expect(identity).toMatchObject({ solute: "copper(II) sulfate", solidForm: "pentahydrate" });
      expect(form.solvated).toBe(true);
      // M(CuSO4·5H2O)/M(CuSO4) = 249.677/159.602.
      expect(form.crystalMassFactor).toBeCloseTo(249.677 / 159.602, 4);
    }
  });

  test("is refused where name and form stand for different solids", () => {
    const fault = refused({ solute: "blue vitriol", solid_form: "monohydrate" });
    expect(fault).toMatchObject({ field: "solid_form", code: "contradictory-identity" });
  });

  test("of an unlisted hydrate has the ratio of masses that the water count in its name tells", () => {
    const { form } = identified({ solute: "paracetamol", solid_form: "trihydrate" });
    // 1 + 3 x 18.015/151.165.
    expect(form.crystalMassFactor).toBeCloseTo(1.35752, 4);
    expect(identified({ solid_form: "channel hydrate" }).form.crystalMassFactor).toBeNaN();
  });

  test("that says anhydrous is not solvated, though it has hydrate in its name", () => {
    expect(identified({ solid_form: "anhydrate" }).form).toMatchObject({ solvated: false, crystalMassFactor: 1 });
  });

  test("left open for a solute with a known hydrate names the assumption on the row", () => {
    expect(identified({ solute: "copper sulfate" }).form.assumptions.join()).toContain("unsolvated");
    expect(identified({ solute: "copper sulfate", solvent: "ethanol" }).form.assumptions).toEqual([]);
    expect(identified({}).form.assumptions).toEqual([]);
  });
});

describe("a solvent", () => {
  test.each(["water", "H2O", " WATER ", "7732-18-5"])("is found as %j", (solvent) => {
    expect(identified({ solvent: solvent.trim() }).identity.solvent).toBe("water");
  });

  test("with a near miss in its spelling is refused, and the near names are suggested, never assumed", () => {
    const fault = refused({ solvent: "ethanl" });
    expect(fault).toMatchObject({ field: "solvent", code: "unknown-solvent" });
    expect(fault.mend).toContain("ethanol");
  });

  test("that nothing is near to is refused without a suggestion", () => {
    expect(refused({ solvent: "squalane" })).toMatchObject({ code: "unknown-solvent" });
    expect(refused({ solvent: "squalane" }).mend).toBeUndefined();
  });

  test("is refused where the cell is empty", () => {
    expect(refused({ solvent: "" })).toMatchObject({ field: "solvent", code: "missing-solvent" });
  });

  test("that the tables list as a solute only is refused", () => {
    expect(refused({ solvent: "caffeine" })).toMatchObject({ field: "solvent", code: "unknown-solvent" });
  });

  test("that is the solute is refused, under whatever names the two go", () => {
    expect(refused({ solute: "57-13-6", solvent: "urea" })).toMatchObject({ code: "solvent-is-solute" });
  });

  test.each([
    ["ethanol/water 50:50", "open-composition"],
    ["95 % ethanol", "open-composition"],
    ["ethanol + water", "missing-composition"],
    ["methanol and water", "missing-composition"],
  ])(
    "written as the mixture %j without all that it needs is refused rather than read as its first part",
    (solvent, code) => {
      expect(refused({ solvent }).code).toBe(code);
    },
  );

  test("with a fraction of its own and no partner is refused", () => {
    expect(refused({ solvent: "ethanol", composition: "0.6" })).toMatchObject({ code: "missing-composition" });
  });

  test("with less than 0.25 wt % of water is the plain solvent; from there on it is a mixture", () => {
    const wet = (percent: string) => ({ solvent: "ethanol", solvent_water_wt_percent: percent });
    expect(identified(wet("0.249")).identity).toMatchObject({ solvent: "ethanol", composition: "" });
    expect(identified(wet("0.25")).identity).toMatchObject({ solvent: "ethanol + water", composition: "99.5:0.5 w/w" });
    expect(identified(wet("4.4")).identity).toMatchObject({ solvent: "ethanol + water", composition: "95.5:4.5 w/w" });
    expect(refused(wet("dry"))).toMatchObject({ field: "solvent_water_wt_percent" });
    expect(refused(wet("-1"))).toMatchObject({ field: "solvent_water_wt_percent" });
  });
});

describe("a medium", () => {
  test("keeps systems apart, stereochemistry with it; blanks are folded and case is kept", () => {
    expect(identified({ medium: "  0.1 M   HCl " }).identity.medium).toBe("0.1 M HCl");
    expect(identified({ medium: "buffer", stereo: "racemate" }).identity.medium).toBe("buffer; racemate");
    expect(identified({}).identity.medium).toBe("");
  });

  test("of water with a salt as the solute is marked, for its own thresholds", () => {
    expect(identified({ solute: "copper sulfate" }).identity.aqueousSalt).toBe(true);
    expect(identified({ solute: "copper sulfate", solvent: "ethanol" }).identity.aqueousSalt).toBe(false);
    expect(identified({}).identity.aqueousSalt).toBe(false);
  });
});
