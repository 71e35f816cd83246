import fc from "fast-check";
import { expect, test } from "vitest";
import { nearNames } from "../../pipeline/properties/near-names.ts";
import { programIndex } from "./read-tables.ts";

/** Optimal string alignment distance by its definition, without shortcuts. */
function distance(a: string, b: string): number {
  const d = Array.from({ length: a.length + 1 }, (_, i) => Array.from({ length: b.length + 1 }, (_, j) => i || j));
  const at = (i: number, j: number) => d[i]?.[j] as number;
  for (let j = 0; j <= b.length; j++) (d[0] as number[])[j] = j;
  for (let i = 1; i <= a.length; i++) {
    (d[i] as number[])[0] = i;
    for (let j = 1; j <= b.length; j++) {
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1] ? at(i - 2, j - 2) + 1 : 99;
      const changed = at(i - 1, j - 1) + (a[i - 1] === b[j - 1] ? 0 : 1);
      (d[i] as number[])[j] = Math.min(at(i - 1, j) + 1, at(i, j - 1) + 1, changed, swapped);
    }
  }
  return at(a.length, b.length);
}

const word = fc.string({ unit: fc.constantFrom(..."abcdez019().'α水"), minLength: 3, maxLength: 14 });

test("a name is near exactly where its distance is within the limit, whatever is passed over on the way", () => {
  fc.assert(
    fc.property(word, fc.array(word, { maxLength: 8 }), (text, names) => {
      const folded = (name: string) => name.replaceAll("α", "alpha");
      const limit = folded(text).length <= 5 ? 1 : folded(text).length <= 12 ? 2 : 3;
      const expected = new Set(names.filter((name) => distance(folded(text), folded(name)) <= limit));
      const pairs = names.map((name) => [folded(name), name] as const);
      expect(new Set(nearNames(text, pairs, 99))).toEqual(expected);
    }),
    { numRuns: 150 },
  );
});

test("one slip in one of three listed names of eight letters or more leads back to it", () => {
  const names = programIndex.substances.map(({ name }) => name).filter((name) => /^[a-z ]{8,}$/.test(name));
  expect(names.length).toBeGreaterThan(150);
  for (const [at, name] of names.entries()) {
    if (at % 3 !== 0) continue;
    const place = 1 + (at % (name.length - 2));
    const slips = [name.slice(0, place) + name.slice(place + 1), `${name.slice(0, place)}q${name.slice(place)}`];
    for (const slip of slips) {
      if (programIndex.byName(slip) === undefined) expect(programIndex.nearNames(slip), slip).toContain(name);
    }
  }
});
