import type { Edition } from "../../records/edition.ts";
import { equationHtml } from "./curve-section.ts";
import { counted } from "./figures.ts";
import { type Html, html } from "./html.ts";
import { mixtureMethods } from "./methods-mixtures.ts";
import { statistics } from "./methods-statistics.ts";
import { page } from "./page.ts";
import { cite, referenceList } from "./references.ts";

function bases(): Html {
  return html`<h2 id="bases">Common basis</h2>
<p>Every value is brought onto <var>r</var>, grams of unsolvated solute per gram of total solvent, solvent of crystallisation counted as solvent where it is a component of it. With molar masses <var>M</var><sub>2</sub> (solute) and <var>M</var><sub>1</sub> (solvent)${cite("greenBook", "atomicWeights")}:</p>
<p class="eq"><var>w</var> = <var>r</var>/(1 + <var>r</var>)</p>
<p class="eq"><var>x</var> = (<var>r</var>/<var>M</var><sub>2</sub>)/(<var>r</var>/<var>M</var><sub>2</sub> + 1/<var>M</var><sub>1</sub>)</p>
<p class="eq"><var>c</var> = <var>w</var><var>ρ</var></p>
<p>Mole fractions count undissociated formula units. Volumes of solvent are at 20 °C unless stated, volumes of solution at the measuring temperature. The density of a solution is the measured one; else from published coefficients for salts in water${cite("salts")}; else by additive volumes with an apparent density of the solute, which is named on the row with its uncertainty. Water${cite("water")}, alcoholometric compositions${cite("alcohol")} and the terms of the pharmacopoeias${cite("pharmacopoeia")} have their own references.</p>`;
}

function uncertainties({ settings }: Edition): Html {
  return html`<h2 id="uncertainties">Uncertainties</h2>
<p>First-order propagation of standard uncertainties${cite("gum")}. A reported uncertainty is repeatability and is not taken below ${settings.reported_uncertainty_floor_percent.general} % (salts in water ${settings.reported_uncertainty_floor_percent.aqueous_salts} %); where none is reported the default of the method is used and named on the row. The uncertainty of the temperature counts through the slope of the curve, as an effective variance${cite("orear")}:</p>
<p class="eq"><var>u</var>² = <var>u</var>(ln <var>x</var>)² + (d ln <var>x</var>/d<var>T</var>)² <var>u</var>(<var>T</var>)²</p>`;
}

function models(): Html {
  return html`<h2 id="models">Curve models</h2>
<p>Fitted to ln <var>x</var>, or to ln <var>r</var> where the molar mass is unknown. No curve is used outside the range of its data.</p>
<dl class="facts">
<dt>van ’t Hoff${cite("grant")}</dt><dd class="eq">${equationHtml("van 't Hoff", "x")}</dd>
<dt>modified Apelblat${cite("apelblat")}</dt><dd class="eq">${equationHtml("modified Apelblat", "x")}</dd>
<dt>Buchowski-Ksiazczak λh${cite("buchowski")}</dt><dd class="eq">${equationHtml("Buchowski-Ksiazczak lambda-h", "x")}</dd>
<dt>quadratic in 1/<var>T</var>${cite("grant")}</dt><dd class="eq">${equationHtml("quadratic in 1/T", "x")}</dd>
<dt>constant</dt><dd class="eq">${equationHtml("constant", "x")}, at one temperature</dd></dl>
<p>Models with three coefficients need at least 6 temperatures over at least 30 K; λh needs the melting point of the solid form. A curve that reaches a mole fraction above 1, or turns where the points do not show it, is passed over. Of the rest the smallest corrected Akaike criterion wins${cite("aicc", "burnham")}; below a difference of 2 the leave-one-out residual decides. The apparent enthalpy of dissolution, −<var>R</var> d ln <var>x</var>/d(1/<var>T</var>), is given at the harmonic mean temperature${cite("krug")}. Where the melting data of the form are known the curve is held against the ideal solubility${cite("prausnitz")}; an activity coefficient near 1 means nearly ideal mixing.</p>`;
}

function screening({ settings }: Edition): Html {
  const threshold = settings.material_threshold_percent;
  return html`<h2 id="screening">Screening</h2>
<p>Scales are pooled over all systems. Whole series are tested first, then the points of series that are sound. The deviation of a point is taken from what the other points say, with the scatter of its source and the uncertainty of the curve in its standard deviation: that is the <var>z</var> of the tables. A flag needs both statistics and substance: the Benjamini-Hochberg procedure at a false-discovery rate of ${100 * settings.false_discovery_rate} %${cite("benjamini")}, and a deviation above the material threshold: ${counted(settings.material_threshold_uncertainties, "standard uncertaintie").replace("uncertainties", "uncertainties")} or ${threshold.from_10_mg_per_mL} % from 10 mg/mL up, ${threshold.from_1_mg_per_mL} % from 1, ${threshold.from_0_1_mg_per_mL} % from 0.1, ${threshold.below_0_1_mg_per_mL} % below; salts in water ${threshold.aqueous_salts} %; whichever is larger.</p>
<p>Every series or point that is off is re-read under each candidate mistake (power of ten, basis, temperature scale, hydrate reading, digits, rows and others). The causes compete with a random error; one is named only when it explains the value within its uncertainty and has a probability above 0.5, and a corrected value is proposed only above 0.9. Without a majority among the sources nothing is set aside: both readings are laid out. A majority is no proof of stability: a coherent lower series is flagged as a possible more stable form.</p>`;
}

function grades(): Html {
  return html`<h2 id="grades">Grades</h2>
<p>Recommended, tentative, doubtful or rejected, in the sense of the IUPAC Solubility Data Series${cite("series")}. The program proposes and gives its reasons with their numbers; a ruling with a name confirms <i>recommended</i>. A solid phase that was not checked at equilibrium caps the grade at tentative.</p>
<h2 id="planning">Planning figures</h2>
<p>With <var>S</var> in g unsolvated solute per g total solvent and <var>R</var> = <var>M</var>(crystal)/<var>M</var>(unsolvated), the crystals from <var>A</var> = <var>S</var><sub>hot</sub><var>W</var> dissolved in <var>W</var> g of solvent are</p>
<p class="eq"><var>P</var> = (<var>A</var> − <var>S</var><sub>cold</sub><var>W</var>)/(1/<var>R</var> − <var>S</var><sub>cold</sub>(1 − 1/<var>R</var>))</p>
<p>and the highest recovery at equilibrium is <var>P</var>/(<var>R</var><var>A</var>), a mass balance. The hot end is limited by the data, the boiling point − 10 K and the melting point of the form − 20 K; the cold end by the data, the freezing point + 5 K and 5 °C (common practice). Where data end the figure is blank, with the reason.</p>`;
}

/** How the figures of the report were made: equations, models, limits, screening, uncertainties, with their references. */
export function methodsPage(edition: Edition): string {
  return page(edition, {
    title: "Methods",
    name: "methods.html",
    body: html`<h1>Methods</h1>${bases()}${uncertainties(edition)}${models()}${mixtureMethods()}${statistics(edition)}${screening(edition)}${grades()}
<h2 id="references">References</h2>${referenceList()}`,
  });
}
