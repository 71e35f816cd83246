import fc from "fast-check";
import { expect, test } from "vitest";
import { readableId, slug } from "../../pipeline/records/readable-ids.ts";

test.each([
  ["Copper sulfate, pentahydrate", "copper-sulfate-pentahydrate"],
  ["β-Lactose", "beta-lactose"],
  ["γ-Aminobuttersäure", "gamma-aminobuttersaure"],
  ["δ-D-Mannitol", "delta-d-mannitol"],
  ["Δ9-THC", "delta9-thc"],
  ["(+)-Menthol", "plus-menthol"],
  ["(−)-Menthol", "minus-menthol"],
  ["(±)-Menthol", "rac-menthol"],
  ["L-(+)-tartaric acid", "l-plus-tartaric-acid"],
  ["../../etc/passwd", "etc-passwd"],
  ["..", ""],
  ["ethanol + water 70.5:29.5 w/w", "ethanol-water-70-5-29-5-w-w"],
  ["  --  ", ""],
  ["水", ""],
  ["x".repeat(100), "x".repeat(60)],
])("the slug of %j is %j", (text, expected) => {
  expect(slug(text)).toBe(expected);
});

test("a slug has only small letters, digits and single inner hyphens", () => {
  fc.assert(
    fc.property(fc.string({ unit: "binary" }), (text) => {
      expect(slug(text)).toMatch(/^(?:[a-z0-9]+(?:-[a-z0-9]+)*)?$/);
    }),
  );
});

test("an id of words that leave no letter is the digits of its key alone", () => {
  // First eight digits of the SHA-256 of "a": ca978112.
  expect(readableId(["水", ""], "a")).toBe("ca978112");
});

test("two keys with the same words have different ids", () => {
  expect(readableId(["lactose"], "α-lactose")).not.toBe(readableId(["lactose"], "β-lactose"));
});

test("no id is a name that some disk reserves, hides or cannot tell from another", () => {
  const reserved = [
    "con",
    "nul",
    "aux",
    "prn",
    "com1",
    "lpt1",
    "CON",
    "nul.txt",
    ".hidden",
    "..",
    "a b",
    "a/b",
    "a\\b",
    "a:b",
  ];
  fc.assert(
    fc.property(fc.oneof(fc.constantFrom(...reserved), fc.string({ unit: "binary" })), (text) => {
      const id = readableId([text], text);
      expect(id).toMatch(/^(?:[a-z0-9]+-)*[0-9a-f]{8}$/);
      expect(reserved.map((word) => word.toLowerCase())).not.toContain(id);
      expect(id).toBe(id.toLowerCase());
    }),
  );
});

test("a longer hash keeps the words", () => {
  // First sixteen digits of the SHA-256 of "a": ca978112ca1bbdca.
  expect(readableId(["Lactose"], "a", 16)).toBe("lactose-ca978112ca1bbdca");
});
