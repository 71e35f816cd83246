import { parseUnit } from "../../bases/units.ts";
import { type MeasurementTable, RowState, textOf } from "../../records/measurements.ts";
import type { Identity, System } from "../../records/systems.ts";
import type { ScreenInput } from "../screen-input.ts";
import type { Suspects } from "./cause.ts";

/** Two tables list the same temperatures to within this, K. */
const SAME_TEMPERATURE_K = 0.5;

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
    const key = keyOf(system.identity);
    const same = bySolute.get(key);
    if (same) same.push(system);
    else bySolute.set(key, [system]);
  }
  return (system: number, source: number, rows: readonly number[]): Suspects => {
    const { table, fits, systems } = input;
    const own = systems[system]!;
    const block = blockRows(table, own, source);
    const at = new Map(block.map((row, i) => [row, i]));
    const oneOf = (column: Int32Array, spelling = (text: string) => text) => {
      const texts = new Set(rows.map((row) => spelling(textOf(table, column[row]!))));
      return texts.size === 1 ? ([...texts][0] ?? "") : "";
    };
    const neighbouring = (name: (identity: Identity) => string) => (other: System) => {
      const sameSource = fits[other.index]!.points.source.includes(source);
      return { system: other.index, name: name(other.identity), sameSource };
    };
    // Where the sources are in conflict, the curve of this source is still its own.
    const siblings = (bySolute.get(keyOf(own.identity)) ?? []).filter((other) => {
      const fit = fits[other.index];
      return other.index !== system && (fit?.agreement === "agreed" || fit?.points.source.includes(source) === true);
    });
    const sameSolvents = (other: System) => other.identity.solvent === own.identity.solvent;
    return {
      rows,
      unit: oneOf(table.reportedUnit, canonicalUnit),
      method: oneOf(table.method),
      soluteMolarMass: own.identity.soluteMolarMass,
      temperatureK: (row) => table.temperatureK[row]!,
      reportedValue: (row) => table.reportedValue[row]!,
      neighbour: (row, step) => block[(at.get(row) ?? Number.NaN) + step],
      otherSolvents: siblings
        .filter((other) => !sameSolvents(other))
        .map(
          neighbouring(({ solvent, composition }) => (composition === "" ? solvent : `${solvent} (${composition})`)),
        ),
      otherCompositions: siblings
        .filter((other) => sameSolvents(other) && other.identity.composition !== own.identity.composition)
        .map(neighbouring(({ solvent, composition }) => `${solvent}, ${composition}`)),
      otherReadingK: (row) => {
        const twin = own.rows.find(
          (other) =>
            table.state[other] === RowState.notFitted &&
            table.source[other] === source &&
            table.reportedValue[other] === table.reportedValue[row] &&
            table.reportedUnit[other] === table.reportedUnit[row],
        );
        return twin === undefined ? undefined : table.temperatureK[twin]!;
      },
      cellIn: (row, other) => {
        const beside = systems[other]!.rows.filter(
          (there) =>
            table.source[there] === source &&
            table.reportedUnit[there] === table.reportedUnit[row] &&
            Math.abs(table.temperatureK[there]! - table.temperatureK[row]!) < SAME_TEMPERATURE_K,
        );
        if (beside.length === 0) return "nothing";
        return beside.some((there) => table.reportedValue[there] === table.reportedValue[row])
          ? "the same number"
          : "another number";
      },
    };
  };
}

/** Solute, solid form and medium: what two systems share that differ in the solvent alone. */
function keyOf({ solute, solidForm, medium }: Identity): string {
  return JSON.stringify([solute, solidForm, medium]);
}

/** Rows of one source within a system, in the order of its file. */
function blockRows(table: MeasurementTable, system: System, source: number): number[] {
  return [...system.rows].filter((row) => table.source[row] === source && !Number.isNaN(table.reportedValue[row]));
}
