import { type Edition, flagId, measurementId, type SourceAccount, statusOf } from "../../records/edition.ts";
import type { Curve, Flag } from "../../records/fits.ts";
import { textOf } from "../../records/measurements.ts";
import type { System } from "../../records/systems.ts";
import { celsius, significant } from "./figures.ts";
import { type Html, html } from "./html.ts";
import { page } from "./page.ts";
import { type Plot, type PlotCurve, plotSvg } from "./plot.ts";

/** Points at which a curve is drawn. */
const STEPS = 60;

/** A curve as drawn: ln value against 1000/T with the 95 % limits of the curve and of a new measurement. */
function drawnCurve(curve: Curve): PlotCurve {
  const [low, high] = curve.temperatureRangeK;
  const temperatures = Array.from({ length: STEPS + 1 }, (_, i) => low + ((high - low) * i) / STEPS);
  const y = temperatures.map((t) => curve.evaluate(t));
  const limits = temperatures.map((t) => curve.limits(t));
  const shifted = (by: (i: number) => number) => y.map((value, i) => value + by(i));
  return {
    x: temperatures.map((t) => 1000 / t),
    y,
    low: shifted((i) => -(limits[i]?.curve ?? 0)),
    high: shifted((i) => limits[i]?.curve ?? 0),
    outerLow: shifted((i) => -(limits[i]?.newMeasurement ?? 0)),
    outerHigh: shifted((i) => limits[i]?.newMeasurement ?? 0),
  };
}

/** Positions of the sources that measured a system, ascending. */
function sourcesOf(edition: Edition, system: System): number[] {
  return [...new Set(Array.from(system.rows, (row) => edition.table.source[row] as number))].sort((a, b) => a - b);
}

/** Rows with a flag of their own or in a flagged block. */
function offRows(edition: Edition, system: System, flags: readonly Flag[]): Set<number> {
  const off = new Set<number>();
  for (const flag of flags) {
    if (flag.severity !== "blocking") continue;
    if (flag.scope === "measurement" && flag.row !== undefined) off.add(flag.row);
    if (flag.scope === "block") {
      for (const row of system.rows) if (edition.table.source[row] === flag.source) off.add(row);
    }
  }
  return off;
}

/** ln value against 1000/T: a straight line here is a van 't Hoff line. */
function vantHoffPlot(edition: Edition, system: System, flags: readonly Flag[]): Plot {
  const fit = edition.fits[system.index];
  const sources = sourcesOf(edition, system);
  const points = fit?.robust.points;
  const off = offRows(edition, system, flags);
  const what = system.fitBasis === "ln x" ? "mole fraction x" : "mass ratio r";
  return {
    title: `ln of ${what} against 1000/T for ${system.identity.solute} in ${system.identity.solvent}`,
    xLabel: "1000 K / T  (warm on the left)",
    yLabel: system.fitBasis,
    sources: sources.map((source) => edition.sources[source]?.name ?? ""),
    curves:
      fit?.curves.filter((curve) => curve.temperatureRangeK[0] < curve.temperatureRangeK[1]).map(drawnCurve) ?? [],
    points: Array.from({ length: points?.n ?? 0 }, (_, i) => {
      const row = points?.row[i] as number;
      return {
        x: 1000 / (points?.temperatureK[i] as number),
        y: points?.lnValue[i] as number,
        source: sources.indexOf(points?.source[i] as number),
        off: off.has(row),
        label: `${measurementId(edition, row)}, ${celsius(points?.temperatureK[i] as number)} °C`,
      };
    }),
  };
}

/** The equation of a curve with its coefficients. */
function curveLines(curve: Curve): Html {
  const symbol = curve.fitBasis === "ln x" ? "x" : "r";
  const [low, high] = curve.temperatureRangeK;
  const coefficients = curve.coefficients.map(
    (c) => html`<li>${c.name} = ${significant(c.value, 8)} ± ${significant(c.standardUncertainty, 2)}</li>`,
  );
  const enthalpy = curve.dissolutionEnthalpy;
  return html`<h3>${curve.model}, ${celsius(low)} to ${celsius(high)} °C</h3>
<ul>${coefficients}</ul>
<p>ln ${symbol} from ${curve.n} points of ${curve.nSources} source${curve.nSources === 1 ? "" : "s"}; root mean square deviation of ln ${symbol} ${significant(curve.rmsd, 3)}, average relative deviation ${significant(curve.ardPercent, 3)} %. The 95 % limits hold a between-source standard deviation of ${significant(100 * curve.betweenSd, 2)} % (${curve.betweenDegreesOfFreedom > 0 ? `${significant(curve.betweenDegreesOfFreedom, 2)} degrees of freedom` : "a default: too few sources to estimate it"}).</p>
${enthalpy ? html`<p>Apparent dissolution enthalpy at ${celsius(enthalpy.temperatureK)} °C: ${significant(enthalpy.value / 1000, 3)} kJ/mol, 95 % limits ${significant(enthalpy.low / 1000, 3)} to ${significant(enthalpy.high / 1000, 3)}.</p>` : ""}
${curve.runnersUp.length > 0 ? html`<p>Also tried: ${curve.runnersUp.map((r) => `${r.model} (${r.why})`).join("; ")}.</p>` : ""}
${curve.notices.map((notice) => html`<p>Note: ${notice}.</p>`)}`;
}

function flagBox(edition: Edition, flag: Flag): Html {
  const cause =
    flag.suspectedCause === undefined
      ? ""
      : html`<p>Suspected cause: <b>${flag.suspectedCause}</b>${flag.causeDetail ? ` (${flag.causeDetail})` : ""}${flag.causeProbability === undefined ? "" : `, probability ${flag.causeProbability.toFixed(2)}`}${flag.proposedValue === undefined ? "" : `; the value would be ${significant(flag.proposedValue)}`}.</p>`;
  return html`<div class="flag"><p><b>${flag.severity === "blocking" ? "Needs a person" : "Notice"}</b>: ${flagId(edition, flag)}</p><p>${flag.evidence}</p>${cause}<p>Look at: ${flag.lookAt}</p></div>`;
}

function measurementRow(edition: Edition, row: number): Html {
  const { table, rowResults } = edition;
  const source = edition.sources[table.source[row] as number] as SourceAccount;
  const reported = textOf(table, table.reportedText[row] as number) || significant(table.reportedValue[row], 6);
  return html`<tr><td>${source.file}:${table.line[row]}</td><td class="n">${celsius(table.temperatureK[row] as number)}</td><td class="n">${reported}</td><td>${textOf(table, table.reportedUnit[row] as number)}</td><td class="n">${significant(table.moleFraction[row])}</td><td class="n">${significant(100 * (table.massRatio[row] as number))}</td><td class="n">${significant(table.massConcentration[row])}</td><td class="n">${significant(100 * (table.relativeU[row] as number), 2)}</td><td class="n">${significant(rowResults.deviationPercent[row], 2)}</td><td class="n">${significant(rowResults.z[row], 2)}</td><td>${statusOf(edition, row)}</td><td>${textOf(table, table.assumptions[row] as number)}</td></tr>`;
}

/** The page of one system: plot, curve, flags with evidence, every measurement with the file and line it came from. */
export function systemPage(edition: Edition, system: System, flags: readonly Flag[]): string {
  const { solute, solidForm, solvent, composition, medium } = system.identity;
  const fit = edition.fits[system.index];
  const grade = edition.grades[system.index];
  const title = `${solute} in ${[solvent, composition, medium].filter((part) => part !== "").join(", ")}`;
  return page(
    title,
    edition.collection,
    1,
    html`<h1>${title}</h1>
<p>Solid form: ${solidForm}. Proposed grade: <b>${grade?.grade}</b> (${grade?.reasons.join("; ")}).</p>
<figure>${plotSvg(vantHoffPlot(edition, system, flags))}
<figcaption>Points by source (shape). A crossed-out point or series lies off the curve. Line: curve; shaded: its 95 % limits; broken: 95 % limits of one new measurement from a new source.</figcaption></figure>
<h2>Curve</h2>
${fit?.curves.length ? fit.curves.map(curveLines) : html`<p>No curve: ${fit?.noCurve}.</p>`}
<h2>Flags</h2>
${flags.length === 0 ? html`<p>None.</p>` : flags.map((flag) => flagBox(edition, flag))}
<h2>Measurements</h2>
<div class="wide" tabindex="0" role="region" aria-label="Measurements"><table>
<thead><tr><th>File and line</th><th class="n">°C</th><th class="n">Reported</th><th>Unit</th><th class="n">x</th><th class="n">g/100 g solvent</th><th class="n">mg/mL solution</th><th class="n">u, %</th><th class="n">Off, %</th><th class="n">z</th><th>Status</th><th>Assumptions</th></tr></thead>
<tbody>${Array.from(system.rows, (row) => measurementRow(edition, row))}</tbody></table></div>`,
  );
}
