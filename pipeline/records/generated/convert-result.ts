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
   * Value, in the unit beside it; null where the basis is open and each reading has a value of its own.
   */
  value: number | null;
  /**
   * Unit asked for. No unit of its own.
   */
  unit: string;
  /**
   * Standard uncertainty of the value, in its unit; null where the basis is open.
   */
  standard_uncertainty: number | null;
  /**
   * Steps in their order.
   */
  steps: Step[];
  /**
   * What was assumed. No unit.
   */
  assumptions: string[];
  /**
   * What weakens the result: a density error amplified beyond use, an uncertainty too large for first order. No unit.
   */
  cautions?: string[];
  /**
   * What contributes to the standard uncertainty, largest first. Independent of one another: the root of the sum of their squares is the relative standard uncertainty.
   */
  budget?: BudgetPart[];
  /**
   * Where the basis is open: every way to read the value, converted; absent otherwise.
   */
  readings?: Reading[];
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
/**
 * One contribution to the uncertainty.
 */
export interface BudgetPart {
  /**
   * What it comes from. Text, no unit.
   */
  name: string;
  /**
   * Relative standard uncertainty it brings to the result, percent.
   */
  percent: number;
}
/**
 * One way to read a value whose basis is open.
 */
export interface Reading {
  /**
   * The unit, the solute basis, or both. Text, no unit.
   */
  reading: string;
  /**
   * Value under this reading, in the unit of the result; null where it cannot be converted.
   */
  value: number | null;
  /**
   * Standard uncertainty of the value, in its unit; null where it cannot be converted.
   */
  standard_uncertainty: number | null;
}
