import { transformCovariance } from "../curves/coefficient-transformation.ts";
import { lnMoleFraction, parameterCount, publishedFromLogarithms, writeGradientRow } from "../curves/lambda-h.ts";
import { type Candidate, type CommonFit, correctedAkaike, pointCovariance } from "./candidate.ts";
import { leaveOneOut } from "./generalised-least-squares.ts";
import { type RandomIntercept, solve, whiten } from "./random-intercept.ts";
import { absoluteWeighted } from "./row-variances.ts";

/** ln lambda at which the search may start: association numbers from 0.02 to 7. */
const STARTS = [-4, -2, -0.7, 0.5, 2] as const;
const MOST_ITERATIONS = 60;
/** Association numbers outside these limits mean that the data do not determine the equation. */
const LEAST_LN_LAMBDA = Math.log(1e-6);
const LARGEST_LN_LAMBDA = Math.log(1e3);

interface State {
  lnLambda: number;
  lnG: number;
  K: RandomIntercept;
  gradient: readonly [Float64Array, Float64Array];
  /** Response less fitted ln value, in the weighting in force. */
  residuals: Float64Array;
  lnResiduals: Float64Array;
  residualSumOfSquares: number;
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
export function fitLambdaH(common: CommonFit, meltingPointK: number): Candidate | undefined {
  const reciprocal = common.points.temperatureK.map((T) => 1 / T - 1 / meltingPointK);
  let state = bestStart(common, reciprocal);
  if (state === undefined) return undefined;
  let damping = 1e-3;
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
    const step = marquardtStep(state, damping);
    const tried = evaluateAt(common, reciprocal, state.lnLambda + step[0], state.lnG + step[1]);
    if (tried !== undefined && tried.residualSumOfSquares <= state.residualSumOfSquares) {
      const settled = Math.abs(step[0]) + Math.abs(step[1]) < 1e-9;
      state = tried;
      if (settled) return candidate(common, state, meltingPointK);
      damping = Math.max(damping / 10, 1e-12);
    } else {
      // No step improves on the minimum to the digits doubles allow.
      if (Math.abs(step[0]) + Math.abs(step[1]) < 1e-8) return candidate(common, state, meltingPointK);
      damping = Math.max(damping * 10, 1e-9);
    }
  }
  return undefined;
}

function bestStart(common: CommonFit, reciprocal: Float64Array): State | undefined {
  let best: State | undefined;
  for (const lnLambda of STARTS) {
    const lambda = Math.exp(lnLambda);
    let [products, squares] = [0, 0];
    for (let i = 0; i < reciprocal.length; i++) {
      const t = reciprocal[i] as number;
      products += t * Math.log1p(lambda * Math.expm1(-(common.points.lnValue[i] as number)));
      squares += t * t;
    }
    if (!(products > 0)) continue;
    const tried = evaluateAt(common, reciprocal, lnLambda, Math.log(products / squares));
    if (tried && !(best && best.residualSumOfSquares <= tried.residualSumOfSquares)) best = tried;
  }
  return best;
}

function evaluateAt(common: CommonFit, reciprocal: Float64Array, lnLambda: number, lnG: number): State | undefined {
  if (!(lnLambda > LEAST_LN_LAMBDA && lnLambda < LARGEST_LN_LAMBDA)) return undefined;
  const n = reciprocal.length;
  const lambda = Math.exp(lnLambda);
  const g = Math.exp(lnG);
  const fitted = new Float64Array(n);
  const row = new Float64Array(2);
  const gradient = [new Float64Array(n), new Float64Array(n)] as const;
  for (let i = 0; i < n; i++) {
    const v = g * (reciprocal[i] as number);
    fitted[i] = lnMoleFraction(lambda, v);
    writeGradientRow(row, 0, lambda, v);
    gradient[0][i] = row[0] as number;
    gradient[1][i] = row[1] as number;
  }
  const { weighting, points, within, start } = common;
  const weighted = weighting === "absolute" ? absoluteWeighted(points, fitted, within) : start;
  const K = pointCovariance(common, weighted.variance);
  const residuals = weighted.response.map((y, i) => y - (fitted[i] as number));
  const whitened = new Float64Array(n);
  whiten(K, residuals, new Float64Array(K.precision.length), whitened, 0, 1);
  const residualSumOfSquares = dot(whitened, whitened);
  if (!Number.isFinite(residualSumOfSquares)) return undefined;
  const lnResiduals = points.lnValue.map((y, i) => y - (fitted[i] as number));
  return { lnLambda, lnG, K, gradient, residuals, lnResiduals, residualSumOfSquares };
}

/** Normal equations of the linearised model: J' K^-1 J as (a, b, c) and J' K^-1 r. */
function normalEquations({ K, gradient, residuals }: State) {
  const n = residuals.length;
  const sums = new Float64Array(K.precision.length);
  const [first, second] = [new Float64Array(n), new Float64Array(n)];
  solve(K, gradient[0], sums, first, 0, 1);
  solve(K, gradient[1], sums, second, 0, 1);
  return {
    a: dot(first, gradient[0]),
    b: dot(first, gradient[1]),
    c: dot(second, gradient[1]),
    right: [dot(first, residuals), dot(second, residuals)] as const,
    solvedRows: [first, second] as const,
  };
}

function marquardtStep(state: State, damping: number): readonly [number, number] {
  const { a, b, c, right } = normalEquations(state);
  const [dampedA, dampedC] = [a * (1 + damping), c * (1 + damping)];
  const determinant = dampedA * dampedC - b * b;
  return [(dampedC * right[0] - b * right[1]) / determinant, (dampedA * right[1] - b * right[0]) / determinant];
}

function candidate(common: CommonFit, state: State, meltingPointK: number): Candidate | undefined {
  const { a, b, c, solvedRows } = normalEquations(state);
  const determinant = a * c - b * b;
  if (!(determinant > 1e-13 * a * c)) return undefined;
  const covariance = Float64Array.of(c / determinant, -b / determinant, -b / determinant, a / determinant);
  const lambda = Math.exp(state.lnLambda);
  const g = Math.exp(state.lnG);
  const h = g / lambda;
  const vAt = (T: number) => g * (1 / T - 1 / meltingPointK);
  return {
    model: "Buchowski-Ksiazczak lambda-h",
    parameterCount,
    lnValue: (T) => lnMoleFraction(lambda, vAt(T)),
    slope: (T) => g / T ** 2 / (1 + (lambda - 1) * Math.exp(-vAt(T))),
    residuals: state.lnResiduals,
    aicc: correctedAkaike(common, state.K, state.residualSumOfSquares, state.lnResiduals, parameterCount),
    leaveOneOut: leaveOneOut(state.K, state.gradient, covariance, state.residuals),
    standardErrorOfRise: () => 0,
    published: {
      names: ["lambda", "h", "Tm"],
      values: Float64Array.of(lambda, h, meltingPointK),
      covariance: withMeltingPoint(
        transformCovariance(
          publishedFromLogarithms(lambda, h),
          withOffset(common, covariance, solvedRows),
          parameterCount,
        ),
      ),
    },
  };
}

/** Adds what the unknown offset of a single source does to the coefficients: tau^2 a a', a = C J' K^-1 1. */
function withOffset(
  common: CommonFit,
  covariance: Float64Array,
  solvedRows: readonly [Float64Array, Float64Array],
): Float64Array {
  if (common.points.sources.length > 1) return covariance;
  const [s0, s1] = [sum(solvedRows[0]), sum(solvedRows[1])];
  const [c00, c01, c11] = [covariance[0] as number, covariance[1] as number, covariance[3] as number];
  const [a0, a1] = [c00 * s0 + c01 * s1, c01 * s0 + c11 * s1];
  const t = common.betweenVariance;
  return Float64Array.of(c00 + t * a0 * a0, c01 + t * a0 * a1, c01 + t * a0 * a1, c11 + t * a1 * a1);
}

/** The melting point is given, not fitted: its row and column are zero. */
function withMeltingPoint(c: Float64Array): Float64Array {
  return Float64Array.of(c[0] as number, c[1] as number, 0, c[2] as number, c[3] as number, 0, 0, 0, 0);
}

function sum(values: Float64Array): number {
  let total = 0;
  for (const value of values) total += value;
  return total;
}

function dot(left: Float64Array, right: Float64Array): number {
  let total = 0;
  for (let i = 0; i < left.length; i++) total += (left[i] as number) * (right[i] as number);
  return total;
}
