import type { RobustFit } from "../../records/fits.ts";
import type { Change } from "../../records/reread.ts";
import { isOutsideLiquid } from "../liquid-range.ts";
import { isPossibleTemperature } from "../possible-temperature.ts";
import type { ScreenInput } from "../screen-input.ts";
import { fitSources, predict, type SystemModel } from "../system-model.ts";
import type { CauseName, Explanation, Suspects } from "./cause.ts";
import { EVERY_CAUSE } from "./every-cause.ts";

/** The outcome of the competition. */
export interface Verdict {
  /** The winning cause; undefined where none passes 0.5. */
  readonly cause: CauseName | undefined;
  readonly detail: string;
  readonly probability: number;
  /** Number in the reported unit that would be right; undefined where a cause changes something else, or none won. */
  readonly proposedValue: number | undefined;
  /** Where the row belongs, where the cause moves its temperature: the temperature (K), and how far it then lies off. */
  readonly moved?: { readonly temperatureK: number; readonly deviation: number } | undefined;
  readonly lookAt: string;
}

/** The outcome for a point, with the weight of all that was tried: a density of ln value. */
export interface PointVerdict extends Verdict {
  readonly weight: number;
}

/** A cause is named above this posterior probability; a value is proposed above the other. */
export const NAMED_ABOVE = 0.5;
export const PROPOSED_ABOVE = 0.9;
/** What to look at where no cause wins. */
export const LOOK_AGAIN =
  "Look the value and its temperature up in the notebook or the original table; if they stand, measure again.";

/** Prior probability of a random error, and how its size in ln value is spread. Common practice. */
const NONE_PRIOR = 0.85;
const [NONE_LEAST, NONE_MOST] = [0.14, 2];
const NONE_WIDEST = 10;
/** Share of random errors of any size at all. */
const NONE_WIDE_SHARE = 0.25;
/** Density given to "none" where the temperature is hardly meant: the value is not what is wrong. */
const IMPOSSIBLE_DENSITY = 0.005;
/** A re-read value must come this near, in standard deviations. */
const NEAR_Z = 3;

/** Where the source's own curve in another system does not fit, that of sources in general may; less likely by this. */
const ANY_SOURCE = -1;
const ANY_SOURCE_SHARE = 0.3;

/** A point to be explained, with what is expected of it. */
export interface PointCase {
  readonly input: ScreenInput;
  /** Two workspaces: one for the point's own system, one for others. */
  readonly models: readonly [own: SystemModel, other: SystemModel];
  readonly fit: RobustFit;
  readonly point: number;
  readonly suspects: Suspects;
  /** Material threshold of the point, ln value. */
  readonly threshold: number;
}

/**
 * The causes and "none" compete for one off point: prior x share of the detail x likelihood of the re-read value at the
 * re-read temperature, given the kept points without it; shares within a cause are summed. What is impossible is
 * skipped.
 */
export function competeForPoint(of: PointCase): PointVerdict {
  const { fit, point, models } = of;
  const sound = fit.apartSources.length === 0 ? undefined : new Set(fit.soundSources);
  fitSources(models[0], fit, (source) => sound?.has(source) !== false, point);
  const possible = isPossibleTemperature(fit.points.temperatureK[point]!);
  const meant = possible && !isOutsideLiquid(of.input, fit.system, point);
  let total = NONE_PRIOR * (meant ? noneDensity(fit.deviation[point]!) : IMPOSSIBLE_DENSITY);
  let best: Verdict | undefined;
  let bestWeight = 0;
  for (const cause of EVERY_CAUSE) {
    if (cause.pointPrior === 0) continue;
    let sum = 0;
    let top = 0;
    let winner: Evaluated | undefined;
    for (const explanation of cause.explanations(of.suspects)) {
      const evaluated = evaluate(of, explanation);
      if (evaluated === undefined) continue;
      sum += evaluated.density;
      if (evaluated.density <= top) continue;
      top = evaluated.density;
      winner = evaluated;
    }
    sum *= cause.pointPrior;
    total += sum;
    if (winner === undefined || sum <= bestWeight) continue;
    bestWeight = sum;
    const { detail, proposedValue, moved } = winner;
    best = { cause: cause.name, probability: 0, lookAt: cause.lookAt, detail, proposedValue, moved };
  }
  return { ...decided(best, bestWeight / total), weight: total };
}

interface Evaluated {
  readonly detail: string;
  readonly density: number;
  readonly proposedValue: number | undefined;
  readonly moved: Verdict["moved"];
}

/** Likelihood of one explanation times its share; undefined where it is impossible or leaves the point off. */
function evaluate(of: PointCase, how: Explanation): Evaluated | undefined {
  const { input, models, fit, point, suspects } = of;
  const row = suspects.rows[0]!;
  const exact = how.exactly?.(row);
  if (exact !== undefined)
    return { detail: how.detail, density: how.weight * exact, proposedValue: undefined, moved: undefined };
  const change = how.change(row);
  if (change === undefined) return undefined;
  const model = models[how.system === undefined ? 0 : 1];
  if (how.system !== undefined) fitSources(model, input.fits[how.system]!, () => true);
  const { source } = fit.points;
  const own = fits(of, model, row, change, source[point]!);
  const fitting = own ?? (how.system === undefined ? undefined : fits(of, model, row, change, ANY_SOURCE));
  if (fitting === undefined) return undefined;
  const partner = how.partner?.(row);
  const partnerFits = partner === undefined ? undefined : fits(of, model, partner.row, partner.change, source[point]!);
  if (partner !== undefined && partnerFits === undefined) return undefined;
  // That the partner fits too would be chance if the error were random.
  const ofPartner = partnerFits === undefined ? 1 : oddsOfFit(partnerFits.deviation, partnerFits.variance);
  const says = SAYS_VALUE.has(change.kind) ? fitting.reportedValue : how.proposes?.(row);
  return {
    detail: how.detail,
    density:
      how.weight *
      ofPartner *
      (how.odds?.(row) ?? 1) *
      (own === undefined ? ANY_SOURCE_SHARE : 1) *
      normalDensity(fitting.deviation, fitting.variance),
    proposedValue: says,
    moved: change.kind === "temperature" || change.kind === "temperature scale" ? fitting : undefined,
  };
}

/** Changes after which the re-read value is the one to propose; the others leave the value and change something else. */
const SAYS_VALUE: ReadonlySet<Change["kind"]> = new Set(["factor", "value", "unit", "solute basis"]);

/** Deviation of a row under a change, where it is possible and within the limits. */
function fits(
  { input, fit, point, threshold }: PointCase,
  model: SystemModel,
  row: number,
  change: Change,
  source: number,
) {
  const reread = input.reread(row, change);
  if (reread === undefined || !isPossibleTemperature(reread.temperatureK)) return undefined;
  const expected = predict(model, reread.temperatureK, source);
  const deviation = reread.lnValue - expected.mean;
  const variance = expected.variance + fit.noiseSd[point]! ** 2;
  if (!(Math.abs(deviation) < Math.min(threshold, NEAR_Z * Math.sqrt(variance)))) return undefined;
  return { deviation, variance, reportedValue: reread.reportedValue, temperatureK: reread.temperatureK };
}

/** Names the best cause above 0.5, keeps its value above 0.9. */
export function decided(best: Verdict | undefined, probability: number): Verdict {
  if (best === undefined || !(probability > NAMED_ABOVE))
    return { cause: undefined, detail: "", probability: Number.NaN, proposedValue: undefined, lookAt: LOOK_AGAIN };
  return { ...best, probability, proposedValue: probability > PROPOSED_ABOVE ? best.proposedValue : undefined };
}

function normalDensity(deviation: number, variance: number): number {
  return Math.exp((-0.5 * deviation * deviation) / variance) / Math.sqrt(2 * Math.PI * variance);
}

/** How much likelier a deviation is as noise than as a random error. */
function oddsOfFit(deviation: number, variance: number): number {
  return normalDensity(deviation, variance) / noneDensity(deviation);
}

/** Density of the deviation of a random error: as many small ones as large ones on a logarithmic scale, some anything. */
function noneDensity(deviation: number): number {
  const size = Math.abs(deviation);
  const usual = size > NONE_MOST ? 0 : 1 / (2 * Math.max(size, NONE_LEAST) * Math.log(NONE_MOST / NONE_LEAST));
  return (1 - NONE_WIDE_SHARE) * usual + NONE_WIDE_SHARE / NONE_WIDEST;
}
