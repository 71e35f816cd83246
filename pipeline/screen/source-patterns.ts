import { MAD_TO_SIGMA } from "../numerics/order-statistics.ts";
import { ROOM_K } from "./causes/temperature-offset.ts";
import { middle } from "./middle.ts";
import { isPossibleTemperature } from "./possible-temperature.ts";
import type { ScreenInput } from "./screen-input.ts";
import { curveSlope, fitSources, predictCurve, type SystemModel } from "./system-model.ts";

/** Ways in which one mistake shows in all that a source measured. */
export type SourcePatternKind = "one factor" | "temperatures off by a constant" | "temperatures off from room";

/** What all blocks of a source share. */
export interface SourcePattern {
  readonly source: number;
  readonly kind: SourcePatternKind;
  /** Size: ln value of the factor, K, or K per K from room temperature. */
  readonly amplitude: number;
  /** Scatter of the points of the source about the pattern, and of its blocks, ln value. */
  readonly noiseSd: number;
  readonly offsetSd: number;
  /** Systems looked at, and those of them whose own values ask for at least half of the amplitude. */
  readonly systems: number;
  readonly siding: number;
}

/** A block beside the curve of the other sources. */
export interface BesideOthers {
  readonly points: readonly number[];
  readonly temperatureK: readonly number[];
  readonly deviations: readonly number[];
  /** d ln value/dT of that curve, 1/K. */
  readonly slopes: readonly number[];
  /** Variance of a deviation without the offset of the source. */
  readonly variances: readonly number[];
  readonly offsetVariance: number;
}

/** The deviation of each point of a block that a pattern of size 1 makes. */
export const SHAPES: Readonly<Record<SourcePatternKind, (block: BesideOthers) => readonly number[]>> = {
  "one factor": ({ points }) => points.map(() => 1),
  "temperatures off by a constant": ({ slopes }) => slopes,
  "temperatures off from room": ({ slopes, temperatureK }) => slopes.map((s, i) => s * (temperatureK[i]! - ROOM_K)),
};
const KINDS = Object.keys(SHAPES) as SourcePatternKind[];

/** Systems of a source that are looked at, spread evenly: enough to see what all of them share. */
const SAMPLE = 60;
/** Systems in which a pattern must be seen, and other sound sources and own points that each of them needs. */
const [LEAST_SYSTEMS, LEAST_OTHERS, LEAST_POINTS] = [4, 2, 3];
/** No single block says more than this, in squared standard deviations. */
const MOST_OF_ONE = 9;
/** Fall of the bounded loss that a pattern must bring, per system and in all; by chance it is about 1 in all. */
const [LEAST_FALL_EACH, LEAST_FALL] = [1.5, 16];
/** Fall by which an error of temperature must beat one factor. */
const CLEARLY_MORE = 5;
/** Part of the amplitude by which one size differs between systems. */
const ALIKE_TO = 0.15;
/** Share of the systems that must side with the pattern. */
const MOSTLY = 0.7;

/**
 * The pattern that all blocks of a source share, if there is one: one factor, one error of its thermometer, or a jacket
 * read for the solution. Each block is compared with the other sources of its system; the size of the pattern is the
 * median over the systems, so that what is wrong in some of them does not count, and the pattern must bring the
 * bounded sum of squares down and be asked for by most of the systems. Such a source scatters about a wrong curve and
 * widens the very scales by which its points are judged: block by block it passes.
 */
export function sourcePattern(input: ScreenInput, model: SystemModel, source: number): SourcePattern | undefined {
  const systems = input.fits.filter(
    (fit) => fit.agreement === "agreed" && othersOf(fit, source).length >= LEAST_OTHERS,
  );
  const step = Math.max(1, systems.length / SAMPLE);
  const blocks: BesideOthers[] = [];
  for (let at = 0; at < systems.length; at += step) {
    const block = besideOthers(input, model, systems[Math.floor(at)]!.system, source);
    if (block !== undefined) blocks.push(block);
  }
  if (blocks.length < LEAST_SYSTEMS) return undefined;
  let best: SourcePattern | undefined;
  let bestFall = Math.max(LEAST_FALL, LEAST_FALL_EACH * blocks.length);
  for (const kind of KINDS) {
    const sizes = blocks.map((block) => sizeIn(block, SHAPES[kind](block))).filter(({ variance }) => variance < 1e6);
    if (sizes.length < LEAST_SYSTEMS) continue;
    const amplitude = middle(sizes.map(({ size }) => size));
    const siding = sizes.filter(({ size }) => size / amplitude > 0.5).length;
    const spread = (ALIKE_TO * amplitude) ** 2;
    const fall = sizes.reduce(
      (sum, { size, variance }) =>
        sum +
        Math.min(MOST_OF_ONE, size ** 2 / variance) -
        Math.min(MOST_OF_ONE, (size - amplitude) ** 2 / (variance + spread)),
      0,
    );
    // Where all curves are equally steep, an error of temperature is one factor: it must explain clearly more.
    if (fall <= bestFall + (best === undefined ? 0 : CLEARLY_MORE) || siding < MOSTLY * sizes.length) continue;
    bestFall = fall;
    best = { source, kind, amplitude, ...scatterAbout(blocks, kind, amplitude), systems: sizes.length, siding };
  }
  return best;
}

function othersOf({ soundSources }: ScreenInput["fits"][number], source: number): number[] {
  return soundSources.filter((other) => other !== source);
}

/** A block of a source beside the curve of the others; undefined where it has too few points. */
export function besideOthers(
  { fits }: ScreenInput,
  model: SystemModel,
  system: number,
  source: number,
): BesideOthers | undefined {
  const fit = fits[system]!;
  const { points, noiseSd, betweenSd } = fit;
  const own = [...points.source.keys()].filter(
    (i) =>
      points.source[i] === source &&
      Number.isFinite(fit.deviation[i]) &&
      isPossibleTemperature(points.temperatureK[i]!),
  );
  if (own.length < LEAST_POINTS) return undefined;
  const others = new Set(othersOf(fit, source));
  fitSources(model, fit, (other) => others.has(other));
  const temperatureK = own.map((i) => points.temperatureK[i]!);
  const expected = temperatureK.map((T) => predictCurve(model, T));
  return {
    ...{ points: own, temperatureK, offsetVariance: betweenSd ** 2 },
    deviations: own.map((i, j) => points.lnValue[i]! - expected[j]!.mean),
    slopes: temperatureK.map((T) => curveSlope(model, T)),
    variances: own.map((i, j) => noiseSd[i]! ** 2 + expected[j]!.variance),
  };
}

/** Size of a shape in one block by generalised least squares, the offset of the block being shared. */
function sizeIn({ deviations, variances, offsetVariance }: BesideOthers, shape: readonly number[]) {
  let [ones, ofShape, ofDeviation, square, product] = [0, 0, 0, 0, 0];
  for (const [i, variance] of variances.entries()) {
    ones += 1 / variance;
    ofShape += shape[i]! / variance;
    ofDeviation += deviations[i]! / variance;
    square += shape[i]! ** 2 / variance;
    product += (shape[i]! * deviations[i]!) / variance;
  }
  const shared = offsetVariance / (1 + offsetVariance * ones);
  const information = square - shared * ofShape ** 2;
  return { size: (product - shared * ofShape * ofDeviation) / information, variance: 1 / information };
}

/** Scatter about the pattern, of points within their block and of blocks. */
function scatterAbout(blocks: readonly BesideOthers[], kind: SourcePatternKind, amplitude: number) {
  const within: number[] = [];
  const between: number[] = [];
  for (const block of blocks) {
    const shape = SHAPES[kind](block);
    const left = block.deviations.map((deviation, i) => deviation - amplitude * shape[i]!);
    const centre = middle(left);
    between.push(Math.abs(centre));
    for (const one of left) within.push(Math.abs(one - centre));
  }
  return { noiseSd: MAD_TO_SIGMA * middle(within), offsetSd: MAD_TO_SIGMA * middle(between) };
}
