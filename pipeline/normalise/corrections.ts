import { kinds } from "../problems/catalogue.ts";
import { unitGetter } from "../records/cells.ts";
import type { IdentifiedSource } from "../records/identified.ts";
import { codeOf, createMeasurementTable, type MeasurementTable, textOf } from "../records/measurements.ts";
import type { FieldPlace, Reading } from "../records/readings.ts";
import { type Correct, type CorrectedRow, type Rulings, rulingPhrase } from "../records/rulings.ts";
import { type NormaliseContext, normaliseSource } from "./source.ts";

/**
 * Reads single rows again with another value or unit, by the same path as any other reading: checks, conversion,
 * uncertainty and assumptions are those the row would have had if it had been reported so.
 *
 * @param sources identified sources, with their positions in the edition's list
 */
export function createCorrector(
  table: MeasurementTable,
  sources: readonly IdentifiedSource[],
  positions: readonly number[],
  context: NormaliseContext,
): Correct {
  const bySource = new Map(sources.map((source, i) => [positions[i], source]));
  return (row, value, unit) => {
    const of = bySource.get(table.source[row] as number);
    const line = table.line[row];
    const column = textOf(table, table.column[row] as number);
    const at = of?.readings.findIndex(
      (reading) => reading.line === line && of.source.headings[reading.valueIndex] === column,
    );
    const reading = of?.readings[at ?? -1];
    const who = of?.who[at ?? -1];
    if (of === undefined || reading === undefined || who === undefined) {
      return { impossible: "the reading behind the measurement is not known" };
    }
    const changed = correctedReading(of, reading, value, unit);
    const small = createMeasurementTable(1);
    const [refused] = normaliseSource({ ...of, readings: [changed], who: [who] }, 0, small, context);
    if (refused !== undefined) {
      return { impossible: `${refused.found} (${kinds[refused.code].meaning.replace(/\.$/, "")})` };
    }
    const number = changed.cells[reading.valueIndex] ?? "";
    return firstRow(small, `${number} ${textOf(small, small.reportedUnit[0] as number)}`.trim());
  };
}

/** The reading with another number in its cell, and another unit beside it. */
function correctedReading(
  { source }: IdentifiedSource,
  reading: Reading,
  value: number | undefined,
  unit: string | undefined,
): Reading {
  const cells = [...reading.cells];
  if (value !== undefined) cells[reading.valueIndex] = String(value).replace(".", source.decimal);
  const solubility: FieldPlace = {
    kind: "column",
    heading: source.headings[reading.valueIndex] ?? "",
    index: reading.valueIndex,
    unit: unit ?? unitGetter(source.places, "solubility")(reading),
  };
  return { ...reading, cells, own: { ...reading.own, solubility } };
}

function firstRow(table: MeasurementTable, corrected: string): CorrectedRow {
  return {
    state: table.state[0] as number,
    valueLow: table.valueLow[0] as number,
    valueHigh: table.valueHigh[0] as number,
    massRatioLow: table.massRatioLow[0] as number,
    massRatioHigh: table.massRatioHigh[0] as number,
    massRatio: table.massRatio[0] as number,
    moleFraction: table.moleFraction[0] as number,
    massConcentration: table.massConcentration[0] as number,
    molPerL: table.molPerL[0] as number,
    relativeU: table.relativeU[0] as number,
    sharedU: table.sharedU[0] as number,
    assumptions: textOf(table, table.assumptions[0] as number),
    corrected,
  };
}

/** Columns that a correction changes. What was reported stays in its own columns. */
const CHANGED = [
  ...(["valueLow", "valueHigh", "massRatioLow", "massRatioHigh", "massRatio", "moleFraction"] as const),
  ...(["massConcentration", "molPerL", "relativeU", "sharedU"] as const),
];

/**
 * The table as the rulings leave it: corrected rows with their new values, and on every row set aside or corrected the
 * decision among its assumptions. The table given is not changed; without such rulings it is returned as it is.
 */
export function withRulings(table: MeasurementTable, { setAside, corrected }: Rulings): MeasurementTable {
  if (setAside.size === 0 && corrected.size === 0) return table;
  const copy = { ...table, state: table.state.slice(), assumptions: table.assumptions.slice() };
  if (corrected.size > 0) for (const name of CHANGED) Object.assign(copy, { [name]: table[name].slice() });
  const note = (row: number, assumptions: string, text: string) => {
    copy.assumptions[row] = codeOf(table.texts, assumptions === "" ? text : `${assumptions}; ${text}`);
  };
  for (const [row, ruling] of setAside)
    note(row, textOf(table, table.assumptions[row] as number), rulingPhrase(ruling));
  for (const [row, { ruling, row: reading }] of corrected) {
    copy.state[row] = reading.state;
    for (const name of CHANGED) copy[name][row] = reading[name];
    note(row, reading.assumptions, `read as ${reading.corrected}: ${rulingPhrase(ruling)}`);
  }
  return copy;
}
