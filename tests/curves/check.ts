import { expect } from "vitest";

/** Derivative by a five-point central difference, good to about 1e-9 of its value. */
export function numericDerivative(f: (x: number) => number, x: number, h = 0.02): number {
  return (8 * (f(x + h) - f(x - h)) - (f(x + 2 * h) - f(x - 2 * h))) / (12 * h);
}

/** Requires agreement within a relative deviation. */
export function expectRelative(found: number, expected: number, relative: number): void {
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));
}
