import { type Edge, missingOf, positiveRatio } from "./edge.ts";
import {
  type Input,
  type Needs,
  numberIn,
  soluteMolarMassInput,
  solventDensityForVolume,
  solventDensityInput,
} from "./needs.ts";
import { concentrationSlope, densityInputs, massConcentration, massRatioAtConcentration } from "./solution-density.ts";

const solventDensityMissing = (needs: Needs) => missingOf(["density of the solvent", solventDensityForVolume(needs)]);
const soluteMolarMassMissing = (needs: Needs) => missingOf(["molar mass of the solute", needs.soluteMolarMass]);
const solutionDensityMissing = (needs: Needs) => missingOf(["density of the solution", needs.solutionDensity]);

const one = () => 1;
const minusOne = () => -1;

/** Mass of solute per volume of solvent: m2/V1 = r rho1, rho1 at the temperature of the volume (20 °C unless stated). */
export const massPerSolventVolumeEdge: Edge = {
  basis: "mass per volume of solvent",
  symbol: "m2/V1",
  unit: "kg/m3",
  per: "solvent",
  counts: "mass",
  toHubEquation: "r = (m2/V1)/rho1",
  fromHubEquation: "m2/V1 = r rho1",
  missing: solventDensityMissing,
  toHub: (massPerVolume, needs) => positiveRatio(massPerVolume / numberIn(solventDensityForVolume(needs))),
  fromHub: (r, needs) => r * numberIn(solventDensityForVolume(needs)),
  valueElasticity: one,
  inputs: [solventDensityInput(minusOne)],
};

/** Amount of solute per volume of solvent: n2/V1 = 1000 r rho1/M2. */
export const amountPerSolventVolumeEdge: Edge = {
  basis: "amount per volume of solvent",
  symbol: "n2/V1",
  unit: "mol/m3",
  per: "solvent",
  counts: "amount",
  toHubEquation: "r = (n2/V1) M2/(1000 rho1)",
  fromHubEquation: "n2/V1 = 1000 r rho1/M2",
  missing: (needs) => [...soluteMolarMassMissing(needs), ...solventDensityMissing(needs)],
  toHub: (amountPerVolume, needs) =>
    positiveRatio(
      (amountPerVolume * numberIn(needs.soluteMolarMass)) / (1000 * numberIn(solventDensityForVolume(needs))),
    ),
  fromHub: (r, needs) => (1000 * r * numberIn(solventDensityForVolume(needs))) / numberIn(needs.soluteMolarMass),
  valueElasticity: one,
  inputs: [soluteMolarMassInput(one), solventDensityInput(minusOne)],
};

/** d ln r/d ln c: ln c = ln w + ln rho(w), and d ln w/d ln r = 1 - w. */
function concentrationElasticity(r: number, needs: Needs): number {
  if (needs.solutionDensity === undefined) return Number.NaN;
  return (1 + r) / concentrationSlope(needs.solutionDensity, r / (1 + r));
}

/** At a fixed c a denser solution holds less solute per solvent: d ln r = -(d ln r/d ln c) d ln rho. */
const densityInputsOfRatio: readonly Input[] = densityInputs.map((input) => ({
  name: input.name,
  symbol: input.symbol,
  unit: "kg/m3",
  quantity: (needs, r) => input.quantity(needs, r / (1 + r)),
  relativeUncertainty: input.relativeUncertainty,
  elasticity: (r, needs) =>
    needs.solutionDensity === undefined
      ? Number.NaN
      : -concentrationElasticity(r, needs) * input.elasticity(needs.solutionDensity, r / (1 + r)),
}));

function ratioAtConcentration(massPerVolume: number, needs: Needs): number {
  if (needs.solutionDensity === undefined || !(massPerVolume > 0)) return Number.NaN;
  return positiveRatio(massRatioAtConcentration(needs.solutionDensity, massPerVolume));
}

function concentrationAtRatio(r: number, needs: Needs): number {
  return needs.solutionDensity === undefined ? Number.NaN : massConcentration(needs.solutionDensity, r);
}

/** Mass of solute per volume of solution (mass concentration): c = w rho, w = r/(1 + r). */
export const massConcentrationEdge: Edge = {
  basis: "mass per volume of solution",
  symbol: "c",
  unit: "kg/m3",
  per: "solution",
  counts: "mass",
  toHubEquation: "r = c/(rho - c)",
  fromHubEquation: "c = r/(1 + r) rho",
  missing: solutionDensityMissing,
  toHub: ratioAtConcentration,
  fromHub: concentrationAtRatio,
  valueElasticity: concentrationElasticity,
  inputs: densityInputsOfRatio,
};

/** Amount of solute per volume of solution (amount concentration): n2/V = 1000 c/M2. */
export const amountConcentrationEdge: Edge = {
  basis: "amount per volume of solution",
  symbol: "n2/V",
  unit: "mol/m3",
  per: "solution",
  counts: "amount",
  toHubEquation: "c = (n2/V) M2/1000; r = c/(rho - c)",
  fromHubEquation: "c = r/(1 + r) rho; n2/V = 1000 c/M2",
  missing: (needs) => [...soluteMolarMassMissing(needs), ...solutionDensityMissing(needs)],
  toHub: (amountPerVolume, needs) =>
    ratioAtConcentration((amountPerVolume * numberIn(needs.soluteMolarMass)) / 1000, needs),
  fromHub: (r, needs) => (1000 * concentrationAtRatio(r, needs)) / numberIn(needs.soluteMolarMass),
  valueElasticity: concentrationElasticity,
  inputs: [soluteMolarMassInput(concentrationElasticity), ...densityInputsOfRatio],
};
