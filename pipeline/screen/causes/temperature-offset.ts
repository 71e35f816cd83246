import type { Cause } from "./cause.ts";
import type { Pattern } from "./pattern.ts";

/** Usual error of a thermometer that is off by a constant, K, and of a jacket read for the solution, part of the distance from room. */
export const [CONSTANT_SD_K, JACKET_SD] = [5, 0.1];
export const ROOM_K = 296;
/** The two ways, in words. */
export const BY_CONSTANT = "temperatures are off by a constant";
export const FROM_ROOM = "temperatures are off in proportion to their distance from room";

/**
 * The thermometer was off by a constant, or the jacket was read for the solution, which lags behind in proportion to the
 * distance from room temperature.
 *
 * Computes deviations in proportion to the slope d ln s/dT of the other sources, times a constant or times T - 296 K.
 * Needs the curve of another source.
 * Known limitation: where the slope hardly changes over the range, a constant offset looks like a factor and stays without
 * a name; the linear approximation holds to about 15 K.
 */
export const temperatureOffset: Cause = {
  name: "temperature offset",
  pointPrior: 0,
  blockPrior: 0.14,
  lookAt:
    "Look at where the temperature was read (solution, bath or jacket) and at the last calibration of the thermometer.",
  explanations: () => [],
  bending: {
    rate: 0.015,
    patterns: ({ temperatureK, slope, curve }): Pattern[] => {
      if (slope === undefined || curve === undefined) return [];
      // What was measured at another temperature, as a secant of the curve instead of its tangent.
      const moved = (by: (T: number) => number) => (amplitude: number) =>
        temperatureK.map((T) => (curve(T + amplitude * by(T)) - curve(T)) / amplitude);
      return [
        {
          ...{ kind: "growing", detail: BY_CONSTANT, weight: 0.5, sign: 0, irregular: 0 },
          ...{ shape: slope, shapeAt: moved(() => 1), sd: CONSTANT_SD_K },
        },
        {
          ...{ kind: "growing", detail: FROM_ROOM },
          ...{ weight: 0.5, sign: 0, irregular: 0, sd: JACKET_SD },
          shape: temperatureK.map((T, i) => slope[i]! * (T - ROOM_K)),
          shapeAt: moved((T) => T - ROOM_K),
        },
      ];
    },
  },
};
