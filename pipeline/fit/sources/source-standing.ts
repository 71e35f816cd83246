import { quadraticForm } from "../../curves/coefficient-transformation.ts";
import {
  CONSTANT,
  centredValue,
  type LinearModel,
  MODIFIED_APELBLAT,
  QUADRATIC,
  VAN_T_HOFF,
} from "../../curves/linear-models.ts";
import type { Curve, CurveModel, CurveWithout, RobustFit, SourceStanding } from "../../records/fits.ts";
import { type Candidate, fitLinear, type LinearFit, linearCandidate, loneOffsetVariance } from "../candidate.ts";
import { sumOfParts } from "../curve-variances.ts";
import { type FitWorkspace, fitWorkspace } from "../fit-workspace.ts";
import { type KeptPoints, loadKeptPoints, sameTemperatureK } from "../kept-points.ts";
import { fitLambdaH } from "../lambda-h-fit.ts";
import { limitFactor } from "../limit-factor.ts";
import {
  admissibleModels,
  type CommonGround,
  type CurveContext,
  type CurveSubject,
  commonGround,
} from "../system-models.ts";

/** Temperatures at which a curve is compared with the one without a source. */
const PLACES = 25;

const LINEAR_MODELS: Readonly<Partial<Record<CurveModel, LinearModel>>> = {
  constant: CONSTANT,
  "van 't Hoff": VAN_T_HOFF,
  "modified Apelblat": MODIFIED_APELBLAT,
  "quadratic in 1/T": QUADRATIC,
};

/** The points of one branch: which of them are in its curve. */
interface Branch {
  readonly curve: Curve | undefined;
  readonly kept: Uint8Array;
  readonly inside: (temperatureK: number) => boolean;
}

/**
 * How each source of a system stands to the others: its offset from their curve with limits, their curve without it, and
 * how far leaving it out moves the published curve.
 *
 * The others are fitted like the system itself (random offset per source, scales moderated by their own residuals). The
 * offset is the mean of y - F b over the source's points where the others have data, each weighted by its precision; its
 * variance is that of F b at the mean row of F, offsets of the other sources included, and of the mean of the noise. The
 * source's own usual offset is not in it: the offset is what is estimated. A source of which no point is in the curve is
 * compared with all its points and has no influence.
 *
 * @param curves published curves of the system, one a branch; none in a conflict: influences are then NaN
 * @returns by branch, then source, ascending; empty where fewer than two sources have points to compare
 */
export function sourceStandings(
  robust: RobustFit,
  curves: readonly Curve[],
  subject: Omit<CurveSubject, "branch">,
  context: CurveContext,
): SourceStanding[] {
  const branches = curves.length === 0 ? [undefined] : curves;
  return branches.flatMap((curve) => {
    const branch = branchOf(robust, curve, branches.length > 1);
    const sources = sourcesOf(robust, branch);
    if (sources.length < 2) return [];
    return sources.map((source) =>
      standing(robust, branch, source, { ...subject, branch: curve?.branch ?? 1 }, context),
    );
  });
}

function branchOf({ points, kept }: RobustFit, curve: Curve | undefined, several: boolean): Branch {
  const [low, high] = curve !== undefined && several ? curve.temperatureRangeK : [0, Number.POSITIVE_INFINITY];
  const inside = (T: number) => T >= low && T <= high;
  return { curve, inside, kept: kept.map((mark, i) => (mark === 1 && inside(points.temperatureK[i]!) ? 1 : 0)) };
}

/** Sources with a point that has a deviation, ascending: a repeated or excluded reading says nothing of its own. */
function sourcesOf({ points, deviation }: RobustFit, { inside, kept }: Branch): number[] {
  const found = new Set<number>();
  for (let i = 0; i < points.n; i++)
    if (kept[i] === 1 || (Number.isFinite(deviation[i]) && inside(points.temperatureK[i]!)))
      found.add(points.source[i]!);
  return [...found].sort((a, b) => a - b);
}

function standing(
  robust: RobustFit,
  { curve, kept, inside }: Branch,
  source: number,
  subject: CurveSubject,
  context: CurveContext,
): SourceStanding {
  const { points, deviation } = robust;
  const others = kept.map((mark, i) => (mark === 1 && points.source[i] !== source ? 1 : 0));
  const n = kept.reduce((sum, mark, i) => sum + (points.source[i] === source ? mark : 0), 0);
  const nothing = {
    source,
    branch: subject.branch,
    n,
    compared: 0,
    offset: Number.NaN,
    low: Number.NaN,
    high: Number.NaN,
  };
  const ws = fitWorkspace(points.n);
  const loaded = loadKeptPoints(ws, points, others, robust.noiseSd, context.laboratories);
  const ground = loaded.n === 0 ? undefined : commonGround(ws, loaded, robust, subject, context);
  const limiting = ground && fitLinear(ws, ground.common, ground.limiting.model, ground.limiting.lastSd);
  if (ground === undefined || limiting === undefined) return { ...nothing, influence: n === 0 ? 0 : Number.NaN };
  const own: number[] = [];
  for (let i = 0; i < points.n; i++) {
    const T = points.temperatureK[i]!;
    if (points.source[i] !== source || T < loaded.lowK - sameTemperatureK || T > loaded.highK + sameTemperatureK)
      continue;
    // A source that is left out as a whole is judged by all its points.
    if (n > 0 ? kept[i] === 1 : Number.isFinite(deviation[i]) && inside(T)) own.push(i);
  }
  const offset = own.length === 0 ? nothing : { ...nothing, ...offsetOf(robust, own, ground, limiting) };
  if (n === 0 || curve === undefined) return { ...offset, influence: n === 0 ? 0 : Number.NaN };
  const left = withoutSource(ws, curve.model, ground, limiting, subject);
  return left === undefined
    ? { ...offset, influence: Number.NaN }
    : { ...offset, influence: largestChange(curve, left), without: left };
}

/** Weighted mean deviation from the curve of the others, with 95 % limits. */
function offsetOf({ points, noiseSd }: RobustFit, own: readonly number[], ground: CommonGround, others: LinearFit) {
  const { model, coefficients, covariance, withinPart, centreK } = others;
  const p = model.parameterCount;
  const [row, mean] = [new Float64Array(p), new Float64Array(p)];
  let [precision, sum] = [0, 0];
  for (const i of own) {
    const weight = 1 / (ground.scale.varianceFactor * noiseSd[i]! ** 2);
    model.writeDesignRow(row, 0, points.temperatureK[i]!, centreK);
    for (let j = 0; j < p; j++) mean[j]! += weight * row[j]!;
    precision += weight;
    sum += weight * (points.lnValue[i]! - centredValue(model, coefficients, points.temperatureK[i]!, centreK));
  }
  for (let j = 0; j < p; j++) mean[j]! /= precision;
  const offset = sum / precision;
  const whole = Math.max(0, quadraticForm(covariance, mean, p));
  const within = Math.min(whole, Math.max(0, quadraticForm(withinPart, mean, p)));
  const lone = ground.points.sources.length === 1 ? loneOffsetVariance(ground.common) : 0;
  const { value, degreesOfFreedom } = sumOfParts(within + 1 / precision, whole - within + lone, {
    withinDegreesOfFreedom: ground.scale.degreesOfFreedom,
    betweenDegreesOfFreedom: ground.between.degreesOfFreedom,
  });
  const half = limitFactor(degreesOfFreedom) * Math.sqrt(value);
  return { compared: own.length, offset, low: offset - half, high: offset + half };
}

/** The curve of the others: the published model where their points carry it, else the simplest one. */
function withoutSource(
  ws: FitWorkspace,
  model: CurveModel,
  { points, common, limiting }: CommonGround,
  largest: LinearFit,
  { meltingPointK }: CurveSubject,
): CurveWithout | undefined {
  const admissible = admissibleModels(points);
  const linear = LINEAR_MODELS[model];
  const fitted = linear === undefined ? lambdaH(ws, points, common, meltingPointK) : undefined;
  const chosen = linear !== undefined && admissible.includes(linear) ? linear : admissible[0]!;
  const known = chosen === limiting.model && limiting.lastSd === Number.POSITIVE_INFINITY ? largest : undefined;
  const candidate = fitted ?? linearOf(ws, common, chosen, known);
  if (candidate === undefined) return undefined;
  const { names, values } = candidate.published();
  return {
    model: candidate.model,
    coefficients: names.map((name, j) => ({ name, value: values[j]! })),
    temperatureRangeK: [points.lowK, points.highK],
    n: points.n,
    nSources: points.sources.length,
    evaluate: candidate.lnValue,
  };
}

function lambdaH(ws: FitWorkspace, points: KeptPoints, common: CommonGround["common"], meltingPointK: number) {
  return points.distinctTemperatures < 2 ? undefined : fitLambdaH(ws, common, meltingPointK);
}

/** A linear model of the points; `known` where it was fitted before. */
function linearOf(
  ws: FitWorkspace,
  common: CommonGround["common"],
  model: LinearModel,
  known: LinearFit | undefined,
): Candidate | undefined {
  const fit = known ?? fitLinear(ws, common, model);
  return fit === undefined ? undefined : linearCandidate(common, fit);
}

/** Largest |difference| of two curves over the temperatures both cover, ln value; NaN where there are none. */
function largestChange(curve: Curve, { temperatureRangeK: range, evaluate }: CurveWithout): number {
  const low = Math.max(curve.temperatureRangeK[0], range[0]);
  const high = Math.min(curve.temperatureRangeK[1], range[1]);
  if (!(high >= low)) return Number.NaN;
  let largest = 0;
  for (let place = 0; place < PLACES; place++) {
    const T = Math.min(high, low + ((high - low) * place) / (PLACES - 1));
    largest = Math.max(largest, Math.abs(curve.evaluate(T) - evaluate(T)));
  }
  return largest;
}
