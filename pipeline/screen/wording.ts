/** A number in three significant digits, for reading; the same on every machine. */
export function threeDigits(value: number): string {
  return String(Number(value.toPrecision(3)));
}

/** How far a value lies from what is expected: `34 % below`, `12 % above`, `9.8 times` for more than a factor 3. */
export function offBy(deviation: number): string {
  if (Math.abs(deviation) > Math.log(3)) {
    const side = deviation > 0 ? "above" : "below";
    return `a factor ${threeDigits(Math.exp(Math.abs(deviation)))} ${side}`;
  }
  const percent = 100 * Math.abs(Math.expm1(deviation));
  return `${percent < 10 ? percent.toFixed(1) : percent.toFixed(0)} % ${deviation > 0 ? "above" : "below"}`;
}

/** `1 source`, `3 sources`. */
export function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}

/** `a`, `a and b`, `a, b and c`. */
export function listed(names: readonly string[]): string {
  return names.length < 2 ? names.join("") : `${names.slice(0, -1).join(", ")} and ${names.at(-1)}`;
}
