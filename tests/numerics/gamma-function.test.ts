import { describe, expect, test } from "vitest";
import { devianceTerm, logGamma, poissonTerm, stirlingError } from "../../pipeline/numerics/gamma-function.ts";
import { incompleteBeta } from "../../pipeline/numerics/incomplete-beta.ts";
import { lowerIncompleteGamma, upperIncompleteGamma } from "../../pipeline/numerics/incomplete-gamma.ts";
import { relativeError } from "./reference-values.ts";

describe("ln Gamma", () => {
  test("at whole numbers is the logarithm of a factorial", () => {
    let factorial = 1;
    for (let n = 1; n <= 20; n++) {
      expect(Math.abs(logGamma(n) - Math.log(factorial))).toBeLessThan(1e-13);
      factorial *= n;
    }
  });

  test.each([0.5, 1.5, 7.5, 15.5, 16.5, 40.5])("at %s follows from Gamma(1/2) = sqrt(pi) by recurrence", (x) => {
    let product = Math.sqrt(Math.PI);
    for (let k = 0.5; k < x; k++) product *= k;
    expect(relativeError(Math.exp(logGamma(x)), product)).toBeLessThan(1e-12);
  });

  test.each([0.01, 0.3, 3.7, 15.99, 16.01, 100])("satisfies the recurrence at %s", (x) => {
    expect(logGamma(x + 1) - logGamma(x)).toBeCloseTo(Math.log(x), 12);
  });

  test("is refused outside its domain", () => {
    expect(() => logGamma(0)).toThrow(RangeError);
    expect(() => logGamma(Number.NaN)).toThrow(RangeError);
  });
});

test("the error of Stirling's formula is continuous where its evaluation changes, and about 1 / 12x", () => {
  expect(relativeError(stirlingError(15.9999999), stirlingError(16.0000001))).toBeLessThan(1e-7);
  expect(stirlingError(1000)).toBeCloseTo(1 / 12000, 10);
});

test("the deviance term keeps its digits for nearly equal arguments", () => {
  // x ln(x / m) + m - x = d^2 / (2m) - d^3 / (6m^2) + ... with d = x - m
  const [m, d] = [1e8, 1];
  expect(relativeError(devianceTerm(m + d, m), d ** 2 / (2 * m) - d ** 3 / (6 * m * m))).toBeLessThan(1e-12);
});

test("Poisson terms of a whole mean add up to 1", () => {
  let sum = Math.exp(-9);
  for (let k = 1; k < 80; k++) sum += poissonTerm(k, 9);
  expect(sum).toBeCloseTo(1, 13);
});

test("the incomplete gamma function of a whole parameter is a Poisson sum", () => {
  let sum = 0;
  let term = Math.exp(-4);
  for (let k = 0; k < 6; k++) {
    sum += term;
    term *= 4 / (k + 1);
  }
  expect(relativeError(upperIncompleteGamma(6, 4), sum)).toBeLessThan(1e-13);
  expect(lowerIncompleteGamma(6, 4) + upperIncompleteGamma(6, 4)).toBeCloseTo(1, 14);
});

test("the incomplete beta function is symmetric and algebraic for b = 1", () => {
  expect(relativeError(incompleteBeta(0.3, 0.7, 2.5, 1), 0.3 ** 2.5)).toBeLessThan(1e-13);
  expect(incompleteBeta(0.3, 0.7, 40, 70) + incompleteBeta(0.7, 0.3, 70, 40)).toBeCloseTo(1, 14);
  expect(relativeError(incompleteBeta(1e-30, 1, 3, 1), 1e-90)).toBeLessThan(1e-12);
});
