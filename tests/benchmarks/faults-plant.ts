import type { RandomSource } from "../../pipeline/numerics/random.ts";
import type { System } from "../../pipeline/records/systems.ts";
import { type Converting, setValue } from "./faults-conversions.ts";

/** An invented world while single faults are planted in it. */
export interface Planting extends Converting {
  readonly systems: readonly System[];
  readonly faultOfRow: string[];
  /** ln x at a temperature (K), by system. */
  readonly truths: readonly ((temperatureK: number) => number)[];
}

/** Plants one fault of a kind in a row, and remembers it; a row where the kind is impossible stays clean. */
export function faultRow(b: Planting, random: RandomSource, row: number, kind: string): void {
  const { table } = b;
  const value = table.reportedValue[row]!;
  const system = table.identity[row]!;
  const put = (next: number | undefined) => {
    if (next === undefined || !(next > 0) || next === value) return;
    setValue(b, row, Number(next.toPrecision(4)));
    b.faultOfRow[row] = kind;
  };
  if (kind === "power of ten") put(value * [10, 0.1, 100, 0.01][random.integerBelow(4)]!);
  else if (kind === "dilution factor") put(value / [2, 2, 5, 5, 4, 20][random.integerBelow(6)]!);
  else if (kind === "random") put(value * Math.exp(anyAmount(random)));
  else if (kind === "digits transposed") put(transposed(value));
  else if (kind === "rows shifted") {
    const next = row + 1;
    if (table.identity[next] === system && table.source[next] === table.source[row] && b.faultOfRow[next] === "") {
      const other = table.reportedValue[next]!;
      setValue(b, next, value);
      b.faultOfRow[next] = kind;
      put(other);
    }
  } else put(valueBeside(b, random, row, kind));
}

/** A value that this source has in another solvent, or another proportion of the same: copied, or read off between two. */
function valueBeside(b: Planting, random: RandomSource, row: number, kind: string): number | undefined {
  const { table } = b;
  const system = table.identity[row]!;
  const T = table.temperatureK[row]!;
  const { solute, solvent } = b.systems[system]!.identity;
  const ofSource = (other: number) => b.systems[other]!.rows.filter((r) => table.source[r] === table.source[row]);
  const beside = [...b.systems.keys()].filter((other) => {
    const { identity } = b.systems[other]!;
    const sameSolvents = identity.solvent === solvent;
    if (other === system || identity.solute !== solute || sameSolvents !== (kind === "composition mix-up"))
      return false;
    const there = [...ofSource(other)].map((r) => table.temperatureK[r]!);
    return there.some((t) => t > T - 1) && there.some((t) => t < T + 1);
  });
  const other = beside[random.integerBelow(beside.length)];
  if (other === undefined) return undefined;
  const there = [...ofSource(other)].sort((a, c) => table.temperatureK[a]! - table.temperatureK[c]!);
  const same = there.find((r) => Math.abs(table.temperatureK[r]! - T) < 1);
  if (same !== undefined) return table.reportedValue[same]!;
  const above = there.findIndex((r) => table.temperatureK[r]! > T);
  const [cold, hot] = [there[above - 1]!, there[above]!];
  const part = (T - table.temperatureK[cold]!) / (table.temperatureK[hot]! - table.temperatureK[cold]!);
  return table.reportedValue[cold]! ** (1 - part) * table.reportedValue[hot]! ** part;
}

/** A shift of ln value from 15 % to a factor of 6, log-uniform, to either side. */
export function anyAmount(random: RandomSource): number {
  const [least, most] = [Math.log(1.15), Math.log(6)];
  return least * (most / least) ** random.uniform() * (random.uniform() < 0.5 ? -1 : 1);
}

/** The first swap of neighbouring digits. */
function transposed(value: number): number | undefined {
  const digits = String(value);
  const match = /([1-9])(\.?)(\d)/.exec(digits);
  if (match === null || match[1] === match[3]) return undefined;
  return Number(digits.replace(match[0], `${match[3]}${match[2]}${match[1]}`));
}
