/** Hydrate-forming salts in water: a careful campaign with two gaps, and an old notebook with a guessed basis. */
import { measure, type Reported, type SeriesPlan } from "./measure.ts";
import * as mistakes from "./mistakes.ts";
import { COMMA_TABLE, laboratoryCard, measuredRows, type SourceFile, typedRow } from "./source-file.ts";
import { SYSTEMS } from "./truth.ts";

/** The inorganic chemist weighs salts after drying; the hydrate basis stands in a column, mostly. */
export function salts(): SourceFile {
  const source = "salts-2026-drying";
  const basis = { source, noise: 0.01, unit: "g/100 g solvent" } as const;
  const copper: SeriesPlan = {
    ...basis,
    system: "copperWater",
    hydrate: true,
    temperatures: [5, 10, 20, 25, 30, 40, 50, 60, 70],
  };
  const sulfate: SeriesPlan = { ...basis, system: "sulfateWater", temperatures: [2, 5, 10, 15, 20, 25, 30] };
  const perAdded = "hydrate per added solvent";
  const open = (truth: string) => ({ cause: "refused", done: "hydrate basis left open", truth });
  const copperCells = (r: Reported) => [
    "copper(II) sulfate",
    "pentahydrate",
    "water",
    r.temperature,
    r.value,
    perAdded,
  ];
  const sulfateCells = (r: Reported) => ["sodium sulfate", "decahydrate", "water", r.temperature, r.value, "anhydrous"];
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(source, "Salts, residue dried", "inorganic chemist", "bench 9", "2026-01-29"),
      method: "gravimetric",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "salt" },
        solid_form: { column: "crystal" },
        solvent: { column: "solvent" },
        temperature: { column: "T", unit: "°C" },
        solubility: { column: "g per 100 g", unit: "g/100 g solvent" },
        solute_basis: { column: "of what" },
      },
      constants: { excess_solid: "yes", solid_check: "TGA", temperature_probe: "solution" },
      carry: [],
    },
    headings: ["salt", "crystal", "solvent", "T", "g per 100 g", "of what"],
    rows: [
      ...measuredRows(measure(copper), copperCells),
      typedRow(["copper(II) sulfate", "pentahydrate", "water", "35", "49.2", ""], open(`${perAdded}, 49.63`)),
      ...measuredRows(measure(sulfate), sulfateCells),
      typedRow(["sodium sulfate", "decahydrate", "water", "12", "11.0", ""], open("anhydrous, 10.79")),
    ],
  };
}

/** A trainee typed in an old notebook; "anhydrous" was a guess for copper sulfate. */
export function notebook(): SourceFile {
  const source = "archive-2019-notebook";
  const basis = { source, noise: 0.015, unit: "g/kg solvent" } as const;
  const copper: SeriesPlan = { ...basis, system: "copperWater", temperatures: [10, 20, 30, 40, 50, 60, 70] };
  const sulfate: SeriesPlan = { ...basis, system: "sulfateWater", temperatures: [5, 10, 15, 20, 25, 30] };
  const cells = (r: Reported) => {
    const { solute, solvent, form } = SYSTEMS[r.system];
    return [solute.name, solvent.name, form, r.temperature, r.value];
  };
  return {
    ...COMMA_TABLE,
    card: {
      ...laboratoryCard(source, "Old notebook, typed in later", "trainee", "bench 9 (archive)", "2019-10-08"),
      method: "unspecified",
      file: `${source}.csv`,
      shape: "long",
      columns: {
        solute: { column: "salt" },
        solvent: { column: "solvent" },
        solid_form: { column: "solid" },
        temperature: { column: "temp", unit: "°C" },
        solubility: { column: "g/kg", unit: "g/kg solvent" },
      },
      constants: { solute_basis: "anhydrous" },
      carry: [],
    },
    headings: ["salt", "solvent", "solid", "temp", "g/kg"],
    rows: [
      ...measuredRows(mistakes.hydrateCalledAnhydrous(measure(copper), copper), cells),
      ...measuredRows(measure(sulfate), cells),
    ],
  };
}
