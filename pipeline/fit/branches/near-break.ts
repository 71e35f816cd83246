import { SLOPE_CHANGE } from "../../curves/screening-basis.ts";
import { modelOf, type RobustWorkspace } from "../robust/robust-workspace.ts";

/** How near to a break the metastable branch is still met, and the break itself uncertain, K. */
const NEAR_K = 3;

/**
 * How far the other branch, extended across the break, lies above the curve at a point within 3 K of the break, ln value;
 * 0 elsewhere. The stable branch is the lower one, so that the other lies above: a point between the two may have
 * been measured on a solid that is not yet, or no longer, stable.
 */
export function otherBranchAbove(ws: RobustWorkspace, k: number): number {
  const T = ws.temperatureK[k]!;
  if (!(Math.abs(T - ws.breakK) <= NEAR_K)) return 0;
  const { coefficients, p } = modelOf(ws);
  const uBreak = ws.centreK / ws.breakK - 1;
  const u = ws.centreK / T - 1;
  let difference = coefficients[SLOPE_CHANGE]! * (uBreak - u);
  if (p > SLOPE_CHANGE + 1) {
    const bend = u - uBreak - Math.log((1 + u) / (1 + uBreak)) - ((u - uBreak) * uBreak) / (1 + uBreak);
    difference += coefficients[SLOPE_CHANGE + 1]! * bend;
  }
  return Math.max(0, T > ws.breakK ? -difference : difference);
}

/** The part of a deviation that the other branch does not explain: 0 for a point between the two. */
export function apartFromBranches(ws: RobustWorkspace, k: number): number {
  const deviation = ws.deviation[k]!;
  return deviation > 0 ? Math.max(0, deviation - otherBranchAbove(ws, k)) : deviation;
}
