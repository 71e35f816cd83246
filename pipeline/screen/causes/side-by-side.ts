import type { System } from "../../records/systems.ts";
import type { OffBlock } from "../block-screen.ts";
import { middle } from "../middle.ts";
import type { CauseName } from "./cause.ts";

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
