import type { PropertyValue } from "./property-value.ts";
import { waterDensity } from "./water-density.ts";

/** A density of a pure liquid as a function of temperature, inside its range. */
export interface LiquidDensityModel {
  readonly equation: "DIPPR105" | "PPDS10" | "POLY25" | "tabulated value";
  readonly lowestK: number;
  readonly highestK: number;
  /** Density [kg/m3] at a temperature in K inside the range. */
  readonly density: (temperatureK: number) => number;
  /** Standard uncertainty [kg/m3] of a density at a temperature in K. */
  readonly uncertainty: (density: number, temperatureK: number) => number;
  readonly reference: string;
}

/** What a liquid density needs to know of a substance. */
export interface LiquidSubstance {
  readonly cas: string | undefined;
  /** In order of preference: the first whose range holds the temperature is used. */
  readonly liquidDensities: readonly LiquidDensityModel[];
}

/** CAS Registry Number of water, which has formulas of its own. */
export const WATER = "7732-18-5";

/**
 * Density of a pure liquid [kg/m3] at a temperature in K with its standard uncertainty and reference; water by
 * {@link waterDensity}, other liquids by the first of their correlations whose range holds the temperature.
 * Undefined where none does: nothing is extrapolated.
 */
export function liquidDensity(substance: LiquidSubstance, temperatureK: number): PropertyValue | undefined {
  if (substance.cas === WATER) return waterDensity(temperatureK);
  for (const model of substance.liquidDensities) {
    if (temperatureK >= model.lowestK && temperatureK <= model.highestK) {
      const value = model.density(temperatureK);
      return { value, standardUncertainty: model.uncertainty(value, temperatureK), reference: model.reference };
    }
  }
  return undefined;
}

/**
 * DIPPR equation 105: rho = c1 / c2^(1 + (1 - T/c3)^c4) in mol/m3 (c1 in mol/m3, c3 the critical temperature in K),
 * times the molar mass [g/mol] / 1000 in kg/m3.
 *
 * @see Perry's Chemical Engineers' Handbook, 8th ed., table 2-32.
 */
export function dippr105(c: readonly number[], molarMass: number, temperatureK: number): number {
  const [c1 = 0, c2 = 0, c3 = 0, c4 = 0] = c;
  return ((c1 / c2 ** (1 + (1 - temperatureK / c3) ** c4)) * molarMass) / 1000;
}

/**
 * PPDS equation 10: rho = rho_c + c1 s^0.35 + c2 s^(2/3) + c3 s + c4 s^(4/3) with s = 1 - T/Tc, in kg/m3.
 *
 * @see VDI Heat Atlas, 2nd ed., section D3.1.
 */
export function ppds10(
  c: readonly number[],
  criticalTemperatureK: number,
  criticalDensity: number,
  temperatureK: number,
): number {
  const [c1 = 0, c2 = 0, c3 = 0, c4 = 0] = c;
  const s = 1 - temperatureK / criticalTemperatureK;
  return criticalDensity + c1 * s ** 0.35 + c2 * s ** (2 / 3) + c3 * s + c4 * s ** (4 / 3);
}

/** Quadratic about 25 °C: rho = c1 + c2 (T - 298.15) + c3 (T - 298.15)^2, in kg/m3; only between its temperatures. */
export function poly25(c: readonly number[], temperatureK: number): number {
  const [c1 = 0, c2 = 0, c3 = 0] = c;
  const dt = temperatureK - 298.15;
  return c1 + dt * (c2 + dt * c3);
}

/** Farthest a tabulated density is carried by a coefficient of expansion [K]. */
const FARTHEST = 60;

/**
 * One tabulated density carried to other temperatures by the coefficient of expansion alpha:
 * rho = rho0 (1 - alpha (T - T0)), u^2 = u0^2 + (rho0 (T - T0) u_alpha)^2. Not farther than 60 K.
 *
 * The usual alpha of organic liquids, 1.0e-3 ± 0.25e-3 per K, is common practice.
 */
export function tabulatedDensity(
  { value, standardUncertainty, reference }: PropertyValue,
  measuredAtK: number,
  expansion: { readonly value: number; readonly standardUncertainty: number },
): LiquidDensityModel {
  return {
    equation: "tabulated value",
    lowestK: measuredAtK - FARTHEST,
    highestK: measuredAtK + FARTHEST,
    density: (temperatureK) => value * (1 - expansion.value * (temperatureK - measuredAtK)),
    uncertainty: (_, temperatureK) =>
      Math.hypot(standardUncertainty, value * (temperatureK - measuredAtK) * expansion.standardUncertainty),
    reference,
  };
}
