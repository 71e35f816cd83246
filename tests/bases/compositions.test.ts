import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  type CompositionBasis,
  compositionKey,
  fractionsOnBasis,
  massFractions,
  meanMolarMass,
} from "../../pipeline/bases/compositions.ts";
import { alcoholByVolume, massFractionFromAlcoholByVolume } from "../../pipeline/properties/ethanol-water.ts";

const ALCOHOLOMETRY = { toMass: massFractionFromAlcoholByVolume, fromMass: alcoholByVolume };
const BASES: readonly CompositionBasis[] = ["mass", "mole", "volume before mixing", "alcoholometric volume"];

/** Shares that are no trace: a trace of 1e-9 of one component has no 12 digits in the sum. */
const share = fc.double({ min: 1e-3, max: 1, noNaN: true });
const liquid = fc.record({
  molarMass: fc.double({ min: 18, max: 300, noNaN: true }),
  density20C: fc.double({ min: 600, max: 1600, noNaN: true }),
});

describe("The four bases of a composition", () => {
  test("bring any binary mixture back to 1e-12, there and back", () => {
    fc.assert(
      fc.property(fc.constantFrom(...BASES), share, fc.tuple(liquid, liquid), (basis, first, liquids) => {
        const w = [first, 1 - first];
        const back = massFractions(basis, fractionsOnBasis(basis, w, liquids, ALCOHOLOMETRY), liquids, ALCOHOLOMETRY);
        for (const [i, fraction] of w.entries()) expect(Math.abs((back[i] as number) - fraction)).toBeLessThan(1e-12);
      }),
    );
  });

  test("bring three components back to 1e-12 on a mass, mole and volume basis, and add up to 1", () => {
    const three = fc.tuple(share, share, share);
    fc.assert(
      fc.property(
        fc.constantFrom(...BASES.slice(0, 3)),
        three,
        fc.tuple(liquid, liquid, liquid),
        (basis, parts, of) => {
          const w = massFractions("mass", parts, of, ALCOHOLOMETRY);
          const fractions = fractionsOnBasis(basis, w, of, ALCOHOLOMETRY);
          expect(fractions.reduce((sum, one) => sum + one, 0)).toBeCloseTo(1, 14);
          const back = massFractions(basis, fractions, of, ALCOHOLOMETRY);
          for (const [i, fraction] of w.entries()) expect(Math.abs((back[i] as number) - fraction)).toBeLessThan(1e-12);
        },
      ),
    );
  });

  test("do not depend on the order of the components", () => {
    fc.assert(
      fc.property(fc.constantFrom(...BASES.slice(0, 3)), share, fc.tuple(liquid, liquid), (basis, first, [a, b]) => {
        const [w = 0] = massFractions(basis, [first, 1 - first], [a, b], ALCOHOLOMETRY);
        const [, again = 0] = massFractions(basis, [1 - first, first], [b, a], ALCOHOLOMETRY);
        expect(Math.abs(w - again)).toBeLessThan(1e-15);
      }),
    );
  });

  test("agree with a mixture worked out by hand", () => {
    // 70 mL ethanol (789.24 kg/m3) and 30 mL water (998.20): 55.247 g and 29.946 g; 1.19922 and 1.66228 mol.
    const liquids = [
      { molarMass: 46.069, density20C: 789.24 },
      { molarMass: 18.015, density20C: 998.2 },
    ];
    const w = massFractions("volume before mixing", [70, 30], liquids, ALCOHOLOMETRY);
    expect(w[0]).toBeCloseTo(55.2468 / 85.1928, 5);
    expect(fractionsOnBasis("mole", w, liquids, ALCOHOLOMETRY)[0]).toBeCloseTo(1.19922 / 2.8615, 4);
    expect(meanMolarMass(w, [46.069, 18.015])).toBeCloseTo(85.1928 / 2.8615, 3);
  });
});

describe("A composition key", () => {
  test.each([
    [
      [0.7049, 0.2951],
      [70.5, 29.5],
    ],
    [
      [0.9975, 0.0025],
      [99.5, 0.5],
    ],
    [
      [0.99751, 0.00249],
      [100, 0],
    ],
    [
      [0.5, 0.3, 0.2],
      [50, 30, 20],
    ],
    [
      [0.92408, 0.07592],
      [92.5, 7.5],
    ],
  ])("of %j is %j", (w, key) => {
    for (const [i, percent] of compositionKey(w).entries()) expect(percent).toBeCloseTo(key[i] as number, 9);
  });

  test("adds up to 100, lies within half a step of every fraction but the largest, and knows no order", () => {
    fc.assert(
      fc.property(fc.array(share, { minLength: 2, maxLength: 3 }), (parts) => {
        const w = massFractions("mass", parts, [], ALCOHOLOMETRY);
        const key = compositionKey(w);
        expect(key.reduce((sum, percent) => sum + percent, 0)).toBeCloseTo(100, 9);
        const largest = w.indexOf(Math.max(...w));
        key.forEach((percent, i) => {
          if (i !== largest) expect(Math.abs(percent / 100 - (w[i] as number))).toBeLessThan(0.0025 + 1e-9);
        });
        if (new Set(w).size === w.length) expect([...compositionKey([...w].reverse())].reverse()).toEqual(key);
      }),
    );
  });
});
