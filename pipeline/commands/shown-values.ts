import { percentFromLn, type SystemView } from "../publish/report/system-view.ts";
import { roundTemperatures } from "../publish/tables/grid.ts";
import type { Curve } from "../records/fits.ts";

/** Most values told of one curve. */
const VALUES_SHOWN = 24;

/** One value of a curve, with 95 % limits of the curve and of a new measurement; JSON leaves out what is unknown. */
export interface ShownValue {
  readonly temperature_K: number;
  readonly mole_fraction?: number;
  readonly g_per_100g_solvent?: number;
  readonly curve_low?: number;
  readonly curve_high?: number;
  readonly new_low?: number;
  readonly new_high?: number;
}

/** Values of a curve at round temperatures inside its range, every k-th where there are many. */
export function valuesOf({ edition, system }: SystemView, curve: Curve): ShownValue[] {
  const all = roundTemperatures(curve.temperatureRangeK, edition.settings.grid_step_K);
  const step = Math.ceil(all.length / VALUES_SHOWN);
  return all
    .filter((_, i) => i % step === 0)
    .map((temperatureK) => {
      const ln = curve.evaluate(temperatureK);
      const half = curve.limits(temperatureK);
      const known = (shift: number) => {
        const value = percentFromLn(ln + shift, system);
        return Number.isFinite(value) ? value : undefined;
      };
      const value = {
        temperature_K: temperatureK,
        mole_fraction: system.fitBasis === "ln x" ? Math.exp(ln) : undefined,
        g_per_100g_solvent: known(0),
        curve_low: known(-half.curve),
        curve_high: known(half.curve),
        new_low: known(-half.newMeasurement),
        new_high: known(half.newMeasurement),
      };
      return Object.fromEntries(Object.entries(value).filter(([, v]) => v !== undefined)) as unknown as ShownValue;
    });
}
