/**
 * Where a model over a binary solvent may be evaluated: the convex hull of the compositions and temperatures of its data.
 * Every point inside lies between measurements; a corner that no measurement reaches (a hot dilute solution, say) lies
 * outside although its composition and its temperature alone would not.
 */
export interface MixtureRange {
  /** Corners of the hull, by ascending mass fraction, of its lower and upper temperature side. */
  readonly lower: readonly Corner[];
  readonly upper: readonly Corner[];
}

/** A corner of a hull: mass fraction of the first solvent (free of solute), and temperature, K. */
export interface Corner {
  readonly fraction: number;
  readonly temperatureK: number;
}

/** Rounding that still counts as inside: mass fraction, and K. */
const ROUNDING = 1e-9;

/**
 * Convex hull of measured compositions and temperatures.
 *
 * @param fractions mass fractions of the first solvent, one a measurement
 * @param temperaturesK temperatures, K, in the same order
 * @throws RangeError if there is no measurement, or a number is not finite.
 * @see Andrew, Inf. Process. Lett. 9 (1979) 216-219, for the monotone chain.
 */
export function mixtureRange(fractions: ArrayLike<number>, temperaturesK: ArrayLike<number>): MixtureRange {
  const corners = Array.from(fractions, (fraction, i) => ({ fraction, temperatureK: temperaturesK[i] as number }));
  if (corners.length === 0) throw new RangeError("mixture range: no measurement");
  if (corners.some(({ fraction, temperatureK }) => !Number.isFinite(fraction + temperatureK)))
    throw new RangeError("mixture range: a composition or temperature is not finite");
  corners.sort((a, b) => a.fraction - b.fraction || a.temperatureK - b.temperatureK);
  return { lower: chain(corners, 1), upper: chain(corners, -1) };
}

/** Lower (`side` 1) or upper (-1) chain over corners sorted by fraction. */
function chain(sorted: readonly Corner[], side: 1 | -1): Corner[] {
  const kept: Corner[] = [];
  for (const corner of sorted) {
    const last = kept.at(-1);
    if (last !== undefined && last.fraction === corner.fraction) {
      if (side * (corner.temperatureK - last.temperatureK) >= 0) continue;
      kept.pop();
    }
    while (kept.length > 1 && side * turn(kept.at(-2) as Corner, kept.at(-1) as Corner, corner) <= 0) kept.pop();
    kept.push(corner);
  }
  return kept;
}

/** Above 0 where the way a, b, c turns to higher temperature. */
function turn(a: Corner, b: Corner, c: Corner): number {
  return (
    (b.fraction - a.fraction) * (c.temperatureK - a.temperatureK) -
    (b.temperatureK - a.temperatureK) * (c.fraction - a.fraction)
  );
}

/** Corners of the hull, each once, counter-clockwise from the lowest mass fraction at its lowest temperature. */
export function cornersOf({ lower, upper }: MixtureRange): readonly Corner[] {
  const same = (a: Corner | undefined, b: Corner) => a?.fraction === b.fraction && a.temperatureK === b.temperatureK;
  const back = [...upper].reverse().filter((corner) => !same(lower.at(-1), corner) && !same(lower[0], corner));
  return [...lower, ...back];
}

/** Lowest and highest mass fraction of the first solvent inside. */
export function fractionLimits({ lower }: MixtureRange): readonly [number, number] {
  return [(lower[0] as Corner).fraction, (lower.at(-1) as Corner).fraction];
}

/** Lowest and highest temperature inside, K, at a mass fraction; undefined outside the compositions. */
export function temperatureLimits(range: MixtureRange, fraction: number): readonly [number, number] | undefined {
  const [low, high] = fractionLimits(range);
  if (!(fraction >= low - ROUNDING && fraction <= high + ROUNDING)) return undefined;
  const at = Math.min(high, Math.max(low, fraction));
  return [heightOf(range.lower, at), heightOf(range.upper, at)];
}

/** Lowest and highest mass fraction inside at a temperature, K; undefined where the hull does not reach it. */
export function fractionLimitsAt(range: MixtureRange, temperatureK: number): readonly [number, number] | undefined {
  const crossings: number[] = [];
  for (const side of [range.lower, range.upper])
    side.forEach((corner, i) => {
      if (Math.abs(corner.temperatureK - temperatureK) <= ROUNDING) crossings.push(corner.fraction);
      const next = side[i + 1];
      if (next === undefined) return;
      const share = (temperatureK - corner.temperatureK) / (next.temperatureK - corner.temperatureK);
      if (share > 0 && share < 1) crossings.push(corner.fraction + share * (next.fraction - corner.fraction));
    });
  for (const fraction of fractionLimits(range)) if (isInside(range, fraction, temperatureK)) crossings.push(fraction);
  return crossings.length === 0 ? undefined : [Math.min(...crossings), Math.max(...crossings)];
}

/** True if a composition and temperature (K) lie inside, or miss it by rounding alone. */
export function isInside(range: MixtureRange, fraction: number, temperatureK: number): boolean {
  const limits = temperatureLimits(range, fraction);
  return limits !== undefined && temperatureK >= limits[0] - ROUNDING && temperatureK <= limits[1] + ROUNDING;
}

/**
 * Refuses a composition or temperature outside the data.
 *
 * @throws RangeError naming the compositions, or the temperatures at that composition, that the data cover.
 */
export function requireInsideMixture(model: string, fraction: number, temperatureK: number, range: MixtureRange): void {
  const limits = temperatureLimits(range, fraction);
  if (limits === undefined) {
    const [low, high] = fractionLimits(range);
    throw new RangeError(`${model}: mass fraction ${fraction} is outside the compositions fitted, ${low} to ${high}`);
  }
  if (isInside(range, fraction, temperatureK)) return;
  throw new RangeError(
    `${model}: T = ${temperatureK} K is outside the fitted range at mass fraction ${fraction}, ${limits[0]} K to ${limits[1]} K`,
  );
}

function heightOf(side: readonly Corner[], fraction: number): number {
  let before = side[0] as Corner;
  for (const corner of side) {
    if (corner.fraction >= fraction) {
      if (corner.fraction === before.fraction) return corner.temperatureK;
      const share = (fraction - before.fraction) / (corner.fraction - before.fraction);
      return before.temperatureK + share * (corner.temperatureK - before.temperatureK);
    }
    before = corner;
  }
  return before.temperatureK;
}
