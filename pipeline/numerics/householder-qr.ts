/**
 * Householder QR factorisation of a weighted, column-scaled design, written to run in loops without allocating.
 *
 * Columns are scaled by powers of two to a norm near one (exact, so no digit is lost), then reduced from left to
 * right. A column that lies in the span of the columns before it is moved to the end and left out; order is
 * otherwise kept, so it is always the later of two collinear terms that gives way.
 */

/** Buffers for designs of at most `maxRows` rows and `maxColumns` columns, and the last factorisation made in them. */
export interface QrWorkspace {
  readonly maxRows: number;
  readonly maxColumns: number;
  /** Column-major: Householder vectors on and below the diagonal, R above it, in pivoted column order. */
  readonly factor: Float64Array;
  /** Diagonal of R. */
  readonly diagonal: Float64Array;
  /** H_k = I - beta_k v_k v_k'. */
  readonly beta: Float64Array;
  /** Power of two by which each design column was divided, in design order. */
  readonly columnScale: Float64Array;
  /** Design column that stands at each place of the factorisation. */
  readonly pivot: Int32Array;
  readonly rootWeights: Float64Array;
  /** Scratch of n numbers: Q'y during a solve, a column of Q during leverages. */
  readonly rotated: Float64Array;
  /** Scratch for the inverse of R, column-major. */
  readonly inverse: Float64Array;
  rows: number;
  columns: number;
  rank: number;
  weighted: boolean;
}

/**
 * Buffers for {@link factorise}.
 * @throws RangeError unless both sizes are positive integers.
 */
export function createQrWorkspace(maxRows: number, maxColumns: number): QrWorkspace {
  if (!(Number.isInteger(maxRows) && Number.isInteger(maxColumns) && maxRows > 0 && maxColumns > 0)) {
    throw new RangeError(`QR workspace: sizes must be positive integers, not ${maxRows} and ${maxColumns}`);
  }
  return {
    maxRows,
    maxColumns,
    factor: new Float64Array(maxRows * maxColumns),
    diagonal: new Float64Array(maxColumns),
    beta: new Float64Array(maxColumns),
    columnScale: new Float64Array(maxColumns),
    pivot: new Int32Array(maxColumns),
    rootWeights: new Float64Array(maxRows),
    rotated: new Float64Array(maxRows),
    inverse: new Float64Array(maxColumns * maxColumns),
    rows: 0,
    columns: 0,
    rank: 0,
    weighted: false,
  };
}

/**
 * Factorises W^(1/2) X = Q R (with column scaling) into the workspace and returns the numerical rank.
 *
 * - design  X, row-major, n x p       - weights  n numbers of at least 0; a row of weight 0 has no influence
 *
 * A column is left out when what the columns before it do not explain is at most 4 max(n, p) eps of its own norm.
 * @throws RangeError if n x p does not fit the workspace or the arrays, if a weight is negative or not finite,
 *   or if the design holds a number that is not finite or beyond about 1e150.
 * @see Golub and Van Loan, Matrix Computations, 4th ed. (2013), section 5.2; the order-keeping rank test is that
 *   of LINPACK dqrdc2 as used by R.
 */
export function factorise(ws: QrWorkspace, design: Float64Array, n: number, p: number, weights?: Float64Array): number {
  checkSizes(ws, design, n, p, weights);
  ws.rows = n;
  ws.columns = p;
  takeRootWeights(ws, n, weights);
  loadColumns(ws, design, n, p);
  const tolerance = 4 * Math.max(n, p) * Number.EPSILON;
  let left = p;
  let k = 0;
  while (k < left && k < n) {
    const norm = trailingNorm(ws.factor, k * n, k, n);
    if (norm <= tolerance * columnNormBefore(ws, k)) {
      left -= 1;
      moveColumnToEnd(ws, k);
    } else {
      reflect(ws, k, norm);
      k += 1;
    }
  }
  ws.rank = k;
  return k;
}

function checkSizes(ws: QrWorkspace, design: Float64Array, n: number, p: number, weights?: Float64Array): void {
  if (!(n >= 1 && p >= 1 && n <= ws.maxRows && p <= ws.maxColumns)) {
    throw new RangeError(`least squares: ${n} rows and ${p} columns do not fit ${ws.maxRows} x ${ws.maxColumns}`);
  }
  if (design.length < n * p) {
    throw new RangeError(`least squares: design holds ${design.length} numbers, ${n} x ${p} needed`);
  }
  if (weights && weights.length < n) {
    throw new RangeError(`least squares: ${weights.length} weights for ${n} rows`);
  }
}

function takeRootWeights(ws: QrWorkspace, n: number, weights?: Float64Array): void {
  ws.weighted = weights !== undefined;
  if (!weights) return;
  for (let i = 0; i < n; i++) {
    const weight = weights[i]!;
    if (!(weight >= 0 && weight < Infinity)) {
      throw new RangeError(`least squares: weight ${i} is ${weight}; it must be finite and at least 0`);
    }
    ws.rootWeights[i] = Math.sqrt(weight);
  }
}

function loadColumns(ws: QrWorkspace, design: Float64Array, n: number, p: number): void {
  const { factor, rootWeights, columnScale, pivot, weighted } = ws;
  for (let j = 0; j < p; j++) {
    const offset = j * n;
    let squares = 0;
    for (let i = 0; i < n; i++) {
      const value = weighted ? rootWeights[i]! * design[i * p + j]! : design[i * p + j]!;
      factor[offset + i] = value;
      squares += value * value;
    }
    if (!(squares < Infinity)) throw new RangeError(`least squares: design column ${j} is not finite or too large`);
    const scale = squares > 0 ? 2 ** Math.round(0.5 * Math.log2(squares)) : 1;
    const inverse = 1 / scale;
    for (let i = 0; i < n; i++) factor[offset + i]! *= inverse;
    columnScale[j] = scale;
    pivot[j] = j;
  }
}

function trailingNorm(factor: Float64Array, offset: number, from: number, n: number): number {
  let squares = 0;
  for (let i = from; i < n; i++) squares += factor[offset + i]! * factor[offset + i]!;
  return Math.sqrt(squares);
}

/** Reflections keep norms, so the whole transformed column still has the norm of the scaled design column. */
function columnNormBefore(ws: QrWorkspace, k: number): number {
  return trailingNorm(ws.factor, k * ws.rows, 0, ws.rows);
}

function moveColumnToEnd(ws: QrWorkspace, k: number): void {
  const { factor, pivot, rows: n, columns: p } = ws;
  for (let j = k; j < p - 1; j++) {
    for (let i = 0; i < n; i++) {
      const value = factor[j * n + i]!;
      factor[j * n + i] = factor[(j + 1) * n + i]!;
      factor[(j + 1) * n + i] = value;
    }
    const column = pivot[j]!;
    pivot[j] = pivot[j + 1]!;
    pivot[j + 1] = column;
  }
}

function reflect(ws: QrWorkspace, k: number, norm: number): void {
  const { factor, rows: n, columns: p, diagonal, beta } = ws;
  const offset = k * n;
  const head = factor[offset + k]!;
  const alpha = head > 0 ? -norm : norm;
  factor[offset + k] = head - alpha;
  diagonal[k] = alpha;
  beta[k] = 1 / (alpha * (alpha - head));
  for (let j = k + 1; j < p; j++) applyReflection(factor, offset, k, n, beta[k]!, factor, j * n);
}

/** target <- (I - beta v v') target, with v in rows k to n of the column at `offset`, target from `start`. */
export function applyReflection(
  factor: Float64Array,
  offset: number,
  k: number,
  n: number,
  beta: number,
  target: Float64Array,
  start: number,
): void {
  let dot = 0;
  for (let i = k; i < n; i++) dot += factor[offset + i]! * target[start + i]!;
  dot *= beta;
  for (let i = k; i < n; i++) target[start + i]! -= dot * factor[offset + i]!;
}
