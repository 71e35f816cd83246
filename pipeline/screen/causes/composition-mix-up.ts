import type { Cause } from "./cause.ts";
import { takenFrom } from "./taken-from.ts";

/**
 * In a solvent mixture the proportion stands the wrong way round, or is that of the column or row beside it.
 *
 * Computes the value as if measured in each other proportion of the same solvents, and compares it with the curve there.
 * Known limitation: a proportion that nobody else measured is not tried.
 */
export const compositionMixUp: Cause = {
  name: "composition mix-up",
  pointPrior: 0.08,
  blockPrior: 0.15,
  lookAt:
    "Look at the proportion of the solvents: which one it counts, and whether it is that of the row or column beside.",
  explanations: (suspects) => takenFrom(suspects.otherCompositions, suspects),
};
