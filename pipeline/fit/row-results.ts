import type { RowResults } from "../records/edition.ts";
import type { RobustFit, SystemFit } from "../records/fits.ts";

/** The fits before rulings, for the rows that rulings have set aside. */
export interface BeforeRulings {
  readonly fits: readonly SystemFit[];
  /** Positions of the systems that have such rows. */
  readonly touched: readonly number[];
  readonly omitted: ReadonlySet<number>;
}

/**
 * Spreads what the fits say of their points over the rows of the measurement table; NaN where nothing can be said. A row
 * set aside keeps what the fit before the rulings said of it, with weight 0: its deviation is a deleted one, so its own
 * value has no part in it.
 */
export function rowResults(
  fits: readonly SystemFit[],
  rowCount: number,
  before: BeforeRulings = { fits: [], touched: [], omitted: new Set() },
): RowResults {
  const empty = () => new Float64Array(rowCount).fill(Number.NaN);
  const results: RowResults = {
    predicted: empty(),
    deviationPercent: empty(),
    z: empty(),
    weight: empty(),
    branch: new Uint8Array(rowCount),
  };
  for (const index of before.touched) {
    const { robust } = before.fits[index] as SystemFit;
    const { points } = robust;
    points.row.forEach((row, i) => {
      if (!before.omitted.has(row)) return;
      write(results, robust, i);
      results.weight[row] = 0;
      results.branch[row] = branchAt(fits[index] as SystemFit, points.temperatureK[i] as number);
    });
  }
  for (const fit of fits) {
    const { points } = fit.robust;
    points.row.forEach((row, i) => {
      write(results, fit.robust, i);
      results.branch[row] = branchAt(fit, points.temperatureK[i] as number);
    });
  }
  return results;
}

function write(results: RowResults, { points, predicted, deviation, deviationSd, kept }: RobustFit, i: number): void {
  const row = points.row[i] as number;
  const z = (deviation[i] as number) / (deviationSd[i] as number);
  results.predicted[row] = Math.exp(predicted[i] as number);
  results.deviationPercent[row] = 100 * Math.expm1(deviation[i] as number);
  results.z[row] = Number.isFinite(z) ? z : Number.NaN;
  results.weight[row] = kept[i] as number;
}

/** Branch of the curve that covers a temperature, K; 0 where none does. */
function branchAt({ curves }: SystemFit, temperatureK: number): number {
  return curves.find(({ temperatureRangeK: [low, high] }) => temperatureK >= low && temperatureK <= high)?.branch ?? 0;
}
