import { Ajv2020, type ValidateFunction } from "ajv/dist/2020.js";
import { loadSchemas, type Schema } from "../../schemas/schema-files.ts";

const schemas = new Map(loadSchemas().map(({ name, schema }) => [name, schema]));
const ajv = new Ajv2020({ allErrors: true, allowUnionTypes: true });
for (const schema of schemas.values()) ajv.addSchema(schema);

/** Schema of a file kind by the name of its schema file. @throws RangeError if there is none. */
export function schemaNamed(name: string): Schema {
  const schema = schemas.get(name);
  if (schema === undefined) throw new RangeError(`no schema "${name}"`);
  return schema;
}

/** Compiled validator of a file kind. */
export function validatorNamed(name: string): ValidateFunction {
  return ajv.getSchema(schemaNamed(name).$id as string) as ValidateFunction;
}

/** Validator of one part of a schema, which may point to the schema's own `$defs`. */
export function validatorOfPart(root: Schema, part: Schema): ValidateFunction {
  return ajv.compile({ ...part, ...(root.$defs ? { $defs: root.$defs } : {}) });
}

/** Errors of a document against a file kind, one sentence each. */
export function documentErrors(name: string, document: unknown): string[] {
  const validate = validatorNamed(name);
  validate(document);
  return (validate.errors ?? []).map(({ instancePath, message, params }) =>
    `${instancePath} ${message} ${JSON.stringify(params)}`.trim(),
  );
}

const isNumeric = (schema: Schema): boolean =>
  [schema.type ?? []].flat().some((type) => type === "number" || type === "integer");

/** A cell as its schema sees it: a number where it is one in its shortest form and the column may hold numbers. */
function valueOfCell(schema: Schema | undefined, cell: string): string | number {
  const number = Number(cell);
  return schema !== undefined && isNumeric(schema) && String(number) === cell ? number : cell;
}

/**
 * Errors of one record of a CSV table against the schema of its rows. An empty cell is an absent property, so a
 * `required` column must not be empty; a number must be written in its shortest form.
 */
export function recordErrors(name: string, columns: readonly string[], cells: readonly string[]): string[] {
  const { properties = {} } = schemaNamed(name);
  if (cells.length !== columns.length) return [`${cells.length} cells for ${columns.length} columns`];
  const filled = columns.map((column, i) => [column, cells[i] as string] as const).filter(([, cell]) => cell !== "");
  return documentErrors(
    name,
    Object.fromEntries(filled.map(([column, cell]) => [column, valueOfCell(properties[column], cell)])),
  );
}
