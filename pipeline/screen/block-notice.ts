import type { Flag, RobustFit } from "../records/fits.ts";

/**
 * A notice on some points of a block: on the row where it is one, on the block where there are several.
 *
 * @param points positions of the points concerned, one at least
 */
export function noticeOn(
  { system, points: { row } }: RobustFit,
  source: number,
  points: readonly number[],
  told: Pick<Flag, "code" | "evidence" | "lookAt">,
): Flag {
  const flag = { severity: "notice", source, system, ...told } as const;
  return points.length === 1 ? { ...flag, scope: "measurement", row: row[points[0]!]! } : { ...flag, scope: "block" };
}
