import { type ConversionRequest, type Converted, convertWithSteps } from "../../pipeline/bases/convert.ts";
import { type HubConverter, hubConverter } from "../../pipeline/bases/hub-converter.ts";
import type { SoluteBasis } from "../../pipeline/bases/hydrate.ts";
import type { Needs, Quantity } from "../../pipeline/bases/needs.ts";
import type { Unit } from "../../pipeline/bases/unit.ts";
import { parseUnit } from "../../pipeline/bases/units.ts";

/** A quantity with its standard uncertainty, exact unless told. */
export function quantity(value: number, standardUncertainty = 0): Quantity {
  return { value, standardUncertainty };
}

/** The unit a spelling names; fails the test where it names none. */
export function unitOf(text: string): Unit {
  const parsed = parseUnit(text);
  if (parsed.kind !== "unit") throw new Error(`"${text}" was read as ${JSON.stringify(parsed)}`);
  return parsed.unit;
}

/** The converter of a unit; fails the test where something is missing. */
export function converterOf(text: string, needs: Needs, soluteBasis?: SoluteBasis): HubConverter {
  const result = hubConverter(unitOf(text), needs, soluteBasis);
  if (result.kind !== "converter") throw new Error(`${text} misses ${result.missing.join(", ")}`);
  return result.converter;
}

/** One conversion that has to succeed. */
export function convert(
  value: number,
  from: string,
  to: string,
  needs: Needs,
  more: Partial<ConversionRequest> = {},
): Converted {
  const result = convertWithSteps({ value, from: unitOf(from), to: unitOf(to), needs, ...more });
  if (result.kind !== "converted") throw new Error(`${value} ${from} to ${to} gave ${JSON.stringify(result)}`);
  return result;
}

/** Relative difference of two numbers. */
export function relativeDifference(found: number, expected: number): number {
  return Math.abs(found / expected - 1);
}
