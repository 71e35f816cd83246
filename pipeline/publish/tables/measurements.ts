import type { Edition } from "../../records/edition.ts";
import { flagId, measurementId, statusOf } from "../../records/edition.ts";
import { type MeasurementTable, RowState } from "../../records/measurements.ts";
import { type Cell, csvCell } from "../csv.ts";

/** Row → ids of the flags that concern it: its own and those of its block, in the order of `flags.csv`. */
export function flagsByRow(edition: Edition): Map<number, string> {
  const byRow = new Map<number, string>();
  const add = (row: number, id: string) => {
    const before = byRow.get(row);
    byRow.set(row, before === undefined ? id : `${before};${id}`);
  };
  for (const flag of edition.flags) {
    const id = flagId(edition, flag);
    if (flag.scope === "measurement" && flag.row !== undefined) add(flag.row, id);
    if (flag.scope !== "block" || flag.system === undefined) continue;
    for (const row of edition.systems[flag.system]?.rows ?? []) {
      if (edition.table.source[row] === flag.source) add(row, id);
    }
  }
  return byRow;
}

/** Reported number, or the reported text where it was an interval (that of an interval corrected to a number included). */
function reportedValue(table: MeasurementTable, row: number): Cell {
  return table.state[row] === RowState.interval || Number.isNaN(table.reportedValue[row])
    ? table.texts.texts[table.reportedText[row] as number]
    : table.reportedValue[row];
}

/**
 * Records of `measurements.csv`, one per accepted measurement, sorted by source, line and column.
 * Texts that recur are quoted once per dictionary code; this is the largest table of an edition.
 */
export function* measurementRecords(edition: Edition): Generator<string> {
  const { table, systems } = edition;
  const quoted = table.texts.texts.map(csvCell);
  const sources = edition.sources.map(({ name }) => csvCell(name));
  const places = systems.map(({ identity: i, family, id }) =>
    [i.solute, i.solidForm, i.solvent, i.composition, i.medium, family, id].map(csvCell).join(","),
  );
  const systemOf = new Int32Array(table.count);
  for (const system of systems) for (const row of system.rows) systemOf[row] = system.index;
  const flags = flagsByRow(edition);
  const { predicted, deviationPercent, z, weight, branch } = edition.rowResults;
  const n = (column: Float64Array, row: number): string => csvCell(column[row]);
  const t = (column: Int32Array, row: number): string => quoted[column[row] as number] ?? "";
  for (let row = 0; row < table.count; row++) {
    const system = systemOf[row] as number;
    const inMoleFraction = systems[system]?.fitBasis === "ln x";
    const ratio = table.massRatio[row] as number;
    yield `${csvCell(measurementId(edition, row))},${sources[table.source[row] as number]},${table.line[row]},${t(table.column, row)},${places[system]},${
      branch[row] === 0 ? "" : branch[row]
    },${n(table.temperatureK, row)},${csvCell(reportedValue(table, row))},${t(table.reportedUnit, row)},${n(table.valueLow, row)},${n(
      table.valueHigh,
      row,
    )},${n(table.moleFraction, row)},${csvCell(100 * ratio)},${n(table.massConcentration, row)},${n(table.molPerL, row)},${n(
      table.relativeU,
      row,
    )},${t(table.assumptions, row)},${inMoleFraction ? n(predicted, row) : ""},${n(deviationPercent, row)},${n(z, row)},${n(
      weight,
      row,
    )},${statusOf(edition, row)},${csvCell(flags.get(row))},${t(table.method, row)},${t(table.reference, row)},${t(table.doi, row)},${t(
      table.carried,
      row,
    )}\n`;
  }
}
