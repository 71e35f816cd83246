import { densityFactor } from "../bases/density-unit.ts";
import { parseTemperatureUnit } from "../bases/temperature.ts";
import { relativeFromStandard, standardFromRelative, type Unit } from "../bases/unit.ts";
import { parseUnit } from "../bases/units.ts";
import { densityRange } from "../normalise/row-volume.ts";
import { standardFromReported, type UncertaintyKind } from "../normalise/value-uncertainty.ts";
import { type ProblemCode, problem } from "../problems/catalogue.ts";
import { InputError } from "../problems/input-error.ts";
import { parseNumber } from "../records/number-text.ts";
import type { CommonOptions } from "./terminal.ts";

export interface ConvertOptions extends CommonOptions {
  readonly to: string;
  readonly solute: string;
  readonly solvent: string;
  readonly temperature: string;
  readonly uncertainty?: string;
  readonly uncertaintyKind?: string;
  readonly coverageFactor?: string;
  readonly n?: string;
  readonly solidForm?: string;
  readonly soluteBasis?: string;
  readonly solutionDensity?: string;
  readonly volumeTemperature?: string;
  readonly collection?: string;
}

interface More {
  readonly expected?: string | undefined;
  readonly mend?: string | undefined;
}

/** The problem of one argument of the command. */
export function argumentProblem(argument: string, code: ProblemCode, found: string, { expected, mend }: More = {}) {
  const details = { found, ...(expected === undefined ? {} : { expected }), ...(mend === undefined ? {} : { mend }) };
  return problem(code, { file: `saltern convert, ${argument}` }, details);
}

/** Stops the command with a problem of one of its arguments. @throws InputError always */
export function stop(argument: string, code: ProblemCode, found: string, more: More = {}): never {
  throw new InputError(argumentProblem(argument, code, found, more));
}

/** A number and the text behind it, such as `25 °C` or `31.6 g/100 g solvent`. @throws InputError without a number */
export function numberAndRest(argument: string, text: string): { readonly number: number; readonly rest: string } {
  const [first = "", ...rest] = text.trim().split(/\s+/);
  const glued = /^([+-]?[\d.,]+(?:[eE][+-]?\d+)?)(.*)$/.exec(first);
  const read = parseNumber(first, ".");
  if (read.ok) return { number: read.value, rest: rest.join(" ") };
  const shorter = glued === null ? undefined : parseNumber(glued[1] ?? "", ".");
  if (shorter?.ok) return { number: shorter.value, rest: [glued?.[2] ?? "", ...rest].join(" ").trim() };
  return stop(argument, read.code, read.found);
}

/** A number on its own, NaN where the option is not given. @throws InputError for anything else or below `least` */
function optionalNumber(argument: string, text: string | undefined, least: number): number {
  if (text === undefined) return Number.NaN;
  const { number, rest } = numberAndRest(argument, text);
  if (rest !== "") return stop(argument, "bad-argument", `"${text}" is more than a number`);
  return number >= least ? number : stop(argument, "bad-uncertainty", `${number} is below ${least}`);
}

/** Units a text can stand for: one, or all readings of an open one. @throws InputError for no unit */
export function unitsOf(argument: string, text: string): readonly Unit[] {
  const parsed = parseUnit(text);
  if (parsed.kind === "unit") return [parsed.unit];
  if (parsed.kind === "unknown") return stop(argument, "unknown-unit", `"${text}" is not a unit of solubility`);
  return parsed.readings.flatMap((reading) => {
    const unit = parseUnit(reading);
    return unit.kind === "unit" ? [unit.unit] : [];
  });
}

/** A temperature with its scale as kelvin. @throws InputError for an unknown scale or at and below 0 K */
export function temperatureOf(argument: string, text: string): number {
  const { number, rest } = numberAndRest(argument, text);
  const scale = parseTemperatureUnit(rest);
  if (scale === undefined) return stop(argument, "unknown-temperature-unit", `"${rest}" is not a unit of temperature`);
  const kelvin = scale.toKelvin(number);
  return kelvin > 0 ? kelvin : stop(argument, "below-absolute-zero", text);
}

/** The measured density in kg/m3, the unit where none is given; NaN without one. @throws InputError as no liquor has it */
export function densityOf(text: string | undefined): number {
  if (text === undefined) return Number.NaN;
  const argument = "--solution-density";
  const { number, rest } = numberAndRest(argument, text);
  const factor = rest === "" ? 1 : densityFactor(rest);
  if (factor === undefined) return stop(argument, "unknown-density-unit", `"${rest}" is not a unit of density`);
  const density = number * factor;
  if (density >= densityRange.least && density <= densityRange.greatest) return density;
  return stop(argument, "implausible-density", `solution density ${number} ${rest || "kg/m3"}`);
}

const KINDS: readonly UncertaintyKind[] = ["standard", "expanded", "range", "standard deviation"];

/**
 * Standard uncertainty of a value in its unit, from what the options report; undefined where they report none.
 * `3 %` is relative to the quantity, a number alone is in the unit of the value.
 * @throws InputError for an uncertainty below 0, or as large as the value
 */
export function uncertaintyOf(options: ConvertOptions, value: number, { scale }: Unit): number | undefined {
  const argument = "--uncertainty";
  const kind = KINDS.find((word) => word === (options.uncertaintyKind ?? "standard"));
  if (kind === undefined) {
    const found = `"${options.uncertaintyKind}"`;
    return stop("--uncertainty-kind", "bad-choice", found, { expected: `one of ${KINDS.join(", ")}` });
  }
  if (options.uncertainty === undefined) return undefined;
  const { number, rest } = numberAndRest(argument, options.uncertainty.replace(/±/, " "));
  if (rest !== "" && rest !== "%") {
    const expected = "a number in the unit of the value, or one in percent";
    return stop(argument, "bad-argument", `"${rest}" behind the number`, { expected });
  }
  if (number < 0) return stop(argument, "bad-uncertainty", `${number} is below 0`);
  const factor = optionalNumber("--coverage-factor", options.coverageFactor, Number.MIN_VALUE);
  const standard = standardFromReported(number, kind, factor, optionalNumber("--n", options.n, 1));
  const relative = rest === "%" ? standard / 100 : relativeFromStandard(scale, value, standard);
  if (!(relative < 1)) {
    const found = `uncertainty ${options.uncertainty} of the value ${value} is as large as the value itself`;
    return stop(argument, "bad-uncertainty", found);
  }
  return rest === "%" ? standardFromRelative(scale, value, relative) : standard;
}
