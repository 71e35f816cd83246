import type { RobustFit } from "../../records/fits.ts";
import { predictCurve, type Series, type SystemModel, seriesDensity } from "../system-model.ts";
import type { Bent } from "./pattern-density.ts";
import type { RereadSeries } from "./reread-series.ts";

/** Rate of single faults among rows. Common practice. */
const SINGLE_RATE = 0.03;
/** An off point farther than this from the bent series, in standard deviations, is off for its own reason. */
export const STRAY_Z = 4;

/** A block some of whose points are off, as one series. */
export interface SeriesCase {
  readonly model: SystemModel;
  readonly fit: RobustFit;
  readonly source: number;
  /** Points of the block at possible temperatures. */
  readonly points: readonly number[];
  /** Weight of each off point on its own: every cause of a single row and "none" together, a density of ln value. */
  readonly offWeight: ReadonlyMap<number, number>;
  readonly method: string;
  /** Material threshold, ln value. */
  readonly tolerance: number;
  /** The solid may be another hydrate in one source than in the others: a salt in water. */
  readonly mayHydrate: boolean;
  /** The block read in other ways, rows in the order of `points`. */
  readonly rereadings: readonly RereadSeries[];
}

/** A block under one way of being bent. */
export interface Tried {
  readonly logWeight: number;
  readonly explained: readonly number[];
  /** The points that do not stray, in order, and the series of them under the pattern. */
  readonly rest: readonly number[];
  readonly bent: Bent;
}

/** ln weight of points as read, times that of single faults. */
export function logWeightOf(of: SeriesCase, sound: readonly number[], single: readonly number[]): number {
  const { model, fit, offWeight } = of;
  const weight = single.reduce((sum, point) => sum + Math.log(SINGLE_RATE * offWeight.get(point)!), 0);
  if (sound.length === 0) return weight;
  const { temperatureK, lnValue, noiseVariance } = seriesOf(fit, sound);
  const deviations = lnValue.map((y, i) => y - predictCurve(model, temperatureK[i]!).mean);
  return weight + seriesDensity(model, temperatureK, noiseVariance, fit.betweenSd ** 2)(deviations);
}

/** Points of a fit as a series. */
export function seriesOf({ points, noiseSd }: RobustFit, of: readonly number[]): Series {
  return {
    temperatureK: of.map((point) => points.temperatureK[point]!),
    lnValue: of.map((point) => points.lnValue[point]!),
    noiseVariance: of.map((point) => noiseSd[point]! ** 2),
  };
}
