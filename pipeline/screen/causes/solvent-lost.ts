import type { Cause } from "./cause.ts";
import { growing } from "./pattern.ts";

/**
 * Solvent evaporated before or while sampling: what was analysed is too high, only at the hot end, and the more so the
 * hotter.
 *
 * Computes deviations that start at one of the temperatures of the series and grow upwards to the hot end. Needs another
 * source there: without one it looks like a curve that steepens.
 * Known limitation: a solute that decomposes or melts there gives the same picture.
 */
export const solventLost: Cause = {
  name: "solvent lost",
  pointPrior: 0,
  blockPrior: 0.03,
  lookAt: "Look at whether the vessel was closed and weighed before and after; measure the hottest point again.",
  explanations: () => [],
  bending: {
    rate: 0.008,
    patterns: (series) => growing(series, 1, 1, "too high at the hot end, the more so the hotter"),
  },
};
