import { expect, test } from "vitest";
import { activityCoefficient, idealSolubility, whyNoIdealSolubility } from "../../pipeline/fit/ideal-solubility.ts";

// Naphthalene: melting point 353.4 K, enthalpy of fusion 19.06 kJ/mol (from memory, not verified).
const naphthalene = { meltingPointK: 353.4, fusionEnthalpy: 19060 };

test("The ideal solubility of naphthalene at 25 °C lies between the forms without and with a heat-capacity term", () => {
  const ideal = idealSolubility(naphthalene, 298.15);
  // The usual textbook figure for 25 °C is about 0.30 (from memory, not verified).
  expect(ideal.low).toBeCloseTo(Math.exp((-19060 / 8.314462618) * (1 / 298.15 - 1 / 353.4)), 12);
  expect(ideal.low).toBeCloseTo(0.3, 2);
  expect(ideal.high).toBeCloseTo((298.15 / 353.4) ** (19060 / 353.4 / 8.314462618), 12);
  expect(ideal.high).toBeGreaterThan(ideal.low);
});

test("The bracket closes at the melting point, where the ideal solubility is 1, and widens below it", () => {
  expect(idealSolubility(naphthalene, 353.4)).toEqual({ low: 1, high: 1 });
  const width = (T: number) => {
    const { low, high } = idealSolubility(naphthalene, T);
    return Math.log(high / low);
  };
  expect(width(340)).toBeLessThan(width(320));
  expect(width(320)).toBeLessThan(width(280));
});

test("The full heat-capacity term agrees with the integral of van 't Hoff's equation", () => {
  // d ln x/dT = dH(T)/(R T^2) with dH(T) = dHfus - dCp (Tm - T), dCp = dHfus/Tm: dH(T) = dHfus T/Tm.
  const { meltingPointK: Tm, fusionEnthalpy: H } = naphthalene;
  let integral = 0;
  const steps = 20000;
  for (let i = 0; i < steps; i++) {
    const T = 298.15 + ((Tm - 298.15) * (i + 0.5)) / steps;
    integral += ((H * T) / Tm / (8.314462618 * T * T)) * ((Tm - 298.15) / steps);
  }
  expect(Math.log(idealSolubility(naphthalene, 298.15).high)).toBeCloseTo(-integral, 8);
});

test("The activity coefficient is the ideal over the measured mole fraction", () => {
  const gamma = activityCoefficient({ low: 0.3, high: 0.33 }, Math.log(0.1));
  expect(gamma.low).toBeCloseTo(3, 12);
  expect(gamma.high).toBeCloseTo(3.3, 12);
});

test("No ideal solubility is given for electrolytes, hydrates, other forms or missing melting data, with the reason", () => {
  const sound = { ...naphthalene, electrolyte: false, solvated: false, sameForm: true };
  expect(whyNoIdealSolubility(sound)).toBeUndefined();
  expect(whyNoIdealSolubility({ ...sound, electrolyte: true })).toBe("the solute is an electrolyte");
  expect(whyNoIdealSolubility({ ...sound, solvated: true })).toBe("the solid is a hydrate or solvate");
  expect(whyNoIdealSolubility({ ...sound, sameForm: false })).toBe("the melting data belong to another solid form");
  expect(whyNoIdealSolubility({ ...sound, meltingPointK: Number.NaN })).toBe("no melting point is known");
  expect(whyNoIdealSolubility({ ...sound, fusionEnthalpy: Number.NaN })).toBe("no enthalpy of fusion is known");
});

test("A temperature above the melting point is refused with both figures", () => {
  expect(() => idealSolubility(naphthalene, 360)).toThrow(/T = 360 K .* melting point, 353.4 K/);
  expect(() => idealSolubility({ ...naphthalene, fusionEnthalpy: 0 }, 300)).toThrow(/enthalpy of fusion 0 J\/mol/);
});
