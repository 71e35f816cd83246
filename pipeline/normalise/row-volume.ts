import { densityFactor } from "../bases/density-unit.ts";
import { toKelvin } from "../bases/temperature.ts";
import type { CellFault } from "../records/cells.ts";
import type { Reading } from "../records/readings.ts";
import { optionalNumber, type SourceCells } from "./source-cells.ts";

/** Densities of saturated liquors in any solvent lie well inside these, kg/m3 (common practice). */
export const densityRange = { least: 300, greatest: 5000 };

/** Measured density of the solution, kg/m3; NaN where none is given. A value that no liquor has is a slip of the unit. */
export function readDensity(cells: SourceCells, reading: Reading): number | CellFault {
  const value = optionalNumber(cells, "solution_density", reading, 0);
  if (typeof value !== "number" || Number.isNaN(value)) return value;
  const unit = cells.unitOf.solution_density(reading);
  const factor = densityFactor(unit);
  const found = `solution density ${value} ${unit || "(no unit)"}`;
  if (factor === undefined) {
    return { field: "solution_density", code: "unknown-density-unit", found };
  }
  const density = value * factor;
  if (density >= densityRange.least && density <= densityRange.greatest) return density;
  return { field: "solution_density", code: "implausible-density", found };
}

/** Temperature of the volume, K; NaN where none is stated. */
export function readVolumeTemperature(cells: SourceCells, reading: Reading): number | CellFault {
  const value = optionalNumber(cells, "volume_temperature", reading, Number.NEGATIVE_INFINITY);
  if (typeof value !== "number" || Number.isNaN(value)) return value;
  const unit = cells.unitOf.volume_temperature(reading);
  const kelvin = toKelvin(value, unit);
  if (kelvin !== undefined && kelvin > 0) return kelvin;
  const found = kelvin === undefined ? `"${unit}" is not a unit of temperature` : `${value} ${unit}`;
  return {
    field: "volume_temperature",
    code: kelvin === undefined ? "unknown-temperature-unit" : "below-absolute-zero",
    found,
  };
}
