import { FREE_OFFSET, FREE_PRIOR } from "./compete-block.ts";
import type { AcrossSystems, SideBySide } from "./side-by-side.ts";
import { soundThough } from "./side-by-side.ts";

/** How much likelier it is that another solute in the same solvent is off to the same side, or the other. */
const [SAME_SIDE, OTHER_SIDE] = [3, 1];
/** Share of solutes that the water hardly moves. */
const UNMOVED = 0.2;

/**
 * The solvent of one source held water (or another solvent): everything it measured in that solvent is off, one solute
 * more than the other, and its other solvents are not.
 *
 * Computes whether other solutes of the same source in the same organic solvent are off as whole blocks too.
 * Known limitation: one solute says nothing; the amount of water is not estimated, and any other impurity of the solvent
 * gives the same picture.
 */
export const wetSolvent: AcrossSystems = {
  name: "wet solvent",
  lookAt: "Look at the grade and water content (Karl Fischer) of this solvent in this source.",
  readings: [[FREE_OFFSET, FREE_PRIOR, 1]],
  applies: ({ system: { identity } }) => identity.composition === "" && identity.solvent !== "water",
  together: ({ system: a }, { system: b }) =>
    a.identity.solvent === b.identity.solvent && a.identity.solute !== b.identity.solute,
  likelihoodRatio: (first, other) => (first.offset * other.offset > 0 ? SAME_SIDE : OTHER_SIDE),
  ratioIfSound: (first: SideBySide, other) => UNMOVED + (1 - UNMOVED) * soundThough(first.offset, other),
  priorOdds: 0.01,
  detail: (blocks) => `${blocks.length} solutes of this source are off in this solvent`,
};
