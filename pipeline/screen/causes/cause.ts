import type { Change } from "../../records/reread.ts";
import type { BlockSeries, Pattern } from "./pattern.ts";

/** The causes a flag may name. */
export type CauseName =
  | "power of ten"
  | "dilution factor"
  | "basis mix-up"
  | "temperature unit"
  | "temperature offset"
  | "hydrate basis"
  | "salt or free base"
  | "composition mix-up"
  | "rows shifted"
  | "digits transposed"
  | "value of another solvent"
  | "logarithm base"
  | "calculated value copied"
  | "everything dissolved"
  | "loss on filtration"
  | "solvent lost"
  | "not at equilibrium"
  | "cloud point for clear point"
  | "another solid form"
  | "wet solvent";

/** A system beside the suspected one, whose value may have been taken for it. */
export interface Neighbouring {
  readonly system: number;
  /** What tells it apart, in words. */
  readonly name: string;
  /** Whether this source has values there too. */
  readonly sameSource: boolean;
}

/** What a source reports in another system near the temperature of a row, in the same unit. */
export type CellThere = "the same number" | "another number" | "nothing";

/** What a cause may look at: one point, or one block whose rows stand in the order of its file. */
export interface Suspects {
  /** Suspected rows: one for a point, all rows of the block otherwise. */
  readonly rows: readonly number[];
  /** Unit as reported, one for all rows; "" where they differ. */
  readonly unit: string;
  readonly temperatureK: (row: number) => number;
  readonly reportedValue: (row: number) => number;
  /** Row of the same block before or behind a row in its file; undefined at the ends. */
  readonly neighbour: (row: number, step: 1 | -1) => number | undefined;
  /** Method as stated, one for all rows; "" where they differ or none is stated. */
  readonly method: string;
  /** Molar mass of the unsolvated solute, g/mol; NaN where unknown. */
  readonly soluteMolarMass: number;
  /** Systems with the same solute and solid form in another solvent. */
  readonly otherSolvents: readonly Neighbouring[];
  /** Systems with the same solute and solid form in the same solvents, mixed in another proportion. */
  readonly otherCompositions: readonly Neighbouring[];
  /** Temperature (K) of another reading of the same solution that no fit uses, such as the cloud point of a clear point. */
  readonly otherReadingK: (row: number) => number | undefined;
  /** What this source reports in another system near the temperature of a row, in the same unit. */
  readonly cellIn: (row: number, system: number) => CellThere;
}

/** One way a cause may have worked. */
export interface Explanation {
  /** What happened, in words. */
  readonly detail: string;
  /** Share of this way among all ways of the cause; the shares of one cause add up to at most 1. */
  readonly weight: number;
  /** What undoes it for a row; undefined where it does not apply to that row. */
  readonly change: (row: number) => Change | undefined;
  /** Another row that the same mistake must have touched, with what undoes it there; it must fit its curve then too. */
  readonly partner?: (row: number) => { readonly row: number; readonly change: Change } | undefined;
  /** Number in the reported unit that would be right, where `change` alone does not say it. */
  readonly proposes?: (row: number) => number | undefined;
  /** How many times likelier than by chance something exact is that goes with it for a row, such as equal numbers. */
  readonly odds?: (row: number) => number;
  /**
   * Density per ln unit of the very number of a row, where the mistake would have put exactly this number there; then no
   * curve is asked. Undefined where it would not.
   */
  readonly exactly?: (row: number) => number | undefined;
  /** System whose curve the re-read value must fit, where not the row's own. */
  readonly system?: number;
}

/** A kind of mistake that screening can recognise. */
export interface Cause {
  readonly name: CauseName;
  /** Prior probability that this is what is wrong with a single row that is off. Common practice. */
  readonly pointPrior: number;
  /** Prior probability that this is what is wrong with a whole block that is off. Common practice. */
  readonly blockPrior: number;
  /** What the person who measured should look at. */
  readonly lookAt: string;
  readonly explanations: (suspects: Suspects) => readonly Explanation[];
  /** Rate at which blocks are bent in this way, and the ways; absent where the cause bends no series. Common practice. */
  readonly bending?: {
    readonly rate: number;
    readonly patterns: (series: BlockSeries) => readonly Pattern[];
  };
}
