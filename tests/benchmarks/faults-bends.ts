import type { RandomSource } from "../../pipeline/numerics/random.ts";

/**
 * How a mistake at the bench bends a series: deviation of ln x from the truth by temperature (K).
 *
 * @param truth ln x by temperature
 * @param low lowest and `high` highest temperature of the series
 */
export function bendOf(
  random: RandomSource,
  kind: "everything dissolved" | "loss on filtration" | "solvent lost" | "not at equilibrium" | "temperature offset",
  truth: (temperatureK: number) => number,
  low: number,
  high: number,
): (temperatureK: number) => number {
  const part = (from: number, to: number) => from + (to - from) * random.uniform();
  const most = part(0.25, 0.9);
  if (kind === "everything dissolved") {
    const charge = truth(low + (high - low) * part(0.4, 0.75));
    return (T) => Math.min(0, charge - truth(T));
  }
  if (kind === "temperature offset") {
    if (random.uniform() < 0.5) {
      const by = part(4, 12) * (random.uniform() < 0.5 ? -1 : 1);
      return (T) => truth(T + by) - truth(T);
    }
    // A jacket hotter than the solution when heating, colder when cooling; room at 295 K.
    const lag = part(0.08, 0.25);
    return (T) => truth(T - lag * (T - 295)) - truth(T);
  }
  // Growing from somewhere in the range, in proportion or faster.
  const power = part(1, 1.6);
  const start = low + (high - low) * part(0.1, 0.6);
  if (kind === "not at equilibrium") {
    const side = random.uniform() < 0.7 ? -1 : 1;
    const from = high - (start - low);
    return (T) => side * most * Math.max(0, (from - T) / (from - low)) ** power;
  }
  const side = kind === "solvent lost" ? 1 : -1;
  return (T) => side * most * Math.max(0, (T - start) / (high - start)) ** power;
}
