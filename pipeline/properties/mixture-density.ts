import { ethanolWaterDensityAt } from "./ethanol-water.ts";
import { type LiquidSubstance, liquidDensity, WATER } from "./liquid-density.ts";
import type { PropertyValue } from "./property-value.ts";
import type { Property } from "./substances.ts";

/** One component of a solvent mixture. */
export interface MixtureComponent {
  readonly substance: LiquidSubstance & {
    readonly molarMass: number | undefined;
    readonly properties: ReadonlyMap<string, Property>;
  };
  /** Mass fraction in the mixture [1]. */
  readonly massFraction: number;
}

interface WeighedLiquid extends MixtureComponent {
  readonly density: PropertyValue;
}

const ETHANOL = "64-17-5";

/**
 * Relative standard uncertainty of ideal mixing at equal volumes. With water contraction reaches 4.1 % of the density; for
 * ten solvents with 324 measured densities twice this, times evenness^0.75, covers every one.
 */
const AQUEOUS_CONTRACTION = 0.0235;
const ORGANIC_CONTRACTION = 0.003;

/**
 * Density of a mixture of solvents [kg/m3] at a temperature in K, by the first of:
 * - ethanol + water from 0 to 40 °C: {@link ethanolWaterDensityAt}
 * - water + one solvent with excess-volume coefficients: rho = sum x_i M_i / (sum x_i V_i + VE) with
 *   VE = x (1 - x) sum A_k (2x - 1)^k [cm3/mol], x the mole fraction of the solvent; u = 0.3 % within 15 K of the
 *   temperature of the coefficients, 0.6 % farther off
 * - water, a solvent with known contraction and others: those two as one liquid by the above, mixed ideally with the rest
 * - ideal mixing 1/rho = sum w_i/rho_i; for what mixing contracts u is up to 2.35 % with water, 0.3 % without
 *
 * Mass fractions are taken relative to their sum. Undefined where the density of a component is unknown.
 */
export function mixtureDensity(
  components: readonly MixtureComponent[],
  temperatureK: number,
): PropertyValue | undefined {
  const total = components.reduce((sum, { massFraction }) => sum + massFraction, 0);
  const liquids: WeighedLiquid[] = [];
  for (const component of components) {
    if (component.massFraction === 0) continue;
    const density = liquidDensity(component.substance, temperatureK);
    if (density === undefined) return undefined;
    liquids.push({ ...component, massFraction: component.massFraction / total, density });
  }
  const [first, second] = liquids;
  if (first === undefined) return undefined;
  if (second === undefined) return first.density;
  if (liquids.length === 2) return aqueousBinary(first, second, temperatureK) ?? idealMixture(liquids);
  return idealMixture(withAqueousPair(liquids, temperatureK));
}

/**
 * Three liquids or more with the largest of those whose contraction with water is known joined with the water to one
 * liquid, so that a trace of a third component does not undo what is known of the other two.
 */
function withAqueousPair(liquids: readonly WeighedLiquid[], temperatureK: number): readonly WeighedLiquid[] {
  const water = liquids.find(({ substance }) => substance.cas === WATER);
  if (water === undefined) return liquids;
  let best: { readonly partner: WeighedLiquid; readonly density: PropertyValue } | undefined;
  for (const partner of liquids) {
    if (partner === water || partner.massFraction <= (best?.partner.massFraction ?? 0)) continue;
    const total = water.massFraction + partner.massFraction;
    const [a, b] = [water, partner].map((one) => ({ ...one, massFraction: one.massFraction / total }));
    const density = aqueousBinary(a as WeighedLiquid, b as WeighedLiquid, temperatureK);
    if (density !== undefined) best = { partner, density };
  }
  if (best === undefined) return liquids;
  const { partner, density } = best;
  const joined = { ...water, massFraction: water.massFraction + partner.massFraction, density };
  return [joined, ...liquids.filter((one) => one !== water && one !== partner)];
}

function aqueousBinary(a: WeighedLiquid, b: WeighedLiquid, temperatureK: number): PropertyValue | undefined {
  const [water, solvent] = a.substance.cas === WATER ? [a, b] : [b, a];
  if (water.substance.cas !== WATER) return undefined;
  if (solvent.substance.cas === ETHANOL) {
    const tables = ethanolWaterDensityAt(solvent.massFraction, temperatureK);
    if (tables !== undefined) return tables;
  }
  return fromExcessVolume(water, solvent, temperatureK);
}

function fromExcessVolume(
  water: WeighedLiquid,
  solvent: WeighedLiquid,
  temperatureK: number,
): PropertyValue | undefined {
  const rows = [0, 1, 2, 3, 4].map((k) => solvent.substance.properties.get(`excess_volume_with_water_A${k}`));
  const [leading] = rows;
  const solventMass = solvent.substance.molarMass;
  const waterMass = water.substance.molarMass;
  if (leading?.lowestK === undefined || solventMass === undefined || waterMass === undefined) return undefined;
  const solventMoles = solvent.massFraction / solventMass;
  const x = solventMoles / (solventMoles + water.massFraction / waterMass);
  const excess = x * (1 - x) * rows.reduceRight((sum, row) => sum * (2 * x - 1) + (row?.value ?? 0), 0);
  const mass = x * solventMass + (1 - x) * waterMass;
  // g/mol over kg/m3 is 1000 cm3/mol.
  const volume = (x * solventMass) / solvent.density.value + ((1 - x) * waterMass) / water.density.value;
  const value = mass / (volume + excess / 1000);
  const near = Math.abs(temperatureK - leading.lowestK) <= 15;
  return { value, standardUncertainty: (near ? 0.003 : 0.006) * value, reference: leading.reference };
}

function idealMixture(liquids: readonly WeighedLiquid[]): PropertyValue {
  const volumes = liquids.map(({ massFraction, density }) => massFraction / density.value);
  const volume = volumes.reduce((sum, part) => sum + part, 0);
  const value = 1 / volume;
  const aqueous = liquids.some(({ substance }) => substance.cas === WATER);
  const evenness = 2 * (1 - volumes.reduce((sum, part) => sum + (part / volume) ** 2, 0));
  const contraction = (aqueous ? AQUEOUS_CONTRACTION : ORGANIC_CONTRACTION) * Math.min(1, evenness) ** 0.75;
  const pure = Math.hypot(
    ...liquids.map(({ density }, at) => ((volumes[at] ?? 0) / volume) * (density.standardUncertainty / density.value)),
  );
  return {
    value,
    standardUncertainty: value * Math.hypot(pure, contraction),
    reference: "ideal mixing of volumes; uncertainty of the contraction: common practice",
  };
}
