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

/** Where whitened rows are written, besides being summed: from row `at` on. */
export interface WhitenedRows {
  readonly design: Float64Array;
  readonly response: Float64Array;
  readonly at: number;
}

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
  const q = sums.right.length;
  const rows: Float64Array[] = [];
  const [mean, weights] = [new Float64Array(q + 1), [] as number[]];
  let precision = 0;
  sums.logDeterminant = 0;
  for (let i = points.start[member]!; i < points.start[member + 1]!; i++) {
    if (use[i] !== 1) continue;
    const row = new Float64Array(q + 1);
    surface.writeRow(row, 0, points.fraction[i]!, points.temperatureK[i]!, centreK);
    if (q > surface.p) row[surface.p + points.source[i]!] = 1;
    row[q] = points.lnValue[i]!;
    const weight = 1 / variance[i]!;
    for (let j = 0; j <= q; j++) mean[j]! += weight * row[j]!;
    precision += weight;
    sums.logDeterminant += Math.log(variance[i]!);
    weights.push(weight);
    rows.push(row);
  }
  sums.logDeterminant += Math.log1p(lackOfFitVariance * precision);
  sums.n = rows.length;
  const share = (1 - 1 / Math.sqrt(1 + lackOfFitVariance * precision)) / precision;
  rows.forEach((row, k) => {
    const root = Math.sqrt(weights[k]!);
    for (let j = 0; j <= q; j++) row[j] = root * (row[j]! - share * mean[j]!);
    if (out === undefined) return;
    out.design.set(row.subarray(0, q), (out.at + k) * q);
    out.response[out.at + k] = row[q]!;
  });
  if (out === undefined) add(sums, rows, q);
  return rows.length;
}

function add(sums: MemberSums, rows: readonly Float64Array[], q: number): void {
  sums.normal.fill(0);
  sums.right.fill(0);
  sums.squares = 0;
  for (const row of rows) {
    for (let i = 0; i < q; i++) {
      const value = row[i]!;
      if (value === 0) continue;
      for (let j = 0; j <= i; j++) sums.normal[i * q + j]! += value * row[j]!;
      sums.right[i]! += value * row[q]!;
    }
    sums.squares += row[q]! ** 2;
  }
  for (let i = 0; i < q; i++) for (let j = 0; j < i; j++) sums.normal[j * q + i] = sums.normal[i * q + j]!;
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
