import { middle } from "../middle.ts";
import { threeDigits } from "../wording.ts";
import type { AcrossSystems } from "./across-systems.ts";

/** Two forms of a solute differ by at most about this factor in solubility. Common practice. */
const LARGEST_RATIO = Math.log(5);
/** Ratios of one pair of forms in two solvents agree to about this, ln value: they drift with temperature. */
const DRIFT_SD = 0.05;
/** Spread of offsets that have nothing to do with one another, ln value. */
const ANY_SD = 0.6;

/**
 * The solid was another form than that of the other sources: for two unsolvated forms the ratio of solubilities is nearly
 * the same in every solvent.
 *
 * Computes how well the offset of a block agrees with those of the same source and solute in other solvents.
 * Known limitation: a wrong molar mass, an impure lot or a wrong calibration of this solute give one ratio as well; a
 * single solvent says nothing, and which form it was is not known.
 */
export const anotherSolidForm: AcrossSystems = {
  name: "another solid form",
  lookAt:
    "Look at the solid at the end of the measurement (XRPD, Raman) and at the lot: this source may have had another form.",
  applies: ({ offset, deviations, threshold }) =>
    Math.abs(offset) < LARGEST_RATIO && middle(deviations.map((deviation) => Math.abs(deviation - offset))) < threshold,
  together: (a, b) => a.identity.solute === b.identity.solute && a.identity.solvent !== b.identity.solvent,
  likelihoodRatio: (first, second) => {
    const variance = DRIFT_SD ** 2 + (first.offset / first.z) ** 2 + (second.offset / second.z) ** 2;
    const apart = second.offset - first.offset;
    const same = Math.exp((-0.5 * apart * apart) / variance) / Math.sqrt(variance);
    return same / (Math.exp(-0.5 * (second.offset / ANY_SD) ** 2) / ANY_SD);
  },
  priorOdds: 0.4,
  detail: (blocks) =>
    `the same ratio in ${blocks.length} solvents: ${blocks.map(({ offset }) => threeDigits(Math.exp(offset))).join(", ")}`,
};
