import type { Curve, CurveModel, Transition } from "../../records/fits.ts";
import type { GridRow } from "../../records/generated/grid.ts";
import { celsius, fixed, plainNumber, significant } from "./figures.ts";
import { type Html, html, raw, short } from "./html.ts";
import { wideTable } from "./page.ts";
import type { SystemView } from "./system-view.ts";

/** Equations of the models; Y stands for the fitted quantity. */
const EQUATIONS: Readonly<Record<CurveModel, string>> = {
  "van 't Hoff": "ln Y = <var>A</var> + <var>B</var>/<var>T</var>",
  "modified Apelblat": "ln Y = <var>A</var> + <var>B</var>/<var>T</var> + <var>C</var> ln <var>T</var>",
  "quadratic in 1/T": "ln Y = <var>A</var> + <var>B</var>/<var>T</var> + <var>C</var>/<var>T</var><sup>2</sup>",
  "Buchowski-Ksiazczak lambda-h":
    "ln[1 + &lambda;(1 &minus; Y)/Y] = &lambda;<var>h</var>(1/<var>T</var> &minus; 1/<var>T</var><sub>m</sub>)",
  constant: "ln Y = <var>A</var>",
};

/** Digits of a coefficient: enough to give x back to 0.1 % although B/T and C ln T nearly cancel. */
const DIGITS = 9;

/** The equation of a model as it is printed, for x or r. */
export function equationHtml(model: CurveModel, letter: string): Html {
  return raw(EQUATIONS[model].replaceAll("Y", `<var>${letter}</var>`));
}

/** The curve as a formula for a spreadsheet, temperature `t` in °C, with its coefficients as numbers. */
export function spreadsheetFormula({ model, coefficients }: Curve): string {
  const [a = "", b = "", c = ""] = coefficients.map(({ value }) => `(${plainNumber(value, DIGITS)})`);
  const T = "(t+273.15)";
  switch (model) {
    case "van 't Hoff":
      return `=EXP(${a}+${b}/${T})`;
    case "modified Apelblat":
      return `=EXP(${a}+${b}/${T}+${c}*LN(${T}))`;
    case "quadratic in 1/T":
      return `=EXP(${a}+${b}/${T}+${c}/${T}^2)`;
    case "Buchowski-Ksiazczak lambda-h":
      return `=${a}/(${a}-1+EXP(${a}*${b}*(1/${T}-1/${c})))`;
    case "constant":
      return `=EXP(${a})`;
  }
}

function coefficientTable({ coefficients, fitBasis, model }: Curve): Html {
  const unit = (name: string) =>
    name === "B" || name === "h" || name === "Tm" ? "K" : name === "C" && model === "quadratic in 1/T" ? "K²" : "1";
  const rows = coefficients.map(({ name, value, standardUncertainty: u }) => {
    const given = u === 0 ? "given" : significant(u, 3);
    return html`<tr><th scope="row"><var>${name === "lambda" ? raw("&lambda;") : name}</var></th><td class="n">${significant(value, DIGITS)}</td><td class="n">${given}</td><td>${unit(name)}</td></tr>`;
  });
  return html`<table><caption>Coefficients of ${fitBasis}; they are correlated, their covariance is in curves.json</caption><thead><tr><th scope="col">Coefficient</th><th scope="col" class="n">Value</th><th scope="col" class="n">Standard uncertainty</th><th scope="col">Unit</th></tr></thead><tbody>${rows}</tbody></table>`;
}

function runnersUp({ runnersUp: others, aicc }: Curve): Html {
  if (others.length === 0) return html`<p>No other model was admissible.</p>`;
  const rows = others.map(
    ({ model, aicc: other, leaveOneOut, why }) =>
      html`<tr><th scope="row">${model}</th><td class="n">${Number.isFinite(other - aicc) ? fixed(other - aicc, 1) : ""}</td><td class="n">${Number.isFinite(leaveOneOut) ? significant(100 * leaveOneOut, 3) : ""}</td><td class="w">${why}</td></tr>`,
  );
  return html`<table><caption>Runners-up, on the same kept points</caption><thead><tr><th scope="col">Model</th><th scope="col" class="n">AICc above the chosen</th><th scope="col" class="n">Leave-one-out, %</th><th scope="col">Why it was passed over</th></tr></thead><tbody>${rows}</tbody></table>`;
}

/** The curve held against the ideal solubility: facts for the list, or why there are none. */
function idealFacts({ edition, system }: SystemView): Html {
  const ideal = edition.ideals[system.index];
  if (ideal === undefined) return html``;
  if ("whyNot" in ideal) return html`<dt>Ideal solubility</dt><dd>not compared: ${short(ideal.whyNot, 300)}</dd>`;
  const span = (low: number, high: number) =>
    significant(low, 3) === significant(high, 3)
      ? significant(low, 3)
      : `${significant(low, 3)} to ${significant(high, 3)}`;
  return html`<dt>Ideal solubility at ${celsius(ideal.temperatureK)} °C</dt><dd><var>x</var> ${span(ideal.low, ideal.high)}; activity coefficient ${span(ideal.gammaLow, ideal.gammaHigh)} (without and with the full heat-capacity term)</dd>`;
}

function curvePart(curve: Curve, curves: number, more: Html): Html {
  const letter = curve.fitBasis === "ln x" ? "x" : "r";
  const [low, high] = curve.temperatureRangeK;
  const enthalpy = curve.dissolutionEnthalpy;
  const scatter = curve.withinSd === undefined ? "too few points to tell" : `${significant(100 * curve.withinSd, 3)} %`;
  const between = `${significant(100 * curve.betweenSd, 3)} % (${curve.betweenDegreesOfFreedom > 0 ? `pooled over the collection, ${significant(curve.betweenDegreesOfFreedom, 3)} degrees of freedom` : "default setting: too few sources to estimate it"})`;
  const branch = curves > 1 ? `Branch ${curve.branch}: ` : "";
  return html`<h3>${branch}${curve.model}, ${celsius(low)} to ${celsius(high)} °C</h3>
<p class="eq">${equationHtml(curve.model, letter)}, <var>T</var> in K</p>
<div class="cols"><div>${wideTable(`${branch}coefficients, ${curve.model}`, coefficientTable(curve))}
<p>In a spreadsheet, <code>t</code> in °C, gives <var>${letter}</var>: <code>${spreadsheetFormula(curve)}</code></p></div>
<div><dl class="facts">
<dt>Points, sources, laboratories</dt><dd>${curve.n}, ${curve.nSources}, ${curve.nLaboratories}</dd>
<dt>Root mean square deviation of ln ${letter}</dt><dd>${significant(curve.rmsd, 3)}</dd>
<dt>Average relative deviation</dt><dd>${significant(curve.ardPercent, 3)} %</dd>
<dt>Scatter within sources (SD)</dt><dd>${scatter}</dd>
<dt>Scatter between sources (SD)</dt><dd>${between}</dd>
${enthalpy === undefined ? "" : html`<dt>Apparent dissolution enthalpy</dt><dd>${significant(enthalpy.value / 1000, 4)} kJ/mol at ${celsius(enthalpy.temperatureK)} °C (95 % limits ${significant(enthalpy.low / 1000, 4)} to ${significant(enthalpy.high / 1000, 4)})</dd>`}
${more}</dl>${curve.notices.map((notice) => html`<p>Note: ${notice}.</p>`)}</div></div>
${wideTable(`${branch}runners-up`, runnersUp(curve))}`;
}

/** Most round temperatures listed; a fine grid is thinned, its every row is in grid.csv. */
const MOST_VALUES = 40;

function valueTable(grid: readonly GridRow[]): Html {
  const step = Math.ceil(grid.length / MOST_VALUES);
  const limits = (low: number | undefined, high: number | undefined) => {
    const [from, to] = [significant(low, 3), significant(high, 3)];
    return from === "" ? "" : `${from} to ${to || "no limit"}`;
  };
  const gaps = grid.some((row) => row.data_gap_K !== undefined);
  const rows = grid
    .filter((_, i) => i % step === 0)
    .map(
      (row) =>
        html`<tr><th scope="row" class="n">${celsius(row.temperature_K)}</th><td class="n">${significant(row.mole_fraction, 4)}</td><td class="n">${significant(row.g_per_100g_solvent, 4)}</td><td class="n">${limits(row.g_per_100g_solvent_curve_low, row.g_per_100g_solvent_curve_high)}</td><td class="n">${limits(row.g_per_100g_solvent_new_low, row.g_per_100g_solvent_new_high)}</td><td class="n">${significant(row.mg_per_mL_solution, 4)}</td>${gaps ? html`<td>${row.data_gap_K === undefined ? "" : `between data ${fixed(row.data_gap_K, 0)} K apart`}</td>` : ""}</tr>`,
    );
  return html`<table><caption>The curve at round temperatures inside its range; nothing is extrapolated${step > 1 ? `; every ${step}th row of grid.csv` : ""}</caption><thead><tr><th scope="col" class="n">°C</th><th scope="col" class="n">x</th><th scope="col" class="n">g/100 g solvent</th><th scope="col" class="n">95 % limits, curve</th><th scope="col" class="n">95 % limits, new measurement</th><th scope="col" class="n">mg/mL solution</th>${gaps ? html`<th scope="col">Gap</th>` : ""}</tr></thead><tbody>${rows}</tbody></table>`;
}

/** Where the two branches of a system meet, in words. */
function transitionWords(transition: Transition | undefined): Html {
  if (transition === undefined) return html``;
  const { temperatureK, low, high, probability } = transition;
  return html`<p>The solid in equilibrium changes at <strong>${celsius(temperatureK)} °C</strong> (95 % limits ${celsius(low)} to ${celsius(high)} °C): two branches meet there, and the slope falls on heating. One smooth curve would show as strong a break with p = ${probability.toFixed(3)} (parametric bootstrap, 999 replicates). Which form each branch is, solubility alone does not tell.</p>`;
}

/** Curve with equation, coefficients, quality, runners-up, and values at round temperatures; or why there is none. */
export function curveSection(view: SystemView, grid: readonly GridRow[]): Html {
  const { fit } = view;
  const curves = fit?.curves ?? [];
  if (curves.length === 0) return html`<h2 id="curve">Curve</h2><p>No curve: ${fit?.noCurve ?? "not fitted"}.</p>`;
  const values = grid.length === 0 ? "" : wideTable("Values at round temperatures", valueTable(grid));
  return html`<h2 id="curve">Curve</h2>${transitionWords(fit?.transition)}${curves.map((curve, i) => curvePart(curve, curves.length, i === curves.length - 1 ? idealFacts(view) : html``))}${values}`;
}
