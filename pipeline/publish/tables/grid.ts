import { curvesOf, type Edition, type Liquor } from "../../records/edition.ts";
import type { Curve } from "../../records/fits.ts";
import type { System } from "../../records/systems.ts";
import type { Cell } from "../csv.ts";
import { massRatioFromLn } from "../mass-ratio.ts";

/** A gap between measured temperatures wider than this is marked, K. */
const WIDE_GAP_K = 25;
const ZERO_CELSIUS = 273.15;

/** Temperatures, K, that are multiples of the step in °C and lie inside the range, ends included. */
export function roundTemperatures([low, high]: readonly [number, number], stepK: number): number[] {
  const first = Math.ceil((low - ZERO_CELSIUS) / stepK - 1e-9);
  const last = Math.floor((high - ZERO_CELSIUS) / stepK + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => ZERO_CELSIUS + (first + i) * stepK).map((t) =>
    Math.min(high, Math.max(low, t)),
  );
}

/** Width of the gap between neighbouring measured temperatures around T, K; 0 at a measured one. */
function gapAround(temperatureK: number, measured: readonly number[]): number {
  const below = measured.findLast((t) => t <= temperatureK + 1e-6) ?? temperatureK;
  const above = measured.find((t) => t >= temperatureK - 1e-6) ?? temperatureK;
  return above - below;
}

/** Cells of one row of `grid.csv`, in the order of its columns; an empty cell is undefined or NaN. */
function gridCells(
  curve: Curve,
  system: System,
  liquor: Liquor,
  temperatureK: number,
  measured: readonly number[],
): Cell[] {
  const ln = curve.evaluate(temperatureK);
  const { curve: ofCurve, newMeasurement } = curve.limits(temperatureK);
  const inX = system.fitBasis === "ln x";
  // A limit of x may reach 1 where the solution is rich: there it sets no limit of r.
  const shifts = [0, -ofCurve, ofCurve, -newMeasurement, newMeasurement];
  const fractions = shifts.map((shift) => (inX ? Math.min(1, Math.exp(ln + shift)) : Number.NaN));
  const ratios = shifts.map((shift, i) => (fractions[i] === 1 ? Number.NaN : massRatioFromLn(ln + shift, system)));
  const gap = gapAround(temperatureK, measured);
  return [
    curve.curveId,
    system.id,
    temperatureK,
    ...fractions,
    ...ratios.map((r) => 100 * r),
    liquor.massConcentration(ratios[0] as number, temperatureK),
    gap > WIDE_GAP_K ? gap : undefined,
  ];
}

/** Rows of `grid.csv`: each curve at round temperatures in °C inside its range; nothing is extrapolated. */
export function* gridRows(edition: Edition): Generator<Cell[]> {
  for (const curve of curvesOf(edition)) {
    const system = edition.systems[curve.system] as System;
    const liquor = edition.liquors[curve.system] as Liquor;
    const robust = edition.fits[curve.system]?.robust;
    const kept = Array.from(robust?.points.temperatureK ?? []).filter((_, i) => robust?.kept[i] === 1);
    const measured = [...new Set(kept)].sort((a, b) => a - b);
    for (const temperatureK of roundTemperatures(curve.temperatureRangeK, edition.settings.grid_step_K)) {
      yield gridCells(curve, system, liquor, temperatureK, measured);
    }
  }
}
