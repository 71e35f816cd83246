import type { Grade, SourceAccount } from "../records/edition.ts";
import type { Flag, SystemFit } from "../records/fits.ts";
import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { System } from "../records/systems.ts";
import { proposeGrade } from "./grade.ts";

/** A grade for every system, by position. */
export function gradeEdition(
  table: MeasurementTable,
  systems: readonly System[],
  fits: readonly SystemFit[],
  flags: readonly Flag[],
  sources: readonly SourceAccount[],
): Grade[] {
  const flagsOf = systems.map(() => [] as Flag[]);
  for (const flag of flags) if (flag.system !== undefined) flagsOf[flag.system]?.push(flag);
  return systems.map((system) => {
    const fit = fits[system.index] as SystemFit;
    const kept = Array.from(fit.robust.points.row).filter((_, i) => fit.robust.kept[i] === 1);
    const cards = [...new Set(kept.map((row) => table.source[row] as number))].map((source) => sources[source]);
    return proposeGrade({
      fit,
      flags: flagsOf[system.index] ?? [],
      laboratories: new Set(cards.map((source) => source?.card?.laboratory || source?.name)).size,
      methods: new Set(kept.map((row) => textOf(table, table.method[row] as number))).size,
      solidChecked: false,
    });
  });
}
