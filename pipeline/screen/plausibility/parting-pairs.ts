import type { Flag, RobustFit } from "../../records/fits.ts";
import { inCelsius } from "../../records/temperature-text.ts";
import { materialThreshold } from "../material-threshold.ts";
import { SAME_TEMPERATURE_K } from "../same-temperature.ts";
import { type ScreenInput, sourceName } from "../screen-input.ts";
import { offBy, threeDigits } from "../wording.ts";
import { AGREE_SHARE, comparablePoints } from "./shared-temperatures.ts";

/** Shared temperatures from which two sources show how well they agree, and how well that must be, ln value. */
const [LEAST_SHARED, AGREE_WITHIN] = [3, 0.02];

/**
 * A notice where the only two sources of a system agree closely at all temperatures they share but one: which of the two
 * is wrong there, nobody can tell.
 *
 * @param told whether other flags hold a point already
 */
export function partingPairFlags(input: ScreenInput, told: (system: number, point: number) => boolean): Flag[] {
  return input.fits.flatMap((fit) => {
    if (new Set(fit.points.source).size !== 2) return [];
    const pairs = sharedPairs(input, fit);
    if (pairs.length < LEAST_SHARED) return [];
    const worst = pairs.reduce((a, b) => (Math.abs(b.off) > Math.abs(a.off) ? b : a));
    const most = Math.max(...pairs.filter((pair) => pair !== worst).map(({ off }) => Math.abs(off)));
    // How well the two agree elsewhere says what is usual here, whatever uncertainty is assumed.
    const kind = input.about[fit.system]?.kind ?? "general";
    const material = materialThreshold(fit.points.level[worst.i]!, 0, kind, input.settings);
    const parts = Math.abs(worst.off) >= material && most <= AGREE_WITHIN && most <= AGREE_SHARE * Math.abs(worst.off);
    return parts && !told(fit.system, worst.i) && !told(fit.system, worst.j)
      ? [partingFlag(input, fit, worst, most)]
      : [];
  });
}

/** Two points of two sources at one temperature, and ln of their ratio. */
interface Pair {
  readonly i: number;
  readonly j: number;
  readonly off: number;
}

function sharedPairs(input: ScreenInput, fit: RobustFit): Pair[] {
  const { temperatureK, lnValue, source } = fit.points;
  const usable = comparablePoints(input, fit);
  return usable.flatMap((i) => {
    const j = usable.find(
      (other) => source[other]! > source[i]! && Math.abs(temperatureK[other]! - temperatureK[i]!) < SAME_TEMPERATURE_K,
    );
    return j === undefined ? [] : [{ i, j, off: lnValue[i]! - lnValue[j]! }];
  });
}

function partingFlag(input: ScreenInput, fit: RobustFit, { i, j, off }: Pair, most: number): Flag {
  const { temperatureK, lnValue, source, row } = fit.points;
  const told = (point: number) => {
    const value = input.inReportedUnit(row[i]!, lnValue[point]!);
    return `${sourceName(input, source[point]!)}${value === undefined ? "" : ` (${threeDigits(value)})`}`;
  };
  return {
    ...{ scope: "system", code: "sources-part-once", severity: "notice", system: fit.system },
    evidence:
      `at ${inCelsius(temperatureK[i]!)} ${told(i)} lies ${offBy(off)} ${told(j)}; elsewhere the two agree within ` +
      `${threeDigits(100 * most)} %`,
    lookAt: "Look at both values in the originals, and at the solid: it may change near there.",
  };
}
