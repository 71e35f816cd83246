import type { RobustFit } from "../../records/fits.ts";
import { middle } from "../middle.ts";
import { curveSlope, fitSources, predictCurve, seriesLogDensity } from "../system-model.ts";
import type { Cause } from "./cause.ts";
import { NAMED_ABOVE, type Verdict } from "./compete-point.ts";
import { EVERY_CAUSE } from "./every-cause.ts";
import { logSum } from "./log-sum.ts";
import { type BlockSeries, growing, type Pattern } from "./pattern.ts";
import { bentSeries } from "./pattern-density.ts";
import { tryReading } from "./reread-series.ts";
import { logWeightOf, type SeriesCase, STRAY_Z, seriesOf, type Tried } from "./series-case.ts";

/** What bends a series, and the points it accounts for. */
export interface SeriesVerdict {
  readonly verdict: Verdict;
  /** Off points that the bend explains. */
  readonly explained: ReadonlySet<number>;
  /** How far the bend moves each point of the block but the strays, ln value, and what it leaves, in standard deviations. */
  readonly moved: ReadonlyMap<number, { readonly by: number; readonly leftZ: number }>;
}

/** Rate of series over which the stable solid changes where no other source would see it. Common practice. */
const CHANGE_OF_SOLID_RATE = 0.1;
/** Rate of series of a salt in water that are of another hydrate at one end than those of the other sources. */
const HYDRATE_RATE = 0.05;
/** Rate of series of which a stretch is off by one amount, and that amount, ln value. Common practice. */
const [STRETCH_RATE, STRETCH_SD] = [0.01, 0.4];
/** Part of the material threshold from which a point sides with those that are off. */
const SIDES_SHARE = 0.4;
/** No value on a plateau is farther from it, in standard deviations. */
const LEVEL_Z = 3;
/** Another source bears witness where it has a kept point this near the outermost off point, K. */
const WITNESS_K = 8;

/** The likeliest way of a cause. */
interface Winner {
  readonly cause: Cause;
  readonly detail: string;
  readonly kind: Pattern["kind"] | "reading";
  readonly tried: Tried;
}

/**
 * The causes that bend a series compete with single faults: rate x share of the way x density of the whole block so
 * bent, against the rate of a single fault for each off point times what stands for it alone, times the density of the
 * other points as read. Without another source near the off points only a plateau can be told from a change of the solid
 * phase or a curve that is too simple.
 */
export function competeForSeries(of: SeriesCase): SeriesVerdict | undefined {
  const { model, fit, source } = of;
  const others = new Set(fit.soundSources.filter((other) => other !== source));
  const otherwise = logWeightOfOtherBent(of, others);
  fitSources(model, fit, (other) => others.has(other));
  const order = [...of.points].sort((a, b) => fit.points.temperatureK[a]! - fit.points.temperatureK[b]!);
  const off = order.filter((point) => of.offWeight.has(point));
  const none = logWeightOf(
    of,
    order.filter((point) => !of.offWeight.has(point)),
    off,
  );
  const witnessed = hasWitness(fit, others, off);
  const { temperatureK, lnValue } = seriesOf(fit, order);
  const slope = others.size === 0 ? undefined : temperatureK.map((T) => curveSlope(model, T));
  const curve = others.size === 0 ? undefined : (T: number) => predictCurve(model, T).mean;
  let total = 1 + Math.exp(otherwise - none);
  const changeOfSolid = witnessed ? (of.mayHydrate ? HYDRATE_RATE : 0) : CHANGE_OF_SOLID_RATE;
  for (const pattern of changeOfSolid === 0 ? [] : eitherEnd({ temperatureK })) {
    const tried = tryPattern(of, order, off, pattern);
    if (tried !== undefined) total += changeOfSolid * pattern.weight * Math.exp(tried.logWeight - none);
  }
  for (const pattern of stretches(order, off)) {
    const tried = tryPattern(of, order, off, pattern);
    if (tried !== undefined) total += STRETCH_RATE * pattern.weight * Math.exp(tried.logWeight - none);
  }
  let best: Winner | undefined;
  let bestSum = 0;
  for (const cause of EVERY_CAUSE) {
    let sum = 0;
    let top = 0;
    let winner: typeof best;
    for (const reading of witnessed ? of.rereadings.filter((one) => one.cause === cause) : []) {
      const tried = tryReading(of, order, off, reading);
      if (tried === undefined) continue;
      const weight = reading.rate * Math.exp(tried.logWeight - none);
      sum += weight;
      if (weight <= top) continue;
      top = weight;
      winner = { cause, detail: reading.detail, kind: "reading", tried };
    }
    for (const pattern of cause.bending?.patterns({ temperatureK, lnValue, slope, curve, method: of.method }) ?? []) {
      const tried = witnessed || pattern.kind === "level" ? tryPattern(of, order, off, pattern) : undefined;
      if (tried === undefined) continue;
      const weight = cause.bending!.rate * pattern.weight * Math.exp(tried.logWeight - none);
      sum += weight;
      if (weight <= top) continue;
      top = weight;
      winner = { cause, detail: pattern.detail, kind: pattern.kind, tried };
    }
    total += sum;
    if (sum <= bestSum) continue;
    bestSum = sum;
    best = winner;
  }
  const probability = bestSum / total;
  if (best === undefined || !(probability > NAMED_ABOVE)) return undefined;
  const { name, lookAt } = best.cause;
  const verdict = { cause: name, detail: best.detail, lookAt, probability, proposedValue: undefined };
  return { verdict, explained: new Set(best.tried.explained), moved: movedBy(of, best.kind, best.tried) };
}

/** What a bend does to each of its points. */
function movedBy(
  { fit, model }: SeriesCase,
  kind: Winner["kind"],
  { rest, bent: { left, leftSd } }: Tried,
): SeriesVerdict["moved"] {
  const { temperatureK, lnValue } = seriesOf(fit, rest);
  const offset = kind === "level" ? 0 : middle(left);
  return new Map(
    rest.map((point, i) => {
      const deviation = lnValue[i]! - predictCurve(model, temperatureK[i]!).mean;
      return [point, { by: deviation - left[i]!, leftZ: Math.abs(left[i]! - offset) / leftSd[i]! }];
    }),
  );
}

/**
 * ln weight of the other reading where exactly one other source is there to compare with: this block as read, and the
 * other source bent. Both readings are p(one) p(other | one); p alone is the density under the prior of the curve.
 */
function logWeightOfOtherBent(of: SeriesCase, others: ReadonlySet<number>): number {
  const [other] = others;
  if (other === undefined || others.size !== 1) return Number.NEGATIVE_INFINITY;
  const { model, fit, source } = of;
  const variance = fit.betweenSd ** 2;
  const ascending = (points: number[]) =>
    points.sort((a, b) => fit.points.temperatureK[a]! - fit.points.temperatureK[b]!);
  const own = ascending([...of.points]);
  const theirs = ascending(
    [...fit.points.source.keys()].filter((i) => fit.points.source[i] === other && fit.kept[i] === 1),
  );
  fitSources(model, fit, () => false);
  const alone = (points: readonly number[]) => seriesLogDensity(model, seriesOf(fit, points), variance);
  const apart = alone(own) - alone(theirs);
  const kept = Uint8Array.from(fit.points.source, (s, i) => (s === source && of.points.includes(i) ? 1 : 0));
  fitSources(model, { ...fit, kept }, (s) => s === source);
  const { temperatureK, lnValue } = seriesOf(fit, theirs);
  const slope = temperatureK.map((T) => curveSlope(model, T));
  const curve = (T: number) => predictCurve(model, T).mean;
  const ways = EVERY_CAUSE.flatMap(({ bending }) =>
    (bending?.patterns({ temperatureK, lnValue, slope, curve, method: of.method }) ?? []).map(
      (pattern) =>
        Math.log(bending!.rate * pattern.weight) +
        bentSeries(model, seriesOf(fit, theirs), variance, pattern).logDensity,
    ),
  );
  return ways.length === 0 ? Number.NEGATIVE_INFINITY : apart + logSum(ways);
}

/** The block under a pattern; off points that stray from it count as single faults. Undefined where it explains none. */
function tryPattern(
  of: SeriesCase,
  order: readonly number[],
  off: readonly number[],
  pattern: Pattern,
): Tried | undefined {
  const { fit, model } = of;
  const variance = fit.betweenSd ** 2;
  const first = bentSeries(model, seriesOf(fit, order), variance, pattern);
  const offset = pattern.kind === "level" ? 0 : middle(first.left);
  const z = new Map(order.map((point, i) => [point, Math.abs(first.left[i]! - offset) / first.leftSd[i]!]));
  const strays = new Set(off.filter((point) => z.get(point)! > STRAY_Z));
  const touched = order.filter((_, i) => (pattern.kind === "level" ? i >= pattern.from : pattern.shape[i] !== 0));
  const explained = touched.filter((point) => of.offWeight.has(point) && !strays.has(point));
  if (explained.length === 0 || !isSeries(of, touched, explained)) return undefined;
  if (pattern.kind === "level") {
    // A plateau lies below the curve, and all its values are the same.
    if (fit.deviation[explained[0]!]! > 0 || touched.some((point) => z.get(point)! > LEVEL_Z)) return undefined;
  }
  if (strays.size === 0) return { logWeight: first.logDensity, explained, rest: order, bent: first };
  const rest = order.filter((point) => !strays.has(point));
  const without = withoutPoints(pattern, order, strays);
  if (without === undefined) return undefined;
  const bent = bentSeries(model, seriesOf(fit, rest), variance, without);
  return { logWeight: bent.logDensity + logWeightOf(of, [], [...strays]), explained, rest, bent };
}

/** Whether a bend shows in more than one point: two that are off, or one and another that sides with it. */
function isSeries({ fit, tolerance }: SeriesCase, touched: readonly number[], explained: readonly number[]): boolean {
  const side = Math.sign(fit.deviation[explained[0]!]!);
  return touched.filter((point) => side * fit.deviation[point]! > SIDES_SHARE * tolerance).length > 1;
}

/** A bend of the curve itself at either end, either way: another solid gives the same picture. */
function eitherEnd(series: Pick<BlockSeries, "temperatureK">): Pattern[] {
  const ends = ([1, -1] as const).flatMap((end) =>
    ([1, -1] as const).flatMap((sign) => growing(series, end, sign, "")),
  );
  return ends.map((pattern) => ({ ...pattern, weight: pattern.weight / 2 }));
}

/** Runs of neighbouring off points that share one offset: a day, a stock, a calibration; no cause of the list. */
function stretches(order: readonly number[], off: readonly number[]): Pattern[] {
  const isOff = new Set(off);
  const runs: number[][] = [];
  for (const [i, point] of order.entries()) {
    if (!isOff.has(point)) continue;
    const last = runs.at(-1);
    if (last?.at(-1) === i - 1) last.push(i);
    else runs.push([i]);
  }
  const long = runs.filter((run) => run.length > 1 && run.length < order.length);
  return long.map((run) => ({
    ...({ kind: "growing", detail: "", weight: 1 / long.length, sign: 0, irregular: 0 } as const),
    ...{ sd: STRETCH_SD, shape: order.map((_, i) => (run.includes(i) ? 1 : 0)) },
  }));
}

/** The pattern on a series that lacks some points; undefined where too little of it is left. */
function withoutPoints(pattern: Pattern, order: readonly number[], strays: ReadonlySet<number>): Pattern | undefined {
  if (pattern.kind === "growing") {
    const { shape, shapeAt } = pattern;
    const left = (values: readonly number[]) => values.filter((_, i) => !strays.has(order[i]!));
    const at = shapeAt === undefined ? {} : { shapeAt: (amplitude: number) => left(shapeAt(amplitude)) };
    return { ...pattern, shape: left(shape), ...at };
  }
  const from = order.slice(0, pattern.from).filter((point) => !strays.has(point)).length;
  return from === 0 || order.length - strays.size - from < 2 ? undefined : { ...pattern, from };
}

function hasWitness({ points, kept }: RobustFit, others: ReadonlySet<number>, off: readonly number[]): boolean {
  const temperatures = off.map((point) => points.temperatureK[point]!);
  return temperatures.every((T) =>
    points.source.some(
      (source, i) => others.has(source) && kept[i] === 1 && Math.abs(points.temperatureK[i]! - T) <= WITNESS_K,
    ),
  );
}
