import { middle } from "../middle.ts";
import { curveSlope, predictCurve, type Series, type SystemModel } from "../system-model.ts";
import type { Cause } from "./cause.ts";
import { bentSeries } from "./pattern-density.ts";

/** A whole block that is off, as one series against the curve of the others. */
export interface BlockToBend {
  readonly model: SystemModel;
  readonly series: Series;
  readonly method: string;
  readonly threshold: number;
  /** Between-source variance. */
  readonly between: number;
}

/** Scatter about its own median, in standard deviations, that a re-read block may have in its middle (0.67 expected). */
export const LEFT_OVER = 1.5;
/** Points from which a bend can be told from an offset. */
const LEAST_BENT = 4;

/** The block under each way in which a cause bends a series, where the bend leaves it within its uncertainty. */
export function bentReadings({ model, series, method, threshold, between }: BlockToBend, cause: Cause) {
  if (cause.bending === undefined || series.lnValue.length < LEAST_BENT) return [];
  const order = [...series.lnValue.keys()].sort((a, b) => series.temperatureK[a]! - series.temperatureK[b]!);
  const ascending = (values: readonly number[]) => order.map((i) => values[i]!);
  const sorted: Series = {
    temperatureK: ascending(series.temperatureK),
    lnValue: ascending(series.lnValue),
    noiseVariance: ascending(series.noiseVariance),
  };
  const slope = sorted.temperatureK.map((T) => curveSlope(model, T));
  const curve = (T: number) => predictCurve(model, T).mean;
  return cause.bending.patterns({ ...sorted, slope, curve, method }).flatMap((pattern) => {
    const { logDensity, left, leftSd } = bentSeries(model, sorted, between, pattern);
    const offset = middle(left);
    const away = middle(left.map((e) => Math.abs(e - offset)));
    const fits = Math.abs(offset) < Math.max(threshold, 3 * Math.sqrt(between)) && away < LEFT_OVER * middle(leftSd);
    return fits ? [{ detail: pattern.detail, weight: pattern.weight, logDensity }] : [];
  });
}
