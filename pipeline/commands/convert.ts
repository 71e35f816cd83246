import { type Conversion, type Converted, convertWithSteps } from "../bases/convert.ts";
import type { SoluteBasis } from "../bases/hydrate.ts";
import { isOpenAt, type Unit } from "../bases/unit.ts";
import { resolveIdentity } from "../identify/identity.ts";
import { createIdentityRegister, register } from "../identify/source.ts";
import { indexSubstances } from "../identify/substance-tables.ts";
import { type LiquorModel, liquorModel } from "../normalise/liquor.ts";
import { codeOfMissing, foreignGuest, openSoluteBases, readSoluteBasis } from "../normalise/unit-context.ts";
import { formatProblem, type Problem } from "../problems/catalogue.ts";
import { readCollectionTables, readProgramTables } from "../read/own-tables.ts";
import type { CellFault } from "../records/cells.ts";
import type { Identified } from "../records/identified.ts";
import { settingsInForce } from "../records/settings.ts";
import { explain, explainReadings, openResultOf, type Reading, resultOf } from "./convert-answer.ts";
import {
  argumentProblem,
  type ConvertOptions,
  densityOf,
  numberAndRest,
  stop,
  temperatureOf,
  uncertaintyOf,
  unitsOf,
} from "./convert-arguments.ts";
import { Exit, type ExitCode, type Terminal } from "./terminal.ts";

export type { ConvertOptions } from "./convert-arguments.ts";

const NO_TABLES = { substances: [], solidForms: [], propertyValues: [] };

/**
 * Solute, solvent and form of the command line with the properties of their liquor. What a dissolved solvate brings into
 * the liquor is known only once it is said what was weighed.
 */
async function liquorOf(
  options: ConvertOptions,
  value: number,
  unit: string,
): Promise<{ readonly who: Identified; readonly liquor: LiquorModel }> {
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
    ".",
    options.soluteBasis === undefined ? undefined : { text: String(value), unit, soluteBasis: options.soluteBasis },
  );
  if ("code" in found) return stopAt(found);
  const who = register(createIdentityRegister(), found);
  return { who, liquor: liquorModel(who, found.identity, settingsInForce(undefined)) };
}

const argumentOf = (field: string) => (field === "solubility" ? "value" : `--${field.replaceAll("_", "-")}`);

function stopAt({ field, code, found, expected, mend }: CellFault): never {
  return stop(argumentOf(field), code, found, { expected, mend });
}

/** One way to read the value: its unit and what the solute was weighed as. */
interface Sense {
  readonly unit: Unit;
  readonly basis: SoluteBasis;
  readonly name: string;
}

/** All ways to read the value, and the problem that says what is open where there are several. */
function sensesOf(text: string, value: number, options: ConvertOptions, who: Identified) {
  const written = unitsOf("value", text);
  const bare = written.length === 1 && isOpenAt(written[0] as Unit, value) ? (written[0] as Unit) : undefined;
  const units = bare === undefined ? written : bare.readings.flatMap((reading) => unitsOf("value", reading));
  let open: Problem | undefined;
  if (units.length > 1) {
    const readings = units.map(({ canonical }) => canonical).join(", ");
    const found = `${value} ${text} can be ${readings}`;
    const code = bare === undefined ? "open-unit" : "open-volume-basis";
    open = argumentProblem("value", code, found, { expected: `one of ${readings}`, mend: "write the unit in full" });
  }
  const senses = units.flatMap((unit): Sense[] => {
    const basis = readSoluteBasis(options.soluteBasis ?? "", who, unit, String(value));
    if (typeof basis === "string") return [{ unit, basis, name: unit.canonical }];
    const bases = options.soluteBasis === undefined ? openSoluteBases(who, unit) : [];
    if (bases.length === 0) return stopAt(basis);
    open ??= argumentProblem(argumentOf(basis.field), basis.code, basis.found, {
      mend: "say with --solute-basis what was weighed",
    });
    return bases.map((one) => ({ unit, basis: one, name: units.length > 1 ? `${unit.canonical}, ${one}` : one }));
  });
  return { senses, open };
}

/**
 * `saltern convert "VALUE UNIT"`: one conversion with its uncertainty, every step, property, assumption and the budget.
 * Where the basis is open every reading is converted, none is chosen, and the command ends with 1.
 */
export async function convert(text: string, options: ConvertOptions, terminal: Terminal): Promise<ExitCode> {
  const { number: value, rest } = numberAndRest("value", text);
  const target = targetOf(options.to);
  const temperatureK = temperatureOf("--temperature", options.temperature);
  const volumeK =
    options.volumeTemperature === undefined
      ? Number.NaN
      : temperatureOf("--volume-temperature", options.volumeTemperature);
  const density = densityOf(options.solutionDensity);
  const { who, liquor } = await liquorOf(options, value, rest);
  liquor.setConditions(temperatureK, volumeK, density);

  const { senses, open } = sensesOf(rest, value, options, who);
  const convertIn = ({ unit, basis }: Sense): Conversion => {
    const standardUncertainty = uncertaintyOf(options, value, unit);
    const request = { value, standardUncertainty, from: unit, to: target, needs: liquor.needs };
    return convertWithSteps({ ...request, soluteBasis: basis, targetSoluteBasis: "anhydrous" });
  };
  if (open !== undefined) return answerOpen(text, target, senses, convertIn, open, options, terminal);

  const [only] = senses as [Sense];
  const conversion = convertIn(only);
  const result = conversion.kind === "converted" ? conversion : stopHere(conversion, liquor);
  const guest = foreignGuest(who);
  const assumptions = [
    ...who.assumptions,
    ...result.assumptions,
    ...(guest === undefined ? [] : [guest]),
    ...(liquor.volumeRemark !== "" && [only.unit, target].some(({ basis }) => basis.includes("volume"))
      ? [liquor.volumeRemark]
      : []),
    ...(options.uncertainty === undefined
      ? ["value taken as exact: only properties contribute to the uncertainty"]
      : []),
  ];
  if (options.json) terminal.print(JSON.stringify(resultOf(result, target, assumptions)));
  else for (const line of explain(text, target, result, assumptions)) terminal.print(line);
  return Exit.done;
}

function targetOf(text: string): Unit {
  const [target, ...others] = unitsOf("--to", text);
  if (target !== undefined && others.length === 0) return target;
  const readings = unitsOf("--to", text)
    .map(({ canonical }) => canonical)
    .join(", ");
  return stop("--to", "open-unit", `"${text}" can be ${readings}`, { expected: `one of ${readings}` });
}

function answerOpen(
  text: string,
  target: Unit,
  senses: readonly Sense[],
  convertIn: (sense: Sense) => Conversion,
  open: Problem,
  options: ConvertOptions,
  terminal: Terminal,
): ExitCode {
  const readings = senses.map((sense): Reading => {
    const conversion = convertIn(sense);
    if (conversion.kind === "converted") return { reading: sense.name, result: conversion };
    return { reading: sense.name, why: whyNot(conversion) };
  });
  if (options.json) terminal.print(JSON.stringify(openResultOf(readings, target)));
  else for (const line of explainReadings(text, target, readings)) terminal.print(line);
  terminal.tell(formatProblem(open));
  return Exit.needsYou;
}

type NotConverted = Exclude<Conversion, Converted>;

/** Why a value was not converted, in words. */
function whyNot(conversion: NotConverted): string {
  if (conversion.kind === "missing") return `needs the ${conversion.missing.join(" and the ")}`;
  return conversion.kind === "impossible" ? conversion.reason : `can be ${conversion.readings.join(" or ")}`;
}

function stopHere(conversion: NotConverted, liquor: LiquorModel): never {
  if (conversion.kind === "missing") {
    const code = codeOfMissing(conversion.missing);
    const density = code === "no-density" ? liquor.missingDensity() : undefined;
    return stop("value", code, density ?? whyNot(conversion));
  }
  return stop("value", "value-not-positive", whyNot(conversion), { expected: "a value that a solution can have" });
}
