import {
  BROKEN_COEFFICIENTS,
  HINGED_COEFFICIENTS,
  SCREENING_STRIDE,
  SMOOTH_COEFFICIENTS,
  setScreeningPrior,
  writeScreeningBasis,
} from "../curves/screening-basis.ts";
import {
  createGroupedModel,
  expected,
  expectedVariance,
  fitGroupedModel,
  type GroupedModel,
  type GroupedRows,
  groupVariance,
  logMarginalDensity,
  priorFromPosterior,
} from "../numerics/grouped-model.ts";
import type { RobustFit } from "../records/fits.ts";
import { type SystemPoints, sharedVarianceOf } from "../records/systems.ts";

/** The screening model of one system at a time, rebuilt from its robust fit: a workspace that is filled again and again. */
export interface SystemModel {
  readonly rows: GroupedRows;
  readonly use: Uint8Array;
  readonly smooth: GroupedModel;
  readonly hinged: GroupedModel;
  readonly broken: GroupedModel;
  /** Source behind each group; the last group is empty and stands for a new source. */
  readonly groupOfSource: Map<number, number>;
  model: GroupedModel;
  centreK: number;
  breakK: number;
  shift: number;
  readonly point: Float64Array;
}

/** A normal prediction of ln value. */
export interface Prediction {
  readonly mean: number;
  /** Variance of a measurement's expectation: curve and offset, without the noise of the measurement. */
  readonly variance: number;
}

/** Room for systems of up to `capacity` points. */
export function createSystemModel(capacity: number): SystemModel {
  const groups = capacity + 1;
  const smooth = createGroupedModel(SMOOTH_COEFFICIENTS, groups);
  const hinged = createGroupedModel(HINGED_COEFFICIENTS, groups);
  const broken = createGroupedModel(BROKEN_COEFFICIENTS, groups);
  setScreeningPrior(smooth);
  setScreeningPrior(hinged);
  setScreeningPrior(broken);
  return {
    rows: {
      n: 0,
      design: new Float64Array(capacity * SCREENING_STRIDE),
      stride: SCREENING_STRIDE,
      response: new Float64Array(capacity),
      variance: new Float64Array(capacity),
      group: new Int32Array(capacity),
    },
    use: new Uint8Array(capacity),
    smooth,
    hinged,
    broken,
    groupOfSource: new Map(),
    model: smooth,
    centreK: 298.15,
    breakK: Number.NaN,
    shift: 0,
    point: new Float64Array(SCREENING_STRIDE),
  };
}

/**
 * Fits the kept points of the given sources. Deterministic; at the cost of O(n).
 *
 * @param withSource which sources take part
 * @param without point that takes no part
 */
export function fitSources(
  target: SystemModel,
  fit: RobustFit,
  withSource: (source: number) => boolean,
  without = -1,
): void {
  const { rows, use, groupOfSource } = target;
  const { points, kept } = fit;
  groupOfSource.clear();
  rows.n = points.n;
  target.breakK = fit.breakTemperatureK;
  target.model = Number.isNaN(target.breakK) ? target.smooth : fit.breakTested ? target.broken : target.hinged;
  target.centreK = meanOfKept(points.temperatureK, kept, 298.15);
  target.shift = meanOfKept(points.lnValue, kept, 0);
  for (let i = 0; i < points.n; i++) {
    const source = points.source[i]!;
    let group = groupOfSource.get(source);
    if (group === undefined) {
      group = groupOfSource.size;
      groupOfSource.set(source, group);
    }
    rows.group[i] = group;
    use[i] = kept[i] === 1 && i !== without && withSource(source) ? 1 : 0;
    rows.response[i] = points.lnValue[i]! - target.shift;
    rows.variance[i] = fit.noiseSd[i]! ** 2;
    const T = points.temperatureK[i]!;
    if (T > 0) writeScreeningBasis(T, target.centreK, target.breakK, rows.design, i * SCREENING_STRIDE);
  }
  target.model.groups = groupOfSource.size + 1;
  const conflict = fit.agreement === "conflict";
  target.model.offsetVariance.fill(conflict ? 25 : fit.betweenSd ** 2, 0, target.model.groups);
  if (!conflict) addSharedVariance(target, points);
  fitGroupedModel(target.model, rows, use);
}

/** Adds to each source's offset the mean variance of ln value that its points share. */
function addSharedVariance({ rows, model }: SystemModel, points: SystemPoints): void {
  const count = new Float64Array(model.groups);
  for (let i = 0; i < points.n; i++) count[rows.group[i]!]!++;
  for (let i = 0; i < points.n; i++) {
    const g = rows.group[i]!;
    model.offsetVariance[g]! += sharedVarianceOf(points, i) / count[g]!;
  }
}

function meanOfKept(values: Float64Array, kept: Uint8Array, otherwise: number): number {
  let sum = 0;
  let count = 0;
  for (let i = 0; i < values.length; i++) {
    if (kept[i] !== 1) continue;
    sum += values[i]!;
    count++;
  }
  return count === 0 ? otherwise : sum / count;
}

/** ln value expected at a temperature (K) from a source; one that took no part in the fit counts as new. */
export function predict(of: SystemModel, temperatureK: number, source: number): Prediction {
  const { model, point } = of;
  writeScreeningBasis(temperatureK, of.centreK, of.breakK, point, 0);
  const group = of.groupOfSource.get(source) ?? model.groups - 1;
  return {
    mean: of.shift + expected(model, point, 0) + model.offsets[group]!,
    variance: groupVariance(model, point, 0, group),
  };
}

/**
 * Offset of a fitted source as its own points, taken out together, would deviate from the others: b / (1 - v/tau^2),
 * with v the variance of the offset b given the data. Closed form of leaving the source out, for a common offset.
 */
export function deletedOffset(of: SystemModel, source: number): number {
  const { model } = of;
  const group = of.groupOfSource.get(source);
  if (group === undefined) return Number.NaN;
  of.point.fill(0);
  const freedom = 1 - groupVariance(model, of.point, 0, group) / model.offsetVariance[group]!;
  return model.offsets[group]! / Math.max(freedom, 1e-6);
}

/** ln value expected of sources in general, and the variance of that. */
export function predictCurve(of: SystemModel, temperatureK: number): Prediction {
  writeScreeningBasis(temperatureK, of.centreK, of.breakK, of.point, 0);
  return { mean: of.shift + expected(of.model, of.point, 0), variance: expectedVariance(of.model, of.point, 0) };
}

/** A series of values of one source to be judged as a whole. */
export interface Series {
  readonly temperatureK: readonly number[];
  readonly lnValue: readonly number[];
  readonly noiseVariance: readonly number[];
}

/** d ln value/dT of the curve at a temperature, 1/K: central difference over 1 K. */
export function curveSlope(of: SystemModel, temperatureK: number): number {
  return predictCurve(of, temperatureK + 0.5).mean - predictCurve(of, temperatureK - 0.5).mean;
}

/**
 * ln of the joint density of a series from a new source, given the fitted sources: curve uncertainty, one common
 * offset of variance `offsetVariance` and noise together. Returned as a function of the deviations from the curve.
 */
export function seriesDensity(
  of: SystemModel,
  temperatureK: readonly number[],
  noiseVariance: readonly number[],
  offsetVariance: number,
): (deviations: readonly number[]) => number {
  const n = temperatureK.length;
  const seriesModel = createGroupedModel(of.model.p, 1);
  priorFromPosterior(seriesModel, of.model);
  seriesModel.groups = 1;
  seriesModel.offsetVariance[0] = offsetVariance;
  const rows: GroupedRows = {
    n,
    design: new Float64Array(n * SCREENING_STRIDE),
    stride: SCREENING_STRIDE,
    response: new Float64Array(n),
    variance: Float64Array.from(noiseVariance),
    group: new Int32Array(n),
  };
  for (let i = 0; i < n; i++)
    writeScreeningBasis(temperatureK[i]!, of.centreK, of.breakK, rows.design, i * SCREENING_STRIDE);
  const use = new Uint8Array(n).fill(1);
  return (deviations) => {
    rows.response.set(deviations);
    fitGroupedModel(seriesModel, rows, use);
    return logMarginalDensity(seriesModel, rows, use);
  };
}

/** The same of a series of values. */
export function seriesLogDensity(of: SystemModel, series: Series, offsetVariance: number): number {
  const { temperatureK, lnValue, noiseVariance } = series;
  const deviations = lnValue.map((y, i) => y - predictCurve(of, temperatureK[i]!).mean);
  return seriesDensity(of, temperatureK, noiseVariance, offsetVariance)(deviations);
}
