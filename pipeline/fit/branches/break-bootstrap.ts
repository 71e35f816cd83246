import { seededRandom } from "../../numerics/random.ts";
import { pooledDegreesOfFreedom } from "../system-scale.ts";
import { type BreakScan, inner } from "./break-scan.ts";

/** Which way the slope d ln s/dT changes at the break on heating. */
export type Sense = "falls" | "rises";

/** The best break of one sense for one set of values. */
export interface BestBreak {
  /** Position in the scan; -1 where no position brings anything. */
  readonly position: number;
  /** Fall of the residual sum of squares against the smooth model. */
  readonly gain: number;
  /** The likelihood-ratio statistic, see {@link bestBreak}. */
  readonly statistic: number;
}

/** What the parametric bootstrap says of a break. */
export interface BootstrapTest {
  readonly probability: number;
  /** Values of the statistic under the smooth model, ascending; cut short where the test was stopped. */
  readonly replicates: Float64Array;
}

/** Replicates behind an accepted break. */
const REPLICATES = 999;
/** Coefficients of the broken model, its position among them. */
const BROKEN_COEFFICIENTS = 5;
/** Coefficients of the smooth model. */
const SMOOTH_COEFFICIENTS = 3;

/**
 * The best break of one sense: the largest fall of the residual sum of squares over all positions, divided by the
 * variance left, s^2 = (d0 + q)/(d0 + n - 5): the residuals of the broken model moderated by the scatter usual in
 * the sources, as in {@link systemScale}. It orders breaks as the likelihood ratio does; the supremum over the position
 * is inside it.
 *
 * @param residuals whitened values less the smooth model
 * @param sum their sum of squares
 */
export function bestBreak(scan: BreakScan, residuals: Float64Array, sum: number, sense: Sense): BestBreak {
  const { rows, breakK, directions } = scan;
  let [position, gain] = [-1, 0];
  for (let b = 0; b < breakK.length; b++) {
    const at = 2 * rows * b;
    let [first, second] = [0, 0];
    for (let i = 0; i < rows; i++) {
      const value = residuals[i]!;
      first += directions[at + i]! * value;
      second += directions[at + rows + i]! * value;
    }
    const own = first * first + second * second;
    if (own <= gain) continue;
    const change = slopeChange(scan, b, first, second);
    if (sense === "falls" ? change < 0 : change > 0) [position, gain] = [b, own];
  }
  return { position, gain, statistic: gain / brokenVariance(scan.n, sum - gain) };
}

/** Sign of the change of slope on heating at a position, from the components along its two directions. */
export function slopeChange({ triangle }: BreakScan, position: number, first: number, second: number): number {
  const own = triangle[3 * position + 2]!;
  return first - (own > 0 ? (triangle[3 * position + 1]! * second) / own : 0);
}

/** Variance factor of the broken model, moderated by the pooled scatter. */
export function brokenVariance(n: number, residualSumOfSquares: number): number {
  return (pooledDegreesOfFreedom + residualSumOfSquares) / brokenDegreesOfFreedom(n);
}

/** Degrees of freedom of that factor. */
export function brokenDegreesOfFreedom(n: number): number {
  return pooledDegreesOfFreedom + Math.max(1, n - BROKEN_COEFFICIENTS);
}

/**
 * Statistic that a break of one sense must pass even at a place known beforehand, where the gain has two degrees of
 * freedom and either sense the same chance: half the tail of F(2, v) is `level`. The supremum over the place asks for more, so that
 * below this no bootstrap is needed.
 */
export function leastStatistic(n: number, level: number): number {
  const v = brokenDegreesOfFreedom(n);
  return v * ((2 * level) ** (-2 / v) - 1);
}

/** Exceedances after a number of replicates at which p < 0.01 is out of reach: its chance is below 1 in 300 if p is 0.005. */
const FUTILE: readonly (readonly [replicates: number, exceedances: number])[] = [
  [30, 3],
  [100, 4],
  [300, 7],
];

/**
 * Parametric bootstrap of the statistic under the smooth model: Gaussian values about it with the scatter that the points
 * have about it, each searched over all positions as the data were. p = (1 + exceedances)/(1 + replicates), 999 of them;
 * stopped as soon as p can no longer fall below `level`, or will hardly do so.
 *
 * @param seed starts the random numbers: the same for the same system on every machine
 * @param most replicates behind a test that is not stopped
 * @see Davison and Hinkley, Bootstrap Methods and their Application (1997), section 4.2; the law of the statistic is not
 *   chi-square because the position has no meaning under the smooth model: Davies, Biometrika 74 (1987) 33-43.
 */
export function bootstrapBreak(
  scan: BreakScan,
  statistic: number,
  sense: Sense,
  level: number,
  seed: number,
  most = REPLICATES,
): BootstrapTest {
  const { rows, n, smooth, heldCurvature, smoothSum } = scan;
  const random = seededRandom(seed);
  const freedom = pooledDegreesOfFreedom + Math.max(1, n - SMOOTH_COEFFICIENTS);
  const sd = Math.sqrt((pooledDegreesOfFreedom + smoothSum) / freedom);
  const enough = Math.ceil(level * (most + 1)) - 1;
  const values = new Float64Array(rows);
  const replicates = new Float64Array(most);
  let exceedances = 0;
  for (let r = 0; r < most; r++) {
    for (let i = 0; i < n; i++) values[i] = sd * random.normal();
    values[n] = heldCurvature ? random.normal() : 0;
    values[n + 1] = 0;
    for (let k = 0; k < SMOOTH_COEFFICIENTS; k++) {
      const part = inner(smooth, k * rows, values, 0, rows);
      for (let i = 0; i < rows; i++) values[i]! -= part * smooth[k * rows + i]!;
    }
    replicates[r] = bestBreak(scan, values, inner(values, 0, values, 0, rows), sense).statistic;
    if (replicates[r]! < statistic) continue;
    exceedances++;
    const futile = level <= 0.01 && FUTILE.some(([after, many]) => r < after && exceedances >= many);
    if (exceedances >= enough || futile)
      return { probability: (1 + exceedances) / (2 + r), replicates: replicates.subarray(0, r + 1).sort() };
  }
  return { probability: (1 + exceedances) / (1 + most), replicates: replicates.sort() };
}

/** Seed from a system's id: FNV-1a, 32 bits. */
export function seedOf(id: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < id.length; i++) hash = Math.imul(hash ^ id.charCodeAt(i), 0x01000193);
  return hash >>> 0;
}
