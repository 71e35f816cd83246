import { describe, expect, test } from "vitest";
import { normalCdf } from "../../pipeline/numerics/distributions.ts";
import { seededRandom } from "../../pipeline/numerics/random.ts";

const draws = (seed: number, count: number, draw: "uniform" | "normal") => {
  const random = seededRandom(seed);
  return Array.from({ length: count }, () => random[draw]());
};

/** Largest distance between the empirical and the expected distribution function (Kolmogorov's D). */
function largestGap(values: number[], cdf: (x: number) => number): number {
  const sorted = values.sort((a, b) => a - b);
  return sorted.reduce((gap, x, i) => Math.max(gap, Math.abs(cdf(x) - (i + 0.5) / sorted.length)), 0);
}

describe("a seeded stream", () => {
  test("is the same for the same seed and another for the next", () => {
    expect(draws(7, 20, "normal")).toEqual(draws(7, 20, "normal"));
    expect(draws(7, 20, "normal")).not.toEqual(draws(8, 20, "normal"));
  });

  test("is pinned, so that editions stay the same from release to release", () => {
    expect(draws(1, 3, "uniform")).toMatchInlineSnapshot(`
      [
        0.19360545298544574,
        0.8860896801482063,
        0.8459874773872855,
      ]
    `);
  });

  test("has uniform and normal deviates within Kolmogorov's 0.1 % limit of their laws", () => {
    const n = 20000;
    const limit = 1.95 / Math.sqrt(n);
    expect(largestGap(draws(1, n, "uniform"), (x) => x)).toBeLessThan(limit);
    expect(largestGap(draws(2, n, "normal"), normalCdf)).toBeLessThan(limit);
  });

  test("starts unrelated for neighbouring seeds", () => {
    const n = 2000;
    const first = Array.from({ length: n }, (_, seed) => seededRandom(seed).uniform());
    expect(largestGap([...first], (x) => x)).toBeLessThan(1.95 / Math.sqrt(n));
    const product = first.slice(1).reduce((sum, x, i) => sum + (x - 0.5) * (first[i]! - 0.5), 0);
    expect(Math.abs((12 * product) / n)).toBeLessThan(4 / Math.sqrt(n));
  });

  test("draws each integer below n about equally often", () => {
    const random = seededRandom(3);
    const counts = [0, 0, 0, 0, 0, 0, 0];
    for (let i = 0; i < 7000; i++) counts[random.integerBelow(7)]! += 1;
    const chiSquare = counts.reduce((sum, count) => sum + (count - 1000) ** 2 / 1000, 0);
    expect(chiSquare).toBeLessThan(22.46); // upper 0.1 % point with 6 degrees of freedom
  });

  test("refuses a seed that is not an integer", () => {
    expect(() => seededRandom(1.5)).toThrow(/seed/);
    expect(() => seededRandom(Number.NaN)).toThrow(RangeError);
  });
});
