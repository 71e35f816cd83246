import type { Flag } from "../../records/fits.ts";
import type { OffPoint } from "../point-screen.ts";
import type { ScreenInput } from "../screen-input.ts";
import { contradictingUnitFlags } from "./contradicting-units.ts";
import { densityFlags } from "./density-consistency.ts";
import { meltingFlags } from "./melting-limits.ts";
import { partingPairFlags } from "./parting-pairs.ts";
import { sharedTemperatureFlags } from "./shared-temperatures.ts";
import { temperatureEffectFlags } from "./temperature-effect.ts";

/**
 * Notices of what is possible and implausible: nothing here is refused, and nothing asks for a ruling.
 *
 * @param blocked `SYSTEM:SOURCE` of the blocks that are off as a whole
 * @param points points that are off their curve
 */
export function plausibilityFlags(
  input: ScreenInput,
  blocked: ReadonlySet<string>,
  points: readonly OffPoint[],
): Flag[] {
  const off = new Set(points.map(({ system, point }) => `${system}:${point}`));
  const told = (system: number, point: number) =>
    off.has(`${system}:${point}`) || blocked.has(`${system}:${input.fits[system]!.points.source[point]}`);
  return [
    ...meltingFlags(input),
    ...temperatureEffectFlags(input),
    ...sharedTemperatureFlags(input, told),
    ...partingPairFlags(input, told),
    ...densityFlags(input),
    ...contradictingUnitFlags(input),
  ];
}
