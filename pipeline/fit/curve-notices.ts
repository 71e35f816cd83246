import { fewestTemperatures, largestUsualC, smallestSpanK } from "../curves/modified-apelblat.ts";
import { inCelsius } from "../records/temperature-text.ts";
import type { Candidate } from "./candidate.ts";
import type { FittedModels } from "./system-models.ts";

/**
 * What a reader of a curve should know: how few points bear it, why no richer model was tried, an unusual heat
 * capacity, and which between-source scatter stands behind the limits. One sentence each, with its figures.
 */
export function curveNotices(fitted: FittedModels, chosen: Candidate): string[] {
  return [
    ...aboutPoints(fitted, chosen),
    ...aboutRicherModels(fitted),
    ...aboutHeatCapacity(chosen),
    ...aboutBreak(fitted),
    ...aboutSources(fitted),
  ];
}

function aboutPoints({ points, scale }: FittedModels, { parameterCount }: Candidate): string[] {
  const notices: string[] = [];
  const { n, unusable, distinctTemperatures } = points;
  if (unusable > 0)
    notices.push(`${unusable} of ${n + unusable} points left out: no finite temperature, value or uncertainty`);
  if (n === 1) return [...notices, "a single measurement: its limits rest on the scatter usual in its source"];
  if (distinctTemperatures === 2)
    notices.push("two temperatures only: the straight line between them cannot be checked");
  const withstood = Math.max(0, Math.floor((n - parameterCount) / 2));
  if (withstood <= 1)
    notices.push(
      `${n} points and ${parameterCount} coefficient${parameterCount === 1 ? "" : "s"} withstand ${withstood === 0 ? "no" : "one"} bad point`,
    );
  if (scale.own.degreesOfFreedom === 0)
    notices.push("no degree of freedom within sources: the limits rest on the scatter usual in these sources");
  return notices;
}

function aboutRicherModels({ points }: FittedModels): string[] {
  const { distinctTemperatures, lowK, highK } = points;
  if (distinctTemperatures < 2) return [];
  const span = highK - lowK;
  if (distinctTemperatures >= fewestTemperatures && span >= smallestSpanK) return [];
  return [
    `no three-coefficient model tried: ${distinctTemperatures} temperatures over ${span.toFixed(1)} K (needs ${fewestTemperatures} over ${smallestSpanK} K)`,
  ];
}

function aboutHeatCapacity(chosen: Candidate): string[] {
  if (chosen.model !== "modified Apelblat") return [];
  const C = chosen.published().values[2]!;
  if (Math.abs(C) <= largestUsualC) return [];
  return [
    `|C| = ${Math.abs(C).toFixed(1)} is above ${largestUsualC}: a bad point or two solid phases bend a curve like this`,
  ];
}

function aboutBreak({ points, breakTemperatureK }: FittedModels): string[] {
  if (!(breakTemperatureK > points.lowK && breakTemperatureK < points.highK)) return [];
  return [
    `the points seem to break at ${inCelsius(breakTemperatureK)}, as where the solid changes: one smooth curve spans both sides`,
  ];
}

function aboutSources({ points, scale, betweenDegreesOfFreedom }: FittedModels): string[] {
  const sd = `${(100 * Math.sqrt(scale.betweenVariance)).toFixed(2)} %`;
  if (scale.widened)
    return [`the ${points.sources.length} sources lie further apart than usual: between-source SD raised to ${sd}`];
  const origin =
    betweenDegreesOfFreedom > 0
      ? `pooled, ${betweenDegreesOfFreedom.toFixed(0)} degrees of freedom`
      : "default setting";
  return points.sources.length > 1 ? [] : [`one source: the limits contain a between-source SD of ${sd} (${origin})`];
}
