import { MOST_TERMS, PURE_COEFFICIENTS } from "../../curves/jouyban-acree.ts";
import { choleskyFactorise, choleskyInvert, choleskyLogDeterminant } from "../../numerics/cholesky.ts";
import { createLeastSquaresWorkspace, leastSquaresCovariance, leastSquaresInto } from "../../numerics/least-squares.ts";
import { createMemberSums, type MemberSums, setMemberSums } from "./mixture-information.ts";
import type { MixturePoints } from "./mixture-points.ts";
import type { Surface } from "./mixture-surfaces.ts";

/** Scales of the random effects and of the noise of each point. */
export interface MixtureScales {
  /** Variance of each point's noise. */
  readonly variance: Float64Array;
  /** Variance of a source's offset; used only with two sources or more, as one cannot tell offset from surface. */
  readonly betweenVariance: number;
  /** Variance by which a composition lies off the surface as a whole. */
  readonly lackOfFitVariance: number;
}

/** A surface fitted with random offsets of sources and of compositions. */
export interface MixtureRegression {
  readonly surface: Surface;
  readonly centreK: number;
  /** Columns: the surface's p, then one a source (none where there is a single one). */
  readonly columns: number;
  readonly coefficients: Float64Array;
  /** Covariance of all columns' coefficients, row-major. */
  readonly covariance: Float64Array;
  /** r' K^-1 r with K the covariance of noise and offsets; priors of coefficients add their squares. */
  readonly residualSumOfSquares: number;
  /** Points used. */
  readonly n: number;
}

/** Number of columns of a surface over these points. */
export function columnsOf({ sources }: MixturePoints, { p }: Surface): number {
  return p + (sources.length > 1 ? sources.length : 0);
}

/** Row of all columns at a composition and temperature (K), with the offset of a source, or none. */
export function rowAt(
  { surface, centreK, columns }: Pick<MixtureRegression, "surface" | "centreK" | "columns">,
  fraction: number,
  temperatureK: number,
  source = -1,
): Float64Array {
  const row = new Float64Array(columns);
  surface.writeRow(row, 0, fraction, temperatureK, centreK);
  if (source >= 0 && columns > surface.p) row[surface.p + source] = 1;
  return row;
}

/** Room for one row of a surface, whose value is asked for at thousands of places. */
const oneRow = new Float64Array(PURE_COEFFICIENTS + MOST_TERMS + 2);

/** ln value of the surface alone, offsets left out, at a composition and temperature (K). */
export function surfaceValue(
  { surface, centreK, coefficients }: MixtureRegression,
  fraction: number,
  temperatureK: number,
): number {
  surface.writeRow(oneRow, 0, fraction, temperatureK, centreK);
  let sum = 0;
  for (let j = 0; j < surface.p; j++) sum += oneRow[j]! * coefficients[j]!;
  return sum;
}

/** Row times coefficients. */
export function rowValue({ coefficients }: MixtureRegression, row: Float64Array): number {
  let sum = 0;
  for (let j = 0; j < row.length; j++) sum += row[j]! * coefficients[j]!;
  return sum;
}

/** Standard deviation before the data of every column; Infinity = none. */
function priorsOf(points: MixturePoints, surface: Surface, { betweenVariance }: MixtureScales): number[] {
  const sources = columnsOf(points, surface) - surface.p;
  return [...surface.priorSd, ...new Array<number>(sources).fill(Math.sqrt(betweenVariance))];
}

/**
 * The surface of some members, from their sums: generalised least squares by normal equations in the centred basis, whose
 * priors keep them well conditioned. Members leave and come back without a look at the points.
 *
 * @param members sums of the members that take part
 * @returns undefined where they do not determine the coefficients
 */
export function fitMembers(
  points: MixturePoints,
  members: Iterable<MemberSums>,
  surface: Surface,
  centreK: number,
  scales: MixtureScales,
): (MixtureRegression & { readonly logDeterminant: number }) | undefined {
  const q = columnsOf(points, surface);
  const normal = new Float64Array(q * q);
  const right = new Float64Array(q);
  let [squares, n, logDeterminant] = [0, 0, 0];
  for (const one of members) {
    for (let i = 0; i < q * q; i++) normal[i]! += one.normal[i]!;
    for (let j = 0; j < q; j++) right[j]! += one.right[j]!;
    squares += one.squares;
    logDeterminant += one.logDeterminant;
    n += one.n;
  }
  priorsOf(points, surface, scales).forEach((sd, j) => {
    normal[j * q + j]! += sd ** -2;
  });
  if (n === 0 || !choleskyFactorise(normal, q)) return undefined;
  logDeterminant += choleskyLogDeterminant(normal, q);
  choleskyInvert(normal, q);
  const coefficients = new Float64Array(q);
  let explained = 0;
  for (let i = 0; i < q; i++) {
    for (let j = 0; j < q; j++) coefficients[i]! += normal[i * q + j]! * right[j]!;
    explained += coefficients[i]! * right[i]!;
  }
  const residualSumOfSquares = Math.max(0, squares - explained);
  return { surface, centreK, columns: q, coefficients, covariance: normal, residualSumOfSquares, n, logDeterminant };
}

/**
 * The same by QR of the whitened rows, which keeps all digits without priors: for the surface that is published.
 *
 * @param use 1 = the point takes part
 * @returns undefined where the points do not determine the coefficients
 */
export function fitByQr(
  points: MixturePoints,
  use: Uint8Array,
  surface: Surface,
  centreK: number,
  scales: MixtureScales,
): MixtureRegression | undefined {
  const q = columnsOf(points, surface);
  const priors = priorsOf(points, surface, scales);
  const n = use.reduce((count, one) => count + one, 0);
  const rows = n + priors.filter((sd) => sd < Number.POSITIVE_INFINITY).length;
  if (n === 0 || rows < q) return undefined;
  const design = new Float64Array(rows * q);
  const response = new Float64Array(rows);
  const sums = createMemberSums(q);
  let row = 0;
  for (let m = 0; m < points.members; m++)
    row += setMemberSums(sums, points, use, m, surface, centreK, scales, { design, response, at: row });
  priors.forEach((sd, j) => {
    if (sd < Number.POSITIVE_INFINITY) design[row++ * q + j] = 1 / sd;
  });
  const ws = createLeastSquaresWorkspace(rows, q);
  if (leastSquaresInto(ws, design, response, rows, q) < q) return undefined;
  return {
    ...{ surface, centreK, columns: q, n, coefficients: ws.coefficients, covariance: leastSquaresCovariance(ws) },
    residualSumOfSquares: ws.residuals.reduce((sum, r) => sum + r * r, 0),
  };
}
