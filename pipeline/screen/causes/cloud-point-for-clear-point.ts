import type { Cause } from "./cause.ts";

/** Width of the metastable zone that cooling must cross, K. Common practice. */
const ZONE_K = 10;

/** How much likelier a temperature of the same solution fits if the two were swapped than by chance. */
const OF_ONE_SOLUTION = 20;

/**
 * The temperature at which crystals appeared on cooling was taken for the one at which they vanished on heating: the
 * value belongs to a higher temperature and lies above the curve.
 *
 * Computes, for a single row, its value at the temperature of the other reading of the same solution; for a series,
 * deviations in proportion to the slope of the other sources, upwards only. Only for clear points; needs the
 * curve of another source.
 * Known limitation: the width of the metastable zone is taken as one for the whole series.
 */
export const cloudPointForClearPoint: Cause = {
  name: "cloud point for clear point",
  pointPrior: 0.02,
  blockPrior: 0.25,
  lookAt: "Look at whether the temperatures were read on heating, when the last crystals vanished, or on cooling.",
  explanations: ({ rows, otherReadingK }) =>
    rows.length !== 1
      ? []
      : [
          {
            detail: "its clear and its cloud temperature are swapped",
            weight: 1,
            change: (row) => {
              const temperatureK = otherReadingK(row);
              return temperatureK === undefined ? undefined : { kind: "temperature", temperatureK };
            },
            odds: () => OF_ONE_SOLUTION,
          },
        ],
  bending: {
    rate: 0.03,
    patterns: ({ slope, method }) =>
      slope === undefined || !/clear|cloud|synthetic|heating|cooling/.test(method)
        ? []
        : [
            {
              kind: "growing",
              detail: "temperatures are too low by a constant",
              weight: 1,
              shape: slope,
              sd: ZONE_K,
              irregular: 0.05,
              sign: 1,
            },
          ],
  },
};
