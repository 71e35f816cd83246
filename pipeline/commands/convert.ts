import { type Conversion, type Converted, convertWithSteps } from "../bases/convert.ts";
import { parseTemperatureUnit } from "../bases/temperature.ts";
import type { Unit } from "../bases/unit.ts";
import { parseUnit } from "../bases/units.ts";
import { resolveIdentity } from "../identify/identity.ts";
import { createIdentityRegister, register } from "../identify/source.ts";
import { indexSubstances } from "../identify/substance-tables.ts";
import { type LiquorModel, liquorModel } from "../normalise/liquor.ts";
import { readSoluteBasis } from "../normalise/unit-context.ts";
import { type ProblemCode, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { safeText } from "../problems/safe-text.ts";
import { readCollectionTables, readProgramTables } from "../read/own-tables.ts";
import type { CellFault } from "../records/cells.ts";
import type { ConvertResult } from "../records/generated/convert-result.ts";
import type { Identified } from "../records/identified.ts";
import { parseNumber } from "../records/number-text.ts";
import { type CommonOptions, Exit, type ExitCode, type Terminal } from "./terminal.ts";

export interface ConvertOptions extends CommonOptions {
  readonly to: string;
  readonly solute: string;
  readonly solvent: string;
  readonly temperature: string;
  readonly uncertainty?: string;
  readonly solidForm?: string;
  readonly soluteBasis?: string;
  readonly solutionDensity?: string;
  readonly collection?: string;
}

const NO_TABLES = { substances: [], solidForms: [], propertyValues: [] };

/** Stops the command with a problem of one of its arguments. */
function stop(
  argument: string,
  code: ProblemCode,
  found: string,
  more: { expected?: string; mend?: string } = {},
): never {
  throw new InputError(problem(code, { file: `saltern convert, ${argument}` }, { found, ...more }));
}

/** A number and the text behind it, such as `25 °C` or `31.6 g/100 g solvent`. */
function numberAndRest(argument: string, text: string): { readonly number: number; readonly rest: string } {
  const [first = "", ...rest] = text.trim().split(/\s+/);
  const glued = /^([+-]?[\d.,]+(?:[eE][+-]?\d+)?)(.*)$/.exec(first);
  const read = parseNumber(first, ".");
  if (read.ok) return { number: read.value, rest: rest.join(" ") };
  const shorter = glued === null ? undefined : parseNumber(glued[1] ?? "", ".");
  if (shorter?.ok) return { number: shorter.value, rest: [glued?.[2] ?? "", ...rest].join(" ").trim() };
  return stop(argument, read.code, read.found);
}

/** A number on its own. */
function plainNumber(argument: string, text: string): number {
  const read = parseNumber(text.trim(), ".");
  return read.ok ? read.value : stop(argument, read.code, read.found);
}

/** Units a text can stand for: one, or all readings of an open one. */
function unitsOf(argument: string, text: string): readonly Unit[] {
  const parsed = parseUnit(text);
  if (parsed.kind === "unit") return [parsed.unit];
  if (parsed.kind === "unknown") return stop(argument, "unknown-unit", `"${text}" is not a unit of solubility`);
  return parsed.readings.flatMap((reading) => {
    const unit = parseUnit(reading);
    return unit.kind === "unit" ? [unit.unit] : [];
  });
}

function temperatureOf(text: string): number {
  const { number, rest } = numberAndRest("--temperature", text);
  const scale = parseTemperatureUnit(rest);
  if (scale === undefined)
    return stop("--temperature", "unknown-temperature-unit", `"${rest}" is not a unit of temperature`);
  const kelvin = scale.toKelvin(number);
  return kelvin > 0 ? kelvin : stop("--temperature", "below-absolute-zero", text);
}

/** Solute, solvent and form of the command line with the properties of their liquor. */
async function liquorOf(options: ConvertOptions): Promise<{ readonly who: Identified; readonly liquor: LiquorModel }> {
  const own = options.collection === undefined ? NO_TABLES : await readCollectionTables(options.collection);
  const { index } = indexSubstances(await readProgramTables(), own);
  const cells: Readonly<Record<string, string>> = {
    solute: options.solute,
    solvent: options.solvent,
    solid_form: options.solidForm ?? "",
  };
  const found = resolveIdentity(
    (field) => cells[field] ?? "",
    index,
    () => undefined,
  );
  if ("code" in found) return stopAt(found);
  const who = register(createIdentityRegister(), found);
  return { who, liquor: liquorModel(who, found.identity) };
}

function stopAt({ field, code, found, expected, mend }: CellFault): never {
  const more = { ...(expected === undefined ? {} : { expected }), ...(mend === undefined ? {} : { mend }) };
  return stop(`--${field.replaceAll("_", "-")}`, code, found, more);
}

/** `saltern convert "VALUE UNIT"`: one conversion with its uncertainty, every step and assumption. */
export async function convert(text: string, options: ConvertOptions, terminal: Terminal): Promise<ExitCode> {
  const { number: value, rest } = numberAndRest("value", text);
  const sources = unitsOf("value", rest);
  const targets = unitsOf("--to", options.to);
  const target = targets[0];
  if (target === undefined || targets.length > 1) {
    const readings = targets.map(({ canonical }) => canonical).join(", ");
    return stop("--to", "open-unit", `"${options.to}" can be ${readings}`, { expected: `one of ${readings}` });
  }
  const temperatureK = temperatureOf(options.temperature);
  const { who, liquor } = await liquorOf(options);
  const density =
    options.solutionDensity === undefined ? Number.NaN : plainNumber("--solution-density", options.solutionDensity);
  liquor.setConditions(temperatureK, Number.NaN, density);
  const u = options.uncertainty === undefined ? undefined : plainNumber("--uncertainty", options.uncertainty);
  if (u !== undefined && u < 0) return stop("--uncertainty", "bad-uncertainty", `${u} is below 0`);
  const convertFrom = (from: Unit): Converted => {
    const basis = readSoluteBasis(options.soluteBasis ?? "", who, from, String(value));
    if (typeof basis !== "string") return stopAt(basis);
    const request = { value, standardUncertainty: u, from, to: target, needs: liquor.needs };
    const conversion = convertWithSteps({ ...request, soluteBasis: basis, targetSoluteBasis: "anhydrous" });
    return conversion.kind === "converted" ? conversion : stopHere(conversion, from, value);
  };
  const [only] = sources;
  if (only === undefined || sources.length > 1) {
    for (const from of sources) {
      const { value: result } = convertFrom(from);
      terminal.print(`${value} ${from.canonical} = ${Number(result.toPrecision(6))} ${target.canonical}`);
    }
    return stop("value", "open-unit", `"${rest}" can be read in ${sources.length} ways, shown above`);
  }
  const result = convertFrom(only);
  const assumptions = [
    ...who.assumptions,
    ...result.assumptions,
    ...(u === undefined ? ["value taken as exact: only properties contribute to the uncertainty"] : []),
  ];
  if (options.json) terminal.print(JSON.stringify(resultOf(result, target, assumptions)));
  else for (const line of explain(text, target, result, assumptions)) terminal.print(line);
  for (const caution of result.cautions) terminal.tell(`caution: ${caution}`);
  return Exit.done;
}

function stopHere(conversion: Exclude<Conversion, Converted>, from: Unit, value: number): never {
  if (conversion.kind === "missing") {
    const density = conversion.missing.some((need) => need.startsWith("density"));
    return stop("value", density ? "no-density" : "no-molar-mass", `needs the ${conversion.missing.join(" and the ")}`);
  }
  if (conversion.kind === "open") {
    const readings = conversion.readings.join(", ");
    return stop("value", "open-volume-basis", `${value} ${from.canonical} can be ${readings}`, {
      expected: `one of ${readings}`,
    });
  }
  return stop("value", "value-not-positive", conversion.reason, { expected: "a value that a solution can have" });
}

function resultOf(result: Converted, target: Unit, assumptions: readonly string[]): ConvertResult {
  return {
    format: 1,
    value: result.value,
    unit: target.canonical,
    standard_uncertainty: result.standardUncertainty,
    steps: result.steps.map(({ equation, symbol, value, unit, properties }) => ({
      equation,
      symbol,
      value,
      unit,
      properties: properties.map((p) => ({
        name: p.name,
        symbol: p.symbol,
        value: p.value,
        unit: p.unit,
        standard_uncertainty: p.standardUncertainty,
        reference: p.reference ?? "",
      })),
    })),
    assumptions: [...assumptions],
  };
}

/** A result with so many digits that its last two are those of its uncertainty; six where it has none. */
function digits(value: number, u: number): string {
  if (!(u > 0)) return String(Number(value.toPrecision(6)));
  const places = Math.max(1, Math.min(15, 2 + Math.floor(Math.log10(Math.abs(value))) - Math.floor(Math.log10(u))));
  return value.toPrecision(places);
}

/** The conversion for people: result, steps with equations and properties, budget, assumptions. */
function explain(text: string, target: Unit, result: Converted, assumptions: readonly string[]): string[] {
  const { value, standardUncertainty, relativeUncertainty } = result;
  const lines = [
    `${safeText(text)} = ${digits(value, standardUncertainty)} ${target.canonical}`,
    `standard uncertainty ${Number(standardUncertainty.toPrecision(2))} ${target.canonical} (${Number((100 * relativeUncertainty).toPrecision(2))} %)`,
    "",
    "steps",
  ];
  for (const step of result.steps) {
    lines.push(`  ${step.equation}`, `    ${step.symbol} = ${Number(step.value.toPrecision(8))} ${step.unit}`);
    for (const p of step.properties) {
      const reference = p.reference ? `  (${safeText(p.reference)})` : "";
      lines.push(
        `    with ${p.name} ${p.symbol} = ${Number(p.value.toPrecision(7))} ± ${Number(p.standardUncertainty.toPrecision(2))} ${p.unit}${reference}`,
      );
    }
  }
  const parts = result.contributions.filter(({ contribution }) => contribution !== 0);
  if (parts.length > 0) lines.push("", "what contributes to the uncertainty");
  for (const { name, contribution } of parts)
    lines.push(`  ${name}: ${Number((100 * Math.abs(contribution)).toPrecision(2))} %`);
  lines.push("", "assumptions", ...(assumptions.length > 0 ? assumptions : ["none"]).map((a) => `  ${safeText(a)}`));
  return lines;
}
