import { requireInside } from "../curves/fitted-range.ts";
import type { Curve, NoCurve } from "../records/fits.ts";
import type { Candidate } from "./candidate.ts";
import { curveLimits } from "./curve-limits.ts";
import { curveNotices } from "./curve-notices.ts";
import { type FitWorkspace, fitWorkspace } from "./fit-workspace.ts";
import { type KeptPoints, loadKeptPoints } from "./kept-points.ts";
import { finiteOrBlank } from "./model-choice.ts";
import {
  type CurveContext,
  type CurveSubject,
  type FittedModels,
  fitModels,
  type ScreenedPoints,
} from "./system-models.ts";
import { dissolutionEnthalpy } from "./thermodynamics.ts";

export type { CurveContext, CurveSubject, ScreenedPoints } from "./system-models.ts";

/**
 * The published curve of a system with its limits, from the points that the robust screening fit keeps.
 *
 * Models are fitted by generalised least squares with a random offset per source, so that laboratories carry the weight
 * and not points; the choice follows {@link chooseModel}; the limits follow {@link curveLimits}.
 * @param screened points and kept mask; a conflict between sources gives no curve
 * @param reachK temperatures that the curve shall reach beyond its points: the next point across a transition, K
 * @returns a curve of finite numbers (NaN only for an AICc that is not defined), or the reason why there is none
 */
export function publishedCurve(
  screened: ScreenedPoints,
  subject: CurveSubject,
  context: CurveContext,
  reachK: readonly number[] = [],
): Curve | NoCurve {
  const system = subject.system.index;
  if (screened.agreement === "conflict")
    return { system, reason: "the sources disagree and none of the readings has a majority" };
  const ws = fitWorkspace(screened.points.n);
  const points = loadKeptPoints(ws, screened.points, screened.kept, screened.noiseSd, context.laboratories);
  if (points.n === 0) return { system, reason: noPoints(screened, points.unusable) };
  const fitted = fitModels(ws, points, screened, subject, context);
  if (fitted === undefined)
    return {
      system,
      reason: `no model can be fitted to the ${points.n} kept points: they do not determine its coefficients`,
    };
  const { chosen, runnersUp } = fitted.choice;
  if (chosen === undefined) return { system, reason: runnersUp.map(({ model, why }) => `${model} ${why}`).join("; ") };
  return curveOf(ws, fitted, chosen, subject, context, reachK);
}

/** True if the outcome is a curve. */
export function isCurve(outcome: Curve | NoCurve): outcome is Curve {
  return "evaluate" in outcome;
}

function noPoints(screened: ScreenedPoints, unusable: number): string {
  if (screened.points.n === 0) return "no measurement that a curve could be fitted to";
  if (unusable > 0)
    return `none of the kept points is usable (${unusable} without a finite temperature, value or uncertainty)`;
  return `none of the ${screened.points.n} points is kept`;
}

function curveOf(
  ws: FitWorkspace,
  fitted: FittedModels,
  chosen: Candidate,
  subject: CurveSubject,
  context: CurveContext,
  reachK: readonly number[],
): Curve {
  const { points, scale, choice } = fitted;
  const { system, branch } = subject;
  const limits = curveLimits(fitted, chosen, context);
  const range = [Math.min(points.lowK, ...reachK), Math.max(points.highK, ...reachK)] as const;
  const { names, values, covariance } = chosen.published();
  const p = names.length;
  const { rmsd, ardPercent } = deviations(ws, chosen, points.n);
  return {
    curveId: `${system.id}-${branch}`,
    system: system.index,
    branch,
    model: chosen.model,
    fitBasis: system.fitBasis,
    coefficients: names.map((name, j) => ({
      name,
      value: values[j] as number,
      standardUncertainty: Math.sqrt(covariance[j * p + j] as number),
    })),
    covariance,
    temperatureRangeK: range,
    n: points.n,
    nSources: points.sources.length,
    nLaboratories: countLaboratories(points, context.laboratories),
    rmsd,
    ardPercent,
    withinSd: ownWithinSd(fitted, chosen.parameterCount),
    betweenSd: Math.sqrt(scale.betweenVariance),
    betweenDegreesOfFreedom: fitted.betweenDegreesOfFreedom,
    aicc: finiteOrBlank(chosen.aicc),
    runnersUp: choice.runnersUp,
    notices: curveNotices(fitted, chosen),
    dissolutionEnthalpy: dissolutionEnthalpy(chosen, points, limits),
    evaluate: (T) => {
      requireInside(chosen.model, T, range);
      return chosen.lnValue(T);
    },
    limits: (T) => {
      requireInside(chosen.model, T, range);
      return limits.halfWidths(T);
    },
  };
}

/** Laboratories behind the kept points; a source that states none counts as one of its own. */
function countLaboratories(points: KeptPoints, laboratories: readonly string[]): number {
  const stated = new Set<string>();
  let unstated = 0;
  for (const source of points.sources) {
    const laboratory = laboratories[source] ?? "";
    if (laboratory === "") unstated++;
    else stated.add(laboratory);
  }
  return stated.size + unstated;
}

/**
 * How far the kept points lie from the curve: root mean square deviation of ln value, and average relative deviation,
 * 100/n times the sum of |x - x_calc|/x, percent.
 */
function deviations({ temperatureK, lnValue }: FitWorkspace, chosen: Candidate, n: number) {
  let [squares, relative] = [0, 0];
  for (let i = 0; i < n; i++) {
    const residual = lnValue[i]! - chosen.lnValue(temperatureK[i]!);
    squares += residual * residual;
    relative += Math.abs(Math.expm1(-residual));
  }
  return { rmsd: Math.sqrt(squares / n), ardPercent: (100 * relative) / n };
}

/** Fewest degrees of freedom from which a system's own scatter is told. */
const FEWEST_FOR_OWN_SCALE = 5;

/** Residual SD of ln value within sources, the expected variances' mean scaled by the system's own residuals. */
function ownWithinSd({ points, expectedVariance, scale }: FittedModels, parameterCount: number): number | undefined {
  const { degreesOfFreedom, sumOfSquares } = scale.own;
  if (points.n - parameterCount < FEWEST_FOR_OWN_SCALE || degreesOfFreedom < FEWEST_FOR_OWN_SCALE) return undefined;
  return Math.sqrt((expectedVariance * sumOfSquares) / degreesOfFreedom);
}
