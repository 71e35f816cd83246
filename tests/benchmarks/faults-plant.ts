import type { RandomSource } from "../../pipeline/numerics/random.ts";
import type { System } from "../../pipeline/records/systems.ts";
import { type Converting, setValue, write } from "./faults-conversions.ts";

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
  } else {
    const same = [...b.systems.keys()].filter(
      (other) =>
        other !== system &&
        b.systems[other]!.identity.solute === b.systems[system]!.identity.solute &&
        b.systems[other]!.rows.some((r) => table.source[r] === table.source[row]),
    );
    const other = same[random.integerBelow(same.length)];
    if (other !== undefined) {
      const there = b.systems[other]!.rows.find(
        (r) => table.source[r] === table.source[row] && Math.abs(table.temperatureK[r]! - table.temperatureK[row]!) < 1,
      );
      const unit = table.texts.texts[table.reportedUnit[row]!]!;
      if (there !== undefined) put(table.reportedValue[there]!);
      else put(write(b, other, unit, b.truths[other]!(table.temperatureK[row]!) + 0.02 * random.normal(), "anhydrous"));
    }
  }
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
