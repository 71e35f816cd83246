import {
  type ComparedCurve,
  commonRangeK,
  comparedCurve,
  differenceAt,
  shownTemperatures,
} from "../curves/compare-curves.ts";
import type { Flag, RobustFit } from "../records/fits.ts";
import type { System } from "../records/systems.ts";
import { inCelsius } from "../records/temperature-text.ts";
import { materialThreshold } from "./material-threshold.ts";
import { middle } from "./middle.ts";
import type { ScreenInput } from "./screen-input.ts";
import { counted, listed, offBy } from "./wording.ts";

/** Name of the form of rows that name none. */
const UNSPECIFIED = "unspecified";
/** Share of the points of a system without a curve that must agree with a form for the whole to look like it. */
const SHARE = 0.9;

/** Most named forms told one by one. */
const MOST_TOLD = 8;
/** Part of the widest comparison that a form must reach to have a say. */
const LEAST_COVER = 0.2;

/** How rows without a named form stand to one named form of their family. */
interface Standing {
  readonly form: string;
  readonly agrees: boolean;
  /** Some of the points agree with the form and others do not. */
  readonly partly: boolean;
  /** Within the material threshold of the form all along: forms rarely differ by less. */
  readonly near: boolean;
  /** Where it does not agree: above the form (1), below it (-1), or on both sides of it (0). */
  readonly side: number;
  /** Share of the temperatures of the rows over which the form can be compared. */
  readonly cover: number;
  readonly told: string;
}

/**
 * Notices of systems whose solid form nobody named, compared with the named forms of their family (same solute, solvent,
 * composition and medium): which form they look like, or that they lie above, below or between all. Nothing is merged.
 */
export function familyFlags(input: ScreenInput): Flag[] {
  const families = new Map<string, System[]>();
  for (const system of input.systems) {
    const members = families.get(system.family);
    if (members === undefined) families.set(system.family, [system]);
    else members.push(system);
  }
  return [...families.values()].flatMap((members) => {
    const unnamed = members.find(({ identity }) => identity.solidForm === UNSPECIFIED);
    if (unnamed === undefined || members.length < 2) return [];
    const named = members.filter((system) => system !== unnamed && system.fitBasis === unnamed.fitBasis);
    return stretches(input, unnamed)
      .flatMap(({ words, standing }) => {
        const standings = named.flatMap((system) => standing(system) ?? []);
        return standings.length === 0 ? [] : [{ words, standings }];
      })
      .reduce<Flag[]>((flags, { words, standings }) => {
        const shown = standings.slice(0, MOST_TOLD).map((one) => one.told);
        const rest = standings.length - shown.length;
        const told = `${words}${verdict(standings)}: ${shown.join("; ")}${rest > 0 ? `; and ${rest} more forms` : ""}`;
        const [flag] = flags;
        if (flag === undefined) return [flagOf(unnamed, told)];
        return [{ ...flag, evidence: `${flag.evidence}. ${told}` }];
      }, []);
  });
}

function flagOf({ index }: System, evidence: string): Flag {
  return {
    ...{ scope: "system", code: "unspecified-form", severity: "notice", system: index, evidence },
    lookAt:
      "Look at which form the solid was (XRPD of the wet solid at the end) and name it in the source card; until then these rows stay apart from the named forms.",
  };
}

/** A stretch of the unnamed system (a branch of its curve, or its points) and how it stands to a named system. */
interface Stretch {
  readonly words: string;
  readonly standing: (named: System) => Standing | undefined;
}

function stretches(input: ScreenInput, unnamed: System): Stretch[] {
  const fit = input.fits[unnamed.index] as RobustFit;
  const curves = input.curves[unnamed.index] ?? [];
  if (curves.length === 0) return [{ words: "", standing: (named) => standingOfPoints(input, fit, named) }];
  return curves.map((curve) => {
    const [low, high] = curve.temperatureRangeK;
    const words = curves.length > 1 ? `from ${inCelsius(low)} to ${inCelsius(high)} it ` : "";
    return {
      words,
      standing: (named) => standingOfCurve(input, unnamed.index, comparedCurve(curve, fit, input.table.sharedU), named),
    };
  });
}

/** How a curve stands to the curve of a named form over the range they share; undefined where they share none. */
function standingOfCurve(
  input: ScreenInput,
  unnamedSystem: number,
  unnamed: ComparedCurve,
  system: System,
): Standing | undefined {
  const form = system.identity.solidForm;
  for (const curve of input.curves[system.index] ?? []) {
    const other = comparedCurve(curve, input.fits[system.index] as RobustFit, input.table.sharedU);
    const range = commonRangeK(unnamed, other);
    if (range === undefined) continue;
    const differences = shownTemperatures(range).map((T) => differenceAt(unnamed, other, T));
    const apart = differences.filter(({ lnRatio, half }) => Math.abs(lnRatio) > half);
    const sides = new Set(apart.map(({ lnRatio }) => Math.sign(lnRatio)));
    const shown = differences.map(({ lnRatio, temperatureK }) => `${offBy(lnRatio)} at ${inCelsius(temperatureK)}`);
    const within = apart.length === 0 ? ", within the limits of both curves" : "";
    const threshold = thresholdOfSystem(input, unnamedSystem);
    const near = differences.every(({ lnRatio }) => Math.abs(lnRatio) <= threshold);
    const [low, high] = unnamed.curve.temperatureRangeK;
    const cover = high > low ? (range[1] - range[0]) / (high - low) : 1;
    return {
      ...{
        form,
        agrees: apart.length === 0,
        partly: false,
        near,
        side: sides.size === 1 ? ([...sides][0] as number) : 0,
        cover,
      },
      told: `against ${form} ${shown.join(", ")}${within}`,
    };
  }
  return undefined;
}

/** How points without a curve stand to a named form: within the 95 % limits of a new measurement, above or below. */
function standingOfPoints(
  input: ScreenInput,
  { points, system: index }: RobustFit,
  system: System,
): Standing | undefined {
  const curves = input.curves[system.index] ?? [];
  let [inside, above, below, farthest] = [0, 0, 0, 0];
  for (let i = 0; i < points.n; i++) {
    const T = points.temperatureK[i] as number;
    const curve = curves.find(({ temperatureRangeK: [low, high] }) => T >= low && T <= high);
    if (curve === undefined) continue;
    const deviation = (points.lnValue[i] as number) - curve.evaluate(T);
    farthest = Math.max(farthest, Math.abs(deviation));
    if (Math.abs(deviation) <= curve.limits(T).newMeasurement) inside++;
    else if (deviation > 0) above++;
    else below++;
  }
  const all = inside + above + below;
  if (all === 0) return undefined;
  const form = system.identity.solidForm;
  const told = `${inside} of ${counted(all, "point")} within the limits of a new measurement of ${form}, ${above} above, ${below} below`;
  const agrees = inside >= SHARE * all;
  const side = above >= SHARE * all ? 1 : below >= SHARE * all ? -1 : 0;
  const near = farthest <= thresholdOfSystem(input, index);
  return { form, agrees, partly: !agrees && inside > 0, near, side, cover: all / points.n, told };
}

/** Material threshold at the middle level of a system's points, ln value. */
function thresholdOfSystem({ fits, about, settings }: ScreenInput, system: number): number {
  const { level } = (fits[system] as RobustFit).points;
  return materialThreshold(middle([...level]), 0, about[system]?.kind ?? "general", settings);
}

/** What the standings come to, in words. A form that reaches few of the temperatures has no say where another reaches more. */
function verdict(all: readonly Standing[]): string {
  const most = Math.max(...all.map(({ cover }) => cover));
  const standings = all.filter(({ cover }) => cover >= LEAST_COVER * most);
  const alike = standings.filter(({ agrees }) => agrees).map(({ form }) => form);
  if (alike.length === 1) return `looks like ${alike[0]}`;
  if (alike.length > 1) return `cannot be told from ${listed(alike)}, which lie too near to one another`;
  const partly = standings.filter((one) => one.partly).map(({ form }) => form);
  if (partly.length > 0) return `agrees with ${listed(partly)} in part only`;
  const near = standings.filter((one) => one.near).map(({ form }) => form);
  if (near.length > 0)
    return `lies near ${listed(near)}, beyond the limits of the curves but within the material threshold`;
  const forms = standings.length === 1 ? "the named form" : "every named form it can be held against";
  if (standings.every(({ side }) => side < 0)) return `lies below ${forms}: it may be a more stable form`;
  if (standings.every(({ side }) => side > 0)) return `lies above ${forms}: a less stable form, or not at equilibrium`;
  return standings.length === 1 ? "crosses the named form" : "looks like none of the named forms";
}
