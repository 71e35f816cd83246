import type { Contribution } from "../bases/budget.ts";
import type { Converted } from "../bases/convert.ts";
import type { ConversionStep, UsedProperty } from "../bases/steps.ts";
import type { Unit } from "../bases/unit.ts";
import { safeText } from "../problems/safe-text.ts";
import type { ConvertResult } from "../records/generated/convert-result.ts";

/** One way to read an open value; `result` is missing where it cannot be converted, and `why` says why. */
export interface Reading {
  readonly reading: string;
  readonly result?: Converted;
  readonly why?: string;
}

/** What brings uncertainty, largest first, in percent of the result; what brings none is left out. */
function budgetParts(contributions: readonly Contribution[]): { readonly name: string; readonly percent: number }[] {
  return contributions
    .map(({ name, contribution }) => ({ name, percent: 100 * Math.abs(contribution) }))
    .filter(({ percent }) => percent > 0)
    .sort((a, b) => b.percent - a.percent);
}

/** A conversion as the JSON result. */
export function resultOf(result: Converted, target: Unit, assumptions: readonly string[]): ConvertResult {
  return {
    format: 1,
    value: result.value,
    unit: target.canonical,
    standard_uncertainty: result.standardUncertainty,
    steps: result.steps.map(({ equation, symbol, value, unit, properties }) => ({
      ...{ equation, symbol, value, unit },
      properties: properties.map((p) => ({
        ...{ name: p.name, symbol: p.symbol, value: p.value, unit: p.unit },
        standard_uncertainty: p.standardUncertainty,
        reference: p.reference ?? "",
      })),
    })),
    assumptions: [...assumptions],
    cautions: [...result.cautions],
    budget: budgetParts(result.contributions),
  };
}

/** An open value as the JSON result: no value of its own, one of each reading. */
export function openResultOf(readings: readonly Reading[], target: Unit): ConvertResult {
  return {
    format: 1,
    value: null,
    unit: target.canonical,
    standard_uncertainty: null,
    steps: [],
    assumptions: [],
    readings: readings.map(({ reading, result }) => ({
      reading,
      value: result?.value ?? null,
      standard_uncertainty: result?.standardUncertainty ?? null,
    })),
  };
}

const significant = (value: number, digits: number) => String(Number(value.toPrecision(digits)));

/** A value with its standard uncertainty, both to the second digit of the uncertainty; six digits where it has none. */
export function withUncertainty(value: number, u: number): string {
  if (!(u > 0) || u < 1e-12 * Math.abs(value)) return significant(value, 6);
  const power = Math.floor(Math.log10(Math.max(Math.abs(value), u)));
  const scale = power < -4 || power > 6 ? power : 0;
  const last = Math.floor(Math.log10(Number(u.toPrecision(2)))) - 1 - scale;
  const shown = (number: number) => {
    const scaled = Number(`${number}e${-scale}`);
    const plain = Number.isNaN(scaled) ? number / 10 ** scale : scaled;
    return last <= 0 ? plain.toFixed(Math.min(20, -last)) : String(Math.round(plain / 10 ** last) * 10 ** last);
  };
  const pair = `${shown(value)} ± ${shown(u)}`;
  return scale === 0 ? pair : `(${pair})e${scale}`;
}

/** Columns side by side, each as wide as its widest cell; the last runs on. */
function aligned(rows: readonly (readonly string[])[]): string[] {
  const widths = (rows[0] ?? []).map((_, i) => Math.max(...rows.map((row) => (row[i] ?? "").length)));
  return rows.map((row) => `  ${row.map((cell, i) => cell.padEnd(widths[i] ?? 0)).join("  ")}`.trimEnd());
}

/** A step that only repeats the number before it under another name tells a chemist nothing. */
function tellingSteps(steps: readonly ConversionStep[]): readonly ConversionStep[] {
  return steps.filter(({ value, properties }, i) => properties.length > 0 || value !== steps[i - 1]?.value);
}

/** Below this share of the largest part a part of the budget changes no digit of the sum. */
const NEGLIGIBLE = 0.05;

/** The budget for people: what counts, and the rest in one line. */
function budgetLines(contributions: readonly Contribution[]): string[] {
  const parts = budgetParts(contributions);
  const least = NEGLIGIBLE * (parts[0]?.percent ?? 0);
  const rest = parts.filter(({ percent }) => percent < least);
  const lines = aligned(
    parts.filter(({ percent }) => percent >= least).map(({ name, percent }) => [`${significant(percent, 2)} %`, name]),
  );
  if (rest.length === 0) return lines;
  const largest = significant(rest[0]?.percent ?? 0, 1);
  return [...lines, `  at most ${largest} % each: ${rest.map(({ name }) => name).join(", ")}`];
}

/** Every property once, in order of use. */
function propertiesOf(steps: readonly ConversionStep[]): readonly UsedProperty[] {
  const all = new Map<string, UsedProperty>();
  for (const p of steps.flatMap(({ properties }) => properties)) all.set(`${p.symbol} ${p.name} ${p.value}`, p);
  return [...all.values()];
}

/** The conversion for people: result, steps with equations, properties with references, budget, assumptions. */
export function explain(text: string, target: Unit, result: Converted, assumptions: readonly string[]): string[] {
  const { value, standardUncertainty: u, relativeUncertainty } = result;
  const percent = `standard uncertainty ${significant(100 * relativeUncertainty, 2)} %`;
  const shown = withUncertainty(value, u);
  const steps = tellingSteps(result.steps).map(({ equation, symbol, value: found, unit }) => [
    equation,
    `${symbol} = ${significant(found, 7)} ${unit}`,
  ]);
  const properties = propertiesOf(result.steps).map((p) => [
    p.symbol,
    `${withUncertainty(p.value, p.standardUncertainty)} ${p.unit}`,
    p.name,
    safeText(p.reference ?? ""),
  ]);
  const section = (title: string, lines: readonly string[]) => (lines.length === 0 ? [] : ["", title, ...lines]);
  return [
    `${safeText(text)} = ${shown} ${target.canonical}  (${percent})`,
    ...section("steps", aligned(steps)),
    ...section("properties", aligned(properties)),
    ...section("what contributes to the uncertainty", budgetLines(result.contributions)),
    ...section(
      "assumptions",
      (assumptions.length > 0 ? assumptions : ["none"]).map((one) => `  ${safeText(one)}`),
    ),
    ...section(
      "caution",
      result.cautions.map((one) => `  ${one}`),
    ),
  ];
}

/** The readings of an open value for people, one a line. */
export function explainReadings(text: string, target: Unit, readings: readonly Reading[]): string[] {
  const rows = readings.map(({ reading, result, why }) => [
    reading,
    result === undefined
      ? `cannot be converted: ${why ?? ""}`
      : `${withUncertainty(result.value, result.standardUncertainty)} ${target.canonical}`,
  ]);
  return [`${safeText(text)} is open; it can be read as`, ...aligned(rows)];
}
