import { type CompositionBasis, type CompositionLiquid, massFractions, normalised } from "../../bases/compositions.ts";
import { alcoholByVolume, massFractionFromAlcoholByVolume } from "../../properties/ethanol-water.ts";
import { liquidDensity } from "../../properties/liquid-density.ts";
import type { Substance } from "../../properties/substances.ts";
import type { CellFault } from "../../records/cells.ts";
import type { Share } from "./mixture-text.ts";

/** Solvents are measured out cold: their volumes before mixing are at this temperature, K. */
const MEASURED_OUT_K = 293.15;
const ALCOHOLOMETRY = { toMass: massFractionFromAlcoholByVolume, fromMass: alcoholByVolume };
/** How far a sum of percentages or fractions may be off for rounding. */
const ROUNDING = 0.006;

type Scale = "percent" | "fraction" | undefined;
type Shares = readonly number[] | CellFault;

const percentText = (fraction: number) => `${Number((100 * fraction).toPrecision(3))} %`;

/** A number of a composition as a fraction of 1, or why it is none. */
function fractionOf({ value, percent }: Share, scale: Scale, field: string): number | CellFault {
  const inPercent = percent || scale === "percent" || (scale === undefined && value > 1);
  const fraction = inPercent ? value / 100 : value;
  if (fraction >= 0 && fraction <= 1) return fraction;
  const found = `${value}${inPercent ? " %" : ""} of a solvent`;
  return { field, code: "composition-out-of-range", found };
}

const notAddingUp = (field: string, numbers: readonly Share[], sum: number): CellFault => ({
  field,
  code: "fractions-do-not-add-up",
  found: `${numbers.map(({ value }) => value).join(" + ")} is ${Number(sum.toPrecision(6))}`,
});

/**
 * Shares of all components from as many numbers: a ratio (7:3), percentages or fractions. Numbers that are percentages or
 * fractions, by a sign, a word or their look, must add up; a ratio need not.
 */
export function sharesOfAll(numbers: readonly Share[], scale: Scale, counted: boolean, field: string): Shares {
  const values = numbers.map(({ value }) => value);
  const sum = values.reduce((total, value) => total + value, 0);
  if (!(sum > 0)) return notAddingUp(field, numbers, sum);
  const signs = numbers.some(({ percent }) => percent);
  const nearWhole = sum > 80 && sum < 120 && values.some((value) => value >= 10);
  const nearOne = scale === "fraction" || (values.every((value) => value < 1) && sum > 0.8 && sum < 1.2);
  const whole = signs || nearWhole ? 100 : nearOne ? 1 : undefined;
  if (whole === undefined) return normalised(values);
  const off = sum / whole - 1;
  // With the solute counted the solvents' fractions leave room for it.
  if (Math.abs(off) <= ROUNDING || (counted && off < 0)) return normalised(values);
  return notAddingUp(field, numbers, sum);
}

/** Shares of two components from the one number stated for the component at `place`. */
export function sharesOfOne(number: Share, place: 0 | 1, scale: Scale, field: string): Shares {
  const fraction = fractionOf(number, scale, field);
  if (typeof fraction !== "number") return fraction;
  return place === 0 ? [fraction, 1 - fraction] : [1 - fraction, fraction];
}

/** Shares of two components whose fractions count the solute, when only that of `place` is stated. */
export function sharesBesideSolute(
  number: Share,
  place: 0 | 1,
  scale: Scale,
  soluteFraction: number,
  field: string,
): Shares {
  const fraction = fractionOf(number, scale, field);
  if (typeof fraction !== "number") return fraction;
  const other = 1 - soluteFraction - fraction;
  if (other < -1e-9) {
    const found = `${percentText(fraction)} of a solvent and ${percentText(soluteFraction)} of the solute are more than the whole`;
    return { field, code: "fractions-do-not-add-up", found };
  }
  const shares = normalised([fraction, Math.max(0, other)]);
  return place === 0 ? shares : [...shares].reverse();
}

/** Molar mass (g/mol) and density at 20 °C (kg/m3) of a solvent; NaN where unknown. */
export function compositionLiquid(substance: Substance): CompositionLiquid {
  return {
    molarMass: substance.molarMass ?? Number.NaN,
    density20C: liquidDensity(substance, MEASURED_OUT_K)?.value ?? Number.NaN,
  };
}

const isEthanolAndWater = (components: readonly Substance[]): boolean =>
  components.length === 2 && ["ethanol", "water"].every((name) => components.some((one) => one.name === name));

/** Mass fractions of shares on a basis, in the order of the components; a fault names the property that is missing. */
export function massFractionsOf(
  basis: CompositionBasis,
  shares: readonly number[],
  components: readonly Substance[],
  field: string,
): Shares {
  const ethanolFirst = components[0]?.name === "ethanol";
  if (basis === "alcoholometric volume") {
    if (!isEthanolAndWater(components)) {
      const found = `% vol of ${components.map(({ name }) => name).join(" + ")}`;
      const mend = "% vol is the strength of ethanol in water; for other solvents write v/v, w/w or mol/mol";
      return { field, code: "unsupported-composition", found, mend };
    }
    const ordered = ethanolFirst ? shares : [...shares].reverse();
    const w = massFractions(basis, ordered, [], ALCOHOLOMETRY);
    return ethanolFirst ? w : [...w].reverse();
  }
  const liquids = components.map(compositionLiquid);
  const w = massFractions(basis, shares, liquids, ALCOHOLOMETRY);
  if (!w.some(Number.isNaN)) return w;
  const wanting = basis === "mole" ? "molarMass" : "density20C";
  const unknown = components.filter((_, i) => Number.isNaN(liquids[i]?.[wanting])).map(({ name }) => name);
  return basis === "mole"
    ? { field, code: "no-molar-mass", found: `no molar mass of ${unknown.join(" and ")} is known` }
    : { field, code: "no-density", found: `no density of ${unknown.join(" and ")} is known at 20 °C` };
}

/** The readings of shares whose basis is open, in words: `95 % vol = 92.4 % mass, 95 % by mass ...`. */
export function openReadings(shares: readonly number[], components: readonly Substance[]): string {
  const first = components[0]?.name ?? "";
  const bases: readonly (readonly [CompositionBasis, string])[] = [
    ["mass", "% by mass"],
    ...(isEthanolAndWater(components) ? [["alcoholometric volume", "% vol"] as const] : []),
    ["volume before mixing", "% by volume before mixing"],
    ["mole", "mol %"],
  ];
  const shown = bases.flatMap(([basis, words]) => {
    const w = massFractionsOf(basis, shares, components, "");
    const strongFirst = basis !== "alcoholometric volume" || first === "ethanol";
    if ("code" in w || !strongFirst) return [];
    const stated = Number((100 * (shares[0] ?? Number.NaN)).toPrecision(4));
    const mass = basis === "mass" ? "" : ` = ${percentText(w[0] ?? Number.NaN)} mass`;
    return [`${stated} ${words}${mass}`];
  });
  return `${first} can be ${shown.join(", or ")}`;
}

/** By how much the mass fraction differs between alcoholometric strength and volumes before mixing, for ethanol in water. */
export function strengthDifference(shares: readonly number[], components: readonly Substance[]): number {
  if (!isEthanolAndWater(components)) return 0;
  const read = (basis: CompositionBasis) => massFractionsOf(basis, shares, components, "");
  const [strength, volumes] = [read("alcoholometric volume"), read("volume before mixing")];
  return "code" in strength || "code" in volumes
    ? 0
    : Math.abs((strength[0] ?? Number.NaN) - (volumes[0] ?? Number.NaN));
}
