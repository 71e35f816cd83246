import fc from "fast-check";
import { inverse, Matrix } from "ml-matrix";
import { describe, expect, test } from "vitest";
import {
  createGroupedModel,
  deletedDeviations,
  expected,
  fitGroupedModel,
  type GroupedRows,
  groupVariance,
  logMarginalDensity,
  priorFromPosterior,
} from "../../pipeline/numerics/grouped-model.ts";

/** A small data set with its prior (diagonal) and offset variances. */
interface Small {
  readonly rows: GroupedRows;
  readonly use: Uint8Array;
  readonly prior: readonly number[];
  readonly offsetVariance: readonly number[];
}

const small = fc
  .integer({ min: 1, max: 9 })
  .chain((n) =>
    fc.record({
      x: fc.array(fc.double({ min: -2, max: 2, noNaN: true }), { minLength: n, maxLength: n }),
      y: fc.array(fc.double({ min: -3, max: 3, noNaN: true }), { minLength: n, maxLength: n }),
      d: fc.array(fc.double({ min: 0.01, max: 1, noNaN: true }), { minLength: n, maxLength: n }),
      group: fc.array(fc.integer({ min: 0, max: 2 }), { minLength: n, maxLength: n }),
      use: fc.array(fc.boolean(), { minLength: n, maxLength: n }),
      offset: fc.array(fc.double({ min: 0.01, max: 4, noNaN: true }), { minLength: 3, maxLength: 3 }),
    }),
  )
  .map(
    ({ x, y, d, group, use, offset }): Small => ({
      rows: {
        n: x.length,
        design: Float64Array.from(x.flatMap((value) => [1, value])),
        stride: 2,
        response: Float64Array.from(y),
        variance: Float64Array.from(d),
        group: Int32Array.from(group),
      },
      use: Uint8Array.from(use, Number),
      prior: [0.1, 0.3],
      offsetVariance: offset,
    }),
  );

function fitted({ rows, use, prior, offsetVariance }: Small) {
  const model = createGroupedModel(2, 3);
  prior.forEach((precision, j) => {
    model.prior[j * 2 + j] = precision;
  });
  model.groups = 3;
  model.offsetVariance.set(offsetVariance);
  fitGroupedModel(model, rows, use);
  return model;
}

/** K between two rows of the data set, without noise. */
function covariance({ rows, prior, offsetVariance }: Small, i: number, j: number): number {
  const f = (row: number, column: number) => rows.design[row * 2 + column]!;
  const curve = (f(i, 0) * f(j, 0)) / prior[0]! + (f(i, 1) * f(j, 1)) / prior[1]!;
  return curve + (rows.group[i] === rows.group[j] ? offsetVariance[rows.group[i]!]! : 0);
}

/** Mean and variance of row i given the rows `given`, by the conditional normal law with K formed. */
function conditional(data: Small, i: number, given: readonly number[]): { mean: number; variance: number } {
  const own = covariance(data, i, i) + data.rows.variance[i]!;
  if (given.length === 0) return { mean: 0, variance: own };
  const K = new Matrix(
    given.map((a) => given.map((b) => covariance(data, a, b) + (a === b ? data.rows.variance[a]! : 0))),
  );
  const k = new Matrix([given.map((a) => covariance(data, i, a))]);
  const y = Matrix.columnVector(given.map((a) => data.rows.response[a]!));
  const weights = k.mmul(inverse(K));
  return { mean: weights.mmul(y).get(0, 0), variance: own - weights.mmul(k.transpose()).get(0, 0) };
}

describe("the linear model with a random offset per group", () => {
  test("gives the deleted deviation and its variance that the conditional normal law gives with K formed", () => {
    fc.assert(
      fc.property(small, (data) => {
        const model = fitted(data);
        const n = data.rows.n;
        const [deviation, variance] = [new Float64Array(n), new Float64Array(n)];
        deletedDeviations(model, data.rows, data.use, deviation, variance);
        const used = [...Array(n).keys()].filter((i) => data.use[i] === 1);
        for (let i = 0; i < n; i++) {
          const want = conditional(
            data,
            i,
            used.filter((j) => j !== i),
          );
          expect(deviation[i]).toBeCloseTo(data.rows.response[i]! - want.mean, 8);
          expect(variance[i]! / want.variance).toBeCloseTo(1, 8);
        }
      }),
      { numRuns: 60 },
    );
  });

  test("gives the log density of the rows that the multivariate normal law gives, and chains it", () => {
    fc.assert(
      fc.property(small, (data) => {
        const used = [...Array(data.rows.n).keys()].filter((i) => data.use[i] === 1);
        let chained = 0;
        used.forEach((i, k) => {
          const { mean, variance } = conditional(data, i, used.slice(0, k));
          chained -= 0.5 * (Math.log(2 * Math.PI * variance) + (data.rows.response[i]! - mean) ** 2 / variance);
        });
        expect(logMarginalDensity(fitted(data), data.rows, data.use)).toBeCloseTo(chained, 6);
      }),
      { numRuns: 60 },
    );
  });

  test("predicts a group without rows as a new group: the curve, with the full offset variance", () => {
    const data: Small = {
      rows: {
        n: 3,
        design: Float64Array.of(1, -1, 1, 0, 1, 1),
        stride: 2,
        response: Float64Array.of(0, 1, 2),
        variance: Float64Array.of(0.01, 0.01, 0.01),
        group: Int32Array.of(0, 0, 0),
      },
      use: Uint8Array.of(1, 1, 1),
      prior: [1e-6, 1e-6],
      offsetVariance: [0.04, 0.04, 0.04],
    };
    const model = fitted(data);
    const row = Float64Array.of(1, 0);
    expect(expected(model, row, 0)).toBeCloseTo(1, 4);
    expect(model.offsets[2]).toBe(0);
    // Mean of three points (0.01/3), the offset of the one group seen (0.04), that of the new group (0.04).
    expect(groupVariance(model, row, 0, 2)).toBeCloseTo(0.01 / 3 + 0.04 + 0.04, 4);
  });

  test("gives the density of a new series when the posterior of one model becomes the prior of another", () => {
    const first = fitted({
      rows: {
        n: 2,
        design: Float64Array.of(1, -1, 1, 1),
        stride: 2,
        response: Float64Array.of(0.5, 0.5),
        variance: Float64Array.of(0.1, 0.1),
        group: Int32Array.of(0, 0),
      },
      use: Uint8Array.of(1, 1),
      prior: [1, 1],
      offsetVariance: [0.1, 0.1, 0.1],
    });
    const second = createGroupedModel(2, 1);
    priorFromPosterior(second, first);
    // The inverse of the inverse is the posterior precision again.
    const product = new Matrix([[...second.prior.slice(0, 2)], [...second.prior.slice(2, 4)]]).mmul(
      new Matrix([[...first.covariance.slice(0, 2)], [...first.covariance.slice(2, 4)]]),
    );
    expect(product.get(0, 0)).toBeCloseTo(1, 10);
    expect(product.get(0, 1)).toBeCloseTo(0, 10);
  });

  test("refuses coefficients that neither data nor prior determine", () => {
    const model = createGroupedModel(1, 1);
    const rows: GroupedRows = {
      n: 0,
      design: new Float64Array(1),
      stride: 1,
      response: new Float64Array(1),
      variance: new Float64Array(1),
      group: new Int32Array(1),
    };
    expect(() => fitGroupedModel(model, rows, new Uint8Array(1))).toThrow(
      new RangeError("Coefficient 1 of 1 is not determined; give it a prior"),
    );
  });
});
