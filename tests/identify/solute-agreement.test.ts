import { describe, expect, test } from "vitest";
import { type KnownSolute, resolveSolute } from "../../pipeline/identify/solute.ts";
import { loadStructureReader } from "../../pipeline/properties/smiles-structure.ts";
import type { CellFault } from "../../pipeline/records/cells.ts";
import { programIndex as index } from "../properties/read-tables.ts";

const read = await loadStructureReader();
const without = await loadStructureReader(() => Promise.reject(new Error("not installed")));

type Cells = Partial<Record<"solute" | "cas" | "inchikey" | "smiles" | "formula" | "molarMass", string>>;

function outcome(cells: Cells, reader = read): KnownSolute | CellFault {
  const empty = { solute: "", cas: "", inchikey: "", smiles: "", formula: "", molarMass: "" };
  return resolveSolute({ ...empty, ...cells, decimal: "." }, index, reader);
}

function known(cells: Cells, reader = read): KnownSolute {
  const found = outcome(cells, reader);
  if ("code" in found) throw new Error(`refused: ${found.code}: ${found.found}`);
  return found;
}

function refused(cells: Cells): CellFault {
  const found = outcome(cells);
  if (!("code" in found)) throw new Error(`accepted as ${found.key}`);
  return found;
}

const codes = (cells: Cells): string[] => known(cells).remarks.map(({ code }) => code);

// Registry numbers, keys and structures are the public ones of paracetamol, caffeine, ibuprofen and its enantiomers,
// alanine, glycine, tartaric acid, copper(II) sulfate.
const PARACETAMOL = { cas: "103-90-2", inchikey: "RZVAJINKPMORJF-UHFFFAOYSA-N", smiles: "Oc1ccc(NC(C)=O)cc1" };
const CAFFEINE = { cas: "58-08-2", inchikey: "RYYVLZVUVIJVGH-UHFFFAOYSA-N", smiles: "CN1C=NC2=C1C(=O)N(C)C(=O)N2C" };
const RACEMIC_IBUPROFEN = { inchikey: "HEFNNWSXXWATRW-UHFFFAOYSA-N", smiles: "CC(C)Cc1ccc(cc1)C(C)C(O)=O" };
const S_IBUPROFEN = { inchikey: "HEFNNWSXXWATRW-JTQLQIEISA-N", smiles: "OC(=O)[C@@H](C)c1ccc(CC(C)C)cc1" };
const R_IBUPROFEN = { inchikey: "HEFNNWSXXWATRW-SNVBAGLBSA-N", smiles: "OC(=O)[C@H](C)c1ccc(CC(C)C)cc1" };

describe("One substance by any of its names and identifiers", () => {
  test.each<[string, Cells]>([
    ["name", { solute: "paracetamol" }],
    ["synonym", { solute: "Acetaminophen" }],
    ["registry number", { cas: PARACETAMOL.cas }],
    ["registry number with a prefix and other dashes", { cas: "CAS 103–90–2" }],
    ["InChIKey", { inchikey: PARACETAMOL.inchikey }],
    ["InChIKey with its prefix", { inchikey: `InChIKey=${PARACETAMOL.inchikey}` }],
    ["SMILES as listed", { smiles: "CC(=O)Nc1ccc(O)cc1" }],
    ["SMILES written otherwise", { smiles: PARACETAMOL.smiles }],
    ["SMILES with the ring opened elsewhere", { smiles: "c1c(O)ccc(c1)NC(=O)C" }],
    ["all of them", { solute: "APAP", ...PARACETAMOL, formula: "C8H9NO2", molarMass: "151.16" }],
  ])("%s", (_, cells) => {
    expect(known(cells)).toMatchObject({ key: "paracetamol", remarks: [] });
  });

  test("unknown: by one spelling of its strongest identifier, however the row spells it", () => {
    expect(known({ cas: "CAS 75–65–0" }).key).toBe(known({ cas: "75-65-0", solute: "Lot 7" }).key);
    expect(known({ inchikey: `InChIKey=${R_IBUPROFEN.inchikey}` }).key).toBe(R_IBUPROFEN.inchikey);
    expect(known({ smiles: "OCCCCCCCCCN" }).key).toBe(known({ smiles: "NCCCCCCCCCO" }).key);
    expect(known({ solute: "HX‑7 Mesylate" }).key).toBe(known({ solute: "hx-7  MESYLATE" }).key);
    expect(known({ solute: R_IBUPROFEN.inchikey }).key).toBe(R_IBUPROFEN.inchikey);
  });

  test("every name, synonym, number, key and structure of the tables leads to its substance and to no other", () => {
    let names = 0;
    for (const [at, substance] of index.substances.entries()) {
      const expected = index.unsolvated(substance).substance.name;
      const { name, cas, inchikey, smiles } = substance;
      expect(known({ solute: name }).key, name).toBe(expected);
      for (const synonym of substance.synonyms) {
        const found = outcome({ solute: synonym });
        names++;
        if (!("code" in found)) expect(found.key, synonym).toBe(expected);
        else expect(index.namesakes(synonym).length, synonym).toBeGreaterThan(1);
      }
      if (cas !== undefined) expect(known({ cas }).key, cas).toBe(expected);
      if (inchikey !== undefined) expect(known({ inchikey }).key, inchikey).toBe(expected);
      // Structures take their time: one in six.
      if (smiles !== undefined && at % 6 === 0) expect(known({ smiles }).key, smiles).toBe(expected);
    }
    expect([index.substances.length, names]).toEqual([559, 532]);
  });
});

describe("A contradiction within a row is told with both readings", () => {
  test("a name that stands for another substance: the identifier decides, and it is remarked", () => {
    for (const identifier of [{ cas: CAFFEINE.cas }, { inchikey: CAFFEINE.inchikey }, { smiles: CAFFEINE.smiles }]) {
      const { key, remarks } = known({ solute: "paracetamol", ...identifier });
      expect(key).toBe("caffeine");
      expect(remarks.map(({ code }) => code)).toEqual(["identifier-over-name"]);
      expect(remarks[0]?.found).toMatch(/"paracetamol".*paracetamol.*caffeine/);
    }
  });

  test.each<[string, Cells]>([
    ["registry number and InChIKey", { cas: PARACETAMOL.cas, inchikey: CAFFEINE.inchikey }],
    ["registry number and SMILES", { cas: PARACETAMOL.cas, smiles: CAFFEINE.smiles }],
    ["InChIKey and SMILES", { inchikey: PARACETAMOL.inchikey, smiles: CAFFEINE.smiles }],
    ["solute's own cell and registry number", { solute: CAFFEINE.cas, cas: PARACETAMOL.cas }],
  ])("two identifiers that stand for two substances refuse the row: %s", (_, cells) => {
    const { code, found } = refused({ ...cells });
    expect(code).toBe("contradictory-identity");
    expect(found).toContain("paracetamol");
    expect(found).toContain("caffeine");
  });

  test("an identifier that is in no table contradicts a listed one of the same kind", () => {
    // Hexane-1,6-diol by key and structure beside the number of paracetamol.
    expect(refused({ cas: PARACETAMOL.cas, smiles: "OCCCCCCO" }).code).toBe("contradictory-identity");
    expect(refused({ cas: PARACETAMOL.cas, inchikey: "XXMIOPMDWAUFGU-UHFFFAOYSA-N" }).code).toBe(
      "contradictory-identity",
    );
    expect(known({ solute: "paracetamol", inchikey: "XXMIOPMDWAUFGU-UHFFFAOYSA-N" })).toMatchObject({
      key: "XXMIOPMDWAUFGU-UHFFFAOYSA-N",
      remarks: [{ code: "identifier-over-name" }],
    });
  });

  test("an identifier the tables cannot compare does not split the substance, and that is told", () => {
    expect(index.byName("L-valine")?.inchikey).toBeUndefined();
    expect(known({ solute: "L-valine", inchikey: "KZSNJWFQEVHDMF-BYPYZUCNSA-N" })).toMatchObject({
      key: "L-valine",
      remarks: [{ code: "identifier-not-checked" }],
    });
  });

  test("a structure of another tautomer is the substance its name or number says, and that is told", () => {
    // Theophylline with its mobile proton on the other nitrogen.
    const smiles = "CN1C(=O)N(C)c2[nH]cnc2C1=O";
    const listed = index.byName("theophylline");
    for (const cells of [{ solute: "theophylline" }, { cas: listed?.cas ?? "" }]) {
      expect(known({ ...cells, smiles: "Cn1c(=O)c2[nH]cnc2n(C)c1=O" })).toMatchObject({
        key: "theophylline",
        remarks: [],
      });
      const { key, remarks } = known({ ...cells, smiles });
      expect([key, remarks.map(({ code }) => code)]).toEqual(["theophylline", ["identifier-not-checked"]]);
      expect(remarks[0]?.found).toContain("tautomer");
    }
    // Theobromine is an isomer, no tautomer.
    expect(known({ solute: "theophylline", smiles: "Cn1cnc2c1c(=O)[nH]c(=O)n2C" }).key).not.toBe("theophylline");
  });

  test.each<[string, Cells, string]>([
    // Lidocaine C14H22N2O, its hydrochloride C14H23ClN2O.
    ["of the salt", { solute: "lidocaine", formula: "C14H23ClN2O" }, "contradictory-molar-mass"],
    ["of another substance beside a structure", { smiles: "OCCCCCCO", formula: "C6H12O" }, "contradictory-molar-mass"],
    ["of another hydrate", { solute: "blue vitriol", formula: "CuSO4·3H2O" }, "contradictory-identity"],
  ])("a formula %s refuses the row", (_, cells, code) => {
    expect(refused(cells).code).toBe(code);
  });

  test("a formula with the crystal water of a listed hydrate stands for that form", () => {
    expect(known({ solute: "copper(II) sulfate", formula: "CuSO4·5H2O" }).namedForm?.form).toBe("pentahydrate");
  });

  test("a formula that cannot be read is told where nothing depends on it", () => {
    expect(codes({ solute: "paracetamol", formula: "C8H9N02?" })).toEqual(["identifier-not-checked"]);
  });

  test("a name of a hydrate beside the number of the unsolvated salt is the hydrate, and it is told", () => {
    // 7758-98-7 is the anhydrous salt, 7758-99-8 the pentahydrate.
    const found = known({ solute: "copper(II) sulfate pentahydrate", cas: "7758-98-7" });
    expect(found.namedForm?.form).toBe("pentahydrate");
    expect(found.remarks[0]?.found).toContain("taken as the pentahydrate");
    expect(known({ solute: "copper(II) sulfate", cas: "7758-99-8" }).namedForm?.form).toBe("pentahydrate");
    expect(refused({ solute: "copper(II) sulfate trihydrate", cas: "7758-99-8" }).code).toBe("contradictory-identity");
  });
});

describe("A racemate and an enantiomer are never one", () => {
  test("by name, key or structure", () => {
    for (const cells of [{ solute: "ibuprofen" }, { solute: "rac-ibuprofen" }, { solute: "(±)-Ibuprofen" }]) {
      expect(known(cells).key).toBe("ibuprofen");
    }
    expect(known({ inchikey: RACEMIC_IBUPROFEN.inchikey }).key).toBe("ibuprofen");
    expect(known({ smiles: RACEMIC_IBUPROFEN.smiles }).key).toBe("ibuprofen");
    expect(known({ solute: "(S)‑ibuprofen" }).key).toBe("(S)-ibuprofen");
    expect(known(S_IBUPROFEN)).toMatchObject({ key: "(S)-ibuprofen", remarks: [] });
    expect(known({ inchikey: R_IBUPROFEN.inchikey }).key).toBe(R_IBUPROFEN.inchikey);
    expect(["ibuprofen", "(S)-ibuprofen"]).not.toContain(known({ smiles: R_IBUPROFEN.smiles }).key);
    expect(known({ solute: "(R)-ibuprofen" }).key).toBe("(R)-ibuprofen");
    const isomers = ["L-tartaric acid", "DL-tartaric acid", "D-tartaric acid", "rac-tartaric acid"];
    expect(isomers.map((solute) => known({ solute }).key)).toEqual([
      ...["L-tartaric acid", "DL-tartaric acid", "D-tartaric acid", "DL-tartaric acid"],
    ]);
  });

  test("where name and identifier differ in stereochemistry only, the row is refused", () => {
    for (const [solute, identifier] of [
      ["(S)-ibuprofen", RACEMIC_IBUPROFEN],
      ["rac-ibuprofen", S_IBUPROFEN],
    ] as const) {
      for (const cells of [{ inchikey: identifier.inchikey }, { smiles: identifier.smiles }]) {
        expect(refused({ solute, ...cells })).toMatchObject({ code: "contradictory-identity" });
      }
    }
    expect(refused({ inchikey: S_IBUPROFEN.inchikey, smiles: R_IBUPROFEN.smiles }).code).toBe("contradictory-identity");
  });

  test("where the identifier is in no table, the solute stays apart and the listed isomer is told", () => {
    for (const cells of [{ inchikey: R_IBUPROFEN.inchikey }, { smiles: R_IBUPROFEN.smiles }]) {
      const { key, remarks } = known({ solute: "ibuprofen", ...cells });
      expect(["ibuprofen", "(S)-ibuprofen"]).not.toContain(key);
      expect(remarks.map(({ code }) => code)).toEqual(["stereochemistry-differs"]);
    }
  });

  test("a structure without stereochemistry beside the number of a stereoisomer says less and is told", () => {
    // L-alanine, 56-41-7.
    expect(known({ cas: "56-41-7", smiles: "CC(N)C(O)=O" })).toMatchObject({
      key: "L-alanine",
      remarks: [{ code: "stereochemistry-differs" }],
    });
  });

  test("a small d- or l- is refused where rotation and configuration lead to two substances, else told", () => {
    // L-tartaric acid turns to the right: d-tartaric acid by the old rule.
    expect(refused({ solute: "d-tartaric acid" }).found).toContain("L-tartaric acid");
    expect(codes({ solute: "l-alanine" })).toEqual(["configuration-or-rotation"]);
    expect(codes({ solute: "L-alanine" })).toEqual([]);
    expect(known({ solute: "D-foo" }).key).not.toBe(known({ solute: "d-foo" }).key);
  });
});

describe("Broken identifiers are refused, with what they may have been", () => {
  test.each<[string, Cells, string, string]>([
    ["a date in the cas column", { cas: "03/02/7758" }, "cas", "7758-02-3 (potassium bromide)"],
    ["a date in the solute column", { solute: "2/3/7758" }, "solute", "7758-02-3 (potassium bromide)"],
    ["a digit wrong", { solute: "paracetamol", cas: "103-90-3" }, "cas", "103-90-2 (paracetamol)"],
    ["digits exchanged, in the solute column", { solute: "58-80-2" }, "solute", "58-08-2 (caffeine)"],
    ["hyphens lost", { solute: "ethanol", cas: "64175" }, "cas", "64-17-5 (ethanol)"],
  ])("%s", (_, cells, field, likely) => {
    const fault = refused(cells);
    expect(fault).toMatchObject({ field, code: "invalid-registry-number" });
    expect(fault.mend).toContain(likely);
  });

  test("an InChIKey that is not well formed; one in small letters is shown in capitals", () => {
    const fault = refused({ solute: "paracetamol", inchikey: PARACETAMOL.inchikey.toLowerCase() });
    expect(fault).toMatchObject({ field: "inchikey", code: "invalid-inchikey" });
    expect(fault.mend).toContain(PARACETAMOL.inchikey);
    expect(refused({ inchikey: "InChI=1S/H2O/h1H2" }).code).toBe("invalid-inchikey");
  });

  test("a name of invisible characters is no name", () => {
    expect(refused({ solute: "\u200b\u00ad" }).code).toBe("missing-solute");
  });

  test("a lot that looks like a date without an original, or like a plain number, stays a name", () => {
    for (const solute of ["2024-03-14", "18296", "36526", "2024", "cas inhibitor 7"]) {
      expect(known({ solute }).key).toBe(solute);
    }
  });

  test("a SMILES that cannot be read is told, and compared letter by letter", () => {
    expect(known({ smiles: "C1CC(" })).toMatchObject({ key: "C1CC(", remarks: [{ code: "identifier-not-checked" }] });
  });
});

test("letters of another script in a name are told, and the name is found", () => {
  expect(known({ solute: "cаffeine" })).toMatchObject({
    key: "caffeine",
    remarks: [{ code: "look-alike-letters" }],
  });
});

describe("Without the structure library", () => {
  test("a SMILES is found as listed only, and that is told", () => {
    expect(known({ smiles: "CC(=O)Nc1ccc(O)cc1" }, without).key).toBe("paracetamol");
    const { key, remarks } = known({ smiles: PARACETAMOL.smiles }, without);
    expect(key).toBe(PARACETAMOL.smiles);
    expect(remarks[0]?.found).toContain("structure library is not installed");
  });

  test("a SMILES beside a name or number splits no substance", () => {
    expect(known({ solute: "paracetamol", smiles: PARACETAMOL.smiles }, without).key).toBe("paracetamol");
    expect(known({ cas: PARACETAMOL.cas, smiles: PARACETAMOL.smiles }, without).key).toBe("paracetamol");
  });
});

test("salts, free bases and acids are substances of their own", () => {
  const keys = ["benzoic acid", "sodium benzoate", "oxalic acid", "ammonium oxalate"].map(
    (solute) => known({ solute }).key,
  );
  expect(new Set(keys).size).toBe(keys.length);
});
