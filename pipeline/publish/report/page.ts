import { createHash } from "node:crypto";
import type { Edition } from "../../records/edition.ts";
import { type Html, html, raw, short } from "./html.ts";
import { STYLE } from "./style.ts";

/** Pages that every page links to, in the order of the navigation. */
const NAVIGATION = [
  ["index.html", "Overview"],
  ["flags.html", "Flags"],
  ["refused.html", "Refused readings"],
  ["sources.html", "Sources"],
  ["methods.html", "Methods"],
  ["settings.html", "Settings"],
  ["cautions.html", "Cautions"],
] as const;

export type PageName = (typeof NAVIGATION)[number][0];

/** What a page is made of. */
export interface PageParts {
  readonly title: string;
  /** The page itself, where it is one of the navigation. */
  readonly name?: PageName;
  /** Folders between the page and the report's root. */
  readonly depth?: number;
  readonly body: Html;
  /** A script of this program's own; nothing else can run on a page. */
  readonly script?: string;
}

const CAUTION =
  "This report describes measurements; it approves no operation. Hot solvents are flammable and toxic; follow the safety " +
  "data sheet, local codes and the judgement of a licensed or responsible person.";

/** A table in a region of its own that scrolls sideways where the page is narrow, reachable by keyboard. */
export function wideTable(label: string, table: Html): Html {
  return html`<div class="wide" tabindex="0" role="region" aria-label="${label}">${table}</div>`;
}

/** A whole page in one file: opens from disk, asks nothing of a network, runs no script but its own. */
export function page(edition: Edition, { title, name, depth = 0, body, script }: PageParts): string {
  const root = raw("../".repeat(depth));
  const links = NAVIGATION.map(
    ([file, label]) =>
      html`<li><a href="${root}${file}"${raw(file === name ? ' aria-current="page"' : "")}>${label}</a></li>`,
  );
  const hash = script === undefined ? "'none'" : `'sha256-${createHash("sha256").update(script).digest("base64")}'`;
  const policy = `default-src 'none'; style-src 'unsafe-inline'; script-src ${hash}; base-uri 'none'; form-action 'none'`;
  return html`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${raw(policy)}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${short(title, 120)}</title>
<style>${raw(STYLE)}</style>
</head>
<body>
<a class="skip" href="#content">Skip to content</a>
<header><div class="head"><p>${short(edition.collection.title, 120)}</p><nav aria-label="Report"><ul>${links}</ul></nav></div></header>
<main id="content" tabindex="-1">
${body}
</main>
<footer><p>${CAUTION} <a href="${root}cautions.html">All cautions</a>.</p><p>saltern ${edition.programVersion}</p></footer>
${script === undefined ? "" : raw(`<script>${script}</script>`)}
</body>
</html>
`.html;
}
