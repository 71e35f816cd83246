import { safeText } from "../problems/safe-text.ts";
import type { CheckedRow, CheckResult } from "../records/generated/check-result.ts";
import { VERDICTS, type Verdict } from "../screen/verdicts.ts";

const show = (value: number | string | undefined): string =>
  typeof value === "number" ? String(Number(value.toPrecision(4))) : safeText(value ?? "", 60);

/** Solute, form, solvent and temperature of a row. */
function subject(row: CheckedRow): string {
  const form = row.solid_form === "unspecified" ? "" : ` (${safeText(row.solid_form, 30)})`;
  return `${safeText(row.solute, 40)}${form} in ${safeText(row.solvent, 40)} at ${(row.temperature_K - 273.15).toFixed(1)} °C`;
}

/** A row that needs a person: what was found, expected, suspected, and what to look at. */
function inFull(row: CheckedRow): string[] {
  const unit = safeText(row.reported_unit, 40);
  const lines = [
    `line ${row.line}: ${row.verdict}: ${subject(row)}`,
    `  found     ${show(row.reported_value)} ${unit}`,
  ];
  if (row.expected_value !== undefined) {
    const limits =
      row.expected_low === undefined ? "" : `, within ${show(row.expected_low)} to ${show(row.expected_high)} (95 %)`;
    lines.push(`  expected  ${show(row.expected_value)} ${unit}${limits}`);
  }
  lines.push(`  seen      ${safeText(row.evidence, 500)}`);
  if (row.suspected_cause !== undefined) {
    const sure = row.cause_probability === undefined ? "" : `, probability ${row.cause_probability.toFixed(2)}`;
    const proposed =
      row.proposed_value === undefined ? "" : `; the value would then be ${show(row.proposed_value)} ${unit}`;
    lines.push(`  suspected ${row.suspected_cause}${sure}${proposed}`);
  }
  if (row.look_at !== "") lines.push(`  look at   ${safeText(row.look_at, 500)}`);
  return [...lines, ""];
}

/** A row in one line. */
function inShort(row: CheckedRow): string {
  const expected =
    row.deviation_percent === undefined
      ? `: ${safeText(row.evidence, 200)}${row.look_at === "" ? "" : `; look at ${safeText(row.look_at, 200)}`}`
      : `: ${show(row.reported_value)}, expected ${show(row.expected_value)} ${safeText(row.reported_unit, 40)} (${row.deviation_percent >= 0 ? "+" : ""}${row.deviation_percent.toFixed(1)} %)`;
  return `  line ${row.line}: ${subject(row)}${expected}`;
}

const HEADINGS: Readonly<Record<Verdict, string>> = {
  "off the curve": "Off the curve",
  "cannot tell": "Cannot tell",
  "outside the range": "Outside the range of the collection's data",
  "new system": "New systems",
  fits: "Fits",
};

/** The verdicts for people: what needs a person first and in full, the rest a line each, then the summary of the file. */
export function verdictLines(result: CheckResult): string[] {
  const of = (verdict: Verdict) => result.rows.filter((row) => row.verdict === verdict);
  const off = of("off the curve");
  const lines = off.length === 0 ? [] : [HEADINGS["off the curve"], "", ...off.flatMap(inFull)];
  for (const verdict of ["cannot tell", "outside the range", "new system", "fits"] as const) {
    const rows = of(verdict);
    if (rows.length > 0) lines.push(HEADINGS[verdict], ...rows.map(inShort), "");
  }
  const counts = VERDICTS.map((verdict) => `${result.verdicts[verdict]} ${verdict}`).join(", ");
  return [
    ...lines,
    `${safeText(result.file)}: ${result.readings} readings, ${result.accepted} judged, ${result.refused} refused`,
    counts,
  ];
}
