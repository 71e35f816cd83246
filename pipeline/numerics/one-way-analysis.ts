import { fSurvival } from "./distributions.ts";

/** Degrees of freedom, sum of squares and mean square of one line of an analysis of variance. */
export interface VarianceComponent {
  readonly degreesOfFreedom: number;
  readonly sumOfSquares: number;
  readonly meanSquare: number;
}

/** One-way analysis of variance. */
export interface OneWayAnalysis {
  readonly groupMeans: readonly number[];
  readonly grandMean: number;
  readonly between: VarianceComponent;
  readonly within: VarianceComponent;
  /** Mean square between over mean square within; NaN if both are 0. */
  readonly f: number;
  /** P(F > f), NaN where f is. */
  readonly probability: number;
  /** Sum of squares between over the total. */
  readonly rSquared: number;
}

/**
 * One-way analysis of variance, computed on differences from the first value and in two passes, so that values that
 * agree in their first digits lose none of the others.
 * @throws RangeError unless there are two or more groups, none empty, one at least with two values, all finite.
 * @see Chan, Golub and LeVeque, Am. Stat. 37 (1983) 242-247.
 */
export function oneWayAnalysis(groups: readonly ArrayLike<number>[]): OneWayAnalysis {
  const n = requireGroups(groups);
  const origin = groups[0]![0]!;
  const shifted = groups.map((group) => Float64Array.from(group, (value) => value - origin));
  const means = shifted.map(refinedMean);
  let sum = 0;
  for (let g = 0; g < shifted.length; g++) sum += shifted[g]!.length * means[g]!;
  const grandMean = sum / n;
  let between = 0;
  let within = 0;
  for (let g = 0; g < shifted.length; g++) {
    between += shifted[g]!.length * (means[g]! - grandMean) ** 2;
    within += sumOfSquaresAbout(shifted[g]!, means[g]!);
  }
  const betweenLine = component(groups.length - 1, between);
  const withinLine = component(n - groups.length, within);
  const f = betweenLine.meanSquare / withinLine.meanSquare;
  return {
    groupMeans: means.map((mean) => mean + origin),
    grandMean: grandMean + origin,
    between: betweenLine,
    within: withinLine,
    f,
    probability: Number.isNaN(f) ? f : fSurvival(f, betweenLine.degreesOfFreedom, withinLine.degreesOfFreedom),
    rSquared: between / (between + within),
  };
}

function component(degreesOfFreedom: number, sumOfSquares: number): VarianceComponent {
  return { degreesOfFreedom, sumOfSquares, meanSquare: sumOfSquares / degreesOfFreedom };
}

/** Mean with one correction by the mean of what is left. */
function refinedMean(values: Float64Array): number {
  const first = values.reduce((sum, value) => sum + value, 0) / values.length;
  return first + values.reduce((sum, value) => sum + (value - first), 0) / values.length;
}

function sumOfSquaresAbout(values: Float64Array, centre: number): number {
  return values.reduce((sum, value) => sum + (value - centre) ** 2, 0);
}

function requireGroups(groups: readonly ArrayLike<number>[]): number {
  let n = 0;
  for (const group of groups) {
    if (group.length === 0) throw new RangeError("one-way analysis: a group is empty");
    for (let i = 0; i < group.length; i++) {
      if (!Number.isFinite(group[i]!)) throw new RangeError(`one-way analysis: a value is ${group[i]}`);
    }
    n += group.length;
  }
  if (groups.length < 2 || n <= groups.length) {
    throw new RangeError(
      `one-way analysis: ${n} values in ${groups.length} groups; two groups and a repeat are needed`,
    );
  }
  return n;
}
