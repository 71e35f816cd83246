import type { Change } from "../../records/reread.ts";
import type { Cause, Explanation, Suspects } from "./cause.ts";

const STEPS = [-1, 1] as const;
/** A shift of fewer rows than this at the end of a block is no shift of the block. */
const LEAST_SHIFTED = 3;
/** Share of blocks shifted as a whole; the others were sorted by value, their temperatures left behind. */
const SHIFTED_SHARE = 0.8;
/** Fewer rows stand in order by chance. */
const LEAST_SORTED = 5;
const AS_REPORTED: Change = { kind: "factor", factor: 1 };

/**
 * A value stands beside the temperature of its neighbour: two rows swapped, or a cell copied from the row beside it.
 *
 * For a block also: values in ascending order beside temperatures that are not (one column sorted alone).
 *
 * Computes the number at the temperature of the row before or behind it in the same block. Where the two rows hold
 * different numbers, the neighbour's must fit here in turn; one that fits where it stands speaks against it.
 * Known limitation: a whole block shifted on an even temperature grid looks like a temperature offset of one step.
 */
export const rowsShifted: Cause = {
  name: "rows shifted",
  pointPrior: 0.08,
  blockPrior: 0.05,
  lookAt: "Look at whether the values stand beside their own temperatures in the original table.",
  explanations: (suspects) =>
    suspects.rows.length === 1 ? swaps(suspects) : [...shifts(suspects), ...sortedAlone(suspects)],
};

function swaps({ neighbour, reportedValue, temperatureK }: Suspects): Explanation[] {
  return STEPS.map((step) => {
    const different = (row: number) => {
      const other = neighbour(row, step);
      return other !== undefined && reportedValue(other) !== reportedValue(row) ? other : undefined;
    };
    return {
      detail: `belongs to the temperature of the row ${step === -1 ? "before" : "behind"}`,
      weight: 1 / 2,
      change: (row) => {
        const other = neighbour(row, step);
        return other === undefined ? undefined : { kind: "temperature", temperatureK: temperatureK(other) };
      },
      partner: (row) => {
        const other = different(row);
        return other === undefined
          ? undefined
          : { row: other, change: { kind: "temperature", temperatureK: temperatureK(row) } };
      },
      proposes: (row) => {
        const other = different(row);
        return other === undefined ? undefined : reportedValue(other);
      },
    };
  });
}

/** Every row from a certain one on holds the number of the row before it (or behind it). */
function shifts({ rows, neighbour, reportedValue }: Suspects): Explanation[] {
  const starts = rows.slice(0, Math.max(1, rows.length - LEAST_SHIFTED));
  return STEPS.flatMap((step) =>
    starts.map((start, s) => ({
      detail: `every value${s === 0 ? "" : ` from row ${s + 1} of the block on`} stands one row too ${step === -1 ? "early" : "late"}`,
      weight: (SHIFTED_SHARE * (s === 0 ? 1 / 2 : 1 / (2 * (starts.length - 1)))) / 2,
      change: (row) => {
        if (rows.indexOf(row) < s) return AS_REPORTED;
        const other = neighbour(row, step);
        return other === undefined || (row === start && s > 0 && step === -1)
          ? undefined
          : { kind: "value", value: reportedValue(other) };
      },
    })),
  );
}

/** The values stand in ascending order and the temperatures do not: the column was sorted alone. */
function sortedAlone({ rows, reportedValue, temperatureK }: Suspects): Explanation[] {
  const ascending = (of: (row: number) => number) => rows.every((row, i) => i === 0 || of(rows[i - 1]!) <= of(row));
  const values = ascending(reportedValue) || ascending((row) => -reportedValue(row));
  if (rows.length < LEAST_SORTED || !values || ascending(temperatureK) || ascending((row) => -temperatureK(row)))
    return [];
  return ([1, -1] as const).map((order) => {
    const sorted = rows.map(temperatureK).sort((a, b) => order * (a - b));
    return {
      detail: "the column of values was sorted without its temperatures",
      weight: (1 - SHIFTED_SHARE) / 2,
      change: (row) => ({ kind: "temperature", temperatureK: sorted[rows.indexOf(row)]! }),
    };
  });
}
