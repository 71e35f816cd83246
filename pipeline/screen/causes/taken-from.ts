import { relativeRounding } from "../../numerics/decimal-rounding.ts";
import type { Explanation, Neighbouring, Suspects } from "./cause.ts";

/** A system of which this source reports nothing else is this much less likely to be the one. */
const ELSEWHERE_SHARE = 0.3;
/** Share of cells from beside that are copied as they stand there; the others stand there no more, or were read off. */
const COPIED_SHARE = 0.7;
/** Numbers are not finer than this (ln value) for all their digits: a copy is worth no more. */
const FINEST = 5e-4;

/**
 * A value taken from one of other systems: those in which the source itself has values go first. Where the very number
 * stands there at that temperature, its digits speak for the copy, and no curve is asked; where another number stands
 * there, the copy is less likely.
 */
export function takenFrom(others: readonly Neighbouring[], { cellIn, reportedValue }: Suspects): Explanation[] {
  const share = (sameSource: boolean) => (sameSource ? 1 : ELSEWHERE_SHARE);
  const all = others.reduce((sum, { sameSource }) => sum + share(sameSource), 0);
  return others.map(({ system, name, sameSource }) => {
    const there = (row: number) => (sameSource ? cellIn(row, system) : "nothing");
    return {
      detail: `value of ${name}`,
      weight: share(sameSource) / all,
      change: () => ({ kind: "solvent", system }),
      odds: (row) => (there(row) === "nothing" ? 1 : 1 - COPIED_SHARE),
      exactly: (row) =>
        there(row) === "the same number"
          ? COPIED_SHARE / Math.max(FINEST, 2 * relativeRounding(reportedValue(row)))
          : undefined,
      system,
    };
  });
}
