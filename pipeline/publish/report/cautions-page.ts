import type { Edition } from "../../records/edition.ts";
import { type Html, html, short } from "./html.ts";
import { page, wideTable } from "./page.ts";

const CAUTIONS: readonly string[] = [
  "Hot solvents are flammable and toxic. Nearly every organic solvent is above its flash point when it is hot: this holds for the whole class and is said once.",
  "Heat with suitable equipment, away from ignition sources, and never in a closed vessel.",
  "Oxidisers and energetic solutes (nitrates, perchlorates, azides, peroxides and others) and peroxide-forming solvents are marked below. They are never evaporated to dryness.",
  "Planning figures hold at equilibrium, for a pure solute in this solid form. They know nothing of kinetics, cake hold-up or impurities, and nothing beyond the range of the data.",
  "Follow the safety data sheet, local codes and the judgement of a licensed or responsible person.",
];

/** What users of the figures must know, and the hazard words that the substance tables hold. */
export function cautionsPage(edition: Edition): string {
  const marked = edition.substances.filter(({ hazards }) => hazards !== "");
  const rows = marked.map(
    ({ key, role, hazards }): Html =>
      html`<tr><th scope="row">${short(key, 120)}</th><td>${role.replace(";", ", ")}</td><td>${short(hazards.replaceAll(";", "; "), 300)}</td></tr>`,
  );
  const table = html`<table><caption>Hazard words of the substance tables; a substance without any is not thereby safe</caption><thead><tr><th scope="col">Substance</th><th scope="col">Role here</th><th scope="col">Hazards</th></tr></thead><tbody>${rows}</tbody></table>`;
  return page(edition, {
    title: "Cautions",
    name: "cautions.html",
    body: html`<h1>Cautions</h1>
<p class="lead">This report describes measurements; it does not approve an operation.</p>
<ul>${CAUTIONS.map((caution) => html`<li>${caution}</li>`)}</ul>
${rows.length === 0 ? html`<p>No substance of this edition has a hazard word in the substance tables.</p>` : wideTable("Hazard words", table)}`,
  });
}
