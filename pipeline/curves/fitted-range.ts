/** Lowest and highest temperature of the points a curve was fitted to, K. A curve says nothing outside them. */
export type FittedRange = readonly [lowK: number, highK: number];

/**
 * Refuses a temperature outside the fitted range: curves are never extrapolated.
 *
 * @param model name of the model, for the message
 * @param temperatureK temperature T, K
 * @param range fitted range, K
 * @throws RangeError if T lies outside the range or is not a number.
 */
export function requireInside(model: string, temperatureK: number, [lowK, highK]: FittedRange): void {
  if (temperatureK >= lowK && temperatureK <= highK) return;
  throw new RangeError(
    `${model}: T = ${temperatureK} K is outside the fitted range of the curve, ${lowK} K to ${highK} K`,
  );
}

/**
 * Those of the given temperatures (K) that lie inside the range, ascending, each once.
 *
 * A root found for the value at an end of the range may miss that end by rounding; up to 1e-9 K it counts as the end.
 */
export function insideRange(temperaturesK: readonly number[], [lowK, highK]: FittedRange): number[] {
  const inside = temperaturesK
    .filter((T) => T >= lowK - 1e-9 && T <= highK + 1e-9)
    .map((T) => Math.min(highK, Math.max(lowK, T)))
    .sort((a, b) => a - b);
  return inside.filter((T, i) => i === 0 || T !== inside[i - 1]);
}
