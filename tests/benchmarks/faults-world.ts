import type { Needs } from "../../pipeline/bases/needs.ts";
import { parseTemperatureUnit } from "../../pipeline/bases/temperature.ts";
import { type RandomSource, seededRandom } from "../../pipeline/numerics/random.ts";
import { codeOf, createMeasurementTable, type MeasurementTable } from "../../pipeline/records/measurements.ts";
import type { Reread } from "../../pipeline/records/reread.ts";
import { type System, type SystemPoints, systemPoints } from "../../pipeline/records/systems.ts";
import { bendOf } from "./faults-bends.ts";
import { reread, setValue, write } from "./faults-conversions.ts";
import { anyAmount, faultRow } from "./faults-plant.ts";

/** Invented worlds of measurements in which every fault is known. */
export interface WorldOptions {
  readonly seed: number;
  readonly solutes: number;
  /** Between-source standard deviation of ln x. */
  readonly between: number;
  readonly singleFaults: number;
  readonly blockFaults: number;
  /** Share of blocks whose series is bent: plateau, cold filter, open vessel, too short a time, wrong thermometer. */
  readonly bends: number;
  /** Share of systems with a change of the solid phase on heating. */
  readonly transitions: number;
  /** Fewest and most temperatures of a block. */
  readonly temperatures: readonly [least: number, most: number];
  /** Largest dissolution enthalpy, kJ/mol. */
  readonly steepest: number;
  readonly sources: readonly [least: number, most: number];
}

export const USUAL: WorldOptions = {
  seed: 1,
  solutes: 25,
  between: 0.025,
  singleFaults: 0.04,
  blockFaults: 0.08,
  bends: 0.03,
  transitions: 0.1,
  temperatures: [4, 10],
  steepest: 45,
  sources: [1, 4],
};

/** What is wrong with a row: the name of the cause, "random" for a fault that has none, "" for a clean row. */
export interface World {
  readonly table: MeasurementTable;
  readonly systems: readonly System[];
  readonly points: readonly SystemPoints[];
  readonly sourceNames: readonly string[];
  readonly faultOfRow: readonly string[];
  /** `SYSTEM:SOURCE` to the fault of the whole block. */
  readonly faultOfBlock: ReadonlyMap<string, string>;
  /** How far the row lies from the truth at the temperature it claims, ln x, noise left out. */
  readonly shiftOfRow: readonly number[];
  readonly trueReported: readonly number[];
  readonly transitionSystems: ReadonlySet<number>;
  readonly reread: Reread;
  readonly inReportedUnit: (row: number, lnValue: number) => number | undefined;
}

const SOLVENTS = [
  { name: "solvent A", M: 46.07, rho: 789, boils: 351 },
  { name: "solvent B", M: 32.04, rho: 791, boils: 337 },
  { name: "solvent C", M: 88.11, rho: 900, boils: 350 },
  { name: "solvent D", M: 92.14, rho: 867, boils: 383 },
  { name: "solvent E", M: 60.1, rho: 785, boils: 355 },
  { name: "water", M: 18.015, rho: 998, boils: 373 },
] as const;
const HABITS = [
  { unit: "g/100 g solvent", temperature: "°C", sd: 0.012, u: 0.015 },
  { unit: "mg/mL solution", temperature: "°C", sd: 0.025, u: 0.03 },
  { unit: "mole fraction", temperature: "K", sd: 0.012, u: 0.05 },
  { unit: "g/100 g solution", temperature: "°C", sd: 0.018, u: 0.015 },
  { unit: "mg/mL solvent", temperature: "°C", sd: 0.03, u: 0.04 },
  { unit: "mol/kg solvent", temperature: "°F", sd: 0.015, u: 0.05 },
] as const;

interface Solute {
  readonly M: number;
  readonly hydrateRatio: number | undefined;
}

/** Builds a world. */
export function makeWorld(options: WorldOptions): World {
  const random = seededRandom(options.seed);
  const build = createBuilder(options.solutes * SOLVENTS.length * 60);
  for (let s = 0; s < options.solutes; s++) {
    const solute = {
      M: 120 + 300 * random.uniform(),
      hydrateRatio: random.uniform() < 0.3 ? 1.1 + 0.7 * random.uniform() : undefined,
    };
    for (const solvent of SOLVENTS) addSystem(build, options, random, s, solute, solvent);
  }
  return finish(build);
}

function createBuilder(capacity: number) {
  return {
    table: createMeasurementTable(capacity),
    systems: [] as System[],
    needs: [] as Needs[],
    temperatureUnits: HABITS.map(({ temperature }) => temperature),
    faultOfRow: [] as string[],
    faultOfBlock: new Map<string, string>(),
    shiftOfRow: [] as number[],
    trueReported: [] as number[],
    transitionSystems: new Set<number>(),
    pending: [] as { row: number; kind: string }[],
    truths: [] as ((T: number) => number)[],
  };
}
type Builder = ReturnType<typeof createBuilder>;

function addSystem(
  b: Builder,
  options: WorldOptions,
  random: RandomSource,
  s: number,
  solute: Solute,
  solvent: (typeof SOLVENTS)[number],
): void {
  const index = b.systems.length;
  const slope = -(1000 * (8 + (options.steepest - 8) * random.uniform())) / (8.314 * 303);
  const curvature = 4 * random.normal();
  const breakK = random.uniform() < options.transitions ? 298 + 20 * random.uniform() : Number.NaN;
  if (breakK > 0) b.transitionSystems.add(index);
  const drop = -slope * (0.4 + 0.5 * random.uniform());
  const level = Math.log(0.002) + random.uniform() * Math.log(100);
  const a = level - Math.log((solute.M / solvent.M) * Math.exp(0));
  const truth = (T: number) => {
    const u = 303 / T - 1;
    const bend = T > breakK ? -drop * (303 / breakK - 1 - u) : 0;
    return a + slope * u + curvature * (u - Math.log1p(u)) + bend;
  };
  b.truths.push(truth);
  b.needs.push(needsOf(solute, solvent));
  const rows: number[] = [];
  const count = options.sources[0] + random.integerBelow(options.sources[1] - options.sources[0] + 1);
  const first = random.integerBelow(HABITS.length);
  for (let k = 0; k < count; k++)
    addBlock(b, options, random, index, (first + k) % HABITS.length, solute, solvent.boils, rows);
  const soluteName = `invented ${s + 1}`;
  b.systems.push({
    index,
    id: `${soluteName} in ${solvent.name}`,
    key: `${s} ${solvent.name}`,
    family: `${s} ${solvent.name}`,
    fitBasis: "ln x",
    rows: Int32Array.from(rows),
    identity: {
      solute: soluteName,
      solidForm: "unspecified",
      solvent: solvent.name,
      composition: "",
      solventComponents: [{ name: solvent.name, massFraction: 1 }],
      medium: "",
      soluteMolarMass: solute.M,
      solventMolarMass: solvent.M,
      aqueousSalt: false,
    },
  });
}

function needsOf(solute: Solute, solvent: (typeof SOLVENTS)[number]): Needs {
  const exactly = (value: number) => ({ value, standardUncertainty: 0 });
  return {
    soluteMolarMass: exactly(solute.M),
    crystalMolarMass: solute.hydrateRatio === undefined ? undefined : exactly(solute.M * solute.hydrateRatio),
    solventMolarMass: exactly(solvent.M),
    solventDensityAt20C: exactly(solvent.rho),
    solutionDensity: {
      kind: "additive volumes",
      apparentSoluteDensity: exactly(1200),
      solventDensity: exactly(solvent.rho),
    },
  };
}

const BENDS = [
  "everything dissolved",
  "loss on filtration",
  "solvent lost",
  "not at equilibrium",
  "temperature offset",
] as const;
const BLOCK_KINDS = ["power of ten", "basis mix-up", "basis mix-up", "temperature unit", "dilution factor", "random"];
const POINT_KINDS = [
  "power of ten",
  "power of ten",
  "digits transposed",
  "digits transposed",
  "dilution factor",
  "rows shifted",
  "value of another solvent",
  "random",
  "random",
] as const;
const OTHER_UNIT: Readonly<Record<string, readonly string[]>> = {
  "g/100 g solvent": ["g/100 g solution", "g/100 mL solution"],
  "g/100 g solution": ["g/100 g solvent", "g/100 mL solution"],
  "mg/mL solution": ["mg/mL solvent", "g/kg solvent"],
  "mg/mL solvent": ["mg/mL solution", "g/kg solvent"],
  "mole fraction": ["mass fraction"],
  "mol/kg solvent": ["mol/L solution"],
};

function addBlock(
  b: Builder,
  options: WorldOptions,
  random: RandomSource,
  system: number,
  source: number,
  solute: Solute,
  boils: number,
  rows: number[],
): void {
  const habit = HABITS[source]!;
  const n = options.temperatures[0] + random.integerBelow(options.temperatures[1] - options.temperatures[0] + 1);
  const [low, high] = [278 + 8 * random.uniform(), Math.min(boils - 5, 313 + 25 * random.uniform())];
  const offset = options.between * random.normal();
  const kinds = solute.hydrateRatio === undefined ? BLOCK_KINDS : [...BLOCK_KINDS, "hydrate basis", "hydrate basis"];
  const kind = random.uniform() < options.blockFaults ? kinds[random.integerBelow(kinds.length)]! : "";
  const power = [10, 0.1, 1000, 0.001, 0.01, 100][random.integerBelow(6)]!;
  const dilution = [2, 5, 4, 20][random.integerBelow(4)]!;
  const away = anyAmount(random);
  const units = OTHER_UNIT[habit.unit]!;
  const written = kind === "basis mix-up" ? units[random.integerBelow(units.length)]! : habit.unit;
  const scale = habit.temperature === "°F" ? "°C" : "°F";
  const bent = kind === "" && random.uniform() < options.bends ? BENDS[random.integerBelow(BENDS.length)]! : "";
  const truth = b.truths[system]!;
  const bend = bent === "" ? () => 0 : bendOf(random, bent, truth, low, high);
  for (let i = 0; i < n; i++) {
    const T = Math.round(low + ((high - low) * i) / Math.max(1, n - 1)) + 0.15;
    const claimed =
      kind === "temperature unit"
        ? parseTemperatureUnit(habit.temperature)!.toKelvin(parseTemperatureUnit(scale)!.fromKelvin(T))
        : T;
    const ln = truth(T) + bend(T) + offset + habit.sd * random.normal() + (kind === "random" ? away : 0);
    const trueValue = write(b, system, habit.unit, ln, "anhydrous");
    let value =
      kind === "hydrate basis"
        ? write(b, system, habit.unit, ln, "hydrate equivalent per total solvent")
        : write(b, system, written, ln, "anhydrous");
    if (kind === "power of ten") value *= power;
    if (kind === "dilution factor") value /= dilution;
    const row = b.table.count++;
    rows.push(row);
    b.table.source[row] = source;
    b.table.line[row] = row + 2;
    b.table.identity[row] = system;
    b.table.temperatureK[row] = Number(claimed.toFixed(2));
    b.table.temperatureU[row] = 0.1;
    b.table.reportedUnit[row] = codeOf(b.table.texts, habit.unit);
    b.table.relativeU[row] = habit.u;
    b.faultOfRow[row] = kind === "" ? bent : kind;
    b.trueReported[row] = trueValue;
    setValue(b, row, Number(value.toPrecision(4)));
    if (kind !== "") b.faultOfBlock.set(`${system}:${source}`, kind);
    else if (bent === "" && random.uniform() < options.singleFaults)
      b.pending.push({ row, kind: POINT_KINDS[random.integerBelow(POINT_KINDS.length)]! });
  }
}

/** Puts the single faults in, then closes the world. */
function finish(b: Builder): World {
  const random = seededRandom(b.table.count);
  for (const { row, kind } of b.pending) faultRow(b, random, row, kind);
  const { table } = b;
  for (let row = 0; row < table.count; row++) {
    const x = table.moleFraction[row]!;
    b.shiftOfRow[row] = x > 0 ? Math.log(x) - b.truths[table.identity[row]!]!(table.temperatureK[row]!) : Number.NaN;
  }
  return {
    ...b,
    points: b.systems.map((system) => systemPoints(table, system)),
    sourceNames: HABITS.map((_, h) => `source ${h + 1}`),
    reread: (row, change) => reread(b, row, change),
    inReportedUnit: (row, lnValue) => {
      const system = table.identity[row]!;
      const unit = table.texts.texts[table.reportedUnit[row]!]!;
      const value = write(b, system, unit, lnValue, "anhydrous");
      return Number.isFinite(value) ? value : undefined;
    },
  };
}
