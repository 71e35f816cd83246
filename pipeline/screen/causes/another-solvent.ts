import type { Cause } from "./cause.ts";

/** A solvent of which this source reports nothing else is this much less likely to be the one. */
const ELSEWHERE_SHARE = 0.3;

/**
 * The value belongs to another solvent: a cell copied from the column or row beside it.
 *
 * Computes the value as if measured in each other solvent of the same solute and form, and compares it with the curve
 * there. Solvents in which the same source has values go first.
 * Known limitation: solvents of like solubility cannot be told apart; a solvent without a sound curve is not tried.
 */
export const anotherSolvent: Cause = {
  name: "value of another solvent",
  pointPrior: 0.08,
  blockPrior: 0.05,
  lookAt: "Look at whether the value was taken from the column or row of another solvent.",
  explanations: ({ otherSolvents }) => {
    const share = (sameSource: boolean) => (sameSource ? 1 : ELSEWHERE_SHARE);
    const all = otherSolvents.reduce((sum, { sameSource }) => sum + share(sameSource), 0);
    return otherSolvents.map(({ system, name, sameSource }) => ({
      detail: `value of ${name}`,
      weight: share(sameSource) / all,
      change: () => ({ kind: "solvent", system }),
      system,
    }));
  },
};
