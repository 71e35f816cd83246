import { type Needs, type Quantity, relativeUncertaintyOf } from "./needs.ts";

/** A density measured on the solution itself [kg/m3]. */
export interface MeasuredDensity {
  readonly kind: "measured";
  readonly density: Quantity;
}

/**
 * Additive volumes: 1/rho = w/rho2 + (1 - w)/rho1, with rho2 the apparent density of the dissolved solute and rho1 the
 * density of the solvent at the temperature of the solution [kg/m3]. `modelRelativeUncertainty` [1] is added for
 * solutes whose volumes are known not to add (electrolytes).
 */
export interface AdditiveVolumes {
  readonly kind: "additive volumes";
  readonly apparentSoluteDensity: Quantity;
  readonly solventDensity: Quantity;
  readonly modelRelativeUncertainty?: number | undefined;
}

/** A published density rho(w) [kg/m3] of the mass fraction w, smooth and valid from 0 to `maxMassFraction`. */
export interface DensityFunction {
  readonly kind: "density function";
  readonly name: string;
  readonly density: (massFraction: number) => number;
  readonly relativeUncertainty: number;
  readonly maxMassFraction: number;
  readonly reference?: string | undefined;
}

export type SolutionDensity = MeasuredDensity | AdditiveVolumes | DensityFunction;

/**
 * Apparent density of a dissolved solute [kg/m3] from the density of its solid: 0.93 times the solid's, u 6 %, in water
 * u 9 %; 1200, u 120, where the solid's is unknown. Common practice for molecules; electrolytes contract far more.
 *
 * In water molecules are denser than that: five solids at 20 °C (60 handbook densities) have 0.96 to 1.03 times the
 * density of their solid, so 6 % would cover 3 % of the errors once and 9 % covers 68 %, all of them twice.
 */
export function apparentDensityFromSolid(solidDensity: number | undefined, inWater = false): Quantity {
  if (solidDensity === undefined) {
    return { value: 1200, standardUncertainty: 120, reference: "common practice: solid of unknown density" };
  }
  const value = 0.93 * solidDensity;
  const standardUncertainty = (inWater ? 0.09 : 0.06) * value;
  return { value, standardUncertainty, reference: "common practice: 0.93 of the solid's density" };
}

/**
 * Apparent density of a dissolved liquid [kg/m3]: that of the liquid itself at the temperature of the solution, u 8 %
 * for the contraction on mixing. Common practice; for eight liquids in water at 20 °C (119 handbook densities) 74 % of
 * the errors lie within it once and all of them twice.
 */
export function apparentDensityFromLiquid({ value }: Quantity): Quantity {
  return { value, standardUncertainty: 0.08 * value, reference: "common practice: the density of the liquid solute" };
}

/**
 * Density of the solution [kg/m3] at the mass fraction w of unsolvated solute (0 <= w < 1).
 * NaN beyond the range of a density function: nothing is extrapolated.
 */
export function densityAt(model: SolutionDensity, w: number): number {
  switch (model.kind) {
    case "measured":
      return model.density.value;
    case "additive volumes":
      return 1 / (w / model.apparentSoluteDensity.value + (1 - w) / model.solventDensity.value);
    case "density function":
      return w <= model.maxMassFraction ? model.density(w) : Number.NaN;
  }
}

/** Mass of solute per volume of solution c = w rho(w) [kg/m3] at the mass ratio r = w/(1 - w) [kg/kg]. */
export function massConcentration(model: SolutionDensity, r: number): number {
  if (model.kind !== "additive volumes") {
    const w = r / (1 + r);
    return w * densityAt(model, w);
  }
  return r / (r / model.apparentSoluteDensity.value + 1 / model.solventDensity.value);
}

/**
 * Mass ratio r [kg/kg] at which the mass per volume of solution is c [kg/m3]: the inverse of `massConcentration`.
 *
 * - measured rho       r = c / (rho - c)
 * - additive volumes   r = (c/rho1) / (1 - c/rho2)
 * - density function   w rho(w) = c solved to the last digits, r = w/(1 - w)
 *
 * NaN where no solution can hold that much: c at or above rho or rho2, or beyond the range of the density function.
 */
export function massRatioAtConcentration(model: SolutionDensity, c: number): number {
  switch (model.kind) {
    case "measured": {
      const room = model.density.value - c;
      return room > 0 ? c / room : Number.NaN;
    }
    case "additive volumes": {
      const room = 1 - c / model.apparentSoluteDensity.value;
      return room > 0 ? c / model.solventDensity.value / room : Number.NaN;
    }
    case "density function": {
      const w = massFractionAtConcentration(model, c);
      return w / (1 - w);
    }
  }
}

/** Newton steps on w rho(w) - c = 0, held inside a shrinking bracket; bisection where a step would leave it. */
function massFractionAtConcentration(model: DensityFunction, c: number): number {
  let low = 0;
  let high = model.maxMassFraction;
  if (!(c > 0) || !(high * model.density(high) >= c)) return Number.NaN;
  let w = Math.min(c / model.density(0), (low + high) / 2);
  for (let step = 0; step < 200; step++) {
    const excess = w * model.density(w) - c;
    if (excess > 0) high = w;
    else low = w;
    const slope = model.density(w) + w * densitySlope(model, w);
    const newton = w - excess / slope;
    const next = newton > low && newton < high ? newton : (low + high) / 2;
    if (excess === 0 || Math.abs(next - w) <= Number.EPSILON * w || high - low <= Number.EPSILON * high) return w;
    w = next;
  }
  return w;
}

/** d rho / d w [kg/m3] by a central difference; its error only slows the solution or touches an uncertainty. */
function densitySlope(model: DensityFunction, w: number): number {
  const below = Math.max(0, w - 1e-5);
  const above = Math.min(model.maxMassFraction, w + 1e-5);
  return (model.density(above) - model.density(below)) / (above - below);
}

/**
 * d ln c / d ln w [1] at the mass fraction w: 1 for a constant density, rho/rho1 for additive volumes,
 * 1 + w rho'(w)/rho(w) for a density function.
 */
export function concentrationSlope(model: SolutionDensity, w: number): number {
  switch (model.kind) {
    case "measured":
      return 1;
    case "additive volumes":
      return densityAt(model, w) / model.solventDensity.value;
    case "density function":
      return 1 + (w * densitySlope(model, w)) / densityAt(model, w);
  }
}

/** One property the density of a solution rests on, with d ln rho / d ln property at a fixed mass fraction. */
export interface DensityInput {
  readonly name: string;
  readonly symbol: string;
  readonly quantity: (needs: Needs, w: number) => Quantity | undefined;
  readonly relativeUncertainty: (needs: Needs) => number;
  readonly elasticity: (model: SolutionDensity, w: number) => number;
}

const apparent = (model: SolutionDensity | undefined) =>
  model?.kind === "additive volumes" ? model.apparentSoluteDensity : undefined;
const solvent = (model: SolutionDensity | undefined) =>
  model?.kind === "additive volumes" ? model.solventDensity : undefined;
const measured = (model: SolutionDensity | undefined) => (model?.kind === "measured" ? model.density : undefined);

function modelUncertainty(model: SolutionDensity | undefined): number {
  if (model?.kind === "density function") return model.relativeUncertainty;
  return model?.kind === "additive volumes" ? (model.modelRelativeUncertainty ?? 0) : 0;
}

function modelQuantity(model: SolutionDensity | undefined, w: number): Quantity | undefined {
  const u = modelUncertainty(model);
  if (model === undefined || model.kind === "measured" || u === 0) return undefined;
  const value = densityAt(model, w);
  return {
    value,
    standardUncertainty: u * value,
    reference: model.kind === "density function" ? (model.reference ?? model.name) : undefined,
  };
}

/** Every property a solution density can rest on; those a model does not use have no quantity and no effect. */
export const densityInputs: readonly DensityInput[] = [
  {
    name: "density of the solution",
    symbol: "rho",
    quantity: (needs) => measured(needs.solutionDensity),
    relativeUncertainty: (needs) => relativeUncertaintyOf(measured(needs.solutionDensity)),
    elasticity: (model) => (model.kind === "measured" ? 1 : 0),
  },
  {
    name: "apparent density of the solute",
    symbol: "rho2",
    quantity: (needs) => apparent(needs.solutionDensity),
    relativeUncertainty: (needs) => relativeUncertaintyOf(apparent(needs.solutionDensity)),
    elasticity: (model, w) =>
      model.kind === "additive volumes" ? (w * densityAt(model, w)) / model.apparentSoluteDensity.value : 0,
  },
  {
    name: "density of the solvent",
    symbol: "rho1",
    quantity: (needs) => solvent(needs.solutionDensity),
    relativeUncertainty: (needs) => relativeUncertaintyOf(solvent(needs.solutionDensity)),
    elasticity: (model, w) =>
      model.kind === "additive volumes" ? ((1 - w) * densityAt(model, w)) / model.solventDensity.value : 0,
  },
  {
    name: "density model",
    symbol: "rho",
    quantity: (needs, w) => modelQuantity(needs.solutionDensity, w),
    relativeUncertainty: (needs) => modelUncertainty(needs.solutionDensity),
    elasticity: () => 1,
  },
];

/** The equation of a density model as text. */
export function densityEquation(model: SolutionDensity): string {
  switch (model.kind) {
    case "measured":
      return "rho measured";
    case "additive volumes":
      return "1/rho = w/rho2 + (1 - w)/rho1";
    case "density function":
      return `rho(w) after ${model.name}`;
  }
}

/** Above this amplification a mass per volume is too blunt: ask for a weighed value. */
export const amplificationLimit = 2;

/**
 * By how much an error of the density (or of c) is amplified in the mass ratio: rho/(rho - c) = 1/(1 - w) = 1 + r [1].
 */
export function concentrationAmplification(r: number): number {
  return 1 + r;
}

/** The advice that goes with an amplification above the limit, or undefined. */
export function amplificationCaution(amplification: number | undefined): string | undefined {
  if (amplification === undefined || amplification <= amplificationLimit) return undefined;
  const times = Number(amplification.toPrecision(2));
  return `an error of the density reaches the mass ratio ${times} times amplified: ask for a weighed value`;
}
