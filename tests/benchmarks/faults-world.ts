import type { Needs } from "../../pipeline/bases/needs.ts";
import { type RandomSource, seededRandom } from "../../pipeline/numerics/random.ts";
import type { MeasurementTable } from "../../pipeline/records/measurements.ts";
import type { Reread } from "../../pipeline/records/reread.ts";
import { type System, type SystemPoints, systemPoints } from "../../pipeline/records/systems.ts";
import { addBlock, type Builder, createBuilder, HABITS } from "./faults-blocks.ts";
import { reread, write } from "./faults-conversions.ts";
import { drawPlans, type PlanFinder, type PlanOptions } from "./faults-plans.ts";
import { faultRow } from "./faults-plant.ts";

/** Invented worlds of measurements in which every fault is known. */
export interface WorldOptions extends PlanOptions {
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
  /** Solutes are measured in mixtures of two of the solvents too. */
  readonly mixtures: boolean;
  /** Blocks go wrong in rarer ways too: clear and cloud points, values beside the wrong rows, bad days. */
  readonly rareKinds: boolean;
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
  mixtures: false,
  rareKinds: false,
  forms: 0,
  wet: 0,
  offEverywhere: false,
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
const MIXED: readonly (readonly [massFraction: number, name: string])[] = [
  [0.2, "20:80 w/w"],
  [0.4, "40:60 w/w"],
  [0.6, "60:40 w/w"],
  [0.8, "80:20 w/w"],
];

interface Solute {
  readonly number: number;
  readonly M: number;
  readonly hydrateRatio: number | undefined;
}

/** A liquid and what dissolves in it. */
interface Liquid {
  readonly name: string;
  readonly composition: string;
  readonly M: number;
  readonly rho: number;
  readonly boils: number;
  readonly truth: (temperatureK: number) => number;
  /** The same solvents the other way round. */
  readonly reversed?: Liquid;
  readonly transition: boolean;
}

/** Builds a world. */
export function makeWorld(options: WorldOptions): World {
  const random = seededRandom(options.seed);
  const build = createBuilder(options.solutes * (SOLVENTS.length + MIXED.length) * 60);
  const plans = drawPlans(seededRandom(options.seed + 5e5), options, options.solutes, HABITS.length);
  for (let s = 0; s < options.solutes; s++) {
    const solute = {
      number: s,
      M: 120 + 300 * random.uniform(),
      hydrateRatio: random.uniform() < 0.3 ? 1.1 + 0.7 * random.uniform() : undefined,
    };
    const pure = SOLVENTS.map((solvent) => inSolvent(options, random, solute, solvent));
    for (const liquid of pure) addSystem(build, options, random, plans, solute, liquid);
    if (!options.mixtures) continue;
    for (const liquid of inMixtures(random, pure[0]!, pure.at(-1)!))
      addSystem(build, options, random, plans, solute, liquid);
  }
  return finish(build);
}

function inSolvent(
  options: WorldOptions,
  random: RandomSource,
  solute: Solute,
  solvent: (typeof SOLVENTS)[number],
): Liquid {
  const slope = -(1000 * (8 + (options.steepest - 8) * random.uniform())) / (8.314 * 303);
  const curvature = 4 * random.normal();
  const breakK = random.uniform() < options.transitions ? 298 + 20 * random.uniform() : Number.NaN;
  const drop = -slope * (0.4 + 0.5 * random.uniform());
  const level = Math.log(0.002) + random.uniform() * Math.log(100);
  const a = level - Math.log(solute.M / solvent.M);
  const truth = (T: number) => {
    const u = 303 / T - 1;
    const bend = T > breakK ? -drop * (303 / breakK - 1 - u) : 0;
    return a + slope * u + curvature * (u - Math.log1p(u)) + bend;
  };
  return { ...solvent, composition: "", truth, transition: breakK > 0 };
}

/** Mixtures of two solvents: ln x between those of the two, with an excess. */
function inMixtures(random: RandomSource, first: Liquid, second: Liquid): Liquid[] {
  const excess = 4 * random.uniform() - 1;
  const truthAt = (w: number) => (T: number) =>
    w * first.truth(T) + (1 - w) * second.truth(T) + w * (1 - w) * excess * (300 / T);
  const mixed = MIXED.map(([w, composition]) => ({
    name: `${first.name} + ${second.name}`,
    composition,
    M: 1 / (w / first.M + (1 - w) / second.M),
    rho: 1 / (w / first.rho + (1 - w) / second.rho),
    boils: Math.min(first.boils, second.boils),
    truth: truthAt(w),
    transition: first.transition || second.transition,
  }));
  return mixed.map((liquid, k) => ({ ...liquid, reversed: mixed.at(-1 - k)! }));
}

function addSystem(
  b: Builder,
  options: WorldOptions,
  random: RandomSource,
  plans: PlanFinder,
  solute: Solute,
  liquid: Liquid,
): void {
  const index = b.systems.length;
  if (liquid.transition) b.transitionSystems.add(index);
  b.truths.push(liquid.truth);
  b.needs.push(needsOf(solute, liquid));
  const rows: number[] = [];
  const count = options.sources[0] + random.integerBelow(options.sources[1] - options.sources[0] + 1);
  const first = random.integerBelow(HABITS.length);
  for (let k = 0; k < count; k++) {
    const source = (first + k) % HABITS.length;
    const place = {
      ...{ system: index, source, hydrated: solute.hydrateRatio !== undefined, boilsK: liquid.boils },
      plan: plans(solute.number, liquid.name, source),
      reversed:
        liquid.reversed === undefined
          ? undefined
          : { truth: liquid.reversed.truth, needs: needsOf(solute, liquid.reversed) },
    };
    rows.push(...addBlock(b, options, random, place));
  }
  const soluteName = `invented ${solute.number + 1}`;
  const { name, composition } = liquid;
  b.systems.push({
    index,
    id: `${soluteName} in ${name} ${composition}`,
    key: `${solute.number} ${name} ${composition}`,
    family: `${solute.number} ${name} ${composition}`,
    fitBasis: "ln x",
    rows: Int32Array.from(rows),
    identity: {
      solute: soluteName,
      solidForm: "unspecified",
      solvent: name,
      composition,
      solventComponents: [{ name, massFraction: 1 }],
      medium: "",
      soluteMolarMass: solute.M,
      solventMolarMass: liquid.M,
      aqueousSalt: false,
    },
  });
}

function needsOf(solute: Solute, liquid: Liquid): Needs {
  const exactly = (value: number) => ({ value, standardUncertainty: 0 });
  return {
    soluteMolarMass: exactly(solute.M),
    crystalMolarMass: solute.hydrateRatio === undefined ? undefined : exactly(solute.M * solute.hydrateRatio),
    solventMolarMass: exactly(liquid.M),
    solventDensityAt20C: exactly(liquid.rho),
    solutionDensity: {
      kind: "additive volumes",
      apparentSoluteDensity: exactly(1200),
      solventDensity: exactly(liquid.rho),
    },
  };
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
      const value = write(b.needs[system]!, unit, lnValue, "anhydrous");
      return Number.isFinite(value) ? value : undefined;
    },
  };
}
