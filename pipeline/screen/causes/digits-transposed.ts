import type { Cause } from "./cause.ts";

/** A swap that changes the number by more than this factor (ln) moved a leading zero: rarer than the others. */
const WITH_ZERO = 1.5;
const WITH_ZERO_SHARE = 0.2;
/** Swaps that change the number by less cannot be what is seen. */
const LEAST_CHANGE = 0.08;

/** Numbers that a swap of two neighbouring, different digits makes of a number as written; the sign and the decimal point stay. */
export function transpositions(value: number): number[] {
  const written = String(Math.abs(value));
  if (written.includes("e")) return [];
  // A zero that a swap brought to the front is not written: 0109 for 1009.
  const text = written.startsWith("0") ? written : `0${written}`;
  const places = [...text].flatMap((c, i) => (c >= "0" && c <= "9" ? [i] : []));
  const found: number[] = [];
  for (let j = 1; j < places.length; j++) {
    const [a, b] = [places[j - 1]!, places[j]!];
    if (text[a] === text[b]) continue;
    const swapped = text.slice(0, a) + text[b] + text.slice(a + 1, b) + text[a] + text.slice(b + 1);
    const number = Math.sign(value) * Number(swapped);
    // Ten times the number is a decimal point set wrongly, and another cause.
    if (number !== 0 && Math.abs(number) !== Math.abs(value) && number !== 10 * value) found.push(number);
  }
  return found;
}

/**
 * Two neighbouring digits changed places in copying: 12.7 for 21.7.
 *
 * Computes the number with each pair of neighbouring digits swapped. Belongs to a row.
 * Known limitation: swaps of the last digits move the value less than the noise and cannot be seen.
 */
export const digitsTransposed: Cause = {
  name: "digits transposed",
  pointPrior: 0.115,
  blockPrior: 0,
  lookAt: "Look at the digits of this value in the notebook or the original table.",
  explanations: ({ rows, reportedValue }) => {
    const row = rows[0];
    if (rows.length !== 1 || row === undefined) return [];
    const reported = reportedValue(row);
    const candidates = transpositions(reported).filter((value) => Math.abs(value / reported - 1) > LEAST_CHANGE);
    const share = (value: number) => (Math.abs(Math.log(value / reported)) > WITH_ZERO ? WITH_ZERO_SHARE : 1);
    const all = candidates.reduce((sum, value) => sum + share(value), 0);
    return candidates.map((value) => ({
      detail: `${reported} should read ${value}`,
      weight: share(value) / Math.max(1, all),
      change: () => ({ kind: "value", value }),
    }));
  },
};
