import { mkdirSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";

/** Size of a made-up collection. */
export interface CollectionSize {
  readonly measurements: number;
  readonly systems: number;
  readonly seed: number;
}

/** One source's way of writing numbers down. */
interface Habit {
  readonly name: string;
  readonly unit: string;
  readonly temperatureUnit: "°C" | "K" | "°F";
  readonly delimiter: "," | ";" | "\t";
  readonly method: string;
  /** Reported number from the mass ratio r (g/g), molar masses (g/mol) and solvent density at 20 °C (g/mL). */
  readonly report: (r: number, soluteMass: number, solventMass: number, density: number) => number;
}

const moleFraction = (r: number, soluteMass: number, solventMass: number) =>
  r / soluteMass / (r / soluteMass + 1 / solventMass);
const HABITS: readonly Habit[] = [
  {
    name: "north-gravimetry",
    unit: "g/100 g solvent",
    temperatureUnit: "°C",
    delimiter: ",",
    method: "gravimetric",
    report: (r) => 100 * r,
  },
  {
    name: "south-gravimetry",
    unit: "g/kg solvent",
    temperatureUnit: "K",
    delimiter: ";",
    method: "gravimetric",
    report: (r) => 1000 * r,
  },
  {
    name: "east-fractions",
    unit: "mole fraction",
    temperatureUnit: "K",
    delimiter: ",",
    method: "isothermal-synthetic",
    report: moleFraction,
  },
  {
    name: "west-percent",
    unit: "% w/w",
    temperatureUnit: "°C",
    delimiter: "\t",
    method: "titration",
    report: (r) => (100 * r) / (1 + r),
  },
  {
    name: "pilot-molal",
    unit: "mol/kg solvent",
    temperatureUnit: "°F",
    delimiter: ",",
    method: "titration",
    report: (r, m) => (1000 * r) / m,
  },
  {
    name: "quality-volume",
    unit: "mg/mL solvent",
    temperatureUnit: "°C",
    delimiter: ",",
    method: "uv",
    report: (r, _m, _s, d) => 1000 * r * d,
  },
  {
    name: "archive-thousandths",
    unit: "1000 x",
    temperatureUnit: "K",
    delimiter: ",",
    method: "unspecified",
    report: (r, m, s) => 1000 * moleFraction(r, m, s),
  },
  {
    name: "screening-logs",
    unit: "ln x",
    temperatureUnit: "K",
    delimiter: ";",
    method: "hplc",
    report: (r, m, s) => Math.log(moleFraction(r, m, s)),
  },
  {
    name: "clear-points",
    unit: "g/100 g solution",
    temperatureUnit: "°C",
    delimiter: ",",
    method: "clear-point",
    report: (r) => (100 * r) / (1 + r),
  },
];

/** Solvents with molar mass (g/mol) and density at 20 °C (g/mL), rounded: good enough to invent numbers with. */
const SOLVENTS: readonly (readonly [name: string, molarMass: number, density: number])[] = [
  ["ethanol", 46.07, 0.789],
  ["methanol", 32.04, 0.791],
  ["acetone", 58.08, 0.79],
  ["toluene", 92.14, 0.867],
  ["ethyl acetate", 88.11, 0.9],
  ["acetonitrile", 41.05, 0.782],
  ["2-propanol", 60.1, 0.785],
  ["water", 18.015, 0.998],
];

/** Writes a seeded collection of invented data: van 't Hoff systems with 2 % scatter, nine sources with mixed units. */
export function makeCollection(folder: string, { measurements, systems, seed }: CollectionSize): void {
  const random = xoroshiro128plus(seed);
  const uniform = () => uniformFloat64(random);
  const normal = () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
  mkdirSync(join(folder, "sources"), { recursive: true });
  const solutes = Math.ceil(systems / SOLVENTS.length);
  const molarMass = Array.from({ length: solutes }, () => 120 + Math.round(30000 * uniform()) / 100);
  const rows = molarMass.map(
    (mass, i) => `invented compound ${i + 1},solute,,,,,,${mass},,,1300,,invented for the benchmark`,
  );
  const header =
    "name,role,synonyms,cas,inchikey,smiles,formula,molar_mass,melting_point_K,fusion_enthalpy_kJ_per_mol,density_kg_per_m3,hazards,reference";
  writeFileSync(join(folder, "substances.csv"), `${[header, ...rows].join("\n")}\n`);
  writeFileSync(
    join(folder, "collection.json"),
    JSON.stringify({ format: 1, name: "benchmark", title: "Benchmark (invented data)", steward: "benchmark" }),
  );
  const lines = HABITS.map(() => [] as string[]);
  const perSystem = Math.round(measurements / systems);
  for (let s = 0; s < systems; s++) {
    const solute = Math.floor(s / SOLVENTS.length);
    const [solvent, solventMass, density] = SOLVENTS[s % SOLVENTS.length] as (typeof SOLVENTS)[number];
    const slope = -1500 - 3500 * uniform();
    const level = Math.log(0.002 + 0.1 * uniform());
    const sources = [0, 1, 2].map((k) => (s * 5 + k * (1 + (s % 4))) % HABITS.length);
    for (let i = 0; i < perSystem; i++) {
      const source = sources[i % sources.length] as number;
      const habit = HABITS[source] as Habit;
      const temperature = 278.15 + (50 * Math.floor(i / sources.length)) / Math.ceil(perSystem / sources.length);
      const r = Math.exp(level + slope * (1 / temperature - 1 / 298.15) + 0.02 * normal());
      const value = habit.report(r, molarMass[solute] as number, solventMass, density);
      const t = { K: temperature, "°C": temperature - 273.15, "°F": (temperature * 9) / 5 - 459.67 }[
        habit.temperatureUnit
      ];
      const cells = [
        `invented compound ${solute + 1}`,
        solvent,
        t.toFixed(2),
        value.toPrecision(5),
        "",
        `run ${i}`,
        "bench",
        "2026-01-15",
        "none",
        "x",
        String(i),
        "ok",
      ];
      lines[source]?.push(cells.join(habit.delimiter));
    }
  }
  for (const [i, habit] of HABITS.entries()) writeSource(folder, habit, lines[i] as string[]);
}

/** Writes one source and its card. */
function writeSource(folder: string, habit: Habit, lines: readonly string[]): void {
  const headings = ["Compound", "Solvent", "T", "S", "u", "Run", "Place", "Day", "Remark", "Flag", "Number", "State"];
  const file = `${habit.name}.${habit.delimiter === "\t" ? "tsv" : "csv"}`;
  writeFileSync(join(folder, "sources", file), `${[headings.join(habit.delimiter), ...lines].join("\n")}\n`);
  const card = {
    format: 1,
    source: habit.name,
    title: `${habit.name} (invented data)`,
    origin: "laboratory",
    reported_by: "nobody",
    laboratory: habit.name,
    date: "2026-01-15",
    reference: null,
    doi: null,
    licence: "internal",
    method: habit.method,
    file,
    shape: "long",
    table: { encoding: "utf-8", delimiter: habit.delimiter, decimal: ".", header_line: 1, sheet: null, missing: [""] },
    columns: {
      solute: { column: "Compound" },
      solvent: { column: "Solvent" },
      temperature: { column: "T", unit: habit.temperatureUnit },
      solubility: { column: "S", unit: habit.unit },
    },
    constants: {},
    carry: [],
  };
  writeFileSync(join(folder, "sources", `${habit.name}.source.json`), JSON.stringify(card));
}
