import { transformCovariance } from "../curves/coefficient-transformation.ts";
import { lnMoleFraction, parameterCount, publishedFromLogarithms, writeGradientRow } from "../curves/lambda-h.ts";
import {
  type Candidate,
  type CommonFit,
  correctedAkaike,
  loneOffsetVariance,
  setPointCovariance,
} from "./candidate.ts";
import type { FitWorkspace } from "./fit-workspace.ts";
import { leaveOneOut } from "./generalised-least-squares.ts";
import { solve, whiten } from "./random-intercept.ts";
import { setAbsoluteVariances } from "./row-variances.ts";

/** ln lambda at which the search may start: association numbers from 0.02 to 7. */
const STARTS = [-4, -2, -0.7, 0.5, 2] as const;
const MOST_ITERATIONS = 60;
/** Association numbers outside these limits mean that the data do not determine the equation. */
const LEAST_LN_LAMBDA = Math.log(1e-6);
const LARGEST_LN_LAMBDA = Math.log(1e3);

/** A point of the search: parameters (ln lambda, ln g), g = lambda h, and what the fit is worth there. */
interface Trial {
  readonly lnLambda: number;
  readonly lnG: number;
  readonly residualSumOfSquares: number;
}

/** Normal equations of the linearised model at a trial: J' K^-1 J = (a, b; b, c), J' K^-1 r, J' K^-1 1. */
interface Normal {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly right: readonly [number, number];
  readonly ones: readonly [number, number];
}

/**
 * Fits the lambda-h equation by Levenberg-Marquardt steps in (ln lambda, ln lambda h), under the common covariance.
 *
 * The start is the best of five association numbers, each with the lambda h that least squares gives through the
 * melting point in the equation's own straight form.
 * @param meltingPointK Tm of the form dissolved, K, above every kept temperature
 * @returns undefined where no start is usable, the steps do not settle, or lambda leaves 1e-6 to 1000
 * @see Marquardt, J. Soc. Ind. Appl. Math. 11 (1963) 431-441.
 */
export function fitLambdaH(ws: FitWorkspace, common: CommonFit, meltingPointK: number): Candidate | undefined {
  const { n } = common.points;
  for (let i = 0; i < n; i++) ws.slopes[i] = 1 / ws.temperatureK[i]! - 1 / meltingPointK;
  let best = bestStart(ws, common);
  if (best === undefined) return undefined;
  evaluateAt(ws, common, best.lnLambda, best.lnG);
  let normal = normalEquations(ws, n);
  let damping = 1e-3;
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
    const step = marquardtStep(normal, damping);
    const size = Math.abs(step[0]) + Math.abs(step[1]);
    const tried = evaluateAt(ws, common, best.lnLambda + step[0], best.lnG + step[1]);
    const better = tried !== undefined && tried.residualSumOfSquares <= best.residualSumOfSquares;
    if (better) best = tried;
    // A tiny step that does not improve is the minimum to the digits doubles allow.
    if (size < (better ? 1e-8 : 1e-7)) return candidateAt(ws, common, best, meltingPointK);
    damping = better ? Math.max(damping / 10, 1e-12) : damping * 10;
    if (better) normal = normalEquations(ws, n);
  }
  return undefined;
}

function bestStart(ws: FitWorkspace, common: CommonFit): Trial | undefined {
  const { slopes: reciprocal, lnValue } = ws;
  let best: Trial | undefined;
  for (const lnLambda of STARTS) {
    const lambda = Math.exp(lnLambda);
    let [products, squares] = [0, 0];
    for (let i = 0; i < common.points.n; i++) {
      const t = reciprocal[i]!;
      products += t * Math.log1p(lambda * Math.expm1(-lnValue[i]!));
      squares += t * t;
    }
    if (!(products > 0)) continue;
    const tried = evaluateAt(ws, common, lnLambda, Math.log(products / squares));
    if (tried && !(best && best.residualSumOfSquares <= tried.residualSumOfSquares)) best = tried;
  }
  return best;
}

/** Fitted values, gradient (`ws.columns`), residuals, covariance and weighted sum of squares at a trial. */
function evaluateAt(ws: FitWorkspace, common: CommonFit, lnLambda: number, lnG: number): Trial | undefined {
  if (!(lnLambda > LEAST_LN_LAMBDA && lnLambda < LARGEST_LN_LAMBDA)) return undefined;
  const { points, weighting, within } = common;
  const { slopes: reciprocal, fitted, residuals, whitened, design: row } = ws;
  const [first, second] = ws.columns as [Float64Array, Float64Array];
  const lambda = Math.exp(lnLambda);
  const g = Math.exp(lnG);
  for (let i = 0; i < points.n; i++) {
    const v = g * reciprocal[i]!;
    fitted[i] = lnMoleFraction(lambda, v);
    writeGradientRow(row, 0, lambda, v);
    first[i] = row[0]!;
    second[i] = row[1]!;
  }
  const absolute = weighting === "absolute";
  if (absolute && !setAbsoluteVariances(ws, points.n, within, fitted)) return undefined;
  setPointCovariance(ws, common, absolute ? ws.variance : ws.startVariance);
  const response = absolute ? ws.response : ws.lnValue;
  for (let i = 0; i < points.n; i++) residuals[i] = response[i]! - fitted[i]!;
  whiten(ws.common, residuals, whitened, 0, 1);
  let residualSumOfSquares = 0;
  for (let i = 0; i < points.n; i++) residualSumOfSquares += whitened[i]! * whitened[i]!;
  return Number.isFinite(residualSumOfSquares) ? { lnLambda, lnG, residualSumOfSquares } : undefined;
}

/** Normal equations at the trial evaluated last; leaves K^-1 J in `ws.solvedDesign`. */
function normalEquations(ws: FitWorkspace, n: number): Normal {
  const { common: K, residuals, solvedDesign } = ws;
  const [first, second] = ws.columns as [Float64Array, Float64Array];
  solve(K, first, solvedDesign, 0, 2);
  solve(K, second, solvedDesign, 1, 2);
  let [a, b, c, r0, r1, s0, s1] = [0, 0, 0, 0, 0, 0, 0];
  for (let i = 0; i < n; i++) {
    const [f, s] = [solvedDesign[2 * i]!, solvedDesign[2 * i + 1]!];
    a += f * first[i]!;
    b += f * second[i]!;
    c += s * second[i]!;
    r0 += f * residuals[i]!;
    r1 += s * residuals[i]!;
    s0 += f;
    s1 += s;
  }
  return { a, b, c, right: [r0, r1], ones: [s0, s1] };
}

function marquardtStep({ a, b, c, right }: Normal, damping: number): readonly [number, number] {
  const [dampedA, dampedC] = [a * (1 + damping), c * (1 + damping)];
  const determinant = dampedA * dampedC - b * b;
  return [(dampedC * right[0] - b * right[1]) / determinant, (dampedA * right[1] - b * right[0]) / determinant];
}

function candidateAt(ws: FitWorkspace, common: CommonFit, best: Trial, meltingPointK: number): Candidate | undefined {
  evaluateAt(ws, common, best.lnLambda, best.lnG);
  const normal = normalEquations(ws, common.points.n);
  const { a, b, c } = normal;
  const determinant = a * c - b * b;
  if (!(determinant > 1e-13 * a * c)) return undefined;
  const covariance = [c / determinant, -b / determinant, -b / determinant, a / determinant];
  const lambda = Math.exp(best.lnLambda);
  const g = Math.exp(best.lnG);
  const h = g / lambda;
  const vAt = (T: number) => g * (1 / T - 1 / meltingPointK);
  return {
    model: "Buchowski-Ksiazczak lambda-h",
    parameterCount,
    lnValue: (T) => lnMoleFraction(lambda, vAt(T)),
    slope: (T) => g / T ** 2 / (1 + (lambda - 1) * Math.exp(-vAt(T))),
    residualSumOfSquares: best.residualSumOfSquares,
    aicc: correctedAkaike(ws, common, best.residualSumOfSquares, parameterCount),
    leaveOneOut: leaveOneOut(ws, ws.common, covariance, parameterCount),
    standardErrorOfRise: () => 0,
    published: () => {
      const matrix = publishedFromLogarithms(lambda, h);
      const c2 = transformCovariance(matrix, withOffset(common, covariance, normal.ones), parameterCount);
      // The melting point is given, not fitted: its row and column are zero.
      const padded = [c2[0]!, c2[1]!, 0, c2[2]!, c2[3]!, 0, 0, 0, 0];
      return { names: ["lambda", "h", "Tm"], values: [lambda, h, meltingPointK], covariance: padded };
    },
  };
}

/** Adds what the unknown offset of a single source does to the coefficients: t a a', t its variance, a = C J' K^-1 1. */
function withOffset(common: CommonFit, covariance: number[], [s0, s1]: readonly [number, number]): number[] {
  if (common.points.sources.length > 1) return covariance;
  const [c00, c01, , c11] = covariance as [number, number, number, number];
  const [a0, a1] = [c00 * s0 + c01 * s1, c01 * s0 + c11 * s1];
  const t = loneOffsetVariance(common);
  return [c00 + t * a0 * a0, c01 + t * a0 * a1, c01 + t * a0 * a1, c11 + t * a1 * a1];
}
