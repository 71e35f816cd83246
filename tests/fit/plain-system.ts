import { type CurveContext, isCurve, publishedCurve } from "../../pipeline/fit/published-curve.ts";
import type { Curve, NoCurve } from "../../pipeline/records/fits.ts";
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
      solventComponents: [{ name: "solvent", massFraction: 1 }],
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

/** Context of an edition that knows nothing yet: default between-source scatter of 4 % (salts in water 1 %). */
export const defaultContext: CurveContext = {
  scales: {
    within: new Float64Array(8).fill(0.02),
    between: 0.04,
    betweenAqueousSalt: 0.01,
    betweenOneTemperature: 0.04,
    betweenDegreesOfFreedom: 0,
    betweenAqueousSaltDegreesOfFreedom: 0,
    betweenOneTemperatureDegreesOfFreedom: 0,
  },
  laboratories: [],
  weighting: "relative",
};

/** The published curve of points, all of them kept unless told otherwise. */
export function curveThrough(
  points: SystemPoints,
  context: Partial<CurveContext> = {},
  meltingPointK = Number.NaN,
  system: System = plainSystem(),
  kept = new Uint8Array(points.n).fill(1),
): Curve | NoCurve {
  return publishedCurve(
    { points, kept, agreement: "agreed" },
    { system, branch: 1, meltingPointK },
    { ...defaultContext, ...context },
  );
}

/** The same where a curve is expected. @throws Error with the reason where there is none. */
export function expectCurve(outcome: Curve | NoCurve): Curve {
  if (!isCurve(outcome)) throw new Error(`no curve: ${outcome.reason}`);
  return outcome;
}
