import { pharmacopoeiaTerm } from "../bases/pharmacopoeia.ts";
import type { Curve } from "../records/fits.ts";
import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { Settings } from "../records/settings.ts";
import type { System } from "../records/systems.ts";
import { materialThreshold, type ThresholdKind, type ThresholdSettings } from "./material-threshold.ts";

/** The settings that say when a value contradicts a range. */
export type IntervalSettings = ThresholdSettings & Pick<Settings, "pharmacopoeia_factor">;

/** A value known only as a range, on the basis its system is fitted in; an open side is infinite. */
export interface Interval {
  readonly row: number;
  readonly temperatureK: number;
  readonly lnLow: number;
  readonly lnHigh: number;
  /** Mass ratio of the limit nearer to nothing, for the level of the material threshold. */
  readonly massRatio: number;
  /** A descriptive term of the pharmacopoeias. */
  readonly term: boolean;
}

/** What is known of the solubility at a temperature: ln value with the half-width of 95 % limits of a new measurement. */
export interface KnownValue {
  readonly ln: number;
  readonly half: number;
}

/** Normal quantile of two-sided 95 % limits. */
export const NORMAL_95 = 1.959963984540054;

/** ln x or ln r, as the system is fitted, of a mass ratio; -Infinity for 0. */
function lnOfMassRatio(r: number, { fitBasis, identity }: System): number {
  if (fitBasis === "ln r") return Math.log(r);
  const amount = r / identity.soluteMolarMass;
  return Math.log(amount / (amount + 1 / identity.solventMolarMass));
}

/** The limits of an interval row of the table. */
export function intervalOf(table: MeasurementTable, row: number, system: System): Interval {
  const [low, high] = [table.massRatioLow[row] as number, table.massRatioHigh[row] as number];
  return {
    row,
    temperatureK: table.temperatureK[row] as number,
    lnLow: Number.isNaN(low) ? Number.NEGATIVE_INFINITY : lnOfMassRatio(low, system),
    lnHigh: Number.isNaN(high) ? Number.POSITIVE_INFINITY : lnOfMassRatio(high, system),
    massRatio: low > 0 ? low : high,
    term: pharmacopoeiaTerm(textOf(table, table.reportedText[row] as number)) !== undefined,
  };
}

/** How far a value lies outside an interval, ln value: above it positive, below it negative, 0 inside. */
export function outsideBy({ lnLow, lnHigh }: Interval, lnValue: number): number {
  return lnValue > lnHigh ? lnValue - lnHigh : lnValue < lnLow ? lnValue - lnLow : 0;
}

/**
 * How far outside an interval a value must lie to contradict it, ln value: beyond the 95 % limits of a new measurement and
 * the material threshold; for a term of the pharmacopoeias, which is a word and no measurement, a factor in the settings
 * (default 2) instead of the threshold.
 */
export function contradictionLimit(
  { massRatio, term }: Interval,
  { half }: KnownValue,
  kind: ThresholdKind,
  settings: IntervalSettings,
): number {
  const material = term
    ? Math.log(settings.pharmacopoeia_factor)
    : materialThreshold(1000 * massRatio, 0, kind, settings);
  return Math.max(half, material);
}

/** Step for the slope of a curve, K. */
const SLOPE_STEP_K = 0.5;

/** What the curves say at a temperature, the uncertainty of the temperature included; undefined outside their ranges. */
export function knownFromCurves(
  curves: readonly Curve[],
  temperatureK: number,
  temperatureU: number,
): KnownValue | undefined {
  const inside = ({ temperatureRangeK: [low, high] }: Curve) => temperatureK >= low && temperatureK <= high;
  const curve = curves.find(inside);
  if (curve === undefined) return undefined;
  const [low, high] = curve.temperatureRangeK;
  const [from, to] = [Math.max(low, temperatureK - SLOPE_STEP_K), Math.min(high, temperatureK + SLOPE_STEP_K)];
  const slope = to > from ? (curve.evaluate(to) - curve.evaluate(from)) / (to - from) : 0;
  const ofTemperature = temperatureU > 0 ? NORMAL_95 * slope * temperatureU : 0;
  return {
    ln: curve.evaluate(temperatureK),
    half: Math.hypot(curve.limits(temperatureK).newMeasurement, ofTemperature),
  };
}

/** An interval as it was reported, in words: `<0.5 g/kg solvent`, `"soluble" (10 to 30 mL solvent/g)`. */
export function asReported(table: MeasurementTable, { row, term }: Interval): string {
  const text = textOf(table, table.reportedText[row] as number);
  const unit = textOf(table, table.reportedUnit[row] as number);
  if (term) return `"${text}" (${termRange(table.valueLow[row] as number, table.valueHigh[row] as number)} ${unit})`;
  // A bare number that sets one limit was reported without excess solid.
  const bare = /^[\d.,+]/.test(text) && Number.isNaN(table.valueLow[row]) !== Number.isNaN(table.valueHigh[row]);
  return `${bare ? "everything dissolved at " : ""}${text} ${unit}`;
}

function termRange(from: number, to: number): string {
  if (Number.isNaN(from)) return `up to ${to}`;
  return Number.isNaN(to) ? `from ${from}` : `${from} to ${to}`;
}

/** What a person should look at where a value contradicts a range, by the side on which it lies. */
export function lookAtOf({ term }: Interval, above: boolean): string {
  if (term) return "Look at the term, the solid form or salt and the temperature it was given for.";
  return above
    ? "Look at unit and decimal point of the limit, at what the analysis could detect, and whether the solid had time to dissolve."
    : "Look at unit and decimal point of the limit; a solution above the curve may be supersaturated, or made from a less stable form.";
}
