import { AS_READ, type BlockReading } from "./causes/compete-block.ts";

/** Blocks that the prior counts for when a source's own share of a mistake is estimated. */
const PRIOR_BLOCKS = 4;
const ROUNDS = 6;

/** A tested block, as far as this needs it. */
interface Judged {
  readonly source: number;
  readonly readings: readonly BlockReading[];
}

/**
 * Posterior probabilities of the readings of every block, the blocks of a source lending one another strength: a source
 * that wrote one basis for another did so in more than one system. The share of each mistake within a source is
 * estimated by expectation and maximisation, starting from the priors; blocks that were not suspicious count as read.
 *
 * @param blocksOfSource all blocks of each source that could be judged
 */
export function sourceWidePosteriors(blocks: readonly Judged[], blocksOfSource: Int32Array): number[][] {
  const bySource = new Map<number, number[]>();
  for (const [j, { source }] of blocks.entries()) {
    const same = bySource.get(source);
    if (same) same.push(j);
    else bySource.set(source, [j]);
  }
  const posteriors: number[][] = blocks.map(({ readings }) => normalised(readings, undefined));
  for (const [source, members] of bySource) {
    for (let round = 0; round < ROUNDS; round++) {
      const expected = new Map<string, number>();
      for (const j of members) {
        for (const [r, { key }] of blocks[j]!.readings.entries())
          expected.set(key, (expected.get(key) ?? 0) + posteriors[j]![r]!);
      }
      const unsuspicious = Math.max(0, blocksOfSource[source]! - members.length);
      expected.set(AS_READ, (expected.get(AS_READ) ?? 0) + unsuspicious);
      const all = members.length + unsuspicious;
      const share = (reading: BlockReading) =>
        (PRIOR_BLOCKS * Math.exp(reading.logPrior) + (expected.get(reading.key) ?? 0)) / (PRIOR_BLOCKS + all);
      for (const j of members) posteriors[j] = normalised(blocks[j]!.readings, share);
    }
  }
  return posteriors;
}

function normalised(
  readings: readonly BlockReading[],
  share: ((reading: BlockReading) => number) | undefined,
): number[] {
  const logs = readings.map((reading) => (share ? Math.log(share(reading)) : reading.logPrior) + reading.logDensity);
  const top = Math.max(...logs);
  const weights = logs.map((log) => Math.exp(log - top));
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return weights.map((weight) => weight / sum);
}
