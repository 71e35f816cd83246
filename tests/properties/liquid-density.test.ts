import { describe, expect, test } from "vitest";
import { dippr105, liquidDensity, ppds10 } from "../../pipeline/properties/liquid-density.ts";
import { programIndex, substance } from "./read-tables.ts";

const solvents = programIndex.substances.filter(({ roles }) => roles.includes("solvent"));

describe("Densities of solvents", () => {
  // CRC Handbook of Chemistry and Physics, Physical Constants of Organic Compounds: T in K, kg/m3.
  test.each([
    ["methanol", 293.15, 791.4],
    ["ethanol", 293.15, 789.3],
    ["1-propanol", 298.15, 799.7],
    ["2-propanol", 298.15, 780.9],
    ["1-butanol", 293.15, 809.5],
    ["2-methyl-1-propanol", 293.15, 801.8],
    ["1-pentanol", 293.15, 814.4],
    ["ethylene glycol", 293.15, 1113.5],
    ["propylene glycol", 293.15, 1036.1],
    ["glycerol", 293.15, 1261.3],
    ["acetone", 298.15, 784.5],
    ["2-butanone", 298.15, 799.9],
    ["4-methyl-2-pentanone", 298.15, 796.5],
    ["methyl acetate", 293.15, 934.2],
    ["ethyl acetate", 293.15, 900.3],
    ["propyl acetate", 298.15, 882.0],
    ["diethyl ether", 293.15, 713.8],
    ["methyl tert-butyl ether", 298.15, 735.3],
    ["tetrahydrofuran", 298.15, 883.3],
    ["1,4-dioxane", 293.15, 1033.7],
    ["pentane", 293.15, 626.2],
    ["heptane", 298.15, 679.5],
    ["octane", 298.15, 698.6],
    ["cyclohexane", 298.15, 773.9],
    ["toluene", 298.15, 862.3],
    ["chlorobenzene", 293.15, 1105.8],
    ["dichloromethane", 293.15, 1326.6],
    ["chloroform", 298.15, 1478.8],
    ["N,N-dimethylformamide", 298.15, 944.5],
    ["pyridine", 293.15, 981.9],
    ["acetic acid", 298.15, 1044.6],
  ])("%s at %f K is within 0.15 %% of the handbook's %f kg/m3", (name, temperatureK, handbook) => {
    const { value } = liquidDensity(substance(name), temperatureK) ?? { value: Number.NaN };
    expect(Math.abs(value / handbook - 1)).toBeLessThan(0.0015);
  });

  // Handbook values known to be wrong, and the measured ones: NIST ThermoML archive, medians at 25 °C.
  test.each([
    ["hexane", 654.9],
    ["acetonitrile", 776.5],
    ["dimethyl sulfoxide", 1095.4],
    ["N-methyl-2-pyrrolidone", 1028.3],
    ["2,2,4-trimethylpentane", 687.8],
  ])("%s at 25 °C is the measured %f kg/m3, not the wrong one in circulation", (name, measured) => {
    const { value } = liquidDensity(substance(name), 298.15) ?? { value: Number.NaN };
    expect(Math.abs(value / measured - 1)).toBeLessThan(0.001);
  });

  test("every solvent has a density at 20 °C with an uncertainty and a reference", () => {
    expect(solvents.length).toBeGreaterThanOrEqual(97);
    for (const solvent of solvents) {
      const density = liquidDensity(solvent, 293.15);
      expect(density, solvent.name).toBeDefined();
      expect(density?.standardUncertainty, solvent.name).toBeGreaterThan(0);
      expect((density?.standardUncertainty ?? 1) / (density?.value ?? 1), solvent.name).toBeLessThan(0.01);
      expect(density?.reference, solvent.name).not.toBe("");
    }
  });

  test("every solvent expands on heating, within the usual limits", () => {
    for (const solvent of solvents) {
      if (solvent.name === "water") continue;
      const cold = liquidDensity(solvent, 298.15)?.value;
      const warm = liquidDensity(solvent, 308.15)?.value;
      if (cold === undefined || warm === undefined) continue;
      const expansion = (cold - warm) / cold / 10;
      expect(expansion, solvent.name).toBeGreaterThan(4e-4);
      expect(expansion, solvent.name).toBeLessThan(2e-3);
    }
  });

  test("the models of one solvent agree where their ranges overlap", () => {
    for (const { name, liquidDensities } of solvents) {
      const values = liquidDensities
        .filter(
          ({ lowestK, highestK, equation }) =>
            equation !== "tabulated value" && lowestK <= 298.15 && highestK >= 298.15,
        )
        .map(({ density }) => density(298.15));
      if (values.length > 1) expect(Math.max(...values) / Math.min(...values), name).toBeLessThan(1.005);
    }
  });

  test("is unknown outside every range", () => {
    expect(liquidDensity(substance("ethanol"), 100)).toBeUndefined();
    expect(liquidDensity(substance("ethanol"), 600)).toBeUndefined();
  });
});

describe("Correlations", () => {
  test("DIPPR 105 is the critical density at the critical temperature", () => {
    // Ethanol, Perry 8th ed. table 2-32: c1/c2 = 1628.8/0.27469 mol/m3, Tc = 514 K.
    const c = [1628.8, 0.27469, 514, 0.23178];
    expect(dippr105(c, 1000, 514)).toBeCloseTo(1628.8 / 0.27469, 9);
    expect(Math.abs(dippr105(c, 46.069, 293.15) - 790.33)).toBeLessThan(0.01);
  });

  test("PPDS 10 is the critical density at the critical temperature", () => {
    // Methanol, VDI Heat Atlas 2nd ed.
    const c = [164.7611, 2257.7678, -3545.6923, 1929.7376];
    expect(ppds10(c, 513.38, 282, 513.38)).toBe(282);
    expect(Math.abs(ppds10(c, 513.38, 282, 298.15) - 787.25)).toBeLessThan(0.01);
  });
});
