import { type ComparedCurve, commonRangeK, differenceAt, shownTemperatures } from "../../curves/compare-curves.ts";
import type { Edition } from "../../records/edition.ts";
import type { Curve } from "../../records/fits.ts";
import type { System } from "../../records/systems.ts";
import { comparedCurveOf, crossingsBetween, type FormCrossing, UNSPECIFIED } from "../form-crossings.ts";
import { celsius, percentOff, significant } from "./figures.ts";
import { type Html, html, short } from "./html.ts";
import { wideTable } from "./page.ts";
import { percentFromLn, type SystemView } from "./system-view.ts";

/** Most forms listed, and most pairs told, of one family. */
const MOST_FORMS = 20;
const MOST_PAIRS = 15;
/** Forms up to which every pair is told on every page. */
const FEW_FORMS = 5;
/** Longest name of a form. */
const NAME = 80;
/** Temperature at which forms are compared where their curves reach it, K. */
const ROOM_K = 298.15;

/** A form with its curve at the temperature of comparison, where one reaches it. */
interface FormAt {
  readonly system: System;
  readonly curves: readonly Curve[];
  readonly at: ComparedCurve | undefined;
}

const covers = ({ temperatureRangeK: [low, high] }: Curve, T: number) => T >= low && T <= high;

/** The temperature that most curves cover: 25 °C where it is among those, else the one nearest to it. */
function commonTemperature(curves: readonly (readonly Curve[])[]): number | undefined {
  const ends = curves.flat().flatMap(({ temperatureRangeK: [low, high] }) => [low, (low + high) / 2, high]);
  const count = (T: number) => curves.filter((own) => own.some((curve) => covers(curve, T))).length;
  const choices = [ROOM_K, ...ends].map((T) => ({ T, n: count(T), away: Math.abs(T - ROOM_K) }));
  const [best] = choices.sort((a, b) => b.n - a.n || a.away - b.away || a.T - b.T);
  return best === undefined || best.n === 0 ? undefined : best.T;
}

/** `1.23 (1.10 to 1.38)` of ln values. */
function withLimits(ln: number, half: number, show: (value: number) => string): string {
  return `${show(ln)} (${show(ln - half)} to ${show(ln + half)})`;
}

function formRow({ system, curves, at }: FormAt, T: number, lowest: FormAt | undefined, own: System): Html {
  const name = short(system.identity.solidForm, NAME);
  const form = system.index === own.index ? html`<b>${name}</b>` : html`<a href="${system.id}.html">${name}</a>`;
  const ranges = curves.map(({ temperatureRangeK: [low, high] }) => `${celsius(low)} to ${celsius(high)}`).join(", ");
  const head = html`<th scope="row" class="t">${form}</th><td class="n">${system.rows.length}</td><td class="t">${ranges || "no curve"}</td>`;
  if (at === undefined) return html`<tr>${head}<td class="n"></td><td class="n"></td><td class="n"></td></tr>`;
  const ln = at.curve.evaluate(T);
  const { curve: half } = at.curve.limits(T);
  const value = withLimits(ln, half, (x) => significant(Math.exp(x), 3));
  const percent = withLimits(ln, half, (x) => significant(percentFromLn(x, system), 3));
  return html`<tr>${head}<td class="n">${value}</td><td class="n">${percent}</td><td class="n">${ratioTo(lowest, { system, curves, at }, T)}</td></tr>`;
}

function ratioTo(lowest: FormAt | undefined, form: FormAt, T: number): string {
  if (lowest?.at === undefined || form.at === undefined) return "";
  if (lowest.system === form.system) return "1 (lowest)";
  const { lnRatio, half } = differenceAt(form.at, lowest.at, T);
  return withLimits(lnRatio, half, (x) => significant(Math.exp(x), 3));
}

function formTable(forms: readonly FormAt[], T: number, own: System): Html {
  const named = forms.filter(({ system, at }) => at !== undefined && system.identity.solidForm !== UNSPECIFIED);
  const value = (form: FormAt) => form.at?.curve.evaluate(T) ?? Number.POSITIVE_INFINITY;
  const lowest = named.reduce<FormAt | undefined>(
    (best, form) => (best === undefined || value(form) < value(best) ? form : best),
    undefined,
  );
  const letter = own.fitBasis === "ln x" ? "x" : "r";
  return html`<table><caption>Values at ${celsius(T)} °C with 95 % limits of the curves; the ratio to the lowest named form. At one temperature the least soluble form is the stable one.</caption><thead><tr><th scope="col">Form</th><th scope="col" class="n">Measurements</th><th scope="col">Curve, °C</th><th scope="col" class="n">${letter}</th><th scope="col" class="n">g/100 g solvent</th><th scope="col" class="n">Ratio</th></tr></thead><tbody>${forms.map((form) => formRow(form, T, lowest, own))}</tbody></table>`;
}

function crossingTold({ first, second, ...crossing }: FormCrossing, nameOf: (curve: Curve) => string): string {
  const { temperatureK, lowK, highK, firstLowerWhenCold } = crossing;
  const limit = (T: number, open: string) => (Number.isNaN(T) ? open : celsius(T));
  const [cold, warm] = firstLowerWhenCold ? [first, second] : [second, first];
  return (
    `${nameOf(first)} and ${nameOf(second)} cross at ${celsius(temperatureK)} °C (95 % limits ` +
    `${limit(lowK, "below the common range")} to ${limit(highK, "above the common range")}): ` +
    `of the two ${nameOf(cold)} is the stable one below, ${nameOf(warm)} above`
  );
}

/** `+12 %` of ln 1.12; a factor beyond three times. */
function percentApart(ln: number): string {
  const text = percentOff(100 * Math.expm1(ln));
  return text.startsWith("×") ? text : `${text} %`;
}

/** How two curves lie to one another over their common range; undefined where they share none. */
function orderTold(a: ComparedCurve, b: ComparedCurve, [first, second]: readonly [string, string]): string | undefined {
  const range = commonRangeK(a, b);
  if (range === undefined) return undefined;
  const differences = shownTemperatures(range).map((T) => differenceAt(a, b, T));
  const sign = differences.reduce((sum, { lnRatio }) => sum + lnRatio, 0) < 0 ? -1 : 1;
  const [high, low] = sign > 0 ? [first, second] : [second, first];
  const shown = differences.map(({ lnRatio, half, temperatureK }) => {
    const ln = sign * lnRatio;
    return `${withLimits(ln, half, percentApart)} at ${celsius(temperatureK)} °C`;
  });
  const settled = differences.filter(({ lnRatio, half }) => sign * lnRatio > half).length;
  const verdict =
    settled === differences.length
      ? `${low} is the more stable there`
      : settled === 0
        ? "the limits do not tell them apart"
        : "the limits tell them apart over a part of the range only";
  return `${high} against ${low}: ${shown.join(", ")}; ${verdict}`;
}

function pairTold(edition: Edition, one: System, other: System): string[] {
  const crossings = crossingsBetween(edition, one, other);
  const nameOf = ({ system }: Curve) => (system === one.index ? one : other).identity.solidForm;
  if (crossings.length > 0) return crossings.map((crossing) => crossingTold(crossing, nameOf));
  const curvesOf = ({ index }: System) => edition.fits[index]?.curves ?? [];
  return curvesOf(one).flatMap((a) =>
    curvesOf(other).flatMap((b) => {
      const names = [one.identity.solidForm, other.identity.solidForm] as const;
      return orderTold(comparedCurveOf(edition, a), comparedCurveOf(edition, b), names) ?? [];
    }),
  );
}

/** The forms of a system's family at a common temperature, their order, and where their curves cross; nothing for one form. */
export function familySection({ edition, system: own }: SystemView, family: readonly System[]): Html {
  if (family.length < 2) return html``;
  const sameBasis = family.filter(({ fitBasis }) => fitBasis === own.fitBasis).slice(0, MOST_FORMS);
  const curvesOf = ({ index }: System) => edition.fits[index]?.curves ?? [];
  const T = commonTemperature(sameBasis.map(curvesOf));
  const heading = html`<h2 id="forms">Forms of this family</h2>`;
  if (T === undefined) return html`${heading}<p>${family.length} forms, none of which has a curve to compare.</p>`;
  const forms = sameBasis.map((system): FormAt => {
    const curve = curvesOf(system).find((one) => covers(one, T));
    return { system, curves: curvesOf(system), at: curve && comparedCurveOf(edition, curve) };
  });
  const named = sameBasis.filter(({ identity }) => identity.solidForm !== UNSPECIFIED);
  // Of many forms only the pairs of the page's own are told: each pair stands on the pages of both.
  const isTold = (one: System, other: System) => named.length <= FEW_FORMS || one === own || other === own;
  const pairs = named.flatMap((one, i) =>
    named.slice(i + 1).flatMap((other) => (isTold(one, other) ? pairTold(edition, one, other) : [])),
  );
  const rest = pairs.length - MOST_PAIRS;
  const told = pairs.slice(0, MOST_PAIRS).map((text) => html`<li>${short(text, 700)}.</li>`);
  return html`${heading}
${wideTable("Forms of this family", formTable(forms, T, own))}
${told.length > 0 ? html`<ul>${told}</ul>` : named.length > 1 ? html`<p>The curves of the named forms share no temperature: their order is not told by these data.</p>` : ""}${rest > 0 ? html`<p>${rest} more pairs are not listed.</p>` : ""}
<p class="soft">Forms are compared inside the ranges of both curves only, on the same unsolvated basis. The offset of a source that measured both forms is common to them and cancels in the limits of a ratio; otherwise the curves are taken as independent.</p>`;
}
