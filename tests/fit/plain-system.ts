import type { FitBasis, System, SystemPoints } from "../../pipeline/records/systems.ts";

/** An invented system that a fit needs for its id, basis and class only. */
export function plainSystem(index = 0, fitBasis: FitBasis = "ln x", aqueousSalt = false): System {
  return {
    ...{
      index,
      id: `solute-in-solvent-${index}`,
      key: `solute|solvent|${index}`,
      family: "solute-in-solvent",
      fitBasis,
    },
    rows: new Int32Array(0),
    identity: {
      ...{ solute: "solute", solidForm: "unspecified", solvent: "solvent", composition: "", medium: "" },
      ...{ soluteMolarMass: 150, solventMolarMass: 46, aqueousSalt },
    },
  };
}

/** Points of one system from parallel lists; temperatures in K, values as ln x. */
export function plainPoints(
  temperatureK: readonly number[],
  lnValue: readonly number[],
  source: readonly number[] = [],
  lnU = 0.02,
  temperatureU = 0.1,
): SystemPoints {
  const n = temperatureK.length;
  return {
    n,
    row: Int32Array.from({ length: n }, (_, i) => i),
    temperatureK: Float64Array.from(temperatureK),
    temperatureU: new Float64Array(n).fill(temperatureU),
    lnValue: Float64Array.from(lnValue),
    lnU: new Float64Array(n).fill(lnU),
    source: Int32Array.from({ length: n }, (_, i) => source[i] ?? 0),
    level: new Float64Array(n).fill(50),
  };
}
