import { pauleMandel } from "../numerics/between-group.ts";
import { studentTQuantile } from "../numerics/distributions.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import { middle } from "./middle.ts";
import type { JudgedRow } from "./verdicts.ts";

/** How the new rows of one system stand to the curve of the others: mean deviation, ln value, with 95 % limits. */
export interface SystemOffset {
  /** Position of the system in the edition's list. */
  readonly system: number;
  readonly rows: readonly number[];
  readonly offset: number;
  readonly low: number;
  readonly high: number;
}

/** The offset of a file over all its systems, ln value, with 95 % limits. */
export interface PooledOffset {
  readonly systems: number;
  readonly offset: number;
  readonly low: number;
  readonly high: number;
  /** Standard deviation between systems beyond what the limits explain. */
  readonly between: number;
}

/** A row this far from the middle of its block is off by itself and says nothing of the offset: ln 1.5. */
const OFF_BY_ITSELF = Math.log(1.5);
/** Scatter within a file hardly ever lies below this, ln value; it counts for so many degrees of freedom. */
const [USUAL_SCATTER, USUAL_FREEDOM] = [0.02, 3];

/**
 * Offsets of a file from the collection's curves: in each system the mean of its deviations, rows that are off by
 * themselves left out, with limits from the scatter within the file (pooled over its systems) and the uncertainty of the
 * curve, which all rows share; a system is left out where no row remains; over the systems the random-effects mean after Paule and Mandel.
 *
 * @param judged rows of the file; those with a deviation are used
 * @param curveSd standard deviation of the curve at a row, ln value
 */
export function fileOffsets(
  judged: readonly JudgedRow[],
  table: MeasurementTable,
  curveSd: (judged: JudgedRow) => number,
): { offsets: SystemOffset[]; pooled: PooledOffset | undefined } {
  const blocks = new Map<number, JudgedRow[]>();
  for (const row of judged) {
    if (row.system === undefined || row.deviation === undefined || !Number.isFinite(row.deviation)) continue;
    blocks.set(row.system, [...(blocks.get(row.system) ?? []), row]);
  }
  const sound = [...blocks]
    .map(([system, rows]) => ({ system, rows: withoutSlips(rows) }))
    // Two rows far apart are both far from their middle: such a block says nothing of the offset.
    .filter(({ rows }) => rows.length > 0);
  let [squares, freedom] = [USUAL_FREEDOM * USUAL_SCATTER ** 2, USUAL_FREEDOM];
  for (const { rows } of sound) {
    const mean = meanOf(rows);
    for (const { deviation = 0 } of rows) squares += (deviation - mean) ** 2;
    freedom += rows.length - 1;
  }
  const scatter = Math.sqrt(squares / freedom);
  const t = studentTQuantile(0.975, freedom);
  const estimates = sound.map(({ system, rows }) => {
    const own = Math.max(scatter, ...(rows.length === 1 ? rows.map(({ row }) => table.relativeU[row]!) : []));
    const curve = middle(rows.map(curveSd));
    return {
      system,
      rows: rows.map(({ row }) => row),
      offset: meanOf(rows),
      sd: Math.hypot(own / Math.sqrt(rows.length), curve),
    };
  });
  const offsets = estimates.map(({ system, rows, offset, sd }) => ({
    ...{ system, rows, offset, low: offset - t * sd, high: offset + t * sd },
  }));
  return { offsets, pooled: pooledOffset(estimates) };
}

/** Without rows far from the middle of their block. */
function withoutSlips(rows: readonly JudgedRow[]): JudgedRow[] {
  const centre = middle(rows.map(({ deviation = 0 }) => deviation));
  return rows.filter(({ deviation = 0 }) => Math.abs(deviation - centre) <= OFF_BY_ITSELF);
}

function meanOf(rows: readonly JudgedRow[]): number {
  return rows.reduce((sum, { deviation = 0 }) => sum + deviation, 0) / rows.length;
}

/** Systems from which a mean over them, with limits by Student's t on k - 1, says more than its parts. */
const LEAST_SYSTEMS = 3;

function pooledOffset(estimates: readonly { offset: number; sd: number }[]): PooledOffset | undefined {
  if (estimates.length < LEAST_SYSTEMS) return undefined;
  const { mean, standardError, betweenVariance } = pauleMandel(
    estimates.map(({ offset }) => offset),
    estimates.map(({ sd }) => sd ** 2),
  );
  const half = studentTQuantile(0.975, estimates.length - 1) * standardError;
  return {
    systems: estimates.length,
    offset: mean,
    low: mean - half,
    high: mean + half,
    between: Math.sqrt(betweenVariance),
  };
}
