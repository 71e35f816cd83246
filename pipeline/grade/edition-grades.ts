import type { Edition, Grade } from "../records/edition.ts";
import type { SystemFit } from "../records/fits.ts";
import { type MeasurementTable, RowState, textOf } from "../records/measurements.ts";
import { RepeatKind } from "../records/repeats.ts";
import { isDecision, rulingPhrase } from "../records/rulings.ts";
import type { System } from "../records/systems.ts";
import { AGREEMENT_SDS, type GradeEvidence, proposeGrade } from "./grade.ts";

type Graded = Pick<Edition, "table" | "systems" | "fits" | "flags" | "sources" | "rulings">;

/** A grade for every system, by position. */
export function gradeEdition(edition: Graded): Grade[] {
  const open = openFlags(edition);
  return edition.systems.map((system) => {
    const fit = edition.fits[system.index] as SystemFit;
    const confirmed = edition.rulings.recommended.get(system.index);
    return proposeGrade({
      ...pointEvidence(fit, edition.table),
      ...rowCounts(edition, system),
      ...sourceEvidence(edition, fit),
      openFlags: open(system),
      confirmedBy: confirmed && rulingPhrase(confirmed).replace(/^kept/, "confirmed"),
    });
  });
}

/** Counts the open blocking flags of a system: its own, and those on its sources as a whole. `ask` leaves a flag open. */
function openFlags({ flags, rulings, table }: Graded): (system: System) => number {
  const bySystem = new Map<number, number>();
  const bySource = new Map<number, number>();
  flags.forEach(({ severity, system, source }, i) => {
    const ruling = rulings.ofFlag.get(i);
    if (severity !== "blocking" || (ruling !== undefined && isDecision(ruling))) return;
    if (system !== undefined) bySystem.set(system, (bySystem.get(system) ?? 0) + 1);
    else if (source !== undefined) bySource.set(source, (bySource.get(source) ?? 0) + 1);
  });
  return (system) => {
    const own = bySystem.get(system.index) ?? 0;
    if (bySource.size === 0) return own;
    const sources = new Set(Array.from(system.rows, (row) => table.source[row] as number));
    return [...sources].reduce((sum, source) => sum + (bySource.get(source) ?? 0), own);
  };
}

type PointEvidence = Pick<
  GradeEvidence,
  "points" | "kept" | "withinUncertainty" | "judged" | "agreement" | "temperatureK" | "solidChecked"
>;

function pointEvidence({ robust }: SystemFit, table: MeasurementTable): PointEvidence {
  const { points, kept, deviation, deviationSd, agreement, repeats } = robust;
  let [keptCount, within, judged, solidChecked] = [0, 0, 0, 0];
  for (let i = 0; i < points.n; i++) {
    // One measurement written twice agrees with itself: it is judged once.
    if (repeats !== undefined && repeats.kind[i] !== RepeatKind.counts) continue;
    const z = Math.abs((deviation[i] as number) / (deviationSd[i] as number));
    if (Number.isFinite(z)) judged++;
    if (z <= AGREEMENT_SDS) within++;
    if (kept[i] === 0) continue;
    keptCount++;
    solidChecked += table.solidChecked[points.row[i] as number] as number;
  }
  return {
    points: points.n,
    kept: keptCount,
    withinUncertainty: within,
    judged,
    agreement,
    temperatureK: points.temperatureK,
    solidChecked,
  };
}

/** Rows of a system that no fit uses, by why. */
function rowCounts(
  { table, rulings }: Graded,
  { rows }: System,
): Pick<GradeEvidence, "ranges" | "notFitted" | "setAside"> {
  let [ranges, notFitted, setAside] = [0, 0, 0];
  for (const row of rows) {
    if (rulings.setAside.has(row)) setAside++;
    else if (table.state[row] === RowState.interval) ranges++;
    else if (table.state[row] === RowState.notFitted) notFitted++;
  }
  return { ranges, notFitted, setAside };
}

/** Laboratories and methods behind the kept points; a source that mostly repeats another or averages others is none. */
function sourceEvidence({ sources, table }: Graded, { robust }: SystemFit) {
  const copying = new Set(robust.repeats?.blocks.map(({ source }) => source));
  const kept = Array.from(robust.points.row).filter(
    (row, i) => robust.kept[i] === 1 && !copying.has(table.source[row] as number),
  );
  const cards = [...new Set(kept.map((row) => table.source[row] as number))].map((source) => sources[source]);
  return {
    laboratories: new Set(cards.map((source) => source?.card?.laboratory || source?.name)).size,
    methods: new Set(kept.map((row) => textOf(table, table.method[row] as number))).size,
  };
}
