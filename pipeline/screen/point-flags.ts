import { studentTQuantile } from "../numerics/distributions.ts";
import type { Flag, RobustFit } from "../records/fits.ts";
import { textOf } from "../records/measurements.ts";
import { inCelsius } from "../records/temperature-text.ts";
import { bentRows } from "./bent-rows.ts";
import { blocksOf } from "./block-screen.ts";
import type { Suspects } from "./causes/cause.ts";
import { competeForPoint, type Verdict } from "./causes/compete-point.ts";
import { competeForSeries } from "./causes/compete-series.ts";
import { rereadSeries } from "./causes/reread-series.ts";
import { contestedFlag, isContested, SURE } from "./contested-ends.ts";
import { type EndRun, endRun } from "./end-runs.ts";
import type { OffPoint } from "./point-screen.ts";
import { isPossibleTemperature } from "./possible-temperature.ts";
import type { ScreenInput } from "./screen-input.ts";
import type { SystemModel } from "./system-model.ts";
import { counted, offBy, threeDigits } from "./wording.ts";

/** Digits of a proposed value: more than any measurement has. */
const PROPOSED_DIGITS = 8;

/** Finds what the causes may look at for rows of a source in a system. */
export type SuspectFinder = (system: number, source: number, rows: readonly number[]) => Suspects;

/** The flags of off points: what was seen, what probably happened, what to look at. */
export function pointFlags(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  off: readonly OffPoint[],
  suspectsOf: SuspectFinder,
): Flag[] {
  const verdicts = off.map((one) => {
    const fit = input.fits[one.system]!;
    const suspects = suspectsOf(one.system, fit.points.source[one.point]!, [fit.points.row[one.point]!]);
    return competeForPoint({ input, models, fit, point: one.point, suspects, threshold: one.threshold });
  });
  const bends = new Map<number, Verdict>();
  const cleared = new Set<number>();
  const added: { readonly off: OffPoint; readonly verdict: Verdict }[] = [];
  const runs = new Map<number, EndRun>();
  for (const same of byBlock(input, off)) {
    const run = endRun(
      input,
      same.map((j) => off[j]!),
    );
    if (run !== undefined) for (const j of same) if (run.points.has(off[j]!.point)) runs.set(j, run);
    const bent = bendOf(
      input,
      models[0],
      same.map((j) => off[j]!),
      same.map((j) => verdicts[j]!.weight),
      suspectsOf,
    );
    if (bent === undefined) continue;
    const rows = bentRows(
      input,
      same.map((j) => off[j]!),
      bent,
    );
    for (const one of rows.added) added.push({ off: one, verdict: bent.verdict });
    for (const j of same) {
      if (rows.cleared.has(off[j]!.point)) cleared.add(j);
      else if (bent.explained.has(off[j]!.point)) bends.set(j, bent.verdict);
    }
  }
  // A row with a slip of its own, such as a decimal point, is no part of a quarrel between sources.
  const slipped = (j: number) => !bends.has(j) && verdicts[j]!.cause !== undefined;
  const sure = (j: number) => (bends.get(j)?.probability ?? 0) > SURE;
  const quarrels = quarrelsOf(off, runs, (j) => slipped(j) || sure(j));
  return [
    ...[...quarrels.values()].map(({ off: one, run }) => contestedFlag(input, one, run)),
    ...added.map(({ off: one, verdict }) => pointFlag(input, one, verdict, undefined)),
    ...off.flatMap((one, j) => {
      if (cleared.has(j)) return [];
      const quarrel = quarrels.get(one.system);
      if (quarrel !== undefined && !slipped(j) && isContested(input, one, quarrel.run)) return [];
      return [pointFlag(input, one, bends.get(j) ?? verdicts[j]!, runs.get(j))];
    }),
  ];
}

/** A run of off points where the two sources of a system part, with one of the points. */
interface Quarrel {
  readonly off: OffPoint;
  readonly run: EndRun;
}

/** Contested runs by system, of which no point is explained by itself. */
function quarrelsOf(
  off: readonly OffPoint[],
  runs: ReadonlyMap<number, EndRun>,
  isExplained: (j: number) => boolean,
): Map<number, Quarrel> {
  const explained = new Set([...runs].flatMap(([j, run]) => (isExplained(j) ? [run] : [])));
  const quarrels = new Map<number, Quarrel>();
  for (const [j, run] of runs) {
    const one = off[j]!;
    if (run.contested && !explained.has(run) && !quarrels.has(one.system)) quarrels.set(one.system, { off: one, run });
  }
  return quarrels;
}

/** Positions of the off points of each block, in order of first appearance. */
function byBlock({ fits }: ScreenInput, off: readonly OffPoint[]): number[][] {
  const blocks = new Map<string, number[]>();
  for (const [j, { system, point }] of off.entries()) {
    const key = `${system}:${fits[system]!.points.source[point]}`;
    blocks.set(key, [...(blocks.get(key) ?? []), j]);
  }
  return [...blocks.values()];
}

/** What bends the series of off points of one block, if anything does. */
function bendOf(
  input: ScreenInput,
  model: SystemModel,
  off: readonly OffPoint[],
  weights: readonly number[],
  suspectsOf: SuspectFinder,
) {
  const { system, point } = off[0]!;
  const fit = input.fits[system]!;
  if (fit.agreement !== "agreed" || off.some(({ impossible }) => impossible)) return undefined;
  const source = fit.points.source[point]!;
  const points = (blocksOf(fit).get(source) ?? []).filter((i) => isPossibleTemperature(fit.points.temperatureK[i]!));
  const method = textOf(input.table, input.table.method[fit.points.row[point]!]!);
  const offWeight = new Map(off.map((one, j) => [one.point, weights[j]!]));
  const mayHydrate = input.about[system]?.kind === "aqueous salt";
  const tolerance = off[0]!.threshold;
  const rows = points.map((i) => fit.points.row[i]!);
  const rereadings = rereadSeries(input, suspectsOf(system, source, rows));
  return competeForSeries({ model, fit, source, points, offWeight, method, mayHydrate, tolerance, rereadings });
}

/** `read at 40.0 °C it lies 1.2 % above the curve`. */
function movedText({ moved }: Verdict): string {
  return moved === undefined
    ? ""
    : `read at ${inCelsius(moved.temperatureK)} it lies ${offBy(moved.deviation)} the curve`;
}

function pointFlag(input: ScreenInput, off: OffPoint, verdict: Verdict, run: EndRun | undefined): Flag {
  const together = run === undefined ? "" : run.words;
  const fit = input.fits[off.system]!;
  const flag = {
    scope: "measurement",
    code: "off-curve",
    severity: run?.oneFinding === true && run.outermost !== off.point ? "notice" : "blocking",
    row: fit.points.row[off.point]!,
    source: fit.points.source[off.point]!,
    system: off.system,
    suspectedCause: verdict.cause ?? "no simple cause",
    evidence: [evidence(input, fit, off), movedText(verdict), together].filter((text) => text !== "").join("; "),
    lookAt: verdict.lookAt,
  } as const;
  if (verdict.cause === undefined) return flag;
  const named = { ...flag, causeDetail: verdict.detail, causeProbability: verdict.probability };
  if (verdict.proposedValue === undefined) return named;
  // Conversions leave noise in the last digits of a number that people will copy.
  return { ...named, proposedValue: Number(verdict.proposedValue.toPrecision(PROPOSED_DIGITS)) };
}

function evidence(input: ScreenInput, fit: RobustFit, off: OffPoint): string {
  const { point, z, unsure, impossible, bentBy } = off;
  if (impossible) return `no solubility is measured at ${inCelsius(fit.points.temperatureK[point]!)}`;
  if (bentBy !== undefined)
    return `the bend of its series puts it ${offBy(bentBy)} the curve of the other sources and the rest of its own`;
  const seen = `${offBy(fit.deviation[point]!)} ${comparison(fit, point)} (z = ${z.toFixed(1)})`;
  const expected = expectation(input, fit, point);
  const few = unsure ? "; few points are left to judge by, told because it is more than a factor 2" : "";
  return `${seen}${expected === "" ? "" : `; ${expected}`}${few}`;
}

/** What the point was compared with. */
function comparison(fit: RobustFit, point: number): string {
  const source = fit.points.source[point]!;
  if (fit.agreement === "conflict") return "the curve of its own source";
  const others = fit.soundSources.filter((other) => other !== source).length;
  if (others === 0) return "the curve of the other points of its source";
  return fit.soundSources.includes(source)
    ? `the curve of ${counted(others + 1, "source")}, its own included`
    : `the curve of ${counted(others, "other source")}`;
}

/** `expected 12.3 mg/mL at 25.0 °C, limits 11.8 to 12.9`: 95 % limits of a measurement of this source. */
function expectation(input: ScreenInput, fit: RobustFit, point: number): string {
  const row = fit.points.row[point]!;
  const half = studentTQuantile(0.975, Math.max(1, fit.degreesOfFreedom)) * fit.deviationSd[point]!;
  const [mean, low, high] = [0, -half, half].map((by) => input.inReportedUnit(row, fit.predicted[point]! + by));
  if (mean === undefined) return "";
  const unit = textOf(input.table, input.table.reportedUnit[row]!);
  const at = `expected ${threeDigits(mean)} ${unit} at ${inCelsius(fit.points.temperatureK[point]!)}`;
  return low === undefined || high === undefined
    ? at
    : `${at}, limits ${threeDigits(Math.min(low, high))} to ${threeDigits(Math.max(low, high))}`;
}
