import type { CampReading, RobustFit } from "../../records/fits.ts";
import { isCurve, publishedCurve } from "../published-curve.ts";
import type { CurveContext, CurveSubject } from "../system-models.ts";

/**
 * Curves of the groups of sources of a system that disagree without a majority: each group is fitted as if it were alone.
 * None of them is the published curve, which such a system has not.
 *
 * @returns one reading a group, in the order of the vote; empty where there is no conflict
 */
export function campReadings(
  robust: RobustFit,
  subject: Omit<CurveSubject, "branch">,
  context: CurveContext,
): CampReading[] {
  return robust.camps.map((sources, i) => {
    const kept = robust.kept.map((mark, k) => (mark === 1 && sources.includes(robust.points.source[k]!) ? 1 : 0));
    const alone = { ...robust, kept, agreement: "agreed" } as const;
    const outcome = publishedCurve(alone, { ...subject, branch: i + 1 }, context);
    return isCurve(outcome) ? { sources, curve: outcome } : { sources };
  });
}
