import { createReadStream, existsSync } from "node:fs";
import { join } from "node:path";
import { problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import type {
  EditionTables,
  PublishedGrid,
  PublishedMeasurement,
  PublishedPoint,
  PublishedSystem,
} from "../records/edition-tables.ts";
import type { EditionDocument } from "../records/generated/edition.ts";
import { cutIntoRecords } from "./csv-records.ts";

/**
 * Reads from the tables of an edition what editions are compared by.
 * @param document its edition.json; the files are taken to be those it lists
 * @throws InputError where a table is missing or lacks a column
 */
export async function readEditionTables(folder: string, document: EditionDocument): Promise<EditionTables> {
  const systems = new Map<string, PublishedSystem>();
  await readColumns(folder, "systems.csv", SYSTEM, (cells) => {
    const [id, solute, form, solvent, composition, medium, grade, reasons, curves] = cells as Row<typeof SYSTEM>;
    const name =
      `${solute}${form === "unspecified" ? "" : ` (${form})`} in ${solvent}` +
      `${composition === "" ? "" : ` ${composition}`}${medium === "" ? "" : `, ${medium}`}`;
    systems.set(id, { name, grade, reasons, hasCurve: curves !== "" });
  });
  const measurements = new Map<string, PublishedMeasurement>();
  await readColumns(folder, "measurements.csv", MEASUREMENT, (cells) => {
    const [id, source, system, T, value, unit, status] = cells as Row<typeof MEASUREMENT>;
    measurements.set(id, { source, system, temperatureK: Number(T), reported: `${value} ${unit}`.trim(), status });
  });
  const curves = new Map<string, PublishedGrid & { points: PublishedPoint[] }>();
  await readColumns(folder, "grid.csv", GRID, (cells) => {
    const [id, system, T, x, xLow, xHigh, r, rLow, rHigh] = cells as Row<typeof GRID>;
    const known = curves.get(id) ?? { system, quantity: x === "" ? "g/100 g solvent" : "mole fraction", points: [] };
    const [value, low, high] = x === "" ? [r, rLow, rHigh] : [x, xLow, xHigh];
    known.points.push({ temperatureK: Number(T), value: Number(value), low: limit(low), high: limit(high) });
    curves.set(id, known);
  });
  return { document, systems, measurements, curves };
}

const SYSTEM = [
  ...(["system", "solute", "solid_form", "solvent", "composition", "medium", "grade", "reasons", "curve_ids"] as const),
] as const;
const MEASUREMENT = [
  ...(["measurement_id", "source", "system", "temperature_K", "reported_value", "reported_unit", "status"] as const),
] as const;
const GRID = [
  ...(["curve_id", "system", "temperature_K"] as const),
  ...(["mole_fraction", "mole_fraction_curve_low", "mole_fraction_curve_high"] as const),
  ...(["g_per_100g_solvent", "g_per_100g_solvent_curve_low", "g_per_100g_solvent_curve_high"] as const),
] as const;
type Row<Columns extends readonly string[]> = { readonly [I in keyof Columns]: string };

const limit = (cell: string) => (cell === "" ? Number.NaN : Number(cell));

/** Hands over the cells of some columns of a table, record by record. */
async function readColumns(
  folder: string,
  name: string,
  columns: readonly string[],
  onRow: (cells: readonly string[]) => void,
): Promise<void> {
  const file = join(folder, name);
  const stop = (found: string) => new InputError(problem("damaged-edition", { file }, { found }));
  if (!existsSync(file)) throw stop(`${name} is missing`);
  let at: readonly number[] | undefined;
  const pieces = createReadStream(file) as AsyncIterable<Buffer>;
  await cutIntoRecords(pieces, { delimiter: ",", firstLine: 1, place: { file } }, (cells) => {
    if (at !== undefined) return onRow(at.map((i) => cells[i] ?? ""));
    at = columns.map((column) => cells.indexOf(column));
    const missing = columns.find((_, i) => at?.[i] === -1);
    if (missing !== undefined) throw stop(`${name} has no column ${missing}`);
  });
}
