import type { Flag } from "../records/fits.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { System } from "../records/systems.ts";
import { type ScreenInput, sourceName } from "./screen-input.ts";
import { counted, inCelsius } from "./wording.ts";

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
  const first = new Map<string, number>();
  const flags: Flag[] = [];
  for (const row of system.rows) {
    if (Number.isNaN(table.reportedValue[row])) continue;
    const key = `${table.source[row]} ${table.temperatureK[row]} ${table.reportedValue[row]} ${table.reportedUnit[row]}`;
    const earlier = first.get(key);
    if (earlier === undefined) {
      first.set(key, row);
      continue;
    }
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

/** Blocks of one system that share most of their temperatures and, there, their values. */
function reReported(input: ScreenInput, system: System): Flag[] {
  const { table } = input;
  const blocks = new Map<number, number[]>();
  for (const row of system.rows) {
    if (!(table.massRatio[row]! > 0)) continue;
    const source = table.source[row]!;
    const block = blocks.get(source);
    if (block) block.push(row);
    else blocks.set(source, [row]);
  }
  const sources = [...blocks.keys()].sort((a, b) => a - b);
  return sources.flatMap((later, l): Flag[] => {
    for (const earlier of sources.slice(0, l)) {
      const { same, shared, example } = compare(table, blocks.get(earlier)!, blocks.get(later)!);
      if (same < LEAST_PAIRS || same * 2 < shared) continue;
      return [
        {
          scope: "block",
          code: "re-reported",
          severity: "notice",
          source: later,
          system: system.index,
          evidence:
            `${counted(same, "value")} of ${shared} at shared temperatures are those of ${sourceName(input, earlier)}, ` +
            `for one at ${inCelsius(example)}`,
          lookAt: "Look at whether both report one measurement: then it counts once, not twice.",
        },
      ];
    }
    return [];
  });
}

function compare(table: MeasurementTable, one: readonly number[], other: readonly number[]) {
  const sorted = [...one].sort((a, b) => table.temperatureK[a]! - table.temperatureK[b]! || a - b);
  let same = 0;
  let shared = 0;
  let example = Number.NaN;
  for (const row of other) {
    const T = table.temperatureK[row]!;
    const twins = sorted.filter((candidate) => Math.abs(table.temperatureK[candidate]! - T) < SAME_TEMPERATURE_K);
    if (twins.length === 0) continue;
    shared++;
    const r = table.massRatio[row]!;
    if (!twins.some((twin) => Math.abs(table.massRatio[twin]! / r - 1) < SAME_VALUE)) continue;
    same++;
    if (Number.isNaN(example)) example = T;
  }
  return { same, shared, example };
}
