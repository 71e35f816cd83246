import type { Flag } from "../records/fits.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { System } from "../records/systems.ts";
import { type ScreenInput, sourceName } from "./screen-input.ts";
import { counted } from "./wording.ts";

/** Values that agree to this part are the same number, whatever units they were written in. */
const SAME_VALUE = 2e-4;
/** Temperatures that agree to this (K) are the same reading. */
const SAME_TEMPERATURE_K = 0.011;
/** Identical pairs from which one source is taken to repeat another; fewer can be chance at the given rounding. */
const LEAST_PAIRS = 3;

/** Notices of readings that stand twice in a source, and of blocks that repeat another source's values. */
export function repeatFlags(input: ScreenInput): Flag[] {
  return input.systems.flatMap((system) => [...sameReadingTwice(input, system), ...reReported(input, system)]);
}

function sameReadingTwice({ table }: ScreenInput, system: System): Flag[] {
  const flags: Flag[] = [];
  const { rows } = system;
  for (let i = 1; i < rows.length; i++) {
    const row = rows[i]!;
    const earlier = earlierTwin(table, rows, i);
    if (earlier === undefined) continue;
    flags.push({
      scope: "measurement",
      code: "exact-repeat",
      severity: "notice",
      row,
      source: table.source[row]!,
      system: system.index,
      evidence: `the same value at the same temperature stands in line ${table.line[earlier]} of this source`,
      lookAt: "Look at whether the row was entered twice; a true replicate is better told by the column `replicate`.",
    });
  }
  return flags;
}

/** First row before the i-th that holds the same reading of the same source. */
function earlierTwin(table: MeasurementTable, rows: Int32Array, i: number): number | undefined {
  const row = rows[i]!;
  const { source, temperatureK, reportedValue, reportedUnit } = table;
  for (let j = 0; j < i; j++) {
    const other = rows[j]!;
    if (reportedValue[other] !== reportedValue[row] || temperatureK[other] !== temperatureK[row]) continue;
    if (source[other] === source[row] && reportedUnit[other] === reportedUnit[row]) return other;
  }
  return undefined;
}

/** Blocks of one system that share most of their temperatures and, there, their values. */
function reReported(input: ScreenInput, system: System): Flag[] {
  const { table } = input;
  const { rows } = system;
  const twins = new Map<number, Map<number, number>>();
  for (let i = 1; i < rows.length; i++) {
    for (let j = 0; j < i; j++) {
      if (!sameMeasurement(table, rows[i]!, rows[j]!)) continue;
      const [later, earlier] = [table.source[rows[i]!]!, table.source[rows[j]!]!];
      const counts = twins.get(later) ?? new Map<number, number>();
      twins.set(later, counts.set(earlier, (counts.get(earlier) ?? 0) + 1));
    }
  }
  return [...twins].flatMap(([later, counts]) => repeatsOf(input, system, later, counts));
}

/** Two rows of different sources with one temperature and one value, whatever the unit. */
function sameMeasurement({ massRatio, temperatureK, source }: MeasurementTable, a: number, b: number): boolean {
  const ratio = massRatio[a]! / massRatio[b]!;
  if (!(ratio > 1 - SAME_VALUE && ratio < 1 + SAME_VALUE) || source[a] === source[b]) return false;
  return Math.abs(temperatureK[a]! - temperatureK[b]!) < SAME_TEMPERATURE_K;
}

/** The notice for the source that most of a block's values repeat, if there is one. */
function repeatsOf(input: ScreenInput, system: System, later: number, counts: ReadonlyMap<number, number>): Flag[] {
  const { table } = input;
  const own = [...system.rows].filter((row) => table.source[row] === later).length;
  for (const [earlier, same] of [...counts].sort((a, b) => b[1] - a[1] || a[0] - b[0])) {
    if (same < LEAST_PAIRS || same * 2 < own) continue;
    return [
      {
        scope: "block",
        code: "re-reported",
        severity: "notice",
        source: later,
        system: system.index,
        evidence: `${same} of its ${counted(own, "value")} are those of ${sourceName(input, earlier)} at the same temperatures`,
        lookAt: "Look at whether both report one measurement: then it counts once, not twice.",
      },
    ];
  }
  return [];
}
