import fc from "fast-check";
import { expect, test } from "vitest";
import { readableId, slug } from "../../pipeline/records/readable-ids.ts";

test.each([
  ["Copper sulfate, pentahydrate", "copper-sulfate-pentahydrate"],
  ["β-Lactose", "beta-lactose"],
  ["γ-Aminobuttersäure", "gamma-aminobuttersaure"],
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
