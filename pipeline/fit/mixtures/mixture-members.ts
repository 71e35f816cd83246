import type { MixtureMember } from "../../records/mixtures.ts";
import { type BinaryLiquids, exchanges } from "./mixture-exchange.ts";
import type { MemberSums } from "./mixture-information.ts";
import type { KeptMixture } from "./mixture-keep.ts";
import { leftOutJudge } from "./mixture-left-out.ts";
import type { MixturePoints } from "./mixture-points.ts";
import type { MixtureScales } from "./mixture-regression.ts";
import type { MixtureGroup } from "./mixture-systems.ts";
import type { PublishedMixture } from "./mixture-terms.ts";

/** What the members of a mixture are told apart by. */
export interface FittedMixture {
  readonly group: MixtureGroup;
  readonly points: MixturePoints;
  readonly kept: KeptMixture;
  /** Sums of the members over the points used. */
  readonly sums: readonly MemberSums[];
  readonly published: PublishedMixture;
  readonly centreK: number;
  readonly scales: MixtureScales;
  readonly liquids: BinaryLiquids | undefined;
}

/** Compositions nearer to half and half than this are the same either way round, mass fraction. */
const NEARLY_HALF = 0.02;

/** Each system of a mixture: what the surface uses of it, how far it lies off, and what the others say of it. */
export function mixtureMembers(mixture: FittedMixture): MixtureMember[] {
  return mixture.group.members.map((_, m) => memberOf(mixture, m));
}

function memberOf(mixture: FittedMixture, m: number): MixtureMember {
  const { group, points, kept, sums, published, centreK, scales, liquids } = mixture;
  const own = Int32Array.from(
    { length: points.start[m + 1]! - points.start[m]! },
    (_, k) => (points.start[m] as number) + k,
  );
  const used = own.filter((i) => kept.use[i] === 1);
  const residuals = Array.from(
    used,
    (i) => points.lnValue[i]! - published.value(points.fraction[i]!, points.temperatureK[i]!),
  );
  const { system, fraction: ofKey } = group.members[m]!;
  const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
  const fractions = Float64Array.from(own, (i) => points.fraction[i]!);
  const fraction = own.length > 0 ? meanFraction(own, (i) => points.fraction[i]!) : ofKey;
  const whyNot = used.length > 0 ? undefined : reasonWhyNot(mixture, m, own);
  const judge = leftOutJudge(points, kept.use, sums, m, centreK, scales);
  const leftOut = judge();
  const turned = fraction > 0 && fraction < 1 && Math.abs(fraction - 0.5) > NEARLY_HALF;
  const reversed = (turned ? exchanges(points, liquids) : []).flatMap((exchange) => {
    const said = judge(exchange);
    return said === undefined ? [] : [{ ...said, of: exchange.of, fraction: meanFraction(own, exchange.fraction) }];
  });
  return {
    ...{ system: system.index, fraction, fractions, nUsed: used.length },
    temperatureRangeK: rangeOf(Array.from(used, (i) => points.temperatureK[i]!)),
    used: Uint8Array.from(own, (i) => kept.use[i]!),
    rmsd: Math.sqrt(mean(residuals.map((r) => r * r))),
    meanDeviation: mean(residuals),
    ...(whyNot === undefined ? {} : { whyNot }),
    ...(leftOut === undefined ? {} : { leftOut }),
    reversed,
  };
}

/** Mean of the compositions, which equal ones must not miss by rounding. */
function meanFraction(own: Int32Array, fractionOf: (point: number) => number): number {
  const fractions = Array.from(own, fractionOf);
  const [low, high] = [fractions.reduce((a, b) => Math.min(a, b)), fractions.reduce((a, b) => Math.max(a, b))];
  return Math.min(high, Math.max(low, fractions.reduce((sum, w) => sum + w, 0) / fractions.length));
}

function rangeOf(values: readonly number[]): readonly [number, number] {
  return values.length === 0 ? [Number.NaN, Number.NaN] : [Math.min(...values), Math.max(...values)];
}

function reasonWhyNot({ points, kept }: FittedMixture, m: number, own: Int32Array): string {
  const off = kept.apart.get(m);
  if (off !== undefined && Number.isFinite(off)) {
    const size =
      Math.abs(off) > Math.log(3)
        ? `a factor ${Math.exp(Math.abs(off)).toPrecision(3)}`
        : `${(100 * Math.abs(Math.expm1(off))).toFixed(0)} %`;
    return `its values lie ${size} ${off > 0 ? "above" : "below"} what the other compositions say`;
  }
  if (off !== undefined) return "its values contradict the other compositions";
  if (own.length === 0) return "no measurement that a curve could be fitted to";
  if (own.some((i) => points.candidate[i] === 1)) return "its points contradict the other compositions one by one";
  return "its sources disagree, or none of its points stays in its own curve";
}
