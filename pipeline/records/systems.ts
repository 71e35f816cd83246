import { type MeasurementTable, RowState } from "./measurements.ts";

/** What was dissolved in what: everything that decides which curve a measurement belongs to. */
export interface Identity {
  /** Key of the solute: its name in the substance tables, else its strongest identifier as given. */
  readonly solute: string;
  /** Name of the solid form, or `unspecified`. */
  readonly solidForm: string;
  /** Name of the solvent; components of a mixture joined by ` + `. */
  readonly solvent: string;
  /** Composition key of a mixture, `70.5:29.5 w/w` in the order of `solvent`; "" for a pure solvent. */
  readonly composition: string;
  /**
   * Names of the solvent's components and their mass fractions by the composition key, in the order of `solvent`, one
   * entry for a pure solvent. The exact fractions of a row stand in the measurement table.
   */
  readonly solventComponents: readonly { readonly name: string; readonly massFraction: number }[];
  /** Medium (buffer, common ion, co-former); "" for none. */
  readonly medium: string;
  /** Molar mass of the unsolvated solute, g/mol; NaN where unknown. */
  readonly soluteMolarMass: number;
  /** Mean molar mass of the solvent, g/mol. */
  readonly solventMolarMass: number;
  /** A salt or other electrolyte in water: its own defaults for thresholds and between-source scatter. */
  readonly aqueousSalt: boolean;
}

/** The solvent with its composition, as people read it: `ethanol`, `ethanol + water (70:30 w/w)`. */
export function solventInWords({ solvent, composition }: Pick<Identity, "solvent" | "composition">): string {
  return composition === "" ? solvent : `${solvent} (${composition})`;
}

/** What is fitted: the natural logarithm of the mole fraction, or of the mass ratio where no molar mass is known. */
export type FitBasis = "ln x" | "ln r";

/** One solute in one solid form, one solvent composition and one medium; what one curve describes. */
export interface System {
  /** Position in the edition's list of systems, which is sorted by id. */
  readonly index: number;
  /** Readable ASCII slug + 8 hex digits of the canonical key. */
  readonly id: string;
  readonly key: string;
  /** Id of the family: the same with any solid form. */
  readonly family: string;
  readonly identity: Identity;
  readonly fitBasis: FitBasis;
  /** Rows of the measurement table, ascending. */
  readonly rows: Int32Array;
}

/** The points of one system as a fit wants them: parallel arrays, row order. Intervals and rows not fitted are left out. */
export interface SystemPoints {
  readonly n: number;
  /** Row in the measurement table. */
  readonly row: Int32Array;
  /** T, K. */
  readonly temperatureK: Float64Array;
  /** Standard uncertainty of T, K. */
  readonly temperatureU: Float64Array;
  /** ln x or ln r. */
  readonly lnValue: Float64Array;
  /** Standard uncertainty of lnValue as reported or by default, temperature not included. */
  readonly lnU: Float64Array;
  /**
   * The part of `lnU` that all points of one source share here, standard uncertainty of lnValue; absent or not finite: none.
   * It moves a source as a whole and does not average out over its points.
   */
  readonly sharedLnU?: Float64Array;
  /** Position of the source in the edition's list. */
  readonly source: Int32Array;
  /** Level for the material threshold: mg per mL of solution, or 1000 r where no density is known. */
  readonly level: Float64Array;
}

/** Collects the points of a system from the column store. `omit` holds rows set aside by a ruling. */
export function systemPoints(table: MeasurementTable, system: System, omit?: ReadonlySet<number>): SystemPoints {
  const rows = system.rows.filter((row) => table.state[row] === RowState.point && !omit?.has(row));
  const n = rows.length;
  const of = (column: Float64Array): Float64Array => Float64Array.from(rows, (row) => column[row] as number);
  const value = of(system.fitBasis === "ln x" ? table.moleFraction : table.massRatio);
  const level = of(table.massConcentration);
  for (let i = 0; i < n; i++) {
    value[i] = Math.log(value[i] as number);
    if (Number.isNaN(level[i])) level[i] = 1000 * (table.massRatio[rows[i] as number] as number);
  }
  return {
    n,
    row: rows,
    temperatureK: of(table.temperatureK),
    temperatureU: of(table.temperatureU),
    lnValue: value,
    lnU: of(table.relativeU),
    sharedLnU: of(table.sharedU),
    source: Int32Array.from(rows, (row) => table.source[row] as number),
    level,
  };
}

/** Part of a stated variance that a point always keeps for itself: shares are not known to more digits. */
const LEAST_OWN_SHARE = 0.01;

/** Variance of lnValue that a point shares with the other points of its source here, from the stated uncertainties. */
export function sharedVarianceOf({ lnU, sharedLnU }: SystemPoints, i: number): number {
  if (sharedLnU === undefined) return 0;
  const shared = sharedLnU[i]! ** 2;
  const whole = lnU[i]! ** 2;
  return shared > 0 && whole > 0 && whole < Number.POSITIVE_INFINITY ? Math.min(shared, whole) : 0;
}

/** Standard uncertainty of lnValue that is a point's own: the stated one without what it shares; NaN where none is stated. */
export function ownLnU(points: SystemPoints, i: number): number {
  const whole = points.lnU[i]! ** 2;
  return Math.sqrt(Math.max(whole - sharedVarianceOf(points, i), LEAST_OWN_SHARE * whole));
}
