import type { FittedRange } from "./fitted-range.ts";

/**
 * Temperatures at which a curve takes a given value, found stretch by stretch between its turning points.
 *
 * Each stretch is monotone, so bisection cannot miss or invent a root; it runs until the bracket is two neighbouring
 * doubles or 60 halvings (1e-16 of the range).
 *
 * @param evaluate ln value at T (K); called inside the range only
 * @param lnValue value sought
 * @param range fitted range, K
 * @param turningPointsK temperatures of zero slope, K; those outside the range are ignored
 * @returns temperatures, K, ascending; empty where the curve does not reach the value inside its range
 */
export function temperaturesOfValue(
  evaluate: (temperatureK: number) => number,
  lnValue: number,
  [lowK, highK]: FittedRange,
  turningPointsK: readonly number[],
): number[] {
  const ends = [lowK, ...turningPointsK.filter((T) => T > lowK && T < highK).sort((a, b) => a - b), highK];
  const found: number[] = [];
  for (let i = 1; i < ends.length; i++) {
    const root = bisect(evaluate, lnValue, ends[i - 1] as number, ends[i] as number);
    if (root !== undefined && root !== found.at(-1)) found.push(root);
  }
  return found;
}

function bisect(
  evaluate: (temperatureK: number) => number,
  lnValue: number,
  lowK: number,
  highK: number,
): number | undefined {
  let [low, high] = [lowK, highK];
  const atLow = evaluate(low) - lnValue;
  const atHigh = evaluate(high) - lnValue;
  if (atLow === 0) return low;
  if (atHigh === 0) return high;
  if (!(atLow * atHigh < 0)) return undefined;
  for (let halving = 0; halving < 60; halving++) {
    const middle = low + (high - low) / 2;
    if (middle === low || middle === high) break;
    if ((evaluate(middle) - lnValue) * atLow > 0) low = middle;
    else high = middle;
  }
  return low + (high - low) / 2;
}
