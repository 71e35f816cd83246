import type { Settings } from "../records/settings.ts";

/** The settings that say how much of a deviation is worth a person's time. */
export type ThresholdSettings = Pick<
  Settings,
  "material_threshold_percent" | "material_threshold_uncertainties" | "single_temperature_threshold_log10"
>;

/** What kind of system a threshold is for. */
export type ThresholdKind = "general" | "aqueous salt" | "one-temperature compilation";

/**
 * Material threshold of a deviation, ln value: the largest of
 *
 * - the stated number of standard uncertainties (default 3) of the value,
 * - ln(1 + p/100) with p by level: 10 % from 10 mg/mL up, 15 % from 1, 25 % from 0.1, 60 % below; 5 % for salts in
 *   water at any level,
 * - for compilations of many solutes near one temperature, 0.5 log10 unit.
 *
 * Common practice; every number is a setting.
 *
 * @param level mass concentration, mg per mL of solution (or 1000 r)
 * @param lnU standard uncertainty of ln value
 */
export function materialThreshold(
  level: number,
  lnU: number,
  kind: ThresholdKind,
  settings: ThresholdSettings,
): number {
  const ofUncertainty = lnU > 0 && lnU < 1e3 ? settings.material_threshold_uncertainties * lnU : 0;
  if (kind === "one-temperature compilation")
    return Math.max(ofUncertainty, settings.single_temperature_threshold_log10 * Math.LN10);
  return Math.max(ofUncertainty, Math.log1p(percentAt(level, kind, settings.material_threshold_percent) / 100));
}

function percentAt(
  level: number,
  kind: ThresholdKind,
  percent: ThresholdSettings["material_threshold_percent"],
): number {
  if (kind === "aqueous salt") return percent.aqueous_salts;
  if (level >= 10) return percent.from_10_mg_per_mL;
  if (level >= 1) return percent.from_1_mg_per_mL;
  return level >= 0.1 ? percent.from_0_1_mg_per_mL : percent.below_0_1_mg_per_mL;
}
