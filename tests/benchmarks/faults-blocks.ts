import type { Needs } from "../../pipeline/bases/needs.ts";
import { parseTemperatureUnit } from "../../pipeline/bases/temperature.ts";
import type { RandomSource } from "../../pipeline/numerics/random.ts";
import { codeOf, createMeasurementTable } from "../../pipeline/records/measurements.ts";
import type { System } from "../../pipeline/records/systems.ts";
import { bendOf } from "./faults-bends.ts";
import { setValue, write } from "./faults-conversions.ts";
import type { Plan } from "./faults-plans.ts";
import { anyAmount } from "./faults-plant.ts";
import type { WorldOptions } from "./faults-world.ts";

/** How each source works: unit, temperature scale, scatter, stated uncertainty, method. */
export const HABITS = [
  { unit: "g/100 g solvent", temperature: "°C", sd: 0.012, u: 0.015, method: "gravimetric" },
  { unit: "mg/mL solution", temperature: "°C", sd: 0.025, u: 0.03, method: "hplc" },
  { unit: "mole fraction", temperature: "K", sd: 0.012, u: 0.05, method: "clear-point" },
  { unit: "g/100 g solution", temperature: "°C", sd: 0.018, u: 0.015, method: "gravimetric" },
  { unit: "mg/mL solvent", temperature: "°C", sd: 0.03, u: 0.04, method: "hplc" },
  { unit: "mol/kg solvent", temperature: "°F", sd: 0.015, u: 0.05, method: "titration" },
] as const;

/** A world while it grows. */
export function createBuilder(capacity: number) {
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
export type Builder = ReturnType<typeof createBuilder>;

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
/** Rows from which a block can stand beside the wrong rows. */
const LEAST_SHIFTED = 5;

/** What a block is measured in. */
export interface BlockPlace {
  readonly system: number;
  readonly source: number;
  readonly hydrated: boolean;
  readonly boilsK: number;
  readonly plan: Plan | undefined;
  /** The same solvents the other way round, where they are a mixture: ln x, and what conversions need. */
  readonly reversed: { readonly truth: (temperatureK: number) => number; readonly needs: Needs } | undefined;
}

/** Adds the rows of one source to a system, with what is wrong with them as a whole; single faults are planted later. */
export function addBlock(b: Builder, options: WorldOptions, random: RandomSource, place: BlockPlace): number[] {
  const { system, source, plan } = place;
  const habit = HABITS[source]!;
  const n = options.temperatures[0] + random.integerBelow(options.temperatures[1] - options.temperatures[0] + 1);
  const [low, high] = [278 + 8 * random.uniform(), Math.min(place.boilsK - 5, 313 + 25 * random.uniform())];
  const offset = options.between * random.normal();
  const kind = plan === undefined ? drawKind(options, random, place, n) : "";
  const power = [10, 0.1, 1000, 0.001, 0.01, 100][random.integerBelow(6)]!;
  const dilution = [2, 5, 4, 20][random.integerBelow(4)]!;
  const away = anyAmount(random);
  const units = OTHER_UNIT[habit.unit]!;
  const written = kind === "basis mix-up" ? units[random.integerBelow(units.length)]! : habit.unit;
  const basis = kind === "hydrate basis" ? "hydrate equivalent per total solvent" : "anhydrous";
  const scale = habit.temperature === "°F" ? "°C" : "°F";
  const mayBend = kind === "" && plan === undefined;
  const bent = mayBend && random.uniform() < options.bends ? BENDS[random.integerBelow(BENDS.length)]! : "";
  const { truth, needs } =
    kind === "composition mix-up" ? place.reversed! : { truth: b.truths[system]!, needs: b.needs[system]! };
  const bend = bent === "" ? () => 0 : bendOf(random, bent, truth, low, high);
  const zone = kind === "cloud point for clear point" ? 4 + 8 * random.uniform() : 0;
  const badDay = mayBend && bent === "" ? drawBadDay(options, random, n) : undefined;
  const rows: number[] = [];
  const T = Array.from({ length: n }, (_, i) => Math.round(low + ((high - low) * i) / Math.max(1, n - 1)) + 0.15);
  const order = valueOrder(random, kind, n);
  for (let i = 0; i < n; i++) {
    const measured = T[order[i]!]! + zone;
    const claimed = kind === "temperature unit" ? inScale(T[i]!, habit.temperature, scale) : T[i]!;
    const onBadDay = badDay?.rows.has(i) === true ? badDay.by : 0;
    const planned = plan?.shift(measured, truth) ?? 0;
    const own = kind === "random" ? away : 0;
    const ln = truth(measured) + bend(measured) + offset + habit.sd * random.normal() + own + onBadDay + planned;
    let value = write(needs, basis === "anhydrous" ? written : habit.unit, ln, basis);
    if (kind === "power of ten") value *= power;
    if (kind === "dilution factor") value /= dilution;
    const row = b.table.count++;
    rows.push(row);
    writeRow(b, row, place, claimed, value);
    b.trueReported[row] = write(needs, habit.unit, ln, "anhydrous");
    const single = mayBend && bent === "" && onBadDay === 0 && random.uniform() < options.singleFaults;
    b.faultOfRow[row] = onBadDay !== 0 ? "random" : kind === "" ? bent : kind;
    if (plan?.kind === "temperature offset") b.faultOfRow[row] = plan.kind;
    if (single) b.pending.push({ row, kind: pointKind(random, place) });
  }
  const whole = kind !== "" ? kind : plan === undefined || plan.kind === "temperature offset" ? "" : plan.kind;
  if (whole !== "") b.faultOfBlock.set(`${system}:${source}`, whole);
  return rows;
}

function pointKind(random: RandomSource, { reversed }: BlockPlace): string {
  const kind = POINT_KINDS[random.integerBelow(POINT_KINDS.length)]!;
  return kind === "value of another solvent" && reversed !== undefined ? "composition mix-up" : kind;
}

function drawKind(options: WorldOptions, random: RandomSource, place: BlockPlace, n: number): string {
  if (random.uniform() >= options.blockFaults) return "";
  const kinds = [...BLOCK_KINDS];
  if (place.hydrated) kinds.push("hydrate basis", "hydrate basis");
  if (place.reversed !== undefined) kinds.push("composition mix-up", "composition mix-up", "composition mix-up");
  if (options.rareKinds && HABITS[place.source]!.method === "clear-point")
    kinds.push(...new Array<string>(4).fill("cloud point for clear point"));
  if (options.rareKinds && n >= LEAST_SHIFTED) kinds.push("rows shifted");
  return kinds[random.integerBelow(kinds.length)]!;
}

/** Rows measured on one day with one bad stock: a common factor for a run of them. */
function drawBadDay(options: WorldOptions, random: RandomSource, n: number) {
  if (!options.rareKinds || n < 5 || random.uniform() > 0.04) return undefined;
  const length = 2 + random.integerBelow(Math.floor(n / 2) - 1);
  const start = random.integerBelow(n - length + 1);
  const by = (0.2 + 0.4 * random.uniform()) * (random.uniform() < 0.5 ? -1 : 1);
  return { rows: new Set(Array.from({ length }, (_, i) => start + i)), by };
}

/** Which value stands in which row: shifted by one from some row on, where the values stand beside the wrong rows. */
function valueOrder(random: RandomSource, kind: string, n: number): number[] {
  const order = Array.from({ length: n }, (_, i) => i);
  if (kind !== "rows shifted") return order;
  const start = random.integerBelow(n - 3);
  const step = random.uniform() < 0.5 ? 1 : -1;
  return order.map((i) => (i < start ? i : Math.max(0, Math.min(n - 1, i + step))));
}

function inScale(temperatureK: number, from: string, to: string): number {
  return parseTemperatureUnit(from)!.toKelvin(parseTemperatureUnit(to)!.fromKelvin(temperatureK));
}

function writeRow(b: Builder, row: number, { system, source }: BlockPlace, temperatureK: number, value: number): void {
  const habit = HABITS[source]!;
  b.table.source[row] = source;
  b.table.line[row] = row + 2;
  b.table.identity[row] = system;
  b.table.temperatureK[row] = Number(temperatureK.toFixed(2));
  b.table.temperatureU[row] = 0.1;
  b.table.reportedUnit[row] = codeOf(b.table.texts, habit.unit);
  b.table.method[row] = codeOf(b.table.texts, habit.method);
  b.table.relativeU[row] = habit.u;
  setValue(b, row, Number(value.toPrecision(4)));
}
