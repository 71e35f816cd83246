import type { RobustFit } from "../records/fits.ts";
import { blocksOf } from "./block-screen.ts";
import { AGREE_SHARE } from "./plausibility/shared-temperatures.ts";
import type { OffPoint } from "./point-screen.ts";
import { SAME_TEMPERATURE_K } from "./same-temperature.ts";
import { type ScreenInput, sourceName, thresholdOf } from "./screen-input.ts";

/** Off points at one end of a block that leave the curve together, to one side. */
export interface EndRun {
  readonly points: ReadonlySet<number>;
  /** The point at the very end. */
  readonly outermost: number;
  /**
   * True where no other source reaches there, or where one does and reads the same: the curve itself may turn, and the run
   * is one finding, not several.
   */
  readonly oneFinding: boolean;
  /** True where exactly one other sound source reaches there and reads otherwise: either of the two could be wrong. */
  readonly contested: boolean;
  /** Temperatures of the run with what lies near, K. */
  readonly nearK: readonly [low: number, high: number];
  /** What to add to the evidence of each of them. */
  readonly words: string;
}

/** Points that make a run, and points from which a run that nobody else can check is one finding. */
const [LEAST_RUN, LEAST_ONE_FINDING] = [2, 3];
/** Another source reaches there if it has a point this near the run, K. */
const NEAR_K = 8;

/**
 * The run of off points at an end of a block, if there is one: contiguous up to the end, all to one side. Rows keep
 * flags of their own, for a ruling on the block would take the sound rows along; but where no other source reaches the
 * run, only its outermost point asks for a ruling.
 *
 * @param off off points of one block
 */
export function endRun(input: ScreenInput, off: readonly OffPoint[]): EndRun | undefined {
  const { system, point: first } = off[0]!;
  const fit = input.fits[system]!;
  const { temperatureK, source } = fit.points;
  const own = source[first]!;
  const ascending = [...(blocksOf(fit).get(own) ?? [])].sort((a, b) => temperatureK[a]! - temperatureK[b]!);
  const isOff = new Set(off.map(({ point }) => point));
  for (const [order, end] of [
    [[...ascending].reverse(), "warmest"],
    [ascending, "coldest"],
  ] as const) {
    const side = Math.sign(fit.deviation[order[0]!]!);
    const stop = order.findIndex((point) => !isOff.has(point) || Math.sign(fit.deviation[point]!) !== side);
    const run = stop === -1 ? order : order.slice(0, stop);
    if (run.length < LEAST_RUN || run.length === order.length) continue;
    const temperatures = run.map((point) => temperatureK[point]!);
    const [low, high] = [Math.min(...temperatures) - NEAR_K, Math.max(...temperatures) + NEAR_K];
    const seen = source.some((other, i) => other !== own && temperatureK[i]! >= low && temperatureK[i]! <= high);
    const alike = seen && isReadAlike(input, fit, run);
    const turns = alike ? ", where another source reads the same" : ", where no other source reaches";
    const alone = seen && !alike ? "" : `${turns}: the curve itself may turn there (another solid)`;
    return {
      points: new Set(run),
      outermost: order[0]!,
      contested: seen && !alike && fit.soundSources.length === 2 && fit.soundSources.includes(own),
      nearK: [low, high],
      oneFinding: (alike || !seen) && run.length >= LEAST_ONE_FINDING,
      words: `one of the ${run.length} ${end} points of ${sourceName(input, own)}, which leave the curve together${alone}`,
    };
  }
  return undefined;
}

/**
 * Whether other sources read what the run reads, at the very same temperatures: values are compared with one another, not
 * with a curve that may follow neither. Copies count here, for they do not part from what they repeat.
 */
function isReadAlike(input: ScreenInput, { system, points, deviation }: RobustFit, run: readonly number[]): boolean {
  const apart = run.flatMap((point) => {
    const beside = [...points.source.keys()].filter(
      (i) =>
        points.source[i] !== points.source[point] &&
        Math.abs(points.temperatureK[i]! - points.temperatureK[point]!) < SAME_TEMPERATURE_K,
    );
    if (beside.length === 0) return [];
    const nearest = Math.min(...beside.map((i) => Math.abs(points.lnValue[i]! - points.lnValue[point]!)));
    return [nearest < Math.min(thresholdOf(input, system, point), AGREE_SHARE * Math.abs(deviation[point]!))];
  });
  return apart.length > 0 && apart.every(Boolean);
}
