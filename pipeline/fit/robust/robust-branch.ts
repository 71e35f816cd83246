import { SLOPE_CHANGE } from "../../curves/screening-basis.ts";
import { refineStart, residual, robustStart } from "./robust-start.ts";
import { fillBasis, modelOf, type RobustWorkspace } from "./robust-workspace.ts";

/** Temperatures closer than this count as one, K. */
const SAME_TEMPERATURE_K = 0.5;
/** Distinct temperatures needed on either side of a break. */
const SIDE = 3;
/** Scale of the bounded loss that decides on a break, ln value. */
const BREAK_SD = 0.03;
/** Fall of the bounded loss that a break must bring: its chance is far below 1 in 1000 under Gaussian noise. */
const LEAST_FALL = 14;
/** Deviation from the smooth curve, ln value, that two points must pass before a break is tried; half of it in water. */
const NOTICEABLE = 0.1;

/**
 * Start of one system with protection of a change of the solid phase. Where two or more points lie off the smooth curve
 * a grid of break temperatures is tried, with three temperatures on either side. Only a concave break is allowed:
 * d ln x/dT falls on heating at every equilibrium transition of the solid. The break keeps points near a transition
 * from being called outliers; it claims no transition.
 */
export function startWithBranches(ws: RobustWorkspace, water: boolean): void {
  fillBasis(ws, Number.NaN);
  robustStart(ws);
  if (pointsOff(ws, water ? NOTICEABLE / 2 : NOTICEABLE) < 2) return;
  const temperatures = distinctTemperatures(ws);
  if (temperatures.length < 2 * SIDE) return;
  const smoothUse = ws.use.slice(0, ws.rows.n);
  let bestBreak = Number.NaN;
  let bestLoss = refineStart(ws, BREAK_SD, 3) - LEAST_FALL;
  for (let j = SIDE; j <= temperatures.length - SIDE; j++) {
    const breakK = (temperatures[j - 1]! + temperatures[j]!) / 2;
    if (!seenWithinSources(ws, breakK)) continue;
    const loss = lossWithBreak(ws, breakK);
    if (loss >= bestLoss) continue;
    bestBreak = breakK;
    bestLoss = loss;
  }
  if (Number.isNaN(bestBreak)) {
    fillBasis(ws, Number.NaN);
    ws.use.set(smoothUse);
  } else lossWithBreak(ws, bestBreak);
}

/** Start of one system whose curve is known to break at a temperature, K. */
export function startAtBreak(ws: RobustWorkspace, breakK: number): void {
  fillBasis(ws, Number.NaN);
  robustStart(ws);
  lossWithBreak(ws, breakK);
}

function pointsOff(ws: RobustWorkspace, by: number): number {
  let off = 0;
  for (let k = 0; k < ws.rows.n; k++) {
    if (ws.usable[k] === 1 && Math.abs(residual(ws, ws.smooth, k)) > by) off++;
  }
  return off;
}

/** Bounded loss with a break at a temperature; infinite where the break is not concave. */
function lossWithBreak(ws: RobustWorkspace, breakK: number): number {
  fillBasis(ws, breakK);
  ws.use.set(ws.usable.subarray(0, ws.rows.n));
  refineStart(ws, 4 * BREAK_SD, 2);
  const loss = refineStart(ws, BREAK_SD, 3);
  return modelOf(ws).coefficients[SLOPE_CHANGE]! < 0 ? loss : Number.POSITIVE_INFINITY;
}

/**
 * Whether sources that cross the break, each with two points on either side, have three temperatures a side between
 * them: sources that lie wholly on one side differ in slope for other reasons too.
 */
function seenWithinSources(ws: RobustWorkspace, breakK: number): boolean {
  const sides: readonly [Set<number>, Set<number>] = [new Set(), new Set()];
  for (let g = 0; g < ws.groups; g++) {
    const own: readonly [number[], number[]] = [[], []];
    for (let k = ws.groupStart[g]!; k < ws.groupStart[g + 1]!; k++) {
      const T = ws.temperatureK[k]!;
      if (ws.usable[k] === 1) own[T < breakK ? 0 : 1].push(Math.round(T / SAME_TEMPERATURE_K));
    }
    if (own[0].length < 2 || own[1].length < 2) continue;
    for (const side of [0, 1] as const) for (const T of own[side]) sides[side].add(T);
  }
  return sides[0].size >= SIDE && sides[1].size >= SIDE;
}

function distinctTemperatures(ws: RobustWorkspace): number[] {
  const sorted = Float64Array.from(ws.temperatureK.subarray(0, ws.rows.n).filter((_, k) => ws.usable[k] === 1)).sort();
  const distinct: number[] = [];
  for (const T of sorted) {
    if (distinct.length === 0 || T - distinct.at(-1)! > SAME_TEMPERATURE_K) distinct.push(T);
  }
  return distinct;
}
