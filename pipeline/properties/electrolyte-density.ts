import { waterDensityKell1975 } from "./water-density.ts";

/** Coefficients of one electrolyte with the range they were fitted in; t in °C, w mass fraction of the salt. */
export interface LaliberteCoefficients {
  readonly c: readonly [c0: number, c1: number, c2: number, c3: number, c4: number];
  readonly lowestC: number;
  readonly highestC: number;
  readonly highestMassFraction: number;
}

/**
 * Density of an electrolyte in water [kg/m3] at one temperature as a function of the mass fraction of the salt:
 *
 *   rho = 1 / ((1 - w)/rho_water + w/rho_app)
 *   rho_app = (c0 w + c1) exp(1e-6 (t + c4)^2) / (w + c2 + c3 t)
 *
 * - w  mass fraction of the salt [1], 0 to `highestMassFraction`
 * - t  temperature [°C], `lowestC` to `highestC`; rho_water by Kell 1975
 *
 * What depends on t alone is computed once, so the function returned is cheap.
 * @throws RangeError for t outside the fitted range.
 * @see M. Laliberté, W. E. Cooper, J. Chem. Eng. Data 49 (2004) 1141-1151; M. Laliberté, ibid. 54 (2009) 1725-1760.
 */
export function electrolyteDensityFunction(salt: LaliberteCoefficients, t: number): (w: number) => number {
  if (!(t >= salt.lowestC && t <= salt.highestC)) {
    throw new RangeError(`electrolyteDensity: t = ${t} °C is outside ${salt.lowestC} to ${salt.highestC} °C`);
  }
  const [c0, c1, c2, c3, c4] = salt.c;
  const water = waterDensityKell1975(t);
  const exponential = Math.exp(1e-6 * (t + c4) ** 2);
  const shift = c2 + c3 * t;
  return (w) => 1 / ((1 - w) / water + (w * (w + shift)) / ((c0 * w + c1) * exponential));
}
