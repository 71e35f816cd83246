import type { Curve } from "../../records/fits.ts";
import { textOf } from "../../records/measurements.ts";
import { type DrawnCamp, drawnCamps } from "./camp-layer.ts";
import { equationHtml } from "./curve-section.ts";
import { celsius, counted, significant, sourceLetter } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { wideTable } from "./page.ts";
import { percentFromLn, type SystemView } from "./system-view.ts";

/** Most temperatures at which readings are held side by side. */
const MOST_TEMPERATURES = 6;
/** Steps between them, K: the finest that gives no more than these. */
const STEPS_K = [1, 2, 5, 10, 20, 50, 100] as const;

/** Round temperatures (°C) that all curves cover, in K; their middle where none is round, none where they share nothing. */
export function commonTemperatures(curves: readonly Curve[]): number[] {
  const low = Math.max(...curves.map(({ temperatureRangeK }) => temperatureRangeK[0]));
  const high = Math.min(...curves.map(({ temperatureRangeK }) => temperatureRangeK[1]));
  if (!(high >= low)) return [];
  for (const step of STEPS_K) {
    const first = Math.ceil((low - 273.15) / step - 1e-9) * step;
    const count = Math.floor((high - 273.15 - first) / step + 1e-9) + 1;
    if (count > MOST_TEMPERATURES) continue;
    if (count < 1) break;
    return Array.from({ length: count }, (_, i) => Math.min(high, Math.max(low, first + i * step + 273.15)));
  }
  return [(low + high) / 2];
}

/** A factor to three digits, with the limits that both curves' own limits give it. */
function ratioWords(curve: Curve, first: Curve, T: number): string {
  const difference = curve.evaluate(T) - first.evaluate(T);
  // Both contain the usual offset of a source, and are independent.
  const half = Math.hypot(curve.limits(T).curve, first.limits(T).curve);
  const [mid, low, high] = [0, -half, half].map((shift) => significant(Math.exp(difference + shift), 3));
  return `${mid} (${low} to ${high})`;
}

function valueTable(view: SystemView, camps: readonly (DrawnCamp & { readonly curve: Curve })[]): Html {
  const temperatures = commonTemperatures(camps.map(({ curve }) => curve));
  if (temperatures.length === 0) return html`<p>The readings have no temperature in common.</p>`;
  const { system } = view;
  const letter = system.fitBasis === "ln x" ? "x" : "r";
  const first = camps[0]?.curve as Curve;
  const rows = temperatures.map((T) => {
    const cells = camps.map(({ curve }, i) => {
      const ln = curve.evaluate(T);
      const ratio = i === 0 ? "" : html`<td class="n">${ratioWords(curve, first, T)}</td>`;
      return html`<td class="n">${significant(percentFromLn(ln, system), 4)}</td><td class="n">${significant(Math.exp(ln), 4)}</td>${ratio}`;
    });
    return html`<tr><th scope="row" class="n">${celsius(T)}</th>${cells}</tr>`;
  });
  const heads = camps.map(
    ({ letters }, i) =>
      html`<th scope="col" class="n">${letters}: g/100 g solvent</th><th scope="col" class="n">${letters}: <var>${letter}</var></th>${i === 0 ? "" : html`<th scope="col" class="n">${letters} : ${camps[0]?.letters ?? ""} (95 % limits)</th>`}`,
  );
  return wideTable(
    "Readings side by side",
    html`<table><caption>What each reading gives at common temperatures, on both bases, and their ratio</caption><thead><tr><th scope="col" class="n">°C</th>${heads}</tr></thead><tbody>${rows}</tbody></table>`,
  );
}

/** Most publications named for a source; every row names its own in the table of measurements. */
const MOST_PUBLICATIONS = 3;

/** Publications of a source: those its rows name, else that of its card. */
function publications({ edition, system }: SystemView, source: number): string {
  const { table, sources } = edition;
  const card = sources[source]?.card;
  const own = new Set<string>();
  for (const row of system.rows) if (table.source[row] === source) own.add(textOf(table, table.doi[row] as number));
  own.delete("");
  if (own.size === 0) return card?.doi ? `doi ${card.doi}` : (card?.reference ?? "");
  const named = [...own].slice(0, MOST_PUBLICATIONS).map((doi) => `doi ${doi}`);
  return named.join("; ") + (own.size > MOST_PUBLICATIONS ? ` and ${own.size - MOST_PUBLICATIONS} more` : "");
}

function originTable(view: SystemView, camps: readonly DrawnCamp[], letter: string): Html {
  const stated = (value: string | null | undefined) =>
    value ? short(value, 200) : html`<span class="soft">not stated</span>`;
  const rows = camps.flatMap(({ sources: own, curve, letters }) =>
    own.map((source, i) => {
      const account = view.edition.sources[source];
      const card = account?.card;
      const words = i > 0 ? html`with ${letters}` : curve === undefined ? html`no curve` : curveWords(curve, letter);
      return html`<tr><th scope="row"><b>${sourceLetter(view.sources.indexOf(source))}</b> ${short(account?.name ?? "", 80)}</th><td>${stated(card?.reported_by)}</td><td>${stated(card?.laboratory)}</td><td>${stated(card?.date)}</td><td>${stated(card?.method)}</td><td class="w">${stated(publications(view, source))}</td><td class="w">${words}</td></tr>`;
    }),
  );
  return wideTable(
    "Who, when and how",
    html`<table><caption>Who reports what, when and how</caption><thead><tr><th scope="col">Source</th><th scope="col">Reported by</th><th scope="col">Laboratory</th><th scope="col">Date</th><th scope="col">Method</th><th scope="col">Publication</th><th scope="col">Its curve, alone</th></tr></thead><tbody>${rows}</tbody></table>`,
  );
}

function curveWords({ model, coefficients, n, temperatureRangeK: [low, high] }: Curve, letter: string): Html {
  const values = coefficients.map(({ name, value }) => `${name} = ${significant(value, 7)}`).join(", ");
  return html`${model}: ${equationHtml(model, letter)}, ${values}; ${counted(n, "point")}, ${celsius(low)} to ${celsius(high)} °C`;
}

/** Both (or all) readings of a system without a majority, side by side; nothing where the sources agree. */
export function conflictReadings(view: SystemView): Html {
  const camps = drawnCamps(view);
  if (camps.length === 0) return html``;
  const letter = view.system.fitBasis === "ln x" ? "x" : "r";
  const fitted = camps.flatMap((camp) => (camp.curve === undefined ? [] : [{ ...camp, curve: camp.curve }]));
  return html`<p class="lead">The sources disagree beyond their uncertainty and none of ${counted(camps.length, "reading")} has a majority of laboratories. No curve is published and nothing is set aside; the readings are drawn as broken lines and stand side by side here. The lower one could be that of a more stable form.</p>
${fitted.length < 2 ? "" : valueTable(view, fitted)}
${originTable(view, camps, letter)}`;
}
