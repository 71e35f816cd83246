import { moleFractionEdge } from "./by-amount.ts";
import { massConcentrationEdge } from "./by-volume.ts";
import type { SoluteBasis } from "./hydrate.ts";
import { type Link, linkOf } from "./link.ts";
import { type Input, type NeedName, type Needs, numberIn, solventDensityForVolume } from "./needs.ts";
import { densityAt } from "./solution-density.ts";
import { quantityFromValue, relativeFromStandard, type Unit, valueFromQuantity } from "./unit.ts";

/** Inputs of one name gathered: their elasticities are summed with sign before anything is squared. */
export interface NamedInput {
  readonly name: string;
  readonly relativeUncertainty: (needs: Needs) => number;
  readonly elasticity: (r: number, needs: Needs) => number;
}

/**
 * One unit bound to the properties of one solute and solvent. Nothing is allocated by a call. The properties are read
 * at each call, so numbers changed in `needs` (a density at the row's temperature) count at once.
 */
export interface HubConverter {
  readonly unit: Unit;
  /** r [g unsolvated solute per g total solvent] of a value in the unit; NaN where the value is impossible. */
  readonly toHub: (value: number) => number;
  /** Value in the unit of r; NaN where the basis cannot say it. */
  readonly fromHub: (r: number) => number;
  /**
   * Relative standard uncertainty of r [1] from the standard uncertainty of the value (its unit) and those of every
   * property; first order. Pass r where it is known already to save the conversion.
   */
  readonly relativeUncertainty: (value: number, standardUncertainty: number, r?: number) => number;
  /**
   * What a row has to itself of the relative standard uncertainty of r [1]: the reported quantity with its relative
   * uncertainty [1], and the density where it was measured on the very solution.
   */
  readonly ownUncertainty: (r: number, relativeOfQuantity: number) => number;
  /**
   * What the rows of a source share of the relative standard uncertainty of r, or of the mole fraction [1]: molar
   * masses, densities and density models, the open reading of a bare volume. It does not average out over the rows.
   */
  readonly sharedUncertainty: (value: number, r: number, of: "mass ratio" | "mole fraction") => number;
  /** d ln r/d ln q at r: how a relative change of the basis quantity reaches r. */
  readonly valueElasticity: (r: number) => number;
  /** The properties the result rests on, for what rows of one source share. */
  readonly inputs: readonly NamedInput[];
}

export type HubConverterResult =
  | { readonly kind: "converter"; readonly converter: HubConverter }
  | { readonly kind: "missing"; readonly missing: readonly NeedName[] };

/** Inputs gathered by name. */
export function gatherInputs(inputs: readonly Input[]): readonly NamedInput[] {
  const byName = new Map<string, Input[]>();
  for (const input of inputs) {
    const same = byName.get(input.name);
    if (same) same.push(input);
    else byName.set(input.name, [input]);
  }
  return Array.from(byName, ([name, same]) => namedInput(name, same));
}

function namedInput(name: string, same: readonly Input[]): NamedInput {
  const [first, second] = same;
  const relativeUncertainty = (needs: Needs) => first?.relativeUncertainty(needs) ?? 0;
  if (first !== undefined && second === undefined) return { name, relativeUncertainty, elasticity: first.elasticity };
  const elasticity = (r: number, needs: Needs) => same.reduce((sum, input) => sum + input.elasticity(r, needs), 0);
  return { name, relativeUncertainty, elasticity };
}

/**
 * How far the two readings of a bare mass per volume lie apart: |ln(r per solution / r per solvent)| [1] for a mass per
 * volume c [kg/m3]. It joins the uncertainty of a value taken per volume of solution without saying so. Where the
 * density of the solvent is unknown that of the solution stands in for it.
 */
export function bareVolumeDifference(c: number, needs: Needs): number {
  const r = massConcentrationEdge.toHub(c, needs);
  const solventDensity = solventDensityForVolume(needs);
  const model = needs.solutionDensity;
  if (model === undefined) return Number.NaN;
  const rho1 = solventDensity === undefined ? densityAt(model, 0) : numberIn(solventDensity);
  return Math.abs(Math.log((r * rho1) / c));
}

/**
 * Converts many values of one unit to the hub. `soluteBasis` says what the solute was weighed as; a hydrate needs
 * `crystalMolarMass`. Says what is missing instead of converting without it.
 *
 * relative u(r)^2 = (E u(q)/q)^2 + sum over named properties (S u(p)/p)^2, with E and S as in `Edge`; a bare volume adds
 * the difference of its two readings. A property that acts on r and again on x acts on x with the sum of both.
 * @see JCGM 100:2008 (GUM), 5.1.
 */
export function hubConverter(unit: Unit, needs: Needs, soluteBasis: SoluteBasis = "anhydrous"): HubConverterResult {
  const link = linkOf(unit.basis, soluteBasis);
  const missing = link.missing(needs);
  if (missing.length > 0) return { kind: "missing", missing };
  const { inputs, shared, sharedOfMoleFraction, measured } = inputsOf(link);
  const { scale } = unit;
  const toHub = (value: number) => link.toHub(quantityFromValue(scale, value), needs);
  const ownUncertainty = (r: number, relativeOfQuantity: number) => {
    const ofValue = Math.abs(link.valueElasticity(r, needs) * relativeOfQuantity);
    return measured === undefined ? ofValue : Math.sqrt(ofValue * ofValue + partOf(measured, r, needs));
  };
  const sharedUncertainty = (value: number, r: number, of: "mass ratio" | "mole fraction") => {
    let variance = unit.bareVolume ? bareVolumeDifference(quantityFromValue(scale, value), needs) ** 2 : 0;
    for (const input of of === "mass ratio" ? shared : sharedOfMoleFraction) variance += partOf(input, r, needs);
    const u = Math.sqrt(variance);
    return of === "mass ratio" ? u : u / moleFractionEdge.valueElasticity(r, needs);
  };
  const relativeUncertainty = (value: number, standardUncertainty: number, known?: number) => {
    const r = known ?? toHub(value);
    const own = ownUncertainty(r, relativeFromStandard(scale, value, standardUncertainty));
    const common = sharedUncertainty(value, r, "mass ratio");
    return Math.sqrt(own * own + common * common);
  };
  const converter: HubConverter = {
    unit,
    toHub,
    fromHub: (r) => valueFromQuantity(scale, link.fromHub(r, needs)),
    relativeUncertainty,
    ownUncertainty,
    sharedUncertainty,
    valueElasticity: (r) => link.valueElasticity(r, needs),
    inputs,
  };
  return { kind: "converter", converter };
}

/** Square of what one property contributes to the relative uncertainty of r. */
function partOf(input: NamedInput, r: number, needs: Needs): number {
  const u = input.relativeUncertainty(needs);
  if (u === 0) return 0;
  const part = input.elasticity(r, needs) * u;
  return part * part;
}

/** The named inputs of a link: all, those that rows share (for r and for x), and the one that is a row's own. */
interface LinkInputs {
  readonly inputs: readonly NamedInput[];
  readonly shared: readonly NamedInput[];
  readonly sharedOfMoleFraction: readonly NamedInput[];
  readonly measured: NamedInput | undefined;
}

const isMeasured = ({ name }: { readonly name: string }) => name === "density of the solution";
const gathered = new WeakMap<Link, LinkInputs>();

/** The named inputs of a link, gathered once: links are constant, converters are many. */
function inputsOf(link: Link): LinkInputs {
  const known = gathered.get(link);
  if (known !== undefined) return known;
  const inputs = gatherInputs(link.inputs);
  const onward = moleFractionEdge.inputs.map((input): Input => {
    const { elasticity } = input;
    return { ...input, elasticity: (r, needs) => -elasticity(r, needs) };
  });
  const found: LinkInputs = {
    inputs,
    shared: inputs.filter((input) => !isMeasured(input)),
    sharedOfMoleFraction: gatherInputs([...link.inputs, ...onward]).filter((input) => !isMeasured(input)),
    measured: inputs.find(isMeasured),
  };
  gathered.set(link, found);
  return found;
}
