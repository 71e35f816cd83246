import { anotherSolvent } from "./another-solvent.ts";
import { basisMixUp } from "./basis-mix-up.ts";
import type { Cause } from "./cause.ts";
import { cloudPointForClearPoint } from "./cloud-point-for-clear-point.ts";
import { compositionMixUp } from "./composition-mix-up.ts";
import { digitsTransposed } from "./digits-transposed.ts";
import { dilutionFactor } from "./dilution-factor.ts";
import { everythingDissolved } from "./everything-dissolved.ts";
import { hydrateBasis } from "./hydrate-basis.ts";
import { logarithmBase } from "./logarithm-base.ts";
import { lossOnFiltration } from "./loss-on-filtration.ts";
import { notAtEquilibrium } from "./not-at-equilibrium.ts";
import { powerOfTen } from "./power-of-ten.ts";
import { rowsShifted } from "./rows-shifted.ts";
import { saltOrFreeBase } from "./salt-or-free-base.ts";
import { solventLost } from "./solvent-lost.ts";
import { temperatureOffset } from "./temperature-offset.ts";
import { temperatureUnit } from "./temperature-unit.ts";

/** Every cause that competes for an off point or block. To add one: write its file, list it here. */
export const EVERY_CAUSE: readonly Cause[] = [
  powerOfTen,
  dilutionFactor,
  basisMixUp,
  temperatureUnit,
  temperatureOffset,
  hydrateBasis,
  saltOrFreeBase,
  compositionMixUp,
  rowsShifted,
  digitsTransposed,
  anotherSolvent,
  logarithmBase,
  everythingDissolved,
  lossOnFiltration,
  solventLost,
  notAtEquilibrium,
  cloudPointForClearPoint,
];
