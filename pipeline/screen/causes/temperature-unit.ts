import type { Cause } from "./cause.ts";

const SCALES = ["°C", "K", "°F"] as const;

/**
 * The temperature was read on the wrong scale: °F for °C or the reverse, K for °C.
 *
 * Computes the temperature anew on each other scale and compares the value with the curve there. Belongs to a column.
 * Known limitation: near -40 degrees °C and °F agree.
 */
export const temperatureUnit: Cause = {
  name: "temperature unit",
  pointPrior: 0.008,
  blockPrior: 0.15,
  lookAt: "Look at the scale of the temperature column: °C, K or °F.",
  explanations: () =>
    SCALES.map((scale) => ({
      detail: `temperature is in ${scale}`,
      weight: 1 / SCALES.length,
      change: () => ({ kind: "temperature scale", scale }),
    })),
};
