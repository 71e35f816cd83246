import { kinds, type Problem } from "../../problems/catalogue.ts";
import type { Edition } from "../../records/edition.ts";
import { counted } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { page, wideTable } from "./page.ts";

/** Most entries listed of one kind; all are in refused.csv and summary.json. */
const MOST = 500;
/** Longest cell of a table on this page. */
const CELL = 240;

function place({ place: { file, line, column } }: Problem): Html {
  return html`<th scope="row">${short(file, 120)}${line === undefined ? "" : `:${line}`}</th><td>${short(column ?? "", 60)}</td>`;
}

/** Problems of one kind as a table; what is the same for all of them stands above it. */
function kindPart(code: Problem["code"], problems: readonly Problem[]): Html {
  const [first] = problems;
  const same = (of: "expected" | "mend") => problems.every((problem) => problem[of] === first?.[of]);
  const [oneExpected, oneMend] = [same("expected"), same("mend")];
  const rows = problems
    .slice(0, MOST)
    .map(
      (problem) =>
        html`<tr>${place(problem)}<td>${short(problem.found, CELL)}</td>${oneExpected ? "" : html`<td>${short(problem.expected, CELL)}</td>`}${oneMend ? "" : html`<td>${short(problem.mend, CELL)}</td>`}<td>${short(problem.raw ?? "", CELL)}</td></tr>`,
    );
  const heads = html`<tr><th scope="col">File and line</th><th scope="col">Column</th><th scope="col">Found</th>${oneExpected ? "" : html`<th scope="col">Expected</th>`}${oneMend ? "" : html`<th scope="col">To mend</th>`}<th scope="col">The row</th></tr>`;
  const table = html`<table><caption>${counted(problems.length, "time")}: ${code}</caption><thead>${heads}</thead><tbody>${rows}</tbody></table>`;
  return html`<h3 id="${code}">${kinds[code].meaning}</h3>
${oneExpected ? html`<p>Expected: ${short(first?.expected ?? "", 400)}.</p>` : ""}${oneMend ? html`<p>To mend: ${short(first?.mend ?? "", 400)}.</p>` : ""}
${wideTable(`${code}, ${counted(problems.length, "entry")}`, table)}${problems.length > MOST ? html`<p>${problems.length - MOST} more in refused.csv or summary.json.</p>` : ""}`;
}

/** Problems by kind, the most frequent kind first. */
function byKind(problems: readonly Problem[]): Html {
  const groups = new Map<Problem["code"], Problem[]>();
  for (const problem of problems) {
    const group = groups.get(problem.code);
    if (group) group.push(problem);
    else groups.set(problem.code, [problem]);
  }
  const ordered = [...groups].sort(([a, x], [b, y]) => y.length - x.length || (a < b ? -1 : 1));
  return html`${ordered.map(([code, group]) => kindPart(code, group))}`;
}

/** Every refused reading with what was found, what was expected and how to mend it; then notices, which stop nothing. */
export function refusedPage(edition: Edition): string {
  const { refused, notices } = edition;
  return page(edition, {
    title: "Refused readings",
    name: "refused.html",
    body: html`<h1>Refused readings</h1>
<p>${refused.length === 0 ? "None: every reading became a measurement." : "Nothing was guessed and nothing dropped: each line says what was found and how to mend it. A source refused as a whole counts once."}</p>
${refused.length === 0 ? "" : html`<h2 id="kinds">By kind of problem</h2>${byKind(refused)}`}
<h2 id="notices">Notices</h2>
<p>${notices.length === 0 ? "None." : "These stopped nothing; they tell how files were read."}</p>
${byKind(notices)}`,
  });
}
