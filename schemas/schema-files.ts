/** Reading and walking the schema files; used by the generator and by the tests of the schemas. */
import { readdirSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

/** The parts of a JSON Schema (2020-12) that the program's own schemas use. */
export interface Schema {
  $schema?: string;
  $id?: string;
  $ref?: string;
  $defs?: Record<string, Schema>;
  title?: string;
  description?: string;
  examples?: unknown[];
  default?: unknown;
  type?: string | string[];
  const?: unknown;
  enum?: unknown[];
  properties?: Record<string, Schema>;
  required?: string[];
  additionalProperties?: boolean | Schema;
  dependentSchemas?: Record<string, { properties: Record<string, boolean> }>;
  items?: Schema;
  allOf?: Schema[];
  anyOf?: Schema[];
  pattern?: string;
  [keyword: string]: unknown;
}

/** A schema with the name of its file, `.schema.json` left out. */
export interface NamedSchema {
  readonly name: string;
  readonly schema: Schema;
}

const folder = dirname(fileURLToPath(import.meta.url));
const SUFFIX = ".schema.json";

/** Every schema of this folder, sorted by name. */
export function loadSchemas(): NamedSchema[] {
  const names = readdirSync(folder)
    .filter((file) => file.endsWith(SUFFIX))
    .map((file) => file.slice(0, -SUFFIX.length))
    .sort();
  return names.map((name) => ({
    name,
    schema: JSON.parse(readFileSync(join(folder, `${name}${SUFFIX}`), "utf8")) as Schema,
  }));
}

/** True for the schema of one row of a table: its title ends in `Row`. */
export function isTable(schema: Schema): boolean {
  return schema.title?.endsWith("Row") === true;
}

/** A copy of a schema with `change` applied to it and to every schema inside it, innermost first. */
export function mapSchemas(schema: Schema, change: (schema: Schema) => Schema): Schema {
  const inner = (part: Schema): Schema => mapSchemas(part, change);
  const innerRecord = (record: Record<string, Schema>): Record<string, Schema> =>
    Object.fromEntries(Object.entries(record).map(([key, part]) => [key, inner(part)]));
  const copy = { ...schema };
  if (copy.$defs) copy.$defs = innerRecord(copy.$defs);
  if (copy.properties) copy.properties = innerRecord(copy.properties);
  if (typeof copy.additionalProperties === "object") copy.additionalProperties = inner(copy.additionalProperties);
  if (copy.items) copy.items = inner(copy.items);
  if (copy.allOf) copy.allOf = copy.allOf.map(inner);
  if (copy.anyOf) copy.anyOf = copy.anyOf.map(inner);
  return change(copy);
}

/** The value made of a schema's defaults: an object of its properties' defaults where it has properties. */
export function defaultsOf(schema: Schema): unknown {
  if (schema.properties === undefined) return schema.default;
  return Object.fromEntries(Object.entries(schema.properties).map(([key, part]) => [key, defaultsOf(part)]));
}
