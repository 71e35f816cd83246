import { describe, expect, test } from "vitest";
import { correlationOfResults, propagate } from "../../pipeline/bases/uncertainty.ts";

const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
const covariance = (a: readonly number[], b: readonly number[]) =>
  a.reduce((sum, value, i) => sum + (value - mean(a)) * ((b[i] ?? Number.NaN) - mean(b)), 0) / (a.length - 1);

// JCGM 100:2008 (GUM), Annex H.2, tables H.2 to H.4: resistance, reactance and impedance from simultaneous readings.
describe("GUM H.2", () => {
  const series = [
    [5.007, 4.994, 5.005, 4.99, 4.999],
    [19.663e-3, 19.639e-3, 19.64e-3, 19.685e-3, 19.678e-3],
    [1.0456, 1.0438, 1.0468, 1.0428, 1.0433],
  ];
  const [V = Number.NaN, I = Number.NaN, phi = Number.NaN] = series.map(mean);
  const u = series.map((values) => Math.sqrt(covariance(values, values) / values.length));
  const correlation = series.flatMap((a) =>
    series.map((b) => covariance(a, b) / Math.sqrt(covariance(a, a) * covariance(b, b))),
  );
  const R = (V * Math.cos(phi)) / I;
  const X = (V * Math.sin(phi)) / I;
  const Z = V / I;
  const ofR = [R / V, -R / I, -X];
  const ofX = [X / V, -X / I, R];
  const ofZ = [Z / V, -Z / I, 0];

  test("the correlations of the inputs are the published -0.36, 0.86 and -0.65", () => {
    expect(correlation[1]).toBeCloseTo(-0.36, 2);
    expect(correlation[2]).toBeCloseTo(0.86, 2);
    expect(correlation[5]).toBeCloseTo(-0.65, 2);
  });

  test("with correlation u(R), u(X) and u(Z) are 0.071, 0.295 and 0.236", () => {
    expect(R).toBeCloseTo(127.732, 3);
    expect(propagate(ofR, u, correlation).standardUncertainty).toBeCloseTo(0.071071407397, 9);
    expect(propagate(ofX, u, correlation).standardUncertainty).toBeCloseTo(0.295581677359, 9);
    expect(propagate(ofZ, u, correlation).standardUncertainty).toBeCloseTo(0.236336130082, 9);
  });

  test("with correlation neglected they would be 0.195, 0.201 and 0.204", () => {
    expect(propagate(ofR, u).standardUncertainty).toBeCloseTo(0.195, 3);
    expect(propagate(ofX, u).standardUncertainty).toBeCloseTo(0.201, 3);
    expect(propagate(ofZ, u).standardUncertainty).toBeCloseTo(0.204, 3);
  });

  test("the results are correlated by -0.588, -0.485 and 0.993", () => {
    expect(correlationOfResults(ofR, ofX, u, correlation)).toBeCloseTo(-0.588, 3);
    expect(correlationOfResults(ofR, ofZ, u, correlation)).toBeCloseTo(-0.485, 3);
    expect(correlationOfResults(ofX, ofZ, u, correlation)).toBeCloseTo(0.993, 3);
  });
});

/** A product of powers: sensitivities are exponent * y / x. */
function productOfPowers(factor: number, inputs: readonly (readonly [value: number, u: number, exponent: 1 | -1])[]) {
  const y = inputs.reduce((product, [value, , exponent]) => product * value ** exponent, factor);
  const sensitivities = inputs.map(([value, , exponent]) => (exponent * y) / value);
  return {
    y,
    ...propagate(
      sensitivities,
      inputs.map(([, u]) => u),
    ),
  };
}

// EURACHEM/CITAC Guide CG 4, Quantifying Uncertainty in Analytical Measurement, 2nd ed. 2000, Appendix A.
describe("EURACHEM/CITAC examples", () => {
  test("A1, cadmium standard: 1002.7 mg/L, u = 0.9 mg/L", () => {
    const result = productOfPowers(1000, [
      [100.28, 0.05, 1],
      [0.9999, 0.000058, 1],
      [100.0, 0.07, -1],
    ]);
    expect(result.y).toBeCloseTo(1002.7, 1);
    expect(result.standardUncertainty).toBeCloseTo(0.863702590151, 9);
    expect(result.contributions[0]).toBeCloseTo(0.49995, 9);
    expect(result.contributions[2]).toBeCloseTo(-0.701889804, 9);
  });

  test("A2, standardisation of sodium hydroxide: 0.10214 mol/L, u = 0.00010 mol/L", () => {
    const result = productOfPowers(1000, [
      [1, 0.0005, 1],
      [0.3888, 0.00013, 1],
      [1, 0.00029, 1],
      [204.2212, 0.0038, -1],
      [18.64, 0.013, -1],
    ]);
    expect(result.y).toBeCloseTo(0.10214, 5);
    expect(result.standardUncertainty).toBeCloseTo(9.86365520824e-5, 13);
  });

  // The guide prints u = 0.00016, but the inputs of its own table A3.1 combine to 0.00019.
  test("A3, titration of hydrochloric acid: 0.10139 mol/L, u = 0.00019 mol/L from its tabulated inputs, not the printed 0.00016", () => {
    const result = productOfPowers(1000, [
      [1, 0.001, 1],
      [0.3888, 0.00013, 1],
      [1, 0.00029, 1],
      [14.89, 0.015, 1],
      [18.64, 0.016, -1],
      [204.2212, 0.0038, -1],
      [15, 0.011, -1],
    ]);
    expect(result.y).toBeCloseTo(0.10139, 5);
    expect(result.standardUncertainty).toBeCloseTo(0.000189288747958, 12);
    expect(Math.abs(result.standardUncertainty - 0.00016)).toBeGreaterThan(2e-5);
  });

  test("A2, step 3: the molar mass of potassium hydrogen phthalate is 204.2212 g/mol, u = 0.0038 g/mol", () => {
    const counts = [8, 5, 4, 1];
    const weights = [12.0107, 1.00794, 15.9994, 39.0983];
    const u = [0.0008, 0.00007, 0.0003, 0.0001].map((quoted) => quoted / Math.sqrt(3));
    expect(counts.reduce((sum, count, i) => sum + count * (weights[i] ?? 0), 0)).toBeCloseTo(204.2212, 4);
    expect(propagate(counts, u).standardUncertainty).toBeCloseTo(0.00376530211271, 13);
  });
});

test("fully correlated inputs add with sign, and rounding never makes a variance negative", () => {
  expect(propagate([1, 1], [0.3, 0.4], [1, 1, 1, 1]).standardUncertainty).toBeCloseTo(0.7, 14);
  expect(propagate([1, -1], [0.1, 0.1], [1, 1, 1, 1]).standardUncertainty).toBe(0);
  expect(propagate([3, -1], [0.1, 0.3], [1, 1 + 1e-16, 1 + 1e-16, 1]).standardUncertainty).toBeLessThan(1e-8);
});

test("inputs that do not belong together are refused", () => {
  expect(() => propagate([1, 2], [0.1])).toThrow(RangeError);
  expect(() => propagate([1], [-0.1])).toThrow(RangeError);
  expect(() => propagate([1], [Number.NaN])).toThrow(RangeError);
  expect(() => propagate([1, 1], [0.1, 0.1], [1, 0])).toThrow(RangeError);
});
