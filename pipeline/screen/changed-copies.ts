import { relativeRounding } from "../numerics/decimal-rounding.ts";
import type { Flag, RobustFit } from "../records/fits.ts";
import { textOf } from "../records/measurements.ts";
import { type CopiedBlock, RepeatKind } from "../records/repeats.ts";
import { inCelsius } from "../records/temperature-text.ts";
import { type ScreenInput, sourceName } from "./screen-input.ts";
import { offBy } from "./wording.ts";

/** Equal values wanted for each one that differs: where more differ, the tables are different editions. */
const EQUAL_PER_DIFFERENT = 4;
/** A difference below this, ln value, or of one unit in the last digit, can be rounding on the way. */
const ROUNDING = 0.002;
const ONE_UNIT = 2.1;
/** Digits of the value copied from: enough to see a single digit that changed. */
const SHOWN_DIGITS = 4;
/** Temperatures that agree to this (K) are the same reading. */
const SAME_TEMPERATURE_K = 0.011;

/**
 * Notices of single values that differ where the rest of a block repeats another source to the digits given: a misprint
 * in either copy, however small. Of two values the one that lies nearer the curve is not told to be right.
 */
export function changedCopies(input: ScreenInput, fit: RobustFit): Flag[] {
  return fit.repeats!.blocks.flatMap((block) => {
    if (block.from.length > 1) return [];
    const equal = new Set(block.equal);
    const different = block.compared.filter((i) => !equal.has(i)).flatMap((i) => differing(input, fit, block, i));
    if (different.length === 0 || block.equal.length < EQUAL_PER_DIFFERENT * different.length) return [];
    return different.map(({ point, other }) => changedFlag(input, fit, block, point, other));
  });
}

/** A point that differs from the copied source's at its temperature, with that one. */
function differing({ table }: ScreenInput, { points, repeats }: RobustFit, { from }: CopiedBlock, point: number) {
  const { n, row, source, temperatureK, lnValue } = points;
  if (repeats!.kind[point] !== RepeatKind.counts) return [];
  for (let j = 0; j < n; j++) {
    if (source[j] !== from[0] || Math.abs(temperatureK[j]! - temperatureK[point]!) >= SAME_TEMPERATURE_K) continue;
    const halves = [point, j].map((i) => relativeRounding(table.reportedValue[row[i]!]!));
    const limit = Math.max(ROUNDING, ONE_UNIT * Math.max(...halves));
    return Math.abs(lnValue[j]! - lnValue[point]!) > limit ? [{ point, other: j }] : [];
  }
  return [];
}

function changedFlag(input: ScreenInput, fit: RobustFit, block: CopiedBlock, point: number, other: number): Flag {
  const { table } = input;
  const { row, lnValue, temperatureK } = fit.points;
  const here = row[point]!;
  const there = input.inReportedUnit(here, lnValue[other]!);
  const unit = textOf(table, table.reportedUnit[here]!);
  const reads =
    there === undefined
      ? `lies ${offBy(lnValue[point]! - lnValue[other]!)} that of line ${table.line[row[other]!]}`
      : `reads ${table.reportedValue[here]} where line ${table.line[row[other]!]} reads ` +
        `${Number(there.toPrecision(SHOWN_DIGITS))} ${unit}`;
  return {
    scope: "measurement",
    code: "changed-copy",
    severity: "notice",
    row: here,
    source: block.source,
    system: fit.system,
    evidence:
      `${block.equal.length} of ${block.compared.length} values are those of ${sourceName(input, block.from[0]!)} to the ` +
      `digits given, but at ${inCelsius(temperatureK[point]!)} this one ${reads}`,
    lookAt: "Look both values up in the original: one of the two copies may hold a misprint.",
  };
}
