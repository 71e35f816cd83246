import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { describe, expect, test } from "vitest";
import { firstOrderTolerance } from "../../pipeline/bases/first-order.ts";
import type { SoluteBasis } from "../../pipeline/bases/hydrate.ts";
import type { Needs, Quantity } from "../../pipeline/bases/needs.ts";
import { convert, converterOf } from "./support.ts";

/** SALTERN_LONG=1 makes the long run: the standard error of an SD over 100,000 draws is 0.2 %, over 20,000 it is 0.5 %. */
const draws = process.env.SALTERN_LONG === "1" ? 100_000 : 20_000;

interface Drawn extends Quantity {
  value: number;
}

/** Solute 159.6 g/mol with a pentahydrate, in water; the uncertainties are larger than real ones, to be hard on first order. */
function drawnNeeds(): { needs: Needs; drawn: readonly Drawn[] } {
  const quantity = (value: number, standardUncertainty: number): Drawn => ({ value, standardUncertainty });
  const soluteMolarMass = quantity(159.6, 0.5);
  const crystalMolarMass = quantity(249.68, 0.5);
  const solventMolarMass = quantity(18.015, 0.02);
  const solventDensity = quantity(998.2, 5);
  const apparentSoluteDensity = quantity(1800, 110);
  const needs: Needs = {
    soluteMolarMass,
    crystalMolarMass,
    solventMolarMass,
    solventDensityAt20C: solventDensity,
    solutionDensity: { kind: "additive volumes", apparentSoluteDensity, solventDensity },
  };
  return { needs, drawn: [soluteMolarMass, crystalMolarMass, solventMolarMass, solventDensity, apparentSoluteDensity] };
}

/** Standard normal numbers by the polar method (Marsaglia and Bray 1964) from a seeded generator. */
function normalNumbers(seed: number): () => number {
  const generator = xoroshiro128plus(seed);
  const uniform = () => 2 * uniformFloat64(generator) - 1;
  return () => {
    for (;;) {
      const u = uniform();
      const v = uniform();
      const s = u * u + v * v;
      if (s > 0 && s < 1) return u * Math.sqrt((-2 * Math.log(s)) / s);
    }
  };
}

/** Relative standard deviation of r over draws of the value and of every property. */
function simulated(value: number, u: number, unit: string, soluteBasis: SoluteBasis, seed: number): number {
  const { needs, drawn } = drawnNeeds();
  const centres = drawn.map((quantity) => quantity.value);
  const converter = converterOf(unit, needs, soluteBasis);
  const centre = converter.toHub(value);
  const normal = normalNumbers(seed);
  let sum = 0;
  let squares = 0;
  for (let draw = 0; draw < draws; draw++) {
    drawn.forEach((quantity, i) => {
      quantity.value = (centres[i] ?? Number.NaN) + normal() * quantity.standardUncertainty;
    });
    const relative = converter.toHub(value + u * normal()) / centre - 1;
    sum += relative;
    squares += relative * relative;
  }
  return Math.sqrt((squares - (sum * sum) / draws) / (draws - 1));
}

const cases: readonly (readonly [value: number, u: number, unit: string, soluteBasis: SoluteBasis])[] = [
  [20.7, 0.4, "g/100 g solvent", "anhydrous"],
  [36.7, 1.5, "g/100 g solvent", "hydrate per added solvent"],
  [32.4, 1.5, "g/100 g solvent", "hydrate equivalent per total solvent"],
  [26, 1, "% w/w", "hydrate per added solvent"],
  [200, 10, "g/L solution", "anhydrous"],
  [600, 40, "g/L solution", "anhydrous"],
  [1.2, 0.05, "mol/L", "anhydrous"],
  [-3.5, 0.1, "log10(mol/L)", "anhydrous"],
  [-3.5, 0.3, "log10(mol/L)", "anhydrous"],
  [4, 0.05, "-ln x", "anhydrous"],
  [4, 0.4, "-ln x", "anhydrous"],
  [18, 0.8, "1000 x", "anhydrous"],
  [15, 1, "mL solvent/g", "anhydrous"],
  [15, 3, "mL solvent/g", "anhydrous"],
  [1.3, 0.05, "mol/kg solvent", "hydrate per added solvent"],
];

describe(`first-order propagation against ${draws} draws`, () => {
  test.each(cases)(
    "%s with u %s in %s (%s) agrees within 5 % or says that it does not",
    (value, u, unit, soluteBasis) => {
      const { needs } = drawnNeeds();
      const more = { standardUncertainty: u, soluteBasis };
      const explained = convert(value, unit, "g/100 g solvent", needs, more);
      const deviation = simulated(value, u, unit, soluteBasis, 20260314) / explained.massRatioRelativeUncertainty - 1;
      const told = explained.cautions.some((text) => text.startsWith("first-order uncertainty"));
      if (Math.abs(deviation) > firstOrderTolerance) expect(told).toBe(true);
      // What the row says of itself is what the draws find, as well as three points can tell.
      expect(Math.abs(explained.firstOrderDeviation - deviation)).toBeLessThan(0.03 + 0.15 * Math.abs(deviation));
    },
  );
});
