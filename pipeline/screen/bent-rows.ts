import type { SeriesVerdict } from "./causes/compete-series.ts";
import type { OffPoint } from "./point-screen.ts";
import { type ScreenInput, thresholdOf } from "./screen-input.ts";

/** Other sound sources that a bent series needs to be held against. */
const LEAST_OTHERS = 2;
/** What a bend leaves of a point, in standard deviations, for the point to belong to it. */
const BELONGS_Z = 3;
/** Part of the material threshold up to which a bend leaves a point alone. */
const LEFT_ALONE = 0.5;

/** How the off points of a block change once its bend is known. */
export interface BentRows {
  /** Points that the bend moves materially though they passed. */
  readonly added: readonly OffPoint[];
  /** Off points that the bend leaves alone. */
  readonly cleared: ReadonlySet<number>;
}

/**
 * A bent series takes its own offset from its middle, so that its sound end looks off and part of its bent end does not.
 * Once the bend is known and two other sources say where the curve lies, the rows it moves by more than their threshold
 * are off, and those it leaves alone are not.
 *
 * @param off off points of one block
 */
export function bentRows(input: ScreenInput, off: readonly OffPoint[], { moved }: SeriesVerdict): BentRows {
  const { system, point: first } = off[0]!;
  const { points, soundSources, deviation, deviationSd } = input.fits[system]!;
  const others = soundSources.filter((source) => source !== points.source[first]);
  if (others.length < LEAST_OTHERS) return { added: [], cleared: new Set() };
  const isOff = new Set(off.map(({ point }) => point));
  const added: OffPoint[] = [];
  const cleared = new Set<number>();
  for (const [point, { by, leftZ }] of moved) {
    if (leftZ > BELONGS_Z) continue;
    const threshold = thresholdOf(input, system, point);
    if (isOff.has(point)) {
      if (Math.abs(by) < LEFT_ALONE * threshold) cleared.add(point);
    } else if (Math.abs(by) >= threshold) {
      const z = deviation[point]! / deviationSd[point]!;
      added.push({ system, point, z, threshold, impossible: false, unsure: false, bentBy: by });
    }
  }
  return { added, cleared };
}
