import type { Cause } from "./cause.ts";
import type { Pattern } from "./pattern.ts";

/** Points that must lie on the plateau. */
const LEAST_ON_PLATEAU = 2;

/**
 * No solid was left: from some temperature on the values stay at what was charged, whatever the temperature. They are
 * lower bounds and no solubilities.
 *
 * Computes one common value for the hottest two, three ... points of the series.
 * Known limitation: one point alone on the plateau cannot be told from a loss; a solubility that hardly changes with
 * temperature has no plateau to see.
 */
export const everythingDissolved: Cause = {
  name: "everything dissolved",
  pointPrior: 0,
  blockPrior: 0.04,
  lookAt:
    "Look at whether solid was left at these temperatures: values that stay at what was charged are lower bounds " +
    "(`excess_solid: no`).",
  explanations: () => [],
  bending: {
    rate: 0.012,
    patterns: ({ temperatureK, lnValue }) => {
      const starts = temperatureK.flatMap((T, i) =>
        i > 0 && i <= temperatureK.length - LEAST_ON_PLATEAU && T > temperatureK[i - 1]! ? [i] : [],
      );
      return starts.map((from): Pattern => {
        const onPlateau = lnValue.length - from;
        return {
          kind: "level",
          detail: `the ${onPlateau} hottest values are the same`,
          weight: 1 / starts.length,
          from,
        };
      });
    },
  },
};
