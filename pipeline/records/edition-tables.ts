import type { EditionDocument } from "./generated/edition.ts";

/** A system of a published edition, as far as editions are compared. */
export interface PublishedSystem {
  /** Solute, form, solvent, composition, medium in words. */
  readonly name: string;
  readonly grade: string;
  readonly reasons: string;
  readonly hasCurve: boolean;
}

/** A measurement of a published edition. */
export interface PublishedMeasurement {
  readonly source: string;
  readonly system: string;
  readonly temperatureK: number;
  /** Value and unit as reported. */
  readonly reported: string;
  readonly status: string;
}

/** A curve at one temperature with its 95 % limits; a mole fraction, or g/100 g solvent where no molar mass is known. */
export interface PublishedPoint {
  readonly temperatureK: number;
  readonly value: number;
  /** NaN where a limit is open. */
  readonly low: number;
  readonly high: number;
}

/** A published curve at the temperatures of grid.csv. */
export interface PublishedGrid {
  readonly system: string;
  readonly quantity: "mole fraction" | "g/100 g solvent";
  readonly points: readonly PublishedPoint[];
}

/** What an edition says, as far as editions are compared; every map in the order of its table. */
export interface EditionTables {
  readonly document: EditionDocument;
  readonly systems: ReadonlyMap<string, PublishedSystem>;
  readonly measurements: ReadonlyMap<string, PublishedMeasurement>;
  /** By curve id. */
  readonly curves: ReadonlyMap<string, PublishedGrid>;
}
