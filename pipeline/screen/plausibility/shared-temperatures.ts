import type { Flag, RobustFit } from "../../records/fits.ts";
import { RepeatKind } from "../../records/repeats.ts";
import { inCelsius } from "../../records/temperature-text.ts";
import { isOutsideLiquid } from "../liquid-range.ts";
import { middle } from "../middle.ts";
import { SAME_TEMPERATURE_K } from "../same-temperature.ts";
import { type ScreenInput, sourceName, thresholdOf } from "../screen-input.ts";
import { counted, listed, offBy } from "../wording.ts";

/** A value is off the others beyond this many standard deviations of the difference. */
const OFF_Z = 4;
/** Others agree where they lie within this share of the distance to the value that is off. */
export const AGREE_SHARE = 0.33;

/** A value that parts from those of the other sources at its temperature. */
interface Parted {
  readonly point: number;
  readonly others: readonly number[];
  /** Distance from the mean of the others, ln value. */
  readonly off: number;
}

/**
 * Notices of values that part from two or more other sources which agree at the very same temperature: no curve is
 * needed to see it, and none hides it where a source leaves the others over half of its range. Tables on round
 * temperatures are the usual case. Copies are no other sources, and values flagged already are left out.
 *
 * @param told `SYSTEM:POINT` of the points that other flags hold
 */
export function sharedTemperatureFlags(input: ScreenInput, told: (system: number, point: number) => boolean): Flag[] {
  return input.fits.flatMap((fit) => {
    if (fit.agreement === "conflict" || new Set(fit.points.source).size < 3) return [];
    const bySource = new Map<number, Parted[]>();
    for (const parted of partedPoints(input, fit)) {
      if (told(fit.system, parted.point)) continue;
      const source = fit.points.source[parted.point]!;
      bySource.set(source, [...(bySource.get(source) ?? []), parted]);
    }
    return [...bySource].map(([source, parted]) => partedFlag(input, fit, source, parted));
  });
}

/** Points that count and can be compared. */
export function comparablePoints(input: ScreenInput, { system, points, repeats }: RobustFit): number[] {
  const counts = (i: number) => repeats === undefined || repeats.kind[i] === RepeatKind.counts;
  return [...points.row.keys()].filter(
    (i) => counts(i) && Number.isFinite(points.lnValue[i]) && !isOutsideLiquid(input, system, i),
  );
}

/** Other points at the temperature of one of them, in points sorted by temperature. */
function atTemperatureOf({ points: { temperatureK } }: RobustFit, sorted: readonly number[], at: number): number[] {
  const T = temperatureK[sorted[at]!]!;
  const same = (k: number) => Math.abs((temperatureK[sorted[k]!] ?? Number.NaN) - T) < SAME_TEMPERATURE_K;
  let [from, to] = [at, at + 1];
  while (from > 0 && same(from - 1)) from--;
  while (to < sorted.length && same(to)) to++;
  return to - from < 3 ? [] : sorted.slice(from, to);
}

function partedPoints(input: ScreenInput, fit: RobustFit): Parted[] {
  const { points, noiseSd, betweenSd } = fit;
  // A source that scatters widely is judged by what is usual: its own scatter must not excuse it.
  const usualNoise = middle([...noiseSd]);
  const usable = comparablePoints(input, fit).sort((a, b) => points.temperatureK[a]! - points.temperatureK[b]!);
  return usable.flatMap((i, at): Parted[] => {
    const others = atTemperatureOf(fit, usable, at).filter((j) => points.source[j] !== points.source[i]);
    if (new Set(others.map((j) => points.source[j])).size < 2) return [];
    const values = others.map((j) => points.lnValue[j]!);
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const off = points.lnValue[i]! - mean;
    const spread = Math.max(...values) - Math.min(...values);
    const sd = Math.sqrt((betweenSd ** 2 + usualNoise ** 2) * (1 + 1 / values.length));
    const parted = Math.abs(off) > Math.max(thresholdOf(input, fit.system, i), OFF_Z * sd);
    return parted && spread < AGREE_SHARE * Math.abs(off) ? [{ point: i, others, off }] : [];
  });
}

function partedFlag(input: ScreenInput, fit: RobustFit, source: number, parted: readonly Parted[]): Flag {
  const { row, temperatureK } = fit.points;
  const temperatures = parted.map(({ point }) => temperatureK[point]!);
  const [low, high] = [Math.min(...temperatures), Math.max(...temperatures)];
  const where = low === high ? `at ${inCelsius(low)}` : `from ${inCelsius(low)} to ${inCelsius(high)}`;
  const others = new Set(parted.flatMap(({ others: points }) => points.map((j) => fit.points.source[j]!)));
  const names = listed([...others].sort((a, b) => a - b).map((other) => sourceName(input, other)));
  const flag = {
    ...({ code: "off-the-others", severity: "notice", source, system: fit.system } as const),
    evidence:
      `${counted(parted.length, "value")} of ${sourceName(input, source)} ${where} lie, in the middle, ` +
      `${offBy(middle(parted.map(({ off }) => off)))} those of ${names} at the same temperatures, which agree`,
    lookAt: "Look at these values in the original; where the others are newer tables, an old value may live on in it.",
  };
  return parted.length === 1
    ? { ...flag, scope: "measurement", row: row[parted[0]!.point]! }
    : { ...flag, scope: "block" };
}
