const STEP = Math.cbrt(Number.EPSILON);

/**
 * dr_i / dparameter_j by central differences, row-major n x p, error about 1e-10 of the size of r where r is smooth.
 * The step is 6e-6 of the parameter (6e-6 itself for a parameter of 0). Where a side is not finite (edge of the
 * domain) the difference to the other side is used.
 */
export function centralDifferenceJacobian(
  residuals: (parameters: Float64Array, result: Float64Array) => void,
  parameters: Float64Array,
  n: number,
  result: Float64Array,
): void {
  const p = parameters.length;
  const shifted = Float64Array.from(parameters);
  const above = new Float64Array(n);
  const below = new Float64Array(n);
  const middle = new Float64Array(n);
  residuals(parameters, middle);
  for (let j = 0; j < p; j++) {
    const value = parameters[j]!;
    const step = STEP * (Math.abs(value) || 1);
    const high = value + step;
    const low = value - step;
    shifted[j] = high;
    residuals(shifted, above);
    shifted[j] = low;
    residuals(shifted, below);
    shifted[j] = value;
    for (let i = 0; i < n; i++) {
      if (!Number.isFinite(above[i]!)) result[i * p + j] = (middle[i]! - below[i]!) / (value - low);
      else if (!Number.isFinite(below[i]!)) result[i * p + j] = (above[i]! - middle[i]!) / (high - value);
      else result[i * p + j] = (above[i]! - below[i]!) / (high - low);
    }
  }
}
