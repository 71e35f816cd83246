import { type Html, html } from "./html.ts";
import { mixtureEquationHtml } from "./mixture-page.ts";
import { cite } from "./references.ts";

/** How the surfaces over the composition of a binary solvent were made. */
export function mixtureMethods(): Html {
  return html`<h2 id="mixtures">Mixtures of two solvents</h2>
<p>One solute in one solid form over the composition of a binary solvent, pure solvents included, has one Jouyban-Acree-van &rsquo;t Hoff surface${cite("acree")}, from three compositions and three temperatures up:</p>
<p class="eq">${mixtureEquationHtml(3, "x")}</p>
<p><var>w</var> are mass fractions in the solvent free of solute, for each measurement its exact one. The smallest corrected Akaike criterion says how many terms <var>J</var>${cite("aicc")}: <var>J</var><sub>0</sub> from three compositions, <var>J</var><sub>1</sub> from four, <var>J</var><sub>2</sub> from five. The covariance has a random offset for each source and one for each composition, as no such equation meets every composition exactly${cite("henderson")}; the variance of the latter is averaged over its restricted likelihood. An uncertain composition counts through the slope of the surface${cite("orear")}.</p>
<p>Points that the curve of their own composition leaves out take no part. From a high-breakdown start, in which every source has one vote (every composition, below three sources), a composition is left out that lies more than 4 standard deviations and 10 % off what the others say, then single points likewise. The 95 % limits rest on a wider surface, with all three terms and a heat-capacity term for each solvent, whose coefficients are held by weak prior knowledge where the compositions are few; they contain its distance from the published surface, the lack of fit of a composition and the scatter between sources${cite("satterthwaite")}.</p>
<p>The surface holds inside the convex hull of the compositions and temperatures measured and nowhere else. A maximum between the ends is told where it exceeds both ends by more than the limits of the difference. Each composition between the ends that one source alone measured is held against the surface of the others; what is off is a notice, and needs a person where it is more than a factor 2 off and a cause explains it, by the same rate of false discoveries and thresholds as elsewhere. Systems with too few temperatures for a judgement of their own are judged point by point in this way. The curves of the compositions themselves come first: they, not the surface, are what the tables of curves, grid and planning hold.</p>`;
}
