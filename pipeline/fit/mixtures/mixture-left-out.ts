import { quadraticForm } from "../../curves/coefficient-transformation.ts";
import { isInside, type MixtureRange, mixtureRange } from "../../curves/mixture-range.ts";
import type { LeftOutPrediction } from "../../records/mixtures.ts";
import type { Exchange } from "./mixture-exchange.ts";
import type { MemberSums } from "./mixture-information.ts";
import type { MixturePoints } from "./mixture-points.ts";
import { fitMembers, type MixtureRegression, type MixtureScales, rowAt, rowValue } from "./mixture-regression.ts";
import { FLEXIBLE_SURFACE } from "./mixture-surfaces.ts";

/** What the other systems say of one, each of its points taken at its own composition or as another reading has it. */
export type LeftOutJudge = (reading?: Pick<Exchange, "fraction" | "shift">) => LeftOutPrediction | undefined;

/**
 * What the other systems of a mixture say of one: the flexible surface fitted without it.
 *
 * @param use 1 = the point takes part in the surface
 * @param sums sums of all members over those points
 * @param where inside the compositions and temperatures of the others only, so that a pure solvent, beyond which nothing
 *   lies, is never judged; or anywhere, with a standard deviation that grows outside as the priors allow
 * @returns gives undefined where the other systems determine no surface, or reach none of the points
 */
export function leftOutJudge(
  points: MixturePoints,
  use: Uint8Array,
  sums: readonly MemberSums[],
  member: number,
  centreK: number,
  scales: MixtureScales,
  where: "inside" | "anywhere" = "inside",
): LeftOutJudge {
  const fit = fitMembers(points, except(sums, member), FLEXIBLE_SURFACE, centreK, scales);
  if (fit === undefined) return () => undefined;
  const inside = where === "anywhere" ? () => true : insideOf(rangeOfOthers(points, use, member));
  const degreesOfFreedom = judgingDegreesOfFreedom(sums.filter(({ n }, m) => n > 0 && m !== member).length);
  const asWritten = { fraction: (i: number) => points.fraction[i]!, shift: () => 0 };
  return (reading = asWritten) => {
    const said = predictionOf(points, use, member, fit, scales, inside, reading);
    return said && { ...said, degreesOfFreedom };
  };
}

function predictionOf(
  points: MixturePoints,
  use: Uint8Array,
  member: number,
  fit: MixtureRegression,
  scales: MixtureScales,
  inside: (fraction: number, temperatureK: number) => boolean,
  { fraction: fractionOf, shift }: Pick<Exchange, "fraction" | "shift">,
): Omit<LeftOutPrediction, "degreesOfFreedom"> | undefined {
  const own = Int32Array.from(
    { length: points.start[member + 1]! - points.start[member]! },
    (_, k) => points.start[member]! + k,
  );
  const predicted = new Float64Array(own.length).fill(Number.NaN);
  const [sd, sharedSd] = [predicted.slice(), predicted.slice()];
  // A single slip among its points says nothing of the composition.
  const counts =
    [use, points.candidate].map((set) => (i: number) => set[i] === 1).find((c) => own.some(c)) ?? (() => true);
  const mean = { row: new Float64Array(fit.columns), deviation: 0, noise: 0, n: 0 };
  own.forEach((i, k) => {
    const fraction = fractionOf(i);
    if (!inside(fraction, points.temperatureK[i]!)) return;
    const row = rowAt(fit, fraction, points.temperatureK[i]!, points.source[i]!);
    predicted[k] = rowValue(fit, row);
    const shared = quadraticForm(fit.covariance, row, fit.columns) + scales.lackOfFitVariance;
    sharedSd[k] = Math.sqrt(shared);
    sd[k] = Math.sqrt(shared + scales.variance[i]!);
    if (!counts(i)) return;
    for (let j = 0; j < row.length; j++) mean.row[j]! += row[j]!;
    mean.deviation += points.lnValue[i]! + shift(i) - predicted[k]!;
    mean.noise += scales.variance[i]!;
    mean.n++;
  });
  if (mean.n === 0) return undefined;
  for (let j = 0; j < fit.columns; j++) mean.row[j]! /= mean.n;
  return {
    ...{ predicted, sd, sharedSd, n: mean.n },
    meanDeviation: mean.deviation / mean.n,
    meanSd: Math.sqrt(
      quadraticForm(fit.covariance, mean.row, fit.columns) + scales.lackOfFitVariance + mean.noise / mean.n ** 2,
    ),
  };
}

/**
 * Degrees of freedom of a deviation of a whole composition: those of the scatter of so many other compositions about
 * their common surface, to which the weak knowledge of that scatter adds two.
 */
export function judgingDegreesOfFreedom(compositions: number): number {
  return Math.max(3, compositions - 2 + 2);
}

function except(sums: readonly MemberSums[], member: number): MemberSums[] {
  return sums.filter((_, m) => m !== member);
}

/** Compositions and temperatures of the other members' points that take part. */
function rangeOfOthers({ n, start, fraction, temperatureK }: MixturePoints, use: Uint8Array, member: number) {
  const [fractions, temperatures]: [number[], number[]] = [[], []];
  for (let i = 0; i < n; i++) {
    if (use[i] !== 1 || (i >= start[member]! && i < start[member + 1]!)) continue;
    fractions.push(fraction[i]!);
    temperatures.push(temperatureK[i]!);
  }
  return mixtureRange(fractions, temperatures);
}

function insideOf(range: MixtureRange): (fraction: number, temperatureK: number) => boolean {
  return (fraction, temperatureK) => isInside(range, fraction, temperatureK);
}
