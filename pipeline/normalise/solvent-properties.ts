import { meanMolarMass } from "../bases/compositions.ts";
import type { Quantity } from "../bases/needs.ts";
import { ethanolWaterDensityAt } from "../properties/ethanol-water.ts";
import { liquidDensity } from "../properties/liquid-density.ts";
import { mixtureDensity } from "../properties/mixture-density.ts";
import { ATOMIC_WEIGHTS_REFERENCE } from "../properties/molar-mass.ts";
import type { Substance } from "../properties/substances.ts";
import type { ReadingSolvent, SolventPart } from "../records/identified.ts";
import type { Settings } from "../records/settings.ts";

/** Settings that say how well the composition of a solvent is known. */
export type CompositionSettings = Pick<Settings, "composition_uncertainty_wt_percent">;

/** Properties of a solvent by its exact composition, the uncertainty of the composition in them. */
export interface SolventProperties {
  /** Mass per mole of molecules, g/mol. */
  readonly molarMass: Quantity | undefined;
  /** Density of the liquor's solvent, kg/m3, at a temperature in K. */
  readonly densityAt: (temperatureK: number) => Quantity | undefined;
  /** Density of the solvent as it was dispensed, kg/m3. */
  readonly addedDensityAt: (temperatureK: number) => Quantity | undefined;
  /** Standard uncertainty of the first mass fraction [1], also of ethanol taken absolute; NaN for a pure solvent. */
  readonly fractionU: number;
  /** Water is the larger part of the solvent. */
  readonly mainlyWater: boolean;
  /** There is water in the solvent. */
  readonly holdsWater: boolean;
}

/** Molar mass of water, g/mol (IUPAC 2021), for ethanol that is not as dry as its name. */
const WATER_MOLAR_MASS = 18.015;
/** Range in which the density of wet ethanol is taken as at its nearer end, K. */
const COLDEST_K = 273.15;
const WARMEST_K = 313.15;

/** Where a molar mass comes from: the formula where there is one, else what the tables or the row state. */
export function massReference(substance: Substance | undefined): string {
  return substance?.formula === undefined ? "as stated" : ATOMIC_WEIGHTS_REFERENCE;
}

const known = (value: number, relativeU: number, reference: string): Quantity | undefined =>
  Number.isNaN(value) ? undefined : { value, standardUncertainty: relativeU * value, reference };

/** Properties of the solvent of a reading; those of a pure solvent are its own to the last digit. */
export function solventProperties(
  { parts, added, madeUp, openU, takenAbsolute }: ReadingSolvent,
  { composition_uncertainty_wt_percent: setting }: CompositionSettings,
): SolventProperties {
  const [first, second] = parts as readonly [SolventPart, SolventPart?];
  const waterFraction = parts.find(({ substance }) => substance.name === "water")?.massFraction ?? 0;
  const water = { mainlyWater: waterFraction >= 0.5, holdsWater: waterFraction > 0 };
  if (second === undefined) {
    const wet = takenAbsolute ? setting.plain_ethanol_water / 100 : 0;
    return { ...pureProperties(first.substance, wet), fractionU: wet > 0 ? wet : Number.NaN, ...water };
  }
  const base = (madeUp === "by volume" ? setting.by_volume : setting.by_mass) / 100;
  const smallest = Math.min(...parts.map(({ massFraction }) => massFraction));
  const fractionU = Math.hypot(Math.min(base, smallest), openU);
  const shifts = shiftedParts(parts, fractionU);
  const mass = (all: readonly SolventPart[]) =>
    meanMolarMass(
      all.map(({ massFraction }) => massFraction),
      all.map(({ substance }) => substance.molarMass ?? Number.NaN),
    );
  const value = mass(parts);
  const ofShift = Math.hypot(...shifts.map((shifted) => mass(shifted) / value - 1));
  const addedShifts = added === parts ? shifts : shiftedParts(added, fractionU);
  return {
    molarMass: known(value, ofShift, `of the exact composition; ${massReference(first.substance)}`),
    densityAt: (temperatureK) => densityWithShifts(parts, shifts, temperatureK),
    addedDensityAt: (temperatureK) => densityWithShifts(added, addedShifts, temperatureK),
    fractionU,
    ...water,
  };
}

/** Most temperatures at which the density of one substance is kept. */
const KEPT = 4096;

/** Densities of pure liquids met so far, by temperature (K): the systems of one solvent share them. */
const densities = new WeakMap<Substance, Map<number, Quantity | undefined>>();

function pureDensity(substance: Substance, temperatureK: number): Quantity | undefined {
  let known = densities.get(substance);
  if (known === undefined) {
    known = new Map();
    densities.set(substance, known);
  }
  const before = known.get(temperatureK);
  if (before !== undefined || known.has(temperatureK)) return before;
  const density = liquidDensity(substance, temperatureK);
  if (known.size < KEPT) known.set(temperatureK, density);
  return density;
}

/** Properties of one substance; `wet` is the standard uncertainty of its water content as a mass fraction. */
function pureProperties(substance: Substance, wet: number) {
  const M = substance.molarMass ?? Number.NaN;
  const ofWater = wet * (M / WATER_MOLAR_MASS - 1);
  const ofMass = Math.hypot((substance.molarMassUncertainty ?? 0) / M, ofWater);
  const densityAt = (temperatureK: number): Quantity | undefined => {
    const density = pureDensity(substance, temperatureK);
    if (density === undefined || wet === 0) return density;
    const inRange = Math.min(WARMEST_K, Math.max(COLDEST_K, temperatureK));
    const [dry, moist] = [1, 1 - wet].map((w) => ethanolWaterDensityAt(w, inRange)?.value ?? Number.NaN);
    const shift = ((moist as number) / (dry as number) - 1) * density.value;
    return { ...density, standardUncertainty: Math.hypot(density.standardUncertainty, shift) };
  };
  return { molarMass: known(M, ofMass, massReference(substance)), densityAt, addedDensityAt: densityAt };
}

/** The composition with each component but the largest raised by u, the others scaled to make room. */
function shiftedParts(parts: readonly SolventPart[], u: number): readonly (readonly SolventPart[])[] {
  const largest = parts.reduce((best, part) => (part.massFraction > best.massFraction ? part : best));
  return parts
    .filter((part) => part !== largest)
    .map((raised) => {
      const w = Math.min(1, raised.massFraction + u);
      const room = (1 - w) / (1 - raised.massFraction);
      return parts.map((part) => ({ ...part, massFraction: part === raised ? w : part.massFraction * room }));
    });
}

/** Density of a mixture; the uncertainty of its composition acts through the densities of the shifted compositions. */
function densityWithShifts(
  parts: readonly SolventPart[],
  shifts: readonly (readonly SolventPart[])[],
  temperatureK: number,
): Quantity | undefined {
  const density = mixtureDensity(parts, temperatureK);
  if (density === undefined) return undefined;
  const ofShifts = shifts.map(
    (shifted) => (mixtureDensity(shifted, temperatureK)?.value ?? density.value) - density.value,
  );
  return { ...density, standardUncertainty: Math.hypot(density.standardUncertainty, ...ofShifts) };
}
