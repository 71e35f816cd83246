import type { MeasurementTable } from "../records/measurements.ts";
import { readableId } from "../records/readable-ids.ts";
import type { Identity, System } from "../records/systems.ts";

/** Canonical key of a system: JSON of its parts, so that no two different identities share one. */
export function systemKey(identity: Identity): string {
  const { solute, solidForm, solvent, composition, medium } = identity;
  return JSON.stringify([solute, solidForm, solvent, composition, medium]);
}

/** Readable id of the system of an identity. */
export function systemId(identity: Identity): string {
  const { solute, solidForm, solvent, composition, medium } = identity;
  const form = solidForm === "unspecified" ? "" : solidForm;
  return readableId([solute, form, "in", solvent, composition, medium], systemKey(identity));
}

/**
 * One system per identity that has measurements, sorted by id in code-unit order; every row lands in exactly one.
 * Rows keep their order, so a system's rows ascend by source, line and column. Counting sort: O(rows + identities).
 */
export function groupIntoSystems(table: MeasurementTable, identities: readonly Identity[]): System[] {
  const counts = new Int32Array(identities.length);
  for (let row = 0; row < table.count; row++) counts[table.identity[row] as number]!++;
  const rowsOf = Array.from(counts, (count) => new Int32Array(count));
  const filled = new Int32Array(identities.length);
  for (let row = 0; row < table.count; row++) {
    const identity = table.identity[row] as number;
    (rowsOf[identity] as Int32Array)[filled[identity]!++] = row;
  }
  const systems: Omit<System, "index">[] = [];
  identities.forEach((identity, i) => {
    const rows = rowsOf[i] as Int32Array;
    if (rows.length === 0) return;
    const { solute, solvent, composition, medium } = identity;
    systems.push({
      id: systemId(identity),
      key: systemKey(identity),
      family: readableId(
        [solute, "in", solvent, composition, medium],
        JSON.stringify([solute, solvent, composition, medium]),
      ),
      identity,
      fitBasis: Number.isNaN(identity.soluteMolarMass) ? "ln r" : "ln x",
      rows,
    });
  });
  systems.sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  return systems.map((system, index) => ({ ...system, index }));
}
