import type { RandomSource } from "./random.ts";

/**
 * Elemental fits: exact fits through p of n rows, the raw material of a high-breakdown start. A fit through sound
 * rows only is unmoved by whatever the other rows hold.
 */

/** n over p, or Infinity above 2^53. */
export function numberOfSubsets(n: number, p: number): number {
  let count = 1;
  for (let k = 1; k <= p; k++) count = Math.round((count * (n - p + k)) / k);
  return count <= Number.MAX_SAFE_INTEGER ? count : Infinity;
}

/**
 * How many random subsets of p rows to try. For p up to 3, so many that with half of all rows bad the risk is 1e-6
 * that none holds sound rows only, ln 1e-6 / ln(1 - 2^-p): 20, 49, 104. For larger p also 2000 or more, as a sound
 * subset of many rows carries so much noise that one is not enough (measured on the data of Hawkins, Bradu and Kass).
 * @see Rousseeuw and Leroy, Robust Regression and Outlier Detection (1987), section 5.1.
 */
export function usualNumberOfSubsets(p: number): number {
  const forOneSound = Math.ceil(Math.log(1e-6) / Math.log1p(-(0.5 ** p)));
  return p <= 3 ? forOneSound : Math.max(2000, forOneSound);
}

/** The next p-subset of 0 to n - 1 in lexicographic order, in place; false after the last. Start from 0, 1, ..., p - 1. */
export function nextSubset(rows: Int32Array, n: number, p: number): boolean {
  let k = p - 1;
  while (k >= 0 && rows[k] === n - p + k) k -= 1;
  if (k < 0) return false;
  rows[k]! += 1;
  for (let j = k + 1; j < p; j++) rows[j] = rows[j - 1]! + 1;
  return true;
}

/**
 * p distinct rows at random, in proportion to their votes where `cumulativeVotes` gives the running sum of these.
 * A row that cannot be drawn anew in 50 tries, as few rows hold nearly all votes, is drawn with equal chances.
 */
export function drawSubset(
  rows: Int32Array,
  n: number,
  p: number,
  random: RandomSource,
  cumulativeVotes: Float64Array | undefined,
): void {
  for (let k = 0; k < p; k++) {
    let row = drawRow(n, random, cumulativeVotes);
    for (let tries = 1; isTaken(rows, k, row); tries++) {
      row = drawRow(n, random, tries < 50 ? cumulativeVotes : undefined);
    }
    rows[k] = row;
  }
}

function drawRow(n: number, random: RandomSource, cumulativeVotes: Float64Array | undefined): number {
  if (!cumulativeVotes) return random.integerBelow(n);
  const mark = random.uniform() * cumulativeVotes[n - 1]!;
  let low = 0;
  let high = n - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (cumulativeVotes[middle]! > mark) high = middle;
    else low = middle + 1;
  }
  return low;
}

/**
 * Coefficients of the exact fit through the given rows, by Gaussian elimination with row interchanges; false if the
 * rows are dependent (a pivot of at most 1e-9 of its column's size in the whole design).
 * `scratch` takes p x (p + 1) numbers.
 */
export function elementalFit(
  coefficients: Float64Array,
  scratch: Float64Array,
  rows: Int32Array,
  design: Float64Array,
  response: Float64Array,
  p: number,
  columnSize: Float64Array,
): boolean {
  const width = p + 1;
  for (let k = 0; k < p; k++) {
    const row = rows[k]!;
    for (let j = 0; j < p; j++) scratch[k * width + j] = design[row * p + j]!;
    scratch[k * width + p] = response[row]!;
  }
  for (let k = 0; k < p; k++) {
    const pivotRow = largestInColumn(scratch, k, p, width);
    if (!(Math.abs(scratch[pivotRow * width + k]!) > 1e-9 * columnSize[k]!)) return false;
    if (pivotRow !== k) swapRows(scratch, pivotRow, k, width);
    for (let i = k + 1; i < p; i++) {
      const factor = scratch[i * width + k]! / scratch[k * width + k]!;
      for (let j = k + 1; j < width; j++) scratch[i * width + j]! -= factor * scratch[k * width + j]!;
    }
  }
  for (let k = p - 1; k >= 0; k--) {
    let sum = scratch[k * width + p]!;
    for (let j = k + 1; j < p; j++) sum -= scratch[k * width + j]! * coefficients[j]!;
    coefficients[k] = sum / scratch[k * width + k]!;
  }
  return true;
}

function isTaken(rows: Int32Array, count: number, row: number): boolean {
  for (let k = 0; k < count; k++) if (rows[k] === row) return true;
  return false;
}

function largestInColumn(matrix: Float64Array, k: number, p: number, width: number): number {
  let best = k;
  for (let i = k + 1; i < p; i++) {
    if (Math.abs(matrix[i * width + k]!) > Math.abs(matrix[best * width + k]!)) best = i;
  }
  return best;
}

function swapRows(matrix: Float64Array, a: number, b: number, width: number): void {
  for (let j = 0; j < width; j++) {
    const value = matrix[a * width + j]!;
    matrix[a * width + j] = matrix[b * width + j]!;
    matrix[b * width + j] = value;
  }
}
