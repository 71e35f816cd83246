import { safeText } from "../problems/safe-text.ts";
import type { CheckResult, CurveChange, MergedSystem, RepeatedRows } from "../records/generated/check-result.ts";
import { lineRange } from "./verdict-text.ts";

/** Systems told in the terminal before the rest is left to --json. */
const SHOWN = 8;
/** Changes below this, percent, are told as none. */
const NO_CHANGE = 0.05;

/** Offsets that differ between systems by more than this, percent, have no mean worth telling where it may be none. */
const NO_COMMON_OFFSET = 5;

const signed = (percent: number) => `${percent >= 0 ? "+" : ""}${percent.toFixed(1)} %`;
const digits = (value: number) => String(Number(value.toPrecision(4)));

/** Solute, form and solvent of a system. */
function subject({ solute, solid_form, solvent }: Pick<MergedSystem, "solute" | "solid_form" | "solvent">): string {
  const form = solid_form === "unspecified" ? "" : ` (${safeText(solid_form, 30)})`;
  return `${safeText(solute, 40)}${form} in ${safeText(solvent, 60)}`;
}

/** How the file stands to the others, what it repeats, and what would change if it were merged; for people. */
export function mergedLines(result: CheckResult): string[] {
  return [
    ...section("The file beside the other sources", offsetLines(result)),
    ...section("Written before", firstOf(result.repeats.map(repeatLine))),
    ...section("If it were merged as it is", firstOf(result.if_merged.map(changeLine))),
  ];
}

function section(heading: string, lines: readonly string[]): string[] {
  return lines.length === 0 ? [] : ["", heading, ...lines];
}

function firstOf(lines: readonly string[]): string[] {
  if (lines.length <= SHOWN) return [...lines];
  return [...lines.slice(0, SHOWN), `  and ${lines.length - SHOWN} more with --json`];
}

function offsetLines({ offsets, pooled_offset: pooled }: CheckResult): string[] {
  const limits = (low: number, high: number) => `(95 % limits ${signed(low)} to ${signed(high)})`;
  const told = firstOf(
    offsets.map((one) => {
      const { rows, other_sources: others, offset_percent, low_percent, high_percent } = one;
      const by = `${rows} ${rows === 1 ? "row" : "rows"} against ${others} ${others === 1 ? "source" : "sources"}`;
      return `  ${subject(one)}: ${signed(offset_percent)} ${limits(low_percent, high_percent)}, ${by}`;
    }),
  );
  if (pooled === undefined) return told;
  const { systems, offset_percent, low_percent, high_percent, between_systems_percent: between } = pooled;
  if (between > NO_COMMON_OFFSET && low_percent < 0 && high_percent > 0)
    return [
      ...told,
      `  over ${systems} systems: no common offset, they differ by ${between.toFixed(0)} % (standard deviation)`,
    ];
  return [...told, `  over ${systems} systems: ${signed(offset_percent)} ${limits(low_percent, high_percent)}`];
}

function repeatLine({ code, lines, evidence }: RepeatedRows): string {
  const where = code === "re-reporting-source" ? "the file" : lineRange(lines);
  return `  ${where}: ${safeText(evidence, 300)}`;
}

/** One system: where the curve moves most, grade, recovery, flags. */
function changeLine(system: MergedSystem): string {
  const { grade_before, grade_after, recovery_before_percent: before, recovery_after_percent: after } = system;
  const parts = [
    curveChange(system),
    grade_before === grade_after || grade_before === ""
      ? `grade ${grade_after}`
      : `grade ${grade_before} -> ${grade_after}`,
    recovery(before, after),
    system.new_flags === 0
      ? ""
      : `${system.new_flags} more ${system.new_flags === 1 ? "flag needs" : "flags need"} a person`,
  ];
  return `  ${subject(system)}: ${parts.filter((part) => part !== "").join("; ")}`;
}

function recovery(before: number | undefined, after: number | undefined): string {
  const told = (value: number | undefined) => (value === undefined ? "none" : `${value.toFixed(1)} %`);
  if (before === undefined && after === undefined) return "";
  return told(before) === told(after) ? `recovery ${told(after)}` : `recovery ${told(before)} -> ${told(after)}`;
}

function curveChange({ changes, curve_before, curve_after, points_before, points_after }: MergedSystem): string {
  const points = `${points_before} -> ${points_after} points`;
  if (changes.length === 0)
    return points_after > 0
      ? `${safeText(curve_before, 60)} -> ${safeText(curve_after, 60)}, ${points}`
      : `no curve: ${safeText(curve_after, 120)}`;
  const size = ({ change_percent }: CurveChange) => Math.abs(change_percent);
  const most = changes.reduce((a, b) => (size(b) > size(a) ? b : a));
  if (size(most) < NO_CHANGE) return `no change of the curve, ${points}`;
  const at = `${(most.temperature_K - 273.15).toFixed(1)} °C`;
  const moved = `${digits(most.before_g_per_100g_solvent)} -> ${digits(most.after_g_per_100g_solvent)} g/100 g solvent`;
  return `most at ${at}: ${moved} (${signed(most.change_percent)}), ${points}`;
}
