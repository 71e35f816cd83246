import { readFileSync } from "node:fs";
import type { ErrorObject } from "ajv";
import { type Place, type Problem, problem } from "../problems/catalogue.ts";
import { type JsonFile, type JsonPath, placeOf } from "./json-file.ts";
import { didYouMean } from "./near-miss.ts";

/** One way in which a JSON file departs from its schema, in plain words. */
interface Fault {
  readonly line: number;
  readonly column: number;
  readonly key: string;
  readonly found: string;
  readonly expected: string;
}

/** Faults told in one problem; a card with more is mended in rounds. */
const MOST_TOLD = 5;

/**
 * The faults a schema finds in a JSON file as one problem: the first in the order of the file with its line and key, the
 * others after it.
 *
 * @param schemaFile name of the schema in schemas/, from which the names of known keys are taken
 * @param errors at least one error of the compiled validator
 */
export function schemaProblem(
  code: "wrong-card" | "wrong-collection",
  file: JsonFile,
  schemaFile: string,
  errors: readonly ErrorObject[],
  place: Place,
): Problem {
  const schema = readSchema(schemaFile);
  const faults = errors.map((error) => toFault(error, file, schema));
  faults.sort((a, b) => a.line - b.line || a.column - b.column);
  const [first, ...others] = faults as [Fault, ...Fault[]];
  const told = others
    .slice(0, MOST_TOLD - 1)
    .map(({ line, found, expected }) => `line ${line}: ${found} (expected ${expected})`);
  if (faults.length > MOST_TOLD) told.push(`and ${faults.length - MOST_TOLD} more`);
  const found = [first.found, ...told].join("; ");
  return problem(code, { ...place, line: first.line, column: first.key }, { found, expected: first.expected });
}

const join = (path: JsonPath) => path.join(".") || "the file";

/** Keys and positions of a JSON pointer (RFC 6901). */
function pathOf(pointer: string): string[] {
  return pointer
    .split("/")
    .slice(1)
    .map((part) => part.replaceAll("~1", "/").replaceAll("~0", "~"));
}

function toFault(error: ErrorObject, file: JsonFile, schema: unknown): Fault {
  const path = pathOf(error.instancePath).map((part) => (/^\d+$/.test(part) ? Number(part) : part));
  const params = error.params as Readonly<Record<string, unknown>>;
  if (error.keyword === "additionalProperties") {
    const key = String(params.additionalProperty);
    const known = knownKeys(schema, path);
    const found = `"${key}" is not a key of ${join(path)}${didYouMean(key, known)}`;
    return { ...placeOf(file, [...path, key], true), key, found, expected: `one of ${known.join(", ")}` };
  }
  if (error.keyword === "required") {
    const key = String(params.missingProperty);
    return { ...placeOf(file, path, true), key, found: `${join(path)} has no "${key}"`, expected: `a key "${key}"` };
  }
  const shown = JSON.stringify(valueAt(file.value, path)) ?? "nothing";
  const found = `${join(path)} is ${shown.length > 80 ? `${shown.slice(0, 80)}…` : shown}`;
  if (error.keyword === "false schema") {
    const expected = "either this key or the other, not both (unit or unit_column)";
    return { ...placeOf(file, path, true), key: String(path.at(-1) ?? ""), found, expected };
  }
  return {
    ...placeOf(file, path, false),
    key: String(path.at(-1) ?? ""),
    found,
    expected: expectation(error.keyword, params),
  };
}

/** What a keyword of JSON Schema asks for, in plain words. */
function expectation(keyword: string, params: Readonly<Record<string, unknown>>): string {
  const list = (values: unknown) => (values as unknown[]).map((value) => JSON.stringify(value)).join(", ");
  switch (keyword) {
    case "const":
      return JSON.stringify(params.allowedValue);
    case "enum":
      return `one of ${list(params.allowedValues)}`;
    case "type":
      return `a value of type ${[params.type].flat().join(" or ").replaceAll("string", "text")}`;
    case "pattern":
      return PATTERNS[String(params.pattern)] ?? `text of the form ${params.pattern}`;
    case "minimum":
    case "maximum":
    case "exclusiveMinimum":
    case "exclusiveMaximum":
      return `a number ${params.comparison} ${params.limit}`;
    case "minLength":
      return `text of at least ${params.limit} character`;
    case "uniqueItems":
      return `every entry once (entries ${params.j} and ${params.i} are equal, counted from 0)`;
    default:
      return `${keyword} as the schema says`;
  }
}

/** Patterns of the schemas in words. */
const PATTERNS: Readonly<Record<string, string>> = {
  "^[a-z0-9][a-z0-9-]{0,63}$": "1 to 64 lower-case letters, digits and hyphens, beginning with a letter or digit",
  "^[0-9]{4}(-(0[1-9]|1[0-2])(-(0[1-9]|[12][0-9]|3[01]))?)?$": "a date such as 2026-03-14, 2026-03 or 2026",
  "^10\\.[0-9]{4,9}/[^\\s]+$": "a digital object identifier such as 10.1000/example, without https://doi.org/",
};

function valueAt(value: unknown, path: JsonPath): unknown {
  let at = value;
  for (const part of path) at = (at as Readonly<Record<string, unknown>> | undefined)?.[part];
  return at;
}

type Schema = Readonly<Record<string, unknown>>;

function readSchema(name: string): unknown {
  return JSON.parse(readFileSync(new URL(`../../schemas/${name}`, import.meta.url), "utf8"));
}

/** Keys that the schema knows for the object at a path, in code-unit order. */
function knownKeys(schema: unknown, path: JsonPath): string[] {
  const root = schema as Schema;
  const follow = (part: unknown): Schema => {
    const reference = (part as Schema | undefined)?.$ref;
    return typeof reference === "string" ? (valueAt(root, pathOf(reference)) as Schema) : ((part ?? {}) as Schema);
  };
  let at = root;
  for (const part of path) {
    const properties = at.properties as Schema | undefined;
    at = follow(typeof part === "number" ? at.items : properties?.[part]);
  }
  return Object.keys((at.properties as object | undefined) ?? {}).sort();
}
