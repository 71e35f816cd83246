import { type Edition, flagId } from "../../records/edition.ts";
import type { Flag } from "../../records/fits.ts";
import type { System } from "../../records/systems.ts";
import { celsius } from "./figures.ts";
import { type Html, html } from "./html.ts";
import { page } from "./page.ts";

/** Flags listed on the overview before it refers to `flags.csv`. */
const FLAGS_SHOWN = 50;

/** Path of a system's page, from the report's root. */
export function systemFile(system: System): string {
  return `systems/${system.id}.html`;
}

function facts(entries: readonly (readonly [string, number])[]): Html {
  return html`<ul class="facts">${entries.map(([name, count]) => html`<li><b>${count}</b>${name}</li>`)}</ul>`;
}

function flagLine(edition: Edition, flag: Flag): Html {
  const system = flag.system === undefined ? undefined : edition.systems[flag.system];
  const id = flagId(edition, flag);
  const link = system === undefined ? html`${id}` : html`<a href="${systemFile(system)}">${id}</a>`;
  return html`<li>${link}: ${flag.evidence}${flag.suspectedCause ? ` Suspected cause: ${flag.suspectedCause}.` : ""}</li>`;
}

function systemRow(edition: Edition, system: System, flagged: number): Html {
  const { solute, solidForm, solvent, composition, medium } = system.identity;
  const points = edition.fits[system.index]?.robust.points.temperatureK ?? new Float64Array();
  const range = points.length > 0 ? `${celsius(Math.min(...points))} to ${celsius(Math.max(...points))}` : "";
  const models = edition.fits[system.index]?.curves.map((curve) => curve.model).join(", ");
  return html`<tr><td><a href="${systemFile(system)}">${solute}</a></td><td>${solidForm}</td><td>${[solvent, composition, medium].filter((part) => part !== "").join(", ")}</td><td class="n">${system.rows.length}</td><td class="n">${range}</td><td>${models || "none"}</td><td>${edition.grades[system.index]?.grade}</td><td class="n">${flagged}</td></tr>`;
}

/** The first page: the account, what needs a person first, then every system by solute. */
export function overviewPage(edition: Edition, flagsOfSystem: ReadonlyMap<number, readonly Flag[]>): string {
  const sum = (of: "readings" | "accepted" | "refused" | "missing") =>
    edition.sources.reduce((total, s) => total + s[of], 0);
  const blocking = edition.flags.filter((flag) => flag.severity === "blocking");
  const bySolute = [...edition.systems].sort((a, b) => (a.key < b.key ? -1 : 1));
  return page(
    edition.collection.title,
    edition.collection,
    0,
    html`<h1>${edition.collection.title}</h1>
${facts([
  ["readings", sum("readings")],
  ["accepted", sum("accepted")],
  ["refused", sum("refused")],
  ["cells marked missing", sum("missing")],
  ["sources", edition.sources.length],
  ["systems", edition.systems.length],
  ["flags that need a person", blocking.length],
])}
<h2>What needs a person first</h2>
${blocking.length === 0 ? html`<p>Nothing: no flag needs a decision.</p>` : html`<ul>${blocking.slice(0, FLAGS_SHOWN).map((flag) => flagLine(edition, flag))}</ul>`}
${blocking.length > FLAGS_SHOWN ? html`<p>${blocking.length - FLAGS_SHOWN} more in flags.csv.</p>` : ""}
${sum("refused") > 0 ? html`<p><a href="refused.html">${sum("refused")} refused readings</a>, each with the way to mend it.</p>` : ""}
<h2>Systems</h2>
<div class="wide" tabindex="0" role="region" aria-label="Systems"><table>
<thead><tr><th>Solute</th><th>Solid form</th><th>Solvent</th><th class="n">Rows</th><th class="n">°C</th><th>Curve</th><th>Proposed grade</th><th class="n">Flags</th></tr></thead>
<tbody>${bySolute.map((system) => systemRow(edition, system, flagsOfSystem.get(system.index)?.length ?? 0))}</tbody></table></div>`,
  );
}
