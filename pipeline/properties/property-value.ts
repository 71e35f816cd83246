/** The value of a property with its standard uncertainty (same unit) and where it comes from. */
export interface PropertyValue {
  readonly value: number;
  readonly standardUncertainty: number;
  readonly reference: string;
}
