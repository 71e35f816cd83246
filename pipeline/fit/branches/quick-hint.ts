import type { RobustFit } from "../../records/fits.ts";
import { brokenVariance } from "./break-bootstrap.ts";

/** Places tried, evenly spread over the reciprocal temperature inside the data. */
const PLACES = 9;
/** From this span on curvature is part of the smooth model, K. */
const CURVED_SPAN_K = 30;
/** Fewest points that can show a break. */
const FEWEST = 6;

/** Room for one system, used again by the next. Columns hold n values, those of the sources one a source. */
let room = createRoom(64, 64);

function createRoom(points: number, sources: number) {
  const column = () => new Float64Array(points);
  return {
    ...{ reciprocal: column(), slope: column(), bend: column(), value: column(), weight: column() },
    ...{ block: new Int32Array(points), id: new Int32Array(sources) },
    ...{ weights: new Float64Array(sources), sums: new Float64Array(sources) },
  };
}

/** The kept points of a system loaded into the room: how many, by how many sources, over which temperatures, K. */
function load({ points, kept, noiseSd }: Pick<RobustFit, "points" | "kept" | "noiseSd">) {
  if (points.n > room.value.length) room = createRoom(2 * points.n, 2 * points.n);
  const { reciprocal, value, weight, block, id, weights } = room;
  let [n, sources, lowK, highK] = [0, 0, Number.POSITIVE_INFINITY, 0];
  for (let i = 0; i < points.n; i++) {
    const T = points.temperatureK[i]!;
    if (kept[i] !== 1 || !(T > 0) || !(noiseSd[i]! > 0)) continue;
    if (T < lowK) lowK = T;
    if (T > highK) highK = T;
    const source = points.source[i]!;
    let b = 0;
    while (b < sources && id[b] !== source) b++;
    if (b === sources) {
      id[b] = source;
      weights[b] = 0;
      sources++;
    }
    block[n] = b;
    weight[n] = 1 / (noiseSd[i]! * noiseSd[i]!);
    weights[b]! += weight[n]!;
    reciprocal[n] = 1 / T;
    value[n] = points.lnValue[i]!;
    n++;
  }
  return { n, sources, lowK, highK };
}

/** Takes the weighted mean of each source out of a column: sources differ by offsets that are no part of the question. */
function centre(column: Float64Array, n: number, sources: number): void {
  const { weight, weights, sums, block } = room;
  sums.fill(0, 0, sources);
  for (let i = 0; i < n; i++) sums[block[i]!]! += weight[i]! * column[i]!;
  for (let i = 0; i < n; i++) column[i]! -= sums[block[i]!]! / weights[block[i]!]!;
}

function product(a: Float64Array, b: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += room.weight[i]! * a[i]! * b[i]!;
  return sum;
}

/** Takes a direction out of a column; `square` is the direction's product with itself. */
function remove(column: Float64Array, direction: Float64Array, square: number, n: number): void {
  if (!(square > 0)) return;
  const part = product(column, direction, n) / square;
  for (let i = 0; i < n; i++) column[i]! -= part * direction[i]!;
}

/**
 * The largest statistic of a change of slope alone, to either side, at a few places evenly spread, with a free offset a
 * source: one pass over the points a place, nothing allocated, because most systems are smooth and must cost next to
 * nothing. Says only whether to look closer; 0 where too few points are kept.
 */
export function quickHint(robust: Pick<RobustFit, "points" | "kept" | "noiseSd">): number {
  const { n, sources, lowK, highK } = load(robust);
  if (n < FEWEST) return 0;
  const { reciprocal, slope, bend, value } = room;
  const middle = (1 / lowK + 1 / highK) / 2;
  const curved = highK - lowK >= CURVED_SPAN_K;
  for (let i = 0; i < n; i++) {
    const u = reciprocal[i]! / middle - 1;
    slope[i] = u;
    bend[i] = curved ? u * u : 0;
  }
  centre(slope, n, sources);
  const ofSlope = product(slope, slope, n);
  centre(bend, n, sources);
  remove(bend, slope, ofSlope, n);
  const ofBend = product(bend, bend, n);
  centre(value, n, sources);
  remove(value, slope, ofSlope, n);
  remove(value, bend, ofBend, n);
  const sum = product(value, value, n);
  let best = 0;
  for (let place = 1; place <= PLACES; place++) {
    const at = 1 / highK + ((1 / lowK - 1 / highK) * place) / (PLACES + 1);
    best = Math.max(best, gainAt(at, n, sources, ofSlope, ofBend));
  }
  return best / brokenVariance(n, Math.max(0, sum - best));
}

/** Fall of the residual sum of squares by a change of slope at a reciprocal temperature, 1/K. */
function gainAt(at: number, n: number, sources: number, ofSlope: number, ofBend: number): number {
  const { reciprocal, slope, bend, value, weight, weights, sums, block } = room;
  let [whole, alongSlope, alongBend, along] = [0, 0, 0, 0];
  sums.fill(0, 0, sources);
  for (let i = 0; i < n; i++) {
    const height = at - reciprocal[i]!;
    if (height <= 0) continue;
    const weighted = weight[i]! * height;
    whole += weighted * height;
    sums[block[i]!]! += weighted;
    alongSlope += weighted * slope[i]!;
    alongBend += weighted * bend[i]!;
    along += weighted * value[i]!;
  }
  let own = whole;
  for (let b = 0; b < sources; b++) own -= sums[b]! ** 2 / weights[b]!;
  if (ofSlope > 0) own -= alongSlope ** 2 / ofSlope;
  if (ofBend > 0) own -= alongBend ** 2 / ofBend;
  return own > 1e-6 * whole ? along ** 2 / own : 0;
}
