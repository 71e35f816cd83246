import type { Flag } from "../records/fits.ts";
import { RowState, textOf } from "../records/measurements.ts";
import type { System } from "../records/systems.ts";
import { inCelsius } from "../records/temperature-text.ts";
import {
  asReported,
  contradictionLimit,
  type Interval,
  intervalOf,
  type KnownValue,
  knownFromCurves,
  lookAtOf,
  NORMAL_95,
  outsideBy,
} from "./interval-gap.ts";
import type { ScreenInput } from "./screen-input.ts";
import { counted, threeDigits } from "./wording.ts";

/** Where no curve reaches, a point or range this near in temperature is compared, K. */
const NEAR_K = 3;
/** Change of a solubility with temperature that is allowed for between two such, ln value per K: common practice. */
const SLOPE_PER_K = 0.04;

/** An interval with the value that contradicts it. */
interface Contradiction {
  readonly interval: Interval;
  readonly known: KnownValue;
  /** ln of how far the value lies outside: positive above, negative below. */
  readonly outside: number;
  /** The value it is held against, in words. */
  readonly against: string;
}

/**
 * Notices of values known only as a range (`<`, `>`, from-to, a term of the pharmacopoeias, everything dissolved) that the
 * curve contradicts beyond its 95 % limits of a new measurement and the material threshold; where no curve reaches, that
 * every point within 3 K contradicts. One for a row, one for a block where several rows of a source lie on the same side.
 * Ranges of one system that contradict one another, where nothing else is known, are one notice of the system.
 */
export function intervalFlags(input: ScreenInput): Flag[] {
  return input.systems.flatMap((system): Flag[] => {
    const rows = system.rows.filter((row) => input.table.state[row] === RowState.interval);
    if (rows.length === 0) return [];
    const intervals = Array.from(rows, (row) => intervalOf(input.table, row, system));
    const found = intervals.flatMap((interval) => contradictionOf(input, system, interval) ?? []);
    return [...flagsOf(input, system, found), ...rangesDisagree(input, system, intervals)];
  });
}

function contradictionOf(input: ScreenInput, system: System, interval: Interval): Contradiction | undefined {
  const u = input.table.temperatureU[interval.row] as number;
  const onCurve = knownFromCurves(input.curves[system.index] ?? [], interval.temperatureK, u);
  if (onCurve !== undefined) {
    const outside = outsideBy(interval, onCurve.ln);
    if (!isContradiction(input, system, interval, onCurve, outside)) return undefined;
    return { interval, known: onCurve, outside, against: "the curve gives" };
  }
  return nearestPoint(input, system, interval);
}

function isContradiction(
  input: ScreenInput,
  system: System,
  interval: Interval,
  known: KnownValue,
  outside: number,
): boolean {
  const kind = input.about[system.index]?.kind ?? "general";
  return Math.abs(outside) > contradictionLimit(interval, known, kind, input.settings);
}

/** Held against the points within 3 K: the one nearest to the range, where even that contradicts it. */
function nearestPoint(input: ScreenInput, system: System, interval: Interval): Contradiction | undefined {
  const { points, betweenSd, noiseSd } = input.fits[system.index]!;
  let best: Contradiction | undefined;
  for (let i = 0; i < points.n; i++) {
    const apart = Math.abs((points.temperatureK[i] as number) - interval.temperatureK);
    if (apart > NEAR_K) continue;
    const noise = Math.max(points.lnU[i] as number, noiseSd[i] as number);
    const known = {
      ln: points.lnValue[i] as number,
      half: NORMAL_95 * Math.hypot(noise, betweenSd, SLOPE_PER_K * apart),
    };
    const outside = outsideBy(interval, known.ln);
    if (!isContradiction(input, system, interval, known, outside)) return undefined;
    if (best !== undefined && Math.abs(best.outside) <= Math.abs(outside)) continue;
    const at = inCelsius(points.temperatureK[i] as number);
    best = { interval, known, outside, against: `${placeOf(input, points.row[i] as number)} at ${at} gives` };
  }
  return best;
}

function flagsOf(input: ScreenInput, system: System, found: readonly Contradiction[]): Flag[] {
  const groups = new Map<string, Contradiction[]>();
  for (const one of found) {
    const key = `${input.table.source[one.interval.row]}:${one.outside > 0}`;
    groups.set(key, [...(groups.get(key) ?? []), one]);
  }
  return [...groups.values()].map((group): Flag => {
    const worst = group.reduce((a, b) => (Math.abs(b.outside) > Math.abs(a.outside) ? b : a));
    const { row } = worst.interval;
    const told = evidence(input, system, worst);
    const common = {
      code: worst.outside > 0 ? "range-below-curve" : "range-above-curve",
      severity: "notice",
      source: input.table.source[row] as number,
      system: system.index,
      lookAt: lookAtOf(worst.interval, worst.outside > 0),
    } as const;
    if (group.length === 1) return { ...common, scope: "measurement", row, evidence: told };
    const lines = group.map(({ interval }) => input.table.line[interval.row]);
    const few = lines.length > 10 ? `${lines.slice(0, 10).join(", ")} and more` : lines.join(", ");
    return {
      ...common,
      scope: "block",
      evidence: `${counted(group.length, "range")} (lines ${few}) are contradicted alike; the furthest, line ${input.table.line[row]}: ${told}`,
    };
  });
}

function evidence(input: ScreenInput, system: System, { interval, known, outside, against }: Contradiction): string {
  const { table } = input;
  const unit = textOf(table, table.reportedUnit[interval.row] as number);
  const inUnit = (ln: number) => input.inReportedUnit(interval.row, ln) ?? Number.NaN;
  const told = (value: number) => (Number.isNaN(value) ? "a value" : `${threeDigits(value)} ${unit}`);
  const ends = [inUnit(known.ln - known.half), inUnit(known.ln + known.half)].sort((a, b) => a - b);
  const limits = ends.some(Number.isNaN)
    ? ""
    : ` (95 % limits of a new measurement ${ends.map(threeDigits).join(" to ")})`;
  const [side, end] = outside > 0 ? ["above", "upper"] : ["below", "lower"];
  const limit = told(inUnit(outside > 0 ? interval.lnHigh : interval.lnLow));
  const factor = threeDigits(Math.exp(Math.abs(outside)));
  const quantity = quantityOf(system);
  return (
    `${asReported(table, interval)} at ${inCelsius(interval.temperatureK)}: ${against} ${told(inUnit(known.ln))}${limits}; ` +
    `in ${quantity} a factor ${factor} ${side} the ${end} limit, ${limit}`
  );
}

/** Ranges near in temperature that exclude one another, where neither a curve nor a point says which is right. */
function rangesDisagree(input: ScreenInput, system: System, intervals: readonly Interval[]): Flag[] {
  if (intervals.length < 2 || input.fits[system.index]!.points.n > 0) return [];
  const kind = input.about[system.index]?.kind ?? "general";
  let worst: { readonly a: Interval; readonly b: Interval; readonly gap: number } | undefined;
  const tight = tightest(intervals);
  tight.forEach((a, i) => {
    for (const b of tight.slice(i + 1)) {
      const apart = b.temperatureK - a.temperatureK;
      if (apart > NEAR_K) break;
      const gap = Math.max(a.lnLow - b.lnHigh, b.lnLow - a.lnHigh);
      const known = { ln: 0, half: NORMAL_95 * SLOPE_PER_K * apart };
      const limit = contradictionLimit({ ...a, term: a.term || b.term }, known, kind, input.settings);
      if (gap > limit && gap > (worst?.gap ?? 0)) worst = { a, b, gap };
    }
  });
  if (worst === undefined) return [];
  const told = (interval: Interval) =>
    `${asReported(input.table, interval)} at ${inCelsius(interval.temperatureK)} (${placeOf(input, interval.row)})`;
  return [
    {
      scope: "system",
      code: "ranges-disagree",
      severity: "notice",
      system: system.index,
      evidence:
        `${told(worst.a)} and ${told(worst.b)} exclude one another by a factor ${threeDigits(Math.exp(worst.gap))} in ${quantityOf(system)}; ` +
        "no number is known that says which is right",
      lookAt: "Look at both limits, their units, and the solid form; one measured value would decide.",
    },
  ];
}

/** Of the ranges in each degree the one with the highest lower and the one with the lowest upper limit, by temperature. */
function tightest(intervals: readonly Interval[]): Interval[] {
  const highest = new Map<number, Interval>();
  const lowest = new Map<number, Interval>();
  for (const interval of intervals) {
    const degree = Math.round(interval.temperatureK);
    if (interval.lnLow > (highest.get(degree)?.lnLow ?? Number.NEGATIVE_INFINITY)) highest.set(degree, interval);
    if (interval.lnHigh < (lowest.get(degree)?.lnHigh ?? Number.POSITIVE_INFINITY)) lowest.set(degree, interval);
  }
  const kept = new Set([...highest.values(), ...lowest.values()]);
  return [...kept].sort((a, b) => a.temperatureK - b.temperatureK || a.row - b.row);
}

const quantityOf = ({ fitBasis }: System): string => (fitBasis === "ln x" ? "mole fraction" : "mass ratio");

function placeOf({ table, sourceNames }: ScreenInput, row: number): string {
  return `line ${table.line[row]} of ${sourceNames[table.source[row] as number]}`;
}
