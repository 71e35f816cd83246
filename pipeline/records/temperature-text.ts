/** A temperature in K as people read it, in °C with one decimal: `32.4 °C`. */
export function inCelsius(temperatureK: number): string {
  const text = (temperatureK - 273.15).toFixed(1);
  return `${text === "-0.0" ? "0.0" : text} °C`;
}
