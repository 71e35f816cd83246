import type { MeasurementTable } from "../records/measurements.ts";
import { readableId } from "../records/readable-ids.ts";
import type { Identity, System } from "../records/systems.ts";

/** Canonical key of a system: JSON of its parts, so that no two different identities share one. */
export function systemKey(identity: Identity): string {
  const { solute, solidForm, solvent, composition, medium } = identity;
  return JSON.stringify([solute, solidForm, solvent, composition, medium]);
}

/** Readable id of the system of an identity; 16 digits instead of 8 where another system of the edition shares the 8. */
export function systemId(identity: Identity, digits: 8 | 16 = 8): string {
  const { solute, solidForm, solvent, composition, medium } = identity;
  const form = solidForm === "unspecified" ? "" : solidForm;
  return readableId([solute, form, "in", solvent, composition, medium], systemKey(identity), digits);
}

/** Readable id of the family of an identity: the same for all solid forms. */
function familyId({ solute, solvent, composition, medium }: Identity, digits: 8 | 16 = 8): string {
  const key = JSON.stringify([solute, solvent, composition, medium]);
  return readableId([solute, "in", solvent, composition, medium], key, digits);
}

type IdOf = (identity: Identity, digits?: 8 | 16) => string;

/** Ids that differ for any two identities of different keys: those whose short ids are the same get long ones, all of them. */
function uniqueIds(identities: readonly Identity[], keyOf: (identity: Identity) => string, idOf: IdOf): string[] {
  const keysOf = new Map<string, Set<string>>();
  const short = identities.map((identity) => idOf(identity));
  for (const [at, id] of short.entries()) {
    keysOf.set(id, (keysOf.get(id) ?? new Set()).add(keyOf(identities[at] as Identity)));
  }
  return short.map((id, at) => ((keysOf.get(id)?.size ?? 0) > 1 ? idOf(identities[at] as Identity, 16) : id));
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
  const ids = uniqueIds(identities, systemKey, systemId);
  const families = uniqueIds(identities, (identity) => systemKey({ ...identity, solidForm: "" }), familyId);
  identities.forEach((identity, i) => {
    const rows = rowsOf[i] as Int32Array;
    if (rows.length === 0) return;
    systems.push({
      id: ids[i] as string,
      key: systemKey(identity),
      family: families[i] as string,
      identity,
      fitBasis: Number.isNaN(identity.soluteMolarMass) ? "ln r" : "ln x",
      rows,
    });
  });
  systems.sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  return systems.map((system, index) => ({ ...system, index }));
}
