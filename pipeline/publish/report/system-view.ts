import { safeText } from "../../problems/safe-text.ts";
import { type Edition, type Grade, statusOf } from "../../records/edition.ts";
import type { Curve, Flag, SystemFit } from "../../records/fits.ts";
import type { Ruling } from "../../records/rulings.ts";
import type { Identity, System } from "../../records/systems.ts";
import { massRatioFromLn } from "../mass-ratio.ts";

/** What became of a measurement, in the words of the page. */
export type PointState = "kept" | "left out by the fit" | "interval" | "not fitted" | "set aside";

/** One measurement as it is drawn and listed; NaN where a quantity is unknown or a limit is open. */
export interface DrawnPoint {
  readonly row: number;
  /** Position of its source in {@link SystemView.sources}. */
  readonly source: number;
  readonly state: PointState;
  /** True if a flag that nobody has ruled on and that needs a person concerns it, by itself or with its block. */
  readonly flagged: boolean;
  readonly temperatureK: number;
  /** ln x or ln r, by the system's fit basis; of an interval its limits. */
  readonly ln: number;
  readonly lnLow: number;
  readonly lnHigh: number;
  /** g per 100 g solvent; of an interval its limits. */
  readonly percent: number;
  readonly percentLow: number;
  readonly percentHigh: number;
  /** 100 (value / expected - 1), expected with the point left out. */
  readonly deviationPercent: number;
}

/** A curve at evenly spaced temperatures: ln value with both half-widths, and the same in g per 100 g solvent. */
export interface DrawnCurve {
  readonly temperatureK: readonly number[];
  readonly ln: readonly number[];
  readonly halfCurve: readonly number[];
  readonly halfNew: readonly number[];
}

/** Everything a page of one system shows. */
export interface SystemView {
  readonly edition: Edition;
  readonly system: System;
  readonly fit: SystemFit | undefined;
  readonly grade: Grade | undefined;
  /** Flags of this system, those that need a person first. */
  readonly flags: readonly Flag[];
  /** Positions of its sources in the edition's list, ascending; letters A, B, ... follow this order. */
  readonly sources: readonly number[];
  readonly points: readonly DrawnPoint[];
  readonly curves: readonly DrawnCurve[];
}

/** Points at which a curve is drawn. */
const STEPS = 36;

/** Longest part of a title: a name of 2,000 characters must not hide the solvent behind it. */
const LONGEST_PART = 120;

/** `benzoic acid in ethanol + water, 0.500`: solute and solvent of a system, each part made safe and bounded. */
export function titleOf({ solute, solvent, composition, medium }: Identity): string {
  const parts = [solvent, composition, medium]
    .filter((part) => part !== "")
    .map((part) => safeText(part, LONGEST_PART));
  return `${safeText(solute, LONGEST_PART)} in ${parts.join(", ")}`;
}

/** What is fitted, as ln x or ln r, from a mass ratio r; -Infinity for 0, NaN for what is unknown. */
function lnFromMassRatio(r: number, { fitBasis, identity }: System): number {
  if (fitBasis === "ln r") return Math.log(r);
  const { soluteMolarMass, solventMolarMass } = identity;
  return Math.log(r / soluteMolarMass / (r / soluteMolarMass + 1 / solventMolarMass));
}

/** g per 100 g solvent from ln x or ln r; NaN where the mole fraction would reach 1. */
export function percentFromLn(ln: number, system: System): number {
  if (system.fitBasis === "ln x" && ln >= 0) return Number.NaN;
  return 100 * massRatioFromLn(ln, system);
}

function drawnCurve(curve: Curve): DrawnCurve {
  const [low, high] = curve.temperatureRangeK;
  const steps = high > low ? STEPS : 0;
  const temperatureK = Array.from({ length: steps + 1 }, (_, i) =>
    Math.min(high, low + ((high - low) * i) / Math.max(1, steps)),
  );
  const limits = temperatureK.map((t) => curve.limits(t));
  return {
    temperatureK,
    ln: temperatureK.map((t) => curve.evaluate(t)),
    halfCurve: limits.map((limit) => limit.curve),
    halfNew: limits.map((limit) => limit.newMeasurement),
  };
}

const ruledFlags = new WeakMap<Edition, ReadonlyMap<Flag, Ruling>>();

/** Rulings by the flag they answer; worked out once for an edition, whose records never change. */
export function rulingsByFlag(edition: Edition): ReadonlyMap<Flag, Ruling> {
  const known = ruledFlags.get(edition);
  if (known !== undefined) return known;
  const byFlag = new Map(Array.from(edition.rulings.ofFlag, ([i, ruling]) => [edition.flags[i] as Flag, ruling]));
  ruledFlags.set(edition, byFlag);
  return byFlag;
}

/** True for a flag that waits for a person: blocking, and nobody has ruled on it. */
export function waits(edition: Edition, flag: Flag): boolean {
  return flag.severity === "blocking" && !rulingsByFlag(edition).has(flag);
}

/** Rows that a flag which waits for a person concerns, by themselves or with their block. */
function flaggedRows(edition: Edition, system: System, flags: readonly Flag[]): Set<number> {
  const rows = new Set<number>();
  const { table } = edition;
  for (const flag of flags) {
    if (!waits(edition, flag)) continue;
    if (flag.scope === "measurement" && flag.row !== undefined) rows.add(flag.row);
    if (flag.scope !== "block") continue;
    for (const row of system.rows) if (table.source[row] === flag.source) rows.add(row);
  }
  return rows;
}

function stateOf(edition: Edition, row: number): PointState {
  const status = statusOf(edition, row);
  return status === "kept" && edition.rowResults.weight[row] === 0 ? "left out by the fit" : status;
}

/** Gathers what the page of a system shows; curves are evaluated once for all plots. */
export function systemView(edition: Edition, system: System, flags: readonly Flag[]): SystemView {
  const { table, rowResults } = edition;
  const fit = edition.fits[system.index];
  const sources = [...new Set(Array.from(system.rows, (row) => table.source[row] as number))].sort((a, b) => a - b);
  const position = new Map(sources.map((source, i) => [source, i]));
  const flagged = flaggedRows(edition, system, flags);
  const ofRow = (row: number): DrawnPoint => {
    const at = (column: Float64Array) => column[row] as number;
    const state = stateOf(edition, row);
    const read = edition.rulings.corrected.get(row)?.row;
    const [ratio, ratioLow, ratioHigh] = [
      read?.massRatio ?? at(table.massRatio),
      read?.massRatioLow ?? at(table.massRatioLow),
      read?.massRatioHigh ?? at(table.massRatioHigh),
    ];
    const known = state === "interval" ? Number.NaN : ratio;
    return {
      row,
      source: position.get(table.source[row] as number) as number,
      state,
      flagged: flagged.has(row),
      temperatureK: at(table.temperatureK),
      ln: lnFromMassRatio(known, system),
      lnLow: lnFromMassRatio(ratioLow, system),
      lnHigh: lnFromMassRatio(ratioHigh, system),
      percent: 100 * known,
      percentLow: 100 * ratioLow,
      percentHigh: 100 * ratioHigh,
      deviationPercent: at(rowResults.deviationPercent),
    };
  };
  const order = (flag: Flag) => (waits(edition, flag) ? 0 : flag.severity === "blocking" ? 1 : 2);
  return {
    edition,
    system,
    fit,
    grade: edition.grades[system.index],
    flags: [...flags].sort((a, b) => order(a) - order(b)),
    sources,
    points: Array.from(system.rows, ofRow),
    curves: fit?.curves.map(drawnCurve) ?? [],
  };
}
