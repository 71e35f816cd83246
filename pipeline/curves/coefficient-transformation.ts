/**
 * y = M x for a square matrix.
 *
 * @param matrix p x p, row-major
 * @param vector p values
 */
export function transformCoefficients(matrix: ArrayLike<number>, vector: ArrayLike<number>, p: number): number[] {
  return Array.from({ length: p }, (_, i) => {
    let sum = 0;
    for (let j = 0; j < p; j++) sum += matrix[i * p + j]! * vector[j]!;
    return sum;
  });
}

/**
 * Covariance of y = M x, M C M'. Made exactly symmetric, so that no output depends on the order of summation.
 *
 * @param matrix M, p x p, row-major
 * @param covariance C, p x p, row-major, symmetric
 */
export function transformCovariance(matrix: ArrayLike<number>, covariance: ArrayLike<number>, p: number): number[] {
  const half = new Array<number>(p * p).fill(0);
  for (let i = 0; i < p; i++)
    for (let j = 0; j < p; j++)
      for (let k = 0; k < p; k++) half[i * p + j]! += matrix[i * p + k]! * covariance[k * p + j]!;
  const out = new Array<number>(p * p).fill(0);
  for (let i = 0; i < p; i++)
    for (let j = i; j < p; j++) {
      let sum = 0;
      for (let k = 0; k < p; k++) sum += half[i * p + k]! * matrix[j * p + k]!;
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
export function quadraticForm(covariance: ArrayLike<number>, row: ArrayLike<number>, p: number): number {
  let sum = 0;
  for (let i = 0; i < p; i++) for (let j = 0; j < p; j++) sum += row[i]! * covariance[i * p + j]! * row[j]!;
  return sum;
}
