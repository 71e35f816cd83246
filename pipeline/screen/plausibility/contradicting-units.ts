import type { Flag, RobustFit } from "../../records/fits.ts";
import { textOf } from "../../records/measurements.ts";
import { blocksOf } from "../block-screen.ts";
import { isOutsideLiquid } from "../liquid-range.ts";
import { materialThreshold } from "../material-threshold.ts";
import type { ScreenInput } from "../screen-input.ts";
import { offBy, threeDigits } from "../wording.ts";

/** Temperatures that agree to this (K) are the same. */
const SAME_TEMPERATURE_K = 0.011;
/** Times the uncertainty of a conversion beyond which two units contradict each other. */
const BEYOND_U = 3;

/**
 * Notices of one source that gives one solution in two units which contradict each other: mass percent beside mol/L, say,
 * where the density is known. One of the two columns holds a slip, or the wrong row. Readings in one unit are replicates
 * and are left to the curve.
 */
export function contradictingUnitFlags(input: ScreenInput): Flag[] {
  return input.fits.flatMap((fit) => {
    if (new Set(Array.from(fit.points.row, (row) => input.table.reportedUnit[row])).size < 2) return [];
    return [...blocksOf(fit).values()].flatMap((points) => contradictions(input, fit, points));
  });
}

function contradictions(input: ScreenInput, fit: RobustFit, points: readonly number[]): Flag[] {
  const { table } = input;
  const { row, temperatureK, lnValue, level, source } = fit.points;
  const unit = (i: number) => table.reportedUnit[row[i]!]!;
  const flags: Flag[] = [];
  for (const [k, later] of points.entries()) {
    const partners = points.slice(0, k).filter((earlier) => {
      const sameT = Math.abs(temperatureK[later]! - temperatureK[earlier]!) < SAME_TEMPERATURE_K;
      return sameT && unit(earlier) !== unit(later) && !isOutsideLiquid(input, fit.system, earlier);
    });
    // With several readings in the other unit, one that agrees is the same solution.
    const nearest = partners.sort(
      (a, b) => Math.abs(lnValue[a]! - lnValue[later]!) - Math.abs(lnValue[b]! - lnValue[later]!),
    );
    const [earlier] = nearest;
    if (earlier === undefined) continue;
    const apart = lnValue[later]! - lnValue[earlier]!;
    // One solution was measured once: only what the conversions share can part its two numbers.
    const u = Math.hypot(table.sharedU[row[later]!]! || 0, table.sharedU[row[earlier]!]! || 0);
    const material = materialThreshold(level[later]!, 0, input.about[fit.system]?.kind ?? "general", input.settings);
    if (!(Math.abs(apart) > Math.max(material, BEYOND_U * u))) continue;
    const would = input.inReportedUnit(row[later]!, lnValue[earlier]!);
    const here = table.reportedValue[row[later]!]!;
    const unitText = textOf(table, unit(later));
    const reads =
      would === undefined
        ? offBy(apart)
        : `${here} ${unitText} stands where ${threeDigits(would)} would follow; that is ${offBy(Math.log(here / would))}`;
    flags.push({
      ...{ scope: "measurement", code: "units-contradict", severity: "notice" },
      ...{ row: row[later]!, source: source[later]!, system: fit.system },
      evidence: `${reads} what line ${table.line[row[earlier]!]} of this source gives of the same solution in ${textOf(table, unit(earlier))}`,
      lookAt:
        "Look at both columns and at the density: rows may have slipped between them, or one was computed wrongly.",
    });
  }
  return flags;
}
