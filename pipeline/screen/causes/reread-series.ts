import { middle } from "../middle.ts";
import type { ScreenInput } from "../screen-input.ts";
import { predictCurve, seriesDensity } from "../system-model.ts";
import type { Cause, CauseName, Suspects } from "./cause.ts";
import { blockReadingPrior } from "./compete-block.ts";
import { EVERY_CAUSE } from "./every-cause.ts";
import { logWeightOf, type SeriesCase, STRAY_Z, seriesOf, type Tried } from "./series-case.ts";

/** Mistakes of a column that leave the dilute end of a series where it is and bend the concentrated one. */
const BENDING: ReadonlySet<CauseName> = new Set(["basis mix-up", "hydrate basis", "salt or free base"]);

/** A series read in another way, row by row. */
export interface RereadSeries {
  readonly cause: Cause;
  readonly detail: string;
  /** Prior probability that a block was written so. */
  readonly rate: number;
  /** ln value of each row, in the order of the rows. */
  readonly lnValue: readonly number[];
}

/**
 * A whole series under each basis its unit may be mistaken for and each reading of its solute's mass: where the solubility
 * is high these differ by much, where it is low by nothing, so that the wrong one looks like a loss or a gain at the hot end.
 * Readings that do not apply to every row are left out.
 */
export function rereadSeries({ reread }: Pick<ScreenInput, "reread">, suspects: Suspects): RereadSeries[] {
  return EVERY_CAUSE.filter(({ name }) => BENDING.has(name)).flatMap((cause) =>
    cause.explanations(suspects).flatMap(({ detail, weight, change, system }) => {
      if (system !== undefined) return [];
      const lnValue = suspects.rows.flatMap((row) => {
        const how = change(row);
        const read = how === undefined ? undefined : reread(row, how);
        return read === undefined ? [] : [read.lnValue];
      });
      return lnValue.length < suspects.rows.length
        ? []
        : [{ cause, detail, rate: blockReadingPrior(cause, weight), lnValue }];
    }),
  );
}

/** The series as it would read on another basis; off points that stray from it count as single faults. */
export function tryReading(
  of: SeriesCase,
  order: readonly number[],
  off: readonly number[],
  { lnValue }: RereadSeries,
): Tried | undefined {
  const { fit, model, tolerance } = of;
  const { temperatureK, noiseVariance } = seriesOf(fit, order);
  const expected = temperatureK.map((T) => predictCurve(model, T));
  const left = order.map((point, i) => lnValue[of.points.indexOf(point)]! - expected[i]!.mean);
  const offset = middle(left);
  const leftSd = noiseVariance.map((variance, i) => Math.sqrt(variance + expected[i]!.variance));
  const strays = new Set(
    off.filter((point) => {
      const i = order.indexOf(point);
      const away = Math.abs(left[i]! - offset);
      return away > tolerance || away > STRAY_Z * leftSd[i]!;
    }),
  );
  const explained = off.filter((point) => !strays.has(point));
  if (explained.length === 0 || Math.abs(offset) > Math.max(tolerance, 3 * fit.betweenSd)) return undefined;
  const stays = <T>(values: readonly T[]) => values.filter((_, i) => !strays.has(order[i]!));
  const density = seriesDensity(model, stays(temperatureK), stays(noiseVariance), fit.betweenSd ** 2)(stays(left));
  return {
    logWeight: density + logWeightOf(of, [], [...strays]),
    explained,
    rest: stays(order),
    bent: { logDensity: density, left: stays(left), leftSd: stays(leftSd) },
  };
}
