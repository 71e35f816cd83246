import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { convertWithSteps } from "../../pipeline/bases/convert.ts";
import {
  addedSolventFromRatio,
  guestFractionInTotalSolvent,
  ratioFromAddedSolvent,
  type SoluteBasis,
} from "../../pipeline/bases/hydrate.ts";
import { hydrateReadingsOf } from "../../pipeline/bases/link.ts";
import type { Needs } from "../../pipeline/bases/needs.ts";
import { convert, converterOf, quantity, unitOf } from "./support.ts";

const added: SoluteBasis = "hydrate per added solvent";
const equivalent: SoluteBasis = "hydrate equivalent per total solvent";

/** Molar masses [g/mol] by IUPAC atomic weights, abridged. */
const hydrates = {
  "copper sulfate pentahydrate": { soluteMolarMass: quantity(159.6), crystalMolarMass: quantity(249.68) },
  "sodium sulfate decahydrate": { soluteMolarMass: quantity(142.04), crystalMolarMass: quantity(322.19) },
  "citric acid monohydrate": { soluteMolarMass: quantity(192.12), crystalMolarMass: quantity(210.14) },
  "oxalic acid dihydrate": { soluteMolarMass: quantity(90.03), crystalMolarMass: quantity(126.07) },
} satisfies Record<string, Needs>;

describe("the three readings of copper sulfate pentahydrate", () => {
  // 20.7 g anhydrous per 100 g water at 20 °C is the classical handbook value; the other two follow by mass balance.
  test("20.7 g anhydrous = 36.7 g per 100 g water added = 32.4 g equivalent per 100 g total water", () => {
    const needs = hydrates["copper sulfate pentahydrate"];
    const read = (targetSoluteBasis: SoluteBasis) =>
      convert(20.7, "g/100 g solvent", "g/100 g solvent", needs, { targetSoluteBasis }).value;
    expect(read(added)).toBeCloseTo(36.7, 1);
    expect(read(equivalent)).toBeCloseTo(32.4, 1);
    expect(read("anhydrous")).toBeCloseTo(20.7, 12);
  });

  // Table values of the pentahydrate (Wikipedia, Solubility table); their two anhydrous readings were computed outside this
  // program with M 159.60 and 249.68.
  test.each([
    [32.0, 18.338, 20.455],
    [23.1, 13.63, 14.766],
    [44.6, 24.558, 28.509],
    [61.8, 32.302, 39.504],
    [83.8, 41.131, 53.566],
    [114, 51.634, 72.871],
  ])(
    "%s g pentahydrate is %s g anhydrous if per water added and %s g if per total water",
    (table, perAdded, perTotal) => {
      const needs = hydrates["copper sulfate pentahydrate"];
      const anhydrous = (soluteBasis: SoluteBasis) =>
        convert(table, "g/100 g solvent", "g/100 g solvent", needs, { soluteBasis, targetSoluteBasis: "anhydrous" })
          .value;
      expect(Math.abs(anhydrous(added) - perAdded)).toBeLessThan(1e-3);
      expect(Math.abs(anhydrous(equivalent) - perTotal)).toBeLessThan(1e-3);
    },
  );
});

test("Na2SO4 at 20 °C, 19.23 g/100 g water (CRC 98th ed.), is the 44 g decahydrate equivalent per 100 g water in common tables (from memory, not verified)", () => {
  const reading = { targetSoluteBasis: equivalent };
  const { value } = convert(
    19.23,
    "g/100 g solvent",
    "g/100 g solvent",
    hydrates["sodium sulfate decahydrate"],
    reading,
  );
  expect(value).toBeCloseTo(43.6, 1);
  expect(Math.abs(value / 44 - 1)).toBeLessThan(0.015);
});

describe.each(Object.entries(hydrates))("%s", (_, needs) => {
  const R = needs.crystalMolarMass.value / needs.soluteMolarMass.value;
  const full: Needs = {
    ...needs,
    solventMolarMass: quantity(18.015),
    solventDensityAt20C: quantity(998.2),
    solutionDensity: { kind: "measured", density: quantity(1150) },
  };

  /** A solution made on the balance: `crystal` g dissolved in 100 g water. */
  const weighed = (crystal: number) => {
    const solute = crystal / R;
    const water = 100 + crystal - solute;
    const moles = solute / needs.soluteMolarMass.value;
    return { solute, water, moles, r: solute / water, total: 100 + crystal };
  };

  test.each([0.01, 1, 20, 150])(
    "%s g dissolved in 100 g water gives the same r on every basis and reading",
    (crystal) => {
      const { water, moles, r, total } = weighed(crystal);
      const cases: readonly (readonly [number, string, SoluteBasis])[] = [
        [crystal, "g/100 g solvent", added],
        [(100 * crystal) / water, "g/100 g solvent", equivalent],
        [100 * r, "g/100 g solvent", "anhydrous"],
        [(100 * crystal) / total, "% w/w", added],
        [(100 * crystal) / total, "% w/w", equivalent],
        [(crystal * 1150) / total, "g/L solution", added],
        [crystal * 9.982, "g/L solvent", added],
        [moles * 10, "mol/kg solvent", added],
        [(moles * 1000) / water, "mol/kg solvent", equivalent],
        [moles / (moles + 100 / 18.015), "mole fraction", added],
        [moles / (moles + water / 18.015), "mole fraction", "anhydrous"],
        [(moles * 1150) / total, "mol/L", added],
        [(100 * 1000) / 998.2 / crystal, "mL solvent/g", added],
      ];
      for (const [value, unit, soluteBasis] of cases) {
        const found = converterOf(unit, full, soluteBasis).toHub(value);
        expect(Math.abs(found / r - 1), `${unit}, ${soluteBasis}`).toBeLessThan(1e-12);
      }
    },
  );

  test("the guest that came with the crystal joins the solvent", () => {
    const { water, r } = weighed(20);
    // 20 g crystal in 100 g solvent with 40 % guest.
    expect(guestFractionInTotalSolvent(0.4, r, R)).toBeCloseTo((40 + water - 100) / water, 12);
    expect(guestFractionInTotalSolvent(1, r, R)).toBe(1);
  });
});

test("a crystal that melts in its own water has no amount of water to add", () => {
  const needs = hydrates["sodium sulfate decahydrate"];
  const R = 322.19 / 142.04;
  expect(addedSolventFromRatio(1 / (R - 1) + 1e-6, R)).toBeNaN();
  const unit = unitOf("g/100 g solvent");
  const result = convertWithSteps({ value: 90, from: unit, to: unit, needs, targetSoluteBasis: added });
  expect(result).toMatchObject({ kind: "impossible", reason: expect.stringContaining("melts in its own solvent") });
});

test("the total-solvent ratio of a hydrate stays below that of its own melt, whatever is weighed", () => {
  fc.assert(
    fc.property(
      fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
      fc.double({ min: 1.01, max: 3, noNaN: true }),
      (a, R) => {
        const r = ratioFromAddedSolvent(a, R);
        expect(r).toBeLessThanOrEqual(1 / (R - 1));
        expect(r).toBeLessThan(a);
      },
    ),
  );
});

test("a hydrate without its molar mass is told as missing, not converted", () => {
  const unit = unitOf("g/100 g solvent");
  const needs = { soluteMolarMass: quantity(159.6) };
  const result = convertWithSteps({ value: 32, from: unit, to: unit, needs, soluteBasis: added });
  expect(result).toEqual({ kind: "missing", missing: ["molar mass of the crystal"] });
});

test("each basis says which readings a hydrate has on it", () => {
  expect(hydrateReadingsOf("mass ratio")).toBe("three readings");
  expect(hydrateReadingsOf("mass per volume of solvent")).toBe("three readings");
  expect(hydrateReadingsOf("mole fraction")).toBe("added or total solvent");
  expect(hydrateReadingsOf("mass per volume of solution")).toBe("hydrate or anhydrous mass");
  expect(hydrateReadingsOf("amount per volume of solution")).toBe("none");
});
