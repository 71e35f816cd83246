import type { CompositionBasis } from "../../bases/compositions.ts";
import { meanMolarMass } from "../../bases/compositions.ts";
import { moleFractionAt } from "../../bases/hub-values.ts";
import { guestFractionInTotalSolvent, type SoluteBasis } from "../../bases/hydrate.ts";
import { linkOf } from "../../bases/link.ts";
import type { Needs, Quantity } from "../../bases/needs.ts";
import { apparentDensityFromSolid } from "../../bases/solution-density.ts";
import { isOpenAt, quantityFromValue, type Unit } from "../../bases/unit.ts";
import { parseUnit } from "../../bases/units.ts";
import { mixtureDensity } from "../../properties/mixture-density.ts";
import type { Substance } from "../../properties/substances.ts";
import type { SolventPart } from "../../records/identified.ts";
import { type DecimalMark, parseNumber } from "../../records/number-text.ts";

/** The solubility cell of a row, where the composition of its liquor depends on it. */
export interface RowValue {
  readonly text: string;
  readonly unit: string;
  readonly soluteBasis: string;
}

/** Volumes of solvent are measured out cold, K. */
const MEASURED_OUT_K = 293.15;
/** Rounds of the composition with the molar mass and density that follow from it; each gains two digits and more. */
const ROUNDS = 12;

const exact = (value: number | undefined): Quantity | undefined =>
  value === undefined || Number.isNaN(value) ? undefined : { value, standardUncertainty: 0 };

/** The number and unit of a row, where both are plain; undefined for a range, a word or an open unit. */
function plainValue(value: RowValue, decimal: DecimalMark): { number: number; unit: Unit } | undefined {
  const number = parseNumber(value.text, decimal);
  const parsed = parseUnit(value.unit);
  if (!number.ok || parsed.kind !== "unit" || isOpenAt(parsed.unit, number.value)) return undefined;
  return { number: number.value, unit: parsed.unit };
}

/**
 * Fraction of the solute in the solution [1] on a mass or mole basis, from a value per mass or amount; undefined for a
 * value per volume, and for a hydrate or salt whose mass would have to be converted first.
 *
 * @param solventMolarMass mean molar mass of the solvent, g/mol: a mole fraction and a mass fraction are tied by it
 */
export function soluteFractionOf(
  value: RowValue,
  basis: CompositionBasis,
  soluteMolarMass: number,
  solventMolarMass: number,
  decimal: DecimalMark,
): number | undefined {
  const plain = plainValue(value, decimal);
  if (plain === undefined || (value.soluteBasis !== "" && value.soluteBasis !== "anhydrous")) return undefined;
  const needs = { soluteMolarMass: exact(soluteMolarMass), solventMolarMass: exact(solventMolarMass) };
  const link = linkOf(plain.unit.basis);
  if (link.missing(needs).length > 0) return undefined;
  const r = link.toHub(quantityFromValue(plain.unit.scale, plain.number), needs);
  const fraction = basis === "mass" ? r / (1 + r) : basis === "mole" ? moleFractionAt(r, needs) : Number.NaN;
  return fraction > 0 && fraction < 1 ? fraction : undefined;
}

/** What a dissolved solvate brings into its liquor. */
export interface DissolvedSolvate {
  readonly guest: Substance;
  /** M(crystal)/M(unsolvated). */
  readonly crystalMassFactor: number;
  readonly soluteMolarMass: number;
  readonly solute: Substance | undefined;
}

/** Properties that a rough mass ratio needs; densities are those at 20 °C, volumes taken to add. */
function needsOf(parts: readonly SolventPart[], added: readonly SolventPart[], solvate: DissolvedSolvate): Needs {
  const masses = parts.map(({ substance }) => substance.molarMass ?? Number.NaN);
  const fractions = parts.map(({ massFraction }) => massFraction);
  const density = mixtureDensity(parts, MEASURED_OUT_K);
  return {
    soluteMolarMass: exact(solvate.soluteMolarMass),
    crystalMolarMass: exact(solvate.crystalMassFactor * solvate.soluteMolarMass),
    solventMolarMass: exact(meanMolarMass(fractions, masses)),
    solventDensityAt20C: mixtureDensity(added, MEASURED_OUT_K),
    solutionDensity: density && {
      kind: "additive volumes",
      apparentSoluteDensity: apparentDensityFromSolid(solvate.solute?.solidDensity),
      solventDensity: density,
    },
  };
}

/**
 * Parts of the total solvent once the guest of a dissolved solvate has joined the solvent added: of each gram of total
 * solvent r (R - 1) came with the crystal. Where r itself rests on the composition (mole fractions, volumes) the two are
 * solved together; densities at 20 °C serve, for their error hardly shows in the shift. Undefined where the row's value
 * does not tell r, or leaves no solvent.
 */
export function partsWithGuest(
  added: readonly SolventPart[],
  solvate: DissolvedSolvate,
  value: RowValue,
  decimal: DecimalMark,
): readonly SolventPart[] | undefined {
  const plain = plainValue(value, decimal);
  const R = solvate.crystalMassFactor;
  if (plain === undefined || !(R > 1)) return undefined;
  const q = quantityFromValue(plain.unit.scale, plain.number);
  const link = linkOf(plain.unit.basis, (value.soluteBasis || "anhydrous") as SoluteBasis);
  let parts = added;
  for (let round = 0; round < ROUNDS; round++) {
    const needs = needsOf(parts, added, solvate);
    if (link.missing(needs).length > 0) return undefined;
    const r = link.toHub(q, needs);
    const fromCrystal = guestFractionInTotalSolvent(0, r, R);
    if (!(fromCrystal > 0 && fromCrystal < 1)) return undefined;
    parts = joined(added, solvate.guest, fromCrystal);
  }
  return parts;
}

/** Parts of 1 - f of a solvent and f of a guest. */
function joined(added: readonly SolventPart[], guest: Substance, f: number): readonly SolventPart[] {
  const scaled = added.map(({ substance, massFraction }) => ({
    substance,
    massFraction: massFraction * (1 - f) + (substance.name === guest.name ? f : 0),
  }));
  const there = scaled.some(({ substance }) => substance.name === guest.name);
  return there ? scaled : [...scaled, { substance: guest, massFraction: f }];
}
