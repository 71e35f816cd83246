import type { Curve } from "../records/fits.ts";
import type { Candidate } from "./candidate.ts";
import type { CurveLimits } from "./curve-limits.ts";
import type { KeptPoints } from "./kept-points.ts";

/** Molar gas constant, J/(mol K), exact since 2019 (CODATA 2018). */
export const gasConstant = 8.314462618;

/**
 * Apparent enthalpy of dissolution at the harmonic mean temperature of the kept points, J/mol, with 95 % limits:
 * -R d ln x/d(1/T) = R T^2 d ln x/dT.
 *
 * Apparent, because it neglects how the activity coefficient changes with composition along the saturation line; equal
 * to the enthalpy of dissolution at saturation where that change is small (dilute or nearly ideal solutions). The
 * limits hold the scatter within sources; an offset of a source that changes with temperature is not in them.
 * @returns undefined for a constant
 * @see Krug, Hunter and Grieger, J. Phys. Chem. 80 (1976) 2335-2341, for the harmonic mean temperature.
 */
export function dissolutionEnthalpy(
  chosen: Candidate,
  { centreK }: KeptPoints,
  limits: CurveLimits,
): Curve["dissolutionEnthalpy"] {
  if (chosen.model === "constant") return undefined;
  const perSlope = gasConstant * centreK ** 2;
  const value = perSlope * chosen.slope(centreK);
  const half = perSlope * limits.slopeHalfWidth(centreK);
  return { value, low: value - half, high: value + half, temperatureK: centreK };
}
