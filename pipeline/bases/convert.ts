import { assumptionsOf } from "./assumptions.ts";
import { budgetOfRatio, budgetOfResult, type Contribution, combinedUncertainty } from "./budget.ts";
import { firstOrderCaution, firstOrderDeviation } from "./first-order.ts";
import type { SoluteBasis } from "./hydrate.ts";
import { linkOf } from "./link.ts";
import type { NeedName, Needs } from "./needs.ts";
import { amplificationCaution, concentrationAmplification } from "./solution-density.ts";
import {
  type ConversionStep,
  isPerSolutionVolume,
  stepsFromHub,
  stepsToHub,
  whyNoRatio,
  whyNoTarget,
} from "./steps.ts";
import { isOpenAt, quantityFromValue, standardFromRelative, type Unit, valueFromQuantity } from "./unit.ts";

/** One conversion to be explained. What is said of the source holds for the target too unless `target...` is given. */
export interface ConversionRequest {
  readonly value: number;
  /** Standard uncertainty of the value, in its unit; 0 or left out: only the properties contribute. */
  readonly standardUncertainty?: number | undefined;
  readonly from: Unit;
  readonly to: Unit;
  readonly needs: Needs;
  readonly soluteBasis?: SoluteBasis | undefined;
  readonly targetNeeds?: Needs | undefined;
  readonly targetSoluteBasis?: SoluteBasis | undefined;
}

/** A conversion made. */
export interface Converted {
  readonly kind: "converted";
  readonly value: number;
  /** Of the value, in its unit. */
  readonly standardUncertainty: number;
  /** Of the target's basis quantity: of x for `ln x`. */
  readonly relativeUncertainty: number;
  /** r, g unsolvated solute per g total solvent. */
  readonly massRatio: number;
  readonly massRatioRelativeUncertainty: number;
  /** What makes up `relativeUncertainty`: the reported value first, then the properties. */
  readonly contributions: readonly Contribution[];
  /** What makes up `massRatioRelativeUncertainty`. */
  readonly massRatioContributions: readonly Contribution[];
  readonly steps: readonly ConversionStep[];
  readonly assumptions: readonly string[];
  /** What weakens the result, in words: a density error amplified beyond use, an uncertainty too large for first order. */
  readonly cautions: readonly string[];
  /** rho/(rho - c) where the value was per volume of solution, else undefined; above 2 ask for a weighed value. */
  readonly amplification: number | undefined;
  /** Relative error of the first-order uncertainty of r for bending over the value's uncertainty; see `firstOrderDeviation`. */
  readonly firstOrderDeviation: number;
}

export type Conversion =
  | Converted
  | { readonly kind: "missing"; readonly missing: readonly NeedName[] }
  | { readonly kind: "open"; readonly readings: readonly string[] }
  | { readonly kind: "impossible"; readonly reason: string };

/**
 * Converts one value through the hub and says how: each step with its equation and properties, the assumptions, and
 * the budget of the first-order uncertainty. Equations and derivatives are the very ones `hubConverter` uses.
 *
 * Bad input throws nothing: what is missing, open or impossible is the result.
 */
export function convertWithSteps(request: ConversionRequest): Conversion {
  const { value, from, to, needs, standardUncertainty = 0 } = request;
  const targetNeeds = request.targetNeeds ?? needs;
  const source = linkOf(from.basis, request.soluteBasis);
  const target = linkOf(to.basis, request.targetSoluteBasis ?? request.soluteBasis);

  if (isOpenAt(from, value)) return { kind: "open", readings: from.readings };
  const missing = Array.from(new Set([...source.missing(needs), ...target.missing(targetNeeds)]));
  if (missing.length > 0) return { kind: "missing", missing };
  const quantity = quantityFromValue(from.scale, value);
  const r = source.toHub(quantity, needs);
  if (Number.isNaN(r)) return { kind: "impossible", reason: whyNoRatio(source, quantity) };
  const result = valueFromQuantity(to.scale, target.fromHub(r, targetNeeds));
  if (Number.isNaN(result)) return { kind: "impossible", reason: whyNoTarget(target) };

  const ofRatio = budgetOfRatio(from, value, standardUncertainty, source, r, needs);
  const ofResult = budgetOfResult(ofRatio, target, r, targetNeeds);
  const relativeUncertainty = combinedUncertainty(ofResult);
  const amplification = isPerSolutionVolume(source) ? concentrationAmplification(r) : undefined;
  const deviation = firstOrderDeviation(from, value, standardUncertainty, source, needs);
  return {
    kind: "converted",
    value: result,
    standardUncertainty: standardFromRelative(to.scale, result, relativeUncertainty),
    relativeUncertainty,
    massRatio: r,
    massRatioRelativeUncertainty: combinedUncertainty(ofRatio),
    contributions: ofResult,
    massRatioContributions: ofRatio,
    steps: [...stepsToHub(from, value, source, r, needs), ...stepsFromHub(to, target, r, targetNeeds)],
    assumptions: assumptionsOf(from, needs, source, to, targetNeeds, target),
    cautions: [amplificationCaution(amplification), firstOrderCaution(deviation)].filter((text) => text !== undefined),
    amplification,
    firstOrderDeviation: deviation,
  };
}
