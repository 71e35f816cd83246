import type { Flag, RobustFit } from "../records/fits.ts";
import { textOf } from "../records/measurements.ts";
import type { System } from "../records/systems.ts";
import { inCelsius } from "../records/temperature-text.ts";
import type { Suspects } from "./causes/cause.ts";
import { reconciling } from "./conflict-causes.ts";
import { SAME_TEMPERATURE_K } from "./same-temperature.ts";
import { type ScreenInput, sourceName, thresholdOf } from "./screen-input.ts";
import { fitSources, predict, type SystemModel } from "./system-model.ts";
import { counted, listed, offBy, threeDigits } from "./wording.ts";

/** Shared temperatures from which sources show that they read the same. */
const LEAST_SHARED = 3;

/** One flag for every system whose sources disagree without a majority: both readings laid out, nothing set aside. */
export function conflictFlags(
  input: ScreenInput,
  models: readonly [SystemModel, SystemModel],
  suspectsOf: (system: number, source: number, rows: readonly number[]) => Suspects,
): Flag[] {
  return input.fits.flatMap((fit) => {
    if (fit.agreement !== "conflict" || readsAlike(input, fit)) return [];
    return [
      {
        scope: "system",
        code: "sources-disagree",
        severity: "blocking",
        system: fit.system,
        evidence: [evidence(input, fit, models[0]), ...reconciling(input, models, fit, suspectsOf)].join("; "),
        lookAt:
          "Look at basis, solid form, solvent water and temperature of both sources, or measure one point by a third " +
          "way. The lower values could be those of a more stable form.",
      } as const,
    ];
  });
}

function evidence(input: ScreenInput, fit: RobustFit, model: SystemModel): string {
  const temperatureK = commonTemperature(fit);
  const { table } = input;
  const readings = fit.camps.map((camp) => {
    const members = new Set(camp);
    fitSources(model, fit, (source) => members.has(source));
    const means = camp.map((source) => predict(model, temperatureK, source).mean);
    const mean = means.reduce((sum, value) => sum + value, 0) / means.length;
    const rows = fit.points.row.filter((_, i) => members.has(fit.points.source[i]!));
    const methods = new Set(Array.from(rows, (row) => textOf(table, table.method[row]!)).filter((name) => name !== ""));
    const how = [counted(rows.length, "point"), ...[...methods].sort()].join(", ");
    return { names: listed(camp.map((source) => sourceName(input, source))), how, row: rows[0]!, mean };
  });
  const first = readings[0]!;
  const told = readings.map(({ names, how, row, mean }, c) => {
    const value = input.inReportedUnit(row, mean);
    const unit = textOf(table, table.reportedUnit[row]!);
    const common = commonBases(input.systems[fit.system], mean, unit);
    const reads = value === undefined ? common : `${threeDigits(value)} ${unit} (${common})`;
    const apart = c === 0 ? "" : `, ${offBy(mean - first.mean)} the first`;
    return `${names} (${how}) reads ${reads}${apart}`;
  });
  return `no majority among the sources: at ${inCelsius(temperatureK)} ${told.join("; ")}`;
}

/**
 * Whether the camps read the same at all temperatures they share, three at least: then it is the curve that cannot follow
 * them, and they have no quarrel.
 */
function readsAlike(input: ScreenInput, { system, points, camps }: RobustFit): boolean {
  const campOf = new Map(camps.flatMap((camp, c) => camp.map((source) => [source, c] as const)));
  let shared = 0;
  for (let i = 0; i < points.n; i++) {
    for (let j = i + 1; j < points.n; j++) {
      if (campOf.get(points.source[i]!) === campOf.get(points.source[j]!)) continue;
      if (!(Math.abs(points.temperatureK[i]! - points.temperatureK[j]!) < SAME_TEMPERATURE_K)) continue;
      if (!(Math.abs(points.lnValue[i]! - points.lnValue[j]!) < thresholdOf(input, system, i))) return false;
      shared++;
    }
  }
  return shared >= LEAST_SHARED;
}

/** The same on the common bases, mole fraction and g/100 g solvent, without the one it is told in already. */
function commonBases(system: System | undefined, lnValue: number, unit: string): string {
  const value = Math.exp(lnValue);
  if (system === undefined || system.fitBasis === "ln r") return `${threeDigits(100 * value)} g/100 g solvent`;
  const { soluteMolarMass, solventMolarMass } = system.identity;
  const percent = (100 * value * soluteMolarMass) / ((1 - value) * solventMolarMass);
  const told = [
    ...(unit === "mole fraction" ? [] : [`x = ${threeDigits(value)}`]),
    ...(unit === "g/100 g solvent" ? [] : [`${threeDigits(percent)} g/100 g solvent`]),
  ];
  return told.join(", ");
}

/** Middle of the range that the first two camps share, or between their ranges, K. */
function commonTemperature(fit: RobustFit): number {
  const ranges = fit.camps.slice(0, 2).map((camp) => {
    const inside = fit.points.temperatureK.filter((_, i) => camp.includes(fit.points.source[i]!));
    return [inside.reduce((a, b) => Math.min(a, b)), inside.reduce((a, b) => Math.max(a, b))] as const;
  });
  const low = Math.max(...ranges.map((range) => range[0]));
  const high = Math.min(...ranges.map((range) => range[1]));
  return (low + high) / 2;
}
