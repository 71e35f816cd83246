import { AS_READ, type BlockReading, FREE_OFFSET } from "./causes/compete-block.ts";

/** Blocks that the prior counts for beside the other blocks of a source. */
const PRIOR_BLOCKS = 4;

/** Share of the mistakes of a block that say nothing about the other blocks of its source: one sample, one day, one table. */
const ONE_OFF_SHARE = 0.5;

/** A tested block, as far as this needs it. */
interface Judged {
  readonly source: number;
  readonly readings: readonly BlockReading[];
}

/**
 * Posterior probabilities of the readings of every block, the blocks of a source lending one another strength: a source
 * that wrote one basis for another did so in more than one system. Each block is first judged alone; then the share of a
 * mistake among the other blocks of its source joins its prior, as in Dirichlet-multinomial sampling. One round only:
 * blocks that borrow from what they lent would talk one another into a cause. An offset without a known cause is no
 * mistake that repeats, and lends nothing. Blocks that were not suspicious count as read.
 *
 * @param blocksOfSource all blocks of each source that could be judged
 */
export function sourceWidePosteriors(blocks: readonly Judged[], blocksOfSource: Int32Array): number[][] {
  const alone = blocks.map(({ readings }) => ownPosterior(readings));
  const bySource = new Map<number, number[]>();
  for (const [j, { source }] of blocks.entries()) bySource.set(source, [...(bySource.get(source) ?? []), j]);
  const posteriors: number[][] = [...alone];
  for (const [source, members] of bySource) {
    const counts = new Map([[AS_READ, Math.max(0, blocksOfSource[source]! - members.length)]]);
    for (const j of members) {
      for (const [r, { key }] of blocks[j]!.readings.entries()) counts.set(key, (counts.get(key) ?? 0) + alone[j]![r]!);
    }
    const others = Math.max(members.length, blocksOfSource[source]!) - 1;
    for (const j of members) {
      const own = new Map(blocks[j]!.readings.map(({ key }, r) => [key, alone[j]![r]!]));
      posteriors[j] = normalised(blocks[j]!.readings, ({ key, logPrior }) => {
        if (key === FREE_OFFSET) return Math.exp(logPrior);
        const same = Math.max(0, (counts.get(key) ?? 0) - own.get(key)!);
        const shared = (PRIOR_BLOCKS * Math.exp(logPrior) + same) / (PRIOR_BLOCKS + others);
        return Math.max(shared, ONE_OFF_SHARE * Math.exp(logPrior));
      });
    }
  }
  return posteriors;
}

/** Posterior probabilities of the readings of a block judged alone. */
export function ownPosterior(readings: readonly BlockReading[]): number[] {
  return normalised(readings, ({ logPrior }) => Math.exp(logPrior));
}

function normalised(readings: readonly BlockReading[], prior: (reading: BlockReading) => number): number[] {
  const logs = readings.map((reading) => Math.log(prior(reading)) + reading.logDensity);
  const top = Math.max(...logs);
  const weights = logs.map((log) => Math.exp(log - top));
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return weights.map((weight) => weight / sum);
}
