import type { Curve, PooledScales, SystemFit } from "../records/fits.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { Settings } from "../records/settings.ts";
import { type System, type SystemPoints, systemPoints } from "../records/systems.ts";
import { isCurve, publishedCurve } from "./published-curve.ts";
import { type PooledFit, robustFits } from "./robust-fit.ts";

/** What fitting an edition needs to know besides its rows. */
export interface FitContext {
  /** Number of sources in the edition's list. */
  readonly sourceCount: number;
  /** Laboratory of each source by position; "" where not stated. */
  readonly laboratories: readonly string[];
  /** Melting point of a system's solid form, K; NaN where unknown. */
  readonly meltingPointK: (system: System) => number;
  /** Liquid range of a system's solvent, K; NaN where unknown. Points outside are shown, never fitted. */
  readonly liquidRangeK: (system: System) => readonly [freezing: number, boiling: number];
  /** Smallest |deviation| in ln value worth a person's time, by level and uncertainty. */
  readonly threshold: (system: System, level: number, lnU: number) => number;
  readonly settings: Settings;
}

/** Every system's robust fit and published curve, with the scales pooled over the edition. */
export interface EditionFits {
  readonly fits: readonly SystemFit[];
  readonly scales: PooledScales;
  /** What fitting some of the systems again needs. */
  readonly pooled: PooledFit;
}

/** A point this far beyond a boiling or freezing point still counts as inside: thermometers and pressures vary, K. */
const LIQUID_MARGIN_K = 1;

/** 1 for points outside the liquid range of the solvent. */
function outside(temperatureK: Float64Array, [freezing, boiling]: readonly [number, number]): Uint8Array {
  return Uint8Array.from(temperatureK, (t) =>
    t < freezing - LIQUID_MARGIN_K || t > boiling + LIQUID_MARGIN_K ? 1 : 0,
  );
}

/** Fits all systems: robust screening fits with pooled scales first, then the published curve of each. */
export function fitEdition(table: MeasurementTable, systems: readonly System[], context: FitContext): EditionFits {
  return fitSystems(
    systems,
    systems.map((system) => systemPoints(table, system)),
    context,
  );
}

/**
 * Fits the systems again whose rows people have ruled on: without the rows set aside, with the corrected values. The
 * other systems and everything pooled over the edition stay as they are.
 *
 * @param touched positions of the systems to fit again, ascending
 * @param omit rows set aside
 */
export function fitAgain(
  table: MeasurementTable,
  systems: readonly System[],
  { fits, pooled }: EditionFits,
  touched: readonly number[],
  omit: ReadonlySet<number>,
  context: FitContext,
): SystemFit[] {
  const again = touched.map((index) => systems[index] as System);
  const points = again.map((system) => systemPoints(table, system, omit));
  const second = fitSystems(again, points, context, pooled);
  const all = [...fits];
  second.fits.forEach((fit, i) => {
    const index = touched[i] as number;
    all[index] = { ...fit, robust: { ...fit.robust, system: index } };
  });
  return all;
}

function fitSystems(
  systems: readonly System[],
  points: readonly SystemPoints[],
  context: FitContext,
  before?: PooledFit,
): EditionFits {
  const { settings, laboratories, sourceCount } = context;
  const perSystem = systems.map((system, i) => ({
    aqueousSalt: system.identity.aqueousSalt,
    water: system.identity.solvent === "water",
    excluded: outside(points[i]?.temperatureK ?? new Float64Array(), context.liquidRangeK(system)),
  }));
  const between = settings.between_laboratory_percent;
  const {
    fits: robust,
    scales,
    pooled,
  } = robustFits(points, perSystem, sourceCount, {
    defaults: { between: between.general / 100, betweenAqueousSalt: between.aqueous_salts / 100 },
    threshold: (system, point) =>
      context.threshold(
        systems[system] as System,
        points[system]?.level[point] as number,
        points[system]?.lnU[point] as number,
      ),
    ...(before === undefined ? {} : { pooled: before }),
  });
  const curveContext = { scales, laboratories, weighting: settings.fit_weighting };
  const fits = systems.map((system, i): SystemFit => {
    const fit = robust[i] as (typeof robust)[number];
    const subject = { system, branch: 1, meltingPointK: context.meltingPointK(system) };
    const outcome = publishedCurve(fit, subject, curveContext);
    const curves: Curve[] = isCurve(outcome) ? [outcome] : [];
    return isCurve(outcome) ? { robust: fit, curves } : { robust: fit, curves, noCurve: outcome.reason };
  });
  return { fits, scales, pooled };
}
