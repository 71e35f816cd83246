import type { Flag } from "../records/fits.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { System } from "../records/systems.ts";
import { middle } from "./middle.ts";
import { roundingOf } from "./rounding.ts";
import { type ScreenInput, sourceName } from "./screen-input.ts";
import { counted } from "./wording.ts";

/** Values that agree to this part are the same number, whatever units they were written in. */
const SAME_VALUE = 2e-4;
/** Values in digits coarser than this say nothing by being equal. */
const COARSEST = 0.005;
/** ln of the largest chance at which equal values are taken for copies: 1 in 1000. */
const LARGEST_LOG_CHANCE = -Math.log(1000);
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

/** Values of one block that another source gives as well: how many, and ln of the chance that each pair is equal. */
interface Shared {
  pairs: number;
  logChance: number;
}

/** Blocks of one system that share most of their temperatures and, there, their values. */
function reReported(input: ScreenInput, system: System): Flag[] {
  const { table } = input;
  const { rows } = system;
  const twins = new Map<number, Map<number, Shared>>();
  let scatter = Number.NaN;
  for (let i = 1; i < rows.length; i++) {
    for (let j = 0; j < i; j++) {
      const width = sameMeasurement(table, rows[i]!, rows[j]!);
      if (width === undefined) continue;
      if (Number.isNaN(scatter)) scatter = scatterOf(input, system.index);
      const [later, earlier] = [table.source[rows[i]!]!, table.source[rows[j]!]!];
      const counts = twins.get(later) ?? new Map<number, Shared>();
      twins.set(later, counts);
      const shared = counts.get(earlier) ?? { pairs: 0, logChance: 0 };
      counts.set(earlier, shared);
      shared.pairs++;
      shared.logChance += Math.log(Math.min(1, (2 * width) / (Math.sqrt(2 * Math.PI) * scatter)));
    }
  }
  return [...twins].flatMap(([later, counts]) => repeatsOf(input, system, later, counts));
}

/** Standard deviation, ln value, of the difference between independent measurements by two sources. */
function scatterOf({ fits }: ScreenInput, system: number): number {
  const fit = fits[system]!;
  const noise = fit.points.n === 0 ? 0 : middle([...fit.noiseSd]);
  return Math.SQRT2 * Math.hypot(fit.betweenSd, noise);
}

/**
 * How near (ln value) two rows of different sources at one temperature would be by rounding alone, whatever the unit, where
 * they are that near; undefined where they are not.
 */
function sameMeasurement(table: MeasurementTable, a: number, b: number): number | undefined {
  const { massRatio, temperatureK, source, reportedValue } = table;
  if (!(Math.abs(temperatureK[a]! - temperatureK[b]!) < SAME_TEMPERATURE_K) || source[a] === source[b])
    return undefined;
  const apart = Math.abs(massRatio[a]! / massRatio[b]! - 1);
  if (!(apart < COARSEST)) return undefined;
  const rounding = Math.max(roundingOf(reportedValue[a]!), roundingOf(reportedValue[b]!));
  const tolerance = Math.min(COARSEST, Math.max(SAME_VALUE, rounding));
  return apart <= tolerance ? Math.max(tolerance, rounding) : undefined;
}

/** The notice for the source that most of a block's values repeat, if there is one. */
function repeatsOf(input: ScreenInput, system: System, later: number, counts: ReadonlyMap<number, Shared>): Flag[] {
  const { table } = input;
  const own = [...system.rows].filter((row) => table.source[row] === later).length;
  for (const [earlier, { pairs, logChance }] of [...counts].sort((a, b) => b[1].pairs - a[1].pairs || a[0] - b[0])) {
    const chance = logChoose(own, Math.min(own, pairs)) + logChance;
    if (pairs < LEAST_PAIRS || pairs * 2 < own || chance > LARGEST_LOG_CHANCE) continue;
    return [
      {
        scope: "block",
        code: "re-reported",
        severity: "notice",
        source: later,
        system: system.index,
        evidence:
          `${pairs} of its ${counted(own, "value")} are those of ${sourceName(input, earlier)} at the same temperatures, ` +
          `to the digits given; by chance about 1 in 10^${Math.round(-chance / Math.LN10)}`,
        lookAt:
          "Look at whether both report one measurement: then it counts once. Exact copies already do, in the vote of the " +
          "sources and in the curve.",
      },
    ];
  }
  return [];
}

/** ln of the number of ways to choose k of n. */
function logChoose(n: number, k: number): number {
  let sum = 0;
  for (let i = 1; i <= k; i++) sum += Math.log((n - k + i) / i);
  return sum;
}
