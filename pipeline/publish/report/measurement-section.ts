import { measurementId, type SourceAccount } from "../../records/edition.ts";
import { textOf } from "../../records/measurements.ts";
import { rulingPhrase } from "../../records/rulings.ts";
import { celsius, fixed, percentOff, significant, sourceLetter } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { wideTable } from "./page.ts";
import type { DrawnPoint, SystemView } from "./system-view.ts";
import type { RowBudget } from "./uncertainty-section.ts";

/** Most rows listed on a page; all are in measurements.csv. */
const MOST_ROWS = 1000;
/** Most characters of a reported value, its unit and other short cells. */
const CELL = 60;

/** Texts that recur, each listed once and referred to by number. */
interface Notes {
  readonly numberOf: (text: string) => string;
  readonly list: () => Html | string;
}

function notesOf(prefix: string): Notes {
  const numbers = new Map<string, number>();
  return {
    numberOf: (text) => {
      if (text === "") return "";
      const number = numbers.get(text) ?? numbers.size + 1;
      numbers.set(text, number);
      return `${prefix}${number}`;
    },
    list: () =>
      numbers.size === 0
        ? ""
        : html`<ul class="legend">${[...numbers].map(([text, n]) => html`<li><b>${prefix}${n}</b><span>${short(text, 700)}</span></li>`)}</ul>`,
  };
}

/** What every row of the table is made with. */
interface TableContext {
  readonly view: SystemView;
  readonly budgets: readonly RowBudget[];
  /** Assumptions made, and references of single rows. */
  readonly assumptions: Notes;
  readonly references: Notes;
  /** Decisions of people on single rows. */
  readonly decisions: Notes;
  /** True if any row carries columns of its source. */
  readonly carries: boolean;
}

const range = (low: number, high: number, digits: number): string =>
  Number.isNaN(low)
    ? `up to ${significant(high, digits)}`
    : Number.isNaN(high)
      ? `from ${significant(low, digits)}`
      : `${significant(low, digits)} to ${significant(high, digits)}`;

/** The whole uncertainty of a row; where several things contribute it opens to what brings how much. */
function budgetCell(budget: RowBudget | undefined): Html {
  const whole = significant(budget?.both, 2);
  if (budget === undefined || budget.parts.length < 2) return html`${whole}`;
  const parts = budget.parts.map(({ name, percent }) => `${name} ${significant(percent, 2)}`).join("; ");
  return html`<details><summary>${whole || "budget"}</summary>${parts}</details>`;
}

function measurementRow(context: TableContext, point: DrawnPoint, budget: RowBudget | undefined): Html {
  const { table, sources, rowResults, rulings } = context.view.edition;
  const { row, state } = point;
  const text = (column: Int32Array) => textOf(table, column[row] as number);
  const reported = text(table.reportedText) || String(table.reportedValue[row]);
  const percent = state === "interval" ? range(point.percentLow, point.percentHigh, 3) : significant(point.percent);
  const long = (sources[table.source[row] as number]?.card?.shape ?? "long") === "long";
  const column = long ? "" : html`, ${short(text(table.column), 40)}`;
  const origin = [text(table.reference), text(table.doi)].filter((part) => part !== "").join(", doi ");
  const corrected = rulings.corrected.get(row);
  const ruling = rulings.setAside.get(row) ?? corrected?.ruling;
  const decision =
    ruling === undefined ? "" : `${rulingPhrase(ruling)}${corrected ? `; now read as ${corrected.row.corrected}` : ""}`;
  const value = (of: "moleFraction" | "massConcentration") => significant(corrected?.row[of] ?? table[of][row]);
  const notes = [
    context.assumptions.numberOf(corrected?.row.assumptions ?? text(table.assumptions)),
    context.references.numberOf(origin),
    context.decisions.numberOf(decision),
  ].join(" ");
  const carried = context.carries ? html`<td class="w">${short(text(table.carried), 120)}</td>` : "";
  const status = `${state.replace(" by the fit", "")}${point.flagged ? ", flagged" : ""}`;
  return html`<tr><th scope="row" class="t">${sourceLetter(point.source)} ${table.line[row]}${column}</th><td class="t">${status}</td><td class="n">${celsius(point.temperatureK)}</td><td class="n">${short(reported, CELL)}</td><td class="t">${short(text(table.reportedUnit), CELL)}</td><td class="n">${value("moleFraction")}</td><td class="n">${percent}</td><td class="n">${value("massConcentration")}</td><td class="n">${significant(budget?.value, 2)}</td><td class="n">${significant(budget?.temperatureK, 2)}</td><td class="n">${budgetCell(budget)}</td><td class="n">${percentOff(point.deviationPercent)}</td><td class="n">${fixed(rowResults.z[row], 1)}</td><td class="t">${short(text(table.method), CELL)}</td><td class="t">${notes}</td>${carried}</tr>`;
}

/** The measurements of one source under its letter, name and file. */
function sourceBlock(context: TableContext, source: number, shown: readonly DrawnPoint[]): Html {
  const { edition, sources } = context.view;
  const position = sources.indexOf(source);
  const account = edition.sources[source] as SourceAccount;
  const rows: Html[] = [];
  shown.forEach((point, i) => {
    if (point.source === position) rows.push(measurementRow(context, point, context.budgets[i]));
  });
  if (rows.length === 0) return html``;
  return html`<tbody><tr><th colspan="${context.carries ? 16 : 15}" scope="rowgroup"><b>${sourceLetter(position)}</b> <a href="../sources.html#${account.name}">${account.name}</a>, ${short(account.file, 160)}</th></tr>${rows}</tbody>`;
}

/** Every measurement with the file and line it came from, what was reported, what was assumed, and what the fit says. */
export function measurementSection(view: SystemView, budgets: readonly RowBudget[]): Html {
  const { table } = view.edition;
  const shown = view.points.slice(0, MOST_ROWS);
  const context: TableContext = {
    view,
    budgets,
    assumptions: notesOf("n"),
    references: notesOf("r"),
    decisions: notesOf("d"),
    carries: shown.some(({ row }) => table.carried[row] !== 0),
  };
  const blocks = view.sources.map((source) => sourceBlock(context, source, shown));
  const rest = view.points.length - shown.length;
  const [first] = shown;
  const example = first === undefined ? "" : `, such as ${measurementId(view.edition, first.row).slice(0, 100)}`;
  const heads = html`<tr><th scope="col">Line</th><th scope="col">Status</th><th scope="col" class="n">°C</th><th scope="col" class="n">Reported</th><th scope="col">Unit</th><th scope="col" class="n">x</th><th scope="col" class="n">g/100 g solvent</th><th scope="col" class="n">mg/mL solution</th><th scope="col" class="n">u, %</th><th scope="col" class="n">u(T), K</th><th scope="col" class="n">u with T, %</th><th scope="col" class="n">Off by, %</th><th scope="col" class="n">z</th><th scope="col">Method</th><th scope="col">Notes</th>${context.carries ? html`<th scope="col">Carried</th>` : ""}</tr>`;
  return html`<h2 id="measurements">Measurements</h2>
${wideTable("Measurements", html`<table class="measurements"><caption>${view.points.length} measurements as reported and on the common bases, by source and line of its file; an id is SOURCE:LINE${example}. u: standard uncertainty of the value. Off by, and z: from what the other points say. Left out: weight 0 in the curve.</caption><thead>${heads}</thead>${blocks}</table>`)}
${rest > 0 ? html`<p>${rest} more in measurements.csv.</p>` : ""}${context.assumptions.list()}${context.references.list()}${context.decisions.list()}`;
}
