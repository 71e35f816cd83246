import { applyReflection, type QrWorkspace } from "./householder-qr.ts";

/** What follows from a factorisation in a {@link QrWorkspace}: coefficients, leverages, basis, covariance. */

/**
 * Least-squares coefficients of `response` for the factorised design, written to `coefficients` in design order;
 * columns left out by the rank test get 0.
 * @throws RangeError if the response (where its weight is not 0) holds a number that is not finite.
 */
export function solve(ws: QrWorkspace, response: Float64Array, coefficients: Float64Array): void {
  const { rank, columns, rotated, pivot, columnScale } = ws;
  loadResponse(ws, response);
  applyQTransposed(ws, rotated);
  solveTriangle(ws, rotated);
  for (let k = 0; k < columns; k++) {
    const column = pivot[k]!;
    coefficients[column] = k < rank ? rotated[k]! / columnScale[column]! : 0;
  }
}

/** Leverages h_i of the weighted rows (diagonal of Q Q'), each in [0, 1] and summing to the rank. */
export function leverages(ws: QrWorkspace, result: Float64Array): void {
  const { rows: n, rank, rotated } = ws;
  result.fill(0, 0, n);
  for (let column = 0; column < rank; column++) {
    formColumnOfQ(ws, column);
    for (let i = 0; i < n; i++) result[i]! += rotated[i]! * rotated[i]!;
  }
  for (let i = 0; i < n; i++) if (result[i]! > 1) result[i] = 1;
}

/** Q without its last n - rank columns, row-major n x rank: an orthonormal basis of the weighted design's columns. */
export function orthonormalBasis(ws: QrWorkspace, result: Float64Array): void {
  const { rows: n, rank, rotated } = ws;
  for (let column = 0; column < rank; column++) {
    formColumnOfQ(ws, column);
    for (let i = 0; i < n; i++) result[i * rank + column] = rotated[i]!;
  }
}

/**
 * (X'WX)^-1, row-major p x p in design order. Rows and columns of design columns that were left out hold NaN:
 * their coefficients are not determined.
 */
export function unscaledCovariance(ws: QrWorkspace, result: Float64Array): void {
  const { columns: p, rank, pivot, columnScale, inverse } = ws;
  invertTriangle(ws);
  result.fill(Number.NaN, 0, p * p);
  for (let a = 0; a < rank; a++) {
    for (let b = 0; b <= a; b++) {
      let sum = 0;
      for (let k = a; k < rank; k++) sum += inverse[k * p + a]! * inverse[k * p + b]!;
      const row = pivot[a]!;
      const column = pivot[b]!;
      const value = sum / columnScale[row]! / columnScale[column]!;
      result[row * p + column] = value;
      result[column * p + row] = value;
    }
  }
}

/** vector <- Q' vector, n numbers in place. */
export function applyQTransposed({ rows: n, rank, factor, beta }: QrWorkspace, vector: Float64Array): void {
  for (let k = 0; k < rank; k++) applyReflection(factor, k * n, k, n, beta[k]!, vector, 0);
}

/** vector <- Q vector, n numbers in place. */
export function applyQ({ rows: n, rank, factor, beta }: QrWorkspace, vector: Float64Array): void {
  for (let k = rank - 1; k >= 0; k--) applyReflection(factor, k * n, k, n, beta[k]!, vector, 0);
}

/** Solves R z = vector for the leading rank numbers, in place. */
export function solveTriangle({ rows: n, rank, factor, diagonal }: QrWorkspace, vector: Float64Array): void {
  for (let k = rank - 1; k >= 0; k--) {
    let sum = vector[k]!;
    for (let j = k + 1; j < rank; j++) sum -= factor[j * n + k]! * vector[j]!;
    vector[k] = sum / diagonal[k]!;
  }
}

/** Solves R' z = vector for the leading rank numbers, in place. */
export function solveTransposedTriangle({ rows: n, rank, factor, diagonal }: QrWorkspace, vector: Float64Array): void {
  for (let k = 0; k < rank; k++) {
    let sum = vector[k]!;
    for (let j = 0; j < k; j++) sum -= factor[k * n + j]! * vector[j]!;
    vector[k] = sum / diagonal[k]!;
  }
}

/** Writes a column of Q to the scratch `rotated`. */
function formColumnOfQ(ws: QrWorkspace, column: number): void {
  ws.rotated.fill(0, 0, ws.rows);
  ws.rotated[column] = 1;
  applyQ(ws, ws.rotated);
}

/** Writes W^(1/2) y to the scratch; a response of weight 0 is not read. */
function loadResponse(ws: QrWorkspace, response: Float64Array): void {
  const { rows: n, rotated, rootWeights, weighted } = ws;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const weight = weighted ? rootWeights[i]! : 1;
    const value = weight === 0 ? 0 : weight * response[i]!;
    rotated[i] = value;
    sum += value;
  }
  if (!(sum > -Infinity && sum < Infinity)) throw new RangeError("least squares: the response is not finite");
}

/** Inverse of the leading rank x rank triangle of R, column-major with leading dimension p. */
function invertTriangle(ws: QrWorkspace): void {
  const { rows: n, columns: p, rank, factor, diagonal, inverse } = ws;
  for (let j = 0; j < rank; j++) {
    inverse[j * p + j] = 1 / diagonal[j]!;
    for (let i = j - 1; i >= 0; i--) {
      let sum = 0;
      for (let k = i + 1; k <= j; k++) sum += factor[k * n + i]! * inverse[j * p + k]!;
      inverse[j * p + i] = -sum / diagonal[i]!;
    }
  }
}
