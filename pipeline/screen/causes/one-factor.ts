import { FREE_OFFSET, FREE_PRIOR } from "./compete-block.ts";
import { LOOK_AGAIN } from "./compete-point.ts";
import { type AcrossSystems, isParallel, oneOffset, soundThough } from "./side-by-side.ts";

/** Offsets by one wrong stock or balance agree to about this, ln value. */
const ONE_SD = 0.02;

/**
 * Everything a source measured is off by one factor: a calibration, a balance, a stock. No cause of the list; it keeps
 * those that would explain a few of its blocks from being named.
 *
 * Computes how well the offset of a block agrees with those of the blocks of all other solutes of its source, sound
 * ones included.
 */
export const oneFactor: AcrossSystems = {
  name: undefined,
  lookAt: LOOK_AGAIN,
  readings: [[FREE_OFFSET, FREE_PRIOR, 1]],
  applies: isParallel,
  // Of one solute alone, one ratio may as well be another form.
  together: ({ system: a }, { system: b }) => a.identity.solute !== b.identity.solute,
  likelihoodRatio: (first, other) => oneOffset(first, other, ONE_SD),
  ratioIfSound: (first, other) => soundThough(first.offset, other),
  priorOdds: 0.02,
  detail: () => "",
};
