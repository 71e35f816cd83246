import type { GridRow } from "../../records/generated/grid.ts";
import type { PlanningCoolingRow } from "../../records/generated/planning-cooling.ts";
import type { System } from "../../records/systems.ts";
import { curveSection } from "./curve-section.ts";
import { familySection } from "./family-section.ts";
import { counted, fixed } from "./figures.ts";
import { flagSection, flagWords } from "./flag-section.ts";
import { type Html, html, short } from "./html.ts";
import { legend } from "./legend.ts";
import { measurementSection } from "./measurement-section.ts";
import { mixtureLinks } from "./mixture-page.ts";
import { page } from "./page.ts";
import { planningSection } from "./planning-section.ts";
import { type PlotPicture, solubilityPlot, vantHoffPlot } from "./plots.ts";
import { residualPlot } from "./residual-plot.ts";
import { sourcesSection } from "./sources-section.ts";
import { type SystemView, titleOf, waits } from "./system-view.ts";
import { rowBudgets, uncertaintySection } from "./uncertainty-section.ts";

/** Longest name of a solute, form or solvent in running text. */
const NAME = 160;

/** Systems beside this one: the neighbours in the overview's order, and the other solid forms of its family. */
export interface Neighbours {
  readonly previous: System | undefined;
  readonly next: System | undefined;
  readonly family: readonly System[];
}

/** What the tables say of a system: its rows of `grid.csv` and of the planning tables. */
export interface SystemTables {
  readonly grid: readonly GridRow[];
  readonly cooling: readonly PlanningCoolingRow[];
}

/** A link to the page of a system, from the page of another. */
const systemLink = (system: System, text: Html): Html => html`<a href="${system.id}.html">${text}</a>`;

function facts({ edition, system, grade }: SystemView, { family }: Neighbours): Html {
  const { identity } = system;
  const mass = (value: number) => (Number.isNaN(value) ? "unknown" : `${fixed(value, 3)} g/mol`);
  const others = family.filter(({ index }) => index !== system.index);
  const forms = others
    .slice(0, 20)
    .map((other, i) => html`${i > 0 ? "; " : ""}${systemLink(other, short(other.identity.solidForm, 80))}`);
  return html`<dl class="facts">
<dt>Solid form</dt><dd>${short(identity.solidForm, NAME)}${others.length > 0 ? html` (of this family also: ${forms}${others.length > 20 ? ` and ${others.length - 20} more` : ""})` : ""}</dd>
${identity.composition === "" ? "" : html`<dt>Composition</dt><dd>${short(identity.composition, NAME)} (mass fractions)</dd>`}
${mixtureLinks(edition.mixtures.models, system.index)}
${identity.medium === "" ? "" : html`<dt>Medium</dt><dd>${short(identity.medium, NAME)}</dd>`}
<dt>Molar masses</dt><dd>solute ${mass(identity.soluteMolarMass)}, solvent ${mass(identity.solventMolarMass)}</dd>
<dt>Proposed grade</dt><dd><b>${grade?.grade ?? "none"}</b>: ${grade?.reasons.join("; ") ?? ""}</dd></dl>`;
}

/** One sentence that leads to the flags, where a person is needed. */
function summons({ edition, flags }: SystemView): Html {
  const blocking = flags.filter((flag) => waits(edition, flag));
  if (blocking.length === 0) return html``;
  const words = [...new Set(blocking.map((flag) => flagWords(flag).toLowerCase()))].join(", ");
  return html`<p class="lead"><span class="need">Needs a person:</span> <a href="#flags">${counted(blocking.length, "flag")}</a> (${words}).</p>`;
}

function figure({ svg, beyond, thinned }: PlotPicture, caption: Html): Html {
  const far =
    beyond === 0
      ? ""
      : ` ${counted(beyond, "point")} beyond an edge ${beyond === 1 ? "stands" : "stand"} on it, with an arrow.`;
  const many = thinned === 0 ? "" : ` ${thinned} kept points are not drawn, for clarity.`;
  return html`<figure>${svg}<figcaption>${caption}${far}${many}</figcaption></figure>`;
}

function pictures(view: SystemView): Html {
  const letter = view.system.fitBasis === "ln x" ? "x" : "r";
  const residuals = residualPlot(view);
  return html`<div class="plots">
${figure(vantHoffPlot(view), html`ln <var>${letter}</var> against 1000/<var>T</var>, warm on the left; a van &rsquo;t Hoff line is straight here.`)}
${figure(solubilityPlot(view), html`Grams of unsolvated solute per 100 g of solvent against temperature.`)}
${residuals === undefined ? "" : html`<figure>${residuals}<figcaption>Deviation by source, percent, from what the other points say; under each letter the median. A point beyond its lane stands at the edge, with an arrow.</figcaption></figure>`}
<div>${legend(view)}</div>
</div>`;
}

function pager({ previous, next }: Neighbours): Html {
  const link = (system: System | undefined, word: string) =>
    system === undefined
      ? html`<span></span>`
      : html`<span>${word}: ${systemLink(system, short(titleOf(system.identity), 300))}</span>`;
  return html`<nav class="pager" aria-label="Neighbouring systems">${link(previous, "Previous")}${link(next, "Next")}</nav>`;
}

/** The page of one system: plots, flags with evidence, curve, planning figures, and every measurement with its origin. */
export function systemPage(view: SystemView, neighbours: Neighbours, tables: SystemTables): string {
  const title = titleOf(view.system.identity);
  const budgets = rowBudgets(view);
  return page(view.edition, {
    title,
    depth: 1,
    body: html`<h1>${short(title, 600)}</h1>
${summons(view)}${facts(view, neighbours)}
${pictures(view)}
${flagSection(view)}
${curveSection(view, tables.grid)}
${sourcesSection(view)}
${familySection(view, neighbours.family)}
${planningSection(tables.cooling)}
${measurementSection(view, budgets)}
${uncertaintySection(view, budgets)}
${pager(neighbours)}`,
  });
}
