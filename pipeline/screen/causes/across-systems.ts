import type { RobustFit } from "../../records/fits.ts";
import type { System } from "../../records/systems.ts";
import type { OffBlock } from "../block-screen.ts";
import type { ScreenInput } from "../screen-input.ts";
import { anotherSolidForm } from "./another-solid-form.ts";
import { AS_READ } from "./compete-block.ts";
import { NAMED_ABOVE, type Verdict } from "./compete-point.ts";
import { logSum } from "./log-sum.ts";
import { oneFactor } from "./one-factor.ts";
import { oneJacket, oneThermometer } from "./one-thermometer.ts";
import type { AcrossSystems, SideBySide } from "./side-by-side.ts";
import { wetSolvent } from "./wet-solvent.ts";

const EVERY_ACROSS: readonly AcrossSystems[] = [anotherSolidForm, wetSolvent, oneThermometer, oneJacket, oneFactor];

/** No single block speaks for or against a common cause by more than this. */
const [LEAST_RATIO, MOST_RATIO] = [0.05, 100];
/** Typical noise of a sound block about its offset, ln value. */
const SOUND_SD = 0.02;

/**
 * Verdicts for off blocks whose source has other off blocks of the same kind. For each cause that such blocks may share,
 * prior odds times the likelihood ratios of the other blocks that must be touched too, sound ones included, give its
 * probability P for this source, beside the other such causes and none. With the readings that it stands behind (an offset
 * of its own, or a thermometer that is off) it competes with every other reading of the block, P taking the place of their
 * prior.
 *
 * @param blocks all off blocks of the edition
 */
export function competeAcrossSystems(
  { systems, fits }: Pick<ScreenInput, "systems" | "fits">,
  blocks: readonly OffBlock[],
): ReadonlyMap<OffBlock, Verdict> {
  const verdicts = new Map<OffBlock, Verdict>();
  const bySource = new Map<number, OffBlock[]>();
  for (const block of blocks) bySource.set(block.source, [...(bySource.get(block.source) ?? []), block]);
  for (const [source, members] of bySource) {
    if (members.length < 2) continue;
    const off = members.map((block) => besideOf(fits[block.system]!, systems[block.system]!, source, block));
    const touched = new Set(members.map(({ system }) => system));
    const sound = fits
      .filter(({ system, soundSources }) => !touched.has(system) && soundSources.includes(source))
      .map((fit) => besideOf(fit, systems[fit.system]!, source, undefined));
    for (const first of off) {
      const verdict = verdictOf(first, [...off.filter((other) => other !== first), ...sound]);
      if (verdict !== undefined) verdicts.set(first.off!, verdict);
    }
  }
  return verdicts;
}

function besideOf(fit: RobustFit, system: System, source: number, off: OffBlock | undefined): SideBySide {
  const { points, predicted } = fit;
  const own = off?.points ?? [...points.source.keys()].filter((i) => points.source[i] === source);
  const temperatureK = own.map((i) => points.temperatureK[i]!);
  const [cold, hot] = [Math.min(...temperatureK), Math.max(...temperatureK)];
  const at = (T: number) => predicted[own[temperatureK.indexOf(T)]!]!;
  const offset = off?.offset ?? 0;
  return {
    ...{ system, off, offset, temperatureK, deviations: off?.deviations ?? own.map(() => 0) },
    sd: off === undefined ? Math.hypot(fit.betweenSd, SOUND_SD) : Math.abs(offset / off.z),
    slope: hot > cold ? (at(hot) - at(cold)) / (hot - cold) : Number.NaN,
  };
}

/** A cause that the block may share with others of its source, and those others. */
interface Shared {
  readonly cause: AcrossSystems;
  readonly family: readonly SideBySide[];
  readonly logOdds: number;
}

function verdictOf(first: SideBySide, others: readonly SideBySide[]): Verdict | undefined {
  const shared = EVERY_ACROSS.flatMap((cause) => sharedBy(cause, first, others));
  if (shared.length === 0) return undefined;
  const logTotal = logSum([0, ...shared.map(({ logOdds }) => logOdds)]);
  // All weights are in units of the readings' total, given that the block is off.
  const weights = shared.map(
    ({ cause, family, logOdds }) =>
      readingsOf(cause, first.off!) * Math.exp(logOdds - logTotal) * foretold(cause, first, family),
  );
  const total = weights.reduce((sum, weight) => sum + weight, 1 - posteriorOf(first.off!, AS_READ));
  const top = Math.max(...weights);
  if (!(top > NAMED_ABOVE * total)) return undefined;
  const { cause, family } = shared[weights.indexOf(top)]!;
  const detail = cause.detail([first, ...family]);
  return { cause: cause.name, detail, probability: top / total, proposedValue: undefined, lookAt: cause.lookAt };
}

/** The cause with those that share it, where there are any. */
function sharedBy(cause: AcrossSystems, first: SideBySide, others: readonly SideBySide[]): Shared[] {
  if (!cause.applies(first)) return [];
  const scope = others.filter((other) => cause.together(first, other));
  const family = scope.filter((other) => other.off !== undefined && ratioOf(cause, first, other) > 1);
  if (family.length === 0) return [];
  const logRatios = scope.map((other) => Math.log(ratioOf(cause, first, other)));
  return [{ cause, family, logOdds: logRatios.reduce((sum, ratio) => sum + ratio, Math.log(cause.priorOdds)) }];
}

function ratioOf(cause: AcrossSystems, first: SideBySide, other: SideBySide): number {
  const { off } = other;
  if (off === undefined) return Math.max(LEAST_RATIO, Math.min(1, cause.ratioIfSound(first, other)));
  const ratio = cause.applies(other) ? readingsOf(cause, off) * cause.likelihoodRatio(first, other) : 0;
  return Math.max(LEAST_RATIO, Math.min(MOST_RATIO, ratio));
}

/** How much better a family of two or more others foretells the block than an offset of its own; one alone is used up. */
function foretold({ likelihoodRatio }: AcrossSystems, first: SideBySide, family: readonly SideBySide[]): number {
  if (family.length < 2) return 1;
  const ratios = family.map((other) => likelihoodRatio(other, first));
  return Math.max(1, ratios.reduce((sum, ratio) => sum + ratio, 0) / ratios.length);
}

function posteriorOf({ readings, posterior }: OffBlock, key: string): number {
  return posterior[readings.findIndex((reading) => reading.key === key)] ?? 0;
}

/** How many times likelier a block is by the readings that a cause stands behind than by all readings together. */
function readingsOf({ readings }: AcrossSystems, off: OffBlock): number {
  return readings.reduce((sum, [key, prior, share]) => sum + (share * posteriorOf(off, key)) / prior, 0);
}
