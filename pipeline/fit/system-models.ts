import {
  CONSTANT,
  type LinearModel,
  MODIFIED_APELBLAT,
  QUADRATIC,
  setDesignColumns,
  VAN_T_HOFF,
} from "../curves/linear-models.ts";
import { fewestTemperatures, smallestSpanK } from "../curves/modified-apelblat.ts";
import type { PooledScales, RobustFit } from "../records/fits.ts";
import type { System } from "../records/systems.ts";
import { type Candidate, type CommonFit, fitLinear, type LinearFit, linearCandidate } from "./candidate.ts";
import type { FitWorkspace } from "./fit-workspace.ts";
import type { KeptPoints } from "./kept-points.ts";
import { fitLambdaH } from "./lambda-h-fit.ts";
import { type Choice, chooseModel } from "./model-choice.ts";
import { physicalVeto } from "./physical-veto.ts";
import { lackOfCurvature } from "./robust/lack-of-curvature.ts";
import { ONE_TEMPERATURE_SPAN_K } from "./robust/robust-prepare.ts";
import {
  type FitWeighting,
  firstFit,
  setAbsoluteVariances,
  setRelativeVariances,
  withinBySource,
} from "./row-variances.ts";
import { type SystemScale, systemScale } from "./system-scale.ts";

/** What the screening fit hands on: the points, which of them stay, and the scatter it assumed. */
export type ScreenedPoints = Pick<RobustFit, "points" | "kept" | "agreement"> &
  Partial<Pick<RobustFit, "noiseSd" | "breakTemperatureK">>;

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
  /** Mean expected variance of a point within its source. */
  readonly expectedVariance: number;
  /** Of the pooled between-source SD; 0 = default setting. */
  readonly betweenDegreesOfFreedom: number;
  /** Fit of {@link limitModel}: what the limits rest on. */
  readonly largest: LinearFit;
  readonly choice: Choice;
  /** Where the screening fit found the points to break, K; NaN = nowhere. */
  readonly breakTemperatureK: number;
}

/** Linear models admissible for the points, simplest first. */
export function admissibleModels(points: KeptPoints): readonly LinearModel[] {
  if (points.distinctTemperatures < 2) return [CONSTANT];
  const enough = points.distinctTemperatures >= fewestTemperatures && points.highK - points.lowK >= smallestSpanK;
  return enough ? [VAN_T_HOFF, MODIFIED_APELBLAT, QUADRATIC] : [VAN_T_HOFF];
}

/**
 * SD of the coefficient C of the modified Apelblat equation where the points do not let it be fitted. Dissolution heat
 * capacities are mostly below 150 J/(mol K) in size, two of these SD: from memory, not verified; common practice.
 */
const usualC = 9;

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

/** What every model of a subject is fitted under, and the model that limits rest on. */
export interface CommonGround {
  readonly points: KeptPoints;
  readonly common: CommonFit;
  readonly scale: SystemScale;
  /** Pooled between-source SD of the system's class with its degrees of freedom; 0 = default setting. */
  readonly between: { readonly sd: number; readonly degreesOfFreedom: number };
  readonly limiting: ReturnType<typeof limitModel>;
}

/**
 * Slopes, expected variances and scales for the points loaded in the workspace.
 *
 * @returns undefined where no model can be fitted
 */
export function commonGround(
  ws: FitWorkspace,
  points: KeptPoints,
  screened: ScreenedPoints,
  subject: CurveSubject,
  context: CurveContext,
): CommonGround | undefined {
  const models = admissibleModels(points);
  if (!firstFit(ws, points, models[1] ?? models[0]!)) return undefined;
  const within = withinBySource(ws, points, context.scales.within);
  if (!setStart(ws, points, within, context.weighting)) return undefined;
  const between = betweenScale(screened, subject, context);
  const scale = scaleAboutLimitModel(ws, points, context.weighting, between.sd ** 2);
  const { varianceFactor, betweenVariance } = scale;
  const common: CommonFit = { points, weighting: context.weighting, within, varianceFactor, betweenVariance };
  return { points, common, scale, between, limiting: limitModel(points) };
}

/**
 * Fits and compares all admissible models to the points loaded in the workspace.
 *
 * @returns undefined where none can be fitted
 */
export function fitModels(
  ws: FitWorkspace,
  points: KeptPoints,
  screened: ScreenedPoints,
  subject: CurveSubject,
  context: CurveContext,
): FittedModels | undefined {
  const ground = commonGround(ws, points, screened, subject, context);
  if (ground === undefined) return undefined;
  const { common, scale, between } = ground;
  const compared = compareModels(ws, common, subject, scale);
  if (compared === undefined) return undefined;
  return {
    points,
    common,
    scale,
    expectedVariance: mean(ws.startVariance, points.n),
    betweenDegreesOfFreedom: between.degreesOfFreedom,
    largest: compared.largest,
    choice: compared.choice,
    breakTemperatureK: screened.breakTemperatureK ?? Number.NaN,
  };
}

/** Scales of the system from its residuals about the model that limits rest on. */
function scaleAboutLimitModel(ws: FitWorkspace, points: KeptPoints, weighting: FitWeighting, pooledBetween: number) {
  const { model, lastSd } = limitModel(points);
  setDesignColumns(ws.columns, model, ws.temperatureK, points.n, points.centreK);
  const basis = { n: points.n, nSources: points.sources.length, p: model.parameterCount, lastSd, parts: points };
  return systemScale(ws, basis, weighting === "absolute" ? ws.response : ws.lnValue, ws.startVariance, pooledBetween);
}

/** Fits of all admissible models under the common covariance, the choice among them, and the fit that limits rest on. */
function compareModels(ws: FitWorkspace, common: CommonFit, subject: CurveSubject, scale: SystemScale) {
  const { points } = common;
  const { model: limiting, lastSd } = limitModel(points);
  const free = lastSd === Number.POSITIVE_INFINITY;
  const fits: LinearFit[] = [];
  for (const model of admissibleModels(points)) {
    const fit = fitLinear(ws, common, model);
    if (fit !== undefined) fits.push(fit);
  }
  const largest = free ? fits.find(({ model }) => model === limiting) : fitLinear(ws, common, limiting, lastSd);
  if (fits.length === 0 || largest === undefined) return undefined;
  const candidates = fits.map((fit) => linearCandidate(common, fit));
  const richest = free ? candidates.find(({ model }) => model === limiting.name) : undefined;
  const lambdaH = lambdaHCandidate(ws, common, subject);
  if (lambdaH !== undefined) candidates.splice(1, 0, lambdaH);
  return { largest, choice: chooseModel(candidates, vetoes(points, subject, scale, richest)) };
}

/** The physical veto, and that of a line where the points bend and a richer model is possible. */
function vetoes(points: KeptPoints, { system }: CurveSubject, scale: SystemScale, richest: Candidate | undefined) {
  const possible = richest !== undefined && physicalVeto(richest, points, system.fitBasis) === undefined;
  return (candidate: Candidate): string | undefined =>
    physicalVeto(candidate, points, system.fitBasis) ??
    (possible ? lackOfCurvature(candidate, richest, scale.degreesOfFreedom) : undefined);
}

/** Expected variances and, in the weighting by value, the response of the common start; false where there are none. */
function setStart(ws: FitWorkspace, { n }: KeptPoints, within: readonly number[], weighting: FitWeighting): boolean {
  if (weighting === "relative") {
    setRelativeVariances(ws, n, within);
    return true;
  }
  const possible = setAbsoluteVariances(ws, n, within, ws.startFitted);
  for (let i = 0; i < n; i++) ws.startVariance[i] = ws.variance[i]!;
  return possible;
}

function mean(values: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += values[i]!;
  return sum / n;
}

/** The lambda-h fit where it applies: mole fractions below 1, at least two temperatures, all below the melting point. */
function lambdaHCandidate(ws: FitWorkspace, common: CommonFit, { system, meltingPointK }: CurveSubject) {
  const { n, distinctTemperatures, highK } = common.points;
  if (system.fitBasis !== "ln x" || distinctTemperatures < 2 || !(meltingPointK > highK)) return undefined;
  for (let i = 0; i < n; i++) if (ws.lnValue[i]! >= 0) return undefined;
  return fitLambdaH(ws, common, meltingPointK);
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
