import { apparentDensityCoefficients, liquidDensityModels, type Properties } from "./density-rows.ts";
import { type Formula, parseFormula } from "./formula.ts";
import { hydrateParts } from "./hydrate-parts.ts";
import { readInchikey } from "./inchikey.ts";
import type { Draft } from "./layered-tables.ts";
import { molarMass as molarMassOf } from "./molar-mass.ts";
import { readRegistryNumber } from "./registry-number.ts";
import { saltKind } from "./salt-kind.ts";
import { MOLAR_MASS_TOLERANCE } from "./solid-form-rows.ts";
import type { Property, Substance, SubstanceRole } from "./substances.ts";
import {
  faultAt,
  isNumberText,
  listCell,
  numberCell,
  type PlacedRow,
  positiveCell,
  type Report,
  textCell,
} from "./table-cells.ts";

/** Relative standard uncertainty of a stated molar mass without a formula: its last digit, as a rule. */
const STATED_MOLAR_MASS_UNCERTAINTY = 5e-4;

/** A substance without its solid forms: those need the molar masses of all substances first. */
export type BareSubstance = Omit<Substance, "solidForms" | "formOf">;

/** Turns what the tables say of a substance into a {@link Substance}; contradictory cells are reported and left out. */
export function substanceFromDraft(draft: Draft, report: Report): BareSubstance {
  const { row } = draft;
  const name = textCell(row, "name") ?? "";
  const formula = formulaOf(row, report);
  const mass = molarMassFrom(row, formula, report);
  const properties = propertiesOf(draft, report);
  const smiles = textCell(row, "smiles");
  const elements = formula === undefined ? undefined : (hydrateParts(formula)?.anhydrousElements ?? formula.elements);
  const stated = properties.get("electrolyte")?.value;
  const salt = stated === 0 ? undefined : saltKind({ name, formula: formula?.text, smiles, elements });
  const fusion = positiveCell(row, "fusion_enthalpy_kJ_per_mol", report);
  const meltingPointK = positiveCell(row, "melting_point_K", report);
  const incomplete = (property: string, message: string) => {
    const place = draft.properties.get(property) ?? row;
    report(faultAt(place, "property", "incomplete correlation", message));
  };
  const roles = rolesOf(draft, report);
  const { solidDensity, liquidDensity } = densityCell(row, roles, meltingPointK, report);
  if (liquidDensity !== undefined) addTabulatedDensity(properties, liquidDensity, textCell(row, "reference"));
  return {
    name,
    roles,
    synonyms: [...draft.synonyms.values()],
    cas: casOf(row),
    inchikey: inchikeyOf(row, report),
    smiles,
    formula: formula?.text,
    molarMass: mass?.value,
    molarMassUncertainty: mass?.standardUncertainty,
    meltingPointK,
    boilingPointK: properties.get("boiling_point")?.value,
    fusionEnthalpy: fusion === undefined ? undefined : fusion * 1000,
    solidDensity,
    liquidDensities: liquidDensityModels(properties, mass?.value, incomplete),
    apparentDensity: apparentDensityCoefficients(properties, incomplete),
    hazards: listCell(row, "hazards"),
    electrolyte: stated === undefined ? salt !== undefined : stated === 1,
    salt,
    properties,
    references: [...draft.references],
  };
}

function casOf(row: PlacedRow): string | undefined {
  const read = readRegistryNumber(textCell(row, "cas") ?? "");
  return read.ok ? read.cas : undefined;
}

function inchikeyOf(row: PlacedRow, report: Report): string | undefined {
  const text = textCell(row, "inchikey");
  if (text === undefined) return undefined;
  const read = readInchikey(text);
  if (read.ok) return read.inchikey;
  report(faultAt(row, "inchikey", "inchikey", `"${text}": ${read.message}`));
  return undefined;
}

function formulaOf(row: PlacedRow, report: Report): Formula | undefined {
  const text = textCell(row, "formula");
  if (text === undefined) return undefined;
  const formula = parseFormula(text);
  if (!("fault" in formula)) return formula;
  report(faultAt(row, "formula", "formula", `"${text}": ${formula.message}`));
  return undefined;
}

function molarMassFrom(row: PlacedRow, formula: Formula | undefined, report: Report) {
  const stated = positiveCell(row, "molar_mass", report);
  if (formula === undefined) {
    return stated === undefined
      ? undefined
      : { value: stated, standardUncertainty: stated * STATED_MOLAR_MASS_UNCERTAINTY };
  }
  const computed = molarMassOf(formula);
  if (stated === undefined || Math.abs(stated / computed.value - 1) <= MOLAR_MASS_TOLERANCE) return computed;
  const message = `molar mass ${stated} g/mol, but ${formula.text} gives ${computed.value.toFixed(4)} g/mol`;
  report(faultAt(row, "molar_mass", "molar mass contradicts formula", message));
  return undefined;
}

function rolesOf({ roles, row }: Draft, report: Report): SubstanceRole[] {
  const known: SubstanceRole[] = [];
  for (const role of roles) {
    if (role === "solute" || role === "solvent") known.push(role);
    else report(faultAt(row, "role", "not allowed", `"${role}" is none of solute, solvent`));
  }
  return known;
}

/** The density column is that of the liquid at 20 °C for a pure solvent, else that of the solid. */
function densityCell(
  row: PlacedRow,
  roles: readonly SubstanceRole[],
  meltingPointK: number | undefined,
  report: Report,
) {
  const density = positiveCell(row, "density_kg_per_m3", report);
  const liquid = roles.includes("solvent") && (meltingPointK === undefined || meltingPointK < 298.15);
  return liquid
    ? { solidDensity: undefined, liquidDensity: density }
    : { solidDensity: density, liquidDensity: undefined };
}

const LIQUID_DENSITY_K = 293.15;

function addTabulatedDensity(properties: Map<string, Property>, density: number, reference = ""): void {
  const key = `liquid_density@${LIQUID_DENSITY_K}`;
  if ([...properties.keys()].some((name) => name.startsWith("liquid_density"))) return;
  properties.set(key, {
    text: String(density),
    value: density,
    unit: "kg/m3",
    standardUncertainty: undefined,
    lowestK: LIQUID_DENSITY_K,
    highestK: LIQUID_DENSITY_K,
    reference,
  });
}

function propertiesOf({ properties }: Draft, report: Report): Map<string, Property> & Properties {
  const read = new Map<string, Property>();
  for (const [key, row] of properties) {
    const text = textCell(row, "value") ?? "";
    const value = isNumberText(text) ? Number(text) : undefined;
    read.set(key, {
      text,
      value,
      unit: textCell(row, "unit") ?? "",
      standardUncertainty: numberCell(row, "standard_uncertainty", report),
      lowestK: numberCell(row, "T_min_K", report),
      highestK: numberCell(row, "T_max_K", report),
      reference: textCell(row, "reference") ?? "",
    });
  }
  return read;
}
