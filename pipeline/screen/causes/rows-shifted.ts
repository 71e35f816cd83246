import type { Cause } from "./cause.ts";

/**
 * A value stands beside the temperature of its neighbour: rows swapped or shifted, a cell copied from the row above.
 *
 * Computes each row with the number of the row before or behind it in the same block; where both hold the same number,
 * with the temperature of that row.
 * Known limitation: a whole block shifted on an even temperature grid looks like a temperature offset of one step.
 */
export const rowsShifted: Cause = {
  name: "rows shifted",
  pointPrior: 0.08,
  blockPrior: 0.05,
  lookAt: "Look at whether the values stand beside their own temperatures in the original table.",
  explanations: ({ neighbour, reportedValue, temperatureK }) =>
    ([-1, 1] as const).map((step) => ({
      detail: `value and temperature of the row ${step === -1 ? "before" : "behind"} mixed up with this one`,
      weight: 1 / 2,
      change: (row) => {
        const other = neighbour(row, step);
        if (other === undefined) return undefined;
        return reportedValue(other) === reportedValue(row)
          ? { kind: "temperature", temperatureK: temperatureK(other) }
          : { kind: "value", value: reportedValue(other) };
      },
    })),
};
