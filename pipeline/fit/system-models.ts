import {
  CONSTANT,
  designColumns,
  type LinearModel,
  MODIFIED_APELBLAT,
  QUADRATIC,
  VAN_T_HOFF,
} from "../curves/linear-models.ts";
import { fewestTemperatures, smallestSpanK } from "../curves/modified-apelblat.ts";
import type { PooledScales, RobustFit } from "../records/fits.ts";
import type { System } from "../records/systems.ts";
import { type Candidate, type CommonFit, fitLinear, type LinearFit, linearCandidate } from "./candidate.ts";
import type { KeptPoints } from "./kept-points.ts";
import { fitLambdaH } from "./lambda-h-fit.ts";
import { type Choice, chooseModel } from "./model-choice.ts";
import { physicalVeto } from "./physical-veto.ts";
import { ONE_TEMPERATURE_SPAN_K } from "./robust-prepare.ts";
import {
  absoluteWeighted,
  type FitWeighting,
  firstFit,
  relativeVariances,
  type Weighted,
  withinBySource,
} from "./row-variances.ts";
import { type SystemScale, systemScale } from "./system-scale.ts";

/** What the screening fit hands on: the points, which of them stay, and the scatter it assumed. */
export type ScreenedPoints = Pick<RobustFit, "points" | "kept" | "agreement"> & Partial<Pick<RobustFit, "noiseSd">>;

/** What the fits of an edition share. */
export interface CurveContext {
  readonly scales: PooledScales;
  /** Laboratory of each source, by position in the edition's list; "" = not stated, counted as one of its own. */
  readonly laboratories: readonly string[];
  /** Least squares in ln x (`relative`, the default) or in x (`absolute`). */
  readonly weighting: FitWeighting;
}

/** What is fitted: a system, or the stretch of it over which one solid phase is stable. */
export interface CurveSubject {
  readonly system: System;
  /** Branch of the curve, 1 and up. */
  readonly branch: number;
  /** Melting point of the solid form dissolved, K; NaN where unknown. */
  readonly meltingPointK: number;
}

/** Everything fitted for one subject, before it is written up. */
export interface FittedModels {
  readonly points: KeptPoints;
  readonly common: CommonFit;
  readonly scale: SystemScale;
  /** Of the pooled between-source SD; 0 = default setting. */
  readonly betweenDegreesOfFreedom: number;
  /** Fit of {@link limitModel}: what the limits rest on. */
  readonly largest: LinearFit;
  readonly choice: Choice;
}

/** Linear models admissible for the points, simplest first. */
export function admissibleModels(points: KeptPoints): LinearModel[] {
  if (points.distinctTemperatures < 2) return [CONSTANT];
  const enough = points.distinctTemperatures >= fewestTemperatures && points.highK - points.lowK >= smallestSpanK;
  return enough ? [VAN_T_HOFF, MODIFIED_APELBLAT, QUADRATIC] : [VAN_T_HOFF];
}

/**
 * SD of the coefficient C of the modified Apelblat equation where the points do not let it be fitted. Dissolution heat
 * capacities are mostly below 150 J/(mol K) in size: from memory, not verified; common practice.
 */
const usualC = 12;

/** SD of d ln value/d(T0/T) where all points lie at one temperature: enthalpies up to about 50 kJ/mol. Common practice. */
const usualB = 10;

/**
 * The model that limits rest on: the largest admissible one, or one step richer where the points cannot carry it. Then
 * its last coefficient is held by what is usual for it, so that the limits own what the published curve cannot follow.
 */
export function limitModel(points: KeptPoints): { readonly model: LinearModel; readonly lastSd: number } {
  if (points.distinctTemperatures < 2) return { model: VAN_T_HOFF, lastSd: usualB };
  const free = admissibleModels(points).includes(MODIFIED_APELBLAT);
  return { model: MODIFIED_APELBLAT, lastSd: free ? Number.POSITIVE_INFINITY : usualC };
}

/** Fits and compares all admissible models. @returns undefined where none can be fitted */
export function fitModels(
  points: KeptPoints,
  screened: ScreenedPoints,
  subject: CurveSubject,
  context: CurveContext,
): FittedModels | undefined {
  const models = admissibleModels(points);
  const richest = models[1] ?? (models[0] as LinearModel);
  const first = firstFit(points, richest);
  if (first === undefined) return undefined;
  const within = withinBySource(points, context.scales.within);
  const start: Weighted =
    context.weighting === "absolute"
      ? absoluteWeighted(points, first.fitted, within)
      : { response: points.lnValue, variance: relativeVariances(points, first.slopes, within) };
  const between = betweenScale(screened, subject, context);
  const { model, lastSd } = limitModel(points);
  const columns = designColumns(model, points.temperatureK, points.centreK);
  const scale = systemScale(points, columns, start.response, start.variance, lastSd, between.sd ** 2);
  const common: CommonFit = {
    ...{ points, weighting: context.weighting, start, startFitted: first.fitted, within },
    varianceFactor: scale.varianceFactor,
    betweenVariance: scale.betweenVariance,
  };
  const fits = models.map((model) => fitLinear(common, model)).filter((fit) => fit !== undefined);
  const largest = fits.find((fit) => fit.model === model) ?? fitLinear(common, model, lastSd);
  if (fits.length === 0 || largest === undefined) return undefined;
  const candidates: Candidate[] = fits.map((fit) => linearCandidate(common, fit));
  const lambdaH = lambdaHCandidate(common, subject);
  if (lambdaH !== undefined) candidates.splice(1, 0, lambdaH);
  const choice = chooseModel(candidates, (candidate) => physicalVeto(candidate, points, subject.system.fitBasis));
  return { points, common, scale, betweenDegreesOfFreedom: between.degreesOfFreedom, largest, choice };
}

/** The lambda-h fit where it applies: mole fractions below 1, at least two temperatures, all below the melting point. */
function lambdaHCandidate(common: CommonFit, { system, meltingPointK }: CurveSubject): Candidate | undefined {
  const { points } = common;
  if (system.fitBasis !== "ln x" || points.distinctTemperatures < 2 || !(meltingPointK > points.highK))
    return undefined;
  if (points.lnValue.some((value) => value >= 0)) return undefined;
  return fitLambdaH(common, meltingPointK);
}

/** Pooled between-source SD of the system's class: salts in water, one temperature, all others. */
function betweenScale({ points }: ScreenedPoints, { system }: CurveSubject, { scales }: CurveContext) {
  if (system.identity.aqueousSalt)
    return { sd: scales.betweenAqueousSalt, degreesOfFreedom: scales.betweenAqueousSaltDegreesOfFreedom };
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const T of points.temperatureK) {
    if (T < low) low = T;
    if (T > high) high = T;
  }
  return high - low < ONE_TEMPERATURE_SPAN_K
    ? { sd: scales.betweenOneTemperature, degreesOfFreedom: scales.betweenOneTemperatureDegreesOfFreedom }
    : { sd: scales.between, degreesOfFreedom: scales.betweenDegreesOfFreedom };
}
