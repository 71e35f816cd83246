import type { RobustFit } from "../../records/fits.ts";
import { RepeatKind } from "../../records/repeats.ts";
import { quickHint } from "./quick-hint.ts";
import { breakPoints, type FoundBreak, findBreak, likelyBreak, whetherToSearch } from "./two-branch-fit.ts";

/** A system in which a break may be looked for. */
export interface BranchSubject {
  /** Position of the system among the fits. */
  readonly system: number;
  /** Starts the random numbers of its bootstrap. */
  readonly seed: () => number;
  /** Listed transitions of the solid, K. */
  readonly knownK: readonly number[];
  /** 1 = the point takes no part in any fit. */
  readonly excluded?: () => Uint8Array;
}

/** What the search says of one system. */
export interface SearchedBreak extends FoundBreak {
  /** Falling: the screening fit whose curve breaks there. Rising: the smooth one, with the points that show the kink kept. */
  readonly robust: RobustFit;
}

/** The same system fitted anew, robustly, by a curve that breaks at a temperature. */
export type RefitAtBreaks = (
  wanted: readonly { readonly system: number; readonly breakK: number }[],
) => readonly RobustFit[];

/** Breaks nearer than this are one, K. */
const SAME_BREAK_K = 0.5;
/** Statistic of the quickest look from which a closer one is worth its time. */
const QUICK = 5;
/** Points left out from which it may be the curve that is wrong, and not they; one, where the curve may break elsewhere. */
const SEVERAL = 2;

/**
 * Looks for breaks in the systems given. A smooth robust fit leaves out the very points that show a break, so each likely
 * place is tried by a robust fit whose curve may break there, and the points which that one keeps are judged by
 * {@link findBreak}. Of several such fits the one that keeps most points is judged first. Smooth systems cost one quick
 * search.
 *
 * @returns by position of the system; absent where no break is found
 */
export function searchBreaks(
  subjects: readonly BranchSubject[],
  fits: readonly RobustFit[],
  refit: RefitAtBreaks,
): Map<number, SearchedBreak> {
  const worth = subjects.filter(({ system, knownK }) => worthALook(fits[system]!, knownK));
  const wanted = worth.flatMap((subject) =>
    placesToTry(fits[subject.system]!, subject).map((breakK) => ({ system: subject.system, breakK })),
  );
  const refits = refit(wanted);
  const bySystem = new Map<number, RobustFit[]>();
  wanted.forEach(({ system }, i) => {
    bySystem.set(system, [...(bySystem.get(system) ?? []), refits[i]!]);
  });
  const found = new Map<number, SearchedBreak>();
  for (const subject of worth) {
    const outcome = searchOne(subject, fits[subject.system]!, bySystem.get(subject.system) ?? [], refit);
    if (outcome !== undefined) found.set(subject.system, outcome);
  }
  return found;
}

function searchOne(
  { system, seed, knownK, excluded }: BranchSubject,
  smooth: RobustFit,
  refits: readonly RobustFit[],
  refit: RefitAtBreaks,
): SearchedBreak | undefined {
  const known = new Map<string, FoundBreak | undefined>();
  const judged = (robust: RobustFit) => {
    const key = robust.kept.join("");
    if (!known.has(key)) known.set(key, findBreak(breakPoints(robust), seed(), knownK));
    return known.get(key);
  };
  const agreed = refits.filter(({ agreement }) => agreement !== "conflict");
  for (const robust of agreed.sort((a, b) => keptCount(b) - keptCount(a))) {
    const found = judged(robust);
    if (found?.sense !== "falls") continue;
    if (Math.abs(found.breakK - robust.breakTemperatureK) < SAME_BREAK_K) return { ...found, robust };
    const again = refit([{ system, breakK: found.breakK }])[0]!;
    const confirmed = again.agreement === "conflict" ? undefined : judged(again);
    if (confirmed?.sense === "falls") return { ...confirmed, robust: again };
  }
  const whole = leftOut(smooth) >= SEVERAL ? withAllSound(smooth, excluded?.()) : smooth;
  const found = judged(whole);
  return found?.sense === "rises" ? { ...found, robust: whole } : undefined;
}

function keptCount({ kept }: RobustFit): number {
  return kept.reduce((sum, mark) => sum + mark, 0);
}

/** Whether a system is looked at at all: the smooth fit leaves points out or may break, or a quick search finds anything. */
function worthALook(robust: RobustFit, knownK: readonly number[]): boolean {
  const suspicious = !Number.isNaN(robust.breakTemperatureK) || leftOut(robust) >= SEVERAL;
  if (suspicious) return true;
  if (knownK.length === 0 && quickHint(robust) < QUICK) return false;
  return whetherToSearch(breakPoints(robust), knownK).worth;
}

/** Points of sound sources that the fit leaves out. */
function leftOut({ points, kept, soundSources }: RobustFit): number {
  let count = 0;
  for (let i = 0; i < points.n; i++) if (kept[i] === 0 && soundSources.includes(points.source[i]!)) count++;
  return count;
}

/** The fit with all points of its sound sources kept that may take part at all. */
function withAllSound(robust: RobustFit, excluded: Uint8Array | undefined): RobustFit {
  const { points, soundSources, deviationSd, repeats } = robust;
  const usable = (i: number) =>
    soundSources.includes(points.source[i]!) &&
    deviationSd[i]! > 0 &&
    excluded?.[i] !== 1 &&
    (repeats === undefined || repeats.kind[i] === RepeatKind.counts);
  return { ...robust, kept: Uint8Array.from(points.source, (_, i) => (usable(i) ? 1 : 0)) };
}

/** Temperatures at which a break is likely enough for a robust fit of its own, K. */
function placesToTry(robust: RobustFit, { knownK, excluded }: BranchSubject): number[] {
  const places = [robust.breakTemperatureK, likelyBreak(breakPoints(robust), knownK, leftOut(robust) >= SEVERAL)];
  const protectedAt = robust.breakTemperatureK;
  if (leftOut(robust) >= (Number.isNaN(protectedAt) ? SEVERAL : 1))
    places.push(likelyBreak(breakPoints(withAllSound(robust, excluded?.())), knownK));
  const different: number[] = [];
  for (const place of places) {
    if (Number.isFinite(place) && !different.some((other) => Math.abs(other - place) < SAME_BREAK_K))
      different.push(place);
  }
  return different;
}
