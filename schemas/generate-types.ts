/**
 * Writes what the program takes from the schemas: record types, column lists, default settings and compiled validators.
 *
 *     npx tsx schemas/generate-types.ts           writes the files
 *     npx tsx schemas/generate-types.ts --check   names the files that no longer match, exits 1 if there are any
 *
 * The order of `properties` in a table's schema is the order of its columns. The output depends on the schemas alone.
 */
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { compile } from "json-schema-to-typescript";
import { validatorModule } from "./generate-validators.ts";
import { defaultsOf, isTable, loadSchemas, mapSchemas, type NamedSchema, type Schema } from "./schema-files.ts";

const root = dirname(dirname(fileURLToPath(import.meta.url)));
const generated = "pipeline/records/generated";
const BANNER = "// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.";

/** Files that the program reads, and so must validate while it runs. */
const VALIDATED_AT_RUN_TIME = ["collection", "source-card"];

/** Name of the constant that lists a table's columns: `planning-cooling` gives PLANNING_COOLING_COLUMNS. */
function columnsName(schemaName: string): string {
  return `${schemaName.replaceAll("-", "_").toUpperCase()}_COLUMNS`;
}

/**
 * A schema as the type generator wants it: a `$ref` beside other keywords is wrapped, so that one type stays one type,
 * and a `$ref` to the settings of another file becomes the type of the settings in force.
 */
function forTypes(schema: Schema): Schema {
  return mapSchemas(schema, ({ $ref, ...rest }) => {
    if ($ref === undefined) return rest;
    if ($ref === "collection.schema.json#/$defs/settings") return { ...rest, tsType: "Settings" };
    return Object.keys(rest).length === 0 ? { $ref } : { ...rest, allOf: [{ $ref }] };
  });
}

/** Interfaces of a schema; `title` names the outermost one. */
async function interfacesOf(schema: Schema): Promise<string> {
  const { $id: _, $schema: __, ...rest } = forTypes(schema);
  return compile(rest as Parameters<typeof compile>[0], String(schema.title), {
    additionalProperties: false,
    bannerComment: "",
    ignoreMinAndMaxItems: true,
    style: { printWidth: 120 },
  });
}

/** The settings as they are in force: every one present. */
function settingsInForce(settings: Schema): Schema {
  const complete = mapSchemas(settings, (schema) =>
    schema.properties === undefined ? schema : { ...schema, required: Object.keys(schema.properties) },
  );
  return { ...complete, title: "Settings", description: "Settings in force: every one present, defaults filled in." };
}

/** Text of one generated module. */
async function moduleOf({ name, schema }: NamedSchema): Promise<string> {
  const parts = [BANNER, await interfacesOf(schema)];
  if (JSON.stringify(schema).includes("collection.schema.json#/$defs/settings")) {
    parts.splice(1, 0, `import type { Settings } from "./collection.ts";`);
  }
  if (isTable(schema)) {
    const columns = JSON.stringify(Object.keys(schema.properties ?? {}), null, 2);
    parts.push(
      `/** Columns of the table, in their order. */\nexport const ${columnsName(name)} = ${columns} as const satisfies readonly (keyof ${schema.title})[];`,
    );
  }
  const settings = schema.$defs?.settings;
  if (settings !== undefined) {
    parts.push(await interfacesOf(settingsInForce(settings)));
    parts.push(
      `/** Settings of a collection that states none. */\nexport const DEFAULT_SETTINGS: Settings = ${JSON.stringify(defaultsOf(settings), null, 2)};`,
    );
  }
  const table = schema.$defs?.TableFormat;
  if (table !== undefined) {
    parts.push(
      `/** How a table is read where its card does not say. */\nexport const DEFAULT_TABLE_FORMAT: Required<TableFormat> = ${JSON.stringify(defaultsOf(table), null, 2)};`,
    );
  }
  return `${parts.map((part) => part.trim()).join("\n\n")}\n`;
}

/** Typing of the validators: each is a type guard for its record. */
function validatorTypes(schemas: readonly NamedSchema[]): string {
  const imports = schemas.map(({ name, schema }) => `import type { ${schema.title} } from "./generated/${name}.ts";`);
  const exports = schemas.map(
    ({ schema }) => `export const validate${schema.title}: ValidateFunction<${schema.title}>;`,
  );
  return [BANNER, `import type { ValidateFunction } from "ajv";`, ...imports, "", ...exports, ""].join("\n");
}

/** Every generated file: path relative to the project, and its text. */
export async function generatedFiles(): Promise<Map<string, string>> {
  const schemas = loadSchemas();
  const validated = schemas.filter(({ name }) => VALIDATED_AT_RUN_TIME.includes(name));
  const files = new Map<string, string>();
  for (const named of schemas) files.set(`${generated}/${named.name}.ts`, await moduleOf(named));
  files.set("pipeline/records/validators.js", `${BANNER}\n${validatorModule(validated)}`);
  files.set("pipeline/records/validators.d.ts", validatorTypes(validated));
  return files;
}

/** Files in the folder of generated types that no schema gives rise to. */
function orphans(files: ReadonlyMap<string, string>): string[] {
  const folder = join(root, generated);
  const present = existsSync(folder) ? readdirSync(folder).sort() : [];
  return present.map((file) => `${generated}/${file}`).filter((file) => !files.has(file));
}

/** Files that are missing, differ from `files` (what the schemas give), or belong to no schema. */
export function staleFiles(files: ReadonlyMap<string, string>): string[] {
  const differing = [...files].filter(([file, text]) => {
    const path = join(root, file);
    return !existsSync(path) || readFileSync(path, "utf8") !== text;
  });
  return [...differing.map(([file]) => file), ...orphans(files)];
}

async function writeGenerated(): Promise<void> {
  const files = await generatedFiles();
  mkdirSync(join(root, generated), { recursive: true });
  for (const file of orphans(files)) rmSync(join(root, file));
  for (const [file, text] of files) writeFileSync(join(root, file), text);
  console.log(`${files.size} files written from the schemas`);
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  if (process.argv.includes("--check")) {
    const stale = staleFiles(await generatedFiles());
    for (const file of stale) console.error(`${file} does not match the schemas: run npm run generate`);
    process.exitCode = stale.length === 0 ? 0 : 1;
  } else await writeGenerated();
}
