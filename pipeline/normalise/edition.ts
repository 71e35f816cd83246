import type { Problem } from "../problems/catalogue.ts";
import type { Liquor } from "../records/edition.ts";
import type { Identified, IdentifiedSource } from "../records/identified.ts";
import { createMeasurementTable, type MeasurementTable } from "../records/measurements.ts";
import type { Settings } from "../records/settings.ts";
import type { Identity, System } from "../records/systems.ts";
import type { LiquorModel } from "./liquor.ts";
import { createLiquors } from "./liquors.ts";
import { collectMeasuredDensities } from "./measured-densities.ts";
import { normaliseSource } from "./source.ts";
import { systemLiquor } from "./system-liquor.ts";

/** All measurements of an edition, what was refused on the way, and the liquors behind them. */
export interface Normalised {
  readonly table: MeasurementTable;
  readonly refused: readonly Problem[];
  /** What the writers need to know of a system's liquor. */
  readonly liquorOf: (system: System) => Liquor;
  /** Properties of the liquor of an identity, for converting single values. */
  readonly modelOf: (who: Identified) => LiquorModel;
  /** An identified reading of each identity, by position. */
  readonly whoOf: readonly (Identified | undefined)[];
  /** The identified reading behind a row of a table: in a mixed solvent that of the row's own exact composition. */
  readonly whoOfRow: (table: MeasurementTable, row: number) => Identified | undefined;
}

/**
 * Normalises all sources into one table. The number of readings is known, so the table is made once.
 *
 * @param sourcePositions position of each source in the edition's list, in the order of `sources`
 */
export function normaliseEdition(
  sources: readonly IdentifiedSource[],
  sourcePositions: readonly number[],
  identities: readonly Identity[],
  settings: Settings,
): Normalised {
  const capacity = sources.reduce((sum, { readings }) => sum + readings.length, 0);
  const table = createMeasurementTable(capacity);
  const { modelOf, whoOf, whoOfRow } = createLiquors(identities, settings);
  const context = { identities, liquorOf: modelOf, settings };
  for (const source of sources) collectMeasuredDensities(source, context, whoOfRow);
  const refused = sources.flatMap((source, i) => normaliseSource(source, sourcePositions[i] as number, table, context));
  const position = new Map(identities.map((identity, i) => [identity, i]));
  return {
    table,
    refused,
    modelOf,
    whoOf,
    whoOfRow,
    liquorOf: ({ identity }) => {
      const who = whoOf[position.get(identity) as number] as Identified;
      return systemLiquor(who, identity, modelOf(who));
    },
  };
}
