import { cellGetter } from "../records/cells.ts";
import type { Identified, IdentifiedSource } from "../records/identified.ts";
import { createMeasurementTable } from "../records/measurements.ts";
import type { Liquors } from "./liquors.ts";
import { type NormaliseContext, normaliseSource } from "./source.ts";

/** The readings of a source that state a density of their solution. */
function withDensity(source: IdentifiedSource): IdentifiedSource | undefined {
  const { places } = source.source;
  const anywhere = places.solution_density !== undefined;
  if (!anywhere && !source.readings.some(({ own }) => own?.solution_density !== undefined)) return undefined;
  const density = cellGetter(places, "solution_density");
  const kept = source.readings.flatMap((reading, i) => (density(reading) === "" ? [] : [i]));
  return {
    ...source,
    readings: kept.map((i) => source.readings[i] as IdentifiedSource["readings"][number]),
    who: kept.map((i) => source.who[i] as Identified),
  };
}

/**
 * Gathers the densities measured on solutions of each system, over all sources, so that rows without one can take it
 * from a solution nearby. Rows that cannot be normalised give none; they are refused where they are read for good.
 */
export function collectMeasuredDensities(
  source: IdentifiedSource,
  context: NormaliseContext,
  whoOfRow: Liquors["whoOfRow"],
): void {
  const measured = withDensity(source);
  if (measured === undefined) return;
  const scratch = createMeasurementTable(measured.readings.length);
  normaliseSource(measured, 0, scratch, context);
  for (let row = 0; row < scratch.count; row++) {
    const massRatio = scratch.massRatio[row] as number;
    const density = scratch.solutionDensity[row] as number;
    const volumeK = scratch.volumeTemperatureK[row] as number;
    const temperatureK = Number.isNaN(volumeK) ? (scratch.temperatureK[row] as number) : volumeK;
    if (massRatio > 0 && density > 0) {
      const who = whoOfRow(scratch, row);
      if (who !== undefined) context.liquorOf(who).measured.push({ temperatureK, massRatio, density });
    }
  }
}
