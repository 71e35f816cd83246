import type { Input, NeedName, Needs } from "./needs.ts";
import type { Basis } from "./unit.ts";

/**
 * One edge of the conversion graph: a basis and the hub r, g of unsolvated solute per g of total solvent.
 *
 * Every derivative is one of r, taken at r, so that the same numbers serve both directions and every chain through the
 * hub. With E = d ln r/d ln q and S = d ln r/d ln p, the way back has d ln q/d ln r = 1/E and d ln q/d ln p = -S/E.
 */
export interface Edge {
  readonly basis: Basis;
  readonly symbol: string;
  /** SI unit of the basis quantity q. */
  readonly unit: string;
  /** Whether the value is per solvent or per solution, and whether it counts mass or formula units of solute. */
  readonly per: "solvent" | "solution";
  readonly counts: "mass" | "amount";
  readonly toHubEquation: string;
  readonly fromHubEquation: string;
  /** Properties without which there is no conversion. */
  readonly missing: (needs: Needs) => readonly NeedName[];
  /** r [kg/kg] of the basis quantity q; NaN where q is not positive, not possible, or a need is missing. */
  readonly toHub: (quantity: number, needs: Needs) => number;
  /** Basis quantity q of r [kg/kg]. */
  readonly fromHub: (r: number, needs: Needs) => number;
  /** E = d ln r / d ln q at r. */
  readonly valueElasticity: (r: number, needs: Needs) => number;
  readonly inputs: readonly Input[];
}

/** r where it is a positive, finite mass ratio, else NaN. */
export function positiveRatio(r: number): number {
  return r > 0 && r < Number.POSITIVE_INFINITY ? r : Number.NaN;
}

/** Names of the needs whose quantity is undefined. */
export function missingOf(...needed: readonly (readonly [NeedName, unknown])[]): readonly NeedName[] {
  return needed.filter(([, quantity]) => quantity === undefined).map(([name]) => name);
}
