import { describe, expect, test } from "vitest";
import { convertWithSteps } from "../../pipeline/bases/convert.ts";
import type { SoluteBasis } from "../../pipeline/bases/hydrate.ts";
import type { Needs } from "../../pipeline/bases/needs.ts";
import type { SolutionDensity } from "../../pipeline/bases/solution-density.ts";
import { parseUnit, unitSpellings } from "../../pipeline/bases/units.ts";
import { quantity, unitOf } from "./support.ts";

/**
 * One solution made on the balance: 0.8 g of a pentahydrate (M 249.68, unsolvated 159.60 g/mol) in 100 g of water. Its
 * solution has 1004 kg/m3 where its volume is read (40 °C); water has 998.2 kg/m3 at 20 °C and 992.2 at 40 °C.
 */
const crystal = 0.8;
const added = 100;
const [M2, M2s, M1] = [159.6, 249.68, 18.015];
const [rho, rho1At20, rho1At40] = [1004, 998.2, 992.2];

const n2 = crystal / M2s;
const solute = n2 * M2;
const water = added + crystal - solute;
const total = crystal + added;
const litres = total / rho;

const needs: Needs = {
  soluteMolarMass: quantity(M2),
  crystalMolarMass: quantity(M2s),
  solventMolarMass: quantity(M1),
  solventDensityAt20C: quantity(rho1At20),
  solutionDensity: { kind: "measured", density: quantity(rho) },
};

/** The value of that solution in every unit, from masses, moles and volumes by the definition of the unit alone. */
function weighed(soluteBasis: SoluteBasis, rho1: number): ReadonlyMap<string, number> {
  const perAdded = soluteBasis === "hydrate per added solvent";
  const mass = soluteBasis === "anhydrous" ? solute : crystal;
  const solvent = perAdded ? added : water;
  const solventLitres = solvent / rho1;
  const solventMoles = solvent / M1;
  const x = n2 / (n2 + solventMoles);
  const w = mass / total;
  const molar = n2 / litres;
  return new Map([
    ["g/100 g solvent", (100 * mass) / solvent],
    ["g/100 g solution", 100 * w],
    ["% w/w", 100 * w],
    ["% w/v", (0.1 * mass) / litres],
    ["g/100 mL solvent", (0.1 * mass) / solventLitres],
    ["g/100 mL solution", (0.1 * mass) / litres],
    ["g/L solution", mass / litres],
    ["g/L solvent", mass / solventLitres],
    ["g/g solvent", mass / solvent],
    ["g/kg solvent", (1000 * mass) / solvent],
    ["g/kg solution", 1000 * w],
    ["g/mL solution", (1e-3 * mass) / litres],
    ["mg/mL solution", mass / litres],
    ["mg/mL solvent", mass / solventLitres],
    ["mg/L solution", (1e3 * mass) / litres],
    ["ug/mL solution", (1e3 * mass) / litres],
    ["mg/kg solution", 1e6 * w],
    ["mole fraction", x],
    ["mol %", 100 * x],
    ["mole ratio", n2 / solventMoles],
    ["mass fraction", w],
    ["mol/L solution", molar],
    ["mol/L solvent", n2 / solventLitres],
    ["mmol/L solution", 1e3 * molar],
    ["mol/kg solvent", (1000 * n2) / solvent],
    ["log10(mol/L)", Math.log10(molar)],
    ["ln x", Math.log(x)],
    ["-ln x", -Math.log(x)],
    ["10^3 x", 1e3 * x],
    ["1000 x", 1e3 * x],
    ["100 w", 100 * w],
    ["mL solvent/g", (1000 * solventLitres) / mass],
    ["pharmacopoeia term", (1000 * solventLitres) / mass],
    // Beside the spellings offered: aliases, scaled headings, bare volumes below 20 g/L.
    ["mol/L", molar],
    ["M", molar],
    ["10^2 x", 100 * x],
    ["10^4 x", 1e4 * x],
    ["10^5 x", 1e5 * x],
    ["x·10^6", 1e6 * x],
    ["10^3 w", 1e3 * w],
    ["log10 x", Math.log10(x)],
    ["mg/mL", mass / litres],
    ["g/L", mass / litres],
  ]);
}

const bases: readonly SoluteBasis[] = [
  "anhydrous",
  "hydrate per added solvent",
  "hydrate equivalent per total solvent",
];

test("the table of this file has every spelling that is offered to a user", () => {
  const known = weighed("anhydrous", rho1At20);
  expect(unitSpellings.filter((spelling) => !known.has(spelling))).toEqual([]);
});

describe.each(bases)("a solution weighed as %s", (from) => {
  test.each([
    ["20 °C, as solvent is dispensed", undefined, rho1At20],
    ["the stated 40 °C", quantity(rho1At40), rho1At40],
  ])("is the same solution on every ordered pair of units, volumes of solvent at %s", (_, atVolume, rho1) => {
    const all: Needs = { ...needs, solventDensityAtVolumeTemperature: atVolume };
    const source = weighed(from, rho1);
    let pairs = 0;
    for (const to of bases) {
      for (const [unit, value] of source) {
        for (const [target, expected] of weighed(to, rho1)) {
          const request = { value, from: unitOf(unit), to: unitOf(target), needs: all };
          const found = convertWithSteps({ ...request, soluteBasis: from, targetSoluteBasis: to });
          if (found.kind !== "converted") throw new Error(`${unit} to ${target}: ${JSON.stringify(found)}`);
          const error = Math.abs(found.value - expected) / Math.max(Math.abs(expected), 1e-300);
          if (!(error < 1e-11)) throw new Error(`${value} ${unit} to ${target}: ${found.value}, not ${expected}`);
          pairs++;
        }
      }
    }
    expect(pairs).toBe(3 * source.size ** 2);
  });
});

test("every step names its equation and every property its symbol, unit and uncertainty", () => {
  const modelled: SolutionDensity = {
    kind: "additive volumes",
    apparentSoluteDensity: quantity(1800, 100),
    solventDensity: quantity(998.2, 0.01),
  };
  for (const [unit, value] of weighed("anhydrous", rho1At20)) {
    const from = unitOf(unit);
    const request = { value, from, to: unitOf("mole fraction"), needs: { ...needs, solutionDensity: modelled } };
    const found = convertWithSteps({ ...request, standardUncertainty: Math.abs(0.01 * value) });
    if (found.kind !== "converted") throw new Error(unit);
    for (const step of found.steps) {
      expect(step.equation).toContain(step.symbol === "r" ? "r = " : "=");
      for (const property of step.properties) {
        expect(property.symbol).not.toBe("");
        expect(property.unit).toMatch(/^(?:g\/mol|kg\/m3)$/);
        expect(property.standardUncertainty).toBeGreaterThanOrEqual(0);
      }
    }
    if (from.basis.endsWith("volume of solution")) {
      expect(found.steps.map(({ symbol }) => symbol)).toContain("rho");
      expect(found.assumptions.join()).toContain("volume of solution taken at the measuring temperature");
    }
  }
});

// UCUM specification v2.2 (Regenstrief Institute, ucum-essence.xml): codes of concentration with the factor to SI. Read:
// those that say per what, or whose reference convention settles; open: those that do not. null stands for open.
test.each([
  ["g/L", 1],
  ["mg/mL", 1],
  ["ug/mL", 1e-3],
  ["mg/L", 1e-3],
  ["kg/m3", 1],
  ["mol/L", 1e3],
  ["mmol/L", 1],
  ["umol/L", 1e-3],
  ["mol/m3", 1],
  ["mol/kg", 1],
  ["mmol/kg", 1e-3],
  ["%{w/w}", 1e-2],
  ["g/(100.g)", null],
  ["g/hg", null],
  ["g/kg", null],
  ["mg/g", null],
  ["kg/kg", null],
  ["g/g", null],
  ["g/dL", null],
  ["g/(100.mL)", null],
  ["g%", null],
  ["mol/mol", null],
  ["mmol/mol", null],
  ["%", null],
  ["%{w/v}", null],
  ["[ppth]", null],
  ["[ppm]", null],
  ["[ppb]", null],
  ["[pptr]", null],
])("the UCUM code %s has the factor %s, or is open", (code, factor) => {
  const parsed = parseUnit(code);
  if (factor === null) {
    expect(parsed.kind).toBe("open");
    return;
  }
  expect(parsed.kind).toBe("unit");
  const { scale } = unitOf(code);
  expect(scale.numerator / scale.denominator).toBeCloseTo(factor, 15);
});
