import { quantityFromValue, type Unit, valueFromQuantity } from "../bases/unit.ts";
import type { CellFault } from "../records/cells.ts";

/** Why a number cannot be a solubility in this unit, if it cannot: not above 0, or a fraction of 1 and more. */
export function impossibleValue(value: number, unit: Unit, text: string): CellFault | undefined {
  const logarithmic = unit.scale.kind === "ln" || unit.scale.kind === "log10";
  if (!logarithmic && !(value > 0)) {
    return { field: "solubility", code: "value-not-positive", found: `${text} ${unit.canonical}` };
  }
  const quantity = quantityFromValue(unit.scale, value);
  if (!(quantity > 0) || !Number.isFinite(quantity)) {
    return { field: "solubility", code: "number-out-of-range", found: `${text} ${unit.canonical}` };
  }
  const fraction = unit.basis === "mass fraction" || unit.basis === "mole fraction";
  if (!fraction || quantity < 1) return undefined;
  const found = `${text} ${unit.canonical} is a ${unit.basis} of ${Number(quantity.toPrecision(4))}`;
  const whole = valueFromQuantity(unit.scale, 1);
  return {
    field: "solubility",
    code: "fraction-at-or-above-one",
    found,
    expected: `a value ${unit.scale.sign < 0 ? "above" : "below"} ${whole === 0 ? 0 : whole} ${unit.canonical}`,
  };
}
