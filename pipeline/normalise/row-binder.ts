import type { SoluteBasis } from "../bases/hydrate.ts";
import type { Identified } from "../records/identified.ts";
import { type MeasurementTable, textOf } from "../records/measurements.ts";
import type { Normalised } from "./edition.ts";
import type { LiquorModel } from "./liquor.ts";
import { bindUnit, readUnit, type UnitContext } from "./unit-context.ts";

/** What is needed to convert a row of the table again. */
export interface RowBinder {
  /** A unit bound to the liquor of a reading, kept once made; undefined where a property is missing. */
  readonly bind: (who: Identified | undefined, unitText: string, basis: SoluteBasis) => UnitContext | undefined;
  /** The identified reading of a row, with its exact composition. */
  readonly whoOfRow: (row: number) => Identified | undefined;
  readonly unitOf: (row: number) => string;
  readonly basisOf: (row: number) => SoluteBasis;
  /** Sets the densities of a liquor to the row's own conditions at a temperature, K. */
  readonly setConditions: (liquor: LiquorModel, row: number, temperatureK: number) => void;
}

/** Makes the binder of one table. */
export function createRowBinder(
  table: MeasurementTable,
  { whoOfRow, modelOf }: Pick<Normalised, "whoOfRow" | "modelOf">,
): RowBinder {
  const bound = new Map<LiquorModel, Map<string, UnitContext | undefined>>();
  return {
    bind: (who, unitText, basis) => {
      if (who === undefined) return undefined;
      const liquor = modelOf(who);
      const ofLiquor = bound.get(liquor) ?? new Map<string, UnitContext | undefined>();
      bound.set(liquor, ofLiquor);
      const key = `${unitText}\u0000${basis}`;
      if (ofLiquor.has(key)) return ofLiquor.get(key);
      const unit = readUnit(unitText);
      const context = "code" in unit ? undefined : bindUnit(unit, basis, liquor);
      const usable = context === undefined || "code" in context ? undefined : context;
      ofLiquor.set(key, usable);
      return usable;
    },
    whoOfRow: (row) => whoOfRow(table, row),
    unitOf: (row) => textOf(table, table.reportedUnit[row] as number),
    basisOf: (row) => textOf(table, table.soluteBasis[row] as number) as SoluteBasis,
    setConditions: (liquor, row, temperatureK) =>
      liquor.setConditions(temperatureK, table.volumeTemperatureK[row] as number, table.solutionDensity[row] as number),
  };
}
