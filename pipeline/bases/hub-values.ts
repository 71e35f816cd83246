import { moleFractionEdge } from "./by-amount.ts";
import { amountConcentrationEdge, massConcentrationEdge } from "./by-volume.ts";
import type { Needs } from "./needs.ts";

/** The published values of one solution; undefined where a property they need is missing. */
export interface HubValues {
  readonly moleFraction: number | undefined;
  /** g unsolvated solute per 100 g total solvent. */
  readonly gramsPer100gSolvent: number;
  /** mg unsolvated solute per mL of solution, the same number in g/L. */
  readonly milligramsPerMillilitreSolution: number | undefined;
  /** mol per litre of solution. */
  readonly molesPerLitreSolution: number | undefined;
}

/** Mole fraction of undissociated formula units at r [kg/kg]; NaN where a molar mass is missing. */
export function moleFractionAt(r: number, needs: Needs): number {
  return moleFractionEdge.fromHub(r, needs);
}

/** g per 100 g solvent at r [kg/kg]. */
export function gramsPer100gSolventAt(r: number): number {
  return 100 * r;
}

/** mg per mL of solution at r [kg/kg]; NaN where the density of the solution is missing or out of its range. */
export function milligramsPerMillilitreAt(r: number, needs: Needs): number {
  return massConcentrationEdge.fromHub(r, needs);
}

/** mol per litre of solution at r [kg/kg]; NaN where a molar mass or the density of the solution is missing. */
export function molesPerLitreAt(r: number, needs: Needs): number {
  return amountConcentrationEdge.fromHub(r, needs) / 1000;
}

function known(value: number): number | undefined {
  return Number.isNaN(value) ? undefined : value;
}

/** All published values at r [g unsolvated solute per g total solvent]. For columns of many rows use the functions. */
export function hubValues(r: number, needs: Needs): HubValues {
  return {
    moleFraction: known(moleFractionAt(r, needs)),
    gramsPer100gSolvent: gramsPer100gSolventAt(r),
    milligramsPerMillilitreSolution: known(milligramsPerMillilitreAt(r, needs)),
    molesPerLitreSolution: known(molesPerLitreAt(r, needs)),
  };
}
