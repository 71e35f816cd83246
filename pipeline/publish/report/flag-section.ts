import { type Edition, flagId, measurementId } from "../../records/edition.ts";
import type { Flag } from "../../records/fits.ts";
import { rulingPhrase } from "../../records/rulings.ts";
import { significant } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { rulingsByFlag, type SystemView, waits } from "./system-view.ts";

/** `off-curve` as people say it: `Off the curve`; a code without words of its own loses its hyphens. */
const WORDS: Readonly<Record<string, string>> = {
  "off-curve": "Point off the curve",
  "block-off-curve": "Series off the curve",
  "possible-more-stable-form": "Possible more stable form",
  "sources-disagree": "Sources disagree",
  "outside-liquid-range": "Outside the liquid range",
  "exact-repeat": "Exact repeat",
  "re-reported": "Reported again",
  "cannot-tell": "Cannot tell",
  "off-mixture": "Off the other compositions",
};

/** A flag's code in words. */
export function flagWords({ code }: Flag): string {
  const plain = code.replaceAll("-", " ");
  return WORDS[code] ?? sentence(plain);
}

/** A sentence that starts as one. */
export function sentence(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** What a flag stands on: a measurement with its file and line, a source, or the whole system. */
function flagTarget(edition: Edition, flag: Flag): Html {
  const { table, sources } = edition;
  if (flag.row !== undefined) {
    const source = sources[table.source[flag.row] as number];
    return html`${short(measurementId(edition, flag.row), 120)} (${short(source?.file ?? "", 120)}, line ${table.line[flag.row]})`;
  }
  return flag.source === undefined ? html`the system` : html`${sources[flag.source]?.name ?? ""}`;
}

/** Suspected cause with detail, probability and proposed value; nothing where none was sought. */
export function causeLine({ suspectedCause, causeDetail, causeProbability, proposedValue }: Flag): Html | undefined {
  if (suspectedCause === undefined) return undefined;
  if (suspectedCause === "no simple cause") {
    return html`<p>Suspected cause: none; of those that were tried no one is likelier than not.</p>`;
  }
  const detail = causeDetail ? html` (${short(causeDetail, 300)})` : "";
  const probability =
    causeProbability === undefined
      ? ""
      : `, probability ${causeProbability > 0.99 ? "above 0.99" : causeProbability.toFixed(2)}`;
  const value =
    proposedValue === undefined ? "" : `; the value would then be ${significant(proposedValue)}, in the unit reported`;
  return html`<p>Suspected cause: <b>${suspectedCause}</b>${detail}${probability}${value}.</p>`;
}

/** What a person has decided on a flag; nothing where nobody has. */
export function rulingLine(edition: Edition, flag: Flag): Html | undefined {
  const ruling = rulingsByFlag(edition).get(flag);
  return ruling === undefined ? undefined : html`<p><b>Ruling</b>: ${short(rulingPhrase(ruling), 700)}.</p>`;
}

function flagBox(edition: Edition, flag: Flag): Html {
  const needs = waits(edition, flag);
  const ruled = rulingLine(edition, flag);
  const kind = needs
    ? html`<span class="need">Needs a person.</span>`
    : html`<span class="soft">${ruled === undefined ? "Notice." : "Ruled on."}</span>`;
  return html`<div class="flag${needs ? "" : " notice"}"><p>${kind} <b>${flagWords(flag)}</b>: ${flagTarget(edition, flag)}</p>
<p>${short(sentence(flag.evidence), 1200)}.</p>${causeLine(flag) ?? ""}<p>${short(flag.lookAt, 600)}</p>${ruled ?? ""}
<p class="soft">Ruling target: <code>${short(flagId(edition, flag), 240)}</code></p></div>`;
}

/** Most flags of one system shown in full. */
const MOST_FLAGS = 200;

/** Every flag of a system with evidence, suspected cause and what to look at; those that need a person first. */
export function flagSection({ edition, flags }: SystemView): Html {
  if (flags.length === 0) return html`<h2 id="flags">Flags</h2><p>None.</p>`;
  const rest = flags.length - MOST_FLAGS;
  return html`<h2 id="flags">Flags</h2>${flags.slice(0, MOST_FLAGS).map((flag) => flagBox(edition, flag))}${rest > 0 ? html`<p>${rest} more in flags.csv.</p>` : ""}`;
}
