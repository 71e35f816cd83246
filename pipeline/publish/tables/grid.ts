import { curvesOf, type Edition, type Liquor } from "../../records/edition.ts";
import type { Curve } from "../../records/fits.ts";
import type { GridRow } from "../../records/generated/grid.ts";
import type { System } from "../../records/systems.ts";
import { massRatioFromLn } from "../mass-ratio.ts";
import { known } from "./account.ts";

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

/** One row of `grid.csv`. */
function gridRow(
  curve: Curve,
  system: System,
  liquor: Liquor,
  temperatureK: number,
  measured: readonly number[],
): GridRow {
  const ln = curve.evaluate(temperatureK);
  const limits = curve.limits(temperatureK);
  const r = massRatioFromLn(ln, system);
  const inX = system.fitBasis === "ln x";
  const x = (shift: number) => (inX ? Math.min(1, Math.exp(ln + shift)) : undefined);
  // A limit of x may reach 1 where the solution is rich: then it sets no limit of r.
  const g = (shift: number) => {
    const value =
      inX && Math.exp(ln + shift) >= 1 ? Number.POSITIVE_INFINITY : 100 * massRatioFromLn(ln + shift, system);
    return Number.isFinite(value) ? value : undefined;
  };
  const gap = gapAround(temperatureK, measured);
  const c = liquor.massConcentration(r, temperatureK);
  return known({
    curve_id: curve.curveId,
    system: system.id,
    temperature_K: temperatureK,
    mole_fraction: x(0),
    mole_fraction_curve_low: x(-limits.curve),
    mole_fraction_curve_high: x(limits.curve),
    mole_fraction_new_low: x(-limits.newMeasurement),
    mole_fraction_new_high: x(limits.newMeasurement),
    g_per_100g_solvent: 100 * r,
    g_per_100g_solvent_curve_low: g(-limits.curve),
    g_per_100g_solvent_curve_high: g(limits.curve),
    g_per_100g_solvent_new_low: g(-limits.newMeasurement),
    g_per_100g_solvent_new_high: g(limits.newMeasurement),
    mg_per_mL_solution: Number.isNaN(c) ? undefined : c,
    data_gap_K: gap > WIDE_GAP_K ? gap : undefined,
  }) as GridRow;
}

/** Rows of `grid.csv`: each curve at round temperatures in °C inside its range; nothing is extrapolated. */
export function* gridRows(edition: Edition): Generator<GridRow> {
  for (const curve of curvesOf(edition)) {
    const system = edition.systems[curve.system] as System;
    const liquor = edition.liquors[curve.system] as Liquor;
    const robust = edition.fits[curve.system]?.robust;
    const kept = Array.from(robust?.points.temperatureK ?? []).filter((_, i) => robust?.kept[i] === 1);
    const measured = [...new Set(kept)].sort((a, b) => a - b);
    for (const temperatureK of roundTemperatures(curve.temperatureRangeK, edition.settings.grid_step_K)) {
      yield gridRow(curve, system, liquor, temperatureK, measured);
    }
  }
}
