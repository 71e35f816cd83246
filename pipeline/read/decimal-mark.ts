import type { DecimalMark } from "../records/number-text.ts";
import type { Reading } from "../records/readings.ts";

/** Fields whose cells are numbers, and so show which decimal mark a source uses. */
export const NUMBER_FIELDS: ReadonlySet<string> = new Set([
  ...["temperature", "solubility", "uncertainty", "coverage_factor", "temperature_uncertainty", "solution_density"],
  ...["volume_temperature", "molar_mass", "solvent_water_wt_percent", "pH_final", "solute_purity", "assay_after"],
  ...["equilibration_h", "heating_rate_K_per_min", "filter_temperature"],
]);

/** Runs of digits with the marks between them. */
const DIGITS = /[.,]?\d+(?:[.,]\d+)*/g;

/** What one run of digits says of the decimal mark: a group of exactly three digits leaves it open (`1,234`). */
function evidence(digits: string): DecimalMark | "open" {
  const marks = digits.replace(/\d+/g, "");
  if (marks.length === 0) return "open";
  const last = marks.at(-1) as DecimalMark;
  // Marks of both kinds: the last one is the decimal mark. Several of one kind: they separate thousands.
  if (marks.includes(".") && marks.includes(",")) return last;
  if (marks.length > 1) return last === "," ? "." : ",";
  return /^[1-9]\d{0,2}[.,]\d{3}$/.test(digits) ? "open" : last;
}

function shows(cell: string, mark: DecimalMark): boolean {
  return (cell.match(DIGITS) ?? []).some((digits) => evidence(digits) === mark);
}

/**
 * Decimal mark of a source: a comma only where at least one number can be read no other way and none shows a point.
 * Otherwise a point; numbers such as `1,234` are then refused one by one with both their readings, never guessed.
 *
 * @param columns positions of the number columns
 */
export function findDecimalMark(readings: readonly Reading[], columns: readonly number[]): DecimalMark {
  let comma = false;
  for (const { cells } of readings) {
    for (const column of columns) {
      const cell = cells[column] ?? "";
      comma ||= cell.includes(",") && shows(cell, ",");
    }
  }
  if (!comma) return ".";
  const point = readings.some(({ cells }) => columns.some((column) => shows(cells[column] ?? "", ".")));
  return point ? "." : ",";
}
