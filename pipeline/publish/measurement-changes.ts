import type { EditionTables, PublishedMeasurement } from "../records/edition-tables.ts";
import type { ComparedMeasurement, CompareResult } from "../records/generated/compare-result.ts";
import type { AppliedRuling } from "../records/generated/edition.ts";

/** Keys of the first map that the second does not have, in its order. */
export function onlyIn(a: ReadonlyMap<string, unknown>, b: ReadonlyMap<string, unknown>): string[] {
  return [...a.keys()].filter((key) => !b.has(key));
}

/** The part of a comparison that is about measurements. */
export type MeasurementChanges = Pick<
  CompareResult,
  | "measurements_added"
  | "measurements_gone"
  | "measurements_set_aside"
  | "measurements_taken_back"
  | "measurements_corrected"
  | "measurements_reported_otherwise"
  | "measurements_moved"
>;

/** Measurements added, gone, set aside, taken back, corrected or reported otherwise, each with the ruling behind it. */
export function measurementChanges(
  old: EditionTables,
  now: EditionTables,
  nameOf: (system: string) => string,
): MeasurementChanges {
  const rulings = { old: rulingsBy(old), now: rulingsBy(now) };
  const told = (id: string, of: PublishedMeasurement, ruling?: AppliedRuling): ComparedMeasurement => ({
    measurement_id: id,
    system: of.system,
    name: nameOf(of.system),
    temperature_K: of.temperatureK,
    reported: of.reported,
    ...(ruling === undefined ? {} : { ruling: phrase(ruling) }),
  });
  const { added, gone, moved } = withoutMoved(old.measurements, now.measurements);
  const changes: MeasurementChanges = {
    measurements_added: added.map((id) => told(id, now.measurements.get(id) as PublishedMeasurement)),
    measurements_gone: gone.map((id) => told(id, old.measurements.get(id) as PublishedMeasurement)),
    measurements_set_aside: [],
    measurements_taken_back: [],
    measurements_corrected: [],
    measurements_reported_otherwise: [],
    measurements_moved: moved,
  };
  for (const [id, after] of now.measurements) {
    const before = old.measurements.get(id);
    const aside = (status: string | undefined) => status === "set aside";
    const ruling = rulings.now(id, "set aside");
    if (aside(after.status) && !aside(before?.status)) changes.measurements_set_aside.push(told(id, after, ruling));
    if (before === undefined) continue;
    if (aside(before.status) && !aside(after.status))
      changes.measurements_taken_back.push(told(id, after, rulings.now(id, "keep")));
    const [was, is] = [rulings.old(id, "correct"), rulings.now(id, "correct")];
    if (is !== undefined && !sameCorrection(was, is)) changes.measurements_corrected.push(told(id, after, is));
    if (
      before.reported !== after.reported ||
      before.system !== after.system ||
      before.temperatureK !== after.temperatureK
    ) {
      changes.measurements_reported_otherwise.push(told(id, after));
    }
  }
  return changes;
}

const sameCorrection = (a: AppliedRuling | undefined, b: AppliedRuling) =>
  a?.corrected_value === b.corrected_value && a?.corrected_unit === b.corrected_unit && a !== undefined;

/** The ruling of an action that decides a measurement. */
function rulingsBy({ document }: EditionTables): (id: string, action: string) => AppliedRuling | undefined {
  const last = new Map<string, AppliedRuling>();
  for (const ruling of document.rulings) {
    for (const id of ruling.measurement_ids) last.set(`${ruling.action} ${id}`, ruling);
  }
  return (id, action) => last.get(`${action} ${id}`);
}

function phrase({ action, by, date, reason, ruling_id, corrected_value, corrected_unit }: AppliedRuling): string {
  const to = [corrected_value, corrected_unit].filter((part) => part !== undefined).join(" ");
  const done = { keep: "kept", "set aside": "set aside", correct: `corrected to ${to}`, ask: "asked about" }[action];
  return `${done} by ${by} on ${date}: ${reason} (${ruling_id})`;
}

/** Ids added and gone, without the pairs that are one measurement on another line of its source. */
function withoutMoved(
  old: ReadonlyMap<string, PublishedMeasurement>,
  now: ReadonlyMap<string, PublishedMeasurement>,
): { readonly added: string[]; readonly gone: string[]; readonly moved: number } {
  const key = ({ source, system, temperatureK, reported }: PublishedMeasurement) =>
    JSON.stringify([source, system, temperatureK, reported]);
  const gone = new Map<string, string[]>();
  for (const id of onlyIn(old, now)) {
    const same = key(old.get(id) as PublishedMeasurement);
    gone.set(same, [...(gone.get(same) ?? []), id]);
  }
  let moved = 0;
  const added = onlyIn(now, old).filter((id) => {
    const found = gone.get(key(now.get(id) as PublishedMeasurement))?.shift();
    if (found !== undefined) moved++;
    return found === undefined;
  });
  const left = new Set([...gone.values()].flat());
  return { added, gone: onlyIn(old, now).filter((id) => left.has(id)), moved };
}
