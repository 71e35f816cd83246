import { electrolyteDensityFunction, type LaliberteCoefficients } from "./electrolyte-density.ts";
import { type LiquidSubstance, WATER } from "./liquid-density.ts";
import { sucroseSolutionDensity } from "./sucrose-density.ts";

/** CAS Registry Number of sucrose, whose solutions in water have a formula of their own. */
export const SUCROSE = "57-50-1";

/** A published density of a solution as a function of the mass fraction of the unsolvated solute, at one temperature. */
export interface SolutionDensityModel {
  readonly kind: "density function";
  readonly name: string;
  /** Density [kg/m3] at a mass fraction [1] from 0 to `maxMassFraction`. */
  readonly density: (massFraction: number) => number;
  readonly relativeUncertainty: number;
  readonly maxMassFraction: number;
  readonly reference: string;
}

/** What a published solution density needs to know of the solute. */
export interface DissolvedSubstance {
  readonly cas: string | undefined;
  readonly apparentDensity: ApparentDensityCoefficients | undefined;
}

/** Apparent-density coefficients of a salt with their relative standard uncertainty and reference. */
export interface ApparentDensityCoefficients extends LaliberteCoefficients {
  readonly relativeUncertainty: number;
  readonly reference: string;
}

/**
 * Published density of a solution in water: sucrose by the ICUMSA formula, salts by their Laliberté-Cooper
 * coefficients. Undefined for another solvent, another solute or a temperature outside the fitted range.
 */
export function solutionDensityModel(
  solute: DissolvedSubstance,
  solvent: Pick<LiquidSubstance, "cas">,
  temperatureK: number,
): SolutionDensityModel | undefined {
  if (solvent.cas !== WATER) return undefined;
  const t = temperatureK - 273.15;
  if (solute.cas === SUCROSE) {
    if (!(t >= 0 && t <= 100)) return undefined;
    return {
      kind: "density function",
      name: "Bubník et al. (sucrose)",
      density: (w) => sucroseSolutionDensity(w, t),
      relativeUncertainty: 0.0005,
      maxMassFraction: 0.85,
      reference: "Bubník, Kadlec, Urban, Bruhns, Sugar Technologists Manual (1995) p. 164",
    };
  }
  const salt = solute.apparentDensity;
  if (salt === undefined || !(t >= salt.lowestC && t <= salt.highestC)) return undefined;
  return {
    kind: "density function",
    name: "Laliberté and Cooper",
    density: electrolyteDensityFunction(salt, t),
    relativeUncertainty: salt.relativeUncertainty,
    maxMassFraction: salt.highestMassFraction,
    reference: salt.reference,
  };
}
