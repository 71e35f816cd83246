import { budgetOfRatio, budgetOfResult } from "../bases/budget.ts";
import { linkOf } from "../bases/link.ts";
import { standardFromRelative } from "../bases/unit.ts";
import type { MeasurementTable } from "../records/measurements.ts";
import type { Normalised } from "./edition.ts";
import { createRowBinder } from "./row-binder.ts";

/** One line of a row's uncertainty budget: what it comes from, and the relative standard uncertainty it brings, percent. */
export interface BudgetPart {
  readonly name: string;
  readonly percent: number;
}

/** Budget of a row; `slopePerK` is d ln x/dT of its system's curve at its temperature, NaN where it has none. */
export type RowBudgetOf = (row: number, slopePerK?: number) => readonly BudgetPart[];

/**
 * The uncertainty budget of single rows, computed from the table when asked for: what the reported value, each property
 * of the conversion and the temperature bring to the relative standard uncertainty of the fitted quantity (mole
 * fraction, mass ratio where no molar mass is known). Largest first; what brings nothing is left out.
 *
 * The root of the sum of squares of all parts but the temperature is the row's `relativeU`. A row without a number, or
 * whose conversion is not known any more, has no parts.
 */
export function createRowBudget(
  table: MeasurementTable,
  normalised: Pick<Normalised, "whoOfRow" | "modelOf">,
): RowBudgetOf {
  const { bind, whoOfRow, unitOf, basisOf, setConditions } = createRowBinder(table, normalised);

  return (row, slopePerK = Number.NaN) => {
    const value = table.reportedValue[row] as number;
    const context = Number.isNaN(value) ? undefined : bind(whoOfRow(row), unitOf(row), basisOf(row));
    const r = table.massRatio[row] as number;
    if (context === undefined || !(r > 0)) return [];
    const { unit, liquor, converter, soluteBasis } = context;
    setConditions(liquor, row, table.temperatureK[row] as number);
    liquor.takeNearby(converter.toHub(value));

    const x = table.moleFraction[row] as number;
    const toFitted = linkOf(Number.isNaN(x) ? "mass ratio" : "mole fraction");
    const own = Math.sqrt(Math.max(0, (table.relativeU[row] as number) ** 2 - (table.sharedU[row] as number) ** 2));
    const ofRatio = own * toFitted.valueElasticity(r, liquor.needs);
    // The row's own part is the reported value and, where there is one, the density measured on its solution.
    const measured = converter.ownUncertainty(r, 0);
    const ofQuantity = Math.sqrt(Math.max(0, ofRatio ** 2 - measured ** 2)) / Math.abs(converter.valueElasticity(r));
    const u = standardFromRelative(unit.scale, value, ofQuantity);
    const link = linkOf(unit.basis, soluteBasis);
    const all = budgetOfResult(budgetOfRatio(unit, value, u, link, r, liquor.needs), toFitted, r, liquor.needs);
    const parts = all.map(({ name, contribution }) => ({ name, percent: 100 * Math.abs(contribution) }));
    const temperature = 100 * Math.abs(slopePerK * (table.temperatureU[row] as number));
    return [...parts, { name: "temperature", percent: Number.isNaN(temperature) ? 0 : temperature }]
      .filter(({ percent }) => percent > 0)
      .sort((a, b) => b.percent - a.percent);
  };
}
