import { gasConstant } from "./thermodynamics.ts";

/** Melting data of the solid form that was dissolved. */
export interface Melting {
  /** Melting point Tm, K. */
  readonly meltingPointK: number;
  /** Enthalpy of fusion at Tm, J/mol. */
  readonly fusionEnthalpy: number;
}

/** A quantity known to lie between two assumptions; `low` and `high` in order of size. */
export interface Bracket {
  readonly low: number;
  readonly high: number;
}

/** What decides whether an ideal solubility means anything. */
export interface IdealCase extends Melting {
  /** The solute dissociates: the mole fraction of formula units is then no measure of its activity. */
  readonly electrolyte: boolean;
  /** The solid contains solvent (hydrate, solvate): it does not melt to the pure solute. */
  readonly solvated: boolean;
  /** The melting data are those of the form that was dissolved. */
  readonly sameForm: boolean;
}

/** Why no ideal solubility is given, in words; undefined where it may be. */
export function whyNoIdealSolubility(about: IdealCase): string | undefined {
  if (about.electrolyte) return "the solute is an electrolyte";
  if (about.solvated) return "the solid is a hydrate or solvate";
  if (!about.sameForm) return "the melting data belong to another solid form";
  if (!(about.meltingPointK > 0)) return "no melting point is known";
  if (!(about.fusionEnthalpy > 0)) return "no enthalpy of fusion is known";
  return undefined;
}

/**
 * Ideal mole-fraction solubility of an unsolvated non-electrolyte, as a bracket between two heat-capacity terms:
 *
 * - none:  ln x = -(dHfus/R) (1/T - 1/Tm)
 * - full, dCp = dSfus = dHfus/Tm:  ln x = -(dSfus/R) ln(Tm/T)
 *
 * The difference of heat capacities between melt and solid is seldom measured; it lies mostly between the two, and the
 * further T lies below Tm the wider is the bracket.
 * @param melting melting data of the form dissolved
 * @param temperatureK T, K, at or below Tm
 * @returns mole fractions, at most 1
 * @throws RangeError if T is not above 0 and at or below Tm, or the enthalpy of fusion is not above 0.
 * @example idealSolubility({ meltingPointK: 353.4, fusionEnthalpy: 19060 }, 298.15) // { low: 0.3004, high: 0.3317 }
 * @see Prausnitz, Lichtenthaler and Gomes de Azevedo, Molecular Thermodynamics of Fluid-Phase Equilibria, 3rd ed.
 * (1999), chapter 11; Neau and Flynn, Pharm. Res. 7 (1990) 1157-1162, for dCp = dSfus (from memory, not verified).
 */
export function idealSolubility({ meltingPointK, fusionEnthalpy }: Melting, temperatureK: number): Bracket {
  if (!(temperatureK > 0 && temperatureK <= meltingPointK))
    throw new RangeError(
      `ideal solubility: T = ${temperatureK} K is not above 0 K and up to the melting point, ${meltingPointK} K`,
    );
  if (!(fusionEnthalpy > 0))
    throw new RangeError(`ideal solubility: enthalpy of fusion ${fusionEnthalpy} J/mol is not above 0`);
  const fusionEntropy = fusionEnthalpy / meltingPointK;
  return {
    low: Math.exp((-fusionEnthalpy / gasConstant) * (1 / temperatureK - 1 / meltingPointK)),
    high: Math.exp((-fusionEntropy / gasConstant) * Math.log(meltingPointK / temperatureK)),
  };
}

/**
 * Activity coefficient of the solute at saturation against the pure supercooled melt, gamma = x_ideal/x, as the bracket
 * that {@link idealSolubility} leaves.
 *
 * @param ideal ideal solubility at the same temperature
 * @param lnMoleFraction ln x of the saturated solution
 */
export function activityCoefficient(ideal: Bracket, lnMoleFraction: number): Bracket {
  const x = Math.exp(lnMoleFraction);
  return { low: ideal.low / x, high: ideal.high / x };
}
