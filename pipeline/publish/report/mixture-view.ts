import { safeText } from "../../problems/safe-text.ts";
import type { Edition } from "../../records/edition.ts";
import type { MixtureMember, MixtureModel } from "../../records/mixtures.ts";
import type { System } from "../../records/systems.ts";
import { massRatioFromMoleFraction } from "../mass-ratio.ts";

/** A measurement of a mixture as it is drawn. */
export interface MixturePoint {
  readonly row: number;
  readonly fraction: number;
  readonly temperatureK: number;
  readonly ln: number;
  /** True if the surface uses it. */
  readonly used: boolean;
}

/** One composition with its measurements. */
export interface DrawnMember {
  readonly member: MixtureMember;
  readonly system: System;
  /** Position among the drawn compositions: shape and ink of its marks. */
  readonly mark: number;
  readonly points: readonly MixturePoint[];
}

/** Everything the page of a mixture shows. */
export interface MixtureView {
  readonly edition: Edition;
  readonly model: MixtureModel;
  readonly title: string;
  /** Name of the first solvent, made safe and bounded. */
  readonly first: string;
  readonly letter: "x" | "r";
  /** By ascending mass fraction of the first solvent. */
  readonly members: readonly DrawnMember[];
  /** Round temperatures at which the surface is drawn and listed, K. */
  readonly temperaturesK: readonly number[];
  /** g of solute per 100 g of solvent from ln x (ln r) at a composition; NaN where the mole fraction would reach 1. */
  readonly percentOf: (ln: number, fraction: number) => number;
}

/** Longest name of a solute or solvent in a title, and of a solvent in a label. */
const [LONGEST_PART, LONGEST_LABEL] = [120, 40];
/** Most temperatures drawn and listed. */
const MOST_TEMPERATURES = 6;

/** Path of a mixture's page, from the report's root. */
export function mixtureFile({ id }: Pick<MixtureModel, "id">): string {
  return `mixtures/${id}.html`;
}

/** `benzoic acid, form I, in ethanol + water`, each part made safe and bounded. */
export function mixtureTitle({ solute, solidForm, solvents, medium }: MixtureModel): string {
  const safe = (part: string) => safeText(part, LONGEST_PART);
  const form = solidForm === "unspecified" ? "" : `, ${safe(solidForm)},`;
  return `${safe(solute)}${form} in ${solvents.map(safe).join(" + ")}${medium === "" ? "" : `, ${safe(medium)}`}`;
}

/** Gathers what the page of a mixture shows. */
export function mixtureView(edition: Edition, model: MixtureModel): MixtureView {
  const members = model.members.map((member, mark) => drawnMember(edition, member, mark));
  return {
    ...{ edition, model, members },
    title: mixtureTitle(model),
    first: safeText(model.solvents[0], LONGEST_LABEL),
    letter: model.fitBasis === "ln x" ? "x" : "r",
    temperaturesK: roundTemperatures(
      model.temperatureRangeK,
      members.flatMap(({ points }) => points.filter(({ used }) => used)),
    ),
    percentOf: percentFunction(model, members),
  };
}

function drawnMember(edition: Edition, member: MixtureMember, mark: number): DrawnMember {
  const system = edition.systems[member.system] as System;
  const points = edition.fits[member.system]?.robust.points;
  const drawn = Array.from(points?.row ?? [], (row, i) => ({
    row,
    fraction: member.fractions[i] ?? member.fraction,
    temperatureK: points?.temperatureK[i] ?? Number.NaN,
    ln: points?.lnValue[i] ?? Number.NaN,
    used: member.used[i] === 1,
  }));
  return { member, system, mark, points: drawn };
}

/** Conversion to g/100 g: the reciprocal of the solvent's mean molar mass is linear in the mass fraction. */
function percentFunction(
  model: MixtureModel,
  members: readonly DrawnMember[],
): (ln: number, fraction: number) => number {
  if (model.fitBasis === "ln r") return (ln) => 100 * Math.exp(ln);
  const [low, high] = [members[0] as DrawnMember, members.at(-1) as DrawnMember];
  const [from, to] = [keyFraction(low), keyFraction(high)];
  const [perGramLow, perGramHigh] = [low, high].map(({ system }) => 1 / system.identity.solventMolarMass) as [
    number,
    number,
  ];
  return (ln, fraction) => {
    if (ln >= 0) return Number.NaN;
    const share = to > from ? (fraction - from) / (to - from) : 0;
    const solventMolarMass = 1 / (perGramLow + share * (perGramHigh - perGramLow));
    return 100 * massRatioFromMoleFraction(Math.exp(ln), { ...low.system.identity, solventMolarMass });
  };
}

/** Mass fraction of the first solvent by the composition key, to which the mean molar mass belongs. */
function keyFraction({ member, system }: DrawnMember): number {
  const [first, second] = system.identity.solventComponents;
  return second === undefined ? Math.round(member.fraction) : (first?.massFraction ?? member.fraction);
}

/** Steps and starts of round temperatures, °C: the first of those with most measurements near is taken. */
const ROUND = [
  [5, 0],
  [10, 5],
  [10, 0],
  [20, 5],
  [20, 0],
  [20, 10],
  [50, 0],
] as const;
/** A measurement stands for a round temperature within so much, K. */
const NEAR_K = 1;

/** At most six round temperatures inside a range, where most of the measurements are; its middle where it holds none. */
function roundTemperatures(
  [lowK, highK]: readonly [number, number],
  points: readonly { readonly temperatureK: number }[],
): number[] {
  const series = ROUND.map(([step, start]) => {
    const first = Math.ceil((lowK - 273.15 - start) / step - 1e-9);
    const last = Math.floor((highK - 273.15 - start) / step + 1e-9);
    return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) =>
      Math.min(highK, Math.max(lowK, start + (first + i) * step + 273.15)),
    );
  }).filter(({ length }) => length > 0 && length <= MOST_TEMPERATURES);
  const near = (temperatures: readonly number[]) =>
    points.filter(({ temperatureK }) => temperatures.some((T) => Math.abs(T - temperatureK) <= NEAR_K)).length;
  const best = series.reduce<number[] | undefined>(
    (most, one) => (most === undefined || near(one) > near(most) ? one : most),
    undefined,
  );
  return best ?? [(lowK + highK) / 2];
}
