import { threeDigits } from "../wording.ts";
import { DRIFTING_OFFSET, DRIFTING_PRIOR, FREE_OFFSET, FREE_PRIOR } from "./compete-block.ts";
import { type AcrossSystems, isParallel, oneOffset, soundThough } from "./side-by-side.ts";

/** Two forms of a solute differ by at most about this factor in solubility. Common practice. */
const LARGEST_RATIO = Math.log(5);
/** Ratios of one pair of forms in two solvents agree to about this, ln value: they drift with temperature. */
const DRIFT_SD = 0.05;
/** Share of forms whose ratio drifts as expected; the others drift little. */
const DRIFTING_SHARE = 0.6;

/**
 * The solid was another form than that of the other sources: for two unsolvated forms the ratio of solubilities is nearly
 * the same in every solvent and drifts slowly with temperature.
 *
 * Computes how well the offset of a block agrees with those of the same source and solute in other solvents; a sound block
 * of theirs speaks against it, and so does the same ratio for every other solute (`one-factor.ts`).
 * Known limitation: a wrong molar mass, an impure lot or a wrong calibration of this solute give one ratio as well; a
 * single solvent says nothing, and which form it was is not known.
 */
export const anotherSolidForm: AcrossSystems = {
  name: "another solid form",
  lookAt:
    "Look at the solid at the end of the measurement (XRPD, Raman) and at the lot: this source may have had another form.",
  readings: [
    [FREE_OFFSET, FREE_PRIOR, 1 - DRIFTING_SHARE],
    [DRIFTING_OFFSET, DRIFTING_PRIOR, DRIFTING_SHARE],
  ],
  applies: (block) => Math.abs(block.offset) < LARGEST_RATIO && isParallel(block),
  together: ({ system: a }, { system: b }) =>
    a.identity.solute === b.identity.solute && a.identity.solvent !== b.identity.solvent,
  likelihoodRatio: (first, other) => oneOffset(first, other, DRIFT_SD),
  ratioIfSound: (first, other) => soundThough(first.offset, other),
  priorOdds: 0.05,
  detail: (blocks) =>
    `the same ratio in ${blocks.length} solvents: ${blocks.map(({ offset }) => threeDigits(Math.exp(offset))).join(", ")}`,
};
