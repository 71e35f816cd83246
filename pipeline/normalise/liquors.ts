import type { Identified } from "../records/identified.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { Identity } from "../records/systems.ts";
import { type LiquorModel, liquorModel } from "./liquor.ts";
import type { CompositionSettings } from "./solvent-properties.ts";

/** The liquors of an edition: one of each identity in a pure solvent, one of each exact composition of a mixed one. */
export interface Liquors {
  /** Properties of the liquor of a reading, the same object for the same identity and exact composition. */
  readonly modelOf: (who: Identified) => LiquorModel;
  /** A reading of each identity that was met, by position. */
  readonly whoOf: readonly (Identified | undefined)[];
  /** A reading with the identity and exact composition of a row. */
  readonly whoOfRow: (table: MeasurementTable, row: number) => Identified | undefined;
}

const keyOf = (identity: number, first: number, second: number): string => `${identity} ${first} ${second}`;

/** Makes the liquors of a list of identities, each when it is first asked for. */
export function createLiquors(identities: readonly Identity[], settings: CompositionSettings): Liquors {
  const ofPure = new Map<number, LiquorModel>();
  // Ethanol taken absolute and ethanol known to be dry are one system with two uncertainties.
  const ofAbsolute = new Map<number, { readonly who: Identified; readonly model: LiquorModel }>();
  const ofReading = new Map<Identified, LiquorModel>();
  const ofMixture = new Map<string, { readonly who: Identified; readonly model: LiquorModel }>();
  const whoOf: (Identified | undefined)[] = [];
  const dryOf: (Identified | undefined)[] = [];

  const make = (who: Identified): LiquorModel => {
    whoOf[who.index] ??= who;
    return liquorModel(who, identities[who.index] as Identity, settings);
  };
  const mixtureOf = (who: Identified): LiquorModel => {
    const [first, second] = who.solvent.parts;
    const key = keyOf(who.index, first?.massFraction ?? Number.NaN, second?.massFraction ?? Number.NaN);
    const known = ofMixture.get(key) ?? { who, model: make(who) };
    ofMixture.set(key, known);
    return known.model;
  };
  return {
    whoOf,
    modelOf: (who) => {
      const { parts, takenAbsolute } = who.solvent;
      const pure = parts.length === 1;
      const known = !pure
        ? ofReading.get(who)
        : takenAbsolute
          ? ofAbsolute.get(who.index)?.model
          : ofPure.get(who.index);
      if (known !== undefined) return known;
      const model = pure ? make(who) : mixtureOf(who);
      if (!pure) ofReading.set(who, model);
      else if (takenAbsolute) ofAbsolute.set(who.index, { who, model });
      else ofPure.set(who.index, model);
      if (pure && !takenAbsolute) dryOf[who.index] ??= who;
      return model;
    },
    whoOfRow: (table, row) => {
      const identity = table.identity[row] as number;
      const first = table.firstFraction[row] as number;
      if (Number.isNaN(first)) {
        const absolute = !Number.isNaN(table.fractionU[row] as number);
        return (absolute ? ofAbsolute.get(identity)?.who : dryOf[identity]) ?? whoOf[identity];
      }
      return ofMixture.get(keyOf(identity, first, table.secondFraction[row] as number))?.who ?? whoOf[identity];
    },
  };
}
