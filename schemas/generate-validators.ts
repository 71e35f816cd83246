import { Ajv2020 } from "ajv/dist/2020.js";
import standalone from "ajv/dist/standalone/index.js";
import { mapSchemas, type NamedSchema, type Schema } from "./schema-files.ts";

/** A schema without what only people read, so that the compiled code stays small and loads fast. */
function withoutProse(schema: Schema): Schema {
  return mapSchemas(schema, ({ title: _, description: __, examples: ___, default: ____, ...rest }) => rest);
}

/**
 * Module of standalone validators, one exported function `validateTITLE` a schema; all errors are reported.
 *
 * @throws Error if a schema uses a keyword whose compiled form calls a helper by `require`, which a module lacks.
 */
export function validatorModule(schemas: readonly NamedSchema[]): string {
  const ajv = new Ajv2020({
    allErrors: true,
    allowUnionTypes: true,
    inlineRefs: false,
    code: { source: true, esm: true, lines: true },
  });
  for (const { schema } of schemas) ajv.addSchema(withoutProse(schema));
  const exports = Object.fromEntries(schemas.map(({ schema }) => [`validate${schema.title}`, schema.$id as string]));
  const code = standalone.default(ajv, exports).replace(/^"use strict";\n?/, "");
  if (code.includes("require(")) throw new Error("a compiled validator calls require()");
  return code;
}
