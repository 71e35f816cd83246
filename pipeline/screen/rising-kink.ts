import type { Flag, SystemFit } from "../records/fits.ts";
import { inCelsius } from "../records/temperature-text.ts";
import { threeDigits } from "./wording.ts";

/**
 * One notice for every system whose slope d ln value/dT rises on heating at a break. At an equilibrium transition of the
 * solid the slope falls, because the form stable above it dissolves with the smaller heat: whatever this is, it is
 * none.
 */
export function risingKinkFlags(fits: readonly Pick<SystemFit, "robust" | "kink">[]): Flag[] {
  return fits.flatMap(({ robust, kink }) => {
    if (kink === undefined) return [];
    const { temperatureK, probability, slopeBelow, slopeAbove } = kink;
    const perKelvin = (slope: number) => `${threeDigits(100 * slope)} % per K`;
    return [
      {
        scope: "system",
        code: "rising-kink",
        severity: "notice",
        system: robust.system,
        evidence: `the slope rises on heating near ${inCelsius(temperatureK)}, from ${perKelvin(slopeBelow)} below to ${perKelvin(slopeAbove)} above (p = ${probability.toFixed(3)} under one smooth curve); at an equilibrium transition of the solid it falls`,
        lookAt:
          "Look at the solid at both ends: two forms mixed in one series, the form of the cold end not yet converted, decomposition or loss of " +
          "solvent when hot, or loss on cold filters. A solid that melts or a liquor that splits in two also bends a curve upwards.",
      } as const,
    ];
  });
}
