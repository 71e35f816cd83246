import { studentTQuantile } from "../numerics/distributions.ts";

/** Confidence of all limits. */
export const confidence = 0.95;

const NODES_PER_UNIT = 200;
const LEAST_DEGREES_OF_FREEDOM = 2;

/** Quantiles at 1/df = k/200, from which factors for any df are interpolated. */
const table = new Float64Array(NODES_PER_UNIT / LEAST_DEGREES_OF_FREEDOM + 4);
let filled = false;

/**
 * Two-sided 95 % factor of Student's t for any degrees of freedom, whole or not: 1.959964 for Infinity, 2.776445 for 4.
 *
 * Interpolated by a cubic in 1/df from 2 degrees of freedom up, to 1e-6; computed directly below. Limits are asked for
 * at every grid temperature of every curve, with other degrees of freedom each time.
 * @throws RangeError unless degreesOfFreedom is above 0.
 */
export function limitFactor(degreesOfFreedom: number): number {
  if (!(degreesOfFreedom >= LEAST_DEGREES_OF_FREEDOM)) return studentTQuantile((1 + confidence) / 2, degreesOfFreedom);
  if (!filled) fillTable();
  const position = NODES_PER_UNIT / degreesOfFreedom;
  const k = Math.max(1, Math.floor(position));
  const s = position - k;
  const [a, b, c, d] = [table[k - 1] as number, table[k] as number, table[k + 1] as number, table[k + 2] as number];
  return (
    (a * s * (s - 1) * (2 - s) + d * (s + 1) * s * (s - 1)) / 6 +
    (b * (s + 1) * (s - 1) * (s - 2) + c * (s + 1) * s * (2 - s)) / 2
  );
}

function fillTable(): void {
  for (let k = 0; k < table.length; k++)
    table[k] = studentTQuantile((1 + confidence) / 2, k === 0 ? Number.POSITIVE_INFINITY : NODES_PER_UNIT / k);
  filled = true;
}
