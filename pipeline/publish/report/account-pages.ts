import type { Edition } from "../../records/edition.ts";
import { type Html, html } from "./html.ts";
import { page } from "./page.ts";

/** Every refused reading with what was found, what was expected and how to mend it. */
export function refusedPage(edition: Edition): string {
  const rows = edition.refused.map(
    ({ code, place, found, expected, mend }): Html =>
      html`<tr><td>${place.source}</td><td>${place.file}${place.line === undefined ? "" : `:${place.line}`}</td><td>${place.column}</td><td>${code}</td><td>${found}</td><td>${expected}</td><td>${mend}</td></tr>`,
  );
  return page(
    "Refused readings",
    edition.collection,
    0,
    html`<h1>Refused readings</h1>
<p>${edition.refused.length === 0 ? "None: every reading became a measurement." : "Nothing was guessed: each line says what was found and how to mend it."}</p>
<div class="wide" tabindex="0" role="region" aria-label="Refused readings"><table><thead><tr><th>Source</th><th>File and line</th><th>Column</th><th>Problem</th><th>Found</th><th>Expected</th><th>To mend</th></tr></thead><tbody>${rows}</tbody></table></div>`,
  );
}

/** Every source with who, when, how, and its account. */
export function sourcesPage(edition: Edition): string {
  const rows = edition.sources.map(
    (s): Html =>
      html`<tr><td>${s.name}</td><td>${s.card?.title ?? ""}</td><td>${s.card?.origin}</td><td>${s.card?.reported_by ?? ""}</td><td>${s.card?.date ?? ""}</td><td>${s.card?.method}</td><td>${s.card?.reference ?? ""}</td><td class="n">${s.readings}</td><td class="n">${s.accepted}</td><td class="n">${s.refused}</td><td>${s.refusedWhole ? "refused as a whole" : s.columnsNotUsed.length > 0 ? `columns not used: ${s.columnsNotUsed.join(", ")}` : ""}</td></tr>`,
  );
  return page(
    "Sources",
    edition.collection,
    0,
    html`<h1>Sources</h1>
<div class="wide" tabindex="0" role="region" aria-label="Sources"><table><thead><tr><th>Source</th><th>Title</th><th>Origin</th><th>Reported by</th><th>Date</th><th>Method</th><th>Reference</th><th class="n">Readings</th><th class="n">Accepted</th><th class="n">Refused</th><th>Remarks</th></tr></thead><tbody>${rows}</tbody></table></div>`,
  );
}
