import type { Curve, RobustFit } from "../records/fits.ts";

/** A curve with the sources (positions in the edition's list) whose points it rests on. */
export interface ComparedCurve {
  readonly curve: Pick<Curve, "evaluate" | "limits" | "temperatureRangeK" | "betweenSd">;
  readonly sources: ReadonlySet<number>;
  /** Mean variance, ln value, that the points of one source share: densities, molar masses, composition of the solvent. */
  readonly sharedVariance: number;
}

/** How far one curve lies from another at a temperature. */
export interface CurveDifference {
  readonly temperatureK: number;
  /** ln of the ratio of the first value to the second. */
  readonly lnRatio: number;
  /** Half-width of its 95 % limits. */
  readonly half: number;
}

/** Where two curves cross. */
export interface Crossing {
  readonly temperatureK: number;
  /** 95 % limits, K; NaN on a side where the order of the two is not settled within their common range. */
  readonly lowK: number;
  readonly highK: number;
  /** True if the first curve is the lower one on the cold side. */
  readonly firstLowerWhenCold: boolean;
}

/** A curve with what {@link differenceAt} needs of the points behind it: those kept inside its range. */
export function comparedCurve(curve: Curve, { points, kept }: RobustFit, sharedU: Float64Array): ComparedCurve {
  const [low, high] = curve.temperatureRangeK;
  const sources = new Set<number>();
  let [n, squares] = [0, 0];
  for (let i = 0; i < points.n; i++) {
    const T = points.temperatureK[i] as number;
    if (kept[i] !== 1 || T < low || T > high) continue;
    sources.add(points.source[i] as number);
    n++;
    squares += (sharedU[points.row[i] as number] as number) ** 2;
  }
  return { curve, sources, sharedVariance: n > 0 && squares >= 0 ? squares / n : 0 };
}

/** Normal quantile of two-sided 95 % limits. */
const NORMAL_95 = 1.959963984540054;
/** Part of the squared half-width that stays whatever cancels. */
const LEAST_SHARE = 0.01;
/** Steps in which a common range is searched for sign changes; the models bend once at most. */
const STEPS = 64;

/** Temperatures that both curves cover, K; undefined where they share none. Nothing is extrapolated. */
export function commonRangeK(a: ComparedCurve, b: ComparedCurve): readonly [number, number] | undefined {
  const low = Math.max(a.curve.temperatureRangeK[0], b.curve.temperatureRangeK[0]);
  const high = Math.min(a.curve.temperatureRangeK[1], b.curve.temperatureRangeK[1]);
  return low <= high ? [low, high] : undefined;
}

/**
 * Difference of two curves fitted on the same basis, with 95 % limits:
 * half = sqrt(ha^2 + hb^2 - 2 z^2 (tau^2 + s^2) m/(na nb)).
 *
 * ha and hb are the half-widths of the curves, which hold the offsets of their sources. A source that measured both (m of
 * them) has one offset in both curves, and it cancels; na and nb are the numbers of sources, tau the between-source SD, s
 * what the points of a source share, z the normal quantile, no larger than the factor in ha and hb, so that no more than
 * the common part is taken off.
 *
 * @throws RangeError outside the range of either curve
 */
export function differenceAt(a: ComparedCurve, b: ComparedCurve, temperatureK: number): CurveDifference {
  const lnRatio = a.curve.evaluate(temperatureK) - b.curve.evaluate(temperatureK);
  const squares = a.curve.limits(temperatureK).curve ** 2 + b.curve.limits(temperatureK).curve ** 2;
  let both = 0;
  for (const source of a.sources) if (b.sources.has(source)) both++;
  const common = Math.min(a.curve.betweenSd, b.curve.betweenSd) ** 2 + Math.min(a.sharedVariance, b.sharedVariance);
  const cancels = both === 0 ? 0 : (2 * NORMAL_95 ** 2 * common * both) / (a.sources.size * b.sources.size);
  return { temperatureK, lnRatio, half: Math.sqrt(Math.max(squares - cancels, LEAST_SHARE * squares)) };
}

/**
 * The crossing of two curves inside their common range, which for two solid forms of one solute on the same unsolvated
 * basis is their transition temperature: there both have one chemical potential. Its limits are the temperatures nearest
 * to it at which the difference leaves its own 95 % limits (inversion of the test, after Fieller). Undefined where the
 * curves do not cross, cross twice, or where neither side settles which is the lower: then nothing is claimed.
 *
 * @see Fieller, J. R. Stat. Soc. B 16 (1954) 175-185.
 */
export function crossingOf(a: ComparedCurve, b: ComparedCurve): Crossing | undefined {
  const range = commonRangeK(a, b);
  if (range === undefined || range[0] === range[1]) return undefined;
  const [low, high] = range;
  const at = (T: number) => differenceAt(a, b, T);
  const grid = Array.from({ length: STEPS + 1 }, (_, i) => (i === STEPS ? high : low + ((high - low) * i) / STEPS));
  const changes = grid.slice(1).flatMap((T, i) => {
    const before = at(grid[i] as number).lnRatio;
    return before !== 0 && before * at(T).lnRatio <= 0 ? [i] : [];
  });
  if (changes.length !== 1) return undefined;
  const step = changes[0] as number;
  const cold = Math.sign(at(grid[step] as number).lnRatio);
  const crosses = (T: number) => at(T).lnRatio * cold <= 0;
  const temperatureK = boundary(grid[step] as number, grid[step + 1] as number, crosses);
  const settled = (T: number) => Math.abs(at(T).lnRatio) > at(T).half;
  const colder = grid.slice(0, step + 1).reverse();
  const warmer = grid.slice(step + 1);
  const [lowK, highK] = [settledFrom(temperatureK, colder, settled), settledFrom(temperatureK, warmer, settled)];
  if (Number.isNaN(lowK) && Number.isNaN(highK)) return undefined;
  return { temperatureK, lowK, highK, firstLowerWhenCold: cold < 0 };
}

/** Nearest temperature on one side at which a condition holds, between the first of the list that does and its neighbour. */
function settledFrom(from: number, away: readonly number[], holds: (T: number) => boolean): number {
  const i = away.findIndex(holds);
  return i < 0 ? Number.NaN : boundary(i === 0 ? from : (away[i - 1] as number), away[i] as number, holds);
}

/** Bisects for the temperature at which a condition begins to hold, going from `from` to `to`, where it holds. */
function boundary(from: number, to: number, holds: (T: number) => boolean): number {
  let [outside, inside] = [from, to];
  for (let halving = 0; halving < 50; halving++) {
    const middle = outside + (inside - outside) / 2;
    if (middle === outside || middle === inside) break;
    if (holds(middle)) inside = middle;
    else outside = middle;
  }
  return inside;
}

/** Temperatures that show how two curves lie to one another: the ends of their common range and its middle, K. */
export function shownTemperatures([low, high]: readonly [number, number]): readonly number[] {
  return low === high ? [low] : [low, (low + high) / 2, high];
}
