import type { Edition } from "../../records/edition.ts";
import { counted, median, significant } from "./figures.ts";
import { type Html, html, raw } from "./html.ts";
import { wideTable } from "./page.ts";
import { cite } from "./references.ts";

/** An equation of this program's own, on a line for itself. */
const equation = (markup: string): Html => html`<p class="eq">${raw(markup)}</p>`;

const percent = (sd: number): string => `${significant(100 * sd, 3)} %`;

/** Points of a large and a small source, and the scatter within them, of the example on the page. */
const [MANY, FEW, EXAMPLE_WITHIN] = [60, 5, 0.02] as const;

/** Weight of a source's level, 1/(t + v/n). */
const weight = (between: number, n: number): number => 1 / (between ** 2 + EXAMPLE_WITHIN ** 2 / n);

function model({ scales }: Edition): Html {
  const ratio = weight(scales.between, MANY) / weight(scales.between, FEW);
  return html`<h3 id="weighting">Weighting</h3>
<p>With <var>y</var> = ln <var>x</var>, a point <var>i</var> of source <var>j</var> is the curve, an offset that all points of the source share, and scatter of its own:</p>
${equation("<var>y<sub>ij</sub></var> = <var>f</var>(<var>T<sub>ij</sub></var>) + <var>b<sub>j</sub></var> + <var>e<sub>ij</sub></var>, &nbsp; var <var>b<sub>j</sub></var> = <var>m<sub>j</sub>τ</var>² + <var>s<sub>j</sub></var>², &nbsp; var <var>e<sub>ij</sub></var> = <var>k σ<sub>j</sub></var>² <var>u<sub>ij</sub></var>² / ⟨<var>u</var>²⟩<sub><var>j</var></sub>")}
<dl class="facts">
<dt><var>τ</var></dt><dd>SD between sources, pooled over the collection</dd>
<dt><var>m<sub>j</sub></var></dt><dd>number of sources of this system that come from the laboratory of source <var>j</var>: they are not independent, so that together they weigh as much as one</dd>
<dt><var>s<sub>j</sub></var></dt><dd>the part of the stated uncertainty that all points of the source share here (molar masses, densities, an open basis): it does not average out over them</dd>
<dt><var>σ<sub>j</sub></var></dt><dd>SD within source <var>j</var>, from all its systems</dd>
<dt><var>u<sub>ij</sub></var></dt><dd>the point’s own part of the stated uncertainty, that of its temperature included${cite("orear")}; ⟨<var>u</var>²⟩<sub><var>j</var></sub> is its mean square over the source’s points of the system, so that stated uncertainties share out the scatter among them and do not set its size</dd>
<dt><var>k</var></dt><dd>factor of this system, below</dd></dl>
<p>The coefficients minimise (<b>y</b> − <b>Fβ</b>)′<b>K</b>⁻¹(<b>y</b> − <b>Fβ</b>), with <b>K</b> the covariance that these variances give (generalised least squares with random offsets${cite("henderson")}). For the level of the curve a source then weighs</p>
${equation("<var>W<sub>j</sub></var> = 1 / (var <var>b<sub>j</sub></var> + 1/Σ<sub><var>i</var></sub> (1/var <var>e<sub>ij</sub></var>))")}
<p>which never exceeds 1/var <var>b<sub>j</sub></var>: with the <var>τ</var> of this edition and 2 % within sources, ${MANY} points of one laboratory weigh ${significant(ratio, 3)} times as much as ${FEW} of another. Laboratories carry the weight and not points. Where the setting <code>fit_weighting</code> is <code>absolute</code>, the scatter is taken as even in <var>x</var> and not in ln <var>x</var>.</p>`;
}

function componentTable({ scales, sources }: Edition): Html {
  const row = (name: string, sd: number, freedom: number) =>
    html`<tr><th scope="row">${name}</th><td class="n">${percent(sd)}</td><td>${freedom > 0 ? `estimated, ${significant(freedom, 3)} degrees of freedom` : "default setting: fewer than three sources tell it"}</td></tr>`;
  const within = sources.flatMap(({ accepted }, i) => {
    const sd = scales.within[i];
    return accepted > 0 && sd !== undefined && Number.isFinite(sd) ? [sd] : [];
  });
  const range =
    within.length === 0
      ? ""
      : html`<tr><th scope="row">within sources</th><td class="n">${percent(median(within))}</td><td>middle of ${counted(within.length, "source")}: ${percent(Math.min(...within))} to ${percent(Math.max(...within))}</td></tr>`;
  return wideTable(
    "Variance components of this edition",
    html`<table><caption>Variance components of this edition, as SD of ln value</caption><thead><tr><th scope="col">Component</th><th scope="col" class="n">SD</th><th scope="col">Origin</th></tr></thead><tbody>${row("between sources, general", scales.between, scales.betweenDegreesOfFreedom)}${row("between sources, salts in water", scales.betweenAqueousSalt, scales.betweenAqueousSaltDegreesOfFreedom)}${row("between sources, one temperature", scales.betweenOneTemperature, scales.betweenOneTemperatureDegreesOfFreedom)}${range}</tbody></table>`,
  );
}

function components(edition: Edition): Html {
  return html`<h3 id="components">Variance components</h3>
<p>Six points with three coefficients say next to nothing about their own scatter; the scales are therefore pooled. The scatter within a source is 1.4826 times the median |<var>z</var>| of its points in all its systems, shrunk (8 degrees of freedom) towards that of the collection. The scatter between sources solves, over the sound sources of all systems of its class,</p>
${equation("<var>τ</var>² = Σ <var>b̂<sub>j</sub></var>² / Σ (1 − var(<var>b<sub>j</sub></var> | data)/<var>τ</var>²)")}
<p>the restricted-likelihood form${cite("fellner")} of the moment equation of Paule and Mandel${cite("paule")}. An offset counts up to 3 <var>τ</var>; sources that share a laboratory say nothing of <var>τ</var>; the default setting is joined with 2 degrees of freedom, and holds alone until three sources tell at least one degree of freedom.</p>
${componentTable(edition)}
<p>One system may differ. Its scatter within sources is moderated by its own residuals about the model that the limits rest on, with a free offset for each source (sum of squares <var>q</var> over the expected variances, <var>d</var> degrees of freedom${cite("smyth")}):</p>
${equation("<var>k</var> = (4 + <var>q</var>)/(4 + <var>d</var>)")}
<p>and where its sources lie further apart than <var>τ</var> allows at the 1 % level, <var>τ</var>² is raised for this system until the sum of squares between them equals its degrees of freedom${cite("paule")}. A note beside the curve says so.</p>`;
}

function limits(): Html {
  return html`<h3 id="limits">Limits</h3>
<p>The 95 % limits rest on the largest admissible model, whichever model is published: the modified Apelblat equation, whose third coefficient is taken as 0 ± 9 (SD) where the points are too few to fit it; at a single temperature a slope d ln <var>x</var>/d(<var>T</var><sub>0</sub>/<var>T</var>) of 0 ± 10. With <b>f</b> its terms at <var>T</var>, <b>C</b> = (<b>F</b>′<b>K</b>⁻¹<b>F</b>)⁻¹ and <var>d</var> the distance of the published curve from it, the half-width in ln <var>x</var> is</p>
${equation("<var>h</var> = <var>t</var><sub>0.975</sub>(<var>ν</var>) · √(<b>f</b>′<b>Cf</b> + <var>d</var>²)")}
<p>A curve from one source cannot tell the offset of that source: <var>τ</var>² + <var>s</var>² is added under the root. For one new measurement, by a source that is not among these, <var>τ</var>² + <var>s</var>² (the mean over the sources) and the scatter within such a source are added too; these are the outer limits. The degrees of freedom are those of the sum of both parts${cite("satterthwaite")}:</p>
${equation("<var>ν</var> = (<var>V</var><sub>w</sub> + <var>V</var><sub>b</sub>)² / (<var>V</var><sub>w</sub>²/<var>ν</var><sub>w</sub> + <var>V</var><sub>b</sub>²/<var>ν</var><sub>b</sub>)")}
<p>with <var>V</var><sub>w</sub> from the scatter within sources (<var>ν</var><sub>w</sub> = 4 + <var>d</var> as above) and <var>V</var><sub>b</sub> from between them (<var>ν</var><sub>b</sub> of <var>τ</var>; a default setting is taken as known).</p>`;
}

function standings(): Html {
  return html`<h3 id="sources">Sources against one another</h3>
<p>The <b>offset</b> of a source is its mean deviation from the curve of all other sources, <b>β</b><sub>(<var>j</var>)</sub>, at the temperatures they cover:</p>
${equation("<var>o<sub>j</sub></var> = Σ<sub><var>i</var></sub> <var>w<sub>ij</sub></var>(<var>y<sub>ij</sub></var> − <b>f</b><sub><var>i</var></sub>′<b>β</b><sub>(<var>j</var>)</sub>) / Σ <var>w<sub>ij</sub></var>, &nbsp; var <var>o<sub>j</sub></var> = <b>f̄</b>′<b>C</b><sub>(<var>j</var>)</sub><b>f̄</b> + 1/Σ <var>w<sub>ij</sub></var>, &nbsp; <var>w<sub>ij</sub></var> = 1/var <var>e<sub>ij</sub></var>")}
<p>with <b>f̄</b> the weighted mean of its rows. The offsets of the others are in its limits; its own is what is estimated. The <b>influence</b> of a source is the largest change of ln <var>x</var>, within the range of both curves, when the published model is fitted without it (the simplest one where the other points do not carry it).</p>
<p>Each laboratory has one vote. Sources agree whose levels lie within the larger of 1.15 material thresholds and 4.5 <var>τ</var>; where two levels are uncertain, half of that and twice the SD of their difference is enough. The largest group that agrees must hold more than half of the votes; then sources outside it are set apart, and so is one of which more than half of the points lie 4 SD from the curve of the others. <b>Without a majority</b> there is no curve: one blocking flag lays out every reading, each is drawn and tabulated, and none is chosen. With a majority, the odd source is named where it is off both significantly and materially. One that lies <i>lower</i>, coherently (parallel to the curve, or drifting from it smoothly in 1/<var>T</var> as two solids do), is flagged as a <b>possible more stable form</b> whatever the majority says: at one temperature the stable solid has the lowest solubility.</p>`;
}

/** How points and sources are weighed, where the variances come from, what the limits hold, how sources are compared. */
export function statistics(edition: Edition): Html {
  return html`<h2 id="fit">Fit and limits</h2>
<p>First a robust fit decides which points stay: slopes come from pairs of points within a source, each laboratory has one vote, and points are dropped or taken back on their deleted deviations (4 SD and the smaller of 12 % and the material threshold). A point that does not stay has weight 0 and is drawn hollow; only a ruling sets a measurement aside. The published curve comes from the points that stay.</p>
${model(edition)}${components(edition)}${limits()}${standings()}`;
}
