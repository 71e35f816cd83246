import type { MixturePoints } from "./mixture-points.ts";
import type { MixtureScales } from "./mixture-regression.ts";
import type { Surface } from "./mixture-surfaces.ts";

/**
 * What one composition adds to the normal equations of a surface, its own random offset (variance L) integrated out:
 * with K = diag(v) + L 1 1', sums of F' K^-1 F, F' K^-1 y and y' K^-1 y over its points, and ln det K.
 */
export interface MemberSums {
  /** q x q, row-major. */
  readonly normal: Float64Array;
  readonly right: Float64Array;
  squares: number;
  logDeterminant: number;
  /** Points used. */
  n: number;
}

/** Empty sums over q columns. */
export function createMemberSums(q: number): MemberSums {
  return { normal: new Float64Array(q * q), right: new Float64Array(q), squares: 0, logDeterminant: 0, n: 0 };
}

/** Where whitened rows are written instead of being summed: from row `at` on. */
export interface WhitenedRows {
  readonly design: Float64Array;
  readonly response: Float64Array;
  readonly at: number;
}

/** Rows of all points of a mixture for one surface, in the order of the points: its p columns, row-major. */
interface SurfaceRows {
  readonly surface: Surface;
  readonly centreK: number;
  readonly design: Float64Array;
}

/** The rows last asked for: many sets of points and scales are tried over the same ones. */
const rowsOf = new WeakMap<MixturePoints, SurfaceRows>();

function surfaceRows(points: MixturePoints, surface: Surface, centreK: number): Float64Array {
  const known = rowsOf.get(points);
  if (known?.surface === surface && known.centreK === centreK) return known.design;
  const design = new Float64Array(points.n * surface.p);
  for (let i = 0; i < points.n; i++)
    surface.writeRow(design, i * surface.p, points.fraction[i]!, points.temperatureK[i]!, centreK);
  rowsOf.set(points, { surface, centreK, design });
  return design;
}

/** Whitened rows with the response as last column, and their weighted mean; grown where a member needs more. */
let scratch = new Float64Array(0);
let mean = new Float64Array(0);

/**
 * Sets the sums of a member from its points that take part, by rows whitened with K^(-1/2), which is known in closed form
 * (Sherman and Morrison).
 *
 * @returns number of points
 */
export function setMemberSums(
  sums: MemberSums,
  points: MixturePoints,
  use: Uint8Array,
  member: number,
  surface: Surface,
  centreK: number,
  { variance, lackOfFitVariance }: MixtureScales,
  out?: WhitenedRows,
): number {
  const [q, { p }] = [sums.right.length, surface];
  const [from, to, width] = [points.start[member]!, points.start[member + 1]!, q + 1];
  const design = surfaceRows(points, surface, centreK);
  if (scratch.length < (to - from) * width) scratch = new Float64Array(2 * (to - from) * width);
  if (mean.length < width) mean = new Float64Array(width);
  mean.fill(0);
  scratch.fill(0, 0, (to - from) * width);
  let [precision, n] = [0, 0];
  sums.logDeterminant = 0;
  for (let i = from; i < to; i++) {
    if (use[i] !== 1) continue;
    const [at, weight] = [n++ * width, 1 / variance[i]!];
    for (let j = 0; j < p; j++) scratch[at + j] = design[i * p + j]!;
    if (q > p) scratch[at + p + points.source[i]!] = 1;
    scratch[at + q] = points.lnValue[i]!;
    for (let j = 0; j <= q; j++) mean[j]! += weight * scratch[at + j]!;
    precision += weight;
    sums.logDeterminant += Math.log(variance[i]!);
  }
  sums.logDeterminant += Math.log1p(lackOfFitVariance * precision);
  sums.n = n;
  const share = (1 - 1 / Math.sqrt(1 + lackOfFitVariance * precision)) / precision;
  for (let i = from, at = 0; i < to; i++) {
    if (use[i] !== 1) continue;
    const root = Math.sqrt(1 / variance[i]!);
    for (let j = 0; j <= q; j++) scratch[at + j] = root * (scratch[at + j]! - share * mean[j]!);
    at += width;
  }
  if (out === undefined) add(sums, q);
  else write(out, n, q);
  return n;
}

function write({ design, response, at }: WhitenedRows, n: number, q: number): void {
  for (let k = 0; k < n; k++) {
    const from = k * (q + 1);
    for (let j = 0; j < q; j++) design[(at + k) * q + j] = scratch[from + j]!;
    response[at + k] = scratch[from + q]!;
  }
}

/** Sums the whitened rows. */
function add(sums: MemberSums, q: number): void {
  const { normal, right, n } = sums;
  normal.fill(0);
  right.fill(0);
  sums.squares = 0;
  for (let at = 0; at < n * (q + 1); at += q + 1) {
    const y = scratch[at + q]!;
    for (let i = 0; i < q; i++) {
      const value = scratch[at + i]!;
      if (value === 0) continue;
      for (let j = 0; j <= i; j++) normal[i * q + j]! += value * scratch[at + j]!;
      right[i]! += value * y;
    }
    sums.squares += y ** 2;
  }
  for (let i = 0; i < q; i++) for (let j = 0; j < i; j++) normal[j * q + i] = normal[i * q + j]!;
}

/** Sums of every member. */
export function allMemberSums(
  points: MixturePoints,
  use: Uint8Array,
  surface: Surface,
  centreK: number,
  scales: MixtureScales,
): MemberSums[] {
  const q = surface.p + (points.sources.length > 1 ? points.sources.length : 0);
  return Array.from({ length: points.members }, (_, m) => {
    const sums = createMemberSums(q);
    setMemberSums(sums, points, use, m, surface, centreK, scales);
    return sums;
  });
}
