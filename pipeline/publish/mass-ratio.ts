import type { Identity, System } from "../records/systems.ts";

/**
 * Mass ratio r [g/g] of a mole fraction x: r = x M2/((1 - x) M1), molar masses in g/mol.
 * @see IUPAC, Quantities, Units and Symbols in Physical Chemistry (2007), section 2.10.
 */
export function massRatioFromMoleFraction(x: number, { soluteMolarMass, solventMolarMass }: Identity): number {
  return (x * soluteMolarMass) / ((1 - x) * solventMolarMass);
}

/** Mass ratio of what a system's fit gives: x or r itself, from its logarithm. */
export function massRatioFromLn(lnValue: number, { fitBasis, identity }: System): number {
  const value = Math.exp(lnValue);
  return fitBasis === "ln x" ? massRatioFromMoleFraction(value, identity) : value;
}
