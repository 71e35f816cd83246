import type { Cause } from "./cause.ts";
import { takenFrom } from "./taken-from.ts";

/**
 * The value belongs to another solvent: a cell copied from the column or row beside it.
 *
 * Computes the value as if measured in each other solvent of the same solute and form, and compares it with the curve
 * there; that the very number stands there at that temperature speaks for it by all its digits, curve or none. Solvents
 * in which the same source has values go first.
 * Known limitation: solvents of like solubility cannot be told apart; without a sound curve there, only the very number is
 * looked for.
 */
export const anotherSolvent: Cause = {
  name: "value of another solvent",
  pointPrior: 0.13,
  blockPrior: 0.05,
  lookAt: "Look at whether the value was taken from the column or row of another solvent.",
  explanations: (suspects) => takenFrom(suspects.otherSolvents, suspects),
};
