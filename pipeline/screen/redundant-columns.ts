import type { Flag } from "../records/fits.ts";
import { type MeasurementTable, RowState, textOf } from "../records/measurements.ts";
import { parseNumber } from "../records/number-text.ts";
import { middle } from "./middle.ts";
import type { ScreenInput } from "./screen-input.ts";
import { counted, offBy, threeDigits } from "./wording.ts";

/** Rows of a source from which a carried column can be seen to repeat the value. */
const LEAST_ROWS = 8;
/** Rows that are looked at first: a column that does not follow the value in these is left alone. */
const SAMPLE = 24;
/** Share of the rows that must follow the value before the rest is told. */
const SHARE = 0.8;
/** Relative tolerance of the ratio itself, beside the rounding of both numbers. */
const RATIO_TOLERANCE = 5e-4;
/** Beyond so many tolerances a row is told. */
const TOLD_BEYOND = 2;
/** Most rows of one source told one by one. */
const MOST_ROWS = 12;

/** A number as it stands in a cell, with half a unit of its last digit. */
interface Written {
  readonly row: number;
  readonly value: number;
  readonly other: number;
  /** Rounding of the other number, and of the value as a share of it. */
  readonly otherRounding: number;
  readonly valueRounding: number;
}

/**
 * Notices of rows whose carried column contradicts the value: where a column of a source is the value times one number
 * for nearly every row (a mass charged beside a concentration, say), the rows that break the pattern hold a slip in one of
 * the two, however small: no curve is needed to see it, and no curve could see one of 2 %.
 */
export function redundantColumnFlags(input: ScreenInput): Flag[] {
  const { table } = input;
  const systemOf = systemByRow(input);
  const flags: Flag[] = [];
  for (let from = 0; from < table.count; ) {
    let to = from + 1;
    while (to < table.count && table.source[to] === table.source[from]) to++;
    if (to - from >= LEAST_ROWS && table.carried[from] !== 0) flags.push(...ofSource(input, systemOf, from, to));
    from = to;
  }
  return flags;
}

function systemByRow({ table, systems }: ScreenInput): Int32Array {
  const systemOf = new Int32Array(table.count);
  for (const { index, rows } of systems) for (const row of rows) systemOf[row] = index;
  return systemOf;
}

/** Text of each carried column of a row, by heading. */
function carriedCells(table: MeasurementTable, row: number): Map<string, string> {
  const cells = new Map<string, string>();
  for (const part of textOf(table, table.carried[row] as number).split("; ")) {
    const at = part.indexOf("=");
    if (at > 0) cells.set(part.slice(0, at), part.slice(at + 1));
  }
  return cells;
}

/** Half a unit of the last decimal of a plain number as text. */
const halfUnit = (text: string): number => 0.5 * 10 ** -(/[.,](\d+)/.exec(text)?.[1]?.length ?? 0);

function writtenAt(table: MeasurementTable, row: number, heading: string): Written | undefined {
  const value = table.reportedValue[row] as number;
  if (table.state[row] === RowState.interval || !(value > 0)) return undefined;
  const text = carriedCells(table, row).get(heading) ?? "";
  const read = parseNumber(text, text.includes(",") ? "," : ".");
  if (!read.ok || !(read.value > 0)) return undefined;
  const other = read.value;
  return { row, value, other, otherRounding: halfUnit(text), valueRounding: halfUnit(String(value)) };
}

function ofSource(input: ScreenInput, systemOf: Int32Array, from: number, to: number): Flag[] {
  return [...carriedCells(input.table, from).keys()].flatMap((heading): Flag[] => {
    const first = read(input.table, heading, from, Math.min(to, from + SAMPLE));
    if (ratioOf(first) === undefined) return [];
    const all = read(input.table, heading, from, to);
    const ratio = ratioOf(all);
    if (ratio === undefined) return [];
    const odd = all.filter((written) => strays(written, ratio) > TOLD_BEYOND);
    if (odd.length === 0) return [];
    const told = (written: Written) => evidence(input, systemOf, heading, written, ratio, all.length - odd.length);
    const source = input.table.source[from] as number;
    const common = {
      code: "columns-disagree",
      severity: "notice",
      source,
      lookAt: "Look at both numbers in the original: one of the two was mistyped.",
    } as const;
    if (odd.length <= MOST_ROWS) {
      return odd.map((written) => ({
        ...{ ...common, scope: "measurement", row: written.row, system: systemOf[written.row] as number },
        evidence: told(written),
      }));
    }
    const [worst] = [...odd].sort((a, b) => strays(b, ratio) - strays(a, ratio));
    const line = input.table.line[(worst as Written).row];
    return [
      {
        ...{ ...common, scope: "source" },
        evidence: `${counted(odd.length, "row")} contradict the column ${heading}; the furthest, line ${line}: ${told(worst as Written)}`,
      },
    ];
  });
}

function read(table: MeasurementTable, heading: string, from: number, to: number): Written[] {
  const found: Written[] = [];
  for (let row = from; row < to; row++) {
    const written = writtenAt(table, row, heading);
    if (written !== undefined) found.push(written);
  }
  return found;
}

/** How far a row lies from the ratio, in tolerances. */
function strays({ value, other, otherRounding, valueRounding }: Written, ratio: number): number {
  const tolerance = otherRounding + ratio * valueRounding + RATIO_TOLERANCE * other;
  return Math.abs(other - ratio * value) / tolerance;
}

/** The number by which the values are multiplied in the column; undefined where there is none that most rows follow. */
function ratioOf(written: readonly Written[]): number | undefined {
  if (written.length < LEAST_ROWS) return undefined;
  const ratio = middle(written.map(({ value, other }) => other / value));
  const following = written.filter((one) => strays(one, ratio) <= 1);
  // Equal values would follow anything.
  const distinct = new Set(following.map(({ value }) => value)).size;
  return following.length >= SHARE * written.length && distinct >= LEAST_ROWS ? ratio : undefined;
}

function evidence(
  input: ScreenInput,
  systemOf: Int32Array,
  heading: string,
  { row, value, other }: Written,
  ratio: number,
  following: number,
): string {
  const { table } = input;
  const unit = textOf(table, table.reportedUnit[row] as number);
  const expected = other / ratio;
  const said = `${value} ${unit} stands beside ${heading} = ${other}, with which ${fiveDigits(expected)} would go`;
  const times = Math.abs(ratio - 1) < RATIO_TOLERANCE ? "equals" : `is ${threeDigits(ratio)} times`;
  const pattern = `in ${counted(following, "other row")} the column ${times} the value`;
  const fit = input.fits[systemOf[row] as number];
  const i = fit?.points.row.indexOf(row) ?? -1;
  if (fit === undefined || i < 0 || !Number.isFinite(fit.deviation[i])) return `${said}; ${pattern}`;
  const asRead = fit.deviation[i] as number;
  const reread = input.reread(row, { kind: "value", value: expected });
  if (reread === undefined) return `${said}; ${pattern}`;
  const asOther = asRead + reread.lnValue - (fit.points.lnValue[i] as number);
  return `${said}; ${pattern}; from the other points the value is ${offBy(asRead)}, the other would be ${offBy(asOther)}`;
}

/** Five significant digits: the slip may stand in the last. */
function fiveDigits(value: number): string {
  return String(Number(value.toPrecision(5)));
}
