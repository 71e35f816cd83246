import { Ajv2020 } from "ajv/dist/2020.js";
import { describe, expect, test } from "vitest";
import { isTable, loadSchemas, type Schema } from "../../schemas/schema-files.ts";
import { documentErrors, recordErrors, validatorOfPart } from "./table-rows.ts";

const schemas = loadSchemas();

/** Every property of a schema and of the schemas inside it, with its path. */
function propertiesOf(schema: Schema, path: string): { path: string; part: Schema }[] {
  const own = Object.entries(schema.properties ?? {}).flatMap(([key, part]) => [
    { path: `${path}/${key}`, part },
    ...propertiesOf(part, `${path}/${key}`),
  ]);
  const defined = Object.entries(schema.$defs ?? {}).flatMap(([key, part]) => propertiesOf(part, `${path}#${key}`));
  const items = schema.items ? propertiesOf(schema.items, `${path}[]`) : [];
  return [...own, ...defined, ...items];
}

const all = schemas.map(({ name, schema }) => ({ name, schema, properties: propertiesOf(schema, name) }));

// A description of a number tells its unit in one of these ways; ", 1" says that it is a pure number.
const UNIT = new RegExp(
  [
    ...[
      ", K\\b",
      ", K/",
      "\\bkJ/mol\\b",
      "\\bg/mol\\b",
      "\\bmol/mol\\b",
      "\\bkg/m3\\b",
      "\\bpercent\\b",
      "wt %",
      ", h\\.",
    ],
    ...["g/100 g", "\\bm?g unsolvated solute per", "\\bmol solute per", "\\bmL per g\\b", "log10 unit", "bytes"],
    ...["[Aa] count\\.", "\\bline\\b", "a fraction", "standard deviations", ", 1\\b", "; 1 in every model", "0 to 1"],
    ...[
      "unit (stated )?beside it",
      "reported_unit",
      "corrected_unit",
      "in (its|that) unit",
      "in `unit`",
      "T in K",
      "No unit\\.",
    ],
    ...["the (unit|units) of", "product of their units", "products of their units"],
  ].join("|"),
);

describe("the schemas", () => {
  test("cover every file kind of a collection, of the tables and of the machine-readable results", () => {
    expect(schemas.map(({ name }) => name)).toEqual([
      ...["check-result", "collection", "compare-result", "convert-result", "curves", "curves-json", "edition"],
      ...["flags", "grid", "measurements", "merge-result", "mixtures", "planning-cooling", "property-values"],
      "publish-result",
      ...["refused", "rule-result", "rulings", "solid-forms", "source-card", "sources", "substances"],
      ...["substances-out", "summary", "systems"],
    ]);
  });

  test.each(schemas)("$name is a valid schema of JSON Schema 2020-12 in strict mode", ({ name, schema }) => {
    expect(schema.$schema).toBe("https://json-schema.org/draft/2020-12/schema");
    expect(schema.$id).toBe(`${name}.schema.json`);
    const ajv = new Ajv2020({ strict: true, strictTypes: true, allowUnionTypes: true });
    expect(ajv.validateSchema(schema), JSON.stringify(ajv.errors)).toBe(true);
    for (const other of schemas) ajv.addSchema(other.schema);
    expect(ajv.getSchema(schema.$id as string)).toBeTypeOf("function");
  });

  test.each(all)("every property of $name is described with its unit", ({ properties }) => {
    expect(properties.length).toBeGreaterThan(0);
    for (const { path, part } of properties) {
      expect(part.description, path).toBeTypeOf("string");
      const numeric = [part.type ?? []].flat().some((type) => type === "number" || type === "integer");
      if (numeric) expect(part.description, path).toMatch(UNIT);
    }
  });

  test.each(all)(
    "every property of $name has an example, and its examples and default are valid",
    ({ schema, properties }) => {
      for (const { path, part } of properties) {
        expect(part.examples?.length ?? 0, `${path} has no example`).toBeGreaterThan(0);
        const validate = validatorOfPart(schema, part);
        for (const example of part.examples ?? []) {
          expect(validate(example), `${path} ${JSON.stringify(example)}: ${JSON.stringify(validate.errors)}`).toBe(
            true,
          );
        }
        if (part.default !== undefined) expect(validate(part.default), `${path} default`).toBe(true);
      }
    },
  );

  test.each(schemas)(
    "$name accepts the document made of its examples and refuses an unknown key",
    ({ name, schema }) => {
      const document = Object.fromEntries(
        Object.entries(schema.properties ?? {}).map(([key, part]) => [key, part.examples?.[0]]),
      );
      expect(documentErrors(name, document)).toEqual([]);
      expect(documentErrors(name, { ...document, surplus: 1 }).join()).toContain("surplus");
    },
  );

  test("refuse unknown keys in every object, not only in the outermost", () => {
    const open = (schema: Schema, path: string): string[] => [
      ...(schema.properties && schema.additionalProperties !== false ? [path] : []),
      ...Object.entries({ ...schema.properties, ...schema.$defs }).flatMap(([key, part]) =>
        open(part, `${path}/${key}`),
      ),
      ...(schema.items ? open(schema.items, `${path}[]`) : []),
    ];
    expect(schemas.flatMap(({ name, schema }) => open(schema, name))).toEqual([]);
  });

  test("hold no tuple, which the type generator cannot express", () => {
    expect(schemas.filter(({ schema }) => JSON.stringify(schema).includes('"prefixItems"'))).toEqual([]);
  });

  test("say of each schema of a table's row which columns are never empty", () => {
    const tables = schemas.filter(({ schema }) => isTable(schema));
    expect(tables).toHaveLength(14);
    for (const { name, schema } of tables) expect(schema.required?.length ?? 0, name).toBeGreaterThan(0);
  });
});

describe("a record of a table", () => {
  const columns = ["source", "line", "column", "code", "found", "expected", "mend", "raw"];

  test("is accepted with empty cells where the column may be empty", () => {
    expect(recordErrors("refused", columns, ["a", "", "", "no-header", "nothing", "a header", "add one", ""])).toEqual(
      [],
    );
  });

  test("is refused with an empty cell in a column that is never empty", () => {
    const errors = recordErrors("refused", columns, ["", "3", "", "no-header", "nothing", "a header", "add one", ""]);
    expect(errors.join()).toContain("'source'");
  });

  test("is refused with a number that is not in its shortest form", () => {
    const errors = recordErrors("refused", columns, ["a", "3.0", "", "x", "nothing", "a header", "add one", ""]);
    expect(errors.join()).toContain("/line must be integer");
  });
});
