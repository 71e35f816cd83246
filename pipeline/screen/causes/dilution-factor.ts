import type { Cause } from "./cause.ts";

/** Usual dilutions of a saturated solution before analysis that are no powers of ten, with their shares. */
const FACTORS: readonly (readonly [factor: number, share: number])[] = [
  [2, 0.2],
  [4, 0.12],
  [5, 0.36],
  [20, 0.14],
  [25, 0.08],
  [50, 0.1],
];
/** Forgetting a dilution is commoner than counting it twice. */
const FORGOTTEN = 0.87;

/**
 * Dilution before analysis not counted (value too low) or counted twice (too high).
 *
 * Computes the value times 2, 4, 5, 20, 25, 50 and their reciprocals; powers of ten belong to `power of ten`. Only for
 * values per volume or per mass from an analysis; the unit cannot tell, so every unit is tried.
 * Known limitation: a factor 2 also arises from a wrong molar mass or a salt counted per ion.
 */
export const dilutionFactor: Cause = {
  name: "dilution factor",
  pointPrior: 0.12,
  blockPrior: 0.08,
  lookAt: "Look at the dilution of this sample in the analysis record and whether it was counted once.",
  explanations: () =>
    FACTORS.flatMap(([factor, share]) => [
      {
        detail: `dilution by ${factor} not counted`,
        weight: share * FORGOTTEN,
        change: () => ({ kind: "factor", factor }) as const,
      },
      {
        detail: `dilution by ${factor} counted twice`,
        weight: share * (1 - FORGOTTEN),
        change: () => ({ kind: "factor", factor: 1 / factor }) as const,
      },
    ]),
};
