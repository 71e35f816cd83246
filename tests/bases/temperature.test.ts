import { expect, test } from "vitest";
import { parseTemperatureUnit, toKelvin } from "../../pipeline/bases/temperature.ts";

test.each([
  "°C",
  "ºC",
  "˚C",
  "℃",
  "degC",
  "deg C",
  "deg. C",
  "C",
  "c",
  "Cel",
  "celsius",
  "degrees Celsius",
  "(°C)",
  "° C",
])("%s is degree Celsius", (text) => expect(toKelvin(25, text)).toBe(298.15));

test.each(["K", "k", "kelvin", "[K]", "Kelvins"])("%s is kelvin", (text) =>
  expect(toKelvin(298.15, text)).toBe(298.15),
);

test.each(["°F", "F", "degF", "[degF]", "fahrenheit", "℉"])("%s is degree Fahrenheit", (text) => {
  // Exact by definition: 32 °F and 212 °F are 273.15 K and 373.15 K. UCUM v2.2 gives K = (degF + 459.67) 5/9.
  expect(toKelvin(32, text)).toBeCloseTo(273.15, 12);
  expect(toKelvin(212, text)).toBeCloseTo(373.15, 12);
});

test.each(["", "R", "degrees", "°", "mC", "1000/T", "kg"])("%s is no temperature scale", (text) => {
  expect(toKelvin(25, text)).toBeUndefined();
});

test("a scale converts back, and its degree turns a difference into kelvin", () => {
  for (const text of ["°C", "K", "°F"]) {
    const unit = parseTemperatureUnit(text);
    if (unit === undefined) throw new Error(text);
    expect(unit.fromKelvin(unit.toKelvin(71.3))).toBeCloseTo(71.3, 11);
    expect(unit.toKelvin(11) - unit.toKelvin(10)).toBeCloseTo(unit.kelvinPerDegree, 12);
  }
});
