import type { ReferenceRow } from "./reference-files.ts";
import { type Row, significant } from "./table-text.ts";

const REFERENCE =
  "Laliberté and Cooper, J. Chem. Eng. Data 49 (2004) 1141; Laliberté, ibid. 54 (2009) 1725 (via chemicals)";

/** Smallest relative standard uncertainty taken for a density by apparent-density coefficients. */
const SMALLEST = 0.0005;
/** Where no tabulated density was at hand to compare with. */
const UNCOMPARED = 0.002;

/**
 * Rows of the apparent-density coefficients of a salt. Their relative standard uncertainty is the root mean square
 * deviation from the tabulated densities at 20 °C inside the fitted range.
 */
export function electrolyteProperties(salt: ReferenceRow, name: string, checks: readonly ReferenceRow[]): Row[] {
  const highest = Number(salt("w_max"));
  const deviations = checks
    .filter((row) => row("cas_rn") === salt("cas_rn") && row("model") === "Laliberte-Cooper")
    .filter((row) => Number(row("mass_percent")) / 100 <= highest)
    .map((row) => Number(row("model_minus_table")) / Number(row("rho_kg_m3")));
  const meanSquare = deviations.reduce((sum, deviation) => sum + deviation ** 2, 0) / Math.max(1, deviations.length);
  const uncertainty = deviations.length < 3 ? UNCOMPARED : Math.max(SMALLEST, Math.sqrt(meanSquare));
  const kelvin = (celsius: string) => significant(Number(celsius) + 273.15, 6);
  const range = { T_min_K: kelvin(salt("Tmin_C")), T_max_K: kelvin(salt("Tmax_C")), reference: REFERENCE };
  const coefficients = ["c0", "c1", "c2", "c3", "c4", "w_max"];
  return [
    ...coefficients.map(
      (column): Row => ({
        name,
        property: `apparent_density_${column}`,
        value: salt(column),
        unit: unitOf(column),
        ...range,
      }),
    ),
    { name, property: "apparent_density_u", value: significant(uncertainty, 2), unit: "1", ...range },
  ];
}

const unitOf = (column: string): string =>
  column === "c0" || column === "c1" ? "kg/m3" : column === "c3" ? "1/Cel" : column === "c4" ? "Cel" : "1";
