import type { Problem } from "../problems/catalogue.ts";
import type { Liquor } from "../records/edition.ts";
import type { Identified, IdentifiedSource } from "../records/identified.ts";
import { createMeasurementTable, type MeasurementTable } from "../records/measurements.ts";
import type { Settings } from "../records/settings.ts";
import type { Identity, System } from "../records/systems.ts";
import { type LiquorModel, liquorModel } from "./liquor.ts";
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
  const models = new Map<number, LiquorModel>();
  const whoOf: (Identified | undefined)[] = [];
  const modelOf = (who: Identified): LiquorModel => {
    let model = models.get(who.index);
    if (model === undefined) {
      model = liquorModel(who, identities[who.index] as Identity);
      models.set(who.index, model);
      whoOf[who.index] = who;
    }
    return model;
  };
  const context = { identities, liquorOf: modelOf, settings };
  for (const source of sources) collectMeasuredDensities(source, context);
  const refused = sources.flatMap((source, i) => normaliseSource(source, sourcePositions[i] as number, table, context));
  const position = new Map(identities.map((identity, i) => [identity, i]));
  return {
    table,
    refused,
    modelOf,
    whoOf,
    liquorOf: ({ identity }) => {
      const who = whoOf[position.get(identity) as number] as Identified;
      return systemLiquor(who, identity, modelOf(who));
    },
  };
}
