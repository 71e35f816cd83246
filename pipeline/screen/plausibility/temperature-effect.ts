import type { Flag, RobustFit } from "../../records/fits.ts";
import { inCelsius } from "../../records/temperature-text.ts";
import { blocksOf } from "../block-screen.ts";
import { middle } from "../middle.ts";
import { type ScreenInput, sourceName } from "../screen-input.ts";
import { counted } from "../wording.ts";

/** Points, and span in K, from which a series shows how it changes with temperature. */
const [LEAST_POINTS, LEAST_SPAN_K] = [3, 10];
/** No dissolution enthalpy of a solid is larger, J/mol, either way. Common practice. */
const LARGEST_ENTHALPY = 150_000;
/** An enthalpy differs from those of others beyond this many standard deviations, and by so much, J/mol. */
const [DIFFERENT_Z, DIFFERENT_BY] = [4, 30_000];
/** Enthalpies of one system differ a little with the temperatures covered, J/mol. */
const BETWEEN_SERIES = 4_000;
const GAS_CONSTANT = 8.314462618;

/** What one series says of the temperature effect: -R d ln value/d(1/T), J/mol, with its standard deviation. */
interface Effect {
  readonly source: number;
  readonly points: readonly number[];
  readonly enthalpy: number;
  readonly sd: number;
}

/**
 * Notices of series whose temperature effect cannot be: an apparent dissolution enthalpy beyond 150 kJ/mol, or one that
 * differs from those of the other sources of the system, in sign or by more than 30 kJ/mol.
 */
export function temperatureEffectFlags(input: ScreenInput): Flag[] {
  return input.fits.flatMap((fit) => {
    const effects = [...blocksOf(fit)].flatMap(([source, points]) => effectOf(fit, source, points));
    return effects.flatMap((effect) => {
      if (Math.abs(effect.enthalpy) - 2 * effect.sd > LARGEST_ENTHALPY) return [tooLarge(input, fit, effect)];
      const others = effects.filter(({ source }) => source !== effect.source);
      return differs(effect, others) ? [unlikeOthers(input, fit, effect, others)] : [];
    });
  });
}

/** The straight line of ln value over 1/T by least squares; none where a series is too short. */
function effectOf({ points, noiseSd }: RobustFit, source: number, of: readonly number[]): Effect[] {
  const n = of.length;
  if (n < LEAST_POINTS) return [];
  const { temperatureK, lnValue } = points;
  let [low, high, centre, level] = [Number.POSITIVE_INFINITY, 0, 0, 0];
  for (const i of of) {
    const T = temperatureK[i]!;
    low = Math.min(low, T);
    high = Math.max(high, T);
    centre += 1 / T / n;
    level += lnValue[i]! / n;
  }
  if (!(high - low >= LEAST_SPAN_K)) return [];
  let [xx, xy, noise] = [0, 0, 0];
  for (const i of of) {
    const x = 1 / temperatureK[i]! - centre;
    xx += x * x;
    xy += x * (lnValue[i]! - level);
  }
  const slope = xy / xx;
  for (const i of of) {
    const residual = lnValue[i]! - level - slope * (1 / temperatureK[i]! - centre);
    noise += Math.max(noiseSd[i]! ** 2, residual * residual);
  }
  return [{ source, points: of, enthalpy: -GAS_CONSTANT * slope, sd: GAS_CONSTANT * Math.sqrt(noise / n / xx) }];
}

/** Whether a series differs from every other that knows its own effect well, those being of one mind among themselves. */
function differs(own: Effect, others: readonly Effect[]): boolean {
  if (others.length === 0) return false;
  const median = middle(others.map(({ enthalpy }) => enthalpy));
  const apart = (other: Effect) => Math.abs(own.enthalpy - other.enthalpy);
  const sure = (other: Effect) => apart(other) > DIFFERENT_Z * Math.hypot(own.sd, other.sd, BETWEEN_SERIES);
  const opposite = own.enthalpy * median < 0 && Math.abs(own.enthalpy) > 2 * own.sd;
  return others.every((other) => sure(other) && (apart(other) > DIFFERENT_BY || opposite));
}

const inKilojoules = (enthalpy: number) => `${(enthalpy / 1000).toFixed(0)} kJ/mol`;

function range({ points }: RobustFit, of: readonly number[]): string {
  const temperatures = of.map((i) => points.temperatureK[i]!);
  return `from ${inCelsius(Math.min(...temperatures))} to ${inCelsius(Math.max(...temperatures))}`;
}

function tooLarge(input: ScreenInput, fit: RobustFit, { source, points, enthalpy }: Effect): Flag {
  return {
    ...{ scope: "block", code: "temperature-effect", severity: "notice", source, system: fit.system },
    evidence:
      `the ${counted(points.length, "point")} of ${sourceName(input, source)} ${range(fit, points)} mean an apparent ` +
      `dissolution enthalpy of ${inKilojoules(enthalpy)}: no solid dissolves with so much`,
    lookAt: "Look at the temperatures, at rows entered out of order, and at the unit of every value.",
  };
}

function unlikeOthers(
  input: ScreenInput,
  fit: RobustFit,
  { source, points, enthalpy }: Effect,
  others: readonly Effect[],
): Flag {
  const told = others.map((other) => `${inKilojoules(other.enthalpy)} by ${sourceName(input, other.source)}`);
  return {
    ...{ scope: "block", code: "temperature-effect", severity: "notice", source, system: fit.system },
    evidence:
      `the ${counted(points.length, "point")} of ${sourceName(input, source)} ${range(fit, points)} mean an apparent ` +
      `dissolution enthalpy of ${inKilojoules(enthalpy)}, against ${told.join(", ")}`,
    lookAt: "Look at the temperatures, at rows entered out of order, and at whether both mean the same solid.",
  };
}
