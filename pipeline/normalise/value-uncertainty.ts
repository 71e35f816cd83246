import { relativeFromStandard, type Unit } from "../bases/unit.ts";
import type { CellFault } from "../records/cells.ts";
import type { Reading } from "../records/readings.ts";
import type { Settings } from "../records/settings.ts";
import { optionalNumber, type SourceCells } from "./source-cells.ts";

/** Ways in which an uncertainty may be reported. */
export type UncertaintyKind = "standard" | "expanded" | "range" | "standard deviation";

/** Coverage factor of an expanded uncertainty that states none (common practice, about 95 %). */
const COVERAGE_FACTOR = 2;

/**
 * Standard uncertainty from what was reported, in the same unit.
 *
 * - standard            u as it stands
 * - expanded            U/k; k = 2 where none is given
 * - range               half-width/sqrt(3): uniform within ± the value
 * - standard deviation  s/sqrt(n) of a mean of n replicates; s itself where n is unknown (NaN)
 * @see JCGM 100:2008 (GUM), 4.2.3 and 4.3.7.
 */
export function standardFromReported(
  reported: number,
  kind: UncertaintyKind,
  coverageFactor: number,
  n: number,
): number {
  if (kind === "expanded") return reported / (Number.isNaN(coverageFactor) ? COVERAGE_FACTOR : coverageFactor);
  if (kind === "range") return reported / Math.sqrt(3);
  return kind === "standard deviation" && n >= 1 ? reported / Math.sqrt(n) : reported;
}

/** Floor of the relative standard uncertainty [1] at a level in mg per mL of solution, any method. */
export function levelFloor(mgPerML: number, { uncertainty_floor_percent: floor }: Settings): number {
  if (mgPerML < 0.01) return floor.below_0_01_mg_per_mL / 100;
  if (mgPerML < 0.1) return floor.below_0_1_mg_per_mL / 100;
  return mgPerML < 1 ? floor.below_1_mg_per_mL / 100 : 0;
}

/** Relative standard uncertainty [1] of a value whose source states none, by method and mass ratio r [g/g]. */
export function methodUncertainty(
  method: string,
  handbookSalt: boolean,
  massRatio: number,
  settings: Settings,
): number {
  const byMethod: Readonly<Record<string, number>> = settings.default_uncertainty_percent;
  if (handbookSalt && method === "unspecified") return settings.default_uncertainty_percent.handbook_salts / 100;
  const relative = (byMethod[method] ?? settings.default_uncertainty_percent.unspecified) / 100;
  if (method !== "gravimetric") return relative;
  return Math.hypot(relative, settings.gravimetric_uncertainty_g_per_100g / (100 * massRatio));
}

/** Least relative standard uncertainty [1] of a reported one, which tells repeatability only. */
export function repeatabilityFloor(
  aqueousSalt: boolean,
  { reported_uncertainty_floor_percent: floor }: Settings,
): number {
  return (aqueousSalt ? floor.aqueous_salts : floor.general) / 100;
}

/** What the uncertainty of one row depends on. */
export interface UncertaintyQuestion {
  readonly cells: SourceCells;
  readonly reading: Reading;
  /** Reported number, in its unit. */
  readonly value: number;
  readonly unit: Unit;
  /** Level, mg per mL of solution. */
  readonly level: number;
  /** r [g/g]. */
  readonly massRatio: number;
  readonly method: string;
  /** A salt in water from a handbook. */
  readonly handbookSalt: boolean;
}

/**
 * Relative standard uncertainty [1] of the basis quantity of a row: what was reported, not below the repeatability floor,
 * or the default of the method; never below the floor of the level.
 */
export function rowUncertainty(
  question: UncertaintyQuestion,
  aqueousSalt: boolean,
  settings: Settings,
): { readonly relative: number; readonly assumption?: string } | CellFault {
  const { cells, reading, value, unit, level } = question;
  const floor = levelFloor(level, settings);
  const stated = optionalNumber(cells, "uncertainty", reading, 0, "bad-uncertainty");
  if (typeof stated !== "number") return stated;
  if (Number.isNaN(stated)) {
    const byMethod = methodUncertainty(question.method, question.handbookSalt, question.massRatio, settings);
    const relative = Math.max(byMethod, floor);
    const why = floor > byMethod ? "level" : question.handbookSalt ? "handbook salts" : question.method;
    return { relative, assumption: `default uncertainty (${why})` };
  }
  const factor = optionalNumber(cells, "coverage_factor", reading, Number.MIN_VALUE, "bad-uncertainty");
  if (typeof factor !== "number") return factor;
  const n = optionalNumber(cells, "n", reading, 1);
  if (typeof n !== "number") return n;
  const standard = standardFromReported(stated, cells.uncertaintyKind, factor, n);
  const percent = cells.unitOf.uncertainty(reading).includes("%");
  const relative = cells.uncertaintyRelative
    ? standard / (percent ? 100 : 1)
    : relativeFromStandard(unit.scale, value, standard);
  if (!(relative < 1)) {
    const found = `uncertainty ${cells.text.uncertainty(reading)} of the value ${value} is as large as the value itself`;
    return { field: "uncertainty", code: "bad-uncertainty", found };
  }
  return { relative: Math.max(relative, repeatabilityFloor(aqueousSalt, settings), floor) };
}
