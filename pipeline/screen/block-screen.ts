import { studentTSurvival } from "../numerics/distributions.ts";
import { benjaminiHochbergThreshold } from "../numerics/multiple-testing.ts";
import type { RobustFit } from "../records/fits.ts";
import type { Suspects } from "./causes/cause.ts";
import { AS_READ, type BlockReading, blockOffset, blockReadings, IMPOSSIBLE } from "./causes/compete-block.ts";
import { middle } from "./middle.ts";
import { type ScreenInput, thresholdOf } from "./screen-input.ts";
import { sourceWidePosteriors } from "./source-wide.ts";
import { deletedOffset, fitSources, type SystemModel } from "./system-model.ts";

/** A block that is off as a whole. */
export interface OffBlock {
  readonly system: number;
  readonly source: number;
  readonly points: readonly number[];
  /** Median deviation from the curve of the other sources, ln value, and its z. */
  readonly offset: number;
  readonly z: number;
  /** Deviations of the points from that curve, in the order of `points`. */
  readonly deviations: readonly number[];
  readonly otherSources: number;
  readonly threshold: number;
  readonly readings: readonly BlockReading[];
  /** Posterior probability of each reading. */
  readonly posterior: readonly number[];
}

interface Tested extends Omit<OffBlock, "posterior"> {
  readonly p: number;
}

/** Points of a block from which it is judged as a whole; one point alone is a point. */
const LEAST_POINTS = 2;
/** Other sound sources needed; one for a source that no vote could count, its temperatures being impossible. */
const LEAST_OTHERS = 2;
/** Part of the least threshold of a system from which an offset is worth the full test. */
const NEAR_SHARE = 0.7;
/** A block is off where `as read` is less likely than this. */
const AS_READ_BELOW = 0.5;

/**
 * Tests every block of a system with at least two other sound sources, comparing the block with the curve of those.
 * Flagged is what passes Benjamini-Hochberg over all blocks, the material threshold in its median, and is better
 * explained by some mistake (or a free offset) than as read.
 */
export function screenBlocks(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  suspectsOf: (system: number, source: number, rows: readonly number[]) => Suspects,
): OffBlock[] {
  const tested: Tested[] = [];
  const blocksOfSource = new Int32Array(input.sourceNames.length);
  let total = 0;
  for (const fit of input.fits) {
    if (fit.agreement !== "agreed") continue;
    const judged = judgedSources(fit);
    total += judged.length;
    for (const source of judged) blocksOfSource[source]!++;
    const suspicious = suspiciousSources(input, models[0], fit, judged);
    if (suspicious.length === 0) continue;
    const blocks = blocksOf(fit);
    for (const source of suspicious) {
      const others = fit.soundSources.filter((other) => other !== source);
      const block = testBlock(input, models, suspectsOf, fit, source, blocks.get(source)!, others);
      if (block !== undefined) tested.push(block);
    }
  }
  // A block whose deviation cannot be told (NaN) is no evidence; it counts among the tests and is never rejected.
  const limit = benjaminiHochbergThreshold(
    tested.map(({ p }) => p).filter((p) => !Number.isNaN(p)),
    input.settings.false_discovery_rate,
    total,
  );
  const posteriors = sourceWidePosteriors(tested, blocksOfSource);
  return tested
    .map((block, j) => ({ ...block, posterior: posteriors[j]! }))
    .filter(({ p, posterior, readings }) => {
      const asRead = readings.findIndex(({ key }) => key === AS_READ);
      return p <= limit && (posterior[asRead] ?? 1) < AS_READ_BELOW;
    });
}

/** Sources whose block can be compared with enough others. */
function judgedSources({ soundSources, apartSources, points }: RobustFit): number[] {
  if (soundSources.length === 0) return [];
  const sound = soundSources.length > LEAST_OTHERS ? soundSources : [];
  const copies = [...new Set(points.source)].filter((s) => !soundSources.includes(s) && !apartSources.includes(s));
  return [...sound, ...apartSources, ...copies].filter((source) => {
    let count = 0;
    for (let i = 0; i < points.n && count < LEAST_POINTS; i++) if (points.source[i] === source) count++;
    return count >= LEAST_POINTS;
  });
}

/** Judged sources that are set apart, or whose offset or points come near a threshold: a cheap look before the test. */
function suspiciousSources(
  input: ScreenInput,
  model: SystemModel,
  fit: RobustFit,
  judged: readonly number[],
): readonly number[] {
  if (judged.length === 0) return judged;
  let least = Number.POSITIVE_INFINITY;
  const dropped = new Set<number>();
  for (let i = 0; i < fit.points.n; i++) {
    least = Math.min(least, thresholdOf(input, fit.system, i));
    if (fit.kept[i] === 0) dropped.add(fit.points.source[i]!);
  }
  fitSources(model, fit, () => true);
  return judged.filter((source) => dropped.has(source) || Math.abs(deletedOffset(model, source)) > NEAR_SHARE * least);
}

/** Points of each source of a system, in order of first appearance. */
export function blocksOf(fit: RobustFit): Map<number, number[]> {
  const blocks = new Map<number, number[]>();
  for (let i = 0; i < fit.points.n; i++) {
    if (!Number.isFinite(fit.deviation[i])) continue;
    const source = fit.points.source[i]!;
    const block = blocks.get(source);
    if (block) block.push(i);
    else blocks.set(source, [i]);
  }
  return blocks;
}

/** A block re-read under every cause against the curve of the others, whatever its own offset says. */
export function readBlock(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  suspectsOf: (system: number, source: number, rows: readonly number[]) => Suspects,
  fit: RobustFit,
  source: number,
  points: readonly number[],
  others: readonly number[],
): Omit<OffBlock, "posterior"> {
  const threshold = middle(points.map((point) => thresholdOf(input, fit.system, point)));
  const sound = new Set(others);
  fitSources(models[0], fit, (other) => sound.has(other));
  const bare = { input, models, fit, points, source, threshold };
  const { median, sd, deviations } = blockOffset(bare);
  const suspects = suspectsOf(
    fit.system,
    source,
    points.map((point) => fit.points.row[point]!),
  );
  const readings = blockReadings({ ...bare, suspects });
  const { system } = fit;
  return {
    ...{ system, source, points, offset: median, z: median / sd, deviations, otherSources: others.length },
    ...{ threshold, readings },
  };
}

/** A block compared with the others; undefined where it is plainly within both limits. */
function testBlock(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  suspectsOf: (system: number, source: number, rows: readonly number[]) => Suspects,
  fit: RobustFit,
  source: number,
  points: readonly number[],
  others: readonly number[],
): Tested | undefined {
  const threshold = middle(points.map((point) => thresholdOf(input, fit.system, point)));
  const sound = new Set(others);
  fitSources(models[0], fit, (other) => sound.has(other));
  const rows = points.map((point) => fit.points.row[point]!);
  const bare = { input, models, fit, points, source, threshold };
  const { median, sd, failing, alike, deviations } = blockOffset(bare);
  const z = median / sd;
  const clearlyOff = Math.abs(median) > threshold && alike > 0.5 && Math.abs(z) >= 2;
  if (!clearlyOff && failing <= 0.5 && !points.every((point) => fit.kept[point] === 0)) return undefined;
  const readings = blockReadings({ ...bare, suspects: suspectsOf(fit.system, source, rows) });
  const impossible = readings.some(({ key, logDensity }) => key === AS_READ && logDensity === IMPOSSIBLE);
  if (!clearlyOff && failing <= 0.5 && !impossible) return undefined;
  // A block whose points mostly fail to both sides has no offset to test: its typical point speaks for it.
  const typical = middle(points.map((point) => Math.abs(fit.deviation[point]! / fit.deviationSd[point]!)));
  const strongest = failing > 0.5 ? Math.max(Math.abs(z), typical) : Math.abs(z);
  const p = impossible ? 0 : 2 * studentTSurvival(strongest, Math.max(1, fit.degreesOfFreedom));
  return {
    system: fit.system,
    source,
    points,
    offset: median,
    deviations,
    z,
    otherSources: others.length,
    threshold,
    readings,
    p,
  };
}
