import { type Edition, measurementId } from "../../records/edition.ts";
import type { Flag } from "../../records/fits.ts";
import { counted } from "./figures.ts";
import { causeLine, flagWords, rulingLine, sentence } from "./flag-section.ts";
import { type Html, html, short } from "./html.ts";
import { page } from "./page.ts";
import { rulingsByFlag, titleOf, waits } from "./system-view.ts";

/** Most flags told on the page; all are in flags.csv. */
const MOST_FLAGS = 1000;

/** What is decided first: what concerns a whole source or system, then series, then single points. */
const ORDER: Readonly<Record<Flag["scope"], number>> = { source: 0, system: 1, block: 2, measurement: 3 };

/** Flags that wait for a person, the widest first. */
export function byUrgency(edition: Edition): Flag[] {
  return edition.flags.filter((flag) => waits(edition, flag)).sort((a, b) => ORDER[a.scope] - ORDER[b.scope]);
}

/** One flag of a list: what, where with a link to its system, evidence, cause, what to look at. */
export function flagItem(edition: Edition, flag: Flag): Html {
  const system = flag.system === undefined ? undefined : edition.systems[flag.system];
  const target =
    flag.row !== undefined
      ? measurementId(edition, flag.row)
      : ((flag.source === undefined ? undefined : edition.sources[flag.source]?.name) ?? "");
  const where =
    system === undefined
      ? html`${target}`
      : html`<a href="systems/${system.id}.html#flags">${short(titleOf(system.identity), 300)}</a>${target === "" ? "" : html`, ${short(target, 120)}`}`;
  return html`<li><p><b>${flagWords(flag)}</b>: ${where}</p><p>${short(sentence(flag.evidence), 900)}.</p>${causeLine(flag) ?? ""}<p class="soft">${short(flag.lookAt, 400)}</p>${rulingLine(edition, flag) ?? ""}</li>`;
}

/** Every flag: those that need a person, those ruled on, then notices. */
export function flagsPage(edition: Edition): string {
  const urgent = byUrgency(edition);
  const ruled = edition.flags.filter((flag) => rulingsByFlag(edition).has(flag));
  const notices = edition.flags.filter((flag) => flag.severity === "notice" && !rulingsByFlag(edition).has(flag));
  const part = (flags: readonly Flag[]): Html => {
    const rest = flags.length - MOST_FLAGS;
    return flags.length === 0
      ? html`<p>None.</p>`
      : html`<ul class="todo">${flags.slice(0, MOST_FLAGS).map((flag) => flagItem(edition, flag))}</ul>${rest > 0 ? html`<p>${counted(rest, "more flag")} in flags.csv.</p>` : ""}`;
  };
  return page(edition, {
    title: "Flags",
    name: "flags.html",
    body: html`<h1>Flags</h1>
<p>A flag is a remark with evidence; it changes nothing by itself. A person decides by a ruling: keep, set aside, correct or ask.</p>
<h2>Need a person (${urgent.length})</h2>${part(urgent)}
<h2>Ruled on (${ruled.length})</h2>${part(ruled)}
<h2>Notices (${notices.length})</h2>${part(notices)}`,
  });
}
