import { type MixtureRange, requireInsideMixture } from "./mixture-range.ts";

/**
 * The Jouyban-Acree-van 't Hoff equation of a saturated solution in a binary solvent:
 *
 *   ln x = w1 (A1 + B1/T) + w2 (A2 + B2/T) + (w1 w2/T) [J0 + J1 (w1 - w2) + J2 (w1 - w2)^2]
 *
 * - x  mole fraction of the solute in the solution [1] (or mass ratio, where no molar mass is known)
 * - w1, w2 = 1 - w1  mass fractions of the solvents in the solvent, free of solute [1]
 * - T  thermodynamic temperature [K]
 * - A1, A2 [1], B1, B2 [K]  van 't Hoff coefficients of the pure solvents
 * - J0, J1, J2 [K]  what the mixture adds; none, one, two or all three of them
 *
 * Published forms use mass, volume or mole fractions: coefficients belong to the fraction they were fitted with. Valid
 * inside the compositions and temperatures fitted only; the deviations of the equation from series that were measured
 * one composition at a time are a few percent, where water takes part often more.
 * @see Acree, Thermochim. Acta 198 (1992) 71-79, for the terms in w1 w2; Jouyban, J. Pharm. Pharm. Sci. 11 (2008) 32-58
 *   (both from memory, not verified).
 */
export interface JouybanAcree {
  /** A1, B1, A2, B2, then J0 and on. */
  readonly coefficients: readonly number[];
  readonly range: MixtureRange;
}

/** Coefficients of the two pure solvents; a term J comes on top of them. */
export const PURE_COEFFICIENTS = 4;
/** Most terms J. */
export const MOST_TERMS = 3;

/** Names of the coefficients of a model with so many terms J, in order. */
export function coefficientNames(terms: number): readonly string[] {
  return ["A1", "B1", "A2", "B2", "J0", "J1", "J2"].slice(0, PURE_COEFFICIENTS + terms);
}

/**
 * ln x at mass fraction w1 of the first solvent and T (K).
 *
 * @throws RangeError if the composition or T lies outside `range` or is not a number.
 * @example // half and half at 298.15 K: 0.5 (5 - 2000/T) + 0.5 (1 - 2500/T) + 0.25 (800/T)
 * lnValue({ coefficients: [5, -2000, 1, -2500, 800], range }, 0.5, 298.15) // -3.875734
 */
export function lnValue({ coefficients, range }: JouybanAcree, fraction: number, temperatureK: number): number {
  requireInsideMixture("Jouyban-Acree-van 't Hoff", fraction, temperatureK, range);
  const [A1 = 0, B1 = 0, A2 = 0, B2 = 0, ...J] = coefficients;
  const [w1, w2] = [fraction, 1 - fraction];
  const excess = J.reduce((sum, j, i) => sum + j * (w1 - w2) ** i, 0);
  return w1 * (A1 + B1 / temperatureK) + w2 * (A2 + B2 / temperatureK) + (w1 * w2 * excess) / temperatureK;
}

/**
 * Writes the design row in the centred basis at position `at` of `row`: with u = T0/T - 1,
 * (w1, w1 u, w2, w2 u, w1 w2 (1 + u) (w1 - w2)^i for i = 0 to terms - 1).
 *
 * @param centreK T0, K; the harmonic mean temperature
 * @param terms number of terms J, 0 to 3
 */
export function writeDesignRow(
  row: Float64Array,
  at: number,
  fraction: number,
  temperatureK: number,
  centreK: number,
  terms: number,
): void {
  const [w1, w2] = [fraction, 1 - fraction];
  const u = (centreK - temperatureK) / temperatureK;
  row[at] = w1;
  row[at + 1] = w1 * u;
  row[at + 2] = w2;
  row[at + 3] = w2 * u;
  let excess = w1 * w2 * (1 + u);
  for (let i = 0; i < terms; i++) {
    row[at + PURE_COEFFICIENTS + i] = excess;
    excess *= w1 - w2;
  }
}

/**
 * Matrix M (p x p, row-major) with (A1, B1, A2, B2, J0 ...) = M (centred coefficients): A = a - b, B = T0 b, J = T0 j.
 *
 * @param centreK T0, K
 * @param terms number of terms J, 0 to 3
 */
export function publishedFromCentred(centreK: number, terms: number): Float64Array {
  const p = PURE_COEFFICIENTS + terms;
  const matrix = new Float64Array(p * p);
  for (const at of [0, 2]) {
    matrix[at * p + at] = 1;
    matrix[at * p + at + 1] = -1;
    matrix[(at + 1) * p + at + 1] = centreK;
  }
  for (let i = PURE_COEFFICIENTS; i < p; i++) matrix[i * p + i] = centreK;
  return matrix;
}
