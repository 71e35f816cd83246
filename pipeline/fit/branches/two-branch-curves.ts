import { requireInside } from "../../curves/fitted-range.ts";
import type { Curve, Transition } from "../../records/fits.ts";
import { inCelsius } from "../../records/temperature-text.ts";
import { isCurve, publishedCurve } from "../published-curve.ts";
import type { CurveContext, CurveSubject } from "../system-models.ts";
import { breakSide } from "./break-carried.ts";
import { type BreakProfile, breakProfile } from "./break-profile.ts";
import type { BreakPoints } from "./break-scan.ts";
import { breakPoints, findBreak } from "./two-branch-fit.ts";
import type { SearchedBreak } from "./two-branch-search.ts";

/** Two curves that meet where the solid changes. */
export interface BranchPair {
  readonly curves: readonly [Curve, Curve];
  readonly transition: Transition;
}

/**
 * The curves of the two branches of a system, and the transition where they meet.
 *
 * Each branch is fitted to its own points like a system of its own. Where two least-squares branches cross between their
 * points, the crossing is the least-squares position of the break: where it lies within the limits of the profile it is
 * the transition, and the branches meet there exactly. Else a branch is too stiff for its points (a straight line, because
 * they are few); then the transition is where the profile of the likelihood is best, and the branches meet within
 * their limits. Where they do not, because a branch has too few points for the curvature that the profile gives it, the
 * profile with no more than the usual curvature is tried; else the branches are not published. The limits of the transition
 * are those of the profile. Which form a branch is, is not known: a melting point of the solute is not used.
 *
 * @returns undefined where a branch has no curve, or the branches do not meet
 * @see D. J. Hudson, J. Am. Stat. Assoc. 61 (1966) 1097-1129, for the join of two least-squares curves.
 */
export function twoBranchCurves(
  found: SearchedBreak,
  { system }: Pick<CurveSubject, "system">,
  context: CurveContext,
  seed: number,
): BranchPair | undefined {
  const points = breakPoints(found.robust);
  for (const curvature of ["as asked for", "usual"] as const) {
    const profile = breakProfile(points, "falls", breakSide, curvature);
    const pair = profile === undefined ? undefined : pairAt(profile, points, found, { system }, context, seed);
    if (pair !== undefined) return pair;
  }
  return undefined;
}

/** The branches on either side of a break, where both have a curve and these meet. */
function pairAt(
  profile: BreakProfile,
  points: BreakPoints,
  found: SearchedBreak,
  { system }: Pick<CurveSubject, "system">,
  context: CurveContext,
  seed: number,
): BranchPair | undefined {
  const { robust, probability } = found;
  const gap = gapAround(points.temperatureK, profile.breakK);
  const curveOf = (branch: 1 | 2): Curve | undefined => {
    const own = (T: number) => T <= profile.breakK === (branch === 1);
    const kept = robust.kept.map((mark, i) => (own(robust.points.temperatureK[i]!) ? mark : 0));
    const subject = { system, branch, meltingPointK: Number.NaN };
    const outcome = publishedCurve({ ...robust, kept }, subject, context, gap);
    return isCurve(outcome) ? outcome : undefined;
  };
  const [below, above] = [curveOf(1), curveOf(2)];
  if (below === undefined || above === undefined) return undefined;
  const crossing = crossingOf(below, above, gap);
  const likely = crossing !== undefined && crossing >= profile.lowK && crossing <= profile.highK;
  const temperatureK = likely ? crossing : profile.breakK;
  const apart = Math.abs(below.evaluate(temperatureK) - above.evaluate(temperatureK));
  if (apart > below.limits(temperatureK).curve + above.limits(temperatureK).curve) return undefined;
  const transition: Transition = { temperatureK, low: profile.lowK, high: profile.highK, probability };
  const ended = ([low, high]: Curve["temperatureRangeK"], branch: 1 | 2) =>
    branch === 1 ? ([low, temperatureK] as const) : ([temperatureK, high] as const);
  const finish = (curve: Curve, branch: 1 | 2): Curve => ({
    ...withRange(curve, ended(curve.temperatureRangeK, branch)),
    notices: [
      ...aboutTransition(transition, branch, apart),
      ...aboutSecond(found, curve, branch, seed),
      ...curve.notices,
    ],
  });
  return { curves: [finish(below, 1), finish(above, 2)], transition };
}

/** Temperatures of the points next to a temperature, K. */
function gapAround(temperatureK: Float64Array, T: number): readonly [number, number] {
  const below = temperatureK.reduce((most, t) => (t <= T ? Math.max(most, t) : most), 0);
  const above = temperatureK.reduce((least, t) => (t > T ? Math.min(least, t) : least), Number.POSITIVE_INFINITY);
  return [below, above];
}

/** Where the lower branch comes to lie above the upper one, K; undefined where it does not between the two ends. */
function crossingOf(below: Curve, above: Curve, [lowK, highK]: readonly [number, number]): number | undefined {
  const ahead = (T: number) => below.evaluate(T) - above.evaluate(T);
  if (!(ahead(lowK) <= 0 && ahead(highK) >= 0)) return undefined;
  let [low, high] = [lowK, highK];
  for (let halving = 0; halving < 60; halving++) {
    const middle = (low + high) / 2;
    if (ahead(middle) < 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

function withRange(curve: Curve, range: readonly [number, number]): Curve {
  return {
    ...curve,
    temperatureRangeK: range,
    evaluate: (T) => {
      requireInside(curve.model, T, range);
      return curve.evaluate(T);
    },
    limits: (T) => {
      requireInside(curve.model, T, range);
      return curve.limits(T);
    },
  };
}

function aboutTransition({ temperatureK, low, high, probability }: Transition, branch: 1 | 2, apart: number): string[] {
  const where = `the solid changes at ${inCelsius(temperatureK)} (95 % limits ${inCelsius(low)} to ${inCelsius(high)}; p = ${probability.toFixed(3)} under one smooth curve): this is the branch ${branch === 1 ? "below" : "above"} it`;
  return apart > 0.001 ? [where, `the branches miss each other there by ${(100 * apart).toFixed(1)} %`] : [where];
}

/** A second change of the solid, within a branch: said, not fitted. */
function aboutSecond({ robust, breakK }: SearchedBreak, curve: Curve, branch: 1 | 2, seed: number): string[] {
  const own = (i: number) => robust.points.temperatureK[i]! <= breakK === (branch === 1);
  const second = findBreak(breakPoints(robust, own), seed);
  if (second === undefined || second.sense === "rises") return [];
  return [
    `the points of this branch seem to break again near ${inCelsius(second.breakK)} (p = ${second.probability.toFixed(3)}): one ${curve.model} curve spans both sides`,
  ];
}
