import type { RobustFit } from "../../records/fits.ts";
import type { System } from "../../records/systems.ts";
import type { OffBlock } from "../block-screen.ts";
import { middle } from "../middle.ts";
import type { ScreenInput } from "../screen-input.ts";
import { anotherSolidForm } from "./another-solid-form.ts";
import type { CauseName } from "./cause.ts";
import { AS_READ } from "./compete-block.ts";
import { NAMED_ABOVE, type Verdict } from "./compete-point.ts";
import { oneFactor } from "./one-factor.ts";
import { oneJacket, oneThermometer } from "./one-thermometer.ts";
import { wetSolvent } from "./wet-solvent.ts";

/** A block of a source as it is held beside the others: off, with what was found, or sound. */
export interface SideBySide {
  readonly system: System;
  readonly off: OffBlock | undefined;
  /** Deviation from the other sources, ln value, and its standard deviation. */
  readonly offset: number;
  readonly sd: number;
  readonly temperatureK: readonly number[];
  readonly deviations: readonly number[];
  /** Mean d ln s/dT of the curve over the block, 1/K. */
  readonly slope: number;
}

/** A cause that shows only where the blocks of one source are held beside one another. */
export interface AcrossSystems {
  /** Undefined where the blocks belong together for a reason that is no cause of the list. */
  readonly name: CauseName | undefined;
  readonly lookAt: string;
  /** Readings of a block, judged alone, that it stands behind: key, prior of the reading, share among them. */
  readonly readings: readonly (readonly [key: string, prior: number, share: number])[];
  /** Whether a block could be of this kind at all. */
  readonly applies: (block: SideBySide) => boolean;
  /** Whether a block of the same source must be of this kind too if the first is. */
  readonly together: (first: SideBySide, other: SideBySide) => boolean;
  /** How many times likelier the other block's deviation is given the first one's, than as a mistake of its own. */
  readonly likelihoodRatio: (first: SideBySide, other: SideBySide) => number;
  /** The same where the other block is sound, against its being sound by itself. */
  readonly ratioIfSound: (first: SideBySide, other: SideBySide) => number;
  /** Prior odds that what the blocks of a source share has gone wrong in this way. Common practice. */
  readonly priorOdds: number;
  readonly detail: (blocks: readonly SideBySide[]) => string;
}

const EVERY_ACROSS: readonly AcrossSystems[] = [anotherSolidForm, wetSolvent, oneThermometer, oneJacket, oneFactor];

/** No single block speaks for or against a common cause by more than this. */
const [LEAST_RATIO, MOST_RATIO] = [0.05, 100];
/** Typical noise of a sound block about its offset, ln value. */
const SOUND_SD = 0.02;

/**
 * Verdicts for off blocks whose source has other off blocks of the same kind. For each cause that such blocks may share:
 * prior odds times the likelihood ratios of the other blocks that must be touched too, the sound ones included, give its
 * probability P for this source; with the reading that it stands behind (an offset of its own, or a thermometer that is off)
 * it then competes with every other reading of the block, P taking the place of that reading's prior.
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

function verdictOf(first: SideBySide, others: readonly SideBySide[]): Verdict | undefined {
  // All weights are in units of the readings' total, given that the block is off.
  let total = 1 - posteriorOf(first.off!, AS_READ);
  let best: { cause: AcrossSystems; weight: number; family: SideBySide[] } | undefined;
  for (const cause of EVERY_ACROSS) {
    if (!cause.applies(first)) continue;
    const scope = others.filter((other) => cause.together(first, other));
    const family = scope.filter(({ off }) => off !== undefined).filter((other) => ratioOf(cause, first, other) > 1);
    if (family.length === 0) continue;
    const odds = scope.reduce((product, other) => product * ratioOf(cause, first, other), cause.priorOdds);
    const weight = readingsOf(cause, first.off!) * (odds / (1 + odds)) * foretold(cause, first, family);
    total += weight;
    if (weight > (best?.weight ?? 0)) best = { cause, weight, family };
  }
  if (best === undefined || !(best.weight > NAMED_ABOVE * total)) return undefined;
  const { cause, weight, family } = best;
  const detail = cause.detail([first, ...family]);
  const probability = weight / total;
  return { cause: cause.name, detail, probability, proposedValue: undefined, lookAt: cause.lookAt };
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

/** Spread of the offsets of blocks that are off for reasons of their own, ln value. */
const ANY_SD = 0.6;

/** How many times likelier the second of two offsets is if they are one, give or take `sd`, than if each has its own. */
export function oneOffset(first: SideBySide, second: SideBySide, sd: number): number {
  const variance = sd ** 2 + first.sd ** 2 + second.sd ** 2;
  const apart = second.offset - first.offset;
  const same = Math.exp((-0.5 * apart * apart) / variance) / Math.sqrt(variance);
  return same / (Math.exp(-0.5 * (second.offset / ANY_SD) ** 2) / ANY_SD);
}

/** How many times likelier a sound block is with an offset of `expected` of its own than without one. */
export function soundThough(expected: number, { sd }: SideBySide): number {
  return Math.exp(-0.5 * (expected / sd) ** 2);
}

/** Whether all deviations of a block are alike, but for a drift. */
export function isParallel({ off, offset, deviations }: SideBySide): boolean {
  return middle(deviations.map((deviation) => Math.abs(deviation - offset))) < (off?.threshold ?? 0);
}
