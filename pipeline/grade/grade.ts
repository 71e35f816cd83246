import type { Grade } from "../records/edition.ts";
import type { Agreement } from "../records/fits.ts";

/** Fewest independent laboratories for a grade better than doubtful when anything else is amiss. */
const LABORATORIES = 2;
/** Fewest distinct temperatures and narrowest span, K, that count as temperature cover. */
const TEMPERATURES = 4;
const SPAN_K = 20;
/** Points agree that lie within this many standard deviations of what the others say; so many of them should. */
export const AGREEMENT_SDS = 2;
const AGREEMENT_SHARE = 0.9;
/** Share of the kept points whose solid should have been checked at equilibrium. */
const SOLID_SHARE = 0.5;

/** What the grade of one system rests on. Numbers are counts. */
export interface GradeEvidence {
  /** Points that could be fitted: none set aside, no intervals. */
  readonly points: number;
  /** Rows known only as a range, and rows with a number that is shown and never fitted; none set aside. */
  readonly ranges: number;
  readonly notFitted: number;
  /** Rows set aside by a ruling. */
  readonly setAside: number;
  /** Points that stay in the published curve. */
  readonly kept: number;
  /** Points within {@link AGREEMENT_SDS} standard deviations of what the others say, of those that could be judged. */
  readonly withinUncertainty: number;
  readonly judged: number;
  readonly agreement: Agreement;
  /** Temperatures of the points, K. */
  readonly temperatureK: Float64Array;
  /** Distinct laboratories among the kept points. */
  readonly laboratories: number;
  /** Distinct methods among the kept points. */
  readonly methods: number;
  /** Kept points whose solid was looked at in equilibrium and was the one stated. */
  readonly solidChecked: number;
  /** Blocking flags on the system or its sources that nobody has decided on. */
  readonly openFlags: number;
  /** Who confirms the grade `recommended`, in words; undefined where nobody does. */
  readonly confirmedBy: string | undefined;
}

/** One criterion: what was found against what is wanted, and whether it is met. */
interface Criterion {
  readonly met: boolean;
  readonly text: string;
}

/**
 * Proposes a grade in the sense of the IUPAC Solubility Data Series, with each criterion and its number.
 *
 * - rejected: points were reported and none is left in the curve
 * - doubtful: sources disagree, an open blocking flag, a single laboratory with no temperature cover, or no number at all
 *   (only ranges, or values that are never fitted): nothing was found wrong, but there is nothing to evaluate
 * - tentative: everything else
 * - recommended: at least 2 laboratories, agreement within uncertainty, temperature cover, solid phase checked at
 *   equilibrium, no open flag, and a ruling with a name that confirms it; never proposed by the program alone
 *
 * The number of methods is told and not required. The limits (2 laboratories, 4 temperatures over 20 K, 90 % within two
 * standard deviations, half of the points with a checked solid) are common practice.
 */
export function proposeGrade(evidence: GradeEvidence): Grade {
  const { kept, laboratories, openFlags, agreement, confirmedBy } = evidence;
  const cover = temperatureCover(evidence);
  const required = [
    laboratoryCriterion(evidence),
    agreementCriterion(evidence),
    cover,
    solidCriterion(evidence),
    flagCriterion(evidence),
  ];
  const texts = required.map(({ text }) => text);
  texts.splice(3, 0, `${counted(evidence.methods, "method")} (more than one rules out an error they share)`);
  if (kept === 0) return withoutCurve(evidence, texts);
  const several = new Set(evidence.temperatureK).size > 1;
  const doubtful = agreement === "conflict" || openFlags > 0 || (laboratories < LABORATORIES && !cover.met && several);
  const unmet = required.filter(({ met }) => !met).length;
  const reasons = [...texts, ...confirmation(unmet, confirmedBy)];
  if (doubtful) return { grade: "doubtful", reasons };
  return { grade: unmet === 0 && confirmedBy !== undefined ? "recommended" : "tentative", reasons };
}

/** Grade of a system no point of which stays: what is there instead decides. */
function withoutCurve({ points, ranges, notFitted, setAside }: GradeEvidence, texts: readonly string[]): Grade {
  if (points > 0) return { grade: "rejected", reasons: ["no point is kept", ...texts] };
  if (ranges + notFitted === 0) {
    const aside = setAside > 0 ? `: ${counted(setAside, "row")} set aside by a ruling` : "";
    return { grade: "rejected", reasons: [`no point to fit${aside}`, ...texts] };
  }
  const there = [
    ranges > 0 ? `only ${counted(ranges, "range")}` : "",
    notFitted > 0 ? `${counted(notFitted, "value")} shown and never fitted` : "",
  ].filter((text) => text !== "");
  // The other criteria count numbers: of a system without any they would tell nothing but zeros.
  return { grade: "doubtful", reasons: [`no number to evaluate: ${there.join(" and ")}`, texts.at(-1) as string] };
}

function confirmation(unmet: number, confirmedBy: string | undefined): string[] {
  if (confirmedBy === undefined) {
    return unmet === 0 ? ["meets every criterion: a ruling keep on recommended@SYSTEM with a name confirms it"] : [];
  }
  return [
    unmet === 0
      ? `recommended, ${confirmedBy}`
      : `recommendation without effect while ${counted(unmet, "criterion", "criteria")} above ${unmet === 1 ? "is" : "are"} not met: ${confirmedBy}`,
  ];
}

const counted = (n: number, one: string, more = `${one}s`) => `${n} ${n === 1 ? one : more}`;

function laboratoryCriterion({ laboratories: n }: GradeEvidence): Criterion {
  const text = `${counted(n, "independent laboratory", "independent laboratories")} (at least ${LABORATORIES} wanted)`;
  return { met: n >= LABORATORIES, text };
}

function agreementCriterion({ agreement, laboratories, withinUncertainty, judged }: GradeEvidence): Criterion {
  if (agreement === "conflict") return { met: false, text: "the sources disagree and none has a majority" };
  if (judged === 0) return { met: false, text: "no point could be held against others" };
  const share = withinUncertainty / judged;
  const text =
    `${withinUncertainty} of ${judged} points within ${AGREEMENT_SDS} standard deviations of what the others say ` +
    `(at least ${100 * AGREEMENT_SHARE} % wanted)`;
  const told = laboratories < LABORATORIES ? `${text}, all of one laboratory` : text;
  return { met: share >= AGREEMENT_SHARE && laboratories >= LABORATORIES && agreement === "agreed", text: told };
}

function temperatureCover({ temperatureK }: GradeEvidence): Criterion {
  const temperatures = new Set(temperatureK).size;
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const T of temperatureK) [low, high] = [Math.min(low, T), Math.max(high, T)];
  const span = temperatures > 0 ? high - low : 0;
  const text = `${counted(temperatures, "temperature")} over ${Math.round(span)} K (at least ${TEMPERATURES} over ${SPAN_K} K wanted)`;
  return { met: temperatures >= TEMPERATURES && span >= SPAN_K, text };
}

function solidCriterion({ solidChecked, kept }: GradeEvidence): Criterion {
  const met = kept > 0 && solidChecked >= SOLID_SHARE * kept;
  const text = `solid phase checked at equilibrium for ${solidChecked} of ${counted(kept, "kept point")} (at least half wanted)`;
  return { met, text: met ? text : `${text}: tentative at best` };
}

function flagCriterion({ openFlags }: GradeEvidence): Criterion {
  const text =
    openFlags === 0 ? "no open flag" : `${counted(openFlags, "open flag needs", "open flags need")} a person`;
  return { met: openFlags === 0, text };
}
