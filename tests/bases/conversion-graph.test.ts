import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { convertWithSteps } from "../../pipeline/bases/convert.ts";
import { hubConverter } from "../../pipeline/bases/hub-converter.ts";
import type { SoluteBasis } from "../../pipeline/bases/hydrate.ts";
import { everyBasis, linkOf } from "../../pipeline/bases/link.ts";
import type { Needs, Quantity } from "../../pipeline/bases/needs.ts";
import type { SolutionDensity } from "../../pipeline/bases/solution-density.ts";
import { relativeFromStandard, type Unit } from "../../pipeline/bases/unit.ts";
import { unitSpellings } from "../../pipeline/bases/units.ts";
import { unitOf } from "./support.ts";

const soluteBases: readonly SoluteBasis[] = [
  "anhydrous",
  "hydrate per added solvent",
  "hydrate equivalent per total solvent",
];
const units: readonly Unit[] = [...unitSpellings, "log10 x", "-log10(mol/L)", "mL solution/g"].map(unitOf);

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const anyQuantity = (min: number, max: number) =>
  fc
    .tuple(between(min, max), between(0, 0.1))
    .map(([value, u]): Quantity => ({ value, standardUncertainty: u * value }));

const anyDensity: fc.Arbitrary<SolutionDensity> = fc.oneof(
  anyQuantity(800, 1600).map((density): SolutionDensity => ({ kind: "measured", density })),
  fc.tuple(anyQuantity(800, 3000), anyQuantity(650, 1500), between(0, 0.05)).map(
    ([apparentSoluteDensity, solventDensity, modelRelativeUncertainty]): SolutionDensity => ({
      kind: "additive volumes",
      apparentSoluteDensity,
      solventDensity,
      modelRelativeUncertainty,
    }),
  ),
  fc.tuple(between(-200, 900), between(0, 300), between(0, 0.05)).map(
    ([slope, bend, relativeUncertainty]): SolutionDensity => ({
      kind: "density function",
      name: "a smooth invented density",
      density: (w) => 998 + slope * w + bend * w * w,
      relativeUncertainty,
      maxMassFraction: 0.95,
    }),
  ),
);

const anyNeeds: fc.Arbitrary<Needs & { crystalMolarMass: Quantity; soluteMolarMass: Quantity }> = fc
  .record({
    soluteMolarMass: anyQuantity(40, 600),
    ratio: between(1.02, 2.5),
    solventMolarMass: anyQuantity(18, 200),
    solventDensityAt20C: anyQuantity(650, 1600),
    solutionDensity: anyDensity,
  })
  .map(({ ratio, ...needs }) => ({
    ...needs,
    crystalMolarMass: { value: ratio * needs.soluteMolarMass.value, standardUncertainty: 0.01 },
  }));

/** Nine decades of g solute per g solvent. */
const anyRatio = between(-8, 1).map((exponent) => 10 ** exponent);
const anyUnit = fc.constantFrom(...units);
const anySoluteBasis = fc.constantFrom(...soluteBases);

/** Room left before a crystal melts in its own solvent; near it the way to the hub loses digits by its nature. */
function addedShare(r: number, needs: { crystalMolarMass: Quantity; soluteMolarMass: Quantity }): number {
  return 1 - r * (needs.crystalMolarMass.value / needs.soluteMolarMass.value - 1);
}

function converter(unit: Unit, needs: Needs, soluteBasis?: SoluteBasis) {
  const result = hubConverter(unit, needs, soluteBasis);
  if (result.kind !== "converter") throw new Error(result.missing.join(", "));
  return result.converter;
}

describe("every conversion", () => {
  test("undoes its inverse to 1e-12 over nine decades, on every unit and hydrate reading", () => {
    fc.assert(
      fc.property(anyUnit, anySoluteBasis, anyNeeds, anyRatio, (unit, soluteBasis, needs, r) => {
        fc.pre(soluteBasis !== "hydrate per added solvent" || addedShare(r, needs) > 0.01);
        const { toHub, fromHub } = converter(unit, needs, soluteBasis);
        expect(Math.abs(toHub(fromHub(r)) / r - 1)).toBeLessThan(1e-12);
      }),
      { numRuns: 3000 },
    );
  });

  test("is strictly monotonic", () => {
    fc.assert(
      fc.property(
        anyUnit,
        anySoluteBasis,
        anyNeeds,
        anyRatio,
        between(1.000001, 10),
        (unit, soluteBasis, needs, r, step) => {
          const more = r * step;
          fc.pre(soluteBasis !== "hydrate per added solvent" || addedShare(more, needs) > 0.01);
          fc.pre(more < 15);
          const { fromHub } = converter(unit, needs, soluteBasis);
          const falling = unit.scale.kind === "reciprocal" || unit.scale.sign === -1;
          const difference = fromHub(more) - fromHub(r);
          expect(falling ? -difference : difference).toBeGreaterThan(0);
        },
      ),
      { numRuns: 2000 },
    );
  });

  test("gives the same from a to b as from a to any third basis and on to b, whatever the solute is weighed as", () => {
    const anyThree = fc.tuple(anyUnit, anyUnit, anyUnit);
    const anyThreeBases = fc.tuple(anySoluteBasis, anySoluteBasis, anySoluteBasis);
    fc.assert(
      fc.property(anyThree, anyThreeBases, anyNeeds, anyRatio, ([a, b, c], [asA, asB, asC], needs, r) => {
        fc.pre(addedShare(r, needs) > 0.01 && !a.bareVolume);
        const go = (value: number, from: Unit, soluteBasis: SoluteBasis, to: Unit, targetSoluteBasis: SoluteBasis) => {
          const result = convertWithSteps({ value, from, to, needs, soluteBasis, targetSoluteBasis });
          if (result.kind !== "converted") throw new Error(JSON.stringify(result));
          return result;
        };
        const value = converter(a, needs, asA).fromHub(r);
        const direct = go(value, a, asA, b, asB);
        const detour = go(value, a, asA, c, asC);
        const onward = go(detour.value, c, asC, b, asB);
        // Near its own melt a crystal per solvent added loses digits by its nature: a grows as 1/(1 - r (R - 1)).
        const least = 1e-12 / Math.min(1, addedShare(r, needs));
        expect(Math.abs(onward.massRatio / direct.massRatio - 1)).toBeLessThan(least);
        const size = Math.max(1, Math.abs(direct.value)); // a logarithm may pass through 0
        const logarithmic = b.scale.kind === "ln" || b.scale.kind === "log10";
        const error = Math.abs(onward.value - direct.value) / (logarithmic ? size : Math.abs(direct.value));
        expect(error).toBeLessThan(least);
      }),
      { numRuns: 3000 },
    );
  });

  test("has an uncertainty that is a number and never negative", () => {
    fc.assert(
      fc.property(anyUnit, anyUnit, anyNeeds, anyRatio, between(0, 1), (from, to, needs, r, u) => {
        const { fromHub, relativeUncertainty } = converter(from, needs);
        const value = fromHub(r);
        expect(relativeUncertainty(value, Math.abs(u * value))).toBeGreaterThanOrEqual(0);
        const result = convertWithSteps({ value, standardUncertainty: Math.abs(u * value), from, to, needs });
        if (result.kind !== "converted") throw new Error(JSON.stringify(result));
        expect(result.standardUncertainty).toBeGreaterThanOrEqual(0);
        expect(result.relativeUncertainty).toBeGreaterThanOrEqual(0);
      }),
      { numRuns: 1000 },
    );
  });

  test("gives the same uncertainty by the fast way and by the explained one", () => {
    fc.assert(
      fc.property(anyUnit, anySoluteBasis, anyNeeds, anyRatio, between(0, 0.2), (unit, soluteBasis, needs, r, u) => {
        fc.pre(soluteBasis !== "hydrate per added solvent" || addedShare(r, needs) > 0.01);
        const bound = converter(unit, needs, soluteBasis);
        const { fromHub, toHub, relativeUncertainty, ownUncertainty, sharedUncertainty } = bound;
        const value = fromHub(r);
        const standardUncertainty = Math.abs(u * value);
        const explained = convertWithSteps({ value, standardUncertainty, from: unit, to: unit, needs, soluteBasis });
        if (explained.kind !== "converted") throw new Error(JSON.stringify(explained));
        expect(explained.massRatio).toBe(toHub(value));
        const fast = relativeUncertainty(value, standardUncertainty);
        expect(Math.abs(fast - explained.massRatioRelativeUncertainty)).toBeLessThan(1e-12 + 1e-12 * fast);
        const own = ownUncertainty(r, relativeFromStandard(unit.scale, value, standardUncertainty));
        const shared = sharedUncertainty(value, r, "mass ratio");
        expect(Math.abs(Math.hypot(own, shared) - fast)).toBeLessThan(1e-9 * (1e-6 + fast));
      }),
      { numRuns: 1000 },
    );
  });

  test("to the mole fraction has the same own and shared parts by the fast way and by the budget", () => {
    const toX = unitOf("mole fraction");
    fc.assert(
      fc.property(anyUnit, anySoluteBasis, anyNeeds, anyRatio, between(0, 0.2), (unit, soluteBasis, needs, r, u) => {
        fc.pre(soluteBasis !== "hydrate per added solvent" || addedShare(r, needs) > 0.01);
        const { fromHub, toHub, ownUncertainty, sharedUncertainty } = converter(unit, needs, soluteBasis);
        const value = fromHub(r);
        const standardUncertainty = Math.abs(u * value);
        const request = { value, standardUncertainty, from: unit, to: toX, needs, soluteBasis };
        const explained = convertWithSteps({ ...request, targetSoluteBasis: "anhydrous" });
        if (explained.kind !== "converted") throw new Error(JSON.stringify(explained));
        const ownNames = new Set(["reported value", "density of the solution"]);
        const part = (own: boolean) =>
          Math.hypot(
            ...explained.contributions.filter(({ name }) => ownNames.has(name) === own).map((c) => c.contribution),
          );
        const relative = relativeFromStandard(unit.scale, value, standardUncertainty);
        const own = ownUncertainty(toHub(value), relative) * (1 - explained.value);
        // A bare volume's open reading is propagated to x by the budget and told of r by its name: both scale by 1 - x.
        expect(Math.abs(own - part(true))).toBeLessThan(1e-9 * (1e-6 + own));
        const shared = sharedUncertainty(value, toHub(value), "mole fraction");
        expect(Math.abs(shared - part(false))).toBeLessThan(1e-9 * (1e-6 + shared));
      }),
      { numRuns: 1000 },
    );
  });

  test("to its own unit keeps the value and its uncertainty: what properties do one way they undo on the way back", () => {
    fc.assert(
      fc.property(
        anyUnit,
        anySoluteBasis,
        anyNeeds,
        anyRatio,
        between(0.001, 0.2),
        (unit, soluteBasis, needs, r, u) => {
          fc.pre(soluteBasis !== "hydrate per added solvent" || addedShare(r, needs) > 0.01);
          const value = converter(unit, needs, soluteBasis).fromHub(r);
          const standardUncertainty = Math.abs(u * value);
          const result = convertWithSteps({ value, standardUncertainty, from: unit, to: unit, needs, soluteBasis });
          if (result.kind !== "converted") throw new Error(JSON.stringify(result));
          const expected = relativeFromStandard(unit.scale, value, standardUncertainty);
          expect(Math.abs(result.relativeUncertainty / expected - 1)).toBeLessThan(1e-9);
        },
      ),
      { numRuns: 1000 },
    );
  });
});

/** The same needs with one named property multiplied by `factor`. */
function scaled(needs: Needs, name: string, factor: number): Needs {
  const times = (quantity: Quantity | undefined) => quantity && { ...quantity, value: quantity.value * factor };
  const density = needs.solutionDensity;
  switch (name) {
    case "molar mass of the solute":
      return { ...needs, soluteMolarMass: times(needs.soluteMolarMass) };
    case "molar mass of the crystal":
      return { ...needs, crystalMolarMass: times(needs.crystalMolarMass) };
    case "molar mass of the solvent":
      return { ...needs, solventMolarMass: times(needs.solventMolarMass) };
    case "density of the solvent":
      return {
        ...needs,
        solventDensityAt20C: times(needs.solventDensityAt20C),
        solutionDensity:
          density?.kind === "additive volumes"
            ? {
                ...density,
                solventDensity: { ...density.solventDensity, value: density.solventDensity.value * factor },
              }
            : density,
      };
    case "apparent density of the solute":
      if (density?.kind !== "additive volumes") return needs;
      return {
        ...needs,
        solutionDensity: {
          ...density,
          apparentSoluteDensity: times(density.apparentSoluteDensity) ?? density.apparentSoluteDensity,
        },
      };
    case "density of the solution":
      if (density?.kind !== "measured") return needs;
      return { ...needs, solutionDensity: { kind: "measured", density: times(density.density) ?? density.density } };
    default: // the density model as a whole: every volume of the solution grows together
      if (density?.kind === "density function") {
        return { ...needs, solutionDensity: { ...density, density: (w) => factor * density.density(w) } };
      }
      if (density?.kind !== "additive volumes") return needs;
      return {
        ...needs,
        solutionDensity: {
          ...density,
          solventDensity: { ...density.solventDensity, value: density.solventDensity.value * factor },
          apparentSoluteDensity: {
            ...density.apparentSoluteDensity,
            value: density.apparentSoluteDensity.value * factor,
          },
        },
      };
  }
}

describe("every derivative", () => {
  const h = 1e-5;
  const cases = everyBasis.flatMap((basis) => soluteBases.map((soluteBasis) => [basis, soluteBasis] as const));

  test.each(cases)("of %s (%s) agrees with a central difference", (basis, soluteBasis) => {
    const link = linkOf(basis, soluteBasis);
    fc.assert(
      fc.property(
        anyNeeds,
        between(-6, 0.5).map((e) => 10 ** e),
        (needs, r) => {
          fc.pre(soluteBasis !== "hydrate per added solvent" || addedShare(r, needs) > 0.1);
          const q = link.fromHub(r, needs);
          const ofValue = Math.log(link.toHub(q * (1 + h), needs) / link.toHub(q * (1 - h), needs)) / (2 * h);
          expect(Math.abs(link.valueElasticity(r, needs) / ofValue - 1)).toBeLessThan(1e-4);
          for (const name of new Set(link.inputs.map((input) => input.name))) {
            const used = link.inputs.filter((input) => input.name === name && input.quantity(needs, r) !== undefined);
            const analytic = used.reduce((sum, input) => sum + input.elasticity(r, needs), 0);
            if (used.length === 0) continue;
            const up = link.toHub(q, scaled(needs, name, 1 + h));
            const down = link.toHub(q, scaled(needs, name, 1 - h));
            expect(Math.abs(analytic - Math.log(up / down) / (2 * h)), name).toBeLessThan(
              1e-4 * (1 + Math.abs(analytic)),
            );
          }
        },
      ),
      { numRuns: 60 },
    );
  });
});
