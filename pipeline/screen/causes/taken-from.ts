import type { Explanation, Neighbouring, Suspects } from "./cause.ts";

/** A system of which this source reports nothing else is this much less likely to be the one. */
const ELSEWHERE_SHARE = 0.3;
/** How much likelier it is that the very number stands in the other column if it was copied than if by chance. */
const SAME_NUMBER = 30;

/** A value taken from one of other systems: those in which the source itself has values go first, equal numbers count. */
export function takenFrom(others: readonly Neighbouring[], numberStandsIn: Suspects["numberStandsIn"]): Explanation[] {
  const share = (sameSource: boolean) => (sameSource ? 1 : ELSEWHERE_SHARE);
  const all = others.reduce((sum, { sameSource }) => sum + share(sameSource), 0);
  return others.map(({ system, name, sameSource }) => ({
    detail: `value of ${name}`,
    weight: share(sameSource) / all,
    change: () => ({ kind: "solvent", system }),
    odds: (row) => (sameSource && numberStandsIn(row, system) ? SAME_NUMBER : 1),
    system,
  }));
}
