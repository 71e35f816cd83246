import { createLeastSquaresWorkspace, type LeastSquaresWorkspace } from "../numerics/least-squares.ts";
import { createRandomIntercept, type RandomIntercept } from "./random-intercept.ts";

/** Most coefficients of a model. */
export const mostCoefficients = 3;

/** Buffers of one fit, used again by the next: the loops over an edition's systems allocate nothing the size of a system. */
export interface FitWorkspace {
  readonly capacity: number;
  readonly temperatureK: Float64Array;
  readonly temperatureU: Float64Array;
  readonly lnValue: Float64Array;
  readonly lnU: Float64Array;
  readonly noiseSd: Float64Array;
  readonly block: Int32Array;
  /** Columns of the model being fitted. */
  readonly columns: readonly Float64Array[];
  /** Expected variance within sources, and response, of the start and of the weighting in force. */
  readonly startVariance: Float64Array;
  readonly startFitted: Float64Array;
  readonly variance: Float64Array;
  readonly response: Float64Array;
  readonly fitted: Float64Array;
  readonly residuals: Float64Array;
  readonly slopes: Float64Array;
  /** Covariance of the points of the common fit, and the same with free offsets. */
  readonly common: RandomIntercept;
  readonly free: RandomIntercept;
  /** Whitened design (row-major) and response, with room for one observation on a coefficient. */
  readonly design: Float64Array;
  readonly whitened: Float64Array;
  /** K^-1 F, row-major, and K^-1 r. */
  readonly solvedDesign: Float64Array;
  readonly solvedResiduals: Float64Array;
  readonly leastSquares: LeastSquaresWorkspace;
}

let workspace: FitWorkspace | undefined;

/**
 * The buffers, with room for n points. They hold nothing between two fits; a fit runs to its end before the next begins.
 */
export function fitWorkspace(n: number): FitWorkspace {
  if (workspace === undefined || workspace.capacity < n) workspace = createFitWorkspace(Math.max(64, 2 * n));
  return workspace;
}

function createFitWorkspace(capacity: number): FitWorkspace {
  const reals = () => new Float64Array(capacity);
  const block = new Int32Array(capacity);
  return {
    ...{ capacity, block, temperatureK: reals(), temperatureU: reals(), lnValue: reals(), lnU: reals() },
    ...{ noiseSd: reals(), columns: Array.from({ length: mostCoefficients }, reals) },
    ...{ startVariance: reals(), startFitted: reals(), variance: reals(), response: reals(), fitted: reals() },
    ...{ residuals: reals(), slopes: reals(), solvedResiduals: reals() },
    common: createRandomIntercept(capacity, capacity, block),
    free: createRandomIntercept(capacity, capacity, block),
    design: new Float64Array((capacity + 1) * mostCoefficients),
    whitened: new Float64Array(capacity + 1),
    solvedDesign: new Float64Array(capacity * mostCoefficients),
    leastSquares: createLeastSquaresWorkspace(capacity + 1, mostCoefficients),
  };
}
