/** A number to so many significant digits, without exponent between 1e-4 and 1e6; "" for NaN. */
export function significant(value: number | undefined, digits = 4): string {
  if (value === undefined || Number.isNaN(value)) return "";
  if (value === 0) return "0";
  const magnitude = Math.abs(value);
  if (magnitude < 1e-4 || magnitude >= 1e6) return value.toExponential(digits - 1);
  const decimals = Math.max(0, digits - 1 - Math.floor(Math.log10(magnitude)));
  return value.toFixed(decimals);
}

/** A temperature in °C to one decimal, from K. */
export function celsius(temperatureK: number): string {
  return (temperatureK - 273.15).toFixed(1);
}
