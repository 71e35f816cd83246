import type { Cause } from "./cause.ts";
import { growing } from "./pattern.ts";

/**
 * Solute crystallised in a filter, needle or pipette colder than the solution: what was analysed is too low, only at the
 * hot end, and the more so the hotter.
 *
 * Computes deviations that start at one of the temperatures of the series and grow downwards to the hot end. Needs
 * another source there: without one it looks like a change of the solid phase.
 * Known limitation: a jacket read for the solution bends the hot end alike; the cold end tells them apart.
 */
export const lossOnFiltration: Cause = {
  name: "loss on filtration",
  pointPrior: 0,
  blockPrior: 0.04,
  lookAt:
    "Look at the temperature of filter, needle and pipette; measure the hottest point again with everything preheated.",
  explanations: () => [],
  bending: {
    rate: 0.012,
    patterns: (series) => growing(series, 1, -1, "too low at the hot end, the more so the hotter"),
  },
};
