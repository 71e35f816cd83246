import { isLogarithmic, writtenPrecision } from "../../bases/written-precision.ts";
import { type MeasurementTable, textOf } from "../../records/measurements.ts";
import type { System, SystemPoints } from "../../records/systems.ts";
import type { Written } from "./equal-pairs.ts";

/** How the points of systems were written, looked up in the table only when asked. */
export function writtenValues(
  table: MeasurementTable,
  systems: readonly System[],
  points: readonly SystemPoints[],
): Written {
  const rowOf = (system: number, point: number) => points[system]!.row[point]!;
  const unitOf = (row: number) => textOf(table, table.reportedUnit[row]!);
  return {
    rounding: (system, point) => {
      const row = rowOf(system, point);
      const [r, x] = [table.massRatio[row]!, table.moleFraction[row]!];
      const inRatio = writtenPrecision(table.reportedValue[row]!, unitOf(row), r, x);
      // d ln x = (1 - x) d ln r
      return systems[system]!.fitBasis === "ln x" ? inRatio * (1 - x) : inRatio;
    },
    unit: (system, point) => table.reportedUnit[rowOf(system, point)]!,
    replicate: (system, point) => table.replicate[rowOf(system, point)]!,
    logarithm: (system, point) => isLogarithmic(unitOf(rowOf(system, point))),
  };
}
