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
