import type { Link } from "./link.ts";
import type { Needs, Quantity } from "./needs.ts";
import { densityAt, densityEquation, densityInputs } from "./solution-density.ts";
import { quantityFromValue, type Scale, type Unit, valueFromQuantity } from "./unit.ts";

/** A property as a step used it. */
export interface UsedProperty extends Quantity {
  readonly name: string;
  readonly symbol: string;
  readonly unit: string;
}

/** One step of a conversion: the equation as text, and what came out. */
export interface ConversionStep {
  readonly equation: string;
  readonly symbol: string;
  readonly value: number;
  readonly unit: string;
  readonly properties: readonly UsedProperty[];
}

/** Whether the basis is per volume of solution, so that the density of the solution decides. */
export function isPerSolutionVolume(link: Link): boolean {
  return link.basis === "mass per volume of solution" || link.basis === "amount per volume of solution";
}

function factor(scale: Scale): string {
  if (scale.numerator === scale.denominator) return "";
  return scale.denominator === 1 ? ` * ${scale.numerator}` : ` / ${scale.denominator}`;
}

/** q of a value as text: `c = value * 10`, `m2/V1 = 1000 / value`, `x = exp(-value)`. */
function scaleEquation(scale: Scale, symbol: string): string {
  const minus = scale.sign === -1 ? "-" : "";
  switch (scale.kind) {
    case "linear":
      return `${symbol} = value${factor(scale)}`;
    case "reciprocal":
      return `${symbol} = ${scale.numerator / scale.denominator} / value`;
    case "ln":
      return `${symbol} = exp(${minus}value)${factor(scale)}`;
    case "log10":
      return `${symbol} = 10^(${minus}value)${factor(scale)}`;
  }
}

/** The value of a basis quantity as text: the inverse of `scaleEquation`. */
function inverseScaleEquation(scale: Scale, symbol: string): string {
  const inverse: Scale = { ...scale, numerator: scale.denominator, denominator: scale.numerator };
  const minus = scale.sign === -1 ? "-" : "";
  switch (scale.kind) {
    case "linear":
      return `value = ${symbol}${factor(inverse)}`;
    case "reciprocal":
      return `value = ${scale.numerator / scale.denominator} / (${symbol})`;
    case "ln":
      return `value = ${minus}ln(${symbol}${factor(inverse)})`;
    case "log10":
      return `value = ${minus}log10(${symbol}${factor(inverse)})`;
  }
}

/** Every property once, though a hydrate uses the molar mass of its solute twice. */
function propertiesUsed(link: Link, r: number, needs: Needs): readonly UsedProperty[] {
  const byName = new Map<string, UsedProperty>();
  for (const { name, symbol, unit, quantity } of link.inputs) {
    const property = quantity(needs, r);
    if (property !== undefined) byName.set(name, { name, symbol, unit, ...property });
  }
  return Array.from(byName.values());
}

const ofDensity: ReadonlySet<string> = new Set(densityInputs.map(({ name }) => name));

/** The step that gives the density of a solution of mass ratio r by a model, where the link needs one. */
function densitySteps(link: Link, r: number, needs: Needs): readonly ConversionStep[] {
  const model = needs.solutionDensity;
  if (!isPerSolutionVolume(link) || model === undefined || model.kind === "measured") return [];
  const properties = propertiesUsed(link, r, needs).filter(({ name }) => ofDensity.has(name));
  const value = densityAt(model, r / (1 + r));
  return [{ equation: `${densityEquation(model)} at w = r/(1 + r)`, symbol: "rho", value, unit: "kg/m3", properties }];
}

/** The properties of the link's own step: those of the density are told where the density is. */
function linkProperties(link: Link, r: number, needs: Needs): readonly UsedProperty[] {
  const used = propertiesUsed(link, r, needs);
  const told = densitySteps(link, r, needs).length > 0;
  return told ? used.filter(({ name }) => !ofDensity.has(name)) : used;
}

/**
 * The steps from a value in a unit to r [kg/kg]. Where a density is modelled it is that of the solution found, for it
 * and r are solved together.
 */
export function stepsToHub(unit: Unit, value: number, link: Link, r: number, needs: Needs): readonly ConversionStep[] {
  const { scale } = unit;
  const { symbol } = link;
  const quantity = quantityFromValue(scale, value);
  const properties = linkProperties(link, r, needs);
  return [
    { equation: scaleEquation(scale, symbol), symbol, value: quantity, unit: link.unit, properties: [] },
    ...densitySteps(link, r, needs),
    { equation: link.toHubEquation, symbol: "r", value: r, unit: "kg/kg", properties },
  ];
}

/** The steps from r [kg/kg] to a value in a unit. */
export function stepsFromHub(unit: Unit, link: Link, r: number, needs: Needs): readonly ConversionStep[] {
  const { scale, canonical } = unit;
  const { symbol } = link;
  const quantity = link.fromHub(r, needs);
  const value = valueFromQuantity(scale, quantity);
  const properties = linkProperties(link, r, needs);
  return [
    ...densitySteps(link, r, needs),
    { equation: link.fromHubEquation, symbol, value: quantity, unit: link.unit, properties },
    { equation: inverseScaleEquation(scale, symbol), symbol: "value", value, unit: canonical, properties: [] },
  ];
}

/** Why a basis quantity has no mass ratio, in words. */
export function whyNoRatio(link: Link, quantity: number): string {
  if (!Number.isFinite(quantity)) return `${link.symbol} = ${quantity} is not a finite number`;
  if (!(quantity > 0)) return `${link.symbol} = ${quantity} ${link.unit} is not a positive amount of solute`;
  if (link.basis === "mass fraction" || link.basis === "mole fraction") {
    return `${link.symbol} = ${quantity} leaves no solvent: a fraction must be below 1`;
  }
  if (isPerSolutionVolume(link)) {
    return `${link.symbol} = ${quantity} ${link.unit} is more than this solution can hold, or beyond the range of its density`;
  }
  return `${link.symbol} = ${quantity} ${link.unit} has no mass ratio`;
}

/** Why r has no value on the target basis, in words. */
export function whyNoTarget(link: Link): string {
  if (link.soluteBasis === "hydrate per added solvent") {
    return "the crystal melts in its own solvent here: no solvent has to be added, so nothing is per solvent added";
  }
  return `no ${link.basis} here: the solution lies beyond the range of its density`;
}
