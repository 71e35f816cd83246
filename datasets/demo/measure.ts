/** How the invented group measures: seeded noise, a bias for each source and system, and rounding as people round. */
import { uniformFloat64 } from "pure-rand/distribution/uniformFloat64";
import { xoroshiro128plus } from "pure-rand/generator/xoroshiro128plus";
import { type DemoUnit, hydratePerAddedSolvent, inUnit, type SystemName, trueMassRatio } from "./truth.ts";

/** Standard deviation of the bias that a source has in a system, as a fraction. */
const BETWEEN_SOURCES = 0.025;

/** A mistake planted in a reading, told in words. */
export interface Mistake {
  /** Suspected cause or refusal that a curator should arrive at. */
  readonly cause: string;
  /** What was done to the reading. */
  readonly done: string;
  /** What the reading should have said. */
  readonly truth: string;
}

/** One reading as the source reports it, before it becomes a row. */
export interface Reported {
  readonly system: SystemName;
  /** Temperature the reading belongs to, °C. */
  readonly celsius: number;
  /** What stands in the temperature cell. */
  readonly temperature: string;
  /** What stands in the solubility cell. */
  readonly value: string;
  readonly replicate: number;
  readonly mistake?: Mistake;
}

/** One measured series: a system at several temperatures in a source's unit. */
export interface SeriesPlan {
  readonly source: string;
  readonly system: SystemName;
  readonly unit: DemoUnit;
  readonly temperatures: readonly number[];
  /** Relative standard deviation of one reading. */
  readonly noise: number;
  readonly replicates?: number;
  readonly temperatureAs?: "°C" | "K" | "°F";
  /** Mass per solvent added of the hydrate instead of the unsolvated mass. */
  readonly hydrate?: boolean;
}

/** A stream of standard normal deviates that depends on the seed text alone (Box and Muller 1958). */
export function normalStream(seedText: string): () => number {
  let seed = 0x811c9dc5;
  for (const character of seedText) seed = Math.imul(seed ^ (character.codePointAt(0) ?? 0), 0x01000193);
  const generator = xoroshiro128plus(seed);
  return () => {
    const radius = Math.sqrt(-2 * Math.log(1 - uniformFloat64(generator)));
    return radius * Math.cos(2 * Math.PI * uniformFloat64(generator));
  };
}

/** A number with a few significant digits and no exponent, as it would be typed. */
export function significant(value: number, digits: number): string {
  return String(Number(value.toPrecision(digits)));
}

/** A temperature in °C as the source writes it. */
export function writtenTemperature(celsius: number, unit: "°C" | "K" | "°F"): string {
  if (unit === "K") return (celsius + 273.15).toFixed(2);
  if (unit === "°F") return String(Math.round(celsius * 9 + 160) / 5);
  return String(celsius);
}

/** Value of a system in the series' unit, without noise, at a temperature in °C. */
export function trueValue(plan: SeriesPlan, celsius: number, system: SystemName = plan.system): number {
  return reportedForm(plan, system, trueMassRatio(system, celsius), celsius);
}

/** The readings of a series as an honest chemist would report them. */
export function measure(plan: SeriesPlan): Reported[] {
  const normal = normalStream(`${plan.source} ${plan.system}`);
  const bias = BETWEEN_SOURCES * normal();
  const readings: Reported[] = [];
  for (const celsius of plan.temperatures) {
    const ratio = trueMassRatio(plan.system, celsius + 0.1 * normal());
    for (let replicate = 1; replicate <= (plan.replicates ?? 1); replicate++) {
      const measured = ratio * Math.exp(bias + plan.noise * normal());
      readings.push({
        system: plan.system,
        celsius,
        temperature: writtenTemperature(celsius, plan.temperatureAs ?? "°C"),
        value: significant(reportedForm(plan, plan.system, measured, celsius), 4),
        replicate,
      });
    }
  }
  return readings;
}

function reportedForm(plan: SeriesPlan, system: SystemName, massRatio: number, celsius: number): number {
  const ratio = plan.hydrate ? hydratePerAddedSolvent(system, massRatio) : massRatio;
  return inUnit(plan.unit, system, ratio, celsius);
}
