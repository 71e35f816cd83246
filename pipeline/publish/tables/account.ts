import type { Edition, SourceAccount } from "../../records/edition.ts";
import { needsRuling, statusOf } from "../../records/edition.ts";
import type { SourceRow } from "../../records/generated/sources.ts";
import type { SubstanceRow } from "../../records/generated/substances-out.ts";
import type { SystemRow } from "../../records/generated/systems.ts";
import type { System } from "../../records/systems.ts";

const orNothing = <T extends string>(text: T | null | undefined): T | undefined =>
  text === null || text === "" ? undefined : text;
const numberOrNothing = (value: number | undefined): number | undefined =>
  value === undefined || Number.isNaN(value) ? undefined : value;

/** A row whose unknown cells are present as `undefined`: written as empty cells, and left out by JSON. */
export type Loose<Row> = {
  readonly [Column in keyof Row]: object extends Pick<Row, Column> ? Row[Column] | undefined : Row[Column];
};

/** One row of `sources.csv`. */
function sourceRow(source: SourceAccount, within: number | undefined): Loose<SourceRow> {
  const { card } = source;
  return {
    source: source.name,
    title: orNothing(card?.title),
    origin: card?.origin,
    reported_by: orNothing(card?.reported_by),
    laboratory: orNothing(card?.laboratory),
    date: orNothing(card?.date),
    method: card?.method,
    reference: orNothing(card?.reference),
    doi: orNothing(card?.doi),
    licence: orNothing(card?.licence),
    file: source.file,
    sha256: orNothing(source.sha256),
    readings: source.readings,
    accepted: source.accepted,
    refused: source.refused,
    missing_cells: source.missing,
    refused_whole: source.refusedWhole ? ("yes" as const) : ("no" as const),
    within_sd: source.accepted > 0 ? numberOrNothing(within) : undefined,
    columns_not_used: orNothing(source.columnsNotUsed.join(";")),
  };
}

/** Rows of `sources.csv`, by name. */
export function sourceRows({ sources, scales }: Edition): Loose<SourceRow>[] {
  return sources.map((source, i) => sourceRow(source, scales.within[i]));
}

/** Rows of `substances.csv`, by key. */
export function substanceRows({ substances }: Edition): Loose<SubstanceRow>[] {
  return substances.map((s) => ({
    key: s.key,
    name: orNothing(s.name),
    role: s.role,
    cas: orNothing(s.cas),
    inchikey: orNothing(s.inchikey),
    smiles: orNothing(s.smiles),
    formula: orNothing(s.formula),
    molar_mass: numberOrNothing(s.molarMass),
    melting_point_K: numberOrNothing(s.meltingPointK),
    hazards: orNothing(s.hazards),
    reference: orNothing(s.reference),
  }));
}

/** How many rows of a system have each status. */
function statusCounts(edition: Edition, system: System): Record<ReturnType<typeof statusOf>, number> {
  const counts = { kept: 0, "set aside": 0, interval: 0, "not fitted": 0 };
  for (const row of system.rows) counts[statusOf(edition, row)]++;
  return counts;
}

/** Distinct laboratories of a system's rows: the laboratory of the card, else the source itself. */
export function laboratoriesOf(edition: Edition, rows: Iterable<number>): Set<string> {
  const laboratories = new Set<string>();
  for (const row of rows) {
    const source = edition.sources[edition.table.source[row] as number];
    if (source) laboratories.add(source.card?.laboratory || source.name);
  }
  return laboratories;
}

/** Rows of `systems.csv`, by id. */
export function systemRows(edition: Edition): Loose<SystemRow>[] {
  const flags = edition.systems.map(() => ({ all: 0, blocking: 0 }));
  for (const [i, { system }] of edition.flags.entries()) {
    const count = system === undefined ? undefined : flags[system];
    if (count === undefined) continue;
    count.all++;
    if (needsRuling(edition, i)) count.blocking++;
  }
  return edition.systems.map((system) => {
    const { identity, rows } = system;
    const fit = edition.fits[system.index];
    const grade = edition.grades[system.index];
    const counts = statusCounts(edition, system);
    const temperatures = Array.from(rows, (row) => edition.table.temperatureK[row] as number);
    return {
      system: system.id,
      family: system.family,
      solute: identity.solute,
      solid_form: identity.solidForm,
      solvent: identity.solvent,
      composition: orNothing(identity.composition),
      medium: orNothing(identity.medium),
      n_measurements: rows.length,
      n_kept: counts.kept,
      n_set_aside: counts["set aside"],
      n_interval: counts.interval,
      n_not_fitted: counts["not fitted"],
      n_sources: new Set(Array.from(rows, (row) => edition.table.source[row])).size,
      n_laboratories: laboratoriesOf(edition, rows).size,
      T_min_K: temperatures.reduce((a, b) => Math.min(a, b)),
      T_max_K: temperatures.reduce((a, b) => Math.max(a, b)),
      agreement: fit?.robust.agreement as SystemRow["agreement"],
      curve_ids: orNothing(fit?.curves.map((curve) => curve.curveId).join(";")),
      no_curve_reason: orNothing(fit?.noCurve),
      n_flags: flags[system.index]?.all ?? 0,
      n_blocking_flags: flags[system.index]?.blocking ?? 0,
      grade: grade?.grade as SystemRow["grade"],
      reasons: grade?.reasons.join("; ") ?? "",
    };
  });
}
