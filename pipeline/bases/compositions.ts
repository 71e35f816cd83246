/** What the fractions of a solvent mixture are per. Alcoholometric volume is that of ethanol + water alone. */
export type CompositionBasis = "mass" | "mole" | "volume before mixing" | "alcoholometric volume";

/** What the composition of a mixture needs to know of one component. */
export interface CompositionLiquid {
  /** Molar mass, g/mol. */
  readonly molarMass: number;
  /** Density of the pure liquid at 20 °C, kg/m3. */
  readonly density20C: number;
}

/** Shares divided by their sum, so that they add up to 1. */
export function normalised(shares: readonly number[]): readonly number[] {
  const sum = shares.reduce((total, share) => total + share, 0);
  return shares.map((share) => share / sum);
}

/** Mass fractions [1] of mole fractions: w_i = x_i M_i / sum x_j M_j, M in g/mol. Scaled to a sum of 1. */
export function massFromMoleFractions(x: readonly number[], molarMasses: readonly number[]): readonly number[] {
  return normalised(x.map((share, i) => share * (molarMasses[i] ?? Number.NaN)));
}

/** Mole fractions [1] of mass fractions: x_i = (w_i/M_i) / sum (w_j/M_j). */
export function moleFromMassFractions(w: readonly number[], molarMasses: readonly number[]): readonly number[] {
  return normalised(w.map((share, i) => share / (molarMasses[i] ?? Number.NaN)));
}

/**
 * Mass fractions [1] of volume fractions before mixing: w_i = phi_i rho_i / sum phi_j rho_j, with the densities of the
 * pure liquids [kg/m3] at the temperature at which they were measured out.
 */
export function massFromVolumeFractions(phi: readonly number[], densities: readonly number[]): readonly number[] {
  return normalised(phi.map((share, i) => share * (densities[i] ?? Number.NaN)));
}

/** Volume fractions before mixing [1] of mass fractions: phi_i = (w_i/rho_i) / sum (w_j/rho_j). */
export function volumeFromMassFractions(w: readonly number[], densities: readonly number[]): readonly number[] {
  return normalised(w.map((share, i) => share / (densities[i] ?? Number.NaN)));
}

/** Mean molar mass [g/mol] of a mixture, its mass per mole of molecules: 1/M = sum w_i/M_i. */
export function meanMolarMass(w: readonly number[], molarMasses: readonly number[]): number {
  return 1 / w.reduce((sum, share, i) => sum + share / (molarMasses[i] ?? Number.NaN), 0);
}

/** Alcoholometric strength [1] to mass fraction of ethanol [1] and back. */
export interface Alcoholometry {
  readonly toMass: (strength: number) => number;
  readonly fromMass: (massFraction: number) => number;
}

/**
 * Mass fractions of a composition on any of the four bases. On the alcoholometric basis the first component is ethanol
 * and the second water; the strength is the first share of the sum.
 *
 * @param shares parts in any measure, one a component
 */
export function massFractions(
  basis: CompositionBasis,
  shares: readonly number[],
  liquids: readonly CompositionLiquid[],
  alcoholometry: Alcoholometry,
): readonly number[] {
  switch (basis) {
    case "mass":
      return normalised(shares);
    case "mole":
      return massFromMoleFractions(
        shares,
        liquids.map(({ molarMass }) => molarMass),
      );
    case "volume before mixing":
      return massFromVolumeFractions(
        shares,
        liquids.map(({ density20C }) => density20C),
      );
    case "alcoholometric volume": {
      const ethanol = alcoholometry.toMass(normalised(shares)[0] ?? Number.NaN);
      return [ethanol, 1 - ethanol];
    }
  }
}

/** Fractions on any of the four bases of mass fractions: the inverse of {@link massFractions}. */
export function fractionsOnBasis(
  basis: CompositionBasis,
  w: readonly number[],
  liquids: readonly CompositionLiquid[],
  alcoholometry: Alcoholometry,
): readonly number[] {
  switch (basis) {
    case "mass":
      return normalised(w);
    case "mole":
      return moleFromMassFractions(
        w,
        liquids.map(({ molarMass }) => molarMass),
      );
    case "volume before mixing":
      return volumeFromMassFractions(
        w,
        liquids.map(({ density20C }) => density20C),
      );
    case "alcoholometric volume": {
      const strength = alcoholometry.fromMass(normalised(w)[0] ?? Number.NaN);
      return [strength, 1 - strength];
    }
  }
}

/** A composition key is a mass fraction to this step. */
export const KEY_STEP = 0.005;
/** Rounding of a key goes up at its edge although doubles fall short of it. */
const EDGE = 1e-9;

/**
 * Composition key: every mass fraction to 0.005, as percent, the sum 100. The largest component takes what the others
 * leave, so the order of the components makes no difference; a component below 0.0025 has the key 0.
 *
 * @example compositionKey([0.7049, 0.2951]) // [70.5, 29.5]
 */
export function compositionKey(w: readonly number[]): readonly number[] {
  const largest = w.indexOf(Math.max(...w));
  const steps = w.map((share) => Math.floor(share / KEY_STEP + 0.5 + EDGE));
  const others = steps.reduce((sum, step, i) => (i === largest ? sum : sum + step), 0);
  return steps.map((step, i) => 100 * KEY_STEP * (i === largest ? 1 / KEY_STEP - others : step));
}
