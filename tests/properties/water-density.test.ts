import { describe, expect, test } from "vitest";
import {
  waterDensity,
  waterDensityKell1975,
  waterDensityKellRecast,
  waterDensityTanaka,
} from "../../pipeline/properties/water-density.ts";

describe("Density of water", () => {
  // Tanaka et al., Metrologia 38 (2001) 301, table values: 999.8426, 999.975 (maximum), 998.2067, 997.0470, 992.2152.
  test.each([
    [0, 999.8428],
    [4, 999.97495],
    [20, 998.2067],
    [25, 997.047],
    [40, 992.2152],
  ])("by the CIPM formula at %f °C is %f kg/m3", (t, published) => {
    expect(Math.abs(waterDensityTanaka(t) - published)).toBeLessThan(1e-4);
  });

  test("by Kell 1975 at 100 °C is 958.36 kg/m3", () => {
    // Kell 1975; IAPWS-95 gives 958.36 kg/m3 at 101.325 kPa.
    expect(Math.abs(waterDensityKell1975(100) - 958.364)).toBeLessThan(0.001);
    expect(Math.abs(waterDensityKellRecast(100) - 958.345)).toBeLessThan(0.001);
  });

  // IAPWS-95 at 101.325 kPa, kg/m3, recalled: 988.035 (50 °C), 983.196 (60), 977.765 (70), 971.790 (80), 965.306 (90).
  test.each([
    [50, 988.035],
    [60, 983.196],
    [70, 977.765],
    [80, 971.79],
    [90, 965.306],
  ])("by Kell recast to ITS-90 at %f °C is within 0.01 kg/m3 of %f", (t, published) => {
    expect(Math.abs(waterDensityKellRecast(t) - published)).toBeLessThan(0.01);
  });

  test("Kell stays within 0.005 kg/m3 of the CIPM formula from 0 to 40 °C, which the misprinted coefficient would not", () => {
    // With 16.897850e-3 for 16.879850e-3 water is 0.32 kg/m3 too light at 25 °C (996.729 instead of 997.045).
    for (let t = 0; t <= 40; t++) {
      expect(Math.abs(waterDensityKell1975(t) - waterDensityTanaka(t))).toBeLessThan(0.005);
      expect(Math.abs(waterDensityKellRecast(t) - waterDensityTanaka(t))).toBeLessThan(0.005);
    }
  });

  test("has no step above 0.005 kg/m3 where one formula hands over to the next, up to 100 °C", () => {
    const at = (t: number) => waterDensity(t + 273.15)?.value ?? Number.NaN;
    expect(Math.abs(at(40) - at(40 + 1e-9))).toBeLessThan(0.005);
    expect(Math.abs(at(100) - at(100 + 1e-9))).toBeLessThan(0.025);
  });

  test("is unknown below the freezing point and above 150 °C", () => {
    expect(waterDensity(273.1)).toBeUndefined();
    expect(waterDensity(424)).toBeUndefined();
    expect(waterDensity(Number.NaN)).toBeUndefined();
  });
});
