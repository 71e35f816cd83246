import type { Flag } from "../records/fits.ts";
import { inCelsius } from "../records/temperature-text.ts";
import type { EndRun } from "./end-runs.ts";
import type { OffPoint } from "./point-screen.ts";
import { type ScreenInput, sourceName } from "./screen-input.ts";
import { offBy } from "./wording.ts";

/** A cause must be this sure for one of two sources to be taken for the wrong one. */
export const SURE = 0.8;

/** Whether an off point lies where its two sources part. */
export function isContested(
  { fits }: ScreenInput,
  { system, point }: OffPoint,
  { nearK: [low, high] }: EndRun,
): boolean {
  const T = fits[system]!.points.temperatureK[point]!;
  return T >= low && T <= high;
}

/**
 * The flag of a system whose two sources agree over most of their range and part at one end: no majority there, both
 * readings laid out, no row blamed.
 */
export function contestedFlag(input: ScreenInput, { system, point }: OffPoint, run: EndRun): Flag {
  const { points, deviation, soundSources } = input.fits[system]!;
  const own = points.source[point]!;
  const other = soundSources.find((source) => source !== own)!;
  const temperatures = [...run.points].map((one) => points.temperatureK[one]!);
  return {
    scope: "system",
    code: "sources-disagree",
    severity: "blocking",
    system,
    evidence:
      `${sourceName(input, own)} and ${sourceName(input, other)} agree but for one end: from ` +
      `${inCelsius(Math.min(...temperatures))} to ${inCelsius(Math.max(...temperatures))} they part, at the end ` +
      `${sourceName(input, own)} lies ${offBy(deviation[run.outermost]!)} the curve that follows ` +
      `${sourceName(input, other)}, and no third source says which is right`,
    lookAt:
      "Look at the solid, the filter, the closed vessel and the time of equilibration of both sources at that end, or " +
      "measure one point there again.",
  };
}
