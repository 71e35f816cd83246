import type { RowResults } from "../records/edition.ts";
import type { SystemFit } from "../records/fits.ts";

/** Spreads what the fits say of their points over the rows of the measurement table; NaN where nothing can be said. */
export function rowResults(fits: readonly SystemFit[], rowCount: number): RowResults {
  const empty = () => new Float64Array(rowCount).fill(Number.NaN);
  const results: RowResults = {
    predicted: empty(),
    deviationPercent: empty(),
    z: empty(),
    weight: empty(),
    branch: new Uint8Array(rowCount),
  };
  for (const { robust, curves } of fits) {
    const { points, predicted, deviation, deviationSd, kept } = robust;
    points.row.forEach((row, i) => {
      const z = (deviation[i] as number) / (deviationSd[i] as number);
      results.predicted[row] = Math.exp(predicted[i] as number);
      results.deviationPercent[row] = 100 * Math.expm1(deviation[i] as number);
      results.z[row] = Number.isFinite(z) ? z : Number.NaN;
      results.weight[row] = kept[i] as number;
      const T = points.temperatureK[i] as number;
      const on = curves.find(({ temperatureRangeK: [low, high] }) => T >= low && T <= high);
      results.branch[row] = on?.branch ?? 0;
    });
  }
  return results;
}
