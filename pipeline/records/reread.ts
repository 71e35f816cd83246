/**
 * What a suspected mistake would mean for a row: the row as it would read had the mistake not been made. Screening
 * knows no conversions; whoever calls it supplies them as one function.
 */

/** What a mass of solute was weighed as; the words of a source card. */
export type SoluteBasisReading = "anhydrous" | "hydrate per added solvent" | "hydrate equivalent per total solvent";

/** A mistake, said as the correction that undoes it. Everything not named stays as reported. */
export type Change =
  /** The quantity is `factor` times the reported one; for a logarithm, log(factor) is added to the reported number. */
  | { readonly kind: "factor"; readonly factor: number }
  /** Another number in the reported unit. */
  | { readonly kind: "value"; readonly value: number }
  /** The reported number in another unit (canonical spelling, such as `g/100 g solution`). */
  | { readonly kind: "unit"; readonly unit: string }
  /** The reported number of the temperature on another scale. */
  | { readonly kind: "temperature scale"; readonly scale: "°C" | "K" | "°F" }
  /** Another temperature, K. */
  | { readonly kind: "temperature"; readonly temperatureK: number }
  /** The solute was weighed as something else. */
  | { readonly kind: "solute basis"; readonly basis: SoluteBasisReading }
  /** The value belongs to the solvent of another system (position in the edition's list). */
  | { readonly kind: "solvent"; readonly system: number };

/** A row re-read. */
export interface RereadRow {
  /** ln x or ln r as the row's system is fitted (for a change of solvent: as that other system is fitted). */
  readonly lnValue: number;
  readonly temperatureK: number;
  /** Number in the reported unit, at the reported temperature and basis, that says `lnValue`. */
  readonly reportedValue: number;
}

/**
 * The row under a change, or undefined where the change is impossible (a mass fraction above 1, a temperature below
 * 0 K), needs a property that is not known, or is no change (the unit or scale the row already has).
 */
export type Reread = (row: number, change: Change) => RereadRow | undefined;

/** Number in the row's reported unit of a value ln x (ln r), at the row's temperature; undefined where it has none. */
export type InReportedUnit = (row: number, lnValue: number) => number | undefined;
