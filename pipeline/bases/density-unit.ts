import { plainSpelling } from "./unit-spelling.ts";

const FACTORS: ReadonlyMap<string, number> = new Map([
  ["kg/m3", 1],
  ["kg/m^3", 1],
  ["kgm-3", 1],
  ["g/l", 1],
  ["g/ml", 1000],
  ["gml-1", 1000],
  ["g/cm3", 1000],
  ["g/cm^3", 1000],
  ["gcm-3", 1000],
  ["kg/l", 1000],
]);

/** Factor from a unit of density to kg/m3; undefined for a spelling that is none. Case and spacing are free. */
export function densityFactor(text: string): number | undefined {
  return FACTORS.get((plainSpelling(text) ?? text).toLowerCase().replaceAll(" ", ""));
}
