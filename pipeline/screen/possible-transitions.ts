import { SLOPE_CHANGE } from "../curves/screening-basis.ts";
import type { Flag, RobustFit } from "../records/fits.ts";
import { inCelsius } from "../records/temperature-text.ts";
import type { OffBlock } from "./block-screen.ts";
import type { OffPoint } from "./point-screen.ts";
import { isPossibleTemperature } from "./possible-temperature.ts";
import type { ScreenInput } from "./screen-input.ts";
import { fitSources, predict, predictCurve, type SystemModel } from "./system-model.ts";
import { counted } from "./wording.ts";

/** Distinct temperatures on either side of a break, and in all, from which one is tried. */
const [SIDE, LEAST_TEMPERATURES] = [2, 5];
/** Temperatures closer than this count as one, K. */
const SAME_TEMPERATURE_K = 0.5;
/** No residual counts for more than this, in standard deviations; points beyond it do not follow the curve. */
const MOST_Z = 3;
/** Least scatter by which residuals are judged, ln value. */
const LEAST_SD = 0.02;
/** Fall of the bounded loss that a break must bring: more than any one point can. */
const LEAST_FALL = 9;
/** Larger deviations are slips, and no change of the solid, ln value. */
const LARGEST = Math.log(3);
/** Points beyond so many standard deviations from which a break is tried: one alone cannot bring the fall. */
const [LEAST_DOUBTFUL, DOUBTFUL_Z] = [2, 3];
/** Places for a break that are tried at most, and rounds of leaving out what does not follow. */
const [MOST_TRIED, ROUNDS] = [12, 3];

/** A change of the solid that the points of a system speak for, though they are too few to show it. */
interface PossibleTransition {
  readonly breakK: number;
  /** Points that lie on one of the two branches. */
  readonly explained: ReadonlySet<number>;
}

/** What is left of what was found once changes of the solid are allowed for. */
export interface WithoutTransitions {
  readonly blocks: readonly OffBlock[];
  readonly points: readonly OffPoint[];
  readonly flags: readonly Flag[];
}

/**
 * Off points and blocks that a change of the solid would explain, where it cannot be excluded: with too few temperatures a
 * block to test for one, a concave break that brings the points of all sources together by more than any single point could
 * is likelier than as many mistakes. They become one notice of the system.
 */
export function withoutTransitions(
  input: ScreenInput,
  model: SystemModel,
  blocks: readonly OffBlock[],
  points: readonly OffPoint[],
): WithoutTransitions {
  const transitions = new Map<number, PossibleTransition>();
  const small = points.filter(({ system, point }) => Math.abs(input.fits[system]!.deviation[point]!) < LARGEST);
  for (const system of new Set(
    [...blocks.filter(({ offset }) => Math.abs(offset) < LARGEST), ...small].map((one) => one.system),
  )) {
    const fit = input.fits[system]!;
    const found = doubtful(fit) < LEAST_DOUBTFUL ? undefined : transitionOf(model, fit);
    if (found !== undefined) transitions.set(system, found);
  }
  const explains = (system: number, point: number) =>
    transitions.get(system)?.explained.has(point) === true && Math.abs(input.fits[system]!.deviation[point]!) < LARGEST;
  const offBlocks = blocks.filter(({ system, points: own }) => !own.every((point) => explains(system, point)));
  const offPoints = points.filter(({ system, point }) => !explains(system, point));
  const eased = new Set(
    [...blocks, ...points]
      .filter(
        (one) => !(offBlocks as readonly unknown[]).includes(one) && !(offPoints as readonly unknown[]).includes(one),
      )
      .map(({ system }) => system),
  );
  return {
    blocks: offBlocks,
    points: offPoints,
    flags: [...eased].map((system) => notice(input.fits[system]!, transitions.get(system)!)),
  };
}

/** Points that look off, but by no more than another solid could make them. */
function doubtful({ deviation, noiseSd }: RobustFit): number {
  let count = 0;
  for (const [i, by] of deviation.entries())
    if (Math.abs(by) > DOUBTFUL_Z * noiseSd[i]! && Math.abs(by) < LARGEST) count++;
  return count;
}

/** The break that lowers the bounded loss of all sources together most, if by enough. */
function transitionOf(model: SystemModel, fit: RobustFit): PossibleTransition | undefined {
  if (fit.agreement === "conflict" || !Number.isNaN(fit.breakTemperatureK)) return undefined;
  const usable = [...fit.points.row.keys()].filter(
    (i) => Number.isFinite(fit.deviation[i]) && isPossibleTemperature(fit.points.temperatureK[i]!),
  );
  const temperatures = distinct(usable.map((i) => fit.points.temperatureK[i]!));
  if (temperatures.length < LEAST_TEMPERATURES) return undefined;
  let best: PossibleTransition | undefined;
  let least = boundedLoss(model, fit, usable, Number.NaN).loss - LEAST_FALL;
  const step = Math.ceil(temperatures.length / MOST_TRIED);
  for (let j = SIDE; j <= temperatures.length - SIDE; j += step) {
    const breakK = (temperatures[j - 1]! + temperatures[j]!) / 2;
    const { loss, explained } = boundedLoss(model, fit, usable, breakK);
    if (!(model.model.coefficients[SLOPE_CHANGE]! < 0) || loss >= least) continue;
    least = loss;
    best = { breakK, explained };
  }
  return best;
}

/** Sum of bounded squared residuals, and offsets of sources, about a curve that follows most of the points, with a break or none (NaN). */
function boundedLoss(model: SystemModel, fit: RobustFit, usable: readonly number[], breakTemperatureK: number) {
  let best = { loss: Number.POSITIVE_INFINITY, explained: new Set<number>() };
  const all = Uint8Array.from(fit.kept.keys(), (i) => (usable.includes(i) ? 1 : 0));
  for (const start of [all, fit.kept]) {
    let kept = start;
    for (let round = 0; round < ROUNDS; round++) {
      fitSources(model, { ...fit, kept, breakTemperatureK, breakTested: false }, () => true);
      const explained = new Set<number>();
      const offsets = offsetsOf(model, fit);
      let loss = 0;
      for (const z of offsets.values()) loss += Math.min(z * z, MOST_Z ** 2);
      for (const i of usable) {
        const { mean } = predict(model, fit.points.temperatureK[i]!, fit.points.source[i]!);
        const z = Math.abs(fit.points.lnValue[i]! - mean) / Math.max(LEAST_SD, fit.noiseSd[i]!);
        loss += Math.min(z * z, MOST_Z ** 2);
        if (z < MOST_Z && offsets.get(fit.points.source[i]!)! < MOST_Z) explained.add(i);
      }
      if (loss < best.loss) best = { loss, explained };
      kept = kept.map((_, i) => (explained.has(i) ? 1 : 0));
    }
  }
  return best;
}

/** Size of the offset of each source, in standard deviations between sources. */
function offsetsOf(model: SystemModel, { points, betweenSd }: RobustFit): Map<number, number> {
  const T = points.temperatureK[0]!;
  const { mean } = predictCurve(model, T);
  return new Map([...new Set(points.source)].map((s) => [s, Math.abs(predict(model, T, s).mean - mean) / betweenSd]));
}

function distinct(temperatures: readonly number[]): number[] {
  const found: number[] = [];
  for (const T of [...temperatures].sort((a, b) => a - b))
    if (found.length === 0 || T - found.at(-1)! > SAME_TEMPERATURE_K) found.push(T);
  return found;
}

function notice({ system }: RobustFit, { breakK, explained }: PossibleTransition): Flag {
  return {
    scope: "system",
    code: "possible-transition",
    severity: "notice",
    system,
    evidence:
      `some values lie off a smooth curve, but a change of the solid near ${inCelsius(breakK)} would bring ` +
      `${counted(explained.size, "value")} of all sources together; the temperatures are too few to show it`,
    lookAt: "Look at the solid below and above that temperature, or measure three temperatures on either side.",
  };
}
