/**
 * Cholesky factorisation of a symmetric positive definite matrix, in place on a row-major Float64Array, with the
 * solves and the inverse that Gaussian models with correlated errors need. Nothing here allocates.
 */

/**
 * Replaces the lower triangle of the n x n matrix A by L with A = L L'; the strict upper triangle is not read.
 * Returns false, with the array part-way changed, if A is not positive definite to working precision
 * (a pivot of at most n eps times its diagonal element, or not a number).
 * @throws RangeError if the array holds fewer than n x n numbers.
 * @see Golub and Van Loan, Matrix Computations, 4th ed. (2013), section 4.2.
 */
export function choleskyFactorise(matrix: Float64Array, n: number): boolean {
  if (matrix.length < n * n) throw new RangeError(`Cholesky: ${matrix.length} numbers given, ${n} x ${n} needed`);
  for (let j = 0; j < n; j++) {
    const rowJ = j * n;
    const original = matrix[rowJ + j]!;
    let pivot = original;
    for (let k = 0; k < j; k++) pivot -= matrix[rowJ + k]! * matrix[rowJ + k]!;
    if (!(pivot > n * Number.EPSILON * original && pivot < Infinity)) return false;
    const root = Math.sqrt(pivot);
    matrix[rowJ + j] = root;
    for (let i = j + 1; i < n; i++) {
      const rowI = i * n;
      let sum = matrix[rowI + j]!;
      for (let k = 0; k < j; k++) sum -= matrix[rowI + k]! * matrix[rowJ + k]!;
      matrix[rowI + j] = sum / root;
    }
  }
  return true;
}

/** Solves L z = b in place: z whitens b, and z'z = b' A^-1 b. `start` is the place of b in the array. */
export function choleskyForward(factor: Float64Array, n: number, vector: Float64Array, start = 0): void {
  for (let i = 0; i < n; i++) {
    const row = i * n;
    let sum = vector[start + i]!;
    for (let k = 0; k < i; k++) sum -= factor[row + k]! * vector[start + k]!;
    vector[start + i] = sum / factor[row + i]!;
  }
}

/** Solves L' x = z in place. `start` is the place of z in the array. */
export function choleskyBackward(factor: Float64Array, n: number, vector: Float64Array, start = 0): void {
  for (let i = n - 1; i >= 0; i--) {
    let sum = vector[start + i]!;
    for (let k = i + 1; k < n; k++) sum -= factor[k * n + i]! * vector[start + k]!;
    vector[start + i] = sum / factor[i * n + i]!;
  }
}

/** Solves A x = b in place, given L from {@link choleskyFactorise}. `start` is the place of b in the array. */
export function choleskySolve(factor: Float64Array, n: number, vector: Float64Array, start = 0): void {
  choleskyForward(factor, n, vector, start);
  choleskyBackward(factor, n, vector, start);
}

/** Replaces L by the full symmetric A^-1 (both triangles), in place. */
export function choleskyInvert(factor: Float64Array, n: number): void {
  invertLower(factor, n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let k = i; k < n; k++) sum += factor[k * n + i]! * factor[k * n + j]!;
      factor[i * n + j] = sum;
    }
  }
  for (let i = 0; i < n; i++) for (let j = 0; j < i; j++) factor[j * n + i] = factor[i * n + j]!;
}

/** ln det A = 2 sum ln L_ii, given L from {@link choleskyFactorise}. */
export function choleskyLogDeterminant(factor: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += Math.log(factor[i * n + i]!);
  return 2 * sum;
}

function invertLower(factor: Float64Array, n: number): void {
  for (let j = 0; j < n; j++) {
    factor[j * n + j] = 1 / factor[j * n + j]!;
    for (let i = j + 1; i < n; i++) {
      let sum = 0;
      for (let k = j; k < i; k++) sum += factor[i * n + k]! * factor[k * n + j]!;
      factor[i * n + j] = -sum / factor[i * n + i]!;
    }
  }
}
