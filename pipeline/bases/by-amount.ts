import { type Edge, missingOf, positiveRatio } from "./edge.ts";
import { type Needs, numberIn, soluteMolarMassInput, solventMolarMassInput } from "./needs.ts";

const molarMassesMissing = (needs: Needs) =>
  missingOf(["molar mass of the solute", needs.soluteMolarMass], ["molar mass of the solvent", needs.solventMolarMass]);

/** M2/M1, the molar masses of solute and solvent: turns an amount ratio into a mass ratio. */
const molarMassRatio = (needs: Needs) => numberIn(needs.soluteMolarMass) / numberIn(needs.solventMolarMass);

const one = () => 1;
const minusOne = () => -1;

/** Mole fraction of undissociated formula units: x = (r/M2)/(r/M2 + 1/M1). */
export const moleFractionEdge: Edge = {
  basis: "mole fraction",
  symbol: "x",
  unit: "mol/mol",
  per: "solvent",
  counts: "amount",
  toHubEquation: "r = x/(1 - x) M2/M1",
  fromHubEquation: "x = (r/M2)/(r/M2 + 1/M1)",
  missing: molarMassesMissing,
  toHub: (x, needs) => (x < 1 ? positiveRatio((x / (1 - x)) * molarMassRatio(needs)) : Number.NaN),
  fromHub: (r, needs) => r / (r + molarMassRatio(needs)),
  valueElasticity: (r, needs) => 1 + r / molarMassRatio(needs),
  inputs: [soluteMolarMassInput(one), solventMolarMassInput(minusOne)],
};

/** Mole ratio, mol solute per mol solvent: n2/n1 = r M1/M2. */
export const moleRatioEdge: Edge = {
  basis: "mole ratio",
  symbol: "n2/n1",
  unit: "mol/mol",
  per: "solvent",
  counts: "amount",
  toHubEquation: "r = (n2/n1) M2/M1",
  fromHubEquation: "n2/n1 = r M1/M2",
  missing: molarMassesMissing,
  toHub: (ratio, needs) => positiveRatio(ratio * molarMassRatio(needs)),
  fromHub: (r, needs) => r / molarMassRatio(needs),
  valueElasticity: one,
  inputs: [soluteMolarMassInput(one), solventMolarMassInput(minusOne)],
};

/** Molality, mol solute per kg solvent: b = 1000 r/M2 with M2 in g/mol. */
export const molalityEdge: Edge = {
  basis: "amount per mass of solvent",
  symbol: "b",
  unit: "mol/kg",
  per: "solvent",
  counts: "amount",
  toHubEquation: "r = b M2/1000",
  fromHubEquation: "b = 1000 r/M2",
  missing: (needs) => missingOf(["molar mass of the solute", needs.soluteMolarMass]),
  toHub: (molality, needs) => positiveRatio((molality * numberIn(needs.soluteMolarMass)) / 1000),
  fromHub: (r, needs) => (1000 * r) / numberIn(needs.soluteMolarMass),
  valueElasticity: one,
  inputs: [soluteMolarMassInput(one)],
};
