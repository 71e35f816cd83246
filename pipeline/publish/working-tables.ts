import type { Edition } from "../records/edition.ts";
import { CURVES_COLUMNS } from "../records/generated/curves.ts";
import { FLAGS_COLUMNS } from "../records/generated/flags.ts";
import { GRID_COLUMNS } from "../records/generated/grid.ts";
import { MEASUREMENTS_COLUMNS } from "../records/generated/measurements.ts";
import { MIXTURES_COLUMNS } from "../records/generated/mixtures.ts";
import { PLANNING_COOLING_COLUMNS } from "../records/generated/planning-cooling.ts";
import { REFUSED_COLUMNS } from "../records/generated/refused.ts";
import { SOURCES_COLUMNS } from "../records/generated/sources.ts";
import { SUBSTANCES_OUT_COLUMNS } from "../records/generated/substances-out.ts";
import { SYSTEMS_COLUMNS } from "../records/generated/systems.ts";
import { type Cell, csvRecord, csvTable } from "./csv.ts";
import type { OutputFolder } from "./output-folder.ts";
import { reportPages } from "./report/report.ts";
import { sourceRows, substanceRows, systemRows } from "./tables/account.ts";
import { curveRows, curvesJson } from "./tables/curves.ts";
import { flagRows, refusedRows } from "./tables/flags.ts";
import { gridRows } from "./tables/grid.ts";
import { measurementRecords } from "./tables/measurements.ts";
import { mixtureRows } from "./tables/mixtures.ts";
import { coolingRows } from "./tables/planning-cooling.ts";
import { summaryOf } from "./tables/summary.ts";

/** Row objects as cells, in the order of the table's columns. */
function* inOrder<Row extends object>(
  columns: readonly (keyof Row & string)[],
  rows: Iterable<Row>,
): Generator<Cell[]> {
  for (const row of rows) yield columns.map((column) => row[column] as Cell);
}

/** A JSON document as text with a final line feed. */
function json(value: object): string[] {
  return [`${JSON.stringify(value, null, 2)}\n`];
}

/** Writes every table of an edition, its report unless it is not wanted, and last summary.json with their checksums. */
export function writeWorkingTables(edition: Edition, folder: OutputFolder, withReport: boolean): void {
  const { write } = folder;
  write("measurements.csv", chain([csvRecord(MEASUREMENTS_COLUMNS)], measurementRecords(edition)));
  write("refused.csv", csvTable(REFUSED_COLUMNS, refusedRows(edition)));
  write("flags.csv", csvTable(FLAGS_COLUMNS, flagRows(edition)));
  write("sources.csv", csvTable(SOURCES_COLUMNS, inOrder(SOURCES_COLUMNS, sourceRows(edition))));
  write("substances.csv", csvTable(SUBSTANCES_OUT_COLUMNS, inOrder(SUBSTANCES_OUT_COLUMNS, substanceRows(edition))));
  write("systems.csv", csvTable(SYSTEMS_COLUMNS, inOrder(SYSTEMS_COLUMNS, systemRows(edition))));
  write("curves.csv", csvTable(CURVES_COLUMNS, inOrder(CURVES_COLUMNS, curveRows(edition))));
  write("curves.json", curvesJson(edition));
  write(
    "mixtures.csv",
    csvTable(
      MIXTURES_COLUMNS,
      inOrder(MIXTURES_COLUMNS, mixtureRows(edition, edition.mixtures.models, edition.mixtures.without)),
    ),
  );
  write("grid.csv", csvTable(GRID_COLUMNS, gridRows(edition)));
  write(
    "planning-cooling.csv",
    csvTable(PLANNING_COOLING_COLUMNS, inOrder(PLANNING_COOLING_COLUMNS, coolingRows(edition))),
  );
  if (withReport) for (const [name, text] of reportPages(edition)) write(`report/${name}`, [text]);
  write("summary.json", json(summaryOf(edition, folder.files())));
}

function* chain(...parts: readonly Iterable<string>[]): Generator<string> {
  for (const part of parts) yield* part;
}
