import { anotherSolvent } from "./another-solvent.ts";
import { basisMixUp } from "./basis-mix-up.ts";
import type { Cause } from "./cause.ts";
import { digitsTransposed } from "./digits-transposed.ts";
import { dilutionFactor } from "./dilution-factor.ts";
import { hydrateBasis } from "./hydrate-basis.ts";
import { logarithmBase } from "./logarithm-base.ts";
import { powerOfTen } from "./power-of-ten.ts";
import { rowsShifted } from "./rows-shifted.ts";
import { temperatureUnit } from "./temperature-unit.ts";

/** Every cause that competes for an off point or block. To add one: write its file, list it here. */
export const EVERY_CAUSE: readonly Cause[] = [
  powerOfTen,
  dilutionFactor,
  basisMixUp,
  temperatureUnit,
  hydrateBasis,
  rowsShifted,
  digitsTransposed,
  anotherSolvent,
  logarithmBase,
];
