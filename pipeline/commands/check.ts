import { existsSync } from "node:fs";
import { basename } from "node:path";
import { type Curated, curate } from "../curate.ts";
import { systemId, systemKey } from "../group/systems.ts";
import { nearNameQuestion } from "../identify/notices.ts";
import { identifySource } from "../identify/source.ts";
import { massFromSmiles } from "../identify/substance-tables.ts";
import { type Normalised, normaliseEdition } from "../normalise/edition.ts";
import { createRereader } from "../normalise/reread.ts";
import { formatProblem, type Problem, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { noticeOf } from "../publish/tables/summary.ts";
import { type Collection, readCardNamed, readCollection } from "../read/collection.ts";
import { readSingleSource } from "../read/source.ts";
import type { Flag } from "../records/fits.ts";
import type { CheckedRow, CheckResult } from "../records/generated/check-result.ts";
import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { SourceTable } from "../records/readings.ts";
import type { Identity } from "../records/systems.ts";
import { type JudgedRow, judgeRows, type KnownSystem, VERDICTS } from "../screen/verdicts.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";
import { verdictLines } from "./verdict-text.ts";

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
}

async function normaliseNew(source: SourceTable, { index, register, edition }: Curated): Promise<NewRows> {
  const identified = identifySource(source, index, await massFromSmiles([source]), register);
  const normalised = normaliseEdition([identified], [0], register.identities, edition.settings);
  const refusedRows = [...source.refused, ...identified.refused, ...normalised.refused];
  refusedRows.sort((a, b) => (a.place.line ?? 0) - (b.place.line ?? 0));
  return { ...normalised, source, refusedRows };
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

/** `saltern check FILE --collection C`: a verdict on every new row; nothing of the collection changes. */
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
  // Reasons are looked for only where something is off: it takes a second look at the whole collection.
  const anyOff = judged.some(({ verdict }) => verdict === "off the curve");
  const suspicions = anyOff ? await suspicionsOf(source, collection, options.version) : new Map<number, Suspicion>();
  const checked = judged.map((row) => {
    const judgedRow = checkedRow(row, table, identities, source, inReportedUnit);
    const question = row.verdict === "new system" ? nearNameQuestion(judgedRow.solute, curated.index) : "";
    const said = question === "" ? judgedRow : { ...judgedRow, look_at: `the name: ${question}` };
    const suspicion = said.verdict === "off the curve" ? suspicions.get(said.line) : undefined;
    return suspicion === undefined ? said : { ...said, ...suspicion };
  });
  const result = resultOf(file, curated, rows, checked);
  if (options.json) terminal.print(JSON.stringify(result));
  else for (const line of verdictLines(result)) terminal.print(line);
  for (const refused of rows.refusedRows) terminal.tell(formatProblem(refused));
  const needsYou = rows.refusedRows.length > 0 || checked.some(({ verdict }) => verdict === "off the curve");
  return needsYou ? Exit.needsYou : Exit.done;
}

/** What screening suspects of a row, in the words of the result. */
type Suspicion = Partial<
  Pick<CheckedRow, "suspected_cause" | "cause_probability" | "proposed_value" | "evidence" | "look_at">
>;

/**
 * What screening says of the new rows once they are among the collection's, by line: the cause, and the value that would
 * fit. The verdicts rest on the collection alone; this looks for reasons, with the whole file as evidence.
 */
async function suspicionsOf(
  source: SourceTable,
  collection: Collection,
  version: string,
): Promise<Map<number, Suspicion>> {
  const taken = new Set([...collection.sources, ...collection.refusedSources].map(({ name }) => name));
  const name = taken.has(source.name) ? `${source.name} (new)` : source.name;
  const sources = [...collection.sources, { ...source, name }].sort((a, b) => (a.name < b.name ? -1 : 1));
  const { edition } = await curate({ ...collection, sources }, version);
  const position = edition.sources.findIndex((account) => account.name === name);
  const suspicions = new Map<number, Suspicion>();
  const { table } = edition;
  // Points before blocks: what is said of a row itself is the more precise.
  for (const flag of [...edition.flags].sort((a, b) => (a.scope < b.scope ? -1 : 1))) {
    if (flag.severity !== "blocking" || flag.system === undefined) continue;
    const rows = flag.scope === "measurement" ? [flag.row as number] : (edition.systems[flag.system]?.rows ?? []);
    if (flag.scope === "block" && flag.source !== position) continue;
    for (const row of rows)
      if (table.source[row] === position) suspicions.set(table.line[row] as number, suspicionOf(flag));
  }
  return suspicions;
}

function suspicionOf(flag: Flag): Suspicion {
  const cause = flag.suspectedCause as CheckedRow["suspected_cause"];
  const detail = flag.causeDetail === undefined ? "" : ` (${flag.causeDetail})`;
  return {
    ...(cause === undefined ? {} : { suspected_cause: cause }),
    ...(flag.causeProbability === undefined ? {} : { cause_probability: flag.causeProbability }),
    ...(flag.proposedValue === undefined ? {} : { proposed_value: flag.proposedValue }),
    evidence: `${flag.evidence}${detail}`,
    look_at: flag.lookAt,
  };
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
  return {
    measurement_id: `${source.name}:${table.line[row]}`,
    line: table.line[row] as number,
    column,
    system: systemId(identity),
    solute: identity.solute,
    solid_form: identity.solidForm,
    solvent: identity.solvent,
    temperature_K: table.temperatureK[row] as number,
    reported_value: reported,
    reported_unit: textOf(table, table.reportedUnit[row] as number),
    ...(expected === undefined ? {} : { expected_value: expected }),
    ...(limits.length < 2 ? {} : { expected_low: Math.min(...limits), expected_high: Math.max(...limits) }),
    ...(deviation === undefined ? {} : { deviation_percent: 100 * Math.expm1(deviation) }),
    ...(z === undefined ? {} : { z }),
    verdict,
    evidence,
    look_at: lookAt,
  };
}

function resultOf(file: string, { edition }: Curated, rows: NewRows, checked: readonly CheckedRow[]): CheckResult {
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
    notices: rows.source.notices.map(noticeOf),
  };
}
