import { parseTemperatureUnit, type TemperatureUnit } from "../bases/temperature.ts";
import { type CellFault, type CellGetter, cellGetter, unitGetter } from "../records/cells.ts";
import { type DecimalMark, parseNumber } from "../records/number-text.ts";
import type { Reading, SourceTable } from "../records/readings.ts";
import type { UncertaintyKind } from "./value-uncertainty.ts";

const FIELDS = [
  ...["temperature", "solute_basis", "uncertainty", "coverage_factor", "n"],
  ...["temperature_uncertainty", "temperature_probe", "solution_density", "volume_temperature"],
  ...["heating_rate_K_per_min", "excess_solid", "method", "replicate", "reference", "doi"],
  ...["solid_form", "solid_check", "solid_after"],
] as const;
type Field = (typeof FIELDS)[number];

/** Getters for the fields that normalising needs, made once per source. */
export interface SourceCells {
  readonly decimal: DecimalMark;
  readonly text: Readonly<Record<Field, CellGetter>>;
  readonly unitOf: Readonly<
    Record<
      | "solubility"
      | "temperature"
      | "uncertainty"
      | "solution_density"
      | "volume_temperature"
      | "temperature_uncertainty",
      CellGetter
    >
  >;
  /** The scale a unit text names, each text looked up once. */
  readonly temperatureScale: (unit: string) => TemperatureUnit | CellFault;
  /** How the source reports its uncertainties. */
  readonly uncertaintyKind: UncertaintyKind;
  readonly uncertaintyRelative: boolean;
}

/** The scale a unit text names, or the fault that says it is open or unknown. */
function temperatureScale(unit: string): TemperatureUnit | CellFault {
  const scale = parseTemperatureUnit(unit);
  if (scale !== undefined) return scale;
  const found = unit === "" ? "no unit of temperature is stated" : `"${unit}" is not a unit of temperature`;
  return { field: "temperature", code: "unknown-temperature-unit", found };
}

/** Prepares the getters of a source. */
export function sourceCells({ places, card, decimal }: SourceTable): SourceCells {
  const stated = card.columns.uncertainty ?? card.constants?.uncertainty;
  const scales = new Map<string, TemperatureUnit | CellFault>();
  return {
    decimal,
    temperatureScale: (unit) => {
      const known = scales.get(unit) ?? temperatureScale(unit);
      scales.set(unit, known);
      return known;
    },
    text: Object.fromEntries(FIELDS.map((field) => [field, cellGetter(places, field)])) as SourceCells["text"],
    unitOf: Object.fromEntries(
      [
        "solubility",
        "temperature",
        "uncertainty",
        "solution_density",
        "volume_temperature",
        "temperature_uncertainty",
      ].map((field) => [field, unitGetter(places, field)]),
    ) as SourceCells["unitOf"],
    uncertaintyKind: stated?.kind ?? "standard",
    uncertaintyRelative: stated?.relative ?? false,
  };
}

/** An optional number above or at `least`: NaN where the cell is empty, a fault where it cannot be used. */
export function optionalNumber(
  cells: SourceCells,
  field: Field,
  reading: Reading,
  least: number,
  code: CellFault["code"] = "not-a-number",
): number | CellFault {
  const text = cells.text[field](reading);
  if (text === "") return Number.NaN;
  const number = parseNumber(text, cells.decimal);
  if (!number.ok) return { field, code: number.code, found: number.found };
  return number.value >= least ? number.value : { field, code, found: `"${text}" is below ${least}` };
}
