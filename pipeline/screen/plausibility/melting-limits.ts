import type { Flag, RobustFit } from "../../records/fits.ts";
import { inCelsius } from "../../records/temperature-text.ts";
import { noticeOn } from "../block-notice.ts";
import { blocksOf } from "../block-screen.ts";
import { isOutsideLiquid } from "../liquid-range.ts";
import { type ScreenInput, sourceName } from "../screen-input.ts";
import { counted, threeDigits } from "../wording.ts";

/** Melting points and temperatures are known to about this, K. */
const MARGIN_K = 1;
/** A solute that melts below this is a liquid at the bench; what dissolves is the liquid, and nothing is amiss. K */
const MELTS_AT_THE_BENCH_K = 303.15;
/** Activity coefficients of molecular solutes below this are hardly known. Common practice. */
const LEAST_ACTIVITY_COEFFICIENT = 0.1;
const GAS_CONSTANT = 8.314462618;

/**
 * Notices of what the melting data of the solid form forbid or make unlikely: temperatures above its melting point, where
 * no solid can be in equilibrium, and solubilities far above the ideal one. Of its two usual estimates,
 * ln x = -(dHfus/R)(1/T - 1/Tm) and ln x = -(dHfus/(R Tm)) ln(Tm/T), the larger counts; a value must exceed it by a factor
 * ten and by as much again as the two differ, for the further T lies below Tm the less is known.
 * Electrolytes, solvates and melting data of another form are left out.
 */
export function meltingFlags(input: ScreenInput): Flag[] {
  return input.fits.flatMap((fit) => {
    const liquor = input.about[fit.system]?.liquor;
    if (liquor === undefined || !(liquor.formMeltingPointK > 0)) return [];
    const { formMeltingPointK: meltingK, formFusionEnthalpy: fusion } = liquor;
    const comparable = fusion > 0 && liquor.meltingOfSameForm && !liquor.electrolyte && !liquor.solvated;
    const { temperatureK, lnValue } = fit.points;
    const liquid = meltingK < MELTS_AT_THE_BENCH_K && temperatureK.every((T) => !(T <= meltingK));
    const isAbove = (i: number) => !liquid && temperatureK[i]! > meltingK + MARGIN_K;
    const lnIdeal = (i: number) => -(fusion / (GAS_CONSTANT * meltingK)) * Math.log(meltingK / temperatureK[i]!);
    const lnLower = (i: number) => -(fusion / GAS_CONSTANT) * (1 / temperatureK[i]! - 1 / meltingK);
    const exceeds = (i: number) =>
      comparable &&
      temperatureK[i]! <= meltingK &&
      !isOutsideLiquid(input, fit.system, i) &&
      lnValue[i]! - lnIdeal(i) > lnIdeal(i) - lnLower(i) - Math.log(LEAST_ACTIVITY_COEFFICIENT);
    const mole = input.systems[fit.system]!.fitBasis === "ln x";
    return [...blocksOf(fit)].flatMap(([source, points]) => [
      ...aboveMelting(input, fit, source, points.filter(isAbove), meltingK),
      ...(mole ? aboveIdeal(input, fit, source, points.filter(exceeds), lnIdeal) : []),
    ]);
  });
}

function aboveMelting(
  input: ScreenInput,
  fit: RobustFit,
  source: number,
  above: readonly number[],
  meltingK: number,
): Flag[] {
  if (above.length === 0) return [];
  const hottest = Math.max(...above.map((i) => fit.points.temperatureK[i]!));
  return [
    noticeOn(fit, source, above, {
      code: "above-melting-point",
      evidence:
        `${counted(above.length, "point")} of ${sourceName(input, source)} up to ${inCelsius(hottest)}: above the melting ` +
        `point of the solid, ${inCelsius(meltingK)}`,
      lookAt: "Look at the temperature and its scale, and at whether a second liquid was there instead of a solid.",
    }),
  ];
}

function aboveIdeal(
  input: ScreenInput,
  fit: RobustFit,
  source: number,
  above: readonly number[],
  lnIdeal: (point: number) => number,
): Flag[] {
  if (above.length === 0) return [];
  const worst = above.reduce((a, b) =>
    fit.points.lnValue[b]! - lnIdeal(b) > fit.points.lnValue[a]! - lnIdeal(a) ? b : a,
  );
  const times = Math.exp(fit.points.lnValue[worst]! - lnIdeal(worst));
  return [
    noticeOn(fit, source, above, {
      code: "above-ideal-solubility",
      evidence:
        `${counted(above.length, "point")} of ${sourceName(input, source)}, at ${inCelsius(fit.points.temperatureK[worst]!)} ` +
        `${threeDigits(times)} times the ideal solubility, an activity coefficient of ${threeDigits(1 / times)}`,
      lookAt: "Look at basis and unit, and at whether the solute reacts with the solvent or forms a salt in it.",
    }),
  ];
}
