import type { RobustFit } from "../records/fits.ts";
import { blocksOf } from "./block-screen.ts";
import type { Suspects } from "./causes/cause.ts";
import { type BlockReading, blockReadings, FREE_OFFSET } from "./causes/compete-block.ts";
import { NAMED_ABOVE } from "./causes/compete-point.ts";
import { middle } from "./middle.ts";
import { type ScreenInput, sourceName, thresholdOf } from "./screen-input.ts";
import { fitSources, type SystemModel } from "./system-model.ts";

/** Points of a source from which its series can be re-read. */
const LEAST_POINTS = 3;

/**
 * What would reconcile two sources that disagree, in words: each is re-read under every cause against the curve of the
 * other, and a cause is told where it beats an offset without a cause. Which of the two is wrong stays open.
 */
export function reconciling(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  fit: RobustFit,
  suspectsOf: (system: number, source: number, rows: readonly number[]) => Suspects,
): string[] {
  if (fit.camps.length !== 2 || fit.camps.some((camp) => camp.length !== 1)) return [];
  const blocks = blocksOf(fit);
  // The re-read source is judged as a new one beside the other, with the usual scatter between sources.
  const asAgreed: RobustFit = { ...fit, agreement: "agreed" };
  return fit.camps.flatMap(([source], c) => {
    const points = source === undefined ? [] : (blocks.get(source) ?? []);
    const [other] = fit.camps[1 - c]!;
    if (source === undefined || points.length < LEAST_POINTS) return [];
    fitSources(models[0], asAgreed, (one) => one === other);
    const suspects = suspectsOf(
      fit.system,
      source,
      points.map((point) => fit.points.row[point]!),
    );
    const threshold = middle(points.map((point) => thresholdOf(input, fit.system, point)));
    const best = bestCause(blockReadings({ input, models, fit: asAgreed, points, source, suspects, threshold }));
    return best === undefined
      ? []
      : [`${sourceName(input, source)} would agree with this put right: ${best.cause}, ${best.detail}`];
  });
}

/** The likeliest reading with a cause, where it beats an offset without one. */
function bestCause(readings: readonly BlockReading[]): BlockReading | undefined {
  const weights = readings.map(({ key, cause, logPrior, logDensity }) =>
    cause !== undefined || key === FREE_OFFSET ? logPrior + logDensity : Number.NEGATIVE_INFINITY,
  );
  const top = Math.max(...weights);
  const best = readings[weights.indexOf(top)]!;
  const total = weights.reduce((sum, weight) => sum + Math.exp(weight - top), 0);
  return best.cause !== undefined && 1 / total > NAMED_ABOVE ? best : undefined;
}
