import type { Liquor } from "../records/edition.ts";
import type { Curve, IdealComparison } from "../records/fits.ts";
import { activityCoefficient, idealSolubility, whyNoIdealSolubility } from "./ideal-solubility.ts";

/**
 * The curve of a system held against the ideal solubility at the middle of its range, or why it is not.
 *
 * Of two branches it is the one above the transition: the melting data are those of the form that is stable up to its
 * melting point, and of a form with solvent and one without, the latter is the one above.
 * @param curves branches of one system, the coldest first
 */
export function idealComparison(
  curves: readonly Curve[],
  liquor: Liquor,
): IdealComparison | { readonly whyNot: string } {
  const curve = curves.at(-1);
  if (curve === undefined) return { whyNot: "there is no curve" };
  if (curve.fitBasis !== "ln x") return { whyNot: "no molar mass is known" };
  const melting = { meltingPointK: liquor.formMeltingPointK, fusionEnthalpy: liquor.formFusionEnthalpy };
  const { electrolyte, solvated, meltingOfSameForm: sameForm } = liquor;
  const whyNot = whyNoIdealSolubility({ ...melting, electrolyte, solvated, sameForm });
  if (whyNot !== undefined) return { whyNot };
  const [low, high] = curve.temperatureRangeK;
  const temperatureK = (low + high) / 2;
  if (temperatureK > melting.meltingPointK) return { whyNot: "the range lies above the melting point" };
  const ideal = idealSolubility(melting, temperatureK);
  const gamma = activityCoefficient(ideal, curve.evaluate(temperatureK));
  return { temperatureK, low: ideal.low, high: ideal.high, gammaLow: gamma.low, gammaHigh: gamma.high };
}
