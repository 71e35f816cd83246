import { createIdentityRegister, identifySource } from "../../pipeline/identify/source.ts";
import { indexSubstances } from "../../pipeline/identify/substance-tables.ts";
import { normaliseEdition } from "../../pipeline/normalise/edition.ts";
import { readProgramTables } from "../../pipeline/read/own-tables.ts";
import type { CollectionSettings } from "../../pipeline/records/generated/collection.ts";
import type { SourceCard } from "../../pipeline/records/generated/source-card.ts";
import { RowState, textOf } from "../../pipeline/records/measurements.ts";
import { settingsInForce } from "../../pipeline/records/settings.ts";
import { CARD, readAccepted } from "../read/temporary-collection.ts";

/** An accepted row as the table of measurements holds it. */
export interface NormalisedRow {
  readonly line: number;
  readonly state: "point" | "interval" | "not fitted";
  readonly temperatureK: number;
  readonly temperatureU: number;
  readonly reportedValue: number;
  readonly low: number;
  readonly high: number;
  /** g solute per 100 g total solvent, and its limits for an interval. */
  readonly per100g: number;
  readonly per100gLow: number;
  readonly per100gHigh: number;
  readonly moleFraction: number;
  readonly mgPerML: number;
  readonly molPerL: number;
  readonly relativeU: number;
  readonly assumptions: string;
}

const indexed = readProgramTables().then(
  (program) => indexSubstances(program, { substances: [], solidForms: [], propertyValues: [] }).index,
);

/** A table with a card, read, identified and normalised with the program's own substances: rows accepted and refused. */
export async function normalise(csv: string, card: Partial<SourceCard> = {}, own: CollectionSettings = {}) {
  const source = await readAccepted(csv, card);
  const register = createIdentityRegister();
  const identified = identifySource(source, await indexed, () => undefined, register);
  const { table, refused } = normaliseEdition([identified], [0], register.identities, settingsInForce(own));
  const states = { [RowState.point]: "point", [RowState.interval]: "interval", [RowState.notFitted]: "not fitted" };
  const at = (column: Float64Array, row: number): number => column[row] as number;
  const rows = Array.from(
    { length: table.count },
    (_, row): NormalisedRow => ({
      line: table.line[row] as number,
      state: states[table.state[row] as 0 | 1 | 2] as NormalisedRow["state"],
      temperatureK: at(table.temperatureK, row),
      temperatureU: at(table.temperatureU, row),
      reportedValue: at(table.reportedValue, row),
      low: at(table.valueLow, row),
      high: at(table.valueHigh, row),
      per100g: 100 * at(table.massRatio, row),
      per100gLow: 100 * at(table.massRatioLow, row),
      per100gHigh: 100 * at(table.massRatioHigh, row),
      moleFraction: at(table.moleFraction, row),
      mgPerML: at(table.massConcentration, row),
      molPerL: at(table.molPerL, row),
      relativeU: at(table.relativeU, row),
      assumptions: textOf(table, table.assumptions[row] as number),
    }),
  );
  return { rows, refused: [...identified.refused, ...refused] };
}

/** One row whose cells go by the names of the fields; paracetamol in water at 25 °C, 1 g/100 g solvent unless told. */
export async function normaliseOne(
  cells: Readonly<Record<string, string>>,
  units: Readonly<Record<string, string>> = {},
  more: { readonly card?: Partial<SourceCard>; readonly settings?: CollectionSettings; readonly kind?: object } = {},
) {
  const all: Record<string, string> = { solute: "paracetamol", solvent: "water", temperature: "25", solubility: "1" };
  Object.assign(all, cells);
  const unitOf: Record<string, string> = { temperature: "°C", solubility: "g/100 g solvent", ...units };
  const quoted = (text: string) => `"${text.replaceAll('"', '""')}"`;
  const csv = `${Object.keys(all).map(quoted).join(",")}\n${Object.values(all).map(quoted).join(",")}\n`;
  const columns = Object.fromEntries(
    Object.keys(all).map((field) => [
      field,
      {
        column: field,
        ...(unitOf[field] === undefined ? {} : { unit: unitOf[field] }),
        ...(field === "uncertainty" ? more.kind : {}),
      },
    ]),
  );
  const card = { ...CARD, table: { decimal: "." as const }, ...more.card, columns } as SourceCard;
  const { rows, refused } = await normalise(csv, card, more.settings);
  return { row: rows[0], refused: refused[0] };
}

/** The accepted row of {@link normaliseOne}. @throws where it is refused */
export async function accepted(...parameters: Parameters<typeof normaliseOne>): Promise<NormalisedRow> {
  const { row, refused } = await normaliseOne(...parameters);
  if (row === undefined) throw new Error(`refused: ${refused?.code}: ${refused?.found}`);
  return row;
}

/** The problem of the refused row of {@link normaliseOne}. @throws where it is accepted */
export async function refusal(...parameters: Parameters<typeof normaliseOne>) {
  const { row, refused } = await normaliseOne(...parameters);
  if (refused === undefined) throw new Error(`accepted: ${JSON.stringify(row)}`);
  return refused;
}
