import { relativeRounding } from "../../numerics/decimal-rounding.ts";
import type { RobustFit } from "../../records/fits.ts";
import { middle } from "../middle.ts";
import { isPossibleTemperature } from "../possible-temperature.ts";
import { SAME_TEMPERATURE_K } from "../same-temperature.ts";
import type { ScreenInput } from "../screen-input.ts";
import { fitSources, predict, predictCurve, type Series, type SystemModel, seriesLogDensity } from "../system-model.ts";
import { bentReadings, LEFT_OVER } from "./bent-block.ts";
import type { Cause, CauseName, Explanation, Suspects } from "./cause.ts";
import { EVERY_CAUSE } from "./every-cause.ts";
import { logSum } from "./log-sum.ts";
import type { Pattern } from "./pattern.ts";
import { bentSeries } from "./pattern-density.ts";

/** Readings of a block that are no mistake of a known kind. */
export const AS_READ = "as read";
export const FREE_OFFSET = "free offset";
export const DRIFTING_OFFSET = "drifting offset";

/** One reading of a whole block: its weight before the sources are compared (ln), and what it says. */
export interface BlockReading {
  /** Key that is the same for the same mistake in every block of a source. */
  readonly key: string;
  readonly cause: CauseName | undefined;
  readonly detail: string;
  readonly lookAt: string;
  readonly logPrior: number;
  readonly logDensity: number;
}

/** A block to be explained. */
export interface BlockCase {
  readonly input: ScreenInput;
  readonly models: readonly [own: SystemModel, other: SystemModel];
  readonly fit: RobustFit;
  /** Points of the block, in the order of `suspects.rows`. */
  readonly points: readonly number[];
  readonly source: number;
  readonly suspects: Suspects;
  readonly threshold: number;
}

/** Prior probability that a block is sound as read, and that an off block has no known cause. Common practice. */
const AS_READ_PRIOR = 0.9;
const NONE_PRIOR = 0.35;
/** Prior probability of a free offset, as its reading has it. */
export const FREE_PRIOR = (1 - AS_READ_PRIOR) * NONE_PRIOR;
/**
 * Another solid: the ratio of two forms shrinks on heating by this part a kelvin, its size at 298 K, and the prior of an off
 * block of that kind when nothing else is known of its source. Common practice.
 */
const [DRIFT_PER_K, DRIFTING_SD, DRIFTING_SHARE] = [0.005, 0.6, 0.006];
export const DRIFTING_PRIOR = (1 - AS_READ_PRIOR) * DRIFTING_SHARE;
/** Share of such blocks that are tilted too, by how much at the ends, and how irregularly, part of that. */
const [TILTED_SHARE, TILT_SD, TILT_IRREGULAR] = [0.3, 0.15, 0.3];
/** Variances of the offset of a block that is off for no known cause, ln units squared: a little or a lot, equally often. */
const FREE_VARIANCES = [0.0625, 0.64] as const;
/** Standardised residuals beyond this from the block's own median count as single faults within the block. */
const STRAY_Z = 5;
/** ln of the density given to a stray point: a chance of 0.03, spread over about 3 ln units. */
const STRAY_LOG_DENSITY = Math.log(0.03 / 3);
/** ln density of what cannot be. */
export const IMPOSSIBLE = -1e6;
/** At most this share of a block may be stray. */
const STRAY_SHARE = 0.25;
/** Share of such mistakes made in taking over another source of the system, rows that show it, and finest number (ln value). */
const [TAKEN_SHARE, LEAST_TAKEN, FINEST] = [0.05, 3, 5e-4];
/** Part of the material threshold from which a point sides with the offset of its block. */
const ALIKE_SHARE = 0.7;

/**
 * All readings of a block with the log-likelihood of the whole re-read series under the prediction for a new source:
 * as read, with a free offset, and each way of each cause. The own model must hold the fit without this block.
 */
export function blockReadings(of: BlockCase): BlockReading[] {
  const between = of.fit.betweenSd ** 2;
  const asRead = seriesOf(of, undefined);
  const none = { cause: undefined, detail: "", lookAt: "" };
  const density = (offsetVariance: number) => asRead && densityOf(of, of.models[0], asRead, offsetVariance);
  const strayDensity = of.points.length * STRAY_LOG_DENSITY;
  const readings: BlockReading[] = [
    // Temperatures at which nothing dissolves cannot be meant as read.
    { ...none, key: AS_READ, logPrior: Math.log(AS_READ_PRIOR), logDensity: density(between) ?? IMPOSSIBLE },
    {
      ...none,
      key: FREE_OFFSET,
      logPrior: Math.log(FREE_PRIOR),
      logDensity: asRead === undefined ? strayDensity : freeDensity(of, asRead, between),
    },
  ];
  if (asRead !== undefined) {
    const logDensity = driftingDensity(of, asRead, between);
    readings.push({ ...none, key: DRIFTING_OFFSET, logPrior: Math.log(DRIFTING_PRIOR), logDensity });
  }
  for (const cause of EVERY_CAUSE) {
    if (cause.blockPrior === 0) continue;
    const read = (detail: string, weight: number, logDensity: number | undefined) => {
      if (logDensity === undefined) return;
      const { name, lookAt } = cause;
      const logPrior = Math.log(blockReadingPrior(cause, weight));
      readings.push({ key: `${name}: ${detail}`, cause: name, detail, lookAt, logPrior, logDensity });
    };
    for (const how of cause.explanations(of.suspects)) read(how.detail, how.weight, explained(of, how, between));
    if (asRead === undefined) continue;
    const block = { model: of.models[0], series: asRead, method: of.suspects.method, threshold: of.threshold, between };
    for (const { detail, weight, logDensity } of bentReadings(block, cause)) read(detail, weight, logDensity);
  }
  return joined(readings);
}

/** Prior probability of a reading of a block by a way of a cause that has the share `weight`. */
export function blockReadingPrior({ blockPrior }: Pick<Cause, "blockPrior">, weight: number): number {
  return (1 - AS_READ_PRIOR) * blockPrior * weight;
}

/** Log density of a block with an offset of its own, a little or a lot, and perhaps a bend of its own. */
function freeDensity(of: BlockCase, asRead: Series, between: number): number {
  const [model] = of.models;
  const T = asRead.temperatureK;
  const [low, high] = [Math.min(...T), Math.max(...T)];
  const tilt: Pattern = {
    ...({ kind: "growing", detail: "", weight: 1, sign: 0 } as const),
    ...{ sd: TILT_SD, irregular: TILT_IRREGULAR },
    shape: T.map((t) => (high > low ? (2 * t - low - high) / (high - low) : 0)),
  };
  const ways = FREE_VARIANCES.flatMap((variance) => [
    Math.log(1 - TILTED_SHARE) + densityOf(of, model, asRead, variance + between),
    Math.log(TILTED_SHARE) + bentSeries(model, asRead, variance + between, tilt).logDensity,
  ]);
  return logSum(ways) - Math.log(FREE_VARIANCES.length);
}

/** Log density of a block whose offset shrinks on heating, as the ratio of two solids does. */
function driftingDensity({ models: [model] }: BlockCase, asRead: Series, between: number): number {
  const ratio: Pattern = {
    ...({ kind: "growing", detail: "", weight: 1, sign: 0 } as const),
    ...{ sd: DRIFTING_SD, irregular: 0 },
    shape: asRead.temperatureK.map((T) => 1 - DRIFT_PER_K * (T - 298)),
  };
  return bentSeries(model, asRead, between, ratio).logDensity;
}

/** Readings of one key as one: the ways in which a cause may bend a series differ in nothing that could be named. */
function joined(readings: readonly BlockReading[]): BlockReading[] {
  const byKey = new Map<string, BlockReading[]>();
  for (const reading of readings) byKey.set(reading.key, [...(byKey.get(reading.key) ?? []), reading]);
  return [...byKey.values()].map((same) => {
    const logPrior = logSum(same.map((reading) => reading.logPrior));
    const logJoint = logSum(same.map((reading) => reading.logPrior + reading.logDensity));
    return { ...same[0]!, logPrior, logDensity: logJoint - logPrior };
  });
}

/** Log density of the re-read block, or undefined where it cannot be re-read or would still be off. */
function explained(of: BlockCase, how: Explanation, between: number): number | undefined {
  const series = seriesOf(of, how);
  if (series === undefined) return undefined;
  const byCurve = onCurve(of, how, series, between);
  const takenOver = how.system === undefined ? takenOverDensity(of, series) : undefined;
  return byCurve === undefined || takenOver === undefined ? (byCurve ?? takenOver) : Math.max(byCurve, takenOver);
}

/** The same by the curve of the others, or by that of the system the block is said to belong to. */
function onCurve(of: BlockCase, how: Explanation, series: Series, between: number): number | undefined {
  if (how.system !== undefined) fitSources(of.models[1], of.input.fits[how.system]!, (s) => s !== of.source);
  const model = of.models[how.system === undefined ? 0 : 1];
  const residuals = series.lnValue.map((y, i) => y - predictCurve(model, series.temperatureK[i]!).mean);
  const centre = middle(residuals);
  if (Math.abs(centre) > Math.max(of.threshold, 3 * Math.sqrt(between))) return undefined;
  // A mistake that explains the block leaves a curve of the right shape, single stray points apart.
  const away = residuals.map((r) => Math.abs(r - centre));
  if (away.filter((r) => r > of.threshold).length > STRAY_SHARE * of.points.length) return undefined;
  const noise = series.noiseVariance.map((v, i) =>
    Math.sqrt(v + predictCurve(model, series.temperatureK[i]!).variance),
  );
  if (middle(away) > LEFT_OVER * middle(noise)) return undefined;
  return densityOf(of, model, series, between);
}

/**
 * Log density of a re-read block that gives, at the same temperatures, the values of another source, to the digit or within
 * the scatter between sources: the table was taken over without its basis, and no curve, which may follow neither, need be
 * asked. Undefined where fewer than three rows or half of them do.
 */
function takenOverDensity({ fit, source, points, suspects }: BlockCase, series: Series): number | undefined {
  if (series.lnValue.length < points.length) return undefined;
  const densities = series.lnValue.flatMap((lnValue, i) => {
    const rounding = Math.max(FINEST, relativeRounding(suspects.reportedValue(suspects.rows[i]!)));
    const apart = [...fit.points.source].flatMap((other, j) => {
      const away = Math.abs(fit.points.temperatureK[j]! - series.temperatureK[i]!);
      return other === source || !(away < SAME_TEMPERATURE_K) ? [] : [Math.abs(fit.points.lnValue[j]! - lnValue)];
    });
    const nearest = Math.min(...apart);
    const variance = 2 * (series.noiseVariance[i]! + fit.betweenSd ** 2);
    if (nearest <= rounding) return [-Math.log(2 * rounding)];
    return nearest ** 2 > 9 * variance ? [] : [-0.5 * (nearest ** 2 / variance + Math.log(2 * Math.PI * variance))];
  });
  if (densities.length < LEAST_TAKEN || densities.length < points.length / 2) return undefined;
  const others = (points.length - densities.length) * STRAY_LOG_DENSITY;
  return Math.log(TAKEN_SHARE) + others + densities.reduce((sum, density) => sum + density, 0);
}

/** The block re-read; rows that a shift leaves without a number count as stray. */
function seriesOf({ input, fit, points, suspects }: BlockCase, how: Explanation | undefined): Series | undefined {
  const series = { temperatureK: [] as number[], lnValue: [] as number[], noiseVariance: [] as number[] };
  let left = 0;
  for (const [j, point] of points.entries()) {
    const row = suspects.rows[j]!;
    const change = how?.change(row);
    const read =
      how === undefined
        ? { lnValue: fit.points.lnValue[point]!, temperatureK: fit.points.temperatureK[point]! }
        : change === undefined
          ? undefined
          : input.reread(row, change);
    if (read === undefined || !isPossibleTemperature(read.temperatureK)) {
      if (++left > 1) return undefined;
      continue;
    }
    series.temperatureK.push(read.temperatureK);
    series.lnValue.push(read.lnValue);
    series.noiseVariance.push(fit.noiseSd[point]! ** 2);
  }
  return series.lnValue.length < 2 ? undefined : series;
}

/** Joint log density with single stray points of the block taken out at a fixed price. */
function densityOf(of: BlockCase, model: SystemModel, series: Series, offsetVariance: number): number {
  const n = series.lnValue.length;
  const spread = series.lnValue.map((y, i) => {
    const { mean, variance } = predictCurve(model, series.temperatureK[i]!);
    return { residual: y - mean, sd: Math.sqrt(variance + series.noiseVariance[i]!) };
  });
  const centre = middle(spread.map(({ residual }) => residual));
  const stray = spread.map(({ residual, sd }) => Math.abs(residual - centre) > Math.max(STRAY_Z * sd, of.threshold));
  const strays = stray.filter(Boolean).length;
  if (strays > STRAY_SHARE * n) return seriesLogDensity(model, series, offsetVariance);
  const keep = <T>(values: readonly T[]) => values.filter((_, i) => !stray[i]);
  const missing = of.points.length - n;
  return (
    seriesLogDensity(
      model,
      {
        temperatureK: keep(series.temperatureK),
        lnValue: keep(series.lnValue),
        noiseVariance: keep(series.noiseVariance),
      },
      offsetVariance,
    ) +
    (strays + missing) * STRAY_LOG_DENSITY
  );
}

/**
 * Offset of a block from the curve of the others: median, its standard deviation, the share of points that are off
 * (either way), and the share that deviates to the side of the median by most of the threshold.
 */
export function blockOffset(of: Omit<BlockCase, "suspects">): {
  median: number;
  sd: number;
  failing: number;
  alike: number;
  deviations: readonly number[];
} {
  const { fit, points, models, source } = of;
  const deviations: number[] = [];
  const variances: number[] = [];
  let failing = 0;
  for (const point of points) {
    const { mean, variance } = predict(models[0], fit.points.temperatureK[point]!, source);
    const deviation = fit.points.lnValue[point]! - mean;
    const sd = Math.sqrt(variance + fit.noiseSd[point]! ** 2);
    deviations.push(deviation);
    variances.push(variance);
    if (Math.abs(deviation) > Math.max(3.5 * sd, of.threshold)) failing++;
  }
  const noise = middle(points.map((point) => fit.noiseSd[point]! ** 2));
  // 1.57: variance of a median relative to that of a mean under Gaussian noise.
  const sd = Math.sqrt(middle(variances) + (1.57 * noise) / points.length);
  const median = middle(deviations);
  const alike = deviations.filter((d) => d * median > 0 && Math.abs(d) > ALIKE_SHARE * of.threshold).length;
  return { median, sd, failing: failing / points.length, alike: alike / points.length, deviations };
}
