import { parseUnit } from "../../bases/units.ts";
import type { MeasurementTable } from "../../records/measurements.ts";
import { textOf } from "../../records/measurements.ts";
import type { System } from "../../records/systems.ts";
import type { ScreenInput } from "../screen-input.ts";
import type { Suspects } from "./cause.ts";

const canonicalUnits = new Map<string, string>();

/** Canonical spelling of a unit as reported; the text itself where it is not understood. */
function canonicalUnit(text: string): string {
  let canonical = canonicalUnits.get(text);
  if (canonical === undefined) {
    const parsed = parseUnit(text);
    canonical = parsed.kind === "unit" ? parsed.unit.canonical : text;
    canonicalUnits.set(text, canonical);
  }
  return canonical;
}

/** Finds what the causes may look at. Indexes the systems once. */
export function createSuspectFinder(input: ScreenInput) {
  const bySolute = new Map<string, System[]>();
  for (const system of input.systems) {
    const key = JSON.stringify([system.identity.solute, system.identity.solidForm]);
    const same = bySolute.get(key);
    if (same) same.push(system);
    else bySolute.set(key, [system]);
  }
  return (system: number, source: number, rows: readonly number[]): Suspects => {
    const { table, fits } = input;
    const block = blockRows(table, input.systems[system]!, source);
    const at = new Map(block.map((row, i) => [row, i]));
    const units = new Set(rows.map((row) => canonicalUnit(textOf(table, table.reportedUnit[row]!))));
    const { solute, solidForm, solvent } = input.systems[system]!.identity;
    const otherSolvents = (bySolute.get(JSON.stringify([solute, solidForm])) ?? [])
      .filter((other) => other.index !== system && other.identity.solvent !== solvent)
      .filter((other) => fits[other.index]?.agreement === "agreed")
      .map((other) => ({
        system: other.index,
        name: other.identity.solvent,
        sameSource: fits[other.index]?.points.source.includes(source) === true,
      }));
    return {
      rows,
      unit: units.size === 1 ? ([...units][0] ?? "") : "",
      temperatureK: (row) => table.temperatureK[row]!,
      reportedValue: (row) => table.reportedValue[row]!,
      neighbour: (row, step) => block[(at.get(row) ?? Number.NaN) + step],
      otherSolvents,
    };
  };
}

/** Rows of one source within a system, in the order of its file. */
function blockRows(table: MeasurementTable, system: System, source: number): number[] {
  return [...system.rows].filter((row) => table.source[row] === source && !Number.isNaN(table.reportedValue[row]));
}
