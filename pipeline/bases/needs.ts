import type { SolutionDensity } from "./solution-density.ts";

/** A property value with its standard uncertainty (same unit) and where it comes from. */
export interface Quantity {
  readonly value: number;
  readonly standardUncertainty: number;
  readonly reference?: string | undefined;
}

/**
 * What conversions may need to know. The conversions read these numbers at every call and never keep them, so a caller
 * with many rows may hold one such object and change its numbers between calls.
 */
export interface Needs {
  /** Molar mass of the unsolvated solute [g/mol]. */
  readonly soluteMolarMass?: Quantity | undefined;
  /** Molar mass of the hydrate or solvate a value is reported for [g/mol]. */
  readonly crystalMolarMass?: Quantity | undefined;
  /** Molar mass of the solvent [g/mol]; of a mixture, its mass per mole of molecules. */
  readonly solventMolarMass?: Quantity | undefined;
  /** Density of the solvent at 20 °C [kg/m3], where solvent is dispensed cold. */
  readonly solventDensityAt20C?: Quantity | undefined;
  /** Density of the solvent at the stated temperature of its volume [kg/m3]; goes before the one at 20 °C. */
  readonly solventDensityAtVolumeTemperature?: Quantity | undefined;
  /** Density of the solution at the temperature of its volume. */
  readonly solutionDensity?: SolutionDensity | undefined;
}

/** The name of a need, as it is listed where it is missing. */
export type NeedName =
  | "molar mass of the solute"
  | "molar mass of the crystal"
  | "molar mass of the solvent"
  | "density of the solvent"
  | "density of the solution";

/**
 * One property a conversion rests on, with how strongly the result depends on it.
 * Equal names are one and the same quantity: their effects are summed with sign before they are squared.
 */
export interface Input {
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
  /** The property at the mass ratio r of the solution; undefined where this conversion does not use it. */
  readonly quantity: (needs: Needs, r: number) => Quantity | undefined;
  /** Its relative standard uncertainty [1]; 0 where it is not used. */
  readonly relativeUncertainty: (needs: Needs) => number;
  /** d ln r / d ln property at a fixed reported quantity [1], at the mass ratio r [kg/kg]. */
  readonly elasticity: (r: number, needs: Needs) => number;
}

/** Relative standard uncertainty [1] of a quantity, 0 where there is none. */
export function relativeUncertaintyOf(quantity: Quantity | undefined): number {
  return quantity === undefined ? 0 : quantity.standardUncertainty / Math.abs(quantity.value);
}

/** Value of a quantity, NaN where it is missing: a conversion that lacks something has no result. */
export function numberIn(quantity: Quantity | undefined): number {
  return quantity === undefined ? Number.NaN : quantity.value;
}

/** Density of the solvent that applies to its volume: at the stated temperature, else at 20 °C [kg/m3]. */
export function solventDensityForVolume(needs: Needs): Quantity | undefined {
  return needs.solventDensityAtVolumeTemperature ?? needs.solventDensityAt20C;
}

function property(name: NeedName, symbol: string, unit: string, pick: (needs: Needs) => Quantity | undefined) {
  return (elasticity: Input["elasticity"]): Input => ({
    name,
    symbol,
    unit,
    quantity: pick,
    relativeUncertainty: (needs) => relativeUncertaintyOf(pick(needs)),
    elasticity,
  });
}

/** The molar mass of the unsolvated solute M2 as an input, given d ln r / d ln M2. */
export const soluteMolarMassInput = property("molar mass of the solute", "M2", "g/mol", (n) => n.soluteMolarMass);

/** The molar mass of the hydrate or solvate M2s as an input, given d ln r / d ln M2s. */
export const crystalMolarMassInput = property("molar mass of the crystal", "M2s", "g/mol", (n) => n.crystalMolarMass);

/** The molar mass of the solvent M1 as an input, given d ln r / d ln M1. */
export const solventMolarMassInput = property("molar mass of the solvent", "M1", "g/mol", (n) => n.solventMolarMass);

/** The density of the solvent rho1 as an input, given d ln r / d ln rho1. */
export const solventDensityInput = property("density of the solvent", "rho1", "kg/m3", solventDensityForVolume);
