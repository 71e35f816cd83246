import { describe, expect, test } from "vitest";
import { mixtureDensity } from "../../pipeline/properties/mixture-density.ts";
import { substance } from "./read-tables.ts";

const mixture = (parts: Readonly<Record<string, number>>, temperatureK: number) =>
  mixtureDensity(
    Object.entries(parts).map(([name, massFraction]) => ({ substance: substance(name), massFraction })),
    temperatureK,
  );

describe("Densities of solvent mixtures", () => {
  // CRC Handbook of Chemistry and Physics, 102nd ed., aqueous solutions at 20 °C.
  test.each([
    ["methanol", 0.15, 974.0],
    ["methanol", 0.42, 931.1],
    ["methanol", 0.74, 861.8],
    ["acetic acid", 0.5, 1056.2],
    ["acetic acid", 0.82, 1067.7],
  ])("water with %s, w = %f, at 20 °C is %f kg/m3 within 0.2 %%", (name, w, handbook) => {
    const { value } = mixture({ [name]: w, water: 1 - w }, 293.15) ?? { value: Number.NaN };
    expect(Math.abs(value / handbook - 1)).toBeLessThan(0.002);
  });

  // 2-Propanol and water at 25 °C: J. Chem. Eng. Data, doi 10.1021/je700700f (2008), not the data of the fit used.
  test.each([
    [0.45644, 912.6],
    [0.8788, 811.99],
    [0.93, 799.4],
  ])("water with 2-propanol, w = %f, at 25 °C is %f kg/m3 within 0.3 %%", (w, measured) => {
    const { value } = mixture({ "2-propanol": w, water: 1 - w }, 298.15) ?? { value: Number.NaN };
    expect(Math.abs(value / measured - 1)).toBeLessThan(0.003);
  });

  test("ethanol and water follow the alcoholometric tables", () => {
    // OIML R 22: 95 % vol, w = 0.92408, 811.38 kg/m3 at 20 °C.
    expect(mixture({ water: 0.07592, ethanol: 0.92408 }, 293.15)?.value).toBeCloseTo(811.38, 1);
  });

  test("one component alone has its own density, whatever the unit of its share", () => {
    expect(mixture({ toluene: 100, water: 0 }, 293.15)?.value).toBe(mixture({ toluene: 1 }, 293.15)?.value);
  });

  test("other mixtures are ideal, with an uncertainty that covers the contraction", () => {
    const organic = mixture({ toluene: 0.5, heptane: 0.5 }, 293.15);
    const aqueous = mixture({ acetonitrile: 0.5, water: 0.5 }, 293.15);
    expect((organic?.standardUncertainty ?? 0) / (organic?.value ?? 1)).toBeLessThan(0.005);
    expect((aqueous?.standardUncertainty ?? 0) / (aqueous?.value ?? 1)).toBeGreaterThan(0.015);
  });

  test("a trace of a third component leaves what is known of the other two", () => {
    // OIML R 22: w = 0.7 of ethanol, 867.611 kg/m3 at 20 °C; ideal mixing would give 842.2.
    const { value, standardUncertainty } = mixture({ ethanol: 0.6993, water: 0.2997, acetone: 0.001 }, 293.15) ?? {
      value: Number.NaN,
      standardUncertainty: Number.NaN,
    };
    expect(Math.abs(value - 867.55)).toBeLessThan(0.2);
    expect(standardUncertainty / value).toBeLessThan(0.001);
    const even = mixture({ ethanol: 0.3, water: 0.3, acetone: 0.4 }, 293.15);
    expect((even?.standardUncertainty ?? 0) / (even?.value ?? 1)).toBeGreaterThan(0.015);
  });

  test("a component of unknown density leaves the mixture unknown", () => {
    expect(mixture({ ethanol: 0.5, "diethyl ether": 0.5 }, 600)).toBeUndefined();
    expect(mixtureDensity([], 293.15)).toBeUndefined();
  });
});
