import { describe, expect, test } from "vitest";
import { CURVES_COLUMNS } from "../../pipeline/records/generated/curves.ts";
import { FLAGS_COLUMNS } from "../../pipeline/records/generated/flags.ts";
import { GRID_COLUMNS } from "../../pipeline/records/generated/grid.ts";
import { MEASUREMENTS_COLUMNS } from "../../pipeline/records/generated/measurements.ts";
import { PLANNING_COOLING_COLUMNS } from "../../pipeline/records/generated/planning-cooling.ts";
import { PROPERTY_VALUES_COLUMNS } from "../../pipeline/records/generated/property-values.ts";
import { REFUSED_COLUMNS } from "../../pipeline/records/generated/refused.ts";
import { RULINGS_COLUMNS } from "../../pipeline/records/generated/rulings.ts";
import { SOLID_FORMS_COLUMNS } from "../../pipeline/records/generated/solid-forms.ts";
import { SOURCES_COLUMNS } from "../../pipeline/records/generated/sources.ts";
import { SUBSTANCES_COLUMNS } from "../../pipeline/records/generated/substances.ts";
import { SUBSTANCES_OUT_COLUMNS } from "../../pipeline/records/generated/substances-out.ts";
import { SYSTEMS_COLUMNS } from "../../pipeline/records/generated/systems.ts";
import { schemaNamed } from "./table-rows.ts";

// Column lists that other programs rely on, written out so that a change of order or name is seen here.
const CONTRACT = {
  measurements:
    "measurement_id,source,line,column,solute,solid_form,solvent,composition,medium,family,system,branch,temperature_K,reported_value,reported_unit,value_low,value_high,mole_fraction,g_per_100g_solvent,mg_per_mL_solution,mol_per_L,u_rel,assumptions,predicted_mole_fraction,deviation_percent,z,weight,status,flags,method,reference,doi,carried",
  refused: "source,line,column,code,found,expected,mend,raw",
  flags:
    "flag_id,scope,measurement_id,source,line,system,code,severity,suspected_cause,cause_detail,cause_probability,proposed_value,evidence,look_at,ruling",
  rulings: "ruling_id,target,action,corrected_value,corrected_unit,reason,evidence,by,date,fingerprint",
  substances:
    "name,role,synonyms,cas,inchikey,smiles,formula,molar_mass,melting_point_K,fusion_enthalpy_kJ_per_mol,density_kg_per_m3,hazards,reference",
  solidForms:
    "solute,form,kind,guest,guest_per_solute,molar_mass,melting_point_K,fusion_enthalpy_kJ_per_mol,density_kg_per_m3,transition_K,to_form,reference",
  propertyValues: "name,property,value,unit,standard_uncertainty,T_min_K,T_max_K,reference",
};

describe("columns of the tables", () => {
  test("measurements.csv has the columns other programs rely on, in their order", () => {
    expect(MEASUREMENTS_COLUMNS.join()).toBe(CONTRACT.measurements);
  });

  test("refused.csv has the columns other programs rely on, in their order", () => {
    expect(REFUSED_COLUMNS.join()).toBe(CONTRACT.refused);
  });

  test("flags.csv has the columns other programs rely on, in their order", () => {
    expect(FLAGS_COLUMNS.join()).toBe(CONTRACT.flags);
  });

  test("rulings.csv has the columns a group writes, in their order", () => {
    expect(RULINGS_COLUMNS.join()).toBe(CONTRACT.rulings);
  });

  test("the three property tables have the columns a group writes, in their order", () => {
    expect(SUBSTANCES_COLUMNS.join()).toBe(CONTRACT.substances);
    expect(SOLID_FORMS_COLUMNS.join()).toBe(CONTRACT.solidForms);
    expect(PROPERTY_VALUES_COLUMNS.join()).toBe(CONTRACT.propertyValues);
  });

  test("the name of a key is the same in the table it is defined in and in those that point to it", () => {
    expect(SOURCES_COLUMNS[0]).toBe("source");
    expect(SYSTEMS_COLUMNS[0]).toBe("system");
    expect(CURVES_COLUMNS[0]).toBe("curve_id");
    expect(RULINGS_COLUMNS[0]).toBe("ruling_id");
    expect(SUBSTANCES_OUT_COLUMNS[0]).toBe("key");
    for (const columns of [MEASUREMENTS_COLUMNS, FLAGS_COLUMNS, REFUSED_COLUMNS]) expect(columns).toContain("source");
    for (const columns of [MEASUREMENTS_COLUMNS, FLAGS_COLUMNS, CURVES_COLUMNS, GRID_COLUMNS, PLANNING_COOLING_COLUMNS])
      expect(columns).toContain("system");
    expect(GRID_COLUMNS).toContain("curve_id");
    expect(PLANNING_COOLING_COLUMNS).toContain("curve_id");
  });

  test("the cooling plan gives recovery at equilibrium with limits, the note and the reason for a blank", () => {
    expect(PLANNING_COOLING_COLUMNS).toEqual(
      expect.arrayContaining([
        "max_recovery_equilibrium_percent",
        "max_recovery_equilibrium_percent_low",
        "max_recovery_equilibrium_percent_high",
        "note",
        "blank_reason",
      ]),
    );
  });
});

describe("words of the tables", () => {
  const words = (table: string, column: string) => schemaNamed(table).properties?.[column]?.enum;

  test("status, scope, severity, action and grade have their fixed words", () => {
    expect(words("measurements", "status")).toEqual(["kept", "set aside", "interval", "not fitted"]);
    expect(words("flags", "scope")).toEqual(["measurement", "block", "source", "system"]);
    expect(words("flags", "severity")).toEqual(["blocking", "notice"]);
    expect(words("rulings", "action")).toEqual(["keep", "set aside", "correct", "ask"]);
    expect(words("systems", "grade")).toEqual(["recommended", "tentative", "doubtful", "rejected"]);
    expect(words("solid-forms", "kind")).toEqual([
      "polymorph",
      "hydrate",
      "solvate",
      "salt",
      "co-crystal",
      "amorphous",
    ]);
  });

  test("a suspected cause is one of twenty-one, the same in flags and in the verdicts on new data", () => {
    const causes = [
      ...["power of ten", "dilution factor", "basis mix-up", "temperature unit", "temperature offset"],
      ...["hydrate basis", "salt or free base", "composition mix-up", "rows shifted", "digits transposed"],
      ...["value of another solvent", "logarithm base", "calculated value copied", "everything dissolved"],
      ...["loss on filtration", "solvent lost", "not at equilibrium", "cloud point for clear point"],
      ...["another solid form", "wet solvent", "no simple cause"],
    ];
    expect(words("flags", "suspected_cause")).toEqual(causes);
    const row = schemaNamed("check-result").$defs?.CheckedRow?.properties;
    expect(row?.suspected_cause?.enum).toEqual(causes);
    expect(row?.verdict?.enum).toEqual([
      ...["fits", "off the curve", "outside the range", "new system", "cannot tell"],
    ]);
  });

  test("method and origin have the same words in a card and in the tables", () => {
    const methods = [
      ...["gravimetric", "titration", "hplc", "uv", "refractive-index", "isothermal-synthetic", "clear-point"],
      ...["cloud-point", "kinetic-from-stock", "unspecified"],
    ];
    for (const table of ["source-card", "measurements", "sources"]) expect(words(table, "method")).toEqual(methods);
    const origins = ["laboratory", "literature", "open-dataset", "handbook"];
    for (const table of ["source-card", "sources"]) expect(words(table, "origin")).toEqual(origins);
  });
});
