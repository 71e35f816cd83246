import type { Curve } from "../../records/fits.ts";

/** Common practice limits of a cooling crystallisation; excess solvent is a setting. */
const BELOW_BOILING_K = 10;
const BELOW_MELTING_K = 20;
const ABOVE_FREEZING_K = 5;
const COLDEST_K = 278.15;
const SMALLEST_SPAN_K = 20;
const NEAR_TRANSITION_K = 5;
const SOLIDS_CAUTION = 25;
const SOLIDS_MAY_NOT_STIR = 35;

/** What a cooling plan needs to know besides the curve. Unknown temperatures are NaN and set no limit. */
export interface CoolingConditions {
  /** S(T): g unsolvated solute per g total solvent, inside the curve's range. */
  readonly massRatioAt: (temperatureK: number) => number;
  /** 95 % half-width of ln S at T. */
  readonly halfWidthAt: (temperatureK: number) => number;
  readonly boilingPointK: number;
  readonly freezingPointK: number;
  readonly formMeltingPointK: number;
  /** M(crystal)/M(unsolvated) of the form stable at a temperature; undefined where it cannot be told. */
  readonly crystalAt: (temperatureK: number) => { readonly form: string; readonly massFactor: number } | undefined;
  /** Transition temperatures known for the solute in this solvent, K. */
  readonly transitionsK: readonly number[];
  /** Density of the solvent at 20 °C, kg/m3. */
  readonly solventDensity20C: number;
  /** Solvent used beyond the least amount that dissolves the charge hot, percent. */
  readonly excessSolventPercent: number;
}

/** A cooling crystallisation planned from one curve; fields are absent, with a reason, where data end. */
export interface CoolingPlan {
  readonly crystalForm?: string;
  readonly hotK?: number;
  readonly coldK?: number;
  readonly hotMassRatio?: number;
  readonly coldMassRatio?: number;
  /** Recovery at equilibrium, percent of the charge, with 95 % limits. */
  readonly maxRecovery?: { readonly value: number; readonly low: number; readonly high: number };
  /** Recovery with the excess of solvent, percent of the charge. */
  readonly workingRecovery?: number;
  /** Solvent at 20 °C to add per g of crystals charged, mL; the crystals' own solvent is counted. */
  readonly solventMLPerG?: number;
  /** Crystals in the slurry at the cold end, percent by mass. */
  readonly solidsPercent?: number;
  /** Charge lost to the liquor with the excess of solvent, percent. */
  readonly lossPercent?: number;
  /** Temperature at which the working solution is just saturated, K. */
  readonly saturationK?: number;
  readonly cautions: readonly string[];
  readonly blankReason: string;
}

/**
 * Recovery of a cooling crystallisation at equilibrium, as a fraction of the charge:
 * P/(R A) with P = (A - S_cold W)/(1/R - S_cold (1 - 1/R)), A = S W, S the loading in g unsolvated per g total solvent.
 *
 * - loading, coldMassRatio  [g/g total solvent]     - crystalMassFactor R = M(crystal)/M(unsolvated) [1]
 *
 * Mass balance: crystals P carry P/R of solute and P (1 - 1/R) of solvent. Undefined where the denominator is not
 * positive: the crystals melt in their own solvent.
 */
export function equilibriumRecovery(
  loading: number,
  coldMassRatio: number,
  crystalMassFactor: number,
): number | undefined {
  const R = crystalMassFactor;
  const denominator = 1 / R - coldMassRatio * (1 - 1 / R);
  return denominator > 0 ? (loading - coldMassRatio) / denominator / (R * loading) : undefined;
}

const celsius = (temperatureK: number): string => `${(temperatureK - 273.15).toFixed(1)} °C`;

/** Smallest of the known numbers. */
const least = (...values: readonly number[]): number => Math.min(...values.filter((value) => !Number.isNaN(value)));
const greatest = (...values: readonly number[]): number => Math.max(...values.filter((value) => !Number.isNaN(value)));

/** Whether a temperature keeps its distance from every transition. */
function clearOfTransitions(temperatureK: number, transitionsK: readonly number[]): boolean {
  // A band's own edge counts as clear although it is computed.
  return transitionsK.every((t) => Math.abs(t - temperatureK) >= NEAR_TRANSITION_K - 1e-9);
}

/** An end of the range moved past every band about a transition that it lies in: the cold end upwards, the hot end downwards. */
function movedClear(endK: number, transitionsK: readonly number[], direction: 1 | -1): number {
  const inOrder = [...transitionsK].sort((a, b) => direction * (a - b));
  return inOrder.reduce((end, t) => (clearOfTransitions(end, [t]) ? end : t + direction * NEAR_TRANSITION_K), endK);
}

/**
 * Temperature of the highest solubility between two temperatures and clear of every transition, by 0.5 K steps with both
 * ends and the edges of the bands about the transitions; the warmer of equals.
 */
function hottest({ massRatioAt, transitionsK }: CoolingConditions, low: number, high: number): number {
  const steps = Math.max(1, Math.ceil((high - low) / 0.5));
  const grid = Array.from({ length: steps + 1 }, (_, i) => low + ((high - low) * i) / steps);
  const edges = transitionsK.flatMap((t) => [t - NEAR_TRANSITION_K, t + NEAR_TRANSITION_K]);
  return [...grid, ...edges.filter((t) => t > low && t < high)]
    .filter((t) => clearOfTransitions(t, transitionsK))
    .sort((a, b) => a - b)
    .reduce((best, t) => (massRatioAt(t) >= massRatioAt(best) ? t : best), low);
}

/** Highest temperature in [low, high] at which S falls to `target`, by bisection; S must pass `target` in between. */
function saturationTemperature(massRatioAt: (t: number) => number, target: number, low: number, high: number): number {
  let [below, above] = [low, high];
  while (above - below > 1e-6) {
    const middle = (below + above) / 2;
    if (massRatioAt(middle) < target) below = middle;
    else above = middle;
  }
  return (below + above) / 2;
}

/** 95 % limits of the recovery, percent: the two ends' half-widths of ln S carried through first order, independent. */
function recoveryLimits(hot: number, cold: number, R: number, halfHot: number, halfCold: number) {
  const at = (lnHot: number, lnCold: number) =>
    equilibriumRecovery(hot * Math.exp(lnHot), cold * Math.exp(lnCold), R) ?? 1;
  const value = at(0, 0);
  const spread = Math.hypot((at(halfHot, 0) - at(-halfHot, 0)) / 2, (at(0, halfCold) - at(0, -halfCold)) / 2);
  return { value: 100 * value, low: 100 * Math.max(0, value - spread), high: 100 * Math.min(1, value + spread) };
}

/**
 * Plans a cooling crystallisation from one curve: hot end at the highest solubility that data, boiling point - 10 K and
 * the form's melting point - 20 K allow; cold end at the highest of data, freezing point + 5 K and 5 °C; neither within
 * 5 K of a transition of the solid (common practice). Between them there may be transitions: the solution crystallises as
 * the form stable at the cold end.
 * Equilibrium, pure solute, this solid form; no kinetics, cake hold-up or impurity effect.
 */
export function planCooling(curve: Curve, conditions: CoolingConditions): CoolingPlan {
  const { massRatioAt, halfWidthAt, excessSolventPercent, solventDensity20C } = conditions;
  const blank = (blankReason: string): CoolingPlan => ({ cautions: [], blankReason });
  const [low, high] = curve.temperatureRangeK;
  const warmest = least(
    high,
    conditions.boilingPointK - BELOW_BOILING_K,
    conditions.formMeltingPointK - BELOW_MELTING_K,
  );
  const coldest = greatest(low, conditions.freezingPointK + ABOVE_FREEZING_K, COLDEST_K);
  const coldK = movedClear(coldest, conditions.transitionsK, 1);
  const ceiling = movedClear(warmest, conditions.transitionsK, -1);
  if (curve.model === "constant") return blank("measured at one temperature only");
  if (ceiling - coldK < SMALLEST_SPAN_K) {
    return blank(`usable span ${celsius(coldK)} to ${celsius(ceiling)} is below ${SMALLEST_SPAN_K} K`);
  }
  const hotK = hottest(conditions, coldK, ceiling);
  if (hotK - coldK < SMALLEST_SPAN_K) return blank("solubility does not rise on heating: cooling brings nothing back");
  const crystal = conditions.crystalAt(coldK);
  if (crystal === undefined)
    return blank("which solid crystallises at the cold end cannot be told: name the solid form");
  const [hot, cold, R] = [massRatioAt(hotK), massRatioAt(coldK), crystal.massFactor];
  // A liquor as rich as the crystal itself, 1/(R - 1), needs no solvent added: the crystal dissolves in its own.
  if (equilibriumRecovery(hot, cold, R) === undefined || hot * (R - 1) >= 1) {
    return blank("melts in its crystal solvent below the hot end");
  }

  const loading = hot / (1 + excessSolventPercent / 100);
  const working = Math.max(0, equilibriumRecovery(loading, cold, R) ?? 0);
  const added = 1 / R / loading - (1 - 1 / R);
  const solids = (100 * working) / (1 + added);
  const cautions: string[] = [];
  if (solids > SOLIDS_MAY_NOT_STIR) cautions.push("slurry may not stir (over 35 % solids, common practice)");
  else if (solids > SOLIDS_CAUTION) cautions.push("thick slurry (over 25 % solids, common practice)");
  return {
    crystalForm: crystal.form,
    hotK,
    coldK,
    hotMassRatio: hot,
    coldMassRatio: cold,
    maxRecovery: recoveryLimits(hot, cold, R, halfWidthAt(hotK), halfWidthAt(coldK)),
    workingRecovery: 100 * working,
    ...(!Number.isNaN(solventDensity20C) ? { solventMLPerG: (1000 * added) / solventDensity20C } : {}),
    solidsPercent: solids,
    lossPercent: 100 * (1 - working),
    ...(loading > cold ? { saturationK: saturationTemperature(massRatioAt, loading, coldK, hotK) } : {}),
    cautions,
    blankReason: "",
  };
}
