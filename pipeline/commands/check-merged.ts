import { type Curated, curate } from "../curate.ts";
import { massRatioFromLn } from "../publish/mass-ratio.ts";
import { coolingRows } from "../publish/tables/planning-cooling.ts";
import type { Collection } from "../read/collection.ts";
import type { Edition } from "../records/edition.ts";
import { needsRuling } from "../records/edition.ts";
import type { Curve, SystemFit } from "../records/fits.ts";
import type { CurveChange, MergedSystem } from "../records/generated/check-result.ts";
import type { SourceTable } from "../records/readings.ts";
import { type System, solventInWords } from "../records/systems.ts";

/** The collection with the file as one more source, and where that stands in its list. */
export interface Merged {
  readonly edition: Edition;
  readonly source: number;
}

/** Curates the collection with the new source among the others, under a name of its own. */
export async function mergeNew(source: SourceTable, collection: Collection, version: string): Promise<Merged> {
  const taken = new Set([...collection.sources, ...collection.refusedSources].map(({ name }) => name));
  const name = taken.has(source.name) ? `${source.name} (new)` : source.name;
  const sources = [...collection.sources, { ...source, name }].sort((a, b) => (a.name < b.name ? -1 : 1));
  const { edition } = await curate({ ...collection, sources }, version);
  return { edition, source: edition.sources.findIndex((account) => account.name === name) };
}

/** Usual temperature at which solubilities are compared, K. */
const USUAL_K = 298.15;
/** Steps in which the largest change is sought. */
const STEPS = 24;

/** What the systems of the file would become, in the order of the merged edition's list. */
export function ifMerged({ edition: before }: Curated, { edition: after, source }: Merged): MergedSystem[] {
  const touched = after.systems.filter(({ rows }) => rows.some((row) => after.table.source[row] === source));
  const known = new Map(before.systems.map((system) => [system.key, system]));
  const [oldPlans, newPlans] = [
    recoveries(
      before,
      touched.flatMap(({ key }) => known.get(key) ?? []),
    ),
    recoveries(after, touched),
  ];
  return touched.map((system) => {
    const old = known.get(system.key);
    const [fitBefore, fitAfter] = [old && before.fits[old.index], after.fits[system.index]];
    const { solute, solidForm } = system.identity;
    const [recoveryBefore, recoveryAfter] = [oldPlans.get(system.id), newPlans.get(system.id)];
    return {
      system: system.id,
      solute,
      solid_form: solidForm,
      solvent: solventInWords(system.identity),
      curve_before: old === undefined ? "new system" : curveWords(fitBefore),
      curve_after: curveWords(fitAfter),
      points_before: pointsOf(fitBefore),
      points_after: pointsOf(fitAfter),
      changes: changesOf(system, fitBefore?.curves ?? [], fitAfter?.curves ?? []),
      grade_before: old === undefined ? "" : (before.grades[old.index]?.grade ?? ""),
      grade_after: after.grades[system.index]?.grade ?? "",
      ...(recoveryBefore === undefined ? {} : { recovery_before_percent: recoveryBefore }),
      ...(recoveryAfter === undefined ? {} : { recovery_after_percent: recoveryAfter }),
      new_flags: Math.max(0, openFlags(after, system) - (old === undefined ? 0 : openFlags(before, old))),
    };
  });
}

function curveWords(fit: SystemFit | undefined): string {
  if (fit === undefined || fit.curves.length === 0) return fit?.noCurve ?? "no curve";
  return fit.curves.map(({ model }) => model).join(" and ");
}

function pointsOf(fit: SystemFit | undefined): number {
  return (fit?.curves ?? []).reduce((sum, { n }) => sum + n, 0);
}

function openFlags(edition: Edition, { index }: System): number {
  return edition.flags.filter(({ system }, i) => system === index && needsRuling(edition, i)).length;
}

/** Highest recovery of a cooling crystallisation by system, percent; the best of a system's curves. */
function recoveries(edition: Edition, systems: readonly System[]): Map<string, number> {
  const best = new Map<string, number>();
  for (const { system, max_recovery_equilibrium_percent: recovery } of coolingRows({ ...edition, systems })) {
    if (typeof recovery === "number") best.set(system, Math.max(recovery, best.get(system) ?? 0));
  }
  return best;
}

/** The curve that holds a temperature. */
const curveAt = (curves: readonly Curve[], T: number) =>
  curves.find(({ temperatureRangeK: [low, high] }) => T >= low && T <= high);

/** Both curves at the ends and the usual temperature of what they share, and where they differ most. */
function changesOf(system: System, before: readonly Curve[], after: readonly Curve[]): CurveChange[] {
  if (before.length === 0 || after.length === 0) return [];
  const low = Math.max(before[0]!.temperatureRangeK[0], after[0]!.temperatureRangeK[0]);
  const high = Math.min(before.at(-1)!.temperatureRangeK[1], after.at(-1)!.temperatureRangeK[1]);
  if (!(high >= low)) return [];
  const usual = USUAL_K > low && USUAL_K < high ? USUAL_K : (low + high) / 2;
  const grid = Array.from({ length: STEPS + 1 }, (_, i) => low + ((high - low) * i) / STEPS);
  const at = (T: number) => changeAt(system, T, curveAt(before, T), curveAt(after, T));
  const size = (change: CurveChange) => Math.abs(Math.log1p(change.change_percent / 100));
  const most = grid.flatMap(at).reduce((a, b) => (size(b) > size(a) * (1 + 1e-9) ? b : a));
  const chosen = [...new Set([low, usual, high, most.temperature_K])].sort((a, b) => a - b);
  return chosen.flatMap(at);
}

function changeAt(system: System, T: number, before: Curve | undefined, after: Curve | undefined): CurveChange[] {
  if (before === undefined || after === undefined) return [];
  const percent = (curve: Curve) => 100 * massRatioFromLn(curve.evaluate(T), system);
  const half = (curve: Curve) => 100 * Math.expm1(curve.limits(T).curve);
  const [was, is] = [percent(before), percent(after)];
  return [
    {
      temperature_K: T,
      before_g_per_100g_solvent: was,
      after_g_per_100g_solvent: is,
      change_percent: 100 * (is / was - 1),
      half_width_before_percent: half(before),
      half_width_after_percent: half(after),
    },
  ];
}
