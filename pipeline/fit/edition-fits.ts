import type { Curve, PooledScales, RobustFit, SystemFit } from "../records/fits.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { Settings } from "../records/settings.ts";
import { type System, type SystemPoints, systemPoints } from "../records/systems.ts";
import { inCelsius } from "../records/temperature-text.ts";
import { seedOf } from "./branches/break-bootstrap.ts";
import { kinkOf } from "./branches/break-slopes.ts";
import { twoBranchCurves } from "./branches/two-branch-curves.ts";
import { breakPoints } from "./branches/two-branch-fit.ts";
import { type SearchedBreak, searchBreaks } from "./branches/two-branch-search.ts";
import { isCurve, publishedCurve } from "./published-curve.ts";
import { writtenValues } from "./repeats/written-values.ts";
import { type PooledFit, robustFits } from "./robust/robust-fit.ts";
import { withStandings } from "./sources/with-standings.ts";

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
  /**
   * Transitions listed for the solids of a system, K. A listed one is tried as the place of a break even where nothing in
   * the points suggests it; what is asked of the evidence stays the same.
   */
  readonly transitionsK?: (system: System) => readonly number[];
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
    table,
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
  const second = fitSystems(table, again, points, context, pooled);
  const all = [...fits];
  second.fits.forEach((fit, i) => {
    const index = touched[i] as number;
    all[index] = { ...fit, robust: { ...fit.robust, system: index } };
  });
  return all;
}

function fitSystems(
  table: MeasurementTable,
  systems: readonly System[],
  points: readonly SystemPoints[],
  context: FitContext,
  before?: PooledFit,
): EditionFits {
  const { settings, laboratories } = context;
  const robustly = robustFitter(table, systems, points, context);
  const {
    fits: robust,
    scales,
    pooled,
  } = robustly(
    systems.map((_, system) => ({ system })),
    before,
  );
  const breaks = searchBreaks(subjectsOfBreaks(systems, robust, context), robust, (wanted) =>
    wanted.length === 0 ? [] : robustly(wanted, pooled).fits,
  );
  const curveContext = { scales, laboratories, weighting: settings.fit_weighting };
  const fits = systems.map((system, i): SystemFit => {
    const subject = { system, branch: 1, meltingPointK: context.meltingPointK(system) };
    const found = breaks.get(i);
    const pair =
      found?.sense === "falls" ? twoBranchCurves(found, subject, curveContext, seedOf(system.id)) : undefined;
    if (found !== undefined && pair !== undefined)
      return withStandings({ robust: found.robust, ...pair }, subject, curveContext);
    const fit = robust[i] as (typeof robust)[number];
    const outcome = publishedCurve(fit, subject, curveContext);
    const curves: Curve[] = isCurve(outcome) ? [withSuspectedBreak(outcome, found)] : [];
    const fitted: SystemFit = {
      ...{ robust: fit, curves },
      ...(isCurve(outcome) ? {} : { noCurve: outcome.reason }),
      ...(found?.sense === "rises" ? risingKink(found) : {}),
    };
    return withStandings(fitted, subject, curveContext);
  });
  return { fits, scales, pooled };
}

/** The one curve of a system that seems to break, where two branches could not be drawn: said in its notices. */
function withSuspectedBreak(curve: Curve, found: SearchedBreak | undefined): Curve {
  if (found?.sense !== "falls") return curve;
  const notice = `the points break near ${inCelsius(found.breakK)} as where the solid changes (p = ${found.probability.toFixed(3)} under one smooth curve), but curves through the points on either side do not meet: one curve spans both, and may follow neither`;
  return { ...curve, notices: [notice, ...curve.notices] };
}

/** The kink where the slopes beside it rise as well: a step in a falling one is something else. */
function risingKink(found: SearchedBreak): Pick<SystemFit, "kink"> {
  const kink = kinkOf(breakPoints(found.robust), found);
  return kink.slopeAbove > kink.slopeBelow ? { kink } : {};
}

/** Robust fits of some of the systems, named by their position, with a break where one is wanted. */
function robustFitter(
  table: MeasurementTable,
  systems: readonly System[],
  points: readonly SystemPoints[],
  context: FitContext,
) {
  const { settings, laboratories, sourceCount } = context;
  const between = settings.between_laboratory_percent;
  return (wanted: readonly { readonly system: number; readonly breakK?: number }[], pooled?: PooledFit) => {
    const own = wanted.map(({ system }) => systems[system] as System);
    const ownPoints = wanted.map(({ system }) => points[system] as SystemPoints);
    const about = own.map((system, i) => ({
      aqueousSalt: system.identity.aqueousSalt,
      water: system.identity.solvent === "water",
      excluded: outside(ownPoints[i]?.temperatureK ?? new Float64Array(), context.liquidRangeK(system)),
      ...(wanted[i]?.breakK === undefined ? {} : { breakK: wanted[i].breakK }),
    }));
    const outcome = robustFits(ownPoints, about, sourceCount, {
      defaults: { between: between.general / 100, betweenAqueousSalt: between.aqueous_salts / 100 },
      laboratories,
      written: writtenValues(table, own, ownPoints),
      threshold: (system, point) =>
        context.threshold(
          own[system] as System,
          ownPoints[system]?.level[point] as number,
          ownPoints[system]?.lnU[point] as number,
        ),
      ...(pooled === undefined ? {} : { pooled }),
    });
    return { ...outcome, fits: outcome.fits.map((fit, i) => ({ ...fit, system: wanted[i]?.system ?? i })) };
  };
}

/** Systems in which a break may be looked for: the solid form is not specified, and the sources do not disagree. */
function subjectsOfBreaks(systems: readonly System[], robust: readonly RobustFit[], context: FitContext) {
  return systems.flatMap((system, i) => {
    const { agreement, points } = robust[i] as RobustFit;
    if (system.identity.solidForm !== "unspecified" || agreement !== "agreed") return [];
    const excluded = () => outside(points.temperatureK, context.liquidRangeK(system));
    const knownK = context.transitionsK?.(system) ?? [];
    // The seed is worked out where it is asked for: most systems are smooth, and never ask.
    return [{ ...{ system: i, knownK, excluded }, seed: () => seedOf(system.id) }];
  });
}
