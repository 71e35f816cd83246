import type { PooledScales } from "../../records/fits.ts";
import { memberDeviations } from "./mixture-deletion.ts";
import { allMemberSums } from "./mixture-information.ts";
import type { MixturePoints } from "./mixture-points.ts";
import { fitMembers, type MixtureScales, surfaceValue } from "./mixture-regression.ts";
import { FLEXIBLE_SURFACE } from "./mixture-surfaces.ts";

/** Scales of a mixture with what they rest on. */
export interface EstimatedScales extends MixtureScales {
  /** Degrees of freedom of the noise within sources, and of the lack of fit of compositions. */
  readonly noiseDegreesOfFreedom: number;
  readonly lackOfFitDegreesOfFreedom: number;
}

/** Lack of fit of a composition assumed before the mixture itself has been looked at, SD of ln value. */
const USUAL_LACK_OF_FIT = 0.03;
/** Least between-source scatter, so that the offset of a source is never fixed. */
const LEAST_BETWEEN = 1e-3;
/** Degrees of freedom granted to the noise as the screening fits assume it. */
const POOLED_DEGREES_OF_FREEDOM = 4;
/** Standard deviations of the lack of fit, ln value, over which its variance is averaged. */
const LACK_OF_FIT_GRID = [0.005, 0.01, 0.02, 0.035, 0.06, 0.1, 0.16] as const;
/** Half a step of mass fraction for the slope over composition. */
const STEP = 1e-4;

function flexible(points: MixturePoints, use: Uint8Array, scales: MixtureScales, centreK: number) {
  const sums = allMemberSums(points, use, FLEXIBLE_SURFACE, centreK, scales);
  return fitMembers(points, sums, FLEXIBLE_SURFACE, centreK, scales);
}

/** Scales before the mixture has been looked at: pooled noise and scatter between sources, a usual lack of fit. */
export function assumedScales(points: MixturePoints, pooled: PooledScales, centreK: number): MixtureScales {
  const scales = {
    variance: points.noiseSd.map((sd) => sd * sd),
    betweenVariance: Math.max(pooled.between, LEAST_BETWEEN) ** 2,
    lackOfFitVariance: USUAL_LACK_OF_FIT ** 2,
  };
  const first = flexible(points, points.candidate, scales, centreK);
  if (first === undefined) return scales;
  // An uncertain composition moves the value as the surface slopes: effective variance.
  const variance = scales.variance.map((v, i) => {
    const u = points.fractionU[i]!;
    if (!(u > 0 && points.candidate[i] === 1)) return v;
    const [w, T] = [points.fraction[i]!, points.temperatureK[i]!];
    const slope = (surfaceValue(first, w + STEP, T) - surfaceValue(first, w - STEP, T)) / (2 * STEP);
    return v + (slope * u) ** 2;
  });
  return { ...scales, variance };
}

/**
 * Scales of a mixture from its own residuals about the flexible surface: the noise moderated towards what the screening
 * fits assume; the variance of the lack of fit as its mean over a grid, weighted by the restricted likelihood, since a
 * few compositions leave it nearly open and its most likely value is often 0.
 *
 * @see Smyth, Stat. Appl. Genet. Mol. Biol. 3 (2004) 3, for the moderated variance.
 */
export function estimatedScales(
  points: MixturePoints,
  use: Uint8Array,
  assumed: MixtureScales,
  centreK: number,
): EstimatedScales {
  let factor = 1;
  let lackOfFitVariance = assumed.lackOfFitVariance;
  let own = 0;
  for (let round = 0; round < 3; round++) {
    const scales = { ...assumed, variance: assumed.variance.map((v) => v * factor), lackOfFitVariance };
    const fit = flexible(points, use, scales, centreK);
    if (fit === undefined) break;
    let squares = 0;
    own = 0;
    for (let m = 0; m < points.members; m++)
      memberDeviations(points, use, m, fit, scales).forEach(({ residual, share }, k) => {
        const i = points.start[m]! + k;
        if (use[i] !== 1) return;
        squares += residual ** 2 / assumed.variance[i]!;
        own += share;
      });
    factor = (POOLED_DEGREES_OF_FREEDOM + squares) / (POOLED_DEGREES_OF_FREEDOM + own);
    lackOfFitVariance = meanLackOfFit(
      points,
      use,
      { ...assumed, variance: assumed.variance.map((v) => v * factor) },
      centreK,
    );
  }
  const compositions = new Set(Array.from(points.member).filter((_, i) => use[i] === 1)).size;
  return {
    ...{ lackOfFitVariance, betweenVariance: assumed.betweenVariance },
    variance: assumed.variance.map((v) => v * factor),
    noiseDegreesOfFreedom: POOLED_DEGREES_OF_FREEDOM + own,
    lackOfFitDegreesOfFreedom: Math.max(3, compositions),
  };
}

function meanLackOfFit(points: MixturePoints, use: Uint8Array, assumed: MixtureScales, centreK: number): number {
  const likelihoods = LACK_OF_FIT_GRID.map((sd) => {
    const scales = { ...assumed, lackOfFitVariance: sd * sd };
    const fit = flexible(points, use, scales, centreK);
    return fit === undefined ? Number.NEGATIVE_INFINITY : -(fit.logDeterminant + fit.residualSumOfSquares) / 2;
  });
  const best = Math.max(...likelihoods);
  if (!Number.isFinite(best)) return assumed.lackOfFitVariance;
  let [sum, weights] = [0, 0];
  likelihoods.forEach((likelihood, k) => {
    const weight = Math.exp(likelihood - best);
    sum += weight * (LACK_OF_FIT_GRID[k] as number) ** 2;
    weights += weight;
  });
  return sum / weights;
}
