import { normalSurvival } from "../../numerics/distributions.ts";
import { predictCurve, type Series, type SystemModel, seriesDensity } from "../system-model.ts";
import type { Pattern } from "./pattern.ts";

/** Amplitudes, in standard deviations, between which a deviation is not taken to be in proportion to it. */
const REFINED = [0.2, 4] as const;
/** A plateau lies this far above the last value below it, ln value, give or take. */
const [STEP_TO_PLATEAU, STEP_SD] = [0.2, 0.3];

/** A series under a pattern: ln of its marginal density, and its deviations with the pattern at its likeliest taken out. */
export interface Bent {
  readonly logDensity: number;
  readonly left: readonly number[];
  /** Standard deviation of what is left, by noise and irregularity of the bend. */
  readonly leftSd: readonly number[];
}

/**
 * ln of the density of a series from a new source that a pattern bends, its amplitude (or level) integrated out.
 *
 * A growing pattern adds the rank-one term sd^2 g g' to the covariance K of the series; with q(e) = e'K^-1 e from
 * densities alone, the density follows in closed form (matrix determinant lemma, Sherman-Morrison).
 */
export function bentSeries(of: SystemModel, series: Series, offsetVariance: number, pattern: Pattern): Bent {
  const deviations = series.lnValue.map((y, i) => y - predictCurve(of, series.temperatureK[i]!).mean);
  if (pattern.kind === "level") return levelSeries(of, series, deviations, offsetVariance, pattern.from);
  const linear = grownSeries(of, series, deviations, offsetVariance, pattern);
  const { shapeAt, sd } = pattern;
  const size = Math.abs(linear.amplitude) / sd;
  if (shapeAt === undefined || size < REFINED[0] || size > REFINED[1]) return linear;
  return grownSeries(of, series, deviations, offsetVariance, { ...pattern, shape: shapeAt(linear.amplitude) });
}

type Growing = Extract<Pattern, { kind: "growing" }>;

function grownSeries(
  of: SystemModel,
  series: Series,
  deviations: readonly number[],
  offsetVariance: number,
  { shape, sd, sign, irregular }: Growing,
): Bent & { readonly amplitude: number } {
  const noise = series.noiseVariance.map((variance, i) => variance + (irregular * sd * shape[i]!) ** 2);
  const density = seriesDensity(of, series.temperatureK, noise, offsetVariance);
  const zero = density(shape.map(() => 0));
  const plain = density(deviations);
  const square = (at: number) => 2 * (zero - at);
  const ofShape = square(density(shape));
  const ofBoth = square(density(deviations.map((e, i) => e + shape[i]!)));
  const crossed = (ofBoth - square(plain) - ofShape) / 2;
  const slack = 1 / (1 + sd * sd * ofShape);
  const amplitude = sd * sd * crossed * slack;
  const toSide = sign === 0 ? 0 : Math.log(2 * normalSurvival((-sign * amplitude) / (sd * Math.sqrt(slack))));
  return {
    logDensity: plain + 0.5 * Math.log(slack) + 0.5 * sd * sd * crossed * crossed * slack + toSide,
    left: deviations.map((e, i) => e - amplitude * shape[i]!),
    leftSd: noise.map(Math.sqrt),
    amplitude,
  };
}

/** Points from `from` on share one value of their own; those below follow the curve. */
function levelSeries(
  of: SystemModel,
  { temperatureK, lnValue, noiseVariance }: Series,
  deviations: readonly number[],
  offsetVariance: number,
  from: number,
): Bent {
  const below = seriesDensity(of, temperatureK.slice(0, from), noiseVariance.slice(0, from), offsetVariance);
  const prior = lnValue[from - 1]! + STEP_TO_PLATEAU;
  let weight = 1 / STEP_SD ** 2;
  let sum = weight * prior;
  let logDensity = below(deviations.slice(0, from)) - Math.log(STEP_SD);
  for (let i = from; i < lnValue.length; i++) {
    weight += 1 / noiseVariance[i]!;
    sum += lnValue[i]! / noiseVariance[i]!;
  }
  const level = sum / weight;
  for (let i = from; i < lnValue.length; i++) {
    const z = (lnValue[i]! - level) ** 2 / noiseVariance[i]!;
    logDensity -= 0.5 * (z + Math.log(2 * Math.PI * noiseVariance[i]!));
  }
  logDensity -= 0.5 * ((level - prior) / STEP_SD) ** 2 + 0.5 * Math.log(weight);
  return {
    logDensity,
    left: deviations.map((e, i) => (i < from ? e : lnValue[i]! - level)),
    leftSd: noiseVariance.map(Math.sqrt),
  };
}
