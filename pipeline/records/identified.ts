import type { Problem } from "../problems/catalogue.ts";
import type { SolidForm, Substance } from "../properties/substances.ts";
import type { Reading, SourceTable } from "./readings.ts";

/** What a reading was identified as: the system's identity, and the substances behind it with their properties. */
export interface Identified {
  /** Position of the system's identity in the edition's list of identities. */
  readonly index: number;
  /** The solute's entry in the substance tables, where it has one. */
  readonly solute: Substance | undefined;
  readonly solvent: Substance;
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
