import { type Edition, statusOf } from "../../records/edition.ts";
import type { Flag } from "../../records/fits.ts";
import type { System } from "../../records/systems.ts";
import { massRatioFromLn } from "../mass-ratio.ts";
import { celsius, counted, fixed, significant } from "./figures.ts";
import { byUrgency, flagItem } from "./flags-page.ts";
import { type Html, html, raw, short } from "./html.ts";
import { mixtureList } from "./mixture-page.ts";
import { OVERVIEW_SCRIPT } from "./overview-script.ts";
import { page, wideTable } from "./page.ts";
import { waits } from "./system-view.ts";

/** Flags told on the overview before it refers to the page of flags. */
const FLAGS_SHOWN = 12;
/** Ends of the small picture of a temperature range, °C. */
const BAR = [-20, 120] as const;
/** Temperature at which the overview tells a solubility, K. */
const ROOM_K = 298.15;

/** Path of a system's page, from the report's root. */
export function systemFile(system: System): string {
  return `systems/${system.id}.html`;
}

function tally(entries: readonly (readonly [number, Html])[]): Html {
  return html`<ul class="tally">${entries.map(([count, words]) => html`<li><b>${count}</b>${words}</li>`)}</ul>`;
}

/** The account as the sum it is, then what came of the measurements. */
function accountOf(edition: Edition): Html {
  const sum = (of: "readings" | "accepted" | "refused" | "missing") =>
    edition.sources.reduce((total, source) => total + source[of], 0);
  const status = { kept: 0, "set aside": 0, interval: 0, "not fitted": 0 };
  for (let row = 0; row < edition.table.count; row++) status[statusOf(edition, row)]++;
  const curves = edition.fits.reduce((total, fit) => total + fit.curves.length, 0);
  const grades = new Map<string, number>();
  for (const { grade } of edition.grades) grades.set(grade, (grades.get(grade) ?? 0) + 1);
  const gradeWords = ["recommended", "tentative", "doubtful", "rejected"]
    .filter((grade) => grades.has(grade))
    .map((grade) => `${grades.get(grade)} ${grade}`)
    .join(", ");
  return html`<p class="lead">${counted(sum("readings"), "reading")} = ${sum("accepted")} accepted + <a href="refused.html">${sum("refused")} refused</a>; ${counted(sum("missing"), "cell")} marked as missing.</p>
${tally([
  [edition.sources.length, html`<a href="sources.html">sources</a>`],
  [edition.systems.length, html`systems`],
  [curves, html`curves`],
  [byUrgency(edition).length, html`<a href="flags.html">flags that need a person</a>`],
])}
<p>Measurements: ${status.kept} kept, ${status["set aside"]} set aside, ${status.interval} known as a range, ${status["not fitted"]} shown and not fitted. Proposed grades: ${gradeWords || "none"}.</p>`;
}

function urgent(edition: Edition): Html {
  const flags = byUrgency(edition);
  const refused = edition.refused.length;
  const lost =
    refused === 0
      ? ""
      : html`<p><a href="refused.html">${counted(refused, "refused entry").replace("entrys", "entries")}</a>, each with the way to mend it.</p>`;
  if (flags.length === 0) return html`<p>No flag needs a decision.</p>${lost}`;
  const rest = flags.length - FLAGS_SHOWN;
  return html`<ol class="todo">${flags.slice(0, FLAGS_SHOWN).map((flag) => flagItem(edition, flag))}</ol>
${rest > 0 ? html`<p><a href="flags.html">${rest} more flags that need a person</a>.</p>` : ""}${lost}`;
}

/** Temperatures of a range as a bar between -20 °C and 120 °C; the words beside it say the same. */
function rangeBar(lowK: number, highK: number): Html {
  const [from, to] = BAR;
  const at = (kelvin: number) =>
    Math.round((90 * Math.min(Math.max(kelvin - 273.15 - from, 0), to - from)) / (to - from));
  const [low, high] = [at(lowK), at(highK)];
  return raw(
    `<svg class="rangebar" viewBox="0 0 90 10" aria-hidden="true"><path class="track" d="M0,4H90V6H0Z"/><path class="reach" d="M${low},2H${Math.max(high, low + 2)}V8H${low}Z"/></svg>`,
  );
}

/** Solubility at 25 °C from the curve, g/100 g solvent; "" where no curve reaches it. */
function atRoom(edition: Edition, system: System): string {
  const curve = edition.fits[system.index]?.curves.find(
    ({ temperatureRangeK: [low, high] }) => ROOM_K >= low - 1e-9 && ROOM_K <= high + 1e-9,
  );
  if (curve === undefined) return "";
  const [low, high] = curve.temperatureRangeK;
  return significant(100 * massRatioFromLn(curve.evaluate(Math.min(high, Math.max(low, ROOM_K))), system), 3);
}

function systemRow(edition: Edition, system: System, flags: readonly Flag[]): Html {
  const { solidForm, solvent, composition, medium } = system.identity;
  const { table } = edition;
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  const sources = new Set<number>();
  for (const row of system.rows) {
    low = Math.min(low, table.temperatureK[row] as number);
    high = Math.max(high, table.temperatureK[row] as number);
    sources.add(table.source[row] as number);
  }
  const curves = edition.fits[system.index]?.curves ?? [];
  const models = [...new Set(curves.map(({ model }) => model))].join(", ");
  const blocking = flags.filter((flag) => waits(edition, flag)).length;
  const liquid = [solvent, composition, medium].filter((part) => part !== "").join(", ");
  const flagged =
    blocking === 0 ? (flags.length === 0 ? "" : counted(flags.length, "remark")) : `${blocking} to decide`;
  return html`<tr class="system"><th scope="row"><a href="${systemFile(system)}">${short(liquid, 90)}</a></th><td>${short(solidForm, 60)}</td><td class="n">${system.rows.length}</td><td class="n">${sources.size}</td><td class="n">${low === high ? celsius(low) : `${fixed(low - 273.15, 0)} to ${fixed(high - 273.15, 0)}`}</td><td>${rangeBar(low, high)}</td><td class="n">${atRoom(edition, system)}</td><td>${models || "none"}${curves.length > 1 ? `, ${curves.length} branches` : ""}</td><td>${edition.grades[system.index]?.grade ?? ""}</td><td>${flagged}</td></tr>`;
}

/** Systems by solute, each solute a group of rows under its name. */
function systemTable(
  edition: Edition,
  ordered: readonly System[],
  flagsOf: ReadonlyMap<number, readonly Flag[]>,
): Html {
  const groups: { solute: string; rows: Html[] }[] = [];
  for (const system of ordered) {
    const row = systemRow(edition, system, flagsOf.get(system.index) ?? []);
    const last = groups.at(-1);
    if (last?.solute === system.identity.solute) last.rows.push(row);
    else groups.push({ solute: system.identity.solute, rows: [row] });
  }
  const bodies = groups.map(
    ({ solute, rows }) =>
      html`<tbody class="group"><tr><th colspan="10" scope="rowgroup">${short(solute, 120)}</th></tr>${rows}</tbody>\n`,
  );
  return html`<table><caption>Systems by solute. Range: lowest and highest temperature measured (bar: −20 to 120 °C). Solubility in g/100 g solvent, from the curve.</caption>
<thead><tr><th scope="col">Solvent</th><th scope="col">Solid form</th><th scope="col" class="n">Measured</th><th scope="col" class="n">Sources</th><th scope="col" class="n">Range, °C</th><td></td><th scope="col" class="n">At 25 °C</th><th scope="col">Curve</th><th scope="col">Proposed grade</th><th scope="col">Flags</th></tr></thead>${bodies}</table>`;
}

/** The first page: the account, what needs a person first, then every system by solute. `ordered`: by solute. */
export function overviewPage(
  edition: Edition,
  ordered: readonly System[],
  flagsOf: ReadonlyMap<number, readonly Flag[]>,
): string {
  const { title, steward } = edition.collection;
  return page(edition, {
    title,
    name: "index.html",
    script: OVERVIEW_SCRIPT,
    body: html`<h1>${short(title, 240)}</h1>
${steward === "" ? "" : html`<p class="soft">Looked after by ${short(steward, 160)}.</p>`}
${accountOf(edition)}
<h2>What needs a person first</h2>
${urgent(edition)}
${mixtureList(edition.mixtures.models)}
<h2 id="systems">Systems</h2>
<div class="search" id="search" hidden><label for="filter">Show systems with</label><input id="filter" type="search" autocomplete="off" spellcheck="false" aria-describedby="told"><span id="told" role="status"></span></div>
${ordered.length === 0 ? html`<p>None: no reading became a measurement.</p>` : wideTable("Systems by solute", systemTable(edition, ordered, flagsOf))}`,
  });
}
