import { halfLastDigit } from "../numerics/decimal-rounding.ts";
import { parseUnit } from "./units.ts";

/** How a unit carries a rounding error into the mass ratio. */
type Carries = "relative" | "log10" | "ln" | "mass fraction" | "mole fraction";

const carriedBy = new Map<string, Carries>();

function carries(unit: string): Carries {
  let known = carriedBy.get(unit);
  if (known === undefined) {
    const parsed = parseUnit(unit);
    const { scale, basis } = parsed.kind === "unit" ? parsed.unit : { scale: undefined, basis: "" };
    known =
      scale?.kind === "log10" || scale?.kind === "ln"
        ? scale.kind
        : basis === "mass fraction" || basis === "mole fraction"
          ? basis
          : "relative";
    carriedBy.set(unit, known);
  }
  return known;
}

/** True where values in this unit are logarithms. */
export function isLogarithmic(unit: string): boolean {
  return carries(unit) === "log10" || carries(unit) === "ln";
}

/**
 * Half a unit of the last digit written, carried into ln of the mass ratio r (g solute per g solvent) to first order:
 * d ln r = d ln w (1 + r) for a mass fraction w, d ln x/(1 - x) for a mole fraction x, ln 10 d(log10) and d(ln) for
 * logarithms, else the relative rounding (exact for ratios to the solvent; concentrations are close where dilute).
 *
 * @param value number as written in `unit`
 * @param massRatio r [1]
 * @param moleFraction x [1]; NaN where unknown
 * @example writtenPrecision(80.84, "g/100 g solution", 4.22, NaN) // 0.00032
 */
export function writtenPrecision(value: number, unit: string, massRatio: number, moleFraction: number): number {
  const half = halfLastDigit(value);
  const how = carries(unit);
  if (how === "log10") return Math.LN10 * half;
  if (how === "ln") return half;
  const relative = half / Math.abs(value);
  if (how === "mass fraction") return relative * (1 + massRatio);
  return how === "mole fraction" && moleFraction > 0 ? relative / (1 - moleFraction) : relative;
}
