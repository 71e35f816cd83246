import { describe, expect, test } from "vitest";
import { leastSquares } from "../../pipeline/numerics/least-squares.ts";
import { levenbergMarquardt, type NonlinearFit } from "../../pipeline/numerics/levenberg-marquardt.ts";
import { longley } from "./linear-data-sets.ts";
import { referenceValues, SKIPPED_WHERE_ABSENT, worstRelativeError } from "./reference-values.ts";
import { strdModels, strdResponse } from "./strd-nonlinear-models.ts";

interface DataSet {
  readonly name: string;
  readonly rows: readonly (readonly number[])[];
  readonly start1: readonly number[];
  readonly start2: readonly number[];
  readonly certified: { readonly parameters: number[]; readonly parameter_sd: number[]; readonly residual_ss: number };
}

function search({ name, rows }: Pick<DataSet, "name" | "rows">, start: readonly number[]): NonlinearFit {
  const model = strdModels[name]!;
  const responses = rows.map((row) => strdResponse(name, row[0]!));
  const predictors = rows.map((row) => row.slice(1));
  return levenbergMarquardt({
    n: rows.length,
    start: Float64Array.from(start),
    residuals: (b, result) => {
      for (let i = 0; i < rows.length; i++) result[i] = responses[i]! - model(b, predictors[i]!);
    },
  });
}

function standardDeviations(
  { parameters, residualSumOfSquares, unscaledCovariance }: NonlinearFit,
  n: number,
): number[] {
  const p = parameters.length;
  return Array.from({ length: p }, (_, j) =>
    Math.sqrt((residualSumOfSquares / (n - p)) * unscaledCovariance[j * p + j]!),
  );
}

// NIST/ITL Statistical Reference Datasets, Nonlinear Least Squares Regression: data, starts and certified values.
const misra1a: DataSet = {
  name: "Misra1a",
  rows: [
    [10.07, 77.6],
    [14.73, 114.9],
    [17.94, 141.1],
    [23.93, 190.8],
    [29.61, 239.9],
    [35.18, 289],
    [40.02, 332.8],
    [44.82, 378.4],
    [50.76, 434.8],
    [55.05, 477.3],
    [61.01, 536.8],
    [66.4, 593.1],
    [75.47, 689.1],
    [81.78, 760],
  ],
  start1: [500, 0.0001],
  start2: [250, 0.0005],
  certified: {
    parameters: [238.94212918, 0.00055015643181],
    parameter_sd: [2.7070075241, 7.2668688436e-6],
    residual_ss: 0.12455138894,
  },
};
const mgh09: DataSet = {
  name: "MGH09",
  rows: [
    [0.1957, 4],
    [0.1947, 2],
    [0.1735, 1],
    [0.16, 0.5],
    [0.0844, 0.25],
    [0.0627, 0.167],
    [0.0456, 0.125],
    [0.0342, 0.1],
    [0.0323, 0.0833],
    [0.0235, 0.0714],
    [0.0246, 0.0625],
  ],
  start1: [25, 39, 41.5, 39],
  start2: [0.25, 0.39, 0.415, 0.39],
  certified: {
    parameters: [0.19280693458, 0.19128232873, 0.12305650693, 0.13606233068],
    parameter_sd: [0.011435312227, 0.19633220911, 0.080842031232, 0.090025542308],
    residual_ss: 0.00030750560385,
  },
};

describe("certified values of the NIST nonlinear reference sets", () => {
  test.each([misra1a, mgh09])("$name is solved from both starts to 7 digits, with its standard deviations", (set) => {
    for (const start of [set.start1, set.start2]) {
      const found = search(set, start);
      expect(found.status).toBe("converged");
      expect(worstRelativeError(found.parameters, set.certified.parameters)).toBeLessThan(1e-7);
      expect(found.residualSumOfSquares).toBeCloseTo(set.certified.residual_ss, 10);
      const sds = standardDeviations(found, set.rows.length);
      expect(worstRelativeError(sds, set.certified.parameter_sd)).toBeLessThan(1e-6);
    }
  });

  const collection = referenceValues<{ datasets: DataSet[] }>("02-nist-strd-nonlinear.json");
  // From its first start this one creeps along a bent valley; the search must then not claim to have a solution.
  const unsolved = ["MGH10 start1"];

  test.skipIf(!collection)(`53 of the 54 searches reach 6 digits and the other says so ${SKIPPED_WHERE_ABSENT}`, () => {
    for (const set of collection!.datasets) {
      for (const which of ["start1", "start2"] as const) {
        const name = `${set.name} ${which}`;
        const found = search(set, set[which]);
        if (unsolved.includes(name)) {
          expect(found.status, name).not.toBe("converged");
          continue;
        }
        expect(found.status, name).toBe("converged");
        expect(worstRelativeError(found.parameters, set.certified.parameters), name).toBeLessThan(1e-6);
        // Lanczos1 is fitted to the last digit of the data: its residuals are rounding error.
        if (set.name === "Lanczos1") continue;
        const sds = standardDeviations(found, set.rows.length);
        expect(worstRelativeError(sds, set.certified.parameter_sd), `${name} SD`).toBeLessThan(1e-6);
      }
    }
  });
});

describe("behaviour", () => {
  test("a linear problem is solved like one, whatever the start", () => {
    const n = longley.response.length;
    const residuals = (b: Float64Array, result: Float64Array) => {
      longley.rows.forEach((row, i) => {
        result[i] = longley.response[i]! - row.reduce((sum, x, j) => sum + x * b[j]!, 0);
      });
    };
    const jacobian = (_: Float64Array, result: Float64Array) => {
      result.set(longley.rows.flat().map((x) => -x));
    };
    const found = levenbergMarquardt({ n, start: new Float64Array(7), residuals, jacobian });
    expect(found.status).toBe("converged");
    expect(worstRelativeError(found.parameters, longley.coefficients)).toBeLessThan(1e-8);
    const linear = leastSquares(Float64Array.from(longley.rows.flat()), Float64Array.from(longley.response), n, 7);
    expect(worstRelativeError(found.unscaledCovariance, [...linear.unscaledCovariance])).toBeLessThan(1e-8);
  });

  test("a start at the solution stays there", () => {
    const residuals = (b: Float64Array, result: Float64Array) => {
      for (let i = 0; i < 4; i++) result[i] = Math.exp(b[0]! * i) - Math.exp(0.5 * i);
    };
    const found = levenbergMarquardt({ n: 4, start: Float64Array.of(0.5), residuals });
    expect([found.status, found.iterations, found.parameters[0]]).toEqual(["converged", 0, 0.5]);
  });

  test("steps out of the domain of the model are drawn back", () => {
    const residuals = (b: Float64Array, result: Float64Array) => {
      for (let i = 1; i <= 5; i++) result[i - 1] = Math.log(b[0]! * i) - Math.log(0.01 * i);
    };
    const found = levenbergMarquardt({ n: 5, start: Float64Array.of(1), residuals });
    expect(found.status).toBe("converged");
    expect(found.parameters[0]).toBeCloseTo(0.01, 10);
  });

  test("a parameter without effect leaves the rank short and is not called solved", () => {
    const residuals = (b: Float64Array, result: Float64Array) => {
      for (let i = 0; i < 5; i++) result[i] = i - b[0]! * i + 0.1 * (i % 2);
    };
    const found = levenbergMarquardt({ n: 5, start: Float64Array.of(3, 1), residuals });
    expect(found.status).toBe("stalled");
    expect(found.rank).toBe(1);
    expect(found.unscaledCovariance[3]).toBeNaN();
  });

  test("too many iterations end the search and are reported", () => {
    const start = Float64Array.from(misra1a.start1);
    const residuals = (b: Float64Array, result: Float64Array) => {
      misra1a.rows.forEach(([y, x], i) => {
        result[i] = y! - strdModels.Misra1a!(b, [x!]);
      });
    };
    const found = levenbergMarquardt({ n: 14, start, residuals, maxIterations: 2 });
    expect([found.status, found.iterations]).toEqual(["iteration-limit", 2]);
    expect([...start]).toEqual(misra1a.start1);
  });

  test("fewer residuals than parameters, and a start without finite residuals, are refused", () => {
    const nothing = (_: Float64Array, result: Float64Array) => result.fill(Number.NaN);
    expect(() => levenbergMarquardt({ n: 1, start: new Float64Array(2), residuals: nothing })).toThrow(
      /1 residuals for 2/,
    );
    expect(() => levenbergMarquardt({ n: 2, start: new Float64Array(1), residuals: nothing })).toThrow(/start/);
  });
});
