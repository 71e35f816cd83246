import { brokenVariance } from "./break-bootstrap.ts";
import { type BreakPoints, breakBasis, type DistinctTemperature, inner } from "./break-scan.ts";

/** Buffers of the quick search, used again by the next system. */
let buffers = { smooth: new Float64Array(0), values: new Float64Array(0), hinge: new Float64Array(0) };

/**
 * The largest statistic of a change of slope alone, to either side, with one position a gap: a hundredth of the work of
 * the full search, because most systems are smooth and must cost next to nothing. Says only whether to look closer.
 */
export function breakHint(points: BreakPoints, distinct: readonly DistinctTemperature[], side: number): number {
  const { n } = points;
  const rows = n + 1;
  if (buffers.values.length < rows)
    buffers = {
      smooth: new Float64Array(6 * rows),
      values: new Float64Array(2 * rows),
      hinge: new Float64Array(2 * rows),
    };
  const { smooth, values, hinge } = buffers;
  const { u, T0, whitened } = breakBasis(points, distinct, rows, smooth, values);
  const sum = inner(values, 0, values, 0, rows);
  let best = 0;
  for (let j = side; j <= distinct.length - side; j++) {
    const ub = (2 * T0) / (distinct[j - 1]!.highK + distinct[j]!.lowK) - 1;
    for (let i = 0; i < n; i++) hinge[i] = u[i]! < ub ? ub - u[i]! : 0;
    whitened(hinge);
    const along = inner(hinge, 0, values, 0, n);
    let own = inner(hinge, 0, hinge, 0, n);
    for (let k = 0; k < 3; k++) own -= inner(hinge, 0, smooth, k * rows, n) ** 2;
    if (own > 1e-9) best = Math.max(best, (along * along) / own);
  }
  return best / brokenVariance(n, sum - best);
}
