import type { SoluteBasis } from "../bases/hydrate.ts";
import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { Normalised } from "./edition.ts";
import type { LiquorModel } from "./liquor.ts";
import { bindUnit, readUnit, type UnitContext } from "./unit-context.ts";

/** What is needed to convert a row of the table again. */
export interface RowBinder {
  /** A unit bound to the liquor of an identity, kept once made; undefined where a property is missing. */
  readonly bind: (identity: number, unitText: string, basis: SoluteBasis) => UnitContext | undefined;
  readonly unitOf: (row: number) => string;
  readonly basisOf: (row: number) => SoluteBasis;
  /** Sets the densities of a liquor to the row's own conditions at a temperature, K. */
  readonly setConditions: (liquor: LiquorModel, row: number, temperatureK: number) => void;
}

/** Makes the binder of one table. */
export function createRowBinder(
  table: MeasurementTable,
  { whoOf, modelOf }: Pick<Normalised, "whoOf" | "modelOf">,
): RowBinder {
  const bound = new Map<string, UnitContext | undefined>();
  return {
    bind: (identity, unitText, basis) => {
      const key = `${identity}\u0000${unitText}\u0000${basis}`;
      if (bound.has(key)) return bound.get(key);
      const who = whoOf[identity];
      const unit = readUnit(unitText);
      const context = who === undefined || "code" in unit ? undefined : bindUnit(unit, basis, modelOf(who));
      const usable = context === undefined || "code" in context ? undefined : context;
      bound.set(key, usable);
      return usable;
    },
    unitOf: (row) => textOf(table, table.reportedUnit[row] as number),
    basisOf: (row) => textOf(table, table.soluteBasis[row] as number) as SoluteBasis,
    setConditions: (liquor, row, temperatureK) =>
      liquor.setConditions(temperatureK, table.volumeTemperatureK[row] as number, table.solutionDensity[row] as number),
  };
}
