import type { Needs, Quantity } from "../bases/needs.ts";
import {
  apparentDensityFromLiquid,
  apparentDensityFromSolid,
  massConcentration,
  type SolutionDensity,
} from "../bases/solution-density.ts";
import { liquidDensity } from "../properties/liquid-density.ts";
import { solutionDensityModel } from "../properties/solution-density-model.ts";
import type { Substance } from "../properties/substances.ts";
import type { Identified } from "../records/identified.ts";
import type { Identity } from "../records/systems.ts";
import { densityFromNearby, type MeasuredSolution } from "./density-nearby.ts";
import {
  type CompositionSettings,
  massReference,
  type SolventProperties,
  solventProperties,
} from "./solvent-properties.ts";

/** Relative uncertainty of the density of a solution of an electrolyte without coefficients (common practice). */
const ELECTROLYTE_U = 0.04;
/** Solvent is dispensed cold: its volumes are at this temperature unless stated, K. */
const DISPENSED_K = 293.15;
/** Relative uncertainty of a measured density of a solution that states none (common practice). */
const MEASURED_DENSITY_U = 0.001;

/** Properties of one liquor, kept for all rows of its system; the densities follow the conditions set last. */
export interface LiquorModel {
  readonly needs: Needs;
  /**
   * Sets the densities for one row: temperature of the solution; temperature of the stated volume and measured density
   * of the solution (kg/m3) where given, else NaN.
   */
  readonly setConditions: (temperatureK: number, volumeTemperatureK: number, measuredDensity: number) => void;
  /** Densities measured in this system, for the rows that have none. */
  readonly measured: MeasuredSolution[];
  /**
   * Takes the density of the solution from one measured nearby in the system, at the conditions set and mass ratio r.
   * False, and nothing changed, where the row has a measured density of its own or none is near.
   */
  readonly takeNearby: (massRatio: number) => boolean;
  /** Mass concentration, g/L solution, at mass ratio r under the conditions set; NaN where no density is known. */
  readonly massConcentration: (massRatio: number) => number;
  /** Which density is not known under the conditions set, in words; undefined where none is missing. */
  readonly missingDensity: () => string | undefined;
  /** Exact mass fractions of the first and second component of the solvent and the standard uncertainty of the first. */
  readonly fractions: readonly [first: number, second: number, firstU: number];
  /** What is to be said on a row about volumes of a mixed solvent; "" for a pure one. */
  readonly volumeRemark: string;
}

/**
 * Apparent density of the dissolved solute at a temperature: that of the liquid where it is one there, else from the
 * density of the solid, which is computed once.
 */
function apparentDensityModel(
  solute: Substance | undefined,
  { mainlyWater }: SolventProperties,
): (temperatureK: number) => Quantity {
  const ofSolid = apparentDensityFromSolid(solute?.solidDensity, mainlyWater);
  if (solute === undefined || solute.liquidDensities.length === 0) return () => ofSolid;
  return (temperatureK) => {
    const liquid = temperatureK >= (solute.meltingPointK ?? 0) ? liquidDensity(solute, temperatureK) : undefined;
    return liquid === undefined ? ofSolid : apparentDensityFromLiquid(liquid);
  };
}

/** Density model of the solution at a temperature: published, else additive volumes; undefined without a solvent density. */
function solutionDensity(
  solute: Substance | undefined,
  pure: Substance | undefined,
  { densityAt, holdsWater }: SolventProperties,
  apparent: (temperatureK: number) => Quantity,
  temperatureK: number,
): SolutionDensity | undefined {
  const published = solute && pure && solutionDensityModel(solute, pure, temperatureK);
  if (published !== undefined) return published;
  const solventDensity = densityAt(temperatureK);
  if (solventDensity === undefined) return undefined;
  const electrolyte = (solute?.electrolyte ?? false) && holdsWater;
  return {
    kind: "additive volumes",
    apparentSoluteDensity: apparent(temperatureK),
    solventDensity,
    ...(electrolyte ? { modelRelativeUncertainty: ELECTROLYTE_U } : {}),
  };
}

/** True for a form in which the solute has a counter-ion or co-former: nothing of it joins the solvent. */
export function isSaltForm({ form }: Identified): boolean {
  return form?.kind === "salt" || form?.kind === "co-crystal";
}

/** Molar mass of what was weighed as crystal: the hydrate, solvate, salt or co-crystal; NaN where it is not known. */
function crystalMass(who: Identified, soluteMolarMass: number): number {
  return isSaltForm(who) ? (who.form?.molarMass ?? Number.NaN) : who.crystalMassFactor * soluteMolarMass;
}

/** Largest number of temperatures whose densities are kept. */
const KEPT = 4096;

/**
 * The liquor of one identity. Densities are evaluated once per distinct temperature; nothing is extrapolated beyond the
 * range of a correlation.
 */
export function liquorModel(who: Identified, identity: Identity, settings: CompositionSettings): LiquorModel {
  const { solute, solvent, form } = who;
  const properties = solventProperties(solvent, settings);
  const [first, second] = solvent.parts;
  const pure = second === undefined ? first?.substance : undefined;
  const apparent = apparentDensityModel(solute, properties);
  const known = new Map<number, SolutionDensity | undefined>();
  const measured: MeasuredSolution[] = [];
  const quantity = (value: number, relative: number, reference?: string): Quantity | undefined =>
    Number.isNaN(value) ? undefined : { value, standardUncertainty: relative * value, reference };
  const needs: { -readonly [K in keyof Needs]: Needs[K] } = {
    soluteMolarMass: quantity(
      identity.soluteMolarMass,
      (solute?.molarMassUncertainty ?? 0) / identity.soluteMolarMass,
      massReference(solute),
    ),
    crystalMolarMass: quantity(crystalMass(who, identity.soluteMolarMass), 0, form?.reference),
    solventMolarMass: properties.molarMass,
    solventDensityAt20C: properties.addedDensityAt(DISPENSED_K),
  };
  let volumeAtK = Number.NaN;
  const modelAt = (temperatureK: number) => {
    const before = known.get(temperatureK);
    if (before !== undefined || known.has(temperatureK)) return before;
    const model = solutionDensity(solute, pure, properties, apparent, temperatureK);
    if (known.size < KEPT) known.set(temperatureK, model);
    return model;
  };
  return {
    needs,
    measured,
    setConditions: (temperatureK, volumeTemperatureK, measuredDensity) => {
      volumeAtK = Number.isNaN(volumeTemperatureK) ? temperatureK : volumeTemperatureK;
      needs.solventDensityAtVolumeTemperature = Number.isNaN(volumeTemperatureK)
        ? undefined
        : properties.addedDensityAt(volumeTemperatureK);
      needs.solutionDensity = Number.isNaN(measuredDensity)
        ? modelAt(volumeAtK)
        : { kind: "measured", density: quantity(measuredDensity, MEASURED_DENSITY_U, "measured") as Quantity };
    },
    takeNearby: (massRatio) => {
      if (measured.length === 0 || needs.solutionDensity?.kind === "measured") return false;
      const nearby = densityFromNearby(measured, volumeAtK, massRatio, modelAt);
      if (nearby !== undefined) needs.solutionDensity = nearby;
      return nearby !== undefined;
    },
    massConcentration: (massRatio) =>
      needs.solutionDensity === undefined ? Number.NaN : massConcentration(needs.solutionDensity, massRatio),
    missingDensity: () =>
      needs.solutionDensity === undefined
        ? `no density of ${solvent.name} is known at ${(volumeAtK - 273.15).toFixed(1)} °C`
        : undefined,
    fractions:
      second === undefined
        ? [Number.NaN, Number.NaN, properties.fractionU]
        : [first?.massFraction ?? Number.NaN, second.massFraction, properties.fractionU],
    volumeRemark: second === undefined ? "" : volumeRemark(needs.solventDensityAt20C),
  };
}

/** How volumes of a mixed solvent are taken, with the origin of its density. */
function volumeRemark(density: Quantity | undefined): string {
  const of = density?.reference === undefined ? "" : ` (${density.reference})`;
  return `density of the mixed solvent as one liquid${of}; a volume of solvent is that of the mixture, dispensed at 20 °C unless stated`;
}
