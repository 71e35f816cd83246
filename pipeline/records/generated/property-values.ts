// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * One line of property-values.csv: a property or a coefficient of a correlation, with its range and reference. A cell that may be empty is a property that may be absent.
 */
export interface PropertyValueInputRow {
  /**
   * Substance, by its name in substances.csv. No unit.
   */
  name: string;
  /**
   * Property, or coefficient of a named correlation. No unit.
   */
  property: string;
  /**
   * Value, in the unit beside it.
   */
  value: number;
  /**
   * Unit of the value; 1 for a number. No unit of its own.
   */
  unit: string;
  /**
   * Standard uncertainty, in the unit beside it; empty where not known.
   */
  standard_uncertainty?: number;
  /**
   * Lowest temperature at which it holds, K.
   */
  T_min_K?: number;
  /**
   * Highest temperature at which it holds, K.
   */
  T_max_K?: number;
  /**
   * Where it comes from. Text, no unit.
   */
  reference: string;
}

/** Columns of the table, in their order. */
export const PROPERTY_VALUES_COLUMNS = [
  "name",
  "property",
  "value",
  "unit",
  "standard_uncertainty",
  "T_min_K",
  "T_max_K",
  "reference"
] as const satisfies readonly (keyof PropertyValueInputRow)[];
