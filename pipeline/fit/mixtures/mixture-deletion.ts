import { quadraticForm } from "../../curves/coefficient-transformation.ts";
import type { MixturePoints } from "./mixture-points.ts";
import { type MixtureRegression, type MixtureScales, rowAt, rowValue } from "./mixture-regression.ts";

/** A point against what all others say, those of its own composition and source included. */
export interface PointDeviation {
  readonly deviation: number;
  readonly sd: number;
  /** Residual conditional on the offset of its composition, and the share of its variance that is left in it. */
  readonly residual: number;
  readonly share: number;
}

/**
 * Deviations of the points of one member from the surface with their composition's own offset; of a point that takes part
 * with the point left out, in closed form: (P y)_i / P_ii with P = K^-1 - K^-1 F C F' K^-1.
 *
 * @param use 1 = the point takes part
 * @returns by point of the member
 */
export function memberDeviations(
  points: MixturePoints,
  use: Uint8Array,
  member: number,
  fit: MixtureRegression,
  { variance, lackOfFitVariance }: MixtureScales,
): PointDeviation[] {
  const [from, to] = [points.start[member]!, points.start[member + 1]!];
  const own = Array.from({ length: to - from }, (_, k) => from + k);
  const rows = own.map((i) => rowAt(fit, points.fraction[i]!, points.temperatureK[i]!, points.source[i]!));
  const rest = own.map((i, k) => points.lnValue[i]! - rowValue(fit, rows[k]!));
  const [mean, q] = [new Float64Array(fit.columns), fit.columns];
  let [precision, offset] = [0, 0];
  own.forEach((i, k) => {
    if (use[i] !== 1) return;
    const weight = 1 / variance[i]!;
    precision += weight;
    offset += weight * rest[k]!;
    for (let j = 0; j < q; j++) mean[j]! += weight * rows[k]![j]!;
  });
  // Shrinkage of the composition's own offset: L / (1 + L S).
  const shrunk = 1 / (1 / lackOfFitVariance + precision);
  return own.map((i, k): PointDeviation => {
    const v = variance[i]!;
    const row = rows[k]!.map((value, j) => value - shrunk * mean[j]!);
    const residual = rest[k]! - shrunk * offset;
    const leverage = quadraticForm(fit.covariance, row, q) + shrunk;
    if (use[i] !== 1) return { deviation: residual, sd: Math.sqrt(leverage + v), residual, share: 0 };
    // v P_ii = 1 - leverage/v; at 0 the point alone decides a coefficient.
    const share = Math.max(0, 1 - leverage / v);
    const deviation = share > 1e-9 ? residual / share : 0;
    return { deviation, sd: Math.sqrt(v / Math.max(share, 1e-9)), residual, share };
  });
}
