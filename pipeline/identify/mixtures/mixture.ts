import { type CompositionBasis, meanMolarMass } from "../../bases/compositions.ts";
import { MISCIBILITY_REFERENCE, miscibility } from "../../properties/miscibility.ts";
import type { Substance, SubstanceIndex } from "../../properties/substances.ts";
import type { CellFault } from "../../records/cells.ts";
import type { MadeUp, SolventPart } from "../../records/identified.ts";
import type { DecimalMark } from "../../records/number-text.ts";
import { type CompositionCell, readCompositionCell } from "./composition-cell.ts";
import { readBasisCell } from "./composition-words.ts";
import type { NamedMixture, StatedNumber } from "./mixture-cell.ts";
import {
  massFractionsOf,
  openReadings,
  sharesBesideSolute,
  sharesOfAll,
  sharesOfOne,
  strengthDifference,
} from "./mixture-fractions.ts";

/** What a row says of the composition of its solvent outside the solvent cell. */
export interface CompositionCells {
  readonly composition: string;
  readonly basis: string;
  readonly decimal: DecimalMark;
  /**
   * Fraction of the solute in the solution on a basis, from the row's own value and the mean molar mass of the solvent,
   * g/mol; undefined where the value does not tell.
   */
  readonly soluteFraction: (basis: CompositionBasis, solventMolarMass: number) => number | undefined;
}

/** A mixture with its exact composition, in the order written. */
export interface Mixture {
  readonly parts: readonly SolventPart[];
  readonly madeUp: MadeUp;
  readonly openU: number;
  readonly assumptions: readonly string[];
}

/** Compositions stated twice agree within this, for rounding. */
const AGREEING = 0.002;

const names = (components: readonly Substance[]) => components.map(({ name }) => name).join(" + ");

/** Where the fractions of a mixture come from: its solvent cell or its composition cell. */
interface Stated extends CompositionCell {
  readonly field: string;
}

/**
 * Mass fractions of a named mixture from its cells. What is open (a missing basis, a fraction of an unnamed component) or
 * contradicts itself is a fault with the readings it has; nothing is guessed.
 */
export function resolveMixture(
  named: NamedMixture,
  cells: CompositionCells,
  index: SubstanceIndex,
): Mixture | CellFault {
  const column = cells.composition === "" ? undefined : readCompositionCell(cells.composition, cells.decimal, index);
  if (column !== undefined && "code" in column) return column;
  const basisCell = cells.basis === "" ? undefined : readBasisCell(cells.basis);
  if (cells.basis !== "" && basisCell === undefined) {
    return { field: "composition_basis", code: "bad-choice", found: `"${cells.basis}" is no basis of a composition` };
  }
  const inCell = named.numbers.length > 0;
  const stated: Stated | undefined =
    column !== undefined ? { ...column, field: "composition" } : inCell ? { ...named, field: "solvent" } : undefined;
  const bases = [named.basis, column?.basis, basisCell?.basis].filter((one) => one !== undefined);
  const [basis] = bases;
  if (bases.some((one) => one !== basis)) {
    return { field: "composition_basis", code: "contradictory-composition", found: `bases ${bases.join(" and ")}` };
  }
  const withPartner = addPartner(named, stated, basis);
  if ("code" in withPartner) return withPartner;
  const { components, assumptions } = withPartner;
  if (stated === undefined) {
    const found = `no proportion of ${names(components)} is stated`;
    return { field: column === undefined && inCell ? "composition" : "solvent", code: "missing-composition", found };
  }
  const scale = stated.scale ?? basisCell?.scale;
  const solute = basisCell?.solute ?? column?.solute ?? named.solute;
  const shares = sharesOf(components, stated, scale, solute === "counted", basis, cells);
  if ("code" in shares) return shares;
  if (column !== undefined && inCell) {
    const again = sharesOf(components, { ...named, field: "solvent" }, named.scale, false, basis, cells);
    if ("code" in again) return again;
    if (again.some((share, i) => Math.abs(share - (shares[i] ?? Number.NaN)) > AGREEING)) {
      const found = `"${cells.composition}" beside the composition of the solvent cell`;
      return { field: "composition", code: "contradictory-composition", found };
    }
  }
  if (basis === undefined && shares.every((share) => share > 0)) {
    return { field: "composition_basis", code: "open-composition", found: openReadings(shares, components) };
  }
  return weighed(components, shares, basis ?? "mass", stated, scale, assumptions);
}

/** Components with the one that is not written: water where the words or the strength of ethanol imply it. */
function addPartner(
  named: NamedMixture,
  stated: Stated | undefined,
  basis: CompositionBasis | undefined,
): { readonly components: readonly Substance[]; readonly assumptions: readonly string[] } | CellFault {
  const { components, water } = named;
  const other = stated?.numbers.map(({ of }) => of).find((one) => one && !components.includes(one));
  if (other !== undefined) return { components: [...components, other], assumptions: [] };
  const [only] = components;
  if (components.length > 1 || only === undefined) return { components, assumptions: [] };
  const inCell = stated?.field === "solvent";
  const strength = basis === "alcoholometric volume" && only.name === "ethanol";
  const miscible = !["no", "partial"].includes(only.properties.get("miscible_with_water")?.text ?? "");
  if (only.name !== water.name && (strength || (inCell && stated.numbers.length === 1 && miscible))) {
    const remark = `the rest beside ${only.name} taken as water`;
    return { components: [only, water], assumptions: strength ? [] : [remark] };
  }
  if (stated?.numbers.every(({ value, percent }) => value === 100 || (value === 1 && !percent))) {
    return { components, assumptions: [] };
  }
  const found = `a fraction of ${only.name} and no other component`;
  return { field: "solvent", code: "missing-composition", found };
}

function sharesOf(
  components: readonly Substance[],
  { numbers, scale: own, field }: Stated,
  given: "percent" | "fraction" | undefined,
  counted: boolean,
  basis: CompositionBasis | undefined,
  cells: CompositionCells,
): readonly number[] | CellFault {
  const scale = own ?? given;
  if (components.length === 1) return [1];
  if (numbers.length === components.length) {
    const ordered = components.map((component, i) => numbers.find(({ of }) => of === component) ?? numbers[i]);
    const all = ordered.filter((number) => number !== undefined);
    return sharesOfAll(all, scale, counted, field);
  }
  const [only, ...more] = numbers;
  if (only === undefined || more.length > 0 || components.length !== 2) {
    const found = `${numbers.length} fraction${numbers.length === 1 ? "" : "s"} for ${names(components)}`;
    const code = numbers.length < components.length ? "missing-composition" : "unsupported-composition";
    return { field, code, found };
  }
  if (only.place !== undefined && only.place > components.length) {
    const found = `a fraction of component ${only.place} of ${names(components)}`;
    return { field, code: "unsupported-composition", found };
  }
  const place = only.place === 2 || only.of === components[1] ? 1 : 0;
  if (!counted) return sharesOfOne(only, place, scale, field);
  const free = basis && sharesFreeOfSolute(only, place, scale, basis, components, cells, field);
  if (free !== undefined) return free;
  const found = `a ${basis ?? ""} fraction of ${only.value} with the solute counted`.replace("  ", " ");
  return { field: "composition_basis", code: "composition-counts-solute", found };
}

/** Rounds of a composition with the solute fraction that follows from it; each gains a digit and more. */
const ROUNDS = 60;

/**
 * Shares free of solute where the one fraction stated counts it. The solute's fraction may rest on the molar mass of the
 * solvent, so the two are solved together. Undefined where the row's value does not tell it.
 */
function sharesFreeOfSolute(
  number: StatedNumber,
  place: 0 | 1,
  scale: "percent" | "fraction" | undefined,
  basis: CompositionBasis,
  components: readonly Substance[],
  cells: CompositionCells,
  field: string,
): readonly number[] | CellFault | undefined {
  const masses = components.map(({ molarMass }) => molarMass ?? Number.NaN);
  let shares: readonly number[] = [0.5, 0.5];
  for (let round = 0; round < ROUNDS; round++) {
    const w = massFractionsOf(basis, shares, components, field);
    if ("code" in w) return w;
    const solute = cells.soluteFraction(basis, meanMolarMass(w, masses));
    if (solute === undefined) return undefined;
    const next = sharesBesideSolute(number, place, scale, solute, field);
    if ("code" in next && round === ROUNDS - 1) return next;
    // On the way the room may seem too small; what is left of it then is none of the other component.
    shares = "code" in next ? (place === 0 ? [1, 0] : [0, 1]) : next;
  }
  return shares;
}

/** The mixture by mass, once it is known to be one liquid. */
function weighed(
  components: readonly Substance[],
  shares: readonly number[],
  basis: CompositionBasis,
  { numbers, field, scale: own }: Stated,
  given: "percent" | "fraction" | undefined,
  assumptions: readonly string[],
): Mixture | CellFault {
  const scale = own ?? given;
  // The strength of a ratio in volumes has no meaning: its water is a volume before mixing.
  const single = numbers.length === 1;
  const onBasis = basis === "alcoholometric volume" && !single ? "volume before mixing" : basis;
  const w = massFractionsOf(onBasis, shares, components, field);
  if ("code" in w) return w;
  const parts = components
    .map((substance, i) => ({ substance, massFraction: w[i] ?? Number.NaN }))
    .filter(({ massFraction }) => massFraction > 0);
  const gap = gapOf(parts, field);
  if (typeof gap === "object") return gap;
  const inPercent = scale === "percent" || numbers.some(({ percent }) => percent);
  const open = basis === "volume before mixing" && single && inPercent ? strengthDifference(shares, components) : 0;
  const remark =
    open > 0.0005
      ? `% v/v of ethanol taken as volumes before mixing; as alcoholometric strength its mass fraction differs by ${(100 * open).toFixed(1)} wt %, which joins the uncertainty`
      : undefined;
  return {
    parts,
    madeUp: parts.length === 1 ? "pure" : basis === "mass" || basis === "mole" ? "by mass" : "by volume",
    openU: open > 0.0005 ? open : 0,
    assumptions: [...assumptions, remark, gap].filter((text) => text !== undefined),
  };
}

/** Why a binary mixture is not one liquid, or what is to be said of it. */
function gapOf(parts: readonly SolventPart[], field: string): CellFault | string | undefined {
  const [a, b] = parts;
  if (a === undefined || b === undefined || parts.length > 2) return undefined;
  const found = miscibility(a.substance, b.substance, a.massFraction);
  if (found.kind === "one phase") return undefined;
  const pair = `${a.substance.name} + ${b.substance.name}`;
  if (found.kind === "partial") return `${pair} mix in part only: one liquid assumed`;
  const limits = [found.low, found.high].map((limit) => Number((100 * limit).toPrecision(3)));
  return {
    field,
    code: "miscibility-gap",
    found: `${Number((100 * a.massFraction).toPrecision(3))} wt % ${a.substance.name} in ${pair} lies inside the gap from about ${limits[0]} to ${limits[1]} wt % (${MISCIBILITY_REFERENCE})`,
  };
}
