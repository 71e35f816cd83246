import type { Cause } from "./cause.ts";

/** Width of the metastable zone that cooling must cross, K. Common practice. */
const ZONE_K = 10;

/**
 * The temperature at which crystals appeared on cooling was taken for the one at which they vanished on heating: the
 * value belongs to a higher temperature and lies above the curve.
 *
 * Computes deviations in proportion to the slope of the other sources, upwards only. Only for clear points; needs the
 * curve of another source.
 * Known limitation: the width of the metastable zone is taken as one for the whole series.
 */
export const cloudPointForClearPoint: Cause = {
  name: "cloud point for clear point",
  pointPrior: 0,
  blockPrior: 0.08,
  lookAt: "Look at whether the temperatures were read on heating, when the last crystals vanished, or on cooling.",
  explanations: () => [],
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
              irregular: 0.2,
              sign: 1,
            },
          ],
  },
};
