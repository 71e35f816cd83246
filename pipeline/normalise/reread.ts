import { moleFractionAt } from "../bases/hub-values.ts";
import { parseTemperatureUnit } from "../bases/temperature.ts";
import type { Unit } from "../bases/unit.ts";
import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { Change, RereadRow } from "../records/reread.ts";
import type { Identity, System } from "../records/systems.ts";
import type { Normalised } from "./edition.ts";
import type { LiquorModel } from "./liquor.ts";
import { createRowBinder } from "./row-binder.ts";
import type { UnitContext } from "./unit-context.ts";

/** Rows read again under other readings of their unit, temperature or basis; nothing in the table changes. */
export interface Rereader {
  /**
   * The row under a change; undefined where the change is impossible, needs a property that is not known, or is no
   * change at all.
   */
  readonly reread: (row: number, change: Change) => RereadRow | undefined;
  /** Number in the row's reported unit of a value ln x (ln r), at the row's own conditions; undefined where it has none. */
  readonly inReportedUnit: (row: number, lnValue: number) => number | undefined;
}

/** r [g/g] of ln x or ln r; the molar mass of a mixed solvent is that of the row's exact composition. */
function massRatioOf(lnValue: number, { soluteMolarMass }: Identity, { needs }: LiquorModel): number {
  const value = Math.exp(lnValue);
  const solventMolarMass = needs.solventMolarMass?.value ?? Number.NaN;
  return Number.isNaN(soluteMolarMass) ? value : (value * soluteMolarMass) / ((1 - value) * solventMolarMass);
}

/** Makes a rereader for the rows of one table. Units bound once are kept per identity. */
export function createRereader(
  table: MeasurementTable,
  identities: readonly Identity[],
  systems: readonly System[],
  normalised: Pick<Normalised, "whoOf" | "whoOfRow" | "modelOf">,
): Rereader {
  const position = new Map(identities.map((identity, i) => [identity, i]));
  const { bind, whoOfRow, unitOf, basisOf, setConditions } = createRowBinder(table, normalised);
  const isLog = (unit: Unit) => unit.scale.kind === "ln" || unit.scale.kind === "log10";

  /** Reported number times a factor, in a unit that may be a logarithm. */
  const scaled = (value: number, factor: number, unit: Unit): number => {
    if (!isLog(unit)) return unit.scale.kind === "reciprocal" ? value / factor : value * factor;
    return value + unit.scale.sign * (unit.scale.kind === "ln" ? Math.log(factor) : Math.log10(factor));
  };

  const inReportedUnit = (row: number, lnValue: number): number | undefined => {
    const identity = table.identity[row] as number;
    const context = bind(whoOfRow(row), unitOf(row), basisOf(row));
    if (context === undefined) return undefined;
    setConditions(context.liquor, row, table.temperatureK[row] as number);
    const r = massRatioOf(lnValue, identities[identity] as Identity, context.liquor);
    context.liquor.takeNearby(r);
    const value = context.converter.fromHub(r);
    return Number.isFinite(value) ? value : undefined;
  };

  /** ln x or ln r of a number read in a context at a temperature; undefined where it is impossible. */
  const readAgain = (row: number, identity: number, context: UnitContext, value: number, temperatureK: number) => {
    if (!(temperatureK > 0)) return undefined;
    setConditions(context.liquor, row, temperatureK);
    const first = context.converter.toHub(value);
    const r = context.liquor.takeNearby(first) ? context.converter.toHub(value) : first;
    const x = moleFractionAt(r, context.liquor.needs);
    const lnValue = Math.log(Number.isNaN((identities[identity] as Identity).soluteMolarMass) ? r : x);
    if (!Number.isFinite(lnValue)) return undefined;
    const reportedValue = inReportedUnit(row, lnValue);
    return reportedValue === undefined ? undefined : { lnValue, temperatureK, reportedValue };
  };

  const reread = (row: number, change: Change): RereadRow | undefined => {
    const identity = table.identity[row] as number;
    const value = table.reportedValue[row] as number;
    const temperatureK = table.temperatureK[row] as number;
    const who = whoOfRow(row);
    const own = bind(who, unitOf(row), basisOf(row));
    if (own === undefined || Number.isNaN(value)) return undefined;
    switch (change.kind) {
      case "factor":
        return readAgain(row, identity, own, scaled(value, change.factor, own.unit), temperatureK);
      case "value":
        return readAgain(row, identity, own, change.value, temperatureK);
      case "temperature":
        return readAgain(row, identity, own, value, change.temperatureK);
      case "temperature scale":
        return temperatureScale(row, identity, own, value, change.scale);
      case "unit": {
        const other = bind(who, change.unit, basisOf(row));
        if (other === undefined || other.unit.canonical === own.unit.canonical) return undefined;
        return readAgain(row, identity, other, value, temperatureK);
      }
      case "solute basis": {
        const other = change.basis === own.soluteBasis ? undefined : bind(who, unitOf(row), change.basis);
        return other && readAgain(row, identity, other, value, temperatureK);
      }
      case "solvent": {
        const elsewhere = position.get(systems[change.system]?.identity as Identity) as number;
        const other = elsewhere === identity ? undefined : bind(normalised.whoOf[elsewhere], unitOf(row), basisOf(row));
        return other && readAgain(row, elsewhere, other, value, temperatureK);
      }
    }
  };

  /** The number behind the row's temperature, read on another scale. */
  function temperatureScale(row: number, identity: number, own: UnitContext, value: number, scale: string) {
    const reported = parseTemperatureUnit(textOf(table, table.temperatureUnit[row] as number));
    const other = parseTemperatureUnit(scale);
    if (reported === undefined || other === undefined || reported.canonical === other.canonical) return undefined;
    const number = reported.fromKelvin(table.temperatureK[row] as number);
    return readAgain(row, identity, own, value, other.toKelvin(number));
  }

  return { reread, inReportedUnit };
}
