import type { Cause } from "./cause.ts";

/**
 * The value belongs to another solvent: a cell copied from the column or row beside it.
 *
 * Computes the value as if measured in each other solvent in which the same source has the same solute, and compares
 * it with the curve there.
 * Known limitation: solvents of like solubility cannot be told apart; a solvent without a sound curve is not tried.
 */
export const anotherSolvent: Cause = {
  name: "value of another solvent",
  pointPrior: 0.08,
  blockPrior: 0.05,
  lookAt: "Look at whether the value was taken from the column or row of another solvent.",
  explanations: ({ otherSolvents }) =>
    otherSolvents.map(({ system, name }) => ({
      detail: `value of ${name}`,
      weight: 1 / otherSolvents.length,
      change: () => ({ kind: "solvent", system }),
      system,
    })),
};
