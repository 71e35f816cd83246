import { safeText } from "../problems/safe-text.ts";
import { celsius, counted, percentOff, plainNumber, sourceLetter } from "../publish/report/figures.ts";
import { percentFromLn, type SystemView, titleOf } from "../publish/report/system-view.ts";
import { equationOf } from "../publish/tables/curves.ts";
import { type Edition, flagId } from "../records/edition.ts";
import type { Curve, Transition } from "../records/fits.ts";
import { rulingPhrase } from "../records/rulings.ts";
import { valuesOf } from "./shown-values.ts";
import { textPlot } from "./text-plot.ts";

/** Longest name, and flags printed before the rest is left to the report. */
const [NAME, FLAGS_SHOWN] = [100, 8];

const digits = (value: number | undefined, most: number): string =>
  value === undefined ? "" : plainNumber(value, most);

/** A small plot: capital letters are points of the curve, small ones are not, each the letter of its source. */
function plotLines({ points, curves, system }: SystemView): string[] {
  return textPlot({
    xLabel: "temperature, °C",
    yLabel: "g/100 g solvent",
    points: points.map(({ temperatureK, percent, percentLow, percentHigh, source, state }) => ({
      x: temperatureK - 273.15,
      y: Number.isNaN(percent) ? (Number.isNaN(percentHigh) ? percentLow : percentHigh) : percent,
      mark: letterMark(source, state === "kept"),
    })),
    curve: curves.flatMap(({ temperatureK, ln }) =>
      temperatureK.map((t, i) => ({ x: t - 273.15, y: percentFromLn(ln[i] as number, system) })),
    ),
  });
}

/** One character a source; from the 27th on a source is told as `#`. */
function letterMark(source: number, kept: boolean): string {
  if (source >= 26) return "#";
  return kept ? sourceLetter(source) : sourceLetter(source).toLowerCase();
}

function sourceLines({ edition, sources, points }: SystemView): string[] {
  return sources.map((source, i) => {
    const own = points.filter((point) => point.source === i);
    const kept = own.filter(({ state }) => state === "kept").length;
    const { card, name } = edition.sources[source] as Edition["sources"][number];
    const who = [card?.reported_by, card?.laboratory, card?.method, card?.date]
      .filter((part) => part !== undefined && part !== null && part !== "")
      .map((part) => safeText(part as string, 60));
    return `  ${sourceLetter(i)}  ${safeText(name, NAME)}: ${counted(own.length, "measurement")}, ${kept} kept${who.length > 0 ? `; ${who.join(", ")}` : ""}`;
  });
}

function curveLines(view: SystemView, curve: Curve): string[] {
  const [low, high] = curve.temperatureRangeK;
  const coefficients = curve.coefficients.map(
    ({ value, standardUncertainty: u }, i) =>
      `${"abc".charAt(i)} = ${plainNumber(value, 9)}${u > 0 ? ` ± ${plainNumber(u, 3)}` : ""}`,
  );
  const values = valuesOf(view, curve);
  const cell = (text: string) => text.padStart(11);
  return [
    `curve${view.curves.length > 1 ? ` of branch ${curve.branch}` : ""}: ${curve.model}, ${celsius(low)} to ${celsius(high)} °C, ${counted(curve.n, "point")} of ${counted(curve.nSources, "source")}`,
    `  ${equationOf(curve)}, T in K`,
    `  ${coefficients.join(", ")}`,
    `  average relative deviation ${plainNumber(curve.ardPercent, 3)} %`,
    "",
    `${cell("°C")}${cell("x")}${cell("g/100 g")}   95 % limits, curve     95 % limits, new measurement`,
    ...values.map((v) => {
      const limits = (from?: number, to?: number) =>
        from === undefined ? "" : `${digits(from, 3)} to ${digits(to, 3) || "no limit"}`;
      return `${cell(celsius(v.temperature_K))}${cell(digits(v.mole_fraction, 4))}${cell(digits(v.g_per_100g_solvent, 4))}   ${limits(v.curve_low, v.curve_high).padEnd(20)}   ${limits(v.new_low, v.new_high)}`.trimEnd();
    }),
  ];
}

/** Where the two branches of a system meet, in words. */
function transitionLines(transition: Transition | undefined): string[] {
  if (transition === undefined) return [];
  const { temperatureK, low, high, probability } = transition;
  return [
    `the solid changes at ${celsius(temperatureK)} °C (95 % limits ${celsius(low)} to ${celsius(high)} °C): two branches meet there`,
    `  one smooth curve would show as strong a break with p = ${probability.toFixed(3)} (parametric bootstrap);`,
    "  which form each branch is, solubility alone does not tell",
    "",
  ];
}

function flagLines({ edition, flags }: SystemView): string[] {
  if (flags.length === 0) return ["flags: none"];
  const rest = flags.length - FLAGS_SHOWN;
  return [
    "flags:",
    ...flags.slice(0, FLAGS_SHOWN).flatMap((flag) => {
      const cause = flag.suspectedCause === undefined ? "" : ` Suspected cause: ${flag.suspectedCause}.`;
      const ruling = edition.rulings.ofFlag.get(edition.flags.indexOf(flag));
      const standing = ruling ? "settled" : flag.severity === "blocking" ? "needs a person" : "notice";
      return [
        `  ${standing}: ${safeText(flagId(edition, flag), 240)}`,
        `      ${safeText(flag.evidence, 600)}.${safeText(cause)}`,
        `      ${safeText(ruling === undefined ? flag.lookAt : rulingPhrase(ruling), 400)}`,
      ];
    }),
    ...(rest > 0 ? [`  and ${rest} more in flags.csv`] : []),
  ];
}

/** A system for people: lines for a terminal, everything from data made safe. */
export function textOf(view: SystemView): string[] {
  const { system, fit, grade, points } = view;
  const left = points.filter(({ state }) => state !== "kept").length;
  return [
    titleOf(system.identity),
    `  ${system.id}`,
    `  solid form ${safeText(system.identity.solidForm, NAME)}; grade proposed: ${grade?.grade ?? "none"}`,
    "",
    ...plotLines(view),
    "",
    "measured by (capital letter: kept in the curve; small letter: not; *: several):",
    ...sourceLines(view),
    ...(left > 0 ? [`  ${counted(left, "measurement")} not in the curve: ${outsiders(view)}`] : []),
    "",
    ...transitionLines(fit?.transition),
    ...(fit?.curves.length
      ? fit.curves.flatMap((curve) => [...curveLines(view, curve), ""])
      : [`no curve: ${safeText(fit?.noCurve ?? "not fitted", 400)}`, ""]),
    ...flagLines(view),
  ];
}

/** Measurements that the curve does not use: line, state and how far off. */
function outsiders({ edition, points }: SystemView): string {
  const out = points.filter(({ state }) => state !== "kept");
  const told = out.slice(0, 10).map(({ row, source, state, deviationPercent }) => {
    const off = Number.isNaN(deviationPercent) ? "" : `, ${percentOff(deviationPercent)} %`;
    return `${sourceLetter(source)} line ${edition.table.line[row]} (${state}${off})`;
  });
  return `${told.join("; ")}${out.length > told.length ? `; and ${out.length - told.length} more` : ""}`;
}
