import { type Edge, positiveRatio } from "./edge.ts";

/** Mass ratio, g solute per g solvent: the hub itself. */
export const massRatioEdge: Edge = {
  basis: "mass ratio",
  symbol: "r",
  unit: "kg/kg",
  per: "solvent",
  counts: "mass",
  toHubEquation: "r = m2/m1",
  fromHubEquation: "m2/m1 = r",
  missing: () => [],
  toHub: positiveRatio,
  fromHub: (r) => r,
  valueElasticity: () => 1,
  inputs: [],
};

/** Mass fraction, g solute per g solution: w = r/(1 + r). */
export const massFractionEdge: Edge = {
  basis: "mass fraction",
  symbol: "w",
  unit: "kg/kg",
  per: "solution",
  counts: "mass",
  toHubEquation: "r = w/(1 - w)",
  fromHubEquation: "w = r/(1 + r)",
  missing: () => [],
  toHub: (w) => (w < 1 ? positiveRatio(w / (1 - w)) : Number.NaN),
  fromHub: (r) => r / (1 + r),
  valueElasticity: (r) => 1 + r,
  inputs: [],
};
