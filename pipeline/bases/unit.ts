/**
 * What a solubility value is per. The quantity of each basis in SI-like units:
 * mass ratio and mass fraction [kg/kg], mass per volume [kg/m3], mole fraction and mole ratio [mol/mol],
 * amount per mass of solvent (molality) [mol/kg], amount per volume [mol/m3].
 */
export type Basis =
  | "mass ratio"
  | "mass fraction"
  | "mass per volume of solvent"
  | "mass per volume of solution"
  | "mole fraction"
  | "mole ratio"
  | "amount per mass of solvent"
  | "amount per volume of solvent"
  | "amount per volume of solution";

/**
 * How a number written in a unit maps to the quantity q of its basis, always strictly monotonic:
 *
 * - linear      q = value * numerator / denominator
 * - reciprocal  q = numerator / (denominator * value)
 * - ln, log10   q = exp(sign * value) or 10^(sign * value), times numerator / denominator
 *
 * A power of ten is kept as two factors (one of them 1), so that 35.8 per 100 becomes 0.358 correctly rounded.
 */
export interface Scale {
  readonly kind: "linear" | "reciprocal" | "ln" | "log10";
  readonly numerator: number;
  readonly denominator: number;
  readonly sign: 1 | -1;
}

/** One unit of solubility, understood. */
export interface Unit {
  /** The spelling messages and tables use. */
  readonly canonical: string;
  readonly basis: Basis;
  readonly scale: Scale;
  /** Mass per volume without saying of what: per solution below 20 g/L, open from there up (see `isOpenAt`). */
  readonly bareVolume: boolean;
  /** The spellings a bare unit could stand for; empty otherwise. */
  readonly readings: readonly string[];
  /** The unit names water where another would say solvent: wrong for any other solvent, so the caller must look. */
  readonly namedSolvent?: "water";
  /** What was assumed in understanding the spelling, in words. */
  readonly assumption?: string;
}

/** A unit understood; a spelling that leaves its basis open, with the spellings it could stand for; or neither. */
export type ParsedUnit =
  | { readonly kind: "unit"; readonly unit: Unit }
  | { readonly kind: "open"; readonly readings: readonly string[] }
  | { readonly kind: "unknown" };

/** A bare mass per volume is taken per volume of solution below this [kg/m3, the same number in g/L and mg/mL]. */
export const bareVolumeLimit = 20;

/** The scale of a unit that is 10^exponent of its basis quantity. */
export function decimalScale(exponent: number, kind: Scale["kind"] = "linear", sign: 1 | -1 = 1): Scale {
  const power = Number(`1e${Math.abs(exponent)}`);
  return { kind, numerator: exponent >= 0 ? power : 1, denominator: exponent >= 0 ? 1 : power, sign };
}

/** Basis quantity [SI, see `Basis`] of a value written in the unit. NaN in, NaN out; no check for sign or size. */
export function quantityFromValue(scale: Scale, value: number): number {
  switch (scale.kind) {
    case "linear":
      return (value * scale.numerator) / scale.denominator;
    case "reciprocal":
      return scale.numerator / (scale.denominator * value);
    case "ln":
      return (Math.exp(scale.sign * value) * scale.numerator) / scale.denominator;
    case "log10":
      return (10 ** (scale.sign * value) * scale.numerator) / scale.denominator;
  }
}

/** Value in the unit of a basis quantity [SI]: the inverse of `quantityFromValue`. */
export function valueFromQuantity(scale: Scale, quantity: number): number {
  switch (scale.kind) {
    case "linear":
      return (quantity * scale.denominator) / scale.numerator;
    case "reciprocal":
      return scale.numerator / (scale.denominator * quantity);
    case "ln":
      return scale.sign * Math.log((quantity * scale.denominator) / scale.numerator);
    case "log10":
      return scale.sign * Math.log10((quantity * scale.denominator) / scale.numerator);
  }
}

/**
 * Relative standard uncertainty of the basis quantity from the standard uncertainty of the written value (its unit):
 * u/|value| for linear and reciprocal units, u for ln, u ln 10 for log10.
 */
export function relativeFromStandard(scale: Scale, value: number, standardUncertainty: number): number {
  if (scale.kind === "ln") return standardUncertainty;
  if (scale.kind === "log10") return standardUncertainty * Math.LN10;
  return standardUncertainty === 0 ? 0 : standardUncertainty / Math.abs(value);
}

/** Standard uncertainty in the unit from the relative one of the basis quantity: the inverse of `relativeFromStandard`. */
export function standardFromRelative(scale: Scale, value: number, relativeUncertainty: number): number {
  if (scale.kind === "ln") return relativeUncertainty;
  if (scale.kind === "log10") return relativeUncertainty / Math.LN10;
  return relativeUncertainty * Math.abs(value);
}

/**
 * Whether the value leaves its basis open: a mass per volume that does not say of what, at or above 20 g/L, where
 * solution and solvent differ by more than the scatter of most measurements.
 */
export function isOpenAt(unit: Unit, value: number): boolean {
  return unit.bareVolume && !(quantityFromValue(unit.scale, value) < bareVolumeLimit);
}
