import type { CompositionLiquid } from "../../bases/compositions.ts";
import {
  cornersOf,
  fractionLimits,
  fractionLimitsAt,
  mixtureRange,
  temperatureLimits,
} from "../../curves/mixture-range.ts";
import type { PooledScales, RobustFit } from "../../records/fits.ts";
import type { MeasurementTable } from "../../records/measurements.ts";
import type { MixtureModel, Mixtures, NoMixtureModel } from "../../records/mixtures.ts";
import type { System } from "../../records/systems.ts";
import { sameTemperatureK } from "../kept-points.ts";
import type { BinaryLiquids } from "./mixture-exchange.ts";
import { allMemberSums } from "./mixture-information.ts";
import { keepMixture } from "./mixture-keep.ts";
import { differenceHalfWidth, mixtureLimits } from "./mixture-limits.ts";
import { innerMaximum, roundTemperatures } from "./mixture-maximum.ts";
import { mixtureMembers } from "./mixture-members.ts";
import { mixtureNotices } from "./mixture-notices.ts";
import { type MixturePoints, mixturePoints } from "./mixture-points.ts";
import { fitMembers } from "./mixture-regression.ts";
import { assumedScales, estimatedScales } from "./mixture-scales.ts";
import { FLEXIBLE_SURFACE } from "./mixture-surfaces.ts";
import { type MixtureGroup, mixtureGroups } from "./mixture-systems.ts";
import { chooseTerms, type PublishedMixture, publishedMixture } from "./mixture-terms.ts";

/** Fewest compositions, pure solvents counted, and fewest temperatures over all of them. */
export const fewestCompositions = 3;
export const fewestTemperatures = 3;

/**
 * Fits one Jouyban-Acree-van 't Hoff surface to every solute, solid form and medium over a binary solvent that was
 * measured at three compositions (pure solvents counted) and three temperatures at least.
 *
 * Exact compositions of the rows are used, not those of the systems. What stays out of the curves of the systems stays
 * out of the surface; what contradicts the other compositions is left out besides ({@link keepMixture}).
 * @param robust robust screening fits, by position of the system
 * @param liquidOf molar mass and density of a solvent by its name, where known
 */
export function fitMixtures(
  table: MeasurementTable,
  systems: readonly System[],
  robust: readonly RobustFit[],
  scales: PooledScales,
  liquidOf: (name: string) => CompositionLiquid | undefined = () => undefined,
): Mixtures {
  const models: MixtureModel[] = [];
  const without: NoMixtureModel[] = [];
  for (const group of mixtureGroups(systems)) {
    const outcome = mixtureModel(
      group,
      mixturePoints(table, group, (system) => robust[system] as RobustFit),
      scales,
      liquidsOf(group, liquidOf),
    );
    if ("reason" in outcome) without.push(outcome);
    else models.push(outcome);
  }
  return { models, without };
}

function liquidsOf(
  { solvents: [first, second] }: MixtureGroup,
  liquidOf: (name: string) => CompositionLiquid | undefined,
): BinaryLiquids | undefined {
  const [one, two] = [liquidOf(first), liquidOf(second)];
  return one === undefined || two === undefined ? undefined : [one, two];
}

/** The model of one mixture, or the reason why there is none. */
export function mixtureModel(
  group: MixtureGroup,
  points: MixturePoints,
  pooled: PooledScales,
  liquids?: BinaryLiquids,
): MixtureModel | NoMixtureModel {
  const none = (reason: string): NoMixtureModel => ({
    ...{ id: group.id, solvents: group.solvents, reason },
    systems: group.members.map(({ system }) => system.index),
  });
  const missing = tooLittle(points, points.candidate);
  if (missing !== undefined) return none(missing);
  const centreK = harmonicMean(points);
  const assumed = assumedScales(points, pooled, centreK);
  const kept = keepMixture(points, centreK, assumed);
  const lost = tooLittle(points, kept.use);
  if (lost !== undefined) return none(`${lost} that agree with each other`);
  const [agreeing, measured] = [countOf(kept.use), countOf(points.candidate)];
  if (2 * agreeing < measured)
    return none(`the compositions contradict each other: no surface holds half of the ${measured} points`);
  const estimated = estimatedScales(points, kept.use, assumed, centreK);
  const sums = allMemberSums(points, kept.use, FLEXIBLE_SURFACE, centreK, estimated);
  const largest = fitMembers(points, sums, FLEXIBLE_SURFACE, centreK, estimated);
  const choice = chooseTerms(points, kept.use, centreK, estimated, compositionsOf(points, kept.use));
  if (largest === undefined || choice === undefined)
    return none("the compositions and temperatures measured do not determine its coefficients");
  const published = publishedMixture(choice.fit, choice.terms, points, estimated);
  const used = Int32Array.from(kept.use.keys()).filter((i) => kept.use[i] === 1);
  const range = mixtureRange(pick(points.fraction, used), pick(points.temperatureK, used));
  const sources = [...new Set(Array.from(used, (i) => points.sources[points.source[i]!] as number))];
  const basis = {
    ...{ largest, scales: estimated, published: published.value, oneSource: points.sources.length === 1 },
    betweenDegreesOfFreedom: pooled.betweenDegreesOfFreedom,
    newSourceVariance: newSourceVariance(points, used, pooled),
  };
  const temperatureRangeK = spanOf(pick(points.temperatureK, used));
  const members = mixtureMembers({ group, points, kept, sums, published, centreK, scales: estimated, liquids });
  const maximumAt = (T: number) =>
    innerMaximum(range, T, published.value, (w, other, t) => differenceHalfWidth(basis, w, other, t));
  const model = {
    ...{ id: group.id, solute: group.solute, solidForm: group.solidForm, medium: group.medium },
    ...{ solvents: group.solvents, members, fitBasis: group.members[0]!.system.fitBasis },
    ...{ coefficients: published.coefficients, covariance: published.covariance },
    ...{ fractionRange: fractionLimits(range), temperatureRangeK },
    ...{ n: used.length, nCompositions: compositionsOf(points, kept.use), nSources: sources.length },
    ...deviations(points, used, published),
    lackOfFitSd: Math.sqrt(estimated.lackOfFitVariance),
    betweenSd: Math.sqrt(estimated.betweenVariance),
    betweenDegreesOfFreedom: pooled.betweenDegreesOfFreedom,
    aicc: choice.aicc,
    innerMaxima: roundTemperatures(temperatureRangeK).flatMap((T) => maximumAt(T) ?? []),
  };
  return {
    ...model,
    notices: mixtureNotices(model, points.breaksK),
    domain: cornersOf(range),
    temperaturesAt: (fraction) => temperatureLimits(range, fraction),
    fractionsAt: (temperatureK) => fractionLimitsAt(range, temperatureK),
    evaluate: (fraction, temperatureK) => published.evaluate(fraction, temperatureK, range),
    limits: (fraction, temperatureK) => {
      published.evaluate(fraction, temperatureK, range);
      return mixtureLimits(basis, fraction, temperatureK);
    },
  };
}

function pick(column: Float64Array, rows: Int32Array): Float64Array {
  return Float64Array.from(rows, (i) => column[i]!);
}

function spanOf(values: Float64Array): readonly [number, number] {
  return [values.reduce((a, b) => Math.min(a, b)), values.reduce((a, b) => Math.max(a, b))];
}

/** What a surface lacks, in words; undefined where it lacks nothing. */
function tooLittle(points: MixturePoints, use: Uint8Array): string | undefined {
  const compositions = compositionsOf(points, use);
  const temperatures = temperaturesOf(points, use);
  if (compositions < fewestCompositions)
    return `${counted(compositions, "composition")} where a surface needs ${fewestCompositions}`;
  if (temperatures < fewestTemperatures)
    return `${counted(temperatures, "temperature")} where a surface needs ${fewestTemperatures}`;
  return undefined;
}

function countOf(use: Uint8Array): number {
  return use.reduce((count, one) => count + one, 0);
}

function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}

function compositionsOf({ member }: MixturePoints, use: Uint8Array): number {
  return new Set(Array.from(member).filter((_, i) => use[i] === 1)).size;
}

function temperaturesOf({ temperatureK }: MixturePoints, use: Uint8Array): number {
  const sorted = temperatureK.filter((_, i) => use[i] === 1).sort();
  let [count, last] = [0, Number.NEGATIVE_INFINITY];
  for (const T of sorted) {
    if (T - last <= sameTemperatureK) continue;
    count++;
    last = T;
  }
  return count;
}

function harmonicMean({ temperatureK, candidate }: MixturePoints): number {
  let [reciprocals, n] = [0, 0];
  temperatureK.forEach((T, i) => {
    if (candidate[i] === 0) return;
    reciprocals += 1 / T;
    n++;
  });
  return n / reciprocals;
}

/** Expected noise variance of a source not yet seen: mean over the edition's sources, else over the points used. */
function newSourceVariance({ noiseSd }: MixturePoints, used: Int32Array, { within }: PooledScales): number {
  const known = within.filter((sd) => sd > 0 && sd < 10);
  const sds = known.length > 0 ? known : pick(noiseSd, used);
  return sds.reduce((sum, sd) => sum + sd * sd, 0) / sds.length;
}

function deviations(points: MixturePoints, used: Int32Array, published: PublishedMixture) {
  let [squares, relative] = [0, 0];
  for (const i of used) {
    const residual = points.lnValue[i]! - published.value(points.fraction[i]!, points.temperatureK[i]!);
    squares += residual * residual;
    relative += Math.abs(Math.expm1(-residual));
  }
  return { rmsd: Math.sqrt(squares / used.length), ardPercent: (100 * relative) / used.length };
}
