import type { QrWorkspace } from "./householder-qr.ts";
import { applyQ, applyQTransposed, solveTransposedTriangle, solveTriangle } from "./qr-solve.ts";

const MOST_STEPS = 5;

/**
 * Improves least-squares coefficients from a factorisation of full rank, in place, until they change by rounding only:
 * the residuals of the augmented system r + A b = y, A'r = 0 are formed in twice the working precision and solved for
 * with the same factors. Residuals y - Xb (unweighted) are rounded from twice the precision, too.
 *
 * Mends the loss of digits in ill-conditioned designs, as far as the design itself is exact in doubles.
 * @see Bjorck, BIT 7 (1967) 257-278; Ogita, Rump and Oishi, SIAM J. Sci. Comput. 26 (2005) 1955-1988 (dot products).
 */
export function refineLeastSquares(
  ws: QrWorkspace,
  design: Float64Array,
  response: Float64Array,
  coefficients: Float64Array,
  residuals: Float64Array,
): void {
  const { rows: n, columns: p } = ws;
  const weightedResiduals = new Float64Array(n);
  for (let i = 0; i < n; i++) if (rootWeight(ws, i) > 0) weightedResiduals[i] = rootWeight(ws, i) * residuals[i]!;
  const rowMisfit = new Float64Array(n);
  const columnMisfit = new Float64Array(p);
  const head = new Float64Array(p);
  let lastChange = Infinity;
  for (let step = 0; step < MOST_STEPS; step++) {
    measureMisfit(ws, design, response, coefficients, weightedResiduals, rowMisfit, columnMisfit);
    for (let k = 0; k < p; k++) head[k] = columnMisfit[ws.pivot[k]!]! / ws.columnScale[ws.pivot[k]!]!;
    solveTransposedTriangle(ws, head);
    applyQTransposed(ws, rowMisfit);
    for (let k = 0; k < p; k++) columnMisfit[k] = rowMisfit[k]! - head[k]!;
    solveTriangle(ws, columnMisfit);
    const change = largestRelativeChange(ws, columnMisfit, coefficients);
    if (!(change < lastChange / 2)) break;
    for (let k = 0; k < p; k++) {
      coefficients[ws.pivot[k]!]! += columnMisfit[k]! / ws.columnScale[ws.pivot[k]!]!;
      rowMisfit[k] = head[k]!;
    }
    applyQ(ws, rowMisfit);
    for (let i = 0; i < n; i++) weightedResiduals[i]! += rowMisfit[i]!;
    lastChange = change;
    if (change <= 2 * Number.EPSILON) break;
  }
  for (let i = 0; i < n; i++) residuals[i] = rowResidual(design, response, coefficients, i, p, 1, 0);
}

/** y - r - A b by rows and -A'r by columns, A = W^(1/2) X, both in twice the working precision. */
function measureMisfit(
  ws: QrWorkspace,
  design: Float64Array,
  response: Float64Array,
  coefficients: Float64Array,
  weightedResiduals: Float64Array,
  rowMisfit: Float64Array,
  columnMisfit: Float64Array,
): void {
  const { rows: n, columns: p } = ws;
  for (let i = 0; i < n; i++) {
    const weight = rootWeight(ws, i);
    rowMisfit[i] = rowResidual(design, response, coefficients, i, p, weight, weightedResiduals[i]!);
  }
  for (let j = 0; j < p; j++) {
    let high = 0;
    let low = 0;
    for (let i = 0; i < n; i++) {
      const weight = rootWeight(ws, i);
      const entry = weight * design[i * p + j]!;
      const product = entry * weightedResiduals[i]!;
      const sum = high + product;
      low += sumError(high, product, sum) + productError(entry, weightedResiduals[i]!, product);
      low += productError(weight, design[i * p + j]!, entry) * weightedResiduals[i]!;
      high = sum;
    }
    columnMisfit[j] = -(high + low);
  }
}

/** weight (y_i - x_i b) - known, rounded once from twice the working precision. */
function rowResidual(
  design: Float64Array,
  response: Float64Array,
  coefficients: Float64Array,
  i: number,
  p: number,
  weight: number,
  known: number,
): number {
  if (weight === 0) return 0;
  let high = response[i]!;
  let low = 0;
  for (let j = 0; j < p; j++) {
    const product = -design[i * p + j]! * coefficients[j]!;
    const sum = high + product;
    low += sumError(high, product, sum) + productError(-design[i * p + j]!, coefficients[j]!, product);
    high = sum;
  }
  const scaled = weight * high;
  const difference = scaled - known;
  return difference + (sumError(scaled, -known, difference) + productError(weight, high, scaled) + weight * low);
}

function largestRelativeChange({ rank, pivot, columnScale }: QrWorkspace, step: Float64Array, b: Float64Array): number {
  let largest = 0;
  for (let k = 0; k < rank; k++) {
    const change = Math.abs(step[k]! / columnScale[pivot[k]!]!);
    if (change > 0) largest = Math.max(largest, change / Math.abs(b[pivot[k]!]!));
  }
  return largest;
}

function rootWeight(ws: QrWorkspace, i: number): number {
  return ws.weighted ? ws.rootWeights[i]! : 1;
}

/** What rounding took from a + b (Knuth). */
function sumError(a: number, b: number, sum: number): number {
  const part = sum - a;
  return a - (sum - part) + (b - part);
}

/** What rounding took from a b (Veltkamp and Dekker). */
function productError(a: number, b: number, product: number): number {
  const wideA = 134217729 * a;
  const highA = wideA - (wideA - a);
  const lowA = a - highA;
  const wideB = 134217729 * b;
  const highB = wideB - (wideB - b);
  const lowB = b - highB;
  return lowA * lowB - (product - highA * highB - lowA * highB - highA * lowB);
}
