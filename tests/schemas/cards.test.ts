import { describe, expect, test } from "vitest";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import { DEFAULT_TABLE_FORMAT } from "../../pipeline/records/generated/source-card.ts";
import { FIELDS } from "../../pipeline/records/readings.ts";
import { validateCollectionCard, validateSourceCard } from "../../pipeline/records/validators.js";
import type { Schema } from "../../schemas/schema-files.ts";
import { schemaNamed } from "./table-rows.ts";

const card = {
  format: 1,
  source: "harbour-2026-gravimetry",
  title: "Gravimetric series, spring campaign",
  origin: "laboratory",
  reported_by: "bench chemist 2",
  laboratory: "bench 4",
  date: "2026-03-14",
  reference: null,
  doi: null,
  licence: "internal",
  method: "gravimetric",
  file: "harbour-2026-gravimetry.csv",
  shape: "long",
  table: {
    encoding: "auto",
    delimiter: "auto",
    decimal: "auto",
    header_line: 1,
    sheet: null,
    missing: ["", "n.d.", "-"],
  },
  columns: {
    solute: { column: "Compound" },
    solvent: { column: "Solvent" },
    temperature: { column: "T", unit: "°C" },
    solubility: { column: "S", unit: "g/100 g solvent" },
    uncertainty: { column: "u(S)", kind: "standard", relative: false },
  },
  constants: { solid_form: "form I", excess_solid: "yes" },
  carry: ["Remarks"],
};

const paths = (data: unknown): string[] => {
  validateSourceCard(data);
  return (validateSourceCard.errors ?? []).map(({ instancePath, keyword }) => `${instancePath} ${keyword}`);
};

describe("a source card", () => {
  test("with everything a worked example shows is valid, with and without $schema", () => {
    expect(paths(card)).toEqual([]);
    expect(paths({ $schema: "../schemas/source-card.schema.json", ...card })).toEqual([]);
  });

  test("needs only format, source, file and columns", () => {
    expect(paths({ format: 1, source: "a", file: "a.csv", columns: {} })).toEqual([]);
    expect(paths({})).toEqual([" required", " required", " required", " required"]);
  });

  test("is refused with an unknown key, at any depth", () => {
    expect(paths({ ...card, colour: "red" })).toEqual([" additionalProperties"]);
    expect(paths({ ...card, columns: { ...card.columns, solubilty: { column: "S" } } })).toEqual([
      "/columns additionalProperties",
    ]);
    expect(paths({ ...card, table: { header: 1 } })).toEqual(["/table additionalProperties"]);
  });

  test("is refused with a unit and a unit column for one field", () => {
    const columns = { solubility: { column: "S", unit: "mg/mL", unit_column: "unit" } };
    expect(paths({ ...card, columns })).toEqual(["/columns/solubility/unit_column false schema"]);
  });

  test("reports every error, not only the first", () => {
    expect(paths({ ...card, origin: "web", method: "eye", date: "14.3.2026", format: 2 }).sort()).toEqual([
      "/date pattern",
      "/format const",
      "/method enum",
      "/origin enum",
    ]);
  });

  test.each(["A", "-a", "a_b", "", "a".repeat(65), "../a", "a b"])("is refused with the source name %j", (source) => {
    expect(paths({ ...card, source })).toEqual(["/source pattern"]);
  });

  test.each(["2026", "2026-03", "2026-03-14", null])("takes the date %j", (date) => {
    expect(paths({ ...card, date })).toEqual([]);
  });

  test("takes a constant with a unit, and a plain word only from the fixed list", () => {
    expect(paths({ ...card, constants: { temperature: { value: 25, unit: "°C" } } })).toEqual([]);
    expect(paths({ ...card, constants: { temperature: 25 } })).toEqual(["/constants/temperature type"]);
    expect(paths({ ...card, constants: { excess_solid: "perhaps" } })).toEqual(["/constants/excess_solid enum"]);
  });

  test("knows every field of a measurement as a column and as a constant, in one order", () => {
    const keys = (name: string) => Object.keys(schemaNamed("source-card").$defs?.[name]?.properties ?? {});
    expect(keys("Columns")).toEqual([...FIELDS]);
    expect(keys("Constants")).toEqual([...FIELDS]);
  });

  test("leaves the table's format to be found where it does not say", () => {
    expect(DEFAULT_TABLE_FORMAT).toEqual(card.table);
  });
});

describe("the collection's card", () => {
  test("needs only format and name", () => {
    expect(validateCollectionCard({ format: 1, name: "demo" })).toBe(true);
    expect(validateCollectionCard({ format: 1 })).toBe(false);
  });

  test("is refused with an unknown setting", () => {
    expect(validateCollectionCard({ format: 1, name: "demo", settings: { temperature_window: 5 } })).toBe(false);
    expect(validateCollectionCard.errors?.[0]?.params).toEqual({ additionalProperty: "temperature_window" });
  });

  test("is refused with a false-discovery rate of 0 or above one half, and with a negative threshold", () => {
    for (const false_discovery_rate of [0, 0.6]) {
      expect(validateCollectionCard({ format: 1, name: "demo", settings: { false_discovery_rate } })).toBe(false);
    }
    const settings = { material_threshold_percent: { aqueous_salts: -5 } };
    expect(validateCollectionCard({ format: 1, name: "demo", settings })).toBe(false);
  });
});

describe("the default settings", () => {
  test("are valid settings and leave none out", () => {
    expect(validateCollectionCard({ format: 1, name: "demo", settings: DEFAULT_SETTINGS })).toBe(true);
    const leavesWithoutDefault = (schema: Schema, path: string): string[] =>
      schema.properties === undefined
        ? schema.default === undefined
          ? [path]
          : []
        : Object.entries(schema.properties).flatMap(([key, part]) => leavesWithoutDefault(part, `${path}/${key}`));
    expect(leavesWithoutDefault(schemaNamed("collection").$defs?.settings as Schema, "")).toEqual([]);
  });

  // Common practice, as the documentation of the settings states them.
  test("are the documented figures", () => {
    expect(DEFAULT_SETTINGS).toMatchObject({
      default_uncertainty_percent: {
        gravimetric: 1.5,
        titration: 1,
        hplc: 3,
        uv: 4,
        "isothermal-synthetic": 2,
        unspecified: 5,
        handbook_salts: 2,
      },
      gravimetric_uncertainty_g_per_100g: 0.005,
      uncertainty_floor_percent: { below_1_mg_per_mL: 10, below_0_1_mg_per_mL: 20, below_0_01_mg_per_mL: 40 },
      reported_uncertainty_floor_percent: { general: 1, aqueous_salts: 0.5 },
      temperature_uncertainty_K: {
        solution: 0.1,
        bath: 0.3,
        jacket: 0.5,
        clear_point_to_0_3_K_per_min: 0.5,
        clear_point_to_1_K_per_min: 1,
        clear_point_faster: 2,
      },
      jacket_uncertainty_per_K_from_room: 0.01,
      room_temperature_K: { low: 293.15, high: 298.15 },
      between_laboratory_percent: { general: 4, aqueous_salts: 1 },
      composition_uncertainty_wt_percent: { by_mass: 0.2, by_volume: 0.5, plain_ethanol_water: 0.5 },
      material_threshold_uncertainties: 3,
      material_threshold_percent: {
        from_10_mg_per_mL: 10,
        from_1_mg_per_mL: 15,
        from_0_1_mg_per_mL: 25,
        below_0_1_mg_per_mL: 60,
        aqueous_salts: 5,
      },
      pharmacopoeia_factor: 2,
      single_temperature_threshold_log10: 0.5,
      false_discovery_rate: 0.01,
      fit_weighting: "relative",
      planning_excess_solvent_percent: 10,
      carry: [],
    });
  });
});
