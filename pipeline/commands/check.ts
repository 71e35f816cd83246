import { existsSync } from "node:fs";
import { basename } from "node:path";
import { isLogarithmic } from "../bases/written-precision.ts";
import { type Curated, curate } from "../curate.ts";
import { systemId, systemKey } from "../group/systems.ts";
import { identityNotices, nearNameQuestion } from "../identify/notices.ts";
import { identifySource } from "../identify/source.ts";
import { structureReader } from "../identify/substance-tables.ts";
import { type Normalised, normaliseEdition } from "../normalise/edition.ts";
import { createRereader } from "../normalise/reread.ts";
import { formatProblem, type Problem, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { noticeOf } from "../publish/tables/summary.ts";
import { readCardNamed, readCollection } from "../read/collection.ts";
import { readSingleSource } from "../read/source.ts";
import type { CheckedRow, CheckResult } from "../records/generated/check-result.ts";
import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { SourceTable } from "../records/readings.ts";
import { type Identity, solventInWords } from "../records/systems.ts";
import { type JudgedRow, judgeRows, type KnownSystem, VERDICTS } from "../screen/verdicts.ts";
import { repeatsOf, type Suspicion, suspicionsOf } from "./check-findings.ts";
import { ifMerged, mergeNew } from "./check-merged.ts";
import { standingOf } from "./check-standing.ts";
import { mergedLines } from "./merged-text.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";
import { needsLook, verdictLines } from "./verdict-text.ts";

export interface CheckOptions extends CommonOptions {
  readonly collection: string;
  readonly card?: string;
  readonly like?: string;
  readonly version: string;
}

/** Reads the new table with the card asked for, or the one beside it. */
async function readNew(file: string, { collection, card, like }: CheckOptions): Promise<SourceTable> {
  const stem = basename(file).replace(/\.(csv|tsv|txt)(\.gz)?$/i, "");
  const beside = file.replace(/\.(csv|tsv|txt)(\.gz)?$/i, ".source.json");
  if (like === undefined && card === undefined && !existsSync(beside)) {
    const mend = "name a card with --card, or a source of the collection that is laid out alike with --like";
    throw new InputError(problem("missing-file", { file: beside }, { found: "the table has no source card", mend }));
  }
  const read = await readSingleSource(
    file,
    like === undefined ? (card ?? beside) : readCardNamed(collection, like),
    stem,
  );
  if (!read.ok) throw new InputError(read.refused.problem);
  return read.source;
}

/** Everything about the new rows: their table, and what was refused. */
interface NewRows extends Normalised {
  readonly source: SourceTable;
  readonly refusedRows: readonly Problem[];
  /** What is worth telling of the file and refuses nothing: of its form, and of the names and identifiers in its rows. */
  readonly notices: readonly Problem[];
}

async function normaliseNew(source: SourceTable, { index, register, edition }: Curated): Promise<NewRows> {
  const identified = identifySource(source, index, await structureReader([source]), register);
  const about = identityNotices(register, index, [source]).filter(({ place }) => place.source === source.name);
  const normalised = normaliseEdition([identified], [0], register.identities, edition.settings);
  const refusedRows = [...source.refused, ...identified.refused, ...normalised.refused];
  refusedRows.sort((a, b) => (a.place.line ?? 0) - (b.place.line ?? 0));
  return { ...normalised, source, refusedRows, notices: [...source.notices, ...about] };
}

/** What the collection knows, by identity. */
function knownSystems({ edition }: Curated): Map<string, KnownSystem> {
  return new Map(
    edition.systems.map((system) => {
      const fit = edition.fits[system.index];
      return [system.key, { system, curves: fit?.curves ?? [], noCurve: fit?.noCurve ?? "" }] as const;
    }),
  );
}

/**
 * `saltern check FILE --collection C`: a verdict on every new row, which rests on the collection alone; then, with the file
 * as one more source, the reasons, how the file stands to the others, and what would change. Nothing of the collection
 * does.
 */
export async function check(file: string, options: CheckOptions, terminal: Terminal): Promise<ExitCode> {
  const source = await readNew(file, options);
  const collection = await readCollection(options.collection);
  const curated = await curate(collection, options.version, terminal.progress);
  const rows = await normaliseNew(source, curated);
  const { table } = rows;
  const { identities } = curated.register;
  const known = knownSystems(curated);
  const systemOf = (row: number) => known.get(systemKey(identities[table.identity[row] as number] as Identity));
  const judged = judgeRows(table, systemOf, curated.edition.settings);
  const { inReportedUnit } = createRereader(table, identities, curated.edition.systems, rows);
  const merged = await mergeNew(source, collection, options.version);
  const suspicions = suspicionsOf(merged);
  const checked = judged.map((row) => {
    const judgedRow = checkedRow(row, table, identities, source, inReportedUnit);
    const question = row.verdict === "new system" ? nearNameQuestion(judgedRow.solute, curated.index) : "";
    const said = question === "" ? judgedRow : { ...judgedRow, look_at: `the name: ${question}` };
    return withSuspicion(said, suspicions.get(said.line));
  });
  const result = {
    ...resultOf(file, curated, rows, checked),
    ...standingOf(judged, table, curated.edition),
    repeats: repeatsOf(merged),
    if_merged: ifMerged(curated, merged),
  };
  if (options.json) terminal.print(JSON.stringify(result));
  else for (const line of [...verdictLines(result), ...mergedLines(result)]) terminal.print(line);
  for (const notice of rows.notices) terminal.tell(`notice: ${formatProblem(notice)}`);
  for (const refused of rows.refusedRows) terminal.tell(formatProblem(refused));
  return rows.refusedRows.length > 0 || checked.some(needsLook) ? Exit.needsYou : Exit.done;
}

/**
 * Adds what screening suspects. That the sources of a system disagree explains a row that is off, and is no remark on one
 * that fits.
 */
function withSuspicion(row: CheckedRow, suspicion: Suspicion | undefined): CheckedRow {
  if (suspicion === undefined) return row;
  if (row.verdict !== "off the curve") return suspicion.cause_scope === "system" ? row : { ...row, ...suspicion };
  // What is expected is told from the collection alone; screening has the file among its evidence.
  const seen = (suspicion.evidence ?? "").split("; ").filter((part) => !part.startsWith("expected "));
  return { ...row, ...suspicion, evidence: seen.join("; ") };
}

/** 100 (value / expected - 1) in the reported unit; of the quantity itself where the unit is a logarithm. */
function percentOff(reported: number | string, expected: number | undefined, unit: string, deviation: number): number {
  const direct = typeof reported === "number" && expected !== undefined && !isLogarithmic(unit);
  return direct ? 100 * (reported / expected - 1) : 100 * Math.expm1(deviation);
}

/** One judged row in the words of the result. */
function checkedRow(
  judged: JudgedRow,
  table: MeasurementTable,
  identities: readonly Identity[],
  source: SourceTable,
  inReportedUnit: (row: number, lnValue: number) => number | undefined,
): CheckedRow {
  const { row, verdict, expectedLn, halfWidth, deviation, z, evidence, lookAt } = judged;
  const identity = identities[table.identity[row] as number] as Identity;
  const column = textOf(table, table.column[row] as number);
  const reported = textOf(table, table.reportedText[row] as number) || (table.reportedValue[row] as number);
  const inUnit = (shift: number) => (expectedLn === undefined ? undefined : inReportedUnit(row, expectedLn + shift));
  const limits = [inUnit(-(halfWidth ?? 0)), inUnit(halfWidth ?? 0)].filter((value) => value !== undefined);
  const expected = inUnit(0);
  const unit = textOf(table, table.reportedUnit[row] as number);
  return {
    measurement_id: `${source.name}:${table.line[row]}`,
    line: table.line[row] as number,
    column,
    system: systemId(identity),
    solute: identity.solute,
    solid_form: identity.solidForm,
    solvent: solventInWords(identity),
    temperature_K: table.temperatureK[row] as number,
    reported_value: reported,
    reported_unit: unit,
    ...(expected === undefined ? {} : { expected_value: expected }),
    ...(limits.length < 2 ? {} : { expected_low: Math.min(...limits), expected_high: Math.max(...limits) }),
    ...(deviation === undefined ? {} : { deviation_percent: percentOff(reported, expected, unit, deviation) }),
    ...(z === undefined ? {} : { z }),
    verdict,
    evidence,
    look_at: lookAt,
  };
}

type Told = Omit<CheckResult, "offsets" | "pooled_offset" | "repeats" | "if_merged">;

function resultOf(file: string, { edition }: Curated, rows: NewRows, checked: readonly CheckedRow[]): Told {
  const counts = Object.fromEntries(VERDICTS.map((v) => [v, checked.filter(({ verdict }) => verdict === v).length]));
  return {
    format: 1,
    file,
    collection: edition.collection.name,
    readings: rows.source.readingsFound,
    accepted: checked.length,
    refused: rows.refusedRows.length,
    verdicts: counts as unknown as CheckResult["verdicts"],
    rows: [...checked],
    problems: rows.refusedRows.map(noticeOf),
    notices: rows.notices.map(noticeOf),
  };
}
