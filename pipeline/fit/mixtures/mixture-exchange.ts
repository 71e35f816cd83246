import {
  type CompositionLiquid,
  massFromVolumeFractions,
  meanMolarMass,
  volumeFromMassFractions,
} from "../../bases/compositions.ts";
import type { MixturePoints } from "./mixture-points.ts";

/** The two solvents of a binary; undefined where a property is not known. */
export type BinaryLiquids = readonly [CompositionLiquid, CompositionLiquid];

/** The compositions of a series read with the two solvents exchanged. */
export interface Exchange {
  /** What was exchanged: parts by mass, or volumes before mixing. */
  readonly of: "masses" | "volumes";
  /** Mass fraction of the first solvent of a point, so read. */
  readonly fraction: (point: number) => number;
  /** What that adds to ln value: a value reported per mass keeps its mass ratio, and its mole fraction follows. */
  readonly shift: (point: number) => number;
}

/** Mass fraction of the first solvent with the volumes of the two exchanged. */
function volumesExchanged(fraction: number, [first, second]: BinaryLiquids): number {
  const densities = [first.density20C, second.density20C];
  const [one = Number.NaN, two = Number.NaN] = volumeFromMassFractions([fraction, 1 - fraction], densities);
  return massFromVolumeFractions([two, one], densities)[0] ?? Number.NaN;
}

/**
 * ln x' - ln x where the mass ratio stays and the mean molar mass M of the solvent becomes that of another composition:
 * x'/(1 - x') = x/(1 - x) M'/M. Values per volume of solution are treated alike; the density that changes with the
 * composition moves them by a few percent more.
 */
function shiftOfMoleFraction(lnValue: number, from: number, to: number, [first, second]: BinaryLiquids): number {
  const masses = [first.molarMass, second.molarMass];
  const x = Math.exp(lnValue);
  const odds = (x / (1 - x)) * (meanMolarMass([to, 1 - to], masses) / meanMolarMass([from, 1 - from], masses));
  return Math.log(odds / (1 + odds)) - lnValue;
}

/** Both ways in which the two solvents of a series may have been exchanged; masses alone where the liquids are unknown. */
export function exchanges(points: MixturePoints, liquids: BinaryLiquids | undefined): Exchange[] {
  const byMass = (i: number) => 1 - points.fraction[i]!;
  const byVolume = (i: number) => (liquids === undefined ? Number.NaN : volumesExchanged(points.fraction[i]!, liquids));
  const shift = (fraction: (point: number) => number) => (i: number) => {
    if (liquids === undefined || points.keepsMoleFraction[i] === 1) return 0;
    const shifted = shiftOfMoleFraction(points.lnValue[i]!, points.fraction[i]!, fraction(i), liquids);
    return Number.isFinite(shifted) ? shifted : 0;
  };
  const masses: Exchange = { of: "masses", fraction: byMass, shift: shift(byMass) };
  const known = liquids?.every(({ density20C }) => density20C > 0) ?? false;
  return known ? [masses, { of: "volumes", fraction: byVolume, shift: shift(byVolume) }] : [masses];
}
