import { MOST_TERMS, PURE_COEFFICIENTS, writeDesignRow } from "../../curves/jouyban-acree.ts";

/** Columns of a surface over composition and temperature, with what is known of their coefficients before the data. */
export interface Surface {
  readonly p: number;
  readonly writeRow: (row: Float64Array, at: number, fraction: number, temperatureK: number, centreK: number) => void;
  /** Standard deviation of each coefficient about 0 before the data; Infinity = none. */
  readonly priorSd: readonly number[];
}

/** The Jouyban-Acree-van 't Hoff equation with so many terms J, as it is published: nothing known before the data. */
export function publishedSurface(terms: number): Surface {
  return {
    p: PURE_COEFFICIENTS + terms,
    writeRow: (row, at, w, T, centreK) => writeDesignRow(row, at, w, T, centreK, terms),
    priorSd: new Array<number>(PURE_COEFFICIENTS + terms).fill(Number.POSITIVE_INFINITY),
  };
}

/**
 * The surface that limits and judgements rest on: all three terms J and a heat-capacity term for each pure solvent,
 * w (ln(T/T0) + T0/T - 1), whatever model is published. Priors keep it determined by few compositions.
 *
 * Standard deviations of the centred coefficients, common practice: slopes 15 (37 kJ/mol at 298 K), heat-capacity terms
 * 6 (50 J/(mol K)); J0/T0 20, J1/T0 4, J2/T0 2, wide against the 5.6, 3.7 and 1.5 at 298 K of the general
 * constants for drugs in ethanol + water, 724, 485 and 194 K for decadic logarithms (from memory, not verified).
 */
export const FLEXIBLE_SURFACE: Surface = {
  p: PURE_COEFFICIENTS + MOST_TERMS + 2,
  writeRow: (row, at, w, T, centreK) => {
    writeDesignRow(row, at, w, T, centreK, MOST_TERMS);
    const u = (centreK - T) / T;
    const curvature = u - Math.log1p(u);
    row[at + PURE_COEFFICIENTS + MOST_TERMS] = w * curvature;
    row[at + PURE_COEFFICIENTS + MOST_TERMS + 1] = (1 - w) * curvature;
  },
  priorSd: [Number.POSITIVE_INFINITY, 15, Number.POSITIVE_INFINITY, 15, 20, 4, 2, 6, 6],
};
