import { type Html, html, raw } from "./html.ts";

/** Ink on paper, and paper on ink in the dark; every pair of text and ground has a contrast of at least 4.5. */
const STYLE = `
:root{--paper:#fcfbf8;--ink:#22262b;--soft:#565d66;--line:#d5d2c8;--panel:#f3f1ea;--accent:#1d5c74;--mark:#8a3b12}
@media (prefers-color-scheme:dark){:root{--paper:#171b1f;--ink:#e6e4de;--soft:#a9b0b7;--line:#3a4148;--panel:#20262b;--accent:#7cc3de;--mark:#f0a878}}
*{box-sizing:border-box}
body{margin:0;background:var(--paper);color:var(--ink);font:16px/1.5 Georgia,"Times New Roman",serif}
main,header,footer{max-width:76rem;margin:0 auto;padding:0 1.25rem}
header{padding-top:1rem;border-bottom:1px solid var(--line)}
header p{margin:0 0 .6rem;color:var(--soft)}
nav a{margin-right:1.2rem}
a{color:var(--accent)}
h1{font-size:1.6rem;margin:1.2rem 0 .4rem;overflow-wrap:anywhere}
h2{font-size:1.2rem;margin:1.8rem 0 .5rem}
p,li{max-width:70ch;overflow-wrap:anywhere}
table{border-collapse:collapse;font:.86rem/1.4 ui-monospace,"DejaVu Sans Mono",monospace}
caption{text-align:left;color:var(--soft);padding:.2rem 0;font:.95rem Georgia,serif}
th,td{padding:.2rem .7rem .2rem 0;border-bottom:1px solid var(--line);text-align:left;vertical-align:top;overflow-wrap:anywhere;max-width:34rem}
td.n,th.n{text-align:right;white-space:nowrap}
.wide{overflow-x:auto}
.facts{display:flex;flex-wrap:wrap;gap:.4rem 2rem;padding:0;list-style:none}
.facts li{border-left:3px solid var(--line);padding-left:.7rem}
.facts b{display:block;font-size:1.3rem}
.flag{border-left:4px solid var(--mark);background:var(--panel);padding:.5rem .9rem;margin:.6rem 0}
.flag p{margin:.15rem 0}
figure{margin:1rem 0}
figcaption{color:var(--soft);max-width:70ch}
svg{max-width:100%;height:auto;background:var(--paper)}
svg text{fill:var(--ink);font:13px ui-monospace,"DejaVu Sans Mono",monospace}
svg .axis{stroke:var(--soft)}svg .grid{stroke:var(--line)}
svg .curve{fill:none;stroke:var(--ink);stroke-width:1.6}
svg .band{fill:var(--accent);opacity:.16}svg .outer{fill:none;stroke:var(--accent);stroke-dasharray:5 4}
svg .point{fill:var(--paper);stroke:var(--accent);stroke-width:1.6}
svg .off{stroke:var(--mark);stroke-width:2.2}
footer{margin-top:2.5rem;padding-top:.6rem;padding-bottom:2rem;border-top:1px solid var(--line);color:var(--soft);font-size:.9rem}
:focus-visible{outline:3px solid var(--accent);outline-offset:2px}
@media print{body{background:#fff;color:#000;font-size:11pt}nav{display:none}.wide{overflow:visible}figure,tr,.flag{break-inside:avoid}}
`;

/** The cautions that stand under every page. */
export const CAUTIONS =
  "This report describes measurements; it approves no operation. Hot solvents are flammable and toxic (nearly every organic " +
  "solvent is above its flash point when hot): heat with suitable equipment away from ignition sources, never in a closed " +
  "vessel. Oxidisers, energetic solutes (nitrates, perchlorates, azides, peroxides) and peroxide-forming solvents are never " +
  "evaporated to dryness. Follow the safety data sheet, local codes and the judgement of a licensed or responsible person.";

/** A whole page: opens from disk, asks nothing of a network. `depth` is how many folders below the report's root it lies. */
export function page(title: string, edition: { readonly title: string }, depth: number, body: Html): string {
  const root = "../".repeat(depth);
  const shell = html`<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${title}</title>
<style>${raw(STYLE)}</style>
</head>
<body>
<header>
<nav aria-label="Report"><a href="${root}index.html">Overview</a><a href="${root}refused.html">Refused readings</a><a href="${root}sources.html">Sources</a></nav>
<p>${edition.title}</p>
</header>
<main>
${body}
</main>
<footer><p>${CAUTIONS}</p></footer>
</body>
</html>
`;
  return shell.html;
}
