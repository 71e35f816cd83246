/**
 * The column store of accepted measurements: typed arrays for numbers, dictionary-coded strings for texts, so that ten
 * million rows fit. A row number is the only handle; stages read it through small views such as {@link systemPoints}.
 */

/** Texts stored once each and referred to by number, in order of first use. */
export interface Dictionary {
  readonly texts: string[];
  readonly codes: Map<string, number>;
}

/** An empty dictionary whose code 0 is the empty text. */
export function createDictionary(): Dictionary {
  return { texts: [""], codes: new Map([["", 0]]) };
}

/** Code of a text, added on first use. */
export function codeOf(dictionary: Dictionary, text: string): number {
  const known = dictionary.codes.get(text);
  if (known !== undefined) return known;
  const code = dictionary.texts.length;
  dictionary.texts.push(text);
  dictionary.codes.set(text, code);
  return code;
}

/** What a row can do in a fit. */
export const RowState = {
  /** A value known as a number: takes part in fits. */
  point: 0,
  /** A value known only as a range. */
  interval: 1,
  /** A number that no fit uses: a cloud point, a kinetic value, no common basis. */
  notFitted: 2,
} as const;

/** Accepted measurements, one row each, ordered by source name, line and column. */
export interface MeasurementTable {
  /** Rows in use; the arrays may be longer. */
  count: number;
  /** Position of the source in the edition's sorted list of sources. */
  readonly source: Int32Array;
  readonly line: Int32Array;
  /** Heading of the solubility column (`texts`). */
  readonly column: Int32Array;
  /** Identity of solute, form, solvent, composition and medium: position in the edition's list of identities. */
  readonly identity: Int32Array;
  /** One of {@link RowState}. */
  readonly state: Uint8Array;
  /** Temperature, K. */
  readonly temperatureK: Float64Array;
  /** Standard uncertainty of the temperature, K. */
  readonly temperatureU: Float64Array;
  /** Unit of the temperature as stated (`texts`). */
  readonly temperatureUnit: Int32Array;
  /** Number as reported, in the reported unit; NaN for an interval. */
  readonly reportedValue: Float64Array;
  /** Reported text of an interval, or of a number that is not written in its shortest form (`texts`; 0 = none). */
  readonly reportedText: Int32Array;
  /** Unit as reported (`texts`). */
  readonly reportedUnit: Int32Array;
  /** Lower and upper limit of an interval in the reported unit; NaN where open or where the row is a point. */
  readonly valueLow: Float64Array;
  readonly valueHigh: Float64Array;
  /** Lower and upper limit of an interval as mass ratio r; NaN where open or a point. */
  readonly massRatioLow: Float64Array;
  readonly massRatioHigh: Float64Array;
  /** r, g solute (unsolvated) per g total solvent; NaN where unknown. */
  readonly massRatio: Float64Array;
  /** x, mole fraction of the solute; NaN where no molar mass is known. */
  readonly moleFraction: Float64Array;
  /** Mass concentration, mg per mL of solution at the measuring temperature; NaN where no density is known. */
  readonly massConcentration: Float64Array;
  /** Amount concentration, mol per L of solution; NaN where unknown. */
  readonly molPerL: Float64Array;
  /** Relative standard uncertainty of the fitted quantity (x, or r where x is unknown), temperature not included. */
  readonly relativeU: Float64Array;
  /**
   * The part of `relativeU` that the rows of one source and system share (molar masses, densities and their models, the
   * open reading of a bare volume): it does not average out over them; the rest is the row's own.
   */
  readonly sharedU: Float64Array;
  /** What the solute was weighed as: a solute basis (`texts`). */
  readonly soluteBasis: Int32Array;
  /** 1 = the solid in equilibrium was looked at and was the one stated. */
  readonly solidChecked: Uint8Array;
  /**
   * Exact mass fractions of the first and second component of a mixed solvent, free of solute, a trace too small for the
   * composition key among them; NaN in a pure solvent.
   */
  readonly firstFraction: Float64Array;
  readonly secondFraction: Float64Array;
  /** Standard uncertainty of `firstFraction`; also of ethanol taken absolute, whose fraction is 1. NaN in other pure solvents. */
  readonly fractionU: Float64Array;
  /** Measured density of the solution, kg/m3, and temperature of the stated volume, K; NaN where not given. */
  readonly solutionDensity: Float64Array;
  readonly volumeTemperatureK: Float64Array;
  /** Assumptions made, `; ` between them (`texts`). */
  readonly assumptions: Int32Array;
  readonly method: Int32Array;
  /** Number or letter of the replicate, where the source states one (`texts`). */
  readonly replicate: Int32Array;
  readonly reference: Int32Array;
  readonly doi: Int32Array;
  /** Carried columns as `heading=value; heading=value` (`texts`). */
  readonly carried: Int32Array;
  readonly texts: Dictionary;
}

const WHOLE = [
  ...["source", "line", "column", "identity", "reportedText", "reportedUnit"],
  ...["temperatureUnit", "soluteBasis", "assumptions", "method", "replicate", "reference", "doi", "carried"],
] as const;
const REAL = [
  ...["temperatureK", "temperatureU", "reportedValue", "valueLow", "valueHigh", "massRatioLow", "massRatioHigh"],
  ...["massRatio", "moleFraction", "massConcentration", "molPerL", "relativeU", "sharedU"],
  ...["solutionDensity", "volumeTemperatureK", "firstFraction", "secondFraction", "fractionU"],
] as const;

/** An empty table with room for `capacity` rows; numbers start as NaN, texts as "". */
export function createMeasurementTable(capacity: number): MeasurementTable {
  const whole = WHOLE.map((name) => [name, new Int32Array(capacity)] as const);
  const real = REAL.map((name) => [name, new Float64Array(capacity).fill(Number.NaN)] as const);
  return {
    count: 0,
    texts: createDictionary(),
    state: new Uint8Array(capacity),
    solidChecked: new Uint8Array(capacity),
    ...Object.fromEntries([...whole, ...real]),
  } as unknown as MeasurementTable;
}

/** Text behind a code of the table's dictionary. */
export function textOf(table: MeasurementTable, code: number): string {
  return table.texts.texts[code] ?? "";
}
