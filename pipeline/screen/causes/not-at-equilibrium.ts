import type { Cause } from "./cause.ts";
import { growing } from "./pattern.ts";

/** Too short a time to dissolve is commoner than too short a time to crystallise. Common practice. */
const FROM_BELOW = 0.6;

/**
 * The slurry had not come to rest: at the cold end, where dissolving and crystallising are slowest, the value is too low
 * (approached from below) or too high (approached from above), the more so the colder.
 *
 * Computes deviations that start at one of the temperatures of the series and grow to the cold end, either way. Needs
 * another source there.
 * Known limitation: a whole series that was stirred too short a time is a block that is low, and is not named so.
 */
export const notAtEquilibrium: Cause = {
  name: "not at equilibrium",
  pointPrior: 0,
  blockPrior: 0.03,
  lookAt:
    "Look at the time of equilibration and the direction of approach; measure the coldest point again from both sides.",
  explanations: () => [],
  bending: {
    rate: 0.01,
    patterns: (series) => [
      ...growing(series, -1, -1, "too low at the cold end, as if approached from below").map((pattern) => ({
        ...pattern,
        weight: pattern.weight * FROM_BELOW,
      })),
      ...growing(series, -1, 1, "too high at the cold end, as if approached from above").map((pattern) => ({
        ...pattern,
        weight: pattern.weight * (1 - FROM_BELOW),
      })),
    ],
  },
};
