/**
 * y = M x for a square matrix.
 *
 * @param matrix p x p, row-major
 * @param vector p values
 */
export function transformCoefficients(matrix: Float64Array, vector: ArrayLike<number>): Float64Array {
  const p = vector.length;
  const out = new Float64Array(p);
  for (let i = 0; i < p; i++) {
    let sum = 0;
    for (let j = 0; j < p; j++) sum += (matrix[i * p + j] as number) * (vector[j] as number);
    out[i] = sum;
  }
  return out;
}

/**
 * Covariance of y = M x, M C M'. Made exactly symmetric, so that no output depends on the order of summation.
 *
 * @param matrix M, p x p, row-major
 * @param covariance C, p x p, row-major, symmetric
 * @param p number of coefficients
 */
export function transformCovariance(matrix: Float64Array, covariance: ArrayLike<number>, p: number): Float64Array {
  const half = new Float64Array(p * p);
  for (let i = 0; i < p; i++)
    for (let j = 0; j < p; j++)
      for (let k = 0; k < p; k++) half[i * p + j]! += (matrix[i * p + k] as number) * (covariance[k * p + j] as number);
  const out = new Float64Array(p * p);
  for (let i = 0; i < p; i++)
    for (let j = i; j < p; j++) {
      let sum = 0;
      for (let k = 0; k < p; k++) sum += (half[i * p + k] as number) * (matrix[j * p + k] as number);
      out[i * p + j] = sum;
      out[j * p + i] = sum;
    }
  return out;
}

/**
 * Quadratic form f' C f: the variance of a linear combination.
 *
 * @param covariance C, p x p, row-major
 * @param row f, p values
 */
export function quadraticForm(covariance: Float64Array, row: Float64Array): number {
  const p = row.length;
  let sum = 0;
  for (let i = 0; i < p; i++)
    for (let j = 0; j < p; j++) sum += (row[i] as number) * (covariance[i * p + j] as number) * (row[j] as number);
  return sum;
}
