import { liquidDensityModels } from "../../pipeline/properties/density-rows.ts";
import { type LiquidDensityModel, liquidDensity } from "../../pipeline/properties/liquid-density.ts";
import type { Property } from "../../pipeline/properties/substances.ts";
import { citation, MEMORY } from "./citations.ts";
import { corrections } from "./corrections.ts";
import type { ReferenceRow } from "./reference-files.ts";
import { massOf } from "./solvent-rows.ts";
import { type Row, significant } from "./table-text.ts";

const CORRELATIONS: ReadonlyMap<
  string,
  readonly [equation: string, coefficients: readonly string[], reference: string]
> = new Map([
  [
    "Perry105",
    ["DIPPR105", ["c1", "c2", "c3", "c4"], "Perry's Chemical Engineers' Handbook, 8th ed., table 2-32 (via chemicals)"],
  ],
  ["VDI_PPDS", ["PPDS10", ["c1", "c2", "c3", "c4", "Tc_K", "rhoc_kg_m3"], "VDI Heat Atlas, 2nd ed. (via chemicals)"]],
  ["ThermoML_fit", ["POLY25", ["c1", "c2", "c3"], ""]],
]);

const UNITS: ReadonlyMap<string, readonly string[]> = new Map([
  ["DIPPR105", ["mol/m3", "1", "K", "1"]],
  ["PPDS10", ["kg/m3", "kg/m3", "kg/m3", "kg/m3", "K", "kg/m3"]],
  ["POLY25", ["kg/m3", "kg/(m3.K)", "kg/(m3.K2)"]],
]);

/** Fits with a larger scatter than this [kg/m3] mix incompatible publications and are left out. */
const LARGEST_SCATTER = 1.5;

/** Wide correlations are used up to this share of the critical temperature: nearer to it they are less certain. */
const HIGHEST_REDUCED = 0.8;

/** Rows of property-values.csv for one solvent, and its density at 20 °C as the program will see it. */
export function solventProperties(solvent: ReferenceRow, correlations: readonly ReferenceRow[]): readonly Row[] {
  const name = solvent("name");
  const own = correlations.filter((row) => row("cas") === solvent("cas_rn"));
  const isWater = name === "water";
  return [
    ...temperatureRows(solvent),
    ...classRows(solvent),
    ...(isWater ? [] : own.flatMap((row) => correlationRows(solvent, row))),
    ...(isWater ? [] : tabulatedRows(solvent)),
    ...(isWater ? [] : expansionRows(name, own)),
  ];
}

function temperatureRows(solvent: ReferenceRow): Row[] {
  const name = solvent("name");
  const boiling = { name, property: "boiling_point", value: solvent("boiling_point_K"), unit: "K" };
  const flash = { name, property: "flash_point", value: solvent("flash_point_K"), unit: "K" };
  // Single weak sources of flash points are up to 47 K too low.
  const flashKnown = flash.value !== "" && !/weak source/.test(solvent("flash_source"));
  return [
    ...(boiling.value === ""
      ? []
      : [{ ...boiling, reference: `at 101.325 kPa; ${citation(solvent("boiling_source"))}` }]),
    ...(flashKnown ? [{ ...flash, reference: citation(solvent("flash_source")) }] : []),
  ];
}

function classRows(solvent: ReferenceRow): Row[] {
  const name = solvent("name");
  const q3c = solvent("ich_q3c_class");
  const miscible = solvent("miscible_with_water");
  const adequate = q3c.endsWith("(no adequate data)") ? "; listed without adequate data" : "";
  const q3cReference = `ICH Q3C(R8), recalled and compared with public copies where possible${adequate}`;
  const q3cClass = q3c.replace(/ \(.*$/, "");
  return [
    { name, property: "ich_q3c_class", value: q3cClass, unit: "class", reference: q3cReference },
    ...(name === "water"
      ? []
      : [{ name, property: "miscible_with_water", value: miscible, unit: "", reference: MEMORY }]),
  ];
}

function correlationRows(solvent: ReferenceRow, row: ReferenceRow): Row[] {
  const known = CORRELATIONS.get(row("correlation"));
  const isFit = row("correlation") === "ThermoML_fit";
  // Beside the fit near room temperature one wide correlation: the one the solvent list prefers.
  if (known === undefined || !(isFit || row("correlation") === preferred(solvent))) return [];
  const [equation, coefficients, printed] = known;
  const scatter = isFit ? scatterOf(row) : undefined;
  if (scatter !== undefined && scatter.rms > LARGEST_SCATTER) return [];
  const reference = scatter?.reference ?? printed;
  const range = {
    T_min_K: row("Tmin_K") || solvent("melting_point_K"),
    T_max_K: isFit ? row("Tmax_K") : significant(HIGHEST_REDUCED * Number(row("Tc_K") || row("c3")), 4),
    reference,
  };
  const prefix = `liquid_density_${equation}`;
  const names = coefficients.map((column) => column.replace(/_.*$/, ""));
  const units = UNITS.get(equation) ?? [];
  return [
    ...coefficients.map(
      (column, at): Row => ({
        name: solvent("name"),
        property: `${prefix}_${names[at]}`,
        value: row(column),
        unit: units[at],
        ...range,
      }),
    ),
    uncertaintyRow(solvent("name"), prefix, scatter?.relative ?? deviationOf(row), range),
  ];
}

const preferred = (solvent: ReferenceRow): string => solvent("corr_name");

function uncertaintyRow(name: string, prefix: string, relative: number, range: Row): Row {
  return { name, property: `${prefix}_u`, value: significant(relative, 2), unit: "1", ...range };
}

/** Scatter of a fit about its publications; three or fewer points or publications say little of it. */
function scatterOf(row: ReferenceRow) {
  const said = /(\d+) pure-liquid densities .* from (\d+) publications .* rms ([\d.]+)/.exec(row("source"));
  if (said === null) throw new Error(`the fit of ${row("name")} does not tell its scatter`);
  const [, points = "", publications = "", rms = ""] = said;
  const relative = Math.max(Number(rms) / Number(row("c1")), Number(publications) > 3 ? 0.0003 : 0.001);
  const reference = `fit to ${points} densities of ${publications} publications in the NIST ThermoML archive`;
  return { rms: Number(rms), relative, reference };
}

/** A wide correlation is as good as its deviation from the measured or tabulated density near 25 °C, at least 0.2 %. */
function deviationOf(row: ReferenceRow): number {
  const measured = row("dev_thermoml25_pct");
  const tabulated = corrections.get(row("name"))?.some(({ column }) => column === "liquid_density")
    ? ""
    : row("dev_tabulated_pct");
  const deviation = measured !== "" ? measured : tabulated !== "" ? tabulated : "0.5";
  return Math.max(Math.abs(Number(deviation)) / 100, measured !== "" ? 0.002 : 0.003);
}

function tabulatedRows(solvent: ReferenceRow): Row[] {
  const name = solvent("name");
  const correction = corrections.get(name)?.find(({ column }) => column === "liquid_density");
  const row = (value: number, T: number, u: number, reference: string): Row => ({
    name,
    property: "liquid_density",
    value,
    unit: "kg/m3",
    standard_uncertainty: significant(value * u, 2),
    T_min_K: T,
    T_max_K: T,
    reference,
  });
  if (correction !== undefined) {
    return correction.value === undefined ? [] : [row(correction.value, 293.15, 0.005, correction.why)];
  }
  const tabulated = solvent("rho_tabulated_kg_m3");
  if (tabulated !== "") {
    const reference = citation(solvent("rho_tabulated_source"));
    return [row(Number(tabulated), Number(solvent("rho_tabulated_T_K")), 0.002, reference)];
  }
  const recalled = solvent("rho_20C_kg_m3");
  return recalled === "" || solvent("rho_source") !== MEMORY ? [] : [row(Number(recalled), 293.15, 0.005, MEMORY)];
}

/** Coefficient of expansion where no wide correlation exists: from the slope of the fit, else the usual one. */
function expansionRows(name: string, own: readonly ReferenceRow[]): Row[] {
  if (own.some((row) => row("correlation") !== "ThermoML_fit")) return [];
  const near = own.find((row) => scatterOf(row).rms <= LARGEST_SCATTER);
  const slope = near === undefined ? undefined : -Number(near("c2")) / Number(near("c1"));
  return [
    {
      name,
      property: "thermal_expansion",
      value: slope === undefined ? 1.0e-3 : significant(slope, 3),
      unit: "1/K",
      standard_uncertainty: slope === undefined ? 2.5e-4 : significant(slope / 10, 2),
      T_min_K: 273.15,
      T_max_K: 353.15,
      reference:
        slope === undefined
          ? "usual coefficient of organic liquids, common practice"
          : "slope at 25 °C of the fit to the NIST ThermoML archive",
    },
  ];
}

/** Density at 20 °C [kg/m3] that the program will compute from these rows. */
export function densityAt20(solvent: ReferenceRow, rows: readonly Row[]): number | undefined {
  const properties = new Map<string, Property>();
  for (const row of rows) {
    const key = row.property === "liquid_density" ? `liquid_density@${row.T_min_K}` : String(row.property);
    const number = (cell: string | number | undefined) =>
      cell === undefined || cell === "" ? undefined : Number(cell);
    properties.set(key, {
      text: String(row.value),
      value: number(row.value),
      unit: String(row.unit),
      standardUncertainty: number(row.standard_uncertainty),
      lowestK: number(row.T_min_K),
      highestK: number(row.T_max_K),
      reference: String(row.reference),
    });
  }
  const incomplete = (property: string, message: string) => {
    throw new Error(`${solvent("name")}: ${property}: ${message}`);
  };
  const models: LiquidDensityModel[] = liquidDensityModels(properties, massOf(solvent("formula_hill")), incomplete);
  return liquidDensity({ cas: solvent("cas_rn"), liquidDensities: models }, 293.15)?.value;
}
