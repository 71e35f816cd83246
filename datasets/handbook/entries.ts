/** Turns the rows of the reference tables into one common shape, as published: nothing is converted or left out silently. */
import { readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import type { OriginCode } from "./origins.ts";

/** One published value. */
export interface Entry {
  readonly origin: OriginCode;
  readonly solute: string;
  readonly solid_form: string;
  readonly solute_basis: string;
  readonly solvent: string;
  readonly temperature: string;
  readonly temperatureUnit: "°C" | "K";
  readonly value: string;
  readonly unit: string;
  readonly reference: string;
  readonly doi: string;
  readonly obtained: string;
  readonly remark: string;
}

type Row = Readonly<Record<string, string | undefined>>;

const REFERENCE = new URL("../../../shared/reference/solubility/", import.meta.url);
const WATER = { solvent: "water", temperatureUnit: "°C", reference: "", doi: "", remark: "" } as const;

const FORM_OF_PHASE: Readonly<Record<string, string>> = {
  "CuSO4.5H2O": "pentahydrate",
  "Na2CO3.10H2O": "decahydrate",
  "Na2CO3.H2O": "monohydrate",
  "Na2SO4.10H2O": "decahydrate",
  Na2SO4: "anhydrous",
  "NaCl.2H2O below 0.1 C": "dihydrate",
  NaCl: "anhydrous",
};

const UNITS: Readonly<Record<string, string>> = {
  "g/100 g water": "g/100 g solvent",
  "g/100 mL water": "g/100 mL solvent",
  "g/kg water": "g/kg solvent",
  "mass %": "g/100 g solution",
  "mass % (anhydrous)": "g/100 g solution",
  "g/L (anhydrous)": "g/L",
  "g/L": "g/L",
  "g/100 mL or g/100 g water": "g/100 mL",
};

/** Spellings of the reference tables that the substance tables know by another name. */
const NAMES: Readonly<Record<string, string>> = { NaC2H3O2: "sodium acetate", "butyl paraben": "butylparaben" };

function table(file: string): Row[] {
  return parse(readFileSync(new URL(file, REFERENCE)), { columns: true });
}

function cell(row: Row, column: string): string {
  const text = row[column];
  if (text === undefined) throw new Error(`the reference table has no column ${column}`);
  return text;
}

function named(solute: string): { solute: string; remark: string } {
  const name = NAMES[solute];
  return name ? { solute: name, remark: `listed as ${solute}` } : { solute, remark: "" };
}

function joined(...remarks: readonly string[]): string {
  return remarks.filter((remark) => remark !== "").join("; ");
}

function obtainedInWords(code: string): string {
  return code === "memory" ? "from memory, not verified" : "read";
}

function formOfPhase(phase: string): string {
  const form = phase === "" ? "" : FORM_OF_PHASE[phase];
  if (form === undefined) throw new Error(`solid phase without a form: ${phase}`);
  return form;
}

/** CRC 98, mass % of the anhydrous salt. */
function massPercentSalts(): Entry[] {
  return table("01a_salts_water_crc98.csv").map((row) => {
    const phase = cell(row, "solid_phase_from_memory");
    const { solute, remark } = named(cell(row, "solute_anhydrous"));
    return {
      ...WATER,
      origin: "CRC98",
      solute,
      solid_form: formOfPhase(phase),
      solute_basis: "anhydrous",
      temperature: cell(row, "T_C"),
      value: cell(row, "mass_percent_anhydrous"),
      unit: "g/100 g solution",
      obtained: "read",
      remark: joined(remark, phase === "" ? "" : "solid phase from memory, not verified"),
    };
  });
}

/** CRC 98, mol/kg water. */
function molalitySalts(): Entry[] {
  return table("01b_salts_water_crc98_molality.csv").map((row) => ({
    ...WATER,
    origin: "CRC98-molality",
    solute: cell(row, "formula"),
    solid_form: "",
    solute_basis: "anhydrous",
    temperature: cell(row, "T_C"),
    value: cell(row, "molality_mol_per_kg_water"),
    unit: "mol/kg solvent",
    obtained: "read",
  }));
}

/** What the basis column of the further salt tables says about the hydrate: how the number is meant, and of which solid. */
function hydrateReading(solute: string, basis: string, phase: string) {
  if (solute === "CuSO4.5H2O") {
    const remark = "basis not printed; read so because x 159.60/249.68 agrees with the anhydrous tables within 6 %";
    return {
      solute: "CuSO4",
      solid_form: "pentahydrate",
      solute_basis: "hydrate equivalent per total solvent",
      remark,
    };
  }
  if (solute === "Ce2(SO4)3.2H2O")
    return { solute: "Ce2(SO4)3", solid_form: "dihydrate", solute_basis: "", remark: "hydrate basis not stated" };
  const listed = /(dodeca|octadeca)hydrate/.exec(basis)?.[1] ?? (basis.startsWith("same row") ? "dodeca" : "");
  const remark = listed === "" ? "" : "listed under the hydrate's formula, the numbers are anhydrous";
  const solid_form = listed === "" ? formOfPhase(phase) : `${listed}hydrate`;
  return { ...named(solute), solid_form, solute_basis: "anhydrous", ...(remark === "" ? {} : { remark }) };
}

/** The further salt tables: one source an origin, g/100 g water; the brine table by its printed mass %. */
function furtherSalts(): Entry[] {
  return table("01c_salts_water_other_tables.csv").map((row) => {
    const basis = cell(row, "basis");
    const printed = /published as ([\d.]+) mass %/.exec(basis)?.[1];
    return {
      ...WATER,
      origin: cell(row, "source") as OriginCode,
      ...hydrateReading(cell(row, "solute"), basis, cell(row, "solid_phase")),
      temperature: cell(row, "T_C"),
      value: printed ?? cell(row, "g_per_100g_water"),
      unit: printed === undefined ? "g/100 g solvent" : "g/100 g solution",
      obtained: obtainedInWords(cell(row, "obtained")),
    };
  });
}

function organicOrigin(source: string): OriginCode {
  if (source.startsWith("ANTOKOLSKAYA")) return "ANTOKOLSKAYA";
  if (source.startsWith("SOKOLOVSKY")) return "SOKOLOVSKY";
  if (source.startsWith("K-MASHZAVOD")) return "K-MASHZAVOD";
  if (source.startsWith("GRANBERG")) return "GRANBERG";
  return source.startsWith("Wikipedia") ? "ENCYCLOPEDIA" : "RECALLED";
}

/** A second column that its source computed from the first is not a second reading. */
function isDerivedColumn(origin: OriginCode, unit: string): boolean {
  return (origin === "SOKOLOVSKY" || origin === "K-MASHZAVOD") && unit !== "mass %";
}

/** The remark of an organic row, given to the rows that it is about. */
function organicRemark(row: Row, unit: string): string {
  const note = cell(row, "note").replace("; see file 07", "").replace(" -> ", " to ");
  const about = note.startsWith("first temperature") ? "0" : /^(90|100) C /.exec(note)?.[1];
  const open = unit.includes(" or ") ? `printed per ${unit.replaceAll("g/", "")}` : "";
  return joined(open, about !== undefined && about !== cell(row, "T_C") ? "" : note);
}

/** Organic compounds (and boric acid) in water, in the units of their sources. */
function organicsInWater(): Entry[] {
  return table("02_organics_water.csv").flatMap((row) => {
    const [source, unit] = [cell(row, "source"), cell(row, "unit")];
    const origin = organicOrigin(source);
    if (isDerivedColumn(origin, unit)) return [];
    const spelling = UNITS[unit];
    if (spelling === undefined) throw new Error(`unit without a spelling: ${unit}`);
    return [
      {
        ...WATER,
        origin,
        solute: cell(row, "solute"),
        solid_form: "",
        solute_basis: unit.includes("anhydrous") ? "anhydrous" : "",
        temperature: cell(row, "T_C"),
        value: cell(row, "value"),
        unit: spelling,
        reference: origin === "ENCYCLOPEDIA" || origin === "RECALLED" ? source : "",
        obtained: obtainedInWords(cell(row, "obtained")),
        remark: organicRemark(row, unit),
      },
    ];
  });
}

/** Organic solids in alcohols, mole fraction against K; the older artemisinin paper stands by itself. */
function organicsInAlcohols(): Entry[] {
  return table("04b_organic_solubility_data.csv").map((row) => {
    const doi = cell(row, "original_paper_doi");
    return {
      origin: doi === "10.1021/je0603426" ? "ARTEMISININ-2006" : "BIGSOLDB-2",
      ...named(cell(row, "solute")),
      solid_form: "",
      solute_basis: "",
      solvent: cell(row, "solvent"),
      temperature: cell(row, "T_K"),
      temperatureUnit: "K" as const,
      value: cell(row, "mole_fraction"),
      unit: "mole fraction",
      reference: "",
      doi,
      obtained: "read",
    };
  });
}

/** Every published value of the collection, in the order of the reference tables. */
export function publishedEntries(): Entry[] {
  return [massPercentSalts(), molalitySalts(), furtherSalts(), organicsInWater(), organicsInAlcohols()].flat();
}
