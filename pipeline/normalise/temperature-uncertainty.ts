import type { Settings } from "../records/settings.ts";

/**
 * Standard uncertainty of a temperature, K, where none is stated: by probe (a jacket probe also in proportion to its
 * distance from room temperature); a clear point by heating rate, a rate that is not stated (NaN) counting as fast.
 */
export function defaultTemperatureUncertainty(
  temperatureK: number,
  probe: string,
  clearPoint: boolean,
  heatingRateKPerMin: number,
  settings: Settings,
): number {
  const {
    temperature_uncertainty_K: u,
    room_temperature_K: room,
    jacket_uncertainty_per_K_from_room: slope,
  } = settings;
  const byProbe = probe === "solution" || probe === "bath" || probe === "jacket" ? u[probe] : u.unspecified;
  const fromRoom = probe === "jacket" ? slope * Math.abs(temperatureK - room.low) : 0;
  if (!clearPoint) return byProbe + fromRoom;
  const byRate =
    heatingRateKPerMin <= 0.3
      ? u.clear_point_to_0_3_K_per_min
      : heatingRateKPerMin <= 1
        ? u.clear_point_to_1_K_per_min
        : u.clear_point_faster;
  return Math.max(byProbe + fromRoom, byRate);
}
