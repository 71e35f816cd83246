import { normalSurvival } from "../numerics/distributions.ts";
import { benjaminiHochbergThreshold } from "../numerics/multiple-testing.ts";
import type { Curve } from "../records/fits.ts";
import { type MeasurementTable, RowState } from "../records/measurements.ts";
import type { Settings } from "../records/settings.ts";
import type { System } from "../records/systems.ts";
import { inCelsius } from "../records/temperature-text.ts";
import {
  contradictionLimit,
  intervalOf,
  type KnownValue,
  knownFromCurves,
  lookAtOf,
  outsideBy,
} from "./interval-gap.ts";
import { materialThreshold } from "./material-threshold.ts";
import { offBy, threeDigits } from "./wording.ts";

/** What `check` says of a new row. */
export const VERDICTS = ["fits", "off the curve", "outside the range", "new system", "cannot tell"] as const;
export type Verdict = (typeof VERDICTS)[number];

/** The collection's knowledge of one system, for judging new rows. */
export interface KnownSystem {
  readonly system: System;
  readonly curves: readonly Curve[];
  /** Why there is no curve. */
  readonly noCurve: string;
}

/** A new row judged. */
export interface JudgedRow {
  readonly row: number;
  readonly verdict: Verdict;
  /** Position of the system, where the collection has it. */
  readonly system?: number;
  /** ln value the curve gives, with the half-width of the 95 % limits of a new measurement. */
  readonly expectedLn?: number;
  readonly halfWidth?: number;
  readonly deviation?: number;
  readonly z?: number;
  readonly evidence: string;
  readonly lookAt: string;
}

/** A curve through so few points withstands no mistake of its own: only a gross deviation is told. */
const FEW_POINTS = 4;
/** Deviation that even a weak curve shows: a factor of 2. */
const GROSS = Math.LN2;
/** Half-width of 95 % limits in standard deviations, for turning limits into a standard deviation. */
const NORMAL_95 = 1.959963984540054;

/** A row that has a curve to be held against. */
interface Candidate {
  readonly row: number;
  readonly known: KnownSystem;
  readonly expectedLn: number;
  readonly halfWidth: number;
  readonly deviation: number;
  readonly z: number;
  readonly weak: boolean;
}

/** ln value of a row on the basis its system is fitted in; NaN where it has none. */
function lnValueOf(table: MeasurementTable, row: number, { fitBasis }: System): number {
  return Math.log((fitBasis === "ln x" ? table.moleFraction : table.massRatio)[row] as number);
}

/** Judges a row for which statistics decide later, or at once where no curve can. */
function candidateOf(
  table: MeasurementTable,
  row: number,
  known: KnownSystem | undefined,
  settings: Settings,
): Candidate | JudgedRow {
  const simple = (verdict: Verdict, evidence: string, lookAt: string): JudgedRow => ({
    ...{ row, verdict, evidence, lookAt },
    ...(known === undefined ? {} : { system: known.system.index }),
  });
  if (known === undefined) return simple("new system", "the collection has no measurement of this system", "");
  if (known.curves.length === 0)
    return simple("cannot tell", `no curve to hold it against: ${known.noCurve}`, "the system's page");
  if (table.state[row] === RowState.notFitted)
    return simple("cannot tell", "a value that is shown and never fitted is not judged here", "");
  const T = table.temperatureK[row] as number;
  const curve = known.curves.find(({ temperatureRangeK: [low, high] }) => T >= low && T <= high);
  if (curve === undefined) {
    const ranges = known.curves.map(({ temperatureRangeK: [low, high] }) => `${inCelsius(low)} to ${inCelsius(high)}`);
    return simple(
      "outside the range",
      `${inCelsius(T)} lies outside ${ranges.join(", ")}; nothing is extrapolated`,
      "",
    );
  }
  if (table.state[row] === RowState.interval) return judgeInterval(table, row, known, settings);
  const expectedLn = curve.evaluate(T);
  const deviation = lnValueOf(table, row, known.system) - expectedLn;
  if (!Number.isFinite(deviation)) return simple("cannot tell", "the row has no value on the basis of the curve", "");
  const { newMeasurement } = curve.limits(T);
  const sd = Math.max(newMeasurement / NORMAL_95, table.relativeU[row] as number);
  const halfWidth = NORMAL_95 * sd;
  return { row, known, expectedLn, halfWidth, deviation, z: deviation / sd, weak: curve.n < FEW_POINTS };
}

/**
 * A value known only as a range is off the curve where the curve lies outside it beyond the 95 % limits of a new measurement
 * and the material threshold; it has no deviation and takes no part in the false-discovery count.
 */
function judgeInterval(table: MeasurementTable, row: number, known: KnownSystem, settings: Settings): JudgedRow {
  const { system, curves } = known;
  const interval = intervalOf(table, row, system);
  const { ln, half } = knownFromCurves(curves, interval.temperatureK, table.temperatureU[row] as number) as KnownValue;
  const outside = outsideBy(interval, ln);
  const kind = system.identity.aqueousSalt ? "aqueous salt" : "general";
  const common = { row, system: system.index, expectedLn: ln, halfWidth: half };
  if (outside === 0) return { ...common, verdict: "fits", evidence: "the curve lies within the range", lookAt: "" };
  const side = `${outside > 0 ? "above its upper" : "below its lower"} limit`;
  const told = `the curve lies a factor ${threeDigits(Math.exp(Math.abs(outside)))} ${side}`;
  if (Math.abs(outside) <= contradictionLimit(interval, { ln, half }, kind, settings)) {
    return { ...common, verdict: "fits", evidence: `${told}, within what a new measurement may differ`, lookAt: "" };
  }
  return { ...common, verdict: "off the curve", evidence: told, lookAt: lookAtOf(interval, outside > 0) };
}

/**
 * Judges new rows against the collection's curves: off the curve where a row is beyond the false-discovery limit over all
 * rows of the file and beyond the material threshold of its level.
 *
 * @param systemOf what the collection knows of the system of a row; undefined for a new one
 */
export function judgeRows(
  table: MeasurementTable,
  systemOf: (row: number) => KnownSystem | undefined,
  settings: Settings,
): JudgedRow[] {
  const outcomes = Array.from({ length: table.count }, (_, row) => candidateOf(table, row, systemOf(row), settings));
  const candidates = outcomes.filter((outcome): outcome is Candidate => "known" in outcome);
  const pOf = ({ z }: Candidate) => 2 * normalSurvival(Math.abs(z));
  const limit = benjaminiHochbergThreshold(candidates.map(pOf), settings.false_discovery_rate, candidates.length);
  return outcomes.map((outcome) => {
    if (!("known" in outcome)) return outcome;
    const { row, known, expectedLn, halfWidth, deviation, z, weak } = outcome;
    const c = table.massConcentration[row] as number;
    const level = Number.isNaN(c) ? 1000 * (table.massRatio[row] as number) : c;
    const kind = known.system.identity.aqueousSalt ? "aqueous salt" : "general";
    const material = materialThreshold(level, table.relativeU[row] as number, kind, settings);
    const off = pOf(outcome) <= limit && Math.abs(deviation) >= material;
    const evidence = `${offBy(deviation)} the curve (z = ${threeDigits(z)}); a new measurement is expected within ${threeDigits(100 * Math.expm1(halfWidth))} % (95 %)`;
    const verdict: Verdict = !off ? "fits" : weak && Math.abs(deviation) < GROSS ? "cannot tell" : "off the curve";
    const lookAt =
      verdict === "off the curve"
        ? "unit, decimal point, temperature and solid form of this row; then measure it again"
        : verdict === "cannot tell"
          ? "more measurements of this system: too few to say which is off"
          : "";
    return { row, verdict, system: known.system.index, expectedLn, halfWidth, deviation, z, evidence, lookAt };
  });
}
