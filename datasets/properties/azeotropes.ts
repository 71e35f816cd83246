import { MEMORY } from "./citations.ts";
import type { Row } from "./table-text.ts";

/** Azeotropes with water at 101.325 kPa: boiling point [°C] and mass fraction of the solvent. */
const AZEOTROPES: ReadonlyArray<readonly [solvent: string, boilingC: number, massFraction: number]> = [
  ["ethanol", 78.15, 0.956],
  ["1-propanol", 87.7, 0.717],
  ["2-propanol", 80.3, 0.877],
  ["tert-butanol", 79.9, 0.883],
  ["1-butanol", 92.7, 0.575],
  ["2-butanone", 73.4, 0.887],
  ["ethyl acetate", 70.4, 0.915],
  ["isopropyl acetate", 76.6, 0.894],
  ["tetrahydrofuran", 63.8, 0.945],
  ["1,4-dioxane", 87.8, 0.82],
  ["methyl tert-butyl ether", 52.6, 0.97],
  ["acetonitrile", 76.5, 0.837],
  ["toluene", 84.1, 0.798],
  ["cyclohexane", 69.5, 0.915],
  ["heptane", 79.2, 0.871],
  ["pyridine", 93.6, 0.57],
  ["dichloromethane", 38.1, 0.985],
  ["chloroform", 56.2, 0.971],
];

/** Rows of the azeotropes with water. */
export function azeotropeRows(): Row[] {
  return AZEOTROPES.flatMap(([name, boilingC, massFraction]) => [
    {
      name,
      property: "azeotrope_with_water_boiling_point",
      value: Math.round((boilingC + 273.15) * 100) / 100,
      unit: "K",
      standard_uncertainty: 0.5,
      reference: MEMORY,
    },
    {
      name,
      property: "azeotrope_with_water_mass_fraction",
      value: massFraction,
      unit: "1",
      standard_uncertainty: 0.01,
      reference: MEMORY,
    },
  ]);
}
