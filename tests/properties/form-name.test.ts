import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { formName, otherNumeral, waterCount } from "../../pipeline/properties/form-name.ts";
import { programIndex } from "./read-tables.ts";

describe("Ways of writing one solid form have one name", () => {
  test.each([
    [
      "form I",
      ["Form I", "FORM I", "form-I", "Form: I", "I", "i", "polymorph I", "Polymorph-I", "modification I", "Form (I)"],
    ],
    ["form 1", ["Form 1", "1", "polymorph 1", "form-1"]],
    ["form A", ["Form A", "form a", "A", "crystal form A", "Polymorphic form A"]],
    ["alpha", ["α", "alpha", "Alpha form", "α-form", "α‑polymorph", "polymorph α", "form alpha"]],
    ["gamma", ["γ", "γ form", "GAMMA"]],
    ["dihydrate", ["Dihydrate", "di-hydrate", "2H2O", "·2H2O", "• 2 H₂O", "2-hydrate", "2 H2O", "(2H2O)"]],
    ["monohydrate", ["mono hydrate", "H2O", "·H2O", "1-hydrate"]],
    ["hemihydrate", ["hemi-hydrate", "0.5H2O", "½H2O", "1/2-hydrate", "·0.5 H2O"]],
    ["sesquihydrate", ["1.5-hydrate", "1.5 H2O", "3/2-hydrate"]],
    ["dodecahydrate", ["12H2O", "12-hydrate"]],
    ["anhydrous", ["Anhydrous", "anhydrate", "anhydr.", "anhydrous form", "water-free"]],
    ["amorphous", ["Amorphous", "amorph", "amorphous form", "amorphous solid"]],
    ["ethanol solvate", ["Ethanol  solvate", "ethanol solvate"]],
    ["form II hydrate", ["Form II hydrate", "polymorph ii  hydrate"]],
  ])("%s", (name, spellings) => {
    for (const spelling of spellings) expect(formName(spelling), spelling).toBe(name);
  });
});

test("different forms keep different names", () => {
  const forms = [
    ...["form I", "form II", "form 1", "form A", "alpha", "beta", "anhydrous", "unsolvated", "amorphous", "hydrate"],
    ...[
      "hemihydrate",
      "monohydrate",
      "dihydrate",
      "13-hydrate",
      "8/3-hydrate",
      "phase II",
      "form II hydrate",
      "form III'",
    ],
    ...["channel hydrate", "ethanol solvate", "ethanol hemisolvate", "hydrochloride", "dehydrated hydrate", "form"],
  ];
  expect(new Set(forms.map(formName)).size).toBe(forms.length);
});

test("a name is its own name, whatever the text", () => {
  const hard = fc.string({ unit: fc.constantFrom(..."IVXivx12½.·()- αβγfFormhydatesnu2H2OAa") });
  fc.assert(
    fc.property(fc.oneof(hard, fc.string({ unit: "binary" })), (text) => {
      expect(formName(formName(text))).toBe(formName(text));
    }),
    { numRuns: 1000 },
  );
});

test("the 169 listed forms stay apart, each under its listed name", () => {
  const forms = programIndex.substances.flatMap((substance) =>
    substance.solidForms.map((form) => ({ substance, form })),
  );
  expect(forms.length).toBe(169);
  for (const { substance, form } of forms) {
    expect(programIndex.formOf(substance, form.form), `${substance.name} ${form.form}`).toBe(form);
    expect(formName(form.form)).toBe(form.form);
  }
});

test("the water that a name states is counted", () => {
  expect(["pentahydrate", "hemihydrate", "8/3-hydrate", "13-hydrate"].map(waterCount)).toEqual([5, 0.5, 8 / 3, 13]);
  expect(["hydrate", "channel hydrate", "anhydrous", "ethanol solvate"].map(waterCount)).toEqual([
    ...[undefined, undefined, undefined, undefined],
  ]);
});

test("a numeral has its other way of writing, a letter has none", () => {
  expect(["form I", "form 4", "form XII", "form 13", "form A", "alpha"].map(otherNumeral)).toEqual([
    ...["form 1", "form IV", "form 12", undefined, undefined, undefined],
  ]);
});
