import { writtenValues } from "../../pipeline/fit/repeats/written-values.ts";
import { robustFits } from "../../pipeline/fit/robust/robust-fit.ts";
import type { Flag } from "../../pipeline/records/fits.ts";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import { codeOf, createMeasurementTable } from "../../pipeline/records/measurements.ts";
import type { Change, RereadRow } from "../../pipeline/records/reread.ts";
import { type System, systemPoints } from "../../pipeline/records/systems.ts";
import { materialThreshold } from "../../pipeline/screen/material-threshold.ts";
import { screen } from "../../pipeline/screen/screen.ts";
import type { ScreenedSystem, ScreenInput } from "../../pipeline/screen/screen-input.ts";

/** One reading of an invented solute: temperature in °C, mole fraction, as the source wrote them. */
export type Reading = readonly [celsius: number, moleFraction: number];

/** Readings of one system by source name. */
export type Sources = Readonly<Record<string, readonly Reading[]>>;

/** Molar masses of the invented solute and its solvent, g/mol: a ratio of 3 makes mole and mass fraction differ. */
const [SOLUTE, SOLVENT] = [150, 50];

/** ln x = -4 at 25 °C with a dissolution enthalpy of 22 kJ/mol, as 1000 x in four digits. */
export function thousandX(celsius: number): number {
  const x = Math.exp(-4 + 0.03 * 298.15 * (1 - 298.15 / (celsius + 273.15)));
  return Number((1000 * x).toPrecision(4));
}

/** Readings that follow the curve, each off by a fixed small scatter and by the factor that `change` gives. */
export function series(
  celsius: readonly number[],
  change: (value: number, i: number) => number = (value) => value,
): Reading[] {
  const scatter = [1.01, 0.99, 1.004, 1.012, 0.991, 0.996, 1.008, 0.989];
  return celsius.map((t, i) => [t, change(Number((thousandX(t) * scatter[i % 8]!).toPrecision(4)), i)]);
}

/** What else may be said of every invented system. */
export interface More extends Partial<ScreenedSystem> {
  readonly method?: string;
  /** Systems are mixtures of the same two solvents, of composition `1`, `2` ... */
  readonly mixtures?: boolean;
  /** Solute of each system; one and the same where absent. */
  readonly solutes?: readonly string[];
  /** Solvent of each system; `solvent 1`, `solvent 2` ... where absent. */
  readonly solvents?: readonly string[];
}

/** Screens systems of one invented solute, one solvent each (`solvent 1`, `solvent 2` ...), reported as 1000 x. */
export function screened(systems: readonly Sources[], about: More = {}): Flag[] {
  return screen(inputOf(systems, about));
}

/** What screening is given for such systems. */
export function inputOf(systems: readonly Sources[], about: More = {}): ScreenInput {
  const sourceNames = [...new Set(systems.flatMap((system) => Object.keys(system)))].sort();
  const table = createMeasurementTable(1000);
  const unit = codeOf(table.texts, "1000 x");
  const made = systems.map((sources, index): System => {
    const rows: number[] = [];
    for (const name of Object.keys(sources).sort()) {
      for (const [celsius, value] of sources[name]!) {
        const row = table.count++;
        rows.push(row);
        table.source[row] = sourceNames.indexOf(name);
        table.line[row] = row + 2;
        table.temperatureK[row] = celsius + 273.15;
        table.temperatureU[row] = 0.1;
        table.reportedValue[row] = value;
        table.reportedUnit[row] = unit;
        table.method[row] = codeOf(table.texts, about.method ?? "");
        table.moleFraction[row] = value / 1000;
        table.massRatio[row] = massRatio(value / 1000);
        table.massConcentration[row] = 1000 * massRatio(value / 1000);
        table.relativeU[row] = 0.015;
      }
    }
    const identity = {
      solute: about.solutes?.[index] ?? "invented",
      solidForm: "unspecified",
      solvent: about.mixtures === true ? "solvent 1 + solvent 2" : (about.solvents?.[index] ?? `solvent ${index + 1}`),
    };
    return {
      ...{ index, id: `system-${index + 1}`, key: `${index}`, family: `${index}`, fitBasis: "ln x" },
      rows: Int32Array.from(rows),
      identity: {
        ...identity,
        ...{
          composition: about.mixtures === true ? `${index + 1}` : "",
          medium: "",
          solventComponents: [{ name: identity.solvent, massFraction: 1 }],
          soluteMolarMass: SOLUTE,
          solventMolarMass: SOLVENT,
          aqueousSalt: false,
        },
      },
    };
  });
  const points = made.map((system) => systemPoints(table, system));
  const { fits, scales } = robustFits(
    points,
    made.map(() => ({ aqueousSalt: false })),
    sourceNames.length,
    {
      written: writtenValues(table, made, points),
      threshold: (system, point) =>
        materialThreshold(points[system]!.level[point]!, points[system]!.lnU[point]!, "general", DEFAULT_SETTINGS),
    },
  );
  const reread = (row: number, change: Change): RereadRow | undefined => {
    const value = table.reportedValue[row]!;
    const celsius = table.temperatureK[row]! - 273.15;
    const at = (x: number, temperatureK = table.temperatureK[row]!) =>
      x > 0 && x < 1 ? { lnValue: Math.log(x), temperatureK, reportedValue: 1000 * x } : undefined;
    if (change.kind === "factor") return at((value * change.factor) / 1000);
    if (change.kind === "value") return at(change.value / 1000);
    if (change.kind === "temperature") return at(value / 1000, change.temperatureK);
    if (change.kind === "solvent") return at(value / 1000);
    if (change.kind === "unit" && change.unit === "g/kg solution") {
      const r = value / (1000 - value);
      return at((r * SOLVENT) / (SOLUTE + r * SOLVENT));
    }
    if (change.kind === "temperature scale" && change.scale === "°F")
      return at(value / 1000, ((celsius + 459.67) * 5) / 9);
    return undefined;
  };
  return {
    curves: [],
    ...{ table, systems: made, fits, scales, sourceNames, reread, settings: DEFAULT_SETTINGS },
    inReportedUnit: (_, lnValue) => 1000 * Math.exp(lnValue),
    about: made.map(
      () => ({ kind: "general", boilingPointK: Number.NaN, freezingPointK: Number.NaN, ...about }) as const,
    ),
  };
}

function massRatio(x: number): number {
  return (x * SOLUTE) / ((1 - x) * SOLVENT);
}
