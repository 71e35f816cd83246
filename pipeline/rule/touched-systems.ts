import type { Rulings } from "../records/rulings.ts";
import type { System } from "../records/systems.ts";

/** Positions of the systems with a row that is set aside or corrected, ascending: those to be fitted again. */
export function touchedSystems(systems: readonly System[], { setAside, corrected }: Rulings): number[] {
  if (setAside.size === 0 && corrected.size === 0) return [];
  return systems.flatMap(({ index, rows }) =>
    rows.some((row) => setAside.has(row) || corrected.has(row)) ? [index] : [],
  );
}
