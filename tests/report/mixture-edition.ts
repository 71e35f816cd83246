import type { Edition } from "../../pipeline/records/edition.ts";
import type { MixtureModel } from "../../pipeline/records/mixtures.ts";
import { type MixtureReading, type MixtureWorld, mixtureWorld, modelOf } from "../fit/mixture-support.ts";

/** A mixture with as much of an edition as its page asks for. */
export interface MixtureEdition {
  readonly world: MixtureWorld;
  readonly model: MixtureModel;
  readonly edition: Edition;
}

/** Fits readings of an invented mixture and puts them into an edition of their own. */
export function mixtureEdition(
  readings: readonly MixtureReading[],
  about: Partial<MixtureWorld["systems"][number]["identity"]> = {},
): MixtureEdition {
  const world = mixtureWorld(readings, about);
  const edition = {
    programVersion: "test",
    collection: { name: "mixtures", title: "Invented mixtures", steward: "" },
    sources: [{ name: "first-source" }, { name: "second-source" }, { name: "third-source" }],
    table: world.table,
    systems: world.systems,
    fits: world.robust.map((robust) => ({ robust, curves: [] })),
  };
  return { world, model: modelOf(world), edition: edition as unknown as Edition };
}
