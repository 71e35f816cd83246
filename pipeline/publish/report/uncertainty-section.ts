import type { Edition } from "../../records/edition.ts";
import { median, significant, sourceLetter } from "./figures.ts";
import { type Html, html } from "./html.ts";
import { wideTable } from "./page.ts";
import type { SystemView } from "./system-view.ts";

/** Step of the central difference that gives the slope of a curve, K. */
const STEP_K = 0.05;

/** Standard uncertainty of one measurement, percent of its value; NaN where unknown. */
export interface RowBudget {
  /** Of the value itself, as reported or by default, conversion to the fitted quantity included. */
  readonly value: number;
  /** The part of it that the rows of a source share, so that it does not average out. */
  readonly shared: number;
  /** Of the temperature, K, and what it does to the value through the slope of the curve, percent. */
  readonly temperatureK: number;
  readonly temperature: number;
  /** Both together: their root sum of squares. */
  readonly both: number;
  /** What contributes how much, percent, largest first. */
  readonly parts: ReturnType<Edition["budgetOf"]>;
}

/** |d ln value/dT| of the system's curve at a temperature, 1/K; NaN outside the range of its curves. */
function slopeAt({ fit }: SystemView, temperatureK: number): number {
  const curve = fit?.curves.find(
    ({ temperatureRangeK: [low, high] }) => temperatureK >= low && temperatureK <= high && high - low > 4 * STEP_K,
  );
  if (curve === undefined) return Number.NaN;
  const [low, high] = curve.temperatureRangeK;
  const [from, to] = [Math.max(low, temperatureK - STEP_K), Math.min(high, temperatureK + STEP_K)];
  return Math.abs((curve.evaluate(to) - curve.evaluate(from)) / (to - from));
}

/** Uncertainty budget of every measurement of a system, in the order of its points. */
export function rowBudgets(view: SystemView): RowBudget[] {
  const { table } = view.edition;
  return view.points.map(({ row, temperatureK }) => {
    const value = 100 * (table.relativeU[row] as number);
    const uT = table.temperatureU[row] as number;
    const slope = slopeAt(view, temperatureK);
    const temperature = 100 * slope * uT;
    const both = Number.isNaN(temperature) ? Number.NaN : Math.hypot(value, temperature);
    return {
      value,
      shared: 100 * (table.sharedU[row] as number),
      temperatureK: uT,
      temperature,
      both,
      parts: view.edition.budgetOf(row, slope),
    };
  });
}

/** Where the uncertainty comes from, source by source: stated parts beside the scatter that was seen. */
export function uncertaintySection(view: SystemView, budgets: readonly RowBudget[]): Html {
  const { edition, points, fit } = view;
  const percent = (values: readonly number[]) =>
    significant(median(values.filter((value) => Number.isFinite(value))), 2);
  const rows = view.sources.map((source, i) => {
    const own = budgets.filter((_, k) => points[k]?.source === i);
    return html`<tr><th scope="row"><b>${sourceLetter(i)}</b> ${edition.sources[source]?.name ?? ""}</th><td class="n">${percent(own.map(({ value }) => value))}</td><td class="n">${percent(own.map(({ shared }) => shared))}</td><td class="n">${significant(median(own.map(({ temperatureK }) => temperatureK)), 2)}</td><td class="n">${percent(own.map(({ temperature }) => temperature))}</td><td class="n">${percent(own.map(({ both }) => both))}</td><td class="n">${significant(100 * (edition.scales.within[source] as number), 2)}</td></tr>`;
  });
  const between = fit?.curves[0]?.betweenSd ?? fit?.robust.betweenSd;
  return html`<h2 id="uncertainty">Uncertainty budget</h2>
${wideTable("Uncertainty budget by source", html`<table><caption>Standard uncertainties in percent of the value: medians over the measurements of each source, beside the scatter seen</caption><thead><tr><th scope="col">Source</th><th scope="col" class="n">Value, %</th><th scope="col" class="n">Shared by its rows, %</th><th scope="col" class="n">Temperature, K</th><th scope="col" class="n">Temperature, as %</th><th scope="col" class="n">Both, %</th><th scope="col" class="n">Scatter seen in all its systems, %</th></tr></thead><tbody>${rows}</tbody></table>`)}
<p>Between sources: ${between === undefined ? "unknown" : `${significant(100 * between, 2)} %`} (SD). It is part of both kinds of 95 % limits, also where one source alone measured the system.</p>`;
}
