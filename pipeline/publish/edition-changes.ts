import type { EditionTables, PublishedGrid, PublishedPoint } from "../records/edition-tables.ts";
import type { ComparedSystem, CompareResult, CurveMove, GradeChange } from "../records/generated/compare-result.ts";
import { measurementChanges, onlyIn } from "./measurement-changes.ts";

/** What changed from one edition to a later one. Ids that both have are compared; nothing else is matched by likeness. */
export function compareEditions(old: EditionTables, now: EditionTables): CompareResult {
  const nameOf = (id: string) => now.systems.get(id)?.name ?? old.systems.get(id)?.name ?? id;
  const named = (id: string): ComparedSystem => ({ system: id, name: nameOf(id) });
  const both = [...old.systems.keys()].filter((id) => now.systems.has(id));
  const had = (id: string) => old.systems.get(id)?.hasCurve === true;
  const has = (id: string) => now.systems.get(id)?.hasCurve === true;
  const curves = curveMoves(old.curves, now.curves, nameOf);
  const changes = {
    systems_added: onlyIn(now.systems, old.systems).map(named),
    systems_gone: onlyIn(old.systems, now.systems).map(named),
    grades_changed: both.flatMap((id) => gradeChange(id, old, now)),
    curves_added: both.filter((id) => !had(id) && has(id)).map(named),
    curves_gone: both.filter((id) => had(id) && !has(id)).map(named),
    curves_moved: curves.moved,
    ...measurementChanges(old, now, nameOf),
    settings_changed: settingChanges("", old.document.settings, now.document.settings),
  };
  const files = differentFiles(old, now);
  const listed = Object.values(changes).some((change) => (typeof change === "number" ? change > 0 : change.length > 0));
  return {
    format: 1,
    old: editionOf(old),
    new: editionOf(now),
    different: listed || files.length > 0,
    ...changes,
    curves_not_compared: curves.notCompared,
    files_different: files,
  };
}

const editionOf = ({ document: { edition, date, program_version } }: EditionTables) => ({
  edition,
  date,
  program_version,
});

function gradeChange(id: string, old: EditionTables, now: EditionTables): GradeChange[] {
  const [before, after] = [old.systems.get(id), now.systems.get(id)];
  if (before === undefined || after === undefined || before.grade === after.grade) return [];
  return [
    {
      system: id,
      name: after.name,
      old_grade: before.grade as GradeChange["old_grade"],
      new_grade: after.grade as GradeChange["new_grade"],
      reasons: after.reasons,
    },
  ];
}

/** Temperatures of two grids this close are the same, K. */
const SAME_K = 1e-6;

/**
 * Curves that moved by more than their limits: at a temperature both grids have, the change of ln value is larger than
 * the half-width of either curve's 95 % limits, so that each lies outside the limits of the other.
 */
function curveMoves(
  old: ReadonlyMap<string, PublishedGrid>,
  now: ReadonlyMap<string, PublishedGrid>,
  nameOf: (system: string) => string,
): { readonly moved: CurveMove[]; readonly notCompared: string[] } {
  const moved: CurveMove[] = [];
  const notCompared: string[] = [];
  for (const [id, before] of old) {
    const after = now.get(id);
    if (after === undefined) continue;
    const pairs = before.quantity === after.quantity ? commonPoints(before.points, after.points) : [];
    if (pairs.length === 0) notCompared.push(id);
    const beyond = pairs.filter(({ change, limit }) => Math.abs(change) > limit);
    const [first] = beyond;
    if (first === undefined) continue;
    const furthest = beyond.reduce((a, b) => (Math.abs(b.change) - b.limit > Math.abs(a.change) - a.limit ? b : a));
    moved.push({
      curve_id: id,
      system: after.system,
      name: nameOf(after.system),
      compared_from_K: (pairs[0] as Pair).temperatureK,
      compared_to_K: (pairs.at(-1) as Pair).temperatureK,
      beyond_from_K: first.temperatureK,
      beyond_to_K: (beyond.at(-1) as Pair).temperatureK,
      largest_at_K: furthest.temperatureK,
      change_percent: 100 * Math.expm1(furthest.change),
      limit_percent: 100 * Math.expm1(furthest.limit),
      old_value: furthest.old,
      new_value: furthest.now,
      quantity: after.quantity,
    });
  }
  return { moved, notCompared };
}

/** Two curves at one temperature: change and larger half-width in ln value. */
interface Pair {
  readonly temperatureK: number;
  readonly change: number;
  readonly limit: number;
  readonly old: number;
  readonly now: number;
}

function commonPoints(old: readonly PublishedPoint[], now: readonly PublishedPoint[]): Pair[] {
  return old.flatMap((before): Pair[] => {
    const after = now.find(({ temperatureK }) => Math.abs(temperatureK - before.temperatureK) < SAME_K);
    if (after === undefined) return [];
    const limit = Math.max(halfWidth(before), halfWidth(after));
    const change = Math.log(after.value / before.value);
    return [{ temperatureK: after.temperatureK, change, limit, old: before.value, now: after.value }];
  });
}

/** Half-width of the limits in ln value. They are symmetric there; an upper limit may be open where x would pass 1. */
function halfWidth({ value, low, high }: PublishedPoint): number {
  const down = Math.log(value / low);
  const up = Math.log(high / value);
  if (Number.isNaN(down)) return Number.isNaN(up) ? 0 : up;
  return Number.isNaN(up) ? down : Math.max(down, up);
}

/** Settings with another value, by their path. */
function settingChanges(path: string, old: unknown, now: unknown): string[] {
  if (typeof old !== "object" || typeof now !== "object" || old === null || now === null || Array.isArray(old)) {
    const [before, after] = [JSON.stringify(old), JSON.stringify(now)];
    return before === after ? [] : [`${path}: ${before ?? "none"}, now ${after ?? "none"}`];
  }
  const of = (value: object, name: string) => (value as Readonly<Record<string, unknown>>)[name];
  const names = [...new Set([...Object.keys(old), ...Object.keys(now)])];
  return names.flatMap((name) => settingChanges(path === "" ? name : `${path}.${name}`, of(old, name), of(now, name)));
}

function differentFiles(old: EditionTables, now: EditionTables): string[] {
  const sums = ({ document }: EditionTables) => new Map(document.outputs.map(({ path, sha256 }) => [path, sha256]));
  const [before, after] = [sums(old), sums(now)];
  const paths = [...new Set([...before.keys(), ...after.keys()])].sort();
  return paths.filter((path) => path !== "CHANGES.md" && before.get(path) !== after.get(path));
}
