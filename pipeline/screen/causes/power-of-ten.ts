import type { Cause } from "./cause.ts";

const SHARES: readonly (readonly [factor: number, share: number])[] = [
  [10, 0.32],
  [0.1, 0.32],
  [100, 0.08],
  [0.01, 0.08],
  [1000, 0.1],
  [0.001, 0.1],
];

/**
 * Decimal point set wrongly, or a prefix lost (mg for g).
 *
 * Computes the value times 10, 100, 1000 and their reciprocals. A whole block off by 1000 is usually the prefix of a unit.
 * Known limitation: a factor 10 that was forgotten on dilution looks the same and is named so.
 */
export const powerOfTen: Cause = {
  name: "power of ten",
  pointPrior: 0.28,
  blockPrior: 0.2,
  lookAt: "Look at the decimal point and the prefix of the unit in the notebook or the original table.",
  explanations: () =>
    SHARES.map(([factor, weight]) => ({
      detail: factor > 1 ? `${factor} times too low` : `${Math.round(1 / factor)} times too high`,
      weight,
      change: () => ({ kind: "factor", factor }),
    })),
};
