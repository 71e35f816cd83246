import { bareVolumeDifference } from "./hub-converter.ts";
import type { Link } from "./link.ts";
import type { Needs } from "./needs.ts";
import { propagate } from "./uncertainty.ts";
import { quantityFromValue, relativeFromStandard, type Unit } from "./unit.ts";

/** What one input contributes to the relative standard uncertainty of a result, with sign. */
export interface Contribution {
  readonly name: string;
  /** d ln result/d ln input. */
  readonly sensitivity: number;
  readonly relativeUncertainty: number;
  /** sensitivity times relativeUncertainty. */
  readonly contribution: number;
}

function contribution(name: string, sensitivity: number, relativeUncertainty: number): Contribution {
  return { name, sensitivity, relativeUncertainty, contribution: sensitivity * relativeUncertainty };
}

/** Joins an effect with sign to the one of the same name; where their uncertainties differ the larger holds. */
function join(sum: readonly Contribution[], more: Contribution): readonly Contribution[] {
  const same = sum.find(({ name }) => name === more.name);
  if (same === undefined) return [...sum, more];
  const relativeUncertainty = Math.max(same.relativeUncertainty, more.relativeUncertainty);
  const joined = contribution(more.name, same.sensitivity + more.sensitivity, relativeUncertainty);
  return sum.map((one) => (one === same ? joined : one));
}

function ofProperties(link: Link, r: number, needs: Needs): readonly Contribution[] {
  let sum: readonly Contribution[] = [];
  for (const input of link.inputs) {
    if (input.quantity(needs, r) === undefined) continue;
    sum = join(sum, contribution(input.name, input.elasticity(r, needs), input.relativeUncertainty(needs)));
  }
  return sum;
}

/**
 * The budget of r [kg/kg]: the reported value with its standard uncertainty (its unit), the open reading of a bare
 * volume, and every property the link uses.
 */
export function budgetOfRatio(
  unit: Unit,
  value: number,
  standardUncertainty: number,
  link: Link,
  r: number,
  needs: Needs,
): readonly Contribution[] {
  const ofValue = relativeFromStandard(unit.scale, value, standardUncertainty);
  const budget = [contribution("reported value", link.valueElasticity(r, needs), ofValue)];
  if (unit.bareVolume) {
    const difference = bareVolumeDifference(quantityFromValue(unit.scale, value), needs);
    budget.push(contribution("volume of solution or of solvent", 1, difference));
  }
  return [...budget, ...ofProperties(link, r, needs)];
}

/**
 * The budget of a basis quantity computed from r: d ln q = (d ln r - sum S d ln p)/E. A property that already acted on r
 * acts with the sum of both sensitivities, so what cancels in the value cancels in the uncertainty.
 */
export function budgetOfResult(
  ofRatio: readonly Contribution[],
  link: Link,
  r: number,
  needs: Needs,
): readonly Contribution[] {
  const slope = link.valueElasticity(r, needs);
  let sum: readonly Contribution[] = ofRatio.map((one) =>
    contribution(one.name, one.sensitivity / slope, one.relativeUncertainty),
  );
  for (const one of ofProperties(link, r, needs)) {
    sum = join(sum, contribution(one.name, -one.sensitivity / slope, one.relativeUncertainty));
  }
  return sum;
}

/** Relative standard uncertainty [1] of a budget whose inputs are independent of one another. */
export function combinedUncertainty(budget: readonly Contribution[]): number {
  return propagate(
    budget.map(({ sensitivity }) => sensitivity),
    budget.map(({ relativeUncertainty }) => relativeUncertainty),
  ).standardUncertainty;
}
