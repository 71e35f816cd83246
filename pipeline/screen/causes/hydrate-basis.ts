import type { SoluteBasisReading } from "../../records/reread.ts";
import type { Cause } from "./cause.ts";

const READINGS: readonly SoluteBasisReading[] = [
  "anhydrous",
  "hydrate per added solvent",
  "hydrate equivalent per total solvent",
];

/**
 * The solute was weighed as its hydrate (or solvate) and read as anhydrous, or the reverse, or the crystal water was
 * counted with the wrong side.
 *
 * Computes the value under each reading of the solute's mass; impossible for a solute that has no known hydrate.
 * Known limitation: needs the stoichiometry of the hydrate; a mixture of hydrates is not tried.
 */
export const hydrateBasis: Cause = {
  name: "hydrate basis",
  pointPrior: 0.006,
  blockPrior: 0.2,
  lookAt:
    "Look at what was weighed in or dried out: the hydrate or the anhydrous solute, and which water it was counted with.",
  explanations: () =>
    READINGS.map((basis) => ({
      detail: basis === "anhydrous" ? "mass is that of the anhydrous solute" : `mass is ${basis}`,
      weight: 1 / READINGS.length,
      change: () => ({ kind: "solute basis", basis }),
    })),
};
