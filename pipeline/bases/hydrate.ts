/**
 * A hydrate or solvate brings solvent of its own. Where its guest is a component of the solvent that guest joins the
 * solvent, and a mass "per 100 g water" can be read in three ways. With R = M(crystal)/M(unsolvated solute):
 *
 * - r  g unsolvated solute per g total solvent (the hub; "anhydrous")
 * - a  g crystal per g solvent added:           r = a/(R + a (R - 1))
 * - e  g crystal equivalent per g total solvent: r = e/R
 *
 * CuSO4·5H2O at 20 °C: r = 0.207, a = 0.367, e = 0.324.
 *
 * A salt (or co-crystal) and its free acid or base obey the third equation alone, for no counter-ion joins the solvent:
 * with the free acid or base as solute and the salt as its form, "anhydrous" is the mass of the free acid or base and
 * "hydrate equivalent per total solvent" that of the salt, R = M(salt)/M(free). There is no other way to say it.
 */
export type SoluteBasis = "anhydrous" | "hydrate per added solvent" | "hydrate equivalent per total solvent";

/** r [kg/kg] of a mass a of crystal per mass of solvent added; R > 1. Below 1/(R - 1) for every a. */
export function ratioFromAddedSolvent(a: number, R: number): number {
  return a / (R + a * (R - 1));
}

/**
 * Mass of crystal per mass of solvent to be added a = r R/(1 - r (R - 1)) for a total-solvent ratio r.
 * NaN where r (R - 1) >= 1: the crystal melts in its own solvent, nothing has to be added.
 */
export function addedSolventFromRatio(r: number, R: number): number {
  const added = 1 - r * (R - 1);
  return added > 0 ? (r * R) / added : Number.NaN;
}

/** r [kg/kg] of a mass e of crystal equivalent per mass of total solvent: r = e/R. */
export function ratioFromEquivalent(e: number, R: number): number {
  return e / R;
}

/** Mass of crystal equivalent per mass of total solvent: e = r R. */
export function equivalentFromRatio(r: number, R: number): number {
  return r * R;
}

/**
 * Mass fraction of the guest in the total solvent once the crystal's own has joined it. Of each gram of total solvent
 * r (R - 1) came with the crystal: w = w0 (1 - r (R - 1)) + r (R - 1), with w0 the fraction in the solvent added.
 */
export function guestFractionInTotalSolvent(guestFractionAdded: number, r: number, R: number): number {
  const fromCrystal = r * (R - 1);
  return guestFractionAdded * (1 - fromCrystal) + fromCrystal;
}
