import type { Problem } from "../problems/catalogue.ts";
import type { SolidForm, Substance } from "../properties/substances.ts";
import type { Reading, SourceTable } from "./readings.ts";

/** One component of the solvent of a reading. */
export interface SolventPart {
  readonly substance: Substance;
  /** Exact mass fraction in the solvent, free of solute [1]. */
  readonly massFraction: number;
}

/** How the composition of a solvent was made up: it decides the uncertainty of its fractions. */
export type MadeUp = "pure" | "by mass" | "by volume" | "water content";

/** The solvent of a reading: one substance, or a mixture with its exact composition. */
export interface ReadingSolvent {
  /** As in the system's identity: names of the components by the composition key, joined by ` + `. */
  readonly name: string;
  /** Exact parts of the liquor, free of solute, in the order of names; those too small for the key come last. */
  readonly parts: readonly SolventPart[];
  /** Parts as they were filled in, where a dissolved solvate has added its own solvent to them. */
  readonly added: readonly SolventPart[];
  readonly madeUp: MadeUp;
  /** Standard uncertainty of the first fraction from a basis that is open between two readings [1]; 0 where it is not. */
  readonly openU: number;
  /** Ethanol without grade or stated water, taken absolute. */
  readonly takenAbsolute: boolean;
}

/** What a reading was identified as: the system's identity, and the substances behind it with their properties. */
export interface Identified {
  /** Position of the system's identity in the edition's list of identities. */
  readonly index: number;
  /** The solute's entry in the substance tables, where it has one. */
  readonly solute: Substance | undefined;
  readonly solvent: ReadingSolvent;
  readonly form: SolidForm | undefined;
  /** M(crystal)/M(unsolvated): 1 for an unsolvated or unspecified form; NaN for a hydrate or solvate of unknown count. */
  readonly crystalMassFactor: number;
  /** True for a hydrate or solvate, named by its form or by the solute's own name: its basis must be stated. */
  readonly solvated: boolean;
  /** Assumptions made while identifying, for the row. */
  readonly assumptions: readonly string[];
}

/** A source whose readings have been identified; `who[i]` belongs to `readings[i]`. */
export interface IdentifiedSource {
  readonly source: SourceTable;
  readonly readings: readonly Reading[];
  readonly who: readonly Identified[];
  readonly refused: readonly Problem[];
}
