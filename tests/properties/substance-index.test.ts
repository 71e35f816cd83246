import { describe, expect, test } from "vitest";
import { liquidDensity } from "../../pipeline/properties/liquid-density.ts";
import { substanceIndex } from "../../pipeline/properties/substance-index.ts";
import type { PropertyTables, TableRow } from "../../pipeline/properties/table-cells.ts";
import { programIndex, programTables, substance } from "./read-tables.ts";

const own = (substances: TableRow[], solidForms: TableRow[] = [], propertyValues: TableRow[] = []): PropertyTables => ({
  origin: "own",
  substances,
  solidForms,
  propertyValues,
});

describe("Names are found however they are spelled", () => {
  test.each([
    ["Ethanol", "ethanol"],
    ["ETHYL ALCOHOL", "ethanol"],
    ["2‑Propanol", "2-propanol"],
    [" Ethyl  acetate ", "ethyl acetate"],
    ["N,N–Dimethylformamide", "N,N-dimethylformamide"],
    ["MEK", "2-butanone"],
    ["KNO3", "potassium nitrate"],
    ["KNO₃", "potassium nitrate"],
    ["kno3", "potassium nitrate"],
    ["NaC2H3O2", "sodium acetate"],
    ["salol", "phenyl salicylate"],
    ["β-Sitosterol", "beta-sitosterol"],
    ["APAP", "paracetamol"],
  ])("%s is %s", (text, name) => {
    expect(programIndex.byName(text)?.name).toBe(name);
  });

  test("a formula is not found by another that differs in case", () => {
    expect(programIndex.byName("CoCl2")?.name).toBe("cobalt(II) chloride");
    expect(programIndex.byName("COCl2")).toBeUndefined();
  });

  test.each(["ethanl", "2-butanal", "", "unobtainium"])("%s is not guessed at", (text) => {
    expect(programIndex.byName(text)).toBeUndefined();
    expect(programIndex.resolve(text)).toBeUndefined();
  });

  test("close spellings are offered for a message, nearest first", () => {
    expect(programIndex.nearNames("parcetamol")[0]).toBe("paracetamol");
    expect(programIndex.nearNames("acetonitril")[0]).toBe("acetonitrile");
    expect(programIndex.nearNames("2 propanol")[0]).toBe("2-propanol");
    expect(programIndex.nearNames("unobtainium")).toEqual([]);
    expect(programIndex.nearNames("x".repeat(1_000_000))).toEqual([]);
  });
});

describe("Identifiers are found exactly", () => {
  test("by registry number, InChIKey and SMILES", () => {
    // Paracetamol: registry number and keys of the CAS and PubChem entries.
    expect(programIndex.byCas("103-90-2")?.name).toBe("paracetamol");
    expect(programIndex.byCas("CAS 103–90–2")?.name).toBe("paracetamol");
    expect(programIndex.byCas("103-90-3")).toBeUndefined();
    expect(programIndex.byInchikey("RZVAJINKPMORJF-UHFFFAOYSA-N")?.name).toBe("paracetamol");
    expect(programIndex.bySmiles("CC(=O)Nc1ccc(O)cc1")?.name).toBe("paracetamol");
    expect(programIndex.bySmiles("c1ccc(O)cc1NC(C)=O")).toBeUndefined();
  });
});

describe("Forms are resolved to their unsolvated substance", () => {
  test.each([
    ["CuSO4·5H2O", "copper(II) sulfate", "pentahydrate", 249.677],
    ["CuSO4.5H2O", "copper(II) sulfate", "pentahydrate", 249.677],
    ["blue vitriol", "copper(II) sulfate", "pentahydrate", 249.677],
    ["copper(II) sulfate trihydrate", "copper(II) sulfate", "trihydrate", 213.647],
    ["CaSO4.0.5H2O", "calcium sulfate", "hemihydrate", 145.1415],
    ["gypsum", "calcium sulfate", "dihydrate", 172.164],
    ["3CdSO4·8H2O", "cadmium sulfate", "8/3-hydrate", 256.51],
    ["KAl(SO4)2·12H2O", "potassium aluminium sulfate", "dodecahydrate", 474.3718],
    ["paracetamol form II", "paracetamol", "form II", 151.165],
    ["α-lactose monohydrate", "lactose", "monohydrate", 360.312],
    ["caffeine monohydrate", "caffeine", "hydrate", 208.606],
    ["Theophylline (monohydrate)", "theophylline", "monohydrate", 198.182],
    ["sulfamerazine, form II", "sulfamerazine", "form II", 264.303],
    ["Sulfamerazine (II)", "sulfamerazine", "form II", 264.303],
    ["anhydrous theophylline", "theophylline", "anhydrous", 180.167],
    ["γ-Glycine", "glycine", "gamma", 75.067],
    ["alpha-glycine", "glycine", "alpha", 75.067],
  ])("%s is %s, %s", (text, name, form, molarMass) => {
    const resolved = programIndex.resolve(text);
    expect(resolved?.substance.name).toBe(name);
    expect(resolved?.form?.form).toBe(form);
    expect(resolved?.form?.molarMass).toBeCloseTo(molarMass, 3);
  });

  test("a hydrate found by its registry number leads to its unsolvated substance", () => {
    // 7758-99-8 is copper(II) sulfate pentahydrate, 7758-98-7 the anhydrous salt.
    const pentahydrate = programIndex.byCas("7758-99-8");
    const resolved = pentahydrate === undefined ? undefined : programIndex.unsolvated(pentahydrate);
    expect(resolved?.substance.cas).toBe("7758-98-7");
    expect(resolved?.form?.guestPerSolute).toBe(5);
  });

  test("a hydrate that is not listed is not made up", () => {
    expect(programIndex.resolve("NaCl·7H2O")).toBeUndefined();
  });

  test.each(["beta-alanine", "paracetamol (form IX)", "paracetamol, see note", "anhydrous paracetamol"])(
    "%s names no listed form and is not made one",
    (text) => {
      expect(programIndex.resolve(text)).toBeUndefined();
    },
  );

  test.each(["Form I", "i", "polymorph I", "modification I", "FORM-I", "Form (I)"])(
    "%s is one listed form, however it is written",
    (text) => {
      expect(programIndex.formOf(substance("paracetamol"), text)?.form).toBe("form I");
    },
  );

  test.each(["rac-ibuprofen", "(±)-ibuprofen", "(+/-)-Ibuprofen", "DL-ibuprofen", "(RS)-ibuprofen"])(
    "%s is the racemate that is listed under another prefix",
    (text) => {
      expect(programIndex.resolve(text)?.substance.name).toBe("ibuprofen");
    },
  );

  test("a form is found by its short name", () => {
    expect(programIndex.formOf(substance("paracetamol"), "II")?.form).toBe("form II");
    expect(programIndex.formOf(substance("paracetamol"), "Form-II")?.form).toBe("form II");
    expect(programIndex.formOf(substance("paracetamol"), "form IX")).toBeUndefined();
  });
});

describe("Salts are told from other substances", () => {
  test.each([
    ["sodium chloride", "inorganic"],
    ["ammonium nitrate", "inorganic"],
    ["sodium carbonate decahydrate", "inorganic"],
    ["sodium hydrogen carbonate", "inorganic"],
    ["ammonium oxalate", "inorganic"],
    ["sodium benzoate", "organic"],
    ["sodium acetate", "organic"],
    ["metformin hydrochloride", "organic"],
  ])("%s is an %s salt", (name, kind) => {
    expect(substance(name).salt).toBe(kind);
    expect(substance(name).electrolyte).toBe(true);
  });

  test.each(["sucrose", "citric acid", "glycine", "urea", "boric acid", "lidocaine", "paracetamol"])(
    "%s is no salt",
    (name) => {
      expect(substance(name).electrolyte).toBe(false);
    },
  );
});

describe("A group's own tables lie over the program's", () => {
  test("cells that are filled replace, the others stay, names are added", () => {
    const index = substanceIndex([
      programTables,
      own([{ name: "Paracetamol", synonyms: "HX-1", density_kg_per_m3: "1290", reference: "our pycnometer" }]),
    ]);
    const found = index.byName("HX-1");
    expect(index.faults).toEqual([]);
    expect(found?.name).toBe("paracetamol");
    expect(found?.solidDensity).toBe(1290);
    expect(found?.cas).toBe("103-90-2");
    expect(index.substances.length).toBe(programIndex.substances.length);
  });

  test("a substance of their own is added with its forms", () => {
    const index = substanceIndex([
      programTables,
      own(
        [{ name: "HBR-9", role: "solute", formula: "C17H16N2O4", molar_mass: "312.3" }],
        [{ solute: "HBR-9", form: "ethanol solvate", kind: "solvate", guest: "EtOH", guest_per_solute: "1" }],
      ),
    ]);
    expect(index.faults).toEqual([]);
    // C17H16N2O4 312.325 g/mol and ethanol 46.069 g/mol by IUPAC 2021.
    expect(index.byName("HBR-9")?.solidForms[0]?.molarMass).toBeCloseTo(358.394, 3);
    expect(index.resolve("HBR-9 ethanol solvate")?.form?.kind).toBe("solvate");
  });

  test("their density of a solvent replaces the correlations", () => {
    const index = substanceIndex([programTables, own([{ name: "toluene", density_kg_per_m3: "870" }])]);
    const toluene = index.byName("toluene");
    expect(toluene === undefined ? undefined : liquidDensity(toluene, 293.15)?.value).toBe(870);
  });

  test("their name wins over a synonym of the program's, and the clash is told", () => {
    const index = substanceIndex([programTables, own([{ name: "DME", cas: "115-10-6", formula: "C2H6O" }])]);
    expect(index.byName("DME")?.cas).toBe("115-10-6");
    expect(index.byName("1,2-dimethoxyethane")?.cas).toBe("110-71-4");
    expect(index.faults.map(({ kind }) => kind)).toEqual(["duplicate name"]);
  });
});

describe("Contradictions are told and the value is left out", () => {
  const faultsOf = (row: TableRow) => {
    const index = substanceIndex([own([row])]);
    return { faults: index.faults.map(({ kind, column, row: at }) => ({ kind, column, row: at })), index };
  };

  test("a molar mass that is not that of the formula", () => {
    // Potash alum with one water instead of twelve, as some identifier tables have it.
    const { faults, index } = faultsOf({ name: "alum", formula: "KAl(SO4)2·12H2O", molar_mass: "182.17" });
    expect(faults).toEqual([{ kind: "molar mass contradicts formula", column: "molar_mass", row: 0 }]);
    expect(index.byName("alum")?.molarMass).toBeUndefined();
  });

  test("a registry number with a wrong check digit or turned into a date", () => {
    expect(faultsOf({ name: "a", cas: "7732-18-4" }).faults).toEqual([
      { kind: "registry number", column: "cas", row: 0 },
    ]);
    const { faults, index } = faultsOf({ name: "b", cas: "03/02/7758" });
    expect(faults).toHaveLength(1);
    expect(index.byName("b")?.cas).toBeUndefined();
    expect(index.faults[0]?.message).toContain("7758-02-3");
  });

  test.each([
    [{ name: "a", formula: "Xy2" }, "formula"],
    [{ name: "a", molar_mass: "12,3" }, "not a number"],
    [{ name: "a", melting_point_K: "-5" }, "not allowed"],
    [{ name: "a", role: "cosolvent" }, "not allowed"],
    [{ name: "a", inchikey: "abc" }, "inchikey"],
    [{ name: "" }, "no name"],
  ])("%o", (row, kind) => {
    expect(faultsOf(row).faults.map((fault) => fault.kind)).toEqual([kind]);
  });

  test("one name for two substances finds neither", () => {
    const index = substanceIndex([
      own([
        { name: "a", synonyms: "PX" },
        { name: "b", synonyms: "PX" },
      ]),
    ]);
    expect(index.byName("PX")).toBeUndefined();
    expect(index.namesakes("PX").map(({ name }) => name)).toEqual(["a", "b"]);
    expect(index.faults.map(({ kind }) => kind)).toEqual(["duplicate name"]);
  });

  test("a form of an unknown substance, of an unknown kind, or with a wrong molar mass", () => {
    const forms = [
      { solute: "nothing", form: "I", kind: "polymorph" },
      { solute: "a", form: "I", kind: "form" },
      { solute: "a", form: "hydrate", kind: "hydrate", guest: "w", guest_per_solute: "2", molar_mass: "118.0" },
    ];
    const substances = [
      { name: "a", formula: "C4H6O4" },
      { name: "w", formula: "H2O" },
    ];
    const index = substanceIndex([own(substances, forms)]);
    expect(index.faults.map(({ kind }) => kind)).toEqual([
      "unknown substance",
      "not allowed",
      "molar mass contradicts formula",
    ]);
    expect(index.byName("a")?.solidForms.map(({ molarMass }) => molarMass)).toEqual([undefined]);
  });

  test("a correlation that lacks a coefficient", () => {
    const row = { name: "a", property: "liquid_density_POLY25_c1", value: "800", T_min_K: "290", T_max_K: "310" };
    const index = substanceIndex([own([{ name: "a", role: "solvent" }], [], [row])]);
    expect(index.faults.map(({ kind }) => kind)).toEqual(["incomplete correlation"]);
  });
});
