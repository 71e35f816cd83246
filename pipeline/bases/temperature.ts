import { plainSpelling } from "./unit-spelling.ts";

/** A temperature scale, understood once and applied many times. */
export interface TemperatureUnit {
  readonly canonical: "K" | "°C" | "°F";
  /** Thermodynamic temperature [K] of a reading; no check against 0 K. */
  readonly toKelvin: (value: number) => number;
  /** Reading of a thermodynamic temperature [K]. */
  readonly fromKelvin: (temperatureK: number) => number;
  /** Size of one degree [K]: turns a difference or an uncertainty into kelvin. */
  readonly kelvinPerDegree: number;
}

const kelvin: TemperatureUnit = {
  canonical: "K",
  toKelvin: (value) => value,
  fromKelvin: (temperatureK) => temperatureK,
  kelvinPerDegree: 1,
};

const celsius: TemperatureUnit = {
  canonical: "°C",
  toKelvin: (value) => value + 273.15,
  fromKelvin: (temperatureK) => temperatureK - 273.15,
  kelvinPerDegree: 1,
};

const fahrenheit: TemperatureUnit = {
  canonical: "°F",
  toKelvin: (value) => ((value + 459.67) * 5) / 9,
  fromKelvin: (temperatureK) => (temperatureK * 9) / 5 - 459.67,
  kelvinPerDegree: 5 / 9,
};

const spellings: ReadonlyMap<string, TemperatureUnit> = new Map([
  ...["k", "kelvin", "kelvins", "degk", "°k", "degreekelvin", "degreeskelvin"].map((s) => [s, kelvin] as const),
  ...["c", "°c", "degc", "deg.c", "cel", "celsius", "°celsius", "degcelsius", "degreecelsius", "degreescelsius"].map(
    (s) => [s, celsius] as const,
  ),
  ...["degreec", "degreesc", "centigrade", "degreescentigrade"].map((s) => [s, celsius] as const),
  ...["f", "°f", "degf", "deg.f", "fahrenheit", "°fahrenheit", "degfahrenheit"].map((s) => [s, fahrenheit] as const),
  ...["degreef", "degreesf", "degreefahrenheit", "degreesfahrenheit"].map((s) => [s, fahrenheit] as const),
]);

/**
 * The temperature scale a spelling names, or undefined. Case and spacing are free; `°C`, `ºC`, `℃`, `degC`, `C`, `Cel`
 * (UCUM), `K`, `kelvin`, `°F`, `degF`, `[degF]` (UCUM), `[K]`, `(°C)` and the words.
 *
 * Kelvin = °C + 273.15 = (°F + 459.67) 5/9, exact by definition.
 */
export function parseTemperatureUnit(text: string): TemperatureUnit | undefined {
  const plain = plainSpelling(text)?.toLowerCase().replaceAll(" ", "");
  return plain === undefined ? undefined : spellings.get(plain.replace(/^\[(.*)\]$|^\((.*)\)$/, "$1$2"));
}

/**
 * Thermodynamic temperature [K] of a reading on the scale `unitText` names, or undefined where the scale is unknown.
 * For many readings on one scale use `parseTemperatureUnit` once.
 * @example toKelvin(25, "°C") // 298.15
 */
export function toKelvin(value: number, unitText: string): number | undefined {
  return parseTemperatureUnit(unitText)?.toKelvin(value);
}
