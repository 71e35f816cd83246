import { parseTemperatureUnit, type TemperatureUnit } from "../bases/temperature.ts";
import type { CellFault } from "../records/cells.ts";
import { type DecimalMark, parseNumber } from "../records/number-text.ts";
import type { Reading } from "../records/readings.ts";
import type { Settings } from "../records/settings.ts";
import { optionalNumber, type SourceCells } from "./source-cells.ts";
import { defaultTemperatureUncertainty } from "./temperature-uncertainty.ts";

/** A temperature with what is known of its uncertainty from the text alone. */
export interface ReadTemperature {
  readonly kelvin: number;
  /** Standard uncertainty, K, where the words say it (`room temperature`); NaN otherwise. */
  readonly u: number;
}

const ROOM = /^(?:room temperature|room temp\.?|r\.?\s?t\.?|ambient(?: temperature)?)$/i;

/**
 * Reads a temperature cell as K. `room temperature` is the interval of the settings: its middle, with the standard
 * uncertainty of a uniform distribution.
 */
export function readTemperature(
  text: string,
  scale: TemperatureUnit | CellFault,
  decimal: DecimalMark,
  { room_temperature_K: room }: Settings,
): ReadTemperature | CellFault {
  if (text === "") return { field: "temperature", code: "missing-temperature", found: "the cell is empty" };
  if (ROOM.test(text)) return { kelvin: (room.low + room.high) / 2, u: (room.high - room.low) / Math.sqrt(12) };
  const number = parseNumber(text, decimal);
  if (!number.ok) return { field: "temperature", code: number.code, found: number.found };
  if ("code" in scale) return scale;
  const kelvin = scale.toKelvin(number.value);
  if (kelvin > 0) return { kelvin, u: Number.NaN };
  const found = `${text} ${scale.canonical} is ${kelvin.toFixed(2)} K`;
  return { field: "temperature", code: "below-absolute-zero", found };
}

/** The temperature of a row with its standard uncertainty, K. */
export interface RowTemperature {
  readonly kelvin: number;
  readonly u: number;
  /** What was assumed about it, in words. */
  readonly assumption?: string;
}

/** Reads temperature and its uncertainty from a row; where none is stated the default of probe and method holds. */
export function readRowTemperature(
  cells: SourceCells,
  reading: Reading,
  clearPoint: boolean,
  settings: Settings,
): RowTemperature | CellFault {
  const scale = cells.temperatureScale(cells.unitOf.temperature(reading));
  const read = readTemperature(cells.text.temperature(reading), scale, cells.decimal, settings);
  if ("code" in read) return read;
  if (!Number.isNaN(read.u)) return { ...read, assumption: "room temperature taken as the middle of its range" };
  const stated = optionalNumber(cells, "temperature_uncertainty", reading, 0, "bad-uncertainty");
  if (typeof stated !== "number") return stated;
  if (!Number.isNaN(stated)) {
    const degree = parseTemperatureUnit(cells.unitOf.temperature_uncertainty(reading)) ?? scale;
    return { kelvin: read.kelvin, u: stated * ("code" in degree ? 1 : degree.kelvinPerDegree) };
  }
  const rate = optionalNumber(cells, "heating_rate_K_per_min", reading, 0);
  if (typeof rate !== "number") return rate;
  const probe = cells.text.temperature_probe(reading);
  return { kelvin: read.kelvin, u: defaultTemperatureUncertainty(read.kelvin, probe, clearPoint, rate, settings) };
}
