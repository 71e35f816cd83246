const ZERO_CELSIUS = 273.15;

/** A number as text with a true minus sign, and never "-0". */
function signed(text: string): string {
  if (!text.startsWith("-")) return text;
  return /^-0(\.0*)?$/.test(text) ? text.slice(1) : `−${text.slice(1)}`;
}

/** A number to so many significant digits, without exponent between 1e-4 and 1e6; "" for NaN and what is unknown. */
export function significant(value: number | undefined, digits = 4): string {
  if (value === undefined || Number.isNaN(value)) return "";
  if (value === 0) return "0";
  const magnitude = Math.abs(value);
  if (magnitude < 1e-4 || magnitude >= 1e6) {
    const [mantissa = "", exponent = ""] = value.toExponential(digits - 1).split("e");
    return `${signed(mantissa)}×10^${signed(exponent.replace("+", ""))}`;
  }
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(magnitude)));
  return signed(value.toFixed(decimals));
}

/** A number with a fixed number of decimals; "" for NaN and what is unknown. */
export function fixed(value: number | undefined, decimals: number): string {
  return value === undefined || Number.isNaN(value) ? "" : signed(value.toFixed(decimals));
}

/** A number that a program can read back, to so many significant digits. */
export function plainNumber(value: number, digits: number): string {
  return String(Number(value.toPrecision(digits)));
}

/** A temperature in °C to one decimal, from K. */
export function celsius(temperatureK: number): string {
  return fixed(temperatureK - ZERO_CELSIUS, 1);
}

/** A deviation in percent with its sign: `+3.1`, `−12`, and a factor in words beyond ±200 %. */
export function percentOff(percent: number | undefined): string {
  if (percent === undefined || Number.isNaN(percent)) return "";
  if (percent > 200) return `×${significant(1 + percent / 100, 3)}`;
  const text = fixed(percent, Math.abs(percent) < 10 ? 1 : 0);
  return text.startsWith("−") || Number(text) === 0 ? text : `+${text}`;
}

/** `1 source`, `3 sources`. */
export function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}

/** Letter of a source within its system: A to Z, then AA, AB and on. */
export function sourceLetter(position: number): string {
  const last = String.fromCharCode(65 + (position % 26));
  return position < 26 ? last : sourceLetter(Math.floor(position / 26) - 1) + last;
}

/** Middle value; NaN of none. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const half = sorted.length / 2;
  if (sorted.length === 0) return Number.NaN;
  const [low, high] = [sorted[Math.ceil(half) - 1] as number, sorted[Math.floor(half)] as number];
  return (low + high) / 2;
}
