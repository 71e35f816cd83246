import fc from "fast-check";
import { CholeskyDecomposition, determinant, inverse, Matrix } from "ml-matrix";
import { describe, expect, test } from "vitest";
import {
  choleskyFactorise,
  choleskyForward,
  choleskyInvert,
  choleskyLogDeterminant,
  choleskySolve,
} from "../../pipeline/numerics/cholesky.ts";

/** B B' + I for a random B: symmetric and safely positive definite. */
const positiveDefinite = fc
  .integer({ min: 1, max: 8 })
  .chain((n) => fc.array(fc.double({ min: -2, max: 2, noNaN: true }), { minLength: n * n, maxLength: n * n }))
  .map((entries) => {
    const n = Math.sqrt(entries.length);
    const b = Matrix.from1DArray(n, n, entries);
    return Matrix.add(b.mmul(b.transpose()), Matrix.eye(n));
  });

describe("a symmetric positive definite matrix", () => {
  test("has the factor of ml-matrix, whose square is the matrix", () => {
    fc.assert(
      fc.property(positiveDefinite, (matrix) => {
        const n = matrix.rows;
        const factor = Float64Array.from(matrix.to1DArray());
        expect(choleskyFactorise(factor, n)).toBe(true);
        const oracle = new CholeskyDecomposition(matrix).lowerTriangularMatrix;
        for (let i = 0; i < n; i++) {
          for (let j = 0; j <= i; j++) expect(factor[i * n + j]).toBeCloseTo(oracle.get(i, j), 10);
        }
      }),
    );
  });

  test("times its solution gives the right-hand side, and whitening keeps the quadratic form", () => {
    fc.assert(
      fc.property(positiveDefinite, (matrix) => {
        const n = matrix.rows;
        const factor = Float64Array.from(matrix.to1DArray());
        choleskyFactorise(factor, n);
        const right = Float64Array.from({ length: n }, (_, i) => Math.cos(i));
        const solution = right.slice();
        choleskySolve(factor, n, solution);
        const product = matrix.mmul(Matrix.columnVector(solution)).to1DArray();
        product.forEach((value, i) => {
          expect(value).toBeCloseTo(right[i]!, 9);
        });
        const white = right.slice();
        choleskyForward(factor, n, white);
        const length = white.reduce((sum, z) => sum + z * z, 0);
        expect(length).toBeCloseTo(
          right.reduce((sum, b, i) => sum + b * solution[i]!, 0),
          9,
        );
      }),
    );
  });

  test("has the inverse and determinant of ml-matrix", () => {
    fc.assert(
      fc.property(positiveDefinite, (matrix) => {
        const n = matrix.rows;
        const factor = Float64Array.from(matrix.to1DArray());
        choleskyFactorise(factor, n);
        expect(choleskyLogDeterminant(factor, n)).toBeCloseTo(Math.log(determinant(matrix)), 9);
        choleskyInvert(factor, n);
        const oracle = inverse(matrix).to1DArray();
        oracle.forEach((value, i) => {
          expect(factor[i]).toBeCloseTo(value, 9);
        });
      }),
    );
  });
});

test("a right-hand side may stand anywhere in an array", () => {
  const factor = Float64Array.of(4, 0, 0, 9);
  choleskyFactorise(factor, 2);
  const vectors = Float64Array.of(7, 7, 4, 9);
  choleskySolve(factor, 2, vectors, 2);
  expect([...vectors]).toEqual([7, 7, 1, 1]);
});

test.each([
  ["indefinite", [1, 2, 2, 1]],
  ["singular but for rounding", [1, 1, 1, 1 + Number.EPSILON]],
  ["zero", [0, 0, 0, 0]],
  ["not a number", [Number.NaN, 0, 0, 1]],
  ["infinite", [Infinity, 0, 0, 1]],
])("a matrix that is %s is not factorised", (_, entries) => {
  expect(choleskyFactorise(Float64Array.from(entries), 2)).toBe(false);
});

test("too short an array is refused", () => {
  expect(() => choleskyFactorise(new Float64Array(3), 2)).toThrow(RangeError);
});
