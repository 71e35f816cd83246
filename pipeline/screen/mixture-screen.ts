import { studentTSurvival } from "../numerics/distributions.ts";
import { benjaminiHochbergThreshold } from "../numerics/multiple-testing.ts";
import type { Flag } from "../records/fits.ts";
import type { LeftOutPrediction, MixtureMember, MixtureModel } from "../records/mixtures.ts";
import { inCelsius } from "../records/temperature-text.ts";
import { compositionCause } from "./mixture-cause.ts";
import { type ScreenInput, thresholdOf } from "./screen-input.ts";
import { counted, offBy } from "./wording.ts";

/** What the mixtures of an edition say of its systems. */
export interface MixtureJudgement {
  readonly flags: readonly Flag[];
  /** Systems with too few temperatures for a judgement of their own that a mixture could judge. */
  readonly judged: ReadonlySet<number>;
}

/** Probability of a cause from which a series is more than a notice. */
const SURE = 0.9;

/** A composition with what the others say of it. */
interface Judged {
  readonly model: MixtureModel;
  readonly member: MixtureMember;
  readonly leftOut: LeftOutPrediction;
}

/** A single point of a composition with few temperatures. */
interface JudgedPoint extends Judged {
  readonly point: number;
}

/**
 * Judges compositions of a binary solvent by all the others: a series of one source that lies off as a whole, which its
 * own curve cannot show, and the points of systems with too few temperatures for a curve. They are notices, as the
 * surface is a model and a composition may be special; a series more than a factor 2 off needs a person where a cause
 * explains it.
 *
 * A composition where two sources agree is not judged, as then the model is wrong and not they. Benjamini-Hochberg over
 * compositions, then over points of the others; the material threshold holds besides.
 * @param told systems that have a finding of their own already
 */
export function judgeByMixtures(input: ScreenInput, told: ReadonlySet<number>): MixtureJudgement {
  const candidates = (input.mixtures ?? []).flatMap((model) =>
    model.members.flatMap((member): Judged[] => {
      const { leftOut, system } = member;
      const fit = input.fits[system];
      if (leftOut === undefined || fit === undefined || fit.agreement === "conflict") return [];
      return fit.soundSources.length > 1 || told.has(system) ? [] : [{ model, member, leftOut }];
    }),
  );
  const off = rejected(
    candidates,
    ({ leftOut }) => leftOut.meanDeviation / leftOut.meanSd,
    input.settings.false_discovery_rate,
  ).filter(({ member, leftOut }) => Math.abs(leftOut.meanDeviation) > leastThreshold(input, member.system));
  const whole = new Set(off.map(({ member }) => member.system));
  const few = candidates.filter(({ member }) => input.fits[member.system]?.agreement === "cannot tell");
  const points = few
    .filter(({ member }) => !whole.has(member.system))
    .flatMap((one) => pointsOf(one).filter(({ leftOut, point }) => !Number.isNaN(leftOut.predicted[point])));
  const deviation = (one: JudgedPoint) => deviationOf(input, one);
  const offPoints = rejected(
    points,
    (one) => deviation(one) / one.leftOut.sd[one.point]!,
    input.settings.false_discovery_rate,
  ).filter((one) => Math.abs(deviation(one)) > thresholdOf(input, one.member.system, one.point));
  return {
    flags: [...off.map((one) => wholeFlag(input, one)), ...offPoints.map((one) => pointFlag(input, one))],
    judged: new Set(few.map(({ member }) => member.system)),
  };
}

function pointsOf(one: Judged): JudgedPoint[] {
  return Array.from(one.leftOut.predicted.keys(), (point) => ({ ...one, point }));
}

function deviationOf({ fits }: ScreenInput, { member, leftOut, point }: JudgedPoint): number {
  return fits[member.system]!.points.lnValue[point]! - leftOut.predicted[point]!;
}

function leastThreshold(input: ScreenInput, system: number): number {
  const { points } = input.fits[system]!;
  return Math.min(...Array.from(points.row.keys(), (point) => thresholdOf(input, system, point)));
}

/** Those whose deviation is significant at the false-discovery rate, two-sided by Student's t. */
function rejected<One extends Judged>(all: readonly One[], z: (one: One) => number, rate: number): One[] {
  const pValues = all.map((one) => 2 * studentTSurvival(Math.abs(z(one)), one.leftOut.degreesOfFreedom));
  const threshold = benjaminiHochbergThreshold(pValues, rate);
  return all.filter((_, i) => pValues[i]! <= threshold);
}

/** `the other 6 compositions of ethanol + water`. */
function others({ model, member }: Judged): string {
  const count = model.members.filter(({ nUsed, system }) => nUsed > 0 && system !== member.system).length;
  return `the other ${counted(count, "composition")} of ${model.solvents.join(" + ")}`;
}

/** A composition that is off as a whole: a block where one source measured it, which is then the only one. */
function wholeFlag(input: ScreenInput, one: Judged): Flag {
  const { points } = input.fits[one.member.system]!;
  const sources = new Set(points.source);
  const { meanDeviation, meanSd, n } = one.leftOut;
  const cause = compositionCause(one.member, one.leftOut);
  const isExplained = (cause.named.causeProbability ?? 0) > SURE;
  const seen =
    `${offBy(meanDeviation)} what ${others(one)} say (z = ${(meanDeviation / meanSd).toFixed(1)}, mean of ` +
    `${counted(n, "point")} within their temperatures)`;
  const target =
    n === 1 && points.n === 1
      ? ({ scope: "measurement", row: points.row[0]!, source: points.source[0]! } as const)
      : sources.size === 1
        ? ({ scope: "block", source: points.source[0]! } as const)
        : ({ scope: "system" } as const);
  return {
    ...{ ...target, code: "off-mixture", system: one.member.system },
    severity: isExplained && Math.abs(meanDeviation) > Math.LN2 ? "blocking" : "notice",
    ...cause.named,
    evidence: [seen, cause.words].filter((text) => text !== "").join("; "),
    lookAt: cause.lookAt,
  };
}

function pointFlag(input: ScreenInput, one: JudgedPoint): Flag {
  const { points } = input.fits[one.member.system]!;
  const deviation = deviationOf(input, one);
  const z = deviation / one.leftOut.sd[one.point]!;
  return {
    ...{ scope: "measurement", code: "off-mixture", severity: "notice", suspectedCause: "no simple cause" },
    ...{ row: points.row[one.point]!, source: points.source[one.point]!, system: one.member.system },
    evidence:
      `${offBy(deviation)} what ${others(one)} say at ${inCelsius(points.temperatureK[one.point]!)} ` +
      `(z = ${z.toFixed(1)}); the system itself has too few temperatures to judge by`,
    lookAt: "Look at this value and its temperature; measure the composition at more temperatures.",
  };
}
