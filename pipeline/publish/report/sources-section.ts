import type { SourceStanding } from "../../records/fits.ts";
import { conflictReadings } from "./conflict-readings.ts";
import { celsius, counted, fixed, percentOff, significant, sourceLetter } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { wideTable } from "./page.ts";
import { inPercent, offsetPlot, withoutPlot } from "./source-plots.ts";
import type { SystemView } from "./system-view.ts";

/** `+3.1 (−0.4 to +6.8)` of an offset in ln value; why there is none otherwise. */
export function offsetWords({ offset, low, high }: Pick<SourceStanding, "offset" | "low" | "high">): string {
  if (!Number.isFinite(offset)) return "no temperature in common";
  return `${percentOff(inPercent(offset))} (${percentOff(inPercent(low))} to ${percentOff(inPercent(high))})`;
}

/** Largest change of the curve in percent; why there is none otherwise. */
export function influenceWords({ influence, n }: Pick<SourceStanding, "influence" | "n">): string {
  if (n === 0) return "not in the curve";
  return Number.isFinite(influence) ? `${fixed(inPercent(influence), influence < 0.1 ? 1 : 0)}` : "no curve without it";
}

function withoutWords({ without }: SourceStanding): string {
  if (without === undefined) return "";
  const [low, high] = without.temperatureRangeK;
  const coefficients = without.coefficients.map(({ name, value }) => `${name} = ${significant(value, 7)}`).join(", ");
  return `${without.model}, ${coefficients}; ${counted(without.n, "point")}, ${celsius(low)} to ${celsius(high)} °C`;
}

function standingTable(view: SystemView, standings: readonly SourceStanding[]): Html {
  const { edition, sources } = view;
  const branches = new Set(standings.map(({ branch }) => branch)).size > 1;
  const conflict = view.fit?.robust.agreement === "conflict";
  const rows = standings.map((standing) => {
    const account = edition.sources[standing.source];
    const card = account?.card;
    return html`<tr><th scope="row"><b>${sourceLetter(sources.indexOf(standing.source))}</b> <a href="../sources.html#${account?.name ?? ""}">${short(account?.name ?? "", 80)}</a></th><td>${card?.laboratory ? short(card.laboratory, 80) : html`<span class="soft">not stated</span>`}</td>${branches ? html`<td class="n">${standing.branch}</td>` : ""}<td class="n">${standing.n}</td><td class="n">${offsetWords(standing)}</td>${conflict ? "" : html`<td class="n">${influenceWords(standing)}</td><td class="w">${withoutWords(standing)}</td>`}</tr>`;
  });
  return html`<table><caption>Offset: mean deviation of a source from the curve of the others, with 95 % limits. Influence: largest change of the curve within its range when the source is left out.</caption><thead><tr><th scope="col">Source</th><th scope="col">Laboratory</th>${branches ? html`<th scope="col" class="n">Branch</th>` : ""}<th scope="col" class="n">Points in the curve</th><th scope="col" class="n">Offset, %</th>${conflict ? "" : html`<th scope="col" class="n">Influence, %</th><th scope="col">Curve without it</th>`}</tr></thead><tbody>${rows}</tbody></table>`;
}

/** Sources of one stated laboratory are told: they count as one vote. */
function sharedLaboratories({ edition, sources }: SystemView): Html {
  const letters = new Map<string, string[]>();
  sources.forEach((source, i) => {
    const laboratory = edition.sources[source]?.card?.laboratory ?? "";
    if (laboratory !== "") letters.set(laboratory, [...(letters.get(laboratory) ?? []), sourceLetter(i)]);
  });
  const shared = [...letters].filter(([, own]) => own.length > 1);
  return html`${shared.map(([laboratory, own]) => html`<p>${own.join(", ")} come from one laboratory (${short(laboratory, 120)}): together they have the vote and the weight of one source.</p>`)}`;
}

/**
 * How the sources of a system stand to one another: offsets with limits, curves without each of them, and where they
 * disagree without a majority what each says. Nothing where there is one source.
 */
export function sourcesSection(view: SystemView): Html {
  const standings = view.fit?.standings?.() ?? [];
  if (standings.length === 0) return html``;
  const [offsets, without] = [offsetPlot(view, standings), withoutPlot(view, standings)];
  const figures =
    offsets === undefined
      ? ""
      : html`<div class="plots"><figure>${offsets}<figcaption>Offset of each source from the curve of the others, with 95 % limits${(view.fit?.curves.length ?? 0) > 1 ? "; beside its letter the branch" : ""}.</figcaption></figure>${without === undefined ? html`<div></div>` : html`<figure>${without}<figcaption>The curve with one source left out, against the published one; shaded its 95 % limits.</figcaption></figure>`}</div>`;
  return html`<h2 id="sources">Sources</h2>
${conflictReadings(view)}${wideTable("How the sources stand to one another", standingTable(view, standings))}
${sharedLaboratories(view)}${figures}
<p><a href="../methods.html#sources">How offsets and influence are worked out</a>.</p>`;
}
