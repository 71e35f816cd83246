import type { Edition, SourceAccount } from "../../records/edition.ts";
import type { SourceStanding } from "../../records/fits.ts";
import type { System } from "../../records/systems.ts";
import { counted, median, percentOff, significant } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { page, wideTable } from "./page.ts";
import { inPercent } from "./source-plots.ts";
import { offsetWords } from "./sources-section.ts";
import { titleOf } from "./system-view.ts";

/** Most systems of a source that are named. */
const MOST_SYSTEMS = 40;

function accountTable({ sources }: Edition): Html {
  const rows = sources.map(
    (s) =>
      html`<tr><th scope="row"><a href="#${s.name}">${short(s.name, 80)}</a></th><td class="n">${s.readings}</td><td class="n">${s.accepted}</td><td class="n">${s.refused}</td><td class="n">${s.missing}</td><td>${s.card?.method ?? ""}</td><td>${s.refusedWhole ? "refused as a whole" : ""}</td></tr>`,
  );
  const sum = (of: "readings" | "accepted" | "refused" | "missing") => sources.reduce((n, source) => n + source[of], 0);
  return html`<table><caption>Readings = accepted + refused, source by source; cells marked as missing are no readings</caption><thead><tr><th scope="col">Source</th><th scope="col" class="n">Readings</th><th scope="col" class="n">Accepted</th><th scope="col" class="n">Refused</th><th scope="col" class="n">Missing</th><th scope="col">Method</th><th scope="col">Remark</th></tr></thead><tbody>${rows}</tbody><tfoot><tr><th scope="row">All</th><td class="n">${sum("readings")}</td><td class="n">${sum("accepted")}</td><td class="n">${sum("refused")}</td><td class="n">${sum("missing")}</td><td></td><td></td></tr></tfoot></table>`;
}

/** How a source stands to the others in one system. */
interface Place extends SourceStanding {
  readonly system: System;
}

/** Systems named in which a source lies furthest from the others. */
const FURTHEST = 3;

/** Where a source lies against the others over all its systems, and where it lies furthest; nothing where it is alone. */
function placeFact(places: readonly Place[]): Html {
  const told = places.filter(({ offset }) => Number.isFinite(offset));
  if (told.length === 0) return html``;
  const above = told.filter(({ offset }) => offset > 0).length;
  const middle = median(told.map(({ offset }) => offset));
  const sure = told.filter(({ low, high }) => low > 0 || high < 0);
  const furthest = [...sure].sort((a, b) => Math.abs(b.offset) - Math.abs(a.offset)).slice(0, FURTHEST);
  const named = furthest.map(
    (place, i) =>
      html`${i > 0 ? "; " : ""}<a href="systems/${place.system.id}.html#sources">${short(titleOf(place.system.identity), 200)}</a> ${offsetWords(place)} %`,
  );
  return html`<dt>Against other sources</dt><dd>${counted(told.length, "comparison")}, in the middle ${percentOff(inPercent(middle))} %; ${above} above, ${told.length - above} below.${sure.length === 0 ? " The 95 % limits of every offset hold 0." : html` The limits leave out 0 in ${sure.length}; furthest: ${named}.`}</dd>`;
}

/** Places of every source, by its position: one pass over the systems. */
function placesOf({ sources, systems, fits }: Edition): Place[][] {
  const places = sources.map((): Place[] => []);
  for (const system of systems) {
    for (const standing of fits[system.index]?.standings?.() ?? [])
      places[standing.source]?.push({ ...standing, system });
  }
  return places;
}

/** What is known of a source, each fact with its name; what is unknown says so, because it lowers the grade. */
function sourcePart(
  source: SourceAccount,
  within: number | undefined,
  systems: readonly System[],
  places: readonly Place[],
): Html {
  const { card } = source;
  const fact = (name: string, value: string | null | undefined) =>
    html`<dt>${name}</dt><dd>${value === undefined || value === null || value === "" ? html`<span class="soft">not stated</span>` : short(value, 400)}</dd>`;
  const scatter =
    source.accepted > 0 && within !== undefined && Number.isFinite(within)
      ? `${significant(100 * within, 2)} % (SD)`
      : "";
  const links = systems
    .slice(0, MOST_SYSTEMS)
    .map(
      (system, i) =>
        html`${i > 0 ? "; " : ""}<a href="systems/${system.id}.html">${short(titleOf(system.identity), 300)}</a>`,
    );
  return html`<section><h3 id="${source.name}">${short(source.name, 80)}</h3>
<dl class="facts">${fact("Title", card?.title)}${fact("Origin", card?.origin)}${fact("Reported by", card?.reported_by)}${fact("Laboratory", card?.laboratory)}${fact("Date", card?.date)}${fact("Method", card?.method)}${fact("Reference", card?.reference)}${card?.doi ? fact("DOI", card.doi) : ""}${fact("Licence", card?.licence)}
${fact("File", source.file)}${fact("SHA-256", source.sha256)}
${scatter === "" ? "" : fact("Scatter seen in its systems", scatter)}
${placeFact(places)}
${
  source.columnsNotUsed.length === 0
    ? ""
    : fact(
        "Columns not used",
        source.columnsNotUsed
          .slice(0, 50)
          .map((name) => name.slice(0, 80))
          .join("; "),
      )
}
<dt>Systems</dt><dd>${systems.length === 0 ? "none" : html`${links}${systems.length > MOST_SYSTEMS ? ` and ${counted(systems.length - MOST_SYSTEMS, "more system")}` : ""}`}</dd></dl></section>`;
}

/** Every source: its account, who measured, when, how and under which licence, the systems it measured and how it stands there to the others. */
export function sourcesPage(edition: Edition): string {
  const systemsOf = edition.sources.map(() => new Set<System>());
  for (const system of edition.systems) {
    for (const row of system.rows) systemsOf[edition.table.source[row] as number]?.add(system);
  }
  const places = placesOf(edition);
  const parts = edition.sources.map((source, i) =>
    sourcePart(source, edition.scales.within[i], [...(systemsOf[i] ?? [])], places[i] ?? []),
  );
  return page(edition, {
    title: "Sources",
    name: "sources.html",
    body: html`<h1>Sources</h1>
${wideTable("Account of the sources", accountTable(edition))}
<h2>One by one</h2>
<div class="cols">${parts}</div>`,
  });
}
