import type { System } from "../../records/systems.ts";
import type { OffBlock } from "../block-screen.ts";
import type { ScreenInput } from "../screen-input.ts";
import { anotherSolidForm } from "./another-solid-form.ts";
import type { Verdict } from "./compete-point.ts";
import { NAMED_ABOVE } from "./compete-point.ts";
import { wetSolvent } from "./wet-solvent.ts";

/** A cause that shows only where several off blocks of one source are held beside one another. */
export interface AcrossSystems {
  readonly name: "another solid form" | "wet solvent";
  readonly lookAt: string;
  /** Whether a block could be of this kind at all. */
  readonly applies: (block: OffBlock, system: System) => boolean;
  /** Whether two blocks of a source belong together. */
  readonly together: (a: System, b: System) => boolean;
  /** How many times likelier the second block's offset is given the first one's, than by chance. */
  readonly likelihoodRatio: (first: OffBlock, second: OffBlock) => number;
  /** Odds that blocks off without another cause have this one. Common practice. */
  readonly priorOdds: number;
  readonly detail: (blocks: readonly OffBlock[]) => string;
}

/** Share of the source's other blocks of the kind that must be off too: among many, one more is off by chance. */
const LEAST_SHARE = 0.5;

const EVERY_ACROSS: readonly AcrossSystems[] = [anotherSolidForm, wetSolvent];

/**
 * Verdicts for off blocks that no cause of their own explains, from other such blocks of the same source: prior odds
 * times the likelihood ratio of every other block that belongs with it.
 *
 * @param unexplained off blocks without a cause
 */
export function competeAcrossSystems(
  { systems, fits }: Pick<ScreenInput, "systems" | "fits">,
  unexplained: readonly OffBlock[],
): ReadonlyMap<OffBlock, Verdict> {
  const verdicts = new Map<OffBlock, Verdict>();
  for (const block of unexplained) {
    const own = systems[block.system]!;
    for (const cause of EVERY_ACROSS) {
      if (!cause.applies(block, own)) continue;
      const family = unexplained.filter(
        (other) =>
          other !== block &&
          other.source === block.source &&
          cause.applies(other, systems[other.system]!) &&
          cause.together(own, systems[other.system]!),
      );
      if (family.length === 0) continue;
      const all = fits.filter(
        ({ system, points }) => cause.together(own, systems[system]!) && points.source.includes(block.source),
      );
      if (family.length < LEAST_SHARE * all.length) continue;
      const odds = family.reduce((product, other) => product * cause.likelihoodRatio(block, other), cause.priorOdds);
      const probability = odds / (1 + odds);
      if (!(probability > Math.max(NAMED_ABOVE, verdicts.get(block)?.probability ?? 0))) continue;
      const { name, lookAt } = cause;
      const detail = cause.detail([block, ...family]);
      verdicts.set(block, { cause: name, detail, probability, proposedValue: undefined, lookAt });
    }
  }
  return verdicts;
}
