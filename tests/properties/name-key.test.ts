import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { lookAlikes } from "../../pipeline/properties/look-alikes.ts";
import { nameKey, racemateKeys, unlistedName } from "../../pipeline/properties/name-key.ts";

/** Characters that names get wrong: look-alikes, dashes, primes, invisible ones, sub- and superscripts, ligatures. */
const hard = fc.constantFrom(
  ..."aAeEoO рсхАВЕ αβΑΒΔµ -‐‑‒–—−－ '’′ʹ`´\"″“ \u200b\u00ad\ufeff\u00a0\t ₂²H2O½ ﬁﬀ ·•⋅*. ()[],+±/ xX× dDlLrRsS水𝛼İı",
);
const name = fc.string({
  unit: fc.oneof(hard, fc.string({ unit: "binary", minLength: 1, maxLength: 1 })),
  maxLength: 24,
});

describe("Names that differ in typography only have one key", () => {
  test.each([
    ["case", "Paracetamol", "PARACETAMOL"],
    ["blanks", "ethyl acetate", " Ethyl  acetate"],
    ["a no-break blank", "ethyl acetate", "ethyl\u00a0acetate"],
    ["zero-width characters", "caffeine", "caf\u200bfe\u00adine\ufeff"],
    ["dashes", "2-propanol", "2‐propanol"],
    ["dashes", "2-propanol", "2–propanol"],
    ["a minus sign", "(-)-menthol", "(−)-menthol"],
    ["primes", "2,2'-bipyridine", "2,2′-bipyridine"],
    ["primes", "2,2'-bipyridine", "2,2’-bipyridine"],
    ["primes", "2,2'-bipyridine", "2,2ʹ-bipyridine"],
    ["primes", "2,2'-bipyridine", "2,2´-bipyridine"],
    ["double primes", "N,N''-x", "N,N″-x"],
    ["Greek letters", "alpha-lactose", "α-lactose"],
    ["Greek capitals", "delta9-thc", "Δ9-THC"],
    ["mathematical Greek letters", "alpha-lactose", "𝛼-lactose"],
    ["subscripts", "H2O", "H₂O"],
    ["full-width letters", "KNO3", "ＫＮＯ３"],
    ["the letters i of a Turkish keyboard", "caffeine", "CAFFEİNE"],
    ["ligatures", "fluorene", "ﬂuorene"],
    ["crystal water", "CuSO4.5H2O", "CuSO4 · 5H2O"],
    ["Cyrillic look-alikes", "caffeine", "cаffеinе"],
    ["Greek look-alikes", "Naproxen", "Νaproxen"],
    ["the sign of a racemate", "(±)-ibuprofen", "(+/-)-ibuprofen"],
  ])("%s: %s and %s", (_, a, b) => {
    expect(nameKey(b)).toBe(nameKey(a));
  });

  test.each([
    ["a digit", "1-propanol", "2-propanol"],
    ["a stereo prefix", "(R)-ibuprofen", "(S)-ibuprofen"],
    ["a stereo prefix", "D-alanine", "DL-alanine"],
    ["the sign of rotation", "(+)-menthol", "(-)-menthol"],
    ["a prime", "2,2'-bipyridine", "2,2-bipyridine"],
    ["a locant", "α-lactose", "β-lactose"],
    ["the words of another script", "кофеин", "caffeine"],
  ])("%s keeps names apart: %s and %s", (_, a, b) => {
    expect(nameKey(b)).not.toBe(nameKey(a));
  });

  test("a key is its own key, whatever the text", () => {
    fc.assert(
      fc.property(name, (text) => {
        expect(nameKey(nameKey(text))).toBe(nameKey(text));
      }),
      { numRuns: 2000 },
    );
  });

  test("invisible characters and blanks anywhere change no key", () => {
    const noise = fc.constantFrom("\u200b", "\u00ad", "\u2060", "\ufeff");
    fc.assert(
      fc.property(fc.stringMatching(/^[A-Za-z0-9,'-]{1,20}$/), noise, fc.nat(20), (text, mark, at) => {
        expect(nameKey(text.slice(0, at) + mark + text.slice(at))).toBe(nameKey(text));
      }),
    );
  });
});

describe("A solute that is in no table goes under one readable name", () => {
  test.each([
    ["  HX‑7  Mesylate", "hx-7 mesylate"],
    ["Lot 7", "lot 7"],
    ["α‑Foo", "alpha-foo"],
    // Case matters in a formula and in a stereo descriptor.
    ["CoCl2", "CoCl2"],
    ["COCl2", "COCl2"],
    ["D-Foo", "D-foo"],
    ["d-Foo", "d-foo"],
    ["(2R,3S)-Foo", "(2R,3S)-foo"],
    ["DL-Foo", "DL-foo"],
  ])("%j is %j", (text, expected) => {
    expect(unlistedName(text)).toBe(expected);
  });

  test("that name is the same whatever case its letters have, and stays as it is", () => {
    fc.assert(
      fc.property(name, (text) => {
        expect(unlistedName(unlistedName(text))).toBe(unlistedName(text));
        expect(nameKey(unlistedName(text))).toBe(nameKey(text));
      }),
      { numRuns: 2000 },
    );
  });
});

test.each(["(±)-x", "rac-x", "racem-x", "DL-x", "dl-x", "(RS)-x", "racemic x", "(+/-)-x"])(
  "%s names the racemate",
  (text) => {
    expect(racemateKeys(text)[0]).toBe("rac-x");
  },
);

test.each(["L-x", "(S)-x", "x", "racx", "dlx", ""])("%j names no racemate", (text) => {
  expect(racemateKeys(text)).toEqual([]);
});

describe("Look-alike letters", () => {
  test("are told with script and code point, each once", () => {
    expect(lookAlikes("cаffeinа")).toEqual(['Cyrillic "а" (U+0430)']);
    expect(lookAlikes("Νaproxen")).toEqual(['Greek "Ν" (U+039D)']);
  });

  test.each(["кофеин", "α-lactose", "β-D-glucose", "Δ9-THC", "caffeine", "水", "Б-12 caffeine"])(
    "are none in %s",
    (text) => {
      expect(lookAlikes(text)).toEqual([]);
    },
  );
});
