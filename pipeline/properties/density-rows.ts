import { dippr105, type LiquidDensityModel, poly25, ppds10, tabulatedDensity } from "./liquid-density.ts";
import type { ApparentDensityCoefficients } from "./solution-density-model.ts";
import type { Property } from "./substances.ts";

/** Properties of one substance by name; tabulated densities have the key `liquid_density@T`. */
export type Properties = ReadonlyMap<string, Property>;

/** Says that a correlation lacks something. */
export type Incomplete = (property: string, message: string) => void;

/** Usual coefficient of expansion of an organic liquid [1/K]: common practice. */
const USUAL_EXPANSION = { value: 1.0e-3, standardUncertainty: 2.5e-4 };

interface Correlation {
  readonly c: readonly number[];
  readonly lowestK: number;
  readonly highestK: number;
  readonly relativeUncertainty: number;
  readonly reference: string;
}

/**
 * Density models of a liquid from its property rows: correlations in order of their stated uncertainty, then tabulated
 * values carried by the coefficient of expansion. Rows are named `liquid_density_EQUATION_c1` ..., `_u` (relative
 * standard uncertainty), `liquid_density` (tabulated, at T_min_K) and `thermal_expansion`.
 */
export function liquidDensityModels(
  properties: Properties,
  molarMass: number | undefined,
  incomplete: Incomplete,
): LiquidDensityModel[] {
  if (properties.size === 0) return [];
  const correlations = [
    dipprModel(properties, molarMass, incomplete),
    ppdsModel(properties, incomplete),
    polynomialModel(properties, incomplete),
  ].filter((model) => model !== undefined);
  const ordered = correlations.sort((a, b) => a.relativeUncertainty - b.relativeUncertainty).map(({ model }) => model);
  return [...ordered, ...tabulatedModels(properties)];
}

interface RankedModel {
  readonly model: LiquidDensityModel;
  readonly relativeUncertainty: number;
}

function correlation(
  properties: Properties,
  prefix: string,
  names: readonly string[],
  incomplete: Incomplete,
): Correlation | undefined {
  const rows = names.map((name) => properties.get(`${prefix}_${name}`));
  const [first] = rows;
  if (rows.every((row) => row === undefined)) return undefined;
  const c = rows.map((row) => row?.value ?? Number.NaN);
  const { lowestK, highestK, reference = "" } = first ?? {};
  const relativeUncertainty = properties.get(`${prefix}_u`)?.value;
  if (c.some(Number.isNaN) || lowestK === undefined || highestK === undefined || relativeUncertainty === undefined) {
    incomplete(`${prefix}_c1`, `${prefix} needs ${[...names, "u"].join(", ")} and a range of temperature`);
    return undefined;
  }
  return { c, lowestK, highestK, relativeUncertainty, reference };
}

function ranked(
  equation: LiquidDensityModel["equation"],
  { lowestK, highestK, relativeUncertainty, reference }: Correlation,
  density: (temperatureK: number) => number,
): RankedModel {
  const uncertainty = (value: number) => relativeUncertainty * value;
  return { model: { equation, lowestK, highestK, density, uncertainty, reference }, relativeUncertainty };
}

function dipprModel(properties: Properties, molarMass: number | undefined, incomplete: Incomplete) {
  const found = correlation(properties, "liquid_density_DIPPR105", ["c1", "c2", "c3", "c4"], incomplete);
  if (found === undefined || molarMass === undefined) return undefined;
  return ranked("DIPPR105", found, (temperatureK) => dippr105(found.c, molarMass, temperatureK));
}

function ppdsModel(properties: Properties, incomplete: Incomplete) {
  const found = correlation(properties, "liquid_density_PPDS10", ["c1", "c2", "c3", "c4", "Tc", "rhoc"], incomplete);
  if (found === undefined) return undefined;
  const [criticalTemperature = 0, criticalDensity = 0] = found.c.slice(4);
  return ranked("PPDS10", found, (temperatureK) => ppds10(found.c, criticalTemperature, criticalDensity, temperatureK));
}

function polynomialModel(properties: Properties, incomplete: Incomplete) {
  const found = correlation(properties, "liquid_density_POLY25", ["c1", "c2", "c3"], incomplete);
  return found === undefined ? undefined : ranked("POLY25", found, (temperatureK) => poly25(found.c, temperatureK));
}

function tabulatedModels(properties: Properties): LiquidDensityModel[] {
  const row = properties.get("thermal_expansion");
  const stated = row?.value === undefined ? undefined : row;
  const expansion = {
    value: stated?.value ?? USUAL_EXPANSION.value,
    standardUncertainty: stated?.standardUncertainty ?? USUAL_EXPANSION.standardUncertainty,
  };
  const models: LiquidDensityModel[] = [];
  for (const [key, { value, lowestK, standardUncertainty, reference }] of properties) {
    if (!key.startsWith("liquid_density@") || value === undefined || lowestK === undefined) continue;
    const density = { value, standardUncertainty: standardUncertainty ?? 0.005 * value, reference };
    models.push(tabulatedDensity(density, lowestK, expansion));
  }
  return models;
}

/** Laliberté-Cooper coefficients from the rows `apparent_density_c0` ... `_c4`, `_w_max` and `_u`. */
export function apparentDensityCoefficients(
  properties: Properties,
  incomplete: Incomplete,
): ApparentDensityCoefficients | undefined {
  if (properties.size === 0) return undefined;
  const found = correlation(properties, "apparent_density", ["c0", "c1", "c2", "c3", "c4", "w_max"], incomplete);
  if (found === undefined) return undefined;
  const [c0 = 0, c1 = 0, c2 = 0, c3 = 0, c4 = 0, highestMassFraction = 0] = found.c;
  return {
    c: [c0, c1, c2, c3, c4],
    lowestC: found.lowestK - 273.15,
    highestC: found.highestK - 273.15,
    highestMassFraction,
    relativeUncertainty: found.relativeUncertainty,
    reference: found.reference,
  };
}
