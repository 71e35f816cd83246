import { safeText } from "../problems/safe-text.ts";
import type { CheckedRow, CheckResult } from "../records/generated/check-result.ts";
import { VERDICTS, type Verdict } from "../screen/verdicts.ts";

const show = (value: number | string | undefined): string =>
  typeof value === "number" ? String(Number(value.toPrecision(4))) : safeText(value ?? "", 60);
const celsius = (temperatureK: number) => (temperatureK - 273.15).toFixed(1);

/** Solute, form and solvent of a row. */
function system(row: CheckedRow): string {
  const form = row.solid_form === "unspecified" ? "" : ` (${safeText(row.solid_form, 30)})`;
  return `${safeText(row.solute, 40)}${form} in ${safeText(row.solvent, 40)}`;
}

const subject = (row: CheckedRow) => `${system(row)} at ${celsius(row.temperature_K)} °C`;

/** `line 4`, `lines 2 to 9`, `lines 2, 5 and 9`. */
export function lineRange(lines: readonly number[]): string {
  if (lines.length === 1) return `line ${lines[0]}`;
  const last = lines.at(-1) as number;
  const contiguous = last - (lines[0] as number) === lines.length - 1;
  return contiguous && lines.length > 2
    ? `lines ${lines[0]} to ${last}`
    : `lines ${lines.slice(0, -1).join(", ")} and ${last}`;
}

/** True for a row that a person must look at: off the curve, or off among the rows of the file itself. */
export function needsLook({ verdict, cause_scope }: CheckedRow): boolean {
  return verdict === "off the curve" || cause_scope !== undefined;
}

/** Cause, probability and the value that would fit. */
function suspected({ suspected_cause, cause_detail, cause_probability, proposed_value }: CheckedRow, unit: string) {
  if (suspected_cause === undefined) return [];
  const sure = cause_probability === undefined ? "" : `, probability ${cause_probability.toFixed(2)}`;
  const detail = cause_detail === undefined ? "" : `: ${safeText(cause_detail, 200)}`;
  const proposed = proposed_value === undefined ? "" : `; the value would then be ${show(proposed_value)} ${unit}`;
  return [`  suspected ${suspected_cause}${detail}${sure}${proposed}`];
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
  lines.push(`  seen      ${safeText(row.evidence, 500)}`, ...suspected(row, unit));
  if (row.look_at !== "") lines.push(`  look at   ${safeText(row.look_at, 500)}`);
  return [...lines, ""];
}

/** Rows of one system with one finding among them: told once, a row a line. */
function together(rows: readonly CheckedRow[]): string[] {
  const [first] = rows as [CheckedRow];
  const unit = safeText(first.reported_unit, 40);
  return [
    `${lineRange(rows.map(({ line }) => line))}: ${first.verdict}, all of one kind: ${system(first)}`,
    ...rows.map((row) => {
      const expected = row.expected_value === undefined ? "" : `, expected ${show(row.expected_value)}`;
      const off = row.deviation_percent === undefined ? "" : ` (${signed(row.deviation_percent)})`;
      return `  line ${row.line}  ${celsius(row.temperature_K)} °C  found ${show(row.reported_value)}${expected} ${unit}${off}`;
    }),
    `  seen      ${safeText(first.evidence, 500)}`,
    ...suspected(first, unit),
    ...(first.look_at === "" ? [] : [`  look at   ${safeText(first.look_at, 500)}`]),
    "",
  ];
}

const signed = (percent: number) => `${percent >= 0 ? "+" : ""}${percent.toFixed(1)} %`;

/** Findings in the order of their first rows; a finding on a block or a system is told once for its rows. */
function findings(rows: readonly CheckedRow[]): string[] {
  const groups = new Map<string, CheckedRow[]>();
  for (const row of rows) {
    const own = row.cause_scope === undefined || row.cause_scope === "measurement";
    const key = own ? `${row.measurement_id}:${row.column}` : `${row.verdict}:${row.cause_scope}:${row.system}`;
    groups.set(key, [...(groups.get(key) ?? []), row]);
  }
  return [...groups.values()].flatMap((group) =>
    group.length === 1 ? inFull(group[0] as CheckedRow) : together(group),
  );
}

/** Rows that need nobody, a line a system: what was found of each, or how far they lie from the curve. */
function inShort(rows: readonly CheckedRow[]): string[] {
  const groups = new Map<string, CheckedRow[]>();
  for (const row of rows) {
    const told = row.deviation_percent === undefined ? row.evidence : "";
    groups.set(`${row.system}:${told}`, [...(groups.get(`${row.system}:${told}`) ?? []), row]);
  }
  return [...groups.values()].map((group) =>
    group.length === 1 ? oneShort(group[0] as CheckedRow) : manyShort(group),
  );
}

const why = ({ evidence, look_at }: CheckedRow) =>
  `${safeText(evidence, 200)}${look_at === "" ? "" : `; look at ${safeText(look_at, 200)}`}`;

function oneShort(row: CheckedRow): string {
  const told =
    row.deviation_percent === undefined
      ? why(row)
      : `${show(row.reported_value)}, expected ${show(row.expected_value)} ${safeText(row.reported_unit, 40)} (${signed(row.deviation_percent)})`;
  return `  line ${row.line}: ${subject(row)}: ${told}`;
}

function manyShort(rows: readonly CheckedRow[]): string {
  const [first] = rows as [CheckedRow];
  const range = (values: readonly number[], text: (value: number) => string) =>
    `${text(Math.min(...values))} to ${text(Math.max(...values))}`;
  const at = `${range(
    rows.map((row) => row.temperature_K),
    celsius,
  )} °C`;
  const off = rows.flatMap(({ deviation_percent: percent }) => (percent === undefined ? [] : [percent]));
  const told = off.length === rows.length ? `${range(off, signed)} from the curve` : why(first);
  return `  ${lineRange(rows.map(({ line }) => line))}: ${system(first)} at ${at}: ${told}`;
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
  const among = result.rows.filter((row) => row.verdict !== "off the curve" && needsLook(row));
  const lines = off.length === 0 ? [] : [HEADINGS["off the curve"], "", ...findings(off)];
  if (among.length > 0) lines.push("Off among the rows themselves, once merged", "", ...findings(among));
  for (const verdict of ["cannot tell", "outside the range", "new system", "fits"] as const) {
    const rows = of(verdict).filter((row) => !needsLook(row));
    if (rows.length > 0) lines.push(HEADINGS[verdict], ...inShort(rows), "");
  }
  const counts = VERDICTS.map((verdict) => `${result.verdicts[verdict]} ${verdict}`).join(", ");
  return [
    ...lines,
    `${safeText(result.file)}: ${result.readings} readings, ${result.accepted} judged, ${result.refused} refused`,
    counts,
  ];
}
