import { fitMixtures } from "../../pipeline/fit/mixtures/mixture-fit.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import type { PooledScales, RobustFit } from "../../pipeline/records/fits.ts";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import { createMeasurementTable, type MeasurementTable } from "../../pipeline/records/measurements.ts";
import type { MixtureModel, Mixtures } from "../../pipeline/records/mixtures.ts";
import { type System, systemPoints } from "../../pipeline/records/systems.ts";
import { materialThreshold } from "../../pipeline/screen/material-threshold.ts";

/** A reading of an invented solute in `first + second`: mass fraction of the first solvent, T in K, ln x, source. */
export interface MixtureReading {
  readonly fraction: number;
  readonly temperatureK: number;
  readonly lnValue: number;
  readonly source?: number;
}

/** Readings of a mixture as a table with one system a composition, robust fits and pooled scales. */
export interface MixtureWorld {
  readonly table: MeasurementTable;
  readonly systems: readonly System[];
  readonly robust: readonly RobustFit[];
  readonly scales: PooledScales;
}

/** Molar mass of the invented solute, g/mol, and of its solvent. */
const [SOLUTE, SOLVENT] = [150, 40];

/** Composition key of a mass fraction, steps of 0.005. */
const keyOf = (fraction: number) => Math.round(200 * fraction) / 200;

/** Builds table, systems and screening fits from readings; systems ascend by composition. */
export function mixtureWorld(
  readings: readonly MixtureReading[],
  about: Partial<System["identity"]> = {},
): MixtureWorld {
  const sourceCount = 1 + readings.reduce((most, { source = 0 }) => Math.max(most, source), 0);
  const sorted = readings.map((reading) => ({ source: 0, ...reading })).sort((a, b) => a.source - b.source);
  const table = createMeasurementTable(Math.max(1, sorted.length));
  const rowsOf = new Map<number, number[]>();
  for (const { fraction, temperatureK, lnValue, source } of sorted) {
    const row = table.count++;
    const x = Math.exp(lnValue);
    const key = keyOf(fraction);
    rowsOf.set(key, [...(rowsOf.get(key) ?? []), row]);
    table.source[row] = source;
    table.line[row] = row + 2;
    table.temperatureK[row] = temperatureK;
    table.temperatureU[row] = 0.1;
    table.moleFraction[row] = x;
    table.massRatio[row] = (x * SOLUTE) / ((1 - x) * SOLVENT);
    table.massConcentration[row] = 50;
    table.relativeU[row] = 0.015;
    if (fraction > 0 && fraction < 1) {
      table.firstFraction[row] = fraction;
      table.secondFraction[row] = 1 - fraction;
      table.fractionU[row] = 0.002;
    }
  }
  const systems = [...rowsOf].sort(([a], [b]) => a - b).map(([key, rows], index) => systemOf(key, rows, index, about));
  const points = systems.map((system) => systemPoints(table, system));
  const { fits, scales } = robustFits(
    points,
    systems.map(() => ({ aqueousSalt: false })),
    sourceCount,
    {
      threshold: (s, i) => materialThreshold(points[s]!.level[i]!, points[s]!.lnU[i]!, "general", DEFAULT_SETTINGS),
    },
  );
  return { table, systems, robust: fits, scales };
}

function systemOf(key: number, rows: readonly number[], index: number, about: Partial<System["identity"]>): System {
  const both = [
    { name: "first", massFraction: key },
    { name: "second", massFraction: 1 - key },
  ];
  const components = both
    .filter(({ massFraction }) => massFraction > 0)
    .map((one, _, { length }) => (length === 1 ? { ...one, massFraction: 1 } : one));
  const percent = (fraction: number) => String(Number((100 * fraction).toFixed(1)));
  const mixed = components.length === 2;
  return {
    ...{ index, id: `system-${index}`, key: `${index}`, family: `${index}`, fitBasis: "ln x" },
    rows: Int32Array.from(rows),
    identity: {
      ...{ solute: "invented", solidForm: "unspecified", medium: "", aqueousSalt: false },
      solvent: components.map(({ name }) => name).join(" + "),
      composition: mixed ? `${components.map(({ massFraction }) => percent(massFraction)).join(":")} w/w` : "",
      solventComponents: components,
      ...{ soluteMolarMass: SOLUTE, solventMolarMass: SOLVENT },
      ...about,
    },
  };
}

/** The fits of all mixtures of a world. */
export function fitsOf({ table, systems, robust, scales }: MixtureWorld): Mixtures {
  return fitMixtures(table, systems, robust, scales);
}

/** The single model of a world. @throws Error with the reason where there is none. */
export function modelOf(world: MixtureWorld): MixtureModel {
  const { models, without } = fitsOf(world);
  const [model] = models;
  if (model === undefined) throw new Error(`no model: ${without[0]?.reason ?? "no mixture"}`);
  return model;
}

/** Every composition at every temperature, values by `truth`, each moved by `scatter(i)` in ln x. */
export function readingsOn(
  fractions: readonly number[],
  temperaturesK: readonly number[],
  truth: (fraction: number, temperatureK: number) => number,
  scatter: (i: number) => number = () => 0,
): MixtureReading[] {
  return fractions.flatMap((fraction, k) =>
    temperaturesK.map((temperatureK, j) => ({
      ...{ fraction, temperatureK },
      lnValue: truth(fraction, temperatureK) + scatter(k * temperaturesK.length + j),
    })),
  );
}

/** Jouyban-Acree-van 't Hoff in its textbook form, written out again: A1, B1, A2, B2, J0, J1, J2. */
export function textbook([A1 = 0, B1 = 0, A2 = 0, B2 = 0, J0 = 0, J1 = 0, J2 = 0]: readonly number[]) {
  return (w: number, T: number): number => {
    const d = w - (1 - w);
    return w * (A1 + B1 / T) + (1 - w) * (A2 + B2 / T) + ((w * (1 - w)) / T) * (J0 + J1 * d + J2 * d * d);
  };
}
