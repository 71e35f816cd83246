import { fractionLimitsAt, type MixtureRange } from "../../curves/mixture-range.ts";
import type { InnerMaximum } from "../../records/mixtures.ts";

/** Steps of the search over composition, and halvings that follow it. */
const [STEPS, REFINEMENTS] = [200, 40];
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * Maximum of the solubility over composition at one temperature (K), where it lies between the ends of the compositions
 * there and exceeds both by more than the 95 % limits of the difference.
 *
 * @param value ln value at a composition and temperature
 * @param differenceHalfWidth 95 % half-width of the difference between two compositions
 */
export function innerMaximum(
  range: MixtureRange,
  temperatureK: number,
  value: (fraction: number, temperatureK: number) => number,
  differenceHalfWidth: (fraction: number, other: number, temperatureK: number) => number,
): InnerMaximum | undefined {
  const limits = fractionLimitsAt(range, temperatureK);
  if (limits === undefined || !(limits[1] > limits[0])) return undefined;
  const [low, high] = limits;
  const at = (w: number) => value(w, temperatureK);
  const step = (high - low) / STEPS;
  const grid = Array.from({ length: STEPS + 1 }, (_, i) => (i === STEPS ? high : low + i * step));
  const values = grid.map(at);
  const best = values.reduce((top, value, i) => (value > (values[top] as number) ? i : top), 0);
  if (best === 0 || best === STEPS) return undefined;
  const fraction = refined(at, grid[best - 1] as number, grid[best + 1] as number);
  const lnValue = at(fraction);
  const end = at(low) >= at(high) ? low : high;
  const exceeds = (other: number) => lnValue - at(other) > differenceHalfWidth(fraction, other, temperatureK);
  if (!exceeds(low) || !exceeds(high)) return undefined;
  let [from, to] = [best, best];
  while (from > 0 && !exceeds(grid[from - 1] as number)) from--;
  while (to < STEPS && !exceeds(grid[to + 1] as number)) to++;
  return {
    ...{ temperatureK, fraction, lnValue },
    fractionLow: Math.min(fraction, grid[from] as number),
    fractionHigh: Math.max(fraction, grid[to] as number),
    rise: lnValue - at(end),
    riseHalfWidth: differenceHalfWidth(fraction, end, temperatureK),
  };
}

/** Place of the maximum between two compositions, by golden sections. */
function refined(at: (w: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let i = 0; i < REFINEMENTS; i++) {
    const [a, b] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
    if (at(a) >= at(b)) high = b;
    else low = a;
  }
  return (low + high) / 2;
}

/** Round temperatures, K, inside a range: every 10 °C, else every 5 °C, else its middle. */
export function roundTemperatures([lowK, highK]: readonly [number, number]): number[] {
  for (const step of [10, 5]) {
    const first = Math.ceil((lowK - 273.15 - 1e-9) / step);
    const last = Math.floor((highK - 273.15 + 1e-9) / step);
    const found = Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => (first + i) * step + 273.15);
    if (found.length > 1) return found.map((T) => Math.min(highK, Math.max(lowK, T)));
  }
  return [(lowK + highK) / 2];
}
