import type { Edition } from "../../records/edition.ts";
import type { MixtureModel } from "../../records/mixtures.ts";
import { celsius, counted, fixed, percentOff, plainNumber, significant } from "./figures.ts";
import { type Html, html, raw, short } from "./html.ts";
import { markPicture } from "./marks.ts";
import { compositionPlot, familyPlot, percentOfFirst } from "./mixture-plots.ts";
import { type DrawnMember, type MixtureView, mixtureFile, mixtureView } from "./mixture-view.ts";
import { page, wideTable } from "./page.ts";

/** Digits of a coefficient: enough to give x back to 0.1 %. */
const DIGITS = 9;
/** Compositions at which the surface is listed besides its ends: every tenth. */
const LISTED = [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1] as const;

/** The equation as it is printed, for x or r. */
export function mixtureEquationHtml(terms: number, letter: string): Html {
  const w = (i: 1 | 2) => `<var>w</var><sub>${i}</sub>`;
  const pure = (i: 1 | 2) => `${w(i)}(<var>A</var><sub>${i}</sub> + <var>B</var><sub>${i}</sub>/<var>T</var>)`;
  const J = (i: number, power: string) =>
    `<var>J</var><sub>${i}</sub>${i === 0 ? "" : `(${w(1)} &minus; ${w(2)})${power}`}`;
  const excess = [J(0, ""), J(1, ""), J(2, "<sup>2</sup>")].slice(0, terms).join(" + ");
  const more = terms === 0 ? "" : ` + (${w(1)}${w(2)}/<var>T</var>)[${excess}]`;
  return raw(`ln <var>${letter}</var> = ${pure(1)} + ${pure(2)}${more}`);
}

/** The surface as a formula for a spreadsheet: `w` mass fraction of the first solvent, `t` in °C. */
export function mixtureFormula({ coefficients }: Pick<MixtureModel, "coefficients">): string {
  const [A1 = "0", B1 = "0", A2 = "0", B2 = "0", ...J] = coefficients.map(
    ({ value }) => `(${plainNumber(value, DIGITS)})`,
  );
  const T = "(t+273.15)";
  const terms = J.map((j, i) => (i === 0 ? j : `${j}*(2*w-1)${i === 1 ? "" : `^${i}`}`)).join("+");
  const excess = J.length === 0 ? "" : `+w*(1-w)/${T}*(${terms})`;
  return `=EXP(w*(${A1}+${B1}/${T})+(1-w)*(${A2}+${B2}/${T})${excess})`;
}

function facts({ model, letter }: MixtureView): Html {
  const [low, high] = model.temperatureRangeK;
  const [from, to] = model.fractionRange;
  const between =
    model.betweenDegreesOfFreedom > 0
      ? "pooled over the collection"
      : "default setting: too few sources to estimate it";
  return html`<dl class="facts">
<dt>Solid form</dt><dd>${short(model.solidForm, 160)}</dd>
<dt>Compositions</dt><dd>${model.nCompositions}, ${percentOfFirst(from)} to ${percentOfFirst(to)} ${short(model.solvents[0], 80)} by mass, free of solute</dd>
<dt>Temperatures</dt><dd>${celsius(low)} to ${celsius(high)} °C; at each composition those between the measurements around it</dd>
<dt>Points, sources</dt><dd>${model.n}, ${model.nSources}</dd>
<dt>Root mean square deviation of ln ${letter}</dt><dd>${significant(model.rmsd, 3)}; average relative deviation ${significant(model.ardPercent, 3)} %</dd>
<dt>A composition off the surface (SD)</dt><dd>${significant(100 * model.lackOfFitSd, 2)} %, in the limits</dd>
<dt>Scatter between sources (SD)</dt><dd>${significant(100 * model.betweenSd, 3)} % (${between}), in the limits</dd></dl>
${model.notices.map((notice) => html`<p>Note: ${short(notice, 300)}.</p>`)}`;
}

function figure(svg: Html, caption: Html): Html {
  return html`<figure>${svg}<figcaption>${caption}</figcaption></figure>`;
}

function pictures(view: MixtureView): Html {
  const { letter, first } = view;
  return html`<div class="plots">
${figure(familyPlot(view), html`ln <var>${letter}</var> against 1000/<var>T</var>, warm on the left: one line of the surface for each composition, named by its mass percent of ${first}. Marks: measurements, one shape a composition.`)}
${figure(compositionPlot(view), html`Solubility over composition at round temperatures, logarithmic scale; shaded: 95 % limits of the surface. Marks: measurements within 2.5 K, moved to the temperature of the line along the surface.`)}
</div>
<p>A filled mark is used by the surface, a hollow one with a stroke is not: the curve of its own composition leaves it out, or it contradicts the other compositions. Nothing is drawn beyond the data.</p>`;
}

function maxima({ model, percentOf, first, letter }: MixtureView): Html {
  if (model.innerMaxima.length === 0)
    return html`<h2 id="maximum">Highest solubility</h2><p>At no round temperature does the solubility between the ends exceed both of them by more than the limits of the difference: the highest is at an end of the compositions measured.</p>`;
  const rows = model.innerMaxima.map((maximum) => {
    const by = (shift: number) => 100 * Math.expm1(maximum.rise + shift * maximum.riseHalfWidth);
    return html`<tr><th scope="row" class="n">${celsius(maximum.temperatureK)}</th><td class="n">${fixed(100 * maximum.fraction, 1)}</td><td class="n">${fixed(100 * maximum.fractionLow, 0)} to ${fixed(100 * maximum.fractionHigh, 0)}</td><td class="n">${significant(Math.exp(maximum.lnValue), 3)}</td><td class="n">${significant(percentOf(maximum.lnValue, maximum.fraction), 3)}</td><td class="n">${percentOff(by(0))}</td><td class="n">${percentOff(by(-1))} to ${percentOff(by(1))}</td></tr>`;
  });
  return html`<h2 id="maximum">Highest solubility</h2>
<p>The solubility passes through a maximum between the ends: the first additions of either solvent to the other dissolve more.</p>
${wideTable(
  "Maximum over composition",
  html`<table><caption>Maximum of ${letter} over composition at round temperatures${letter === "x" ? "; in g/100 g it lies nearer to the solvent of smaller molar mass" : ""}. Flat range: compositions whose solubility is not told apart from the maximum. Above the better end: against the more soluble of the two ends of the compositions measured</caption><thead><tr><th scope="col" class="n">°C</th><th scope="col" class="n">% ${first}</th><th scope="col" class="n">Flat range, %</th><th scope="col" class="n">${letter}</th><th scope="col" class="n">g/100 g solvent</th><th scope="col" class="n">Above the better end, %</th><th scope="col" class="n">95 % limits</th></tr></thead><tbody>${rows}</tbody></table>`,
)}`;
}

function memberRow({ member, system, mark }: DrawnMember): Html {
  const [low, high] = member.temperatureRangeK;
  const percent = (ln: number | undefined) =>
    ln === undefined || Number.isNaN(ln) ? "" : percentOff(100 * Math.expm1(ln));
  const said = member.leftOut;
  const half = said === undefined ? "" : `${percent(said.meanDeviation)} ± ${fixed(100 * said.meanSd, 0)}`;
  const { composition, solvent } = system.identity;
  const name = composition === "" ? `${solvent} alone` : composition;
  return html`<tr><td>${markPicture(mark, "kept")}</td><th scope="row"><a href="../systems/${system.id}.html">${short(name, 90)}</a></th><td class="n">${fixed(100 * member.fraction, 1)}</td><td class="n">${member.nUsed} of ${member.used.length}</td><td class="n">${Number.isNaN(low) ? "" : low === high ? celsius(low) : `${celsius(low)} to ${celsius(high)}`}</td><td class="n">${percent(member.meanDeviation)}</td><td class="n">${Number.isNaN(member.rmsd) ? "" : fixed(100 * member.rmsd, 1)}</td><td class="n">${half}</td><td class="w">${member.whyNot ?? ""}</td></tr>`;
}

function compositions(view: MixtureView): Html {
  return html`<h2 id="compositions">Compositions</h2>
<p>The curve of each composition, on its own page, comes before the surface; the surface tells how the compositions hang together and speaks where one of them has too few temperatures for a curve.</p>
${wideTable(
  "Compositions",
  html`<table><caption>Off the surface: mean deviation of the points used. Said by the others: mean deviation from the surface of the other compositions, with one standard deviation; not told for the ends</caption><thead><tr><td></td><th scope="col">Composition</th><th scope="col" class="n">% ${view.first}</th><th scope="col" class="n">Points used</th><th scope="col" class="n">Range, °C</th><th scope="col" class="n">Off the surface, %</th><th scope="col" class="n">Rms, %</th><th scope="col" class="n">Said by the others, %</th><th scope="col">Why not used</th></tr></thead><tbody>${view.members.map(memberRow)}</tbody></table>`,
)}`;
}

function values({ model, temperaturesK, percentOf, first }: MixtureView): Html {
  const [from, to] = model.fractionRange;
  const listed = [...new Set([from, ...LISTED.filter((w) => w > from && w < to), to])];
  const cell = (w: number, T: number) => {
    const limits = model.temperaturesAt(w);
    if (limits === undefined || T < limits[0] - 1e-9 || T > limits[1] + 1e-9) return html`<td class="n"></td>`;
    const ln = model.evaluate(w, T);
    const half = model.limits(w, T).curve;
    const [low, high] = [-1, 1].map((s) => significant(percentOf(ln + s * half, w), 3));
    return html`<td class="n">${significant(percentOf(ln, w), 3)}<br><span class="soft">(${low} to ${high || "no limit"})</span></td>`;
  };
  const rows = listed.map(
    (w) => html`<tr><th scope="row" class="n">${fixed(100 * w, 1)}</th>${temperaturesK.map((T) => cell(w, T))}</tr>`,
  );
  return html`<h2 id="values">Values</h2>
${wideTable(
  "Values of the surface",
  html`<table><caption>g of unsolvated solute per 100 g of solvent, with 95 % limits of the surface; blank where the data end</caption><thead><tr><th scope="col" class="n">% ${first}</th>${temperaturesK.map((T) => html`<th scope="col" class="n">${celsius(T)} °C</th>`)}</tr></thead><tbody>${rows}</tbody></table>`,
)}`;
}

function equation(view: MixtureView): Html {
  const { model, letter, first } = view;
  const terms = model.coefficients.length - 4;
  const rows = model.coefficients.map(
    ({ name, value, standardUncertainty }) =>
      html`<tr><th scope="row"><var>${name.slice(0, 1)}</var><sub>${name.slice(1)}</sub></th><td class="n">${significant(value, DIGITS)}</td><td class="n">${significant(standardUncertainty, 3)}</td><td>${name.startsWith("A") ? "1" : "K"}</td></tr>`,
  );
  const best = Math.min(...model.aicc);
  const above = model.aicc
    .map((one) => (Number.isFinite(one - best) ? fixed(one - best, 1) : "not defined"))
    .join(", ");
  return html`<h2 id="equation">Equation</h2>
<p class="eq">${mixtureEquationHtml(terms, letter)}, <var>T</var> in K</p>
<p><var>w</var><sub>1</sub> is the mass fraction of ${first} in the solvent, free of solute, <var>w</var><sub>2</sub> = 1 &minus; <var>w</var><sub>1</sub>. AICc above the best with 0, 1, 2 ... terms <var>J</var>, as many as the compositions allow: ${above}.</p>
<div class="cols"><div>${wideTable("Coefficients", html`<table><caption>Coefficients of ln ${letter}; they are correlated, their covariance is in curves.json</caption><thead><tr><th scope="col">Coefficient</th><th scope="col" class="n">Value</th><th scope="col" class="n">Standard uncertainty</th><th scope="col">Unit</th></tr></thead><tbody>${rows}</tbody></table>`)}</div>
<div><p>In a spreadsheet, <code>w</code> the mass fraction and <code>t</code> in °C, gives <var>${letter}</var>, inside the data only: <code>${mixtureFormula(model)}</code></p></div></div>`;
}

/** The page of one solute over one binary solvent. */
export function mixturePage(edition: Edition, model: MixtureModel): string {
  const view = mixtureView(edition, model);
  return page(edition, {
    title: view.title,
    depth: 1,
    body: html`<h1>${short(view.title, 600)}</h1>
<p class="lead">Solubility over composition and temperature, by the Jouyban-Acree-van &rsquo;t Hoff equation.</p>
${facts(view)}
${pictures(view)}
${maxima(view)}
${compositions(view)}
${values(view)}
${equation(view)}`,
  });
}

/** Every mixture's page: name below `report/`, and text. */
export function* mixturePages(
  edition: Edition,
  models: readonly MixtureModel[],
): Generator<readonly [name: string, text: string]> {
  for (const model of models) yield [mixtureFile(model), mixturePage(edition, model)];
}

/** Links of a system's page to the mixtures it is part of; empty where there is none. */
export function mixtureLinks(models: readonly MixtureModel[], system: number): Html {
  const own = models.filter(({ members }) => members.some((member) => member.system === system));
  if (own.length === 0) return html``;
  const links = own.map(
    (model, i) =>
      html`${i > 0 ? "; " : ""}<a href="../${mixtureFile(model)}">${short(model.solvents.join(" + "), 160)}</a>, ${counted(model.nCompositions, "composition")}`,
  );
  return html`<dt>Over composition</dt><dd>${links}</dd>`;
}

/** The overview's list of mixtures; empty where there is none. */
export function mixtureList(models: readonly MixtureModel[]): Html {
  if (models.length === 0) return html``;
  const rows = models.map((model) => {
    const [low, high] = model.temperatureRangeK;
    const form = model.solidForm === "unspecified" ? "" : `, ${model.solidForm}`;
    const top = model.innerMaxima.length === 0 ? "at an end" : "between the ends";
    return html`<tr><th scope="row"><a href="${mixtureFile(model)}">${short(`${model.solute}${form} in ${model.solvents.join(" + ")}`, 160)}</a></th><td class="n">${model.nCompositions}</td><td class="n">${model.n}</td><td class="n">${fixed(low - 273.15, 0)} to ${fixed(high - 273.15, 0)}</td><td class="n">${fixed(100 * model.rmsd, 1)}</td><td>${top}</td></tr>`;
  });
  return html`<h2 id="mixtures">Mixtures</h2>
${wideTable("Mixtures", html`<table><caption>Solutes over the composition of a binary solvent, from at least three compositions</caption><thead><tr><th scope="col">Mixture</th><th scope="col" class="n">Compositions</th><th scope="col" class="n">Points</th><th scope="col" class="n">Range, °C</th><th scope="col" class="n">Rms, %</th><th scope="col">Highest solubility</th></tr></thead><tbody>${rows}</tbody></table>`)}`;
}
