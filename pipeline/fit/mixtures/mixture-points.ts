import { parseUnit } from "../../bases/units.ts";
import type { RobustFit } from "../../records/fits.ts";
import { type MeasurementTable, textOf } from "../../records/measurements.ts";
import type { MixtureGroup } from "./mixture-systems.ts";

/** The points of all systems of a mixture, one after the other: parallel arrays. */
export interface MixturePoints {
  readonly n: number;
  /** First point of each member, and the end: points of one member follow each other. */
  readonly start: Int32Array;
  /** Position of the system among the group's members, and of the point among the system's points. */
  readonly member: Int32Array;
  readonly point: Int32Array;
  /** Exact mass fraction of the first solvent. */
  readonly fraction: Float64Array;
  readonly fractionU: Float64Array;
  readonly temperatureK: Float64Array;
  readonly lnValue: Float64Array;
  /** 1 = the mole fraction stays when the composition of the solvent is read otherwise: the value was reported as one. */
  readonly keepsMoleFraction: Uint8Array;
  /** Scatter within its source that the screening fit assumed, SD of ln value. */
  readonly noiseSd: Float64Array;
  /** Source of each point, numbered from 0 in order of first point. */
  readonly source: Int32Array;
  /** Positions of those sources in the edition's list. */
  readonly sources: readonly number[];
  /** 1 = may take part: the screening fit of its system keeps it, and that system's sources do not contradict each other. */
  readonly candidate: Uint8Array;
  readonly members: number;
  /** Temperature at which the curve of each member breaks, K; NaN = nowhere. */
  readonly breaksK: readonly number[];
}

/** Scatter of a point whose noise is not known, SD of ln value. */
const UNKNOWN_NOISE = 0.05;

/** Collects the points of a mixture from the robust fits of its systems. */
export function mixturePoints(
  table: MeasurementTable,
  group: MixtureGroup,
  fitOf: (system: number) => RobustFit,
): MixturePoints {
  const fits = group.members.map(({ system }) => fitOf(system.index));
  const n = fits.reduce((sum, { points }) => sum + points.n, 0);
  const sources: number[] = [];
  const all = {
    breaksK: fits.map(({ breakTemperatureK }) => breakTemperatureK),
    start: new Int32Array(fits.length + 1),
    ...{ n, sources, members: fits.length, member: new Int32Array(n), point: new Int32Array(n) },
    ...{ fraction: new Float64Array(n), fractionU: new Float64Array(n), temperatureK: new Float64Array(n) },
    ...{ lnValue: new Float64Array(n), noiseSd: new Float64Array(n) },
    ...{ source: new Int32Array(n), candidate: new Uint8Array(n), keepsMoleFraction: new Uint8Array(n) },
  };
  const perAmount = new Map<number, boolean>();
  let at = 0;
  fits.forEach(({ points }, m) => {
    all.start[m + 1] = all.start[m]! + points.n;
  });
  fits.forEach(({ points, kept, noiseSd, agreement }, m) => {
    const { system, fraction: key } = group.members[m]!;
    for (let i = 0; i < points.n; i++, at++) {
      const row = points.row[i]!;
      const exact = table.firstFraction[row]!;
      const u = table.fractionU[row]!;
      all.member[at] = m;
      all.point[at] = i;
      all.fraction[at] = key > 0 && key < 1 && exact > 0 && exact < 1 ? exact : key;
      all.fractionU[at] = key > 0 && key < 1 && u > 0 ? u : 0;
      all.temperatureK[at] = points.temperatureK[i]!;
      all.lnValue[at] = points.lnValue[i]!;
      all.noiseSd[at] = noiseSd[i]! > 0 && noiseSd[i]! < 10 ? noiseSd[i]! : UNKNOWN_NOISE;
      all.keepsMoleFraction[at] =
        system.fitBasis === "ln r" || isPerAmount(table, table.reportedUnit[row]!, perAmount) ? 1 : 0;
      all.source[at] = numberOf(sources, points.source[i]!);
      all.candidate[at] = kept[i] === 1 && agreement !== "conflict" && usable(all, at) ? 1 : 0;
    }
  });
  return all;
}

/** True for a unit that counts moles of solvent; `known` keeps the answers by code of the unit. */
function isPerAmount(table: MeasurementTable, code: number, known: Map<number, boolean>): boolean {
  const before = known.get(code);
  if (before !== undefined) return before;
  const parsed = parseUnit(textOf(table, code));
  const answer = parsed.kind === "unit" && parsed.unit.basis.startsWith("mole ");
  known.set(code, answer);
  return answer;
}

/** Temperatures of liquid solvents, K: common practice. One far outside would decide every slope over temperature. */
const [LOWEST_K, HIGHEST_K] = [150, 650];
/** An ln value beyond this is no measurement. */
const BEYOND_COUNTING = 1e3;

function usable(
  { fraction, temperatureK, lnValue }: Pick<MixturePoints, "fraction" | "temperatureK" | "lnValue">,
  i: number,
): boolean {
  const T = temperatureK[i]!;
  return T >= LOWEST_K && T <= HIGHEST_K && Math.abs(lnValue[i]!) < BEYOND_COUNTING && fraction[i]! >= 0;
}

function numberOf(sources: number[], source: number): number {
  const known = sources.lastIndexOf(source);
  return known >= 0 ? known : sources.push(source) - 1;
}
