import type { Cause } from "./cause.ts";

/** Units whose numbers are taken for one another: the same scale, another reference. */
const MISTAKEN: readonly (readonly string[])[] = [
  ["g/100 g solvent", "g/100 g solution", "g/100 mL solvent", "g/100 mL solution", "mol %"],
  ["% w/w", "g/100 g solvent", "% w/v", "mol %"],
  ["% w/v", "g/100 g solvent", "g/100 g solution", "g/100 mL solvent"],
  ["mol %", "g/100 g solution", "g/100 g solvent"],
  ["g/kg solvent", "g/kg solution", "g/L solution", "g/L solvent"],
  ["g/kg solution", "g/kg solvent", "g/L solution", "g/L solvent"],
  ["g/L solution", "g/L solvent", "g/kg solvent", "g/kg solution"],
  ["g/L solvent", "g/L solution", "g/kg solvent", "g/kg solution"],
  ["mg/mL solution", "mg/mL solvent", "g/kg solvent", "g/kg solution"],
  ["mg/mL solvent", "mg/mL solution", "g/kg solvent", "g/kg solution"],
  ["g/mL solution", "g/mL solvent", "g/g solvent", "mass fraction"],
  ["g/mL solvent", "g/mL solution", "g/g solvent", "mass fraction"],
  ["mol/L solution", "mol/kg solvent", "mol/L solvent"],
  ["mol/kg solvent", "mol/L solution", "mol/L solvent"],
  ["mol/L solvent", "mol/L solution", "mol/kg solvent"],
  ["mole fraction", "mass fraction", "mole ratio", "g/g solvent"],
  ["mass fraction", "mole fraction", "g/g solvent", "mole ratio"],
  ["mole ratio", "mole fraction", "g/g solvent"],
  ["g/g solvent", "mass fraction", "mole fraction", "g/mL solvent"],
  ["mg/L solution", "mg/kg solution", "mg/kg solvent"],
  ["mg/kg solution", "mg/L solution", "mg/kg solvent"],
  ["10^3 x", "g/kg solution", "g/kg solvent"],
  ["100 w", "g/100 g solvent", "mol %"],
  ["g/100 g solution", "g/100 g solvent", "g/100 mL solution", "g/100 mL solvent", "mol %"],
  ["g/100 mL solution", "g/100 mL solvent", "g/100 g solvent", "g/100 g solution"],
  ["g/100 mL solvent", "g/100 mL solution", "g/100 g solvent", "g/100 g solution"],
];

/** Share of the unit that is listed first, the likeliest one to be mistaken. */
const FIRST_SHARE = 0.5;

const byUnit: ReadonlyMap<string, readonly string[]> = new Map(
  MISTAKEN.map(([unit = "", ...others]) => [unit, others]),
);

/**
 * The number is right, what it is per is not: per solution for per solvent, per volume for per mass, mole for mass
 * fraction.
 *
 * Computes the number in each unit whose numbers look alike. Belongs to a column, so it is likely for a block.
 * Known limitation: at low solubility per solvent and per solution are the same within the noise and cannot be told apart.
 */
export const basisMixUp: Cause = {
  name: "basis mix-up",
  pointPrior: 0.01,
  blockPrior: 0.24,
  lookAt: "Look at what the values are per in the heading of the original table: solvent or solution, mass or volume.",
  explanations: ({ unit }) => {
    const others = byUnit.get(unit) ?? [];
    return others.map((other, i) => ({
      detail: `${unit} should read ${other}`,
      weight: i === 0 ? FIRST_SHARE : (1 - FIRST_SHARE) / (others.length - 1),
      change: () => ({ kind: "unit", unit: other }),
    }));
  },
};
