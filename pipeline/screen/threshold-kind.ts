import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { System } from "../records/systems.ts";
import type { ThresholdKind } from "./material-threshold.ts";

/** Temperatures within this of one another count as one, K. */
const ONE_TEMPERATURE_K = 3;
/** Sources from which a system at one temperature is a compilation. */
const LEAST_SOURCES = 2;
const LOGARITHM = /\b(log|ln)/i;

/**
 * Kind of a system for the material threshold. A one-temperature compilation is a system whose points all lie within 3 K,
 * from two sources or more, most of them reported as logarithms: collections of log S near 25 °C from many hands.
 */
export function thresholdKind(table: MeasurementTable, { identity, rows }: System): ThresholdKind {
  if (isCompilation(table, rows)) return "one-temperature compilation";
  return identity.aqueousSalt ? "aqueous salt" : "general";
}

function isCompilation(table: MeasurementTable, rows: Int32Array): boolean {
  const { temperatureK, source, reportedUnit } = table;
  let [low, high, logarithms] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 0];
  const sources = new Set<number>();
  for (const row of rows) {
    low = Math.min(low, temperatureK[row]!);
    high = Math.max(high, temperatureK[row]!);
    if (high - low > ONE_TEMPERATURE_K) return false;
    sources.add(source[row]!);
    if (LOGARITHM.test(textOf(table, reportedUnit[row]!))) logarithms++;
  }
  return sources.size >= LEAST_SOURCES && 2 * logarithms > rows.length;
}
