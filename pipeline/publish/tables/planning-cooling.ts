import type { Edition, Liquor } from "../../records/edition.ts";
import type { Curve, SystemFit } from "../../records/fits.ts";
import type { PlanningCoolingRow } from "../../records/generated/planning-cooling.ts";
import type { System } from "../../records/systems.ts";
import { massRatioFromLn } from "../mass-ratio.ts";
import { type CoolingPlan, planCooling } from "../planning/cooling.ts";

/** What no planning figure holds. */
const NOTE = "equilibrium, pure solute, this solid form; no kinetics, cake hold-up or impurity effect";

/**
 * Plan of a branch: it crystallises at the cold end of this branch, and may be dissolved on the warmer one, whose curve
 * then holds. A branch below its transition ends 5 K short of it for the cold end, as any plan does.
 */
function coolingPlan(
  curve: Curve,
  { curves, transition }: SystemFit,
  system: System,
  liquor: Liquor,
  excessSolventPercent: number,
): CoolingPlan {
  const warmer = curves.filter(({ branch }) => branch >= curve.branch);
  const at = (temperatureK: number) =>
    warmer.find(({ temperatureRangeK: [, high] }) => temperatureK <= high) ?? (warmer.at(-1) as Curve);
  const reach = [curve.temperatureRangeK[0], (warmer.at(-1) as Curve).temperatureRangeK[1]] as const;
  const plan = planCooling(
    { ...curve, temperatureRangeK: reach },
    {
      massRatioAt: (temperatureK) => massRatioFromLn(at(temperatureK).evaluate(temperatureK), system),
      halfWidthAt: (temperatureK) => at(temperatureK).limits(temperatureK).curve,
      boilingPointK: liquor.solventBoilingPointK,
      freezingPointK: liquor.solventFreezingPointK,
      formMeltingPointK: liquor.formMeltingPointK,
      crystalAt: liquor.crystalAt,
      transitionsK: [...liquor.transitionsK, ...(transition === undefined ? [] : [transition.temperatureK])],
      solventDensity20C: liquor.solventDensity20C,
      excessSolventPercent,
    },
  );
  return plan.coldK !== undefined && plan.coldK > curve.temperatureRangeK[1]
    ? { cautions: [], blankReason: "the cold end would lie on the warmer branch" }
    : plan;
}

const percent = (ratio: number | undefined) => (ratio === undefined ? undefined : 100 * ratio);

function planRow(
  system: System,
  curve: Curve | undefined,
  plan: CoolingPlan,
  excess: number,
  hazards: readonly string[],
): PlanningCoolingRow {
  const cautions = [...plan.cautions, ...(plan.blankReason === "" ? hazards : [])];
  return {
    system: system.id,
    curve_id: curve?.curveId,
    crystal_form: plan.crystalForm,
    T_hot_K: plan.hotK,
    T_cold_K: plan.coldK,
    hot_g_per_100g_solvent: percent(plan.hotMassRatio),
    cold_g_per_100g_solvent: percent(plan.coldMassRatio),
    max_recovery_equilibrium_percent: plan.maxRecovery?.value,
    max_recovery_equilibrium_percent_low: plan.maxRecovery?.low,
    max_recovery_equilibrium_percent_high: plan.maxRecovery?.high,
    excess_solvent_percent: plan.maxRecovery === undefined ? undefined : excess,
    working_recovery_percent: plan.workingRecovery,
    solvent_mL_per_g: plan.solventMLPerG,
    solids_cold_percent: plan.solidsPercent,
    loss_to_liquor_percent: plan.lossPercent,
    saturation_temperature_K: plan.saturationK,
    cautions: cautions.join("; ") || undefined,
    note: NOTE,
    blank_reason: plan.blankReason || undefined,
  } as PlanningCoolingRow;
}

/** Rows of `planning-cooling.csv`: one per curve; a system without one gets a blank row with the reason. */
export function* coolingRows(edition: Edition): Generator<PlanningCoolingRow> {
  const excess = edition.settings.planning_excess_solvent_percent;
  for (const system of edition.systems) {
    const liquor = edition.liquors[system.index] as Liquor;
    const fit = edition.fits[system.index];
    if (!fit || fit.curves.length === 0) {
      const blank: CoolingPlan = { cautions: [], blankReason: fit?.noCurve ?? "no curve" };
      yield planRow(system, undefined, blank, excess, []);
    }
    for (const curve of fit?.curves ?? []) {
      yield planRow(
        system,
        curve,
        coolingPlan(curve, fit as SystemFit, system, liquor, excess),
        excess,
        liquor.hazards,
      );
    }
  }
}
