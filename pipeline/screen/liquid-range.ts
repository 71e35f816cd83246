import type { Flag } from "../records/fits.ts";
import { inCelsius } from "../records/temperature-text.ts";
import { blocksOf } from "./block-screen.ts";
import type { ScreenedSystem, ScreenInput } from "./screen-input.ts";
import { sourceName } from "./screen-input.ts";
import { counted } from "./wording.ts";

/** A solute lowers the freezing point of its solvent; this much (K per unit of mole fraction) is left unremarked. */
const FREEZING_DEPRESSION_K = 300;
/** Temperatures are reported to about this, K. */
const MARGIN_K = 1;

/**
 * Notices of temperatures above the normal boiling point of the solvent or below its freezing point: one for a row,
 * one for a block where several rows of a source are concerned.
 */
export function liquidRangeFlags(input: ScreenInput): Flag[] {
  return input.fits.flatMap((fit) => {
    const about = input.about[fit.system];
    if (about === undefined || !mayBeOutside(about, fit.points.temperatureK)) return [];
    return [...blocksOf(fit)].flatMap(([source, points]): Flag[] => {
      const outside = points.filter((i) =>
        isOutside(about, fit.points.temperatureK[i]!, input.table.moleFraction[fit.points.row[i]!]!),
      );
      if (outside.length === 0) return [];
      const temperatures = outside.map((i) => fit.points.temperatureK[i]!);
      const flag = {
        code: "outside-liquid-range",
        severity: "notice",
        source,
        system: fit.system,
        evidence: evidence(about, temperatures, sourceName(input, source)),
        lookAt: "Look at the temperature and its scale; above the boiling point the vessel must have been closed.",
      } as const;
      return outside.length === 1
        ? [{ ...flag, scope: "measurement", row: fit.points.row[outside[0]!]! }]
        : [{ ...flag, scope: "block" }];
    });
  });
}

function mayBeOutside({ boilingPointK, freezingPointK }: ScreenedSystem, temperatureK: Float64Array): boolean {
  return temperatureK.some((T) => T > boilingPointK || T < freezingPointK);
}

/** Whether a point of a system lies outside the liquid range of its solvent. */
export function isOutsideLiquid(input: ScreenInput, system: number, point: number): boolean {
  const about = input.about[system];
  const { temperatureK, row } = input.fits[system]!.points;
  return about !== undefined && isOutside(about, temperatureK[point]!, input.table.moleFraction[row[point]!]!);
}

function isOutside(about: ScreenedSystem, temperatureK: number, moleFraction: number): boolean {
  const depression = moleFraction > 0 ? FREEZING_DEPRESSION_K * moleFraction : 0;
  return temperatureK > about.boilingPointK + MARGIN_K || temperatureK < about.freezingPointK - MARGIN_K - depression;
}

function evidence(about: ScreenedSystem, temperatures: readonly number[], name: string): string {
  const [low, high] = [Math.min(...temperatures), Math.max(...temperatures)];
  const where = low === high ? inCelsius(low) : `${inCelsius(low)} to ${inCelsius(high)}`;
  const limits = [
    high > about.boilingPointK
      ? `above the normal boiling point of the solvent, ${inCelsius(about.boilingPointK)}`
      : "",
    low < about.freezingPointK ? `below its freezing point, ${inCelsius(about.freezingPointK)}` : "",
  ].filter((text) => text !== "");
  return `${counted(temperatures.length, "point")} of ${name} at ${where}: ${limits.join(" and ")}`;
}
