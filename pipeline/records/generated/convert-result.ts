// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.

/**
 * What `saltern convert --json` prints: one conversion with its uncertainty, every step and assumption.
 */
export interface ConvertResult {
  /**
   * Version of this format. No unit.
   */
  format: 1;
  /**
   * Value, in the unit beside it.
   */
  value: number;
  /**
   * Unit asked for. No unit of its own.
   */
  unit: string;
  /**
   * Standard uncertainty of the value, in its unit.
   */
  standard_uncertainty: number;
  /**
   * Steps in their order.
   */
  steps: Step[];
  /**
   * What was assumed. No unit.
   */
  assumptions: string[];
}
/**
 * One step of a conversion.
 */
export interface Step {
  /**
   * Equation used. No unit.
   */
  equation: string;
  /**
   * Symbol of what the step gives. No unit.
   */
  symbol: string;
  /**
   * Result of the step, in the unit beside it.
   */
  value: number;
  /**
   * Unit of the result; 1 for a number. No unit of its own.
   */
  unit: string;
  /**
   * Properties the step needed.
   */
  properties: UsedProperty[];
}
/**
 * A property that a step needed.
 */
export interface UsedProperty {
  /**
   * What it is. Text, no unit.
   */
  name: string;
  /**
   * Symbol in the equation. No unit.
   */
  symbol: string;
  /**
   * Value, in the unit beside it.
   */
  value: number;
  /**
   * Unit of the value. No unit of its own.
   */
  unit: string;
  /**
   * Standard uncertainty, in that unit.
   */
  standard_uncertainty?: number;
  /**
   * Where it comes from. Text, no unit.
   */
  reference?: string;
}
