import { expect, test } from "vitest";
import { exchanges } from "../../pipeline/fit/mixtures/mixture-exchange.ts";
import type { MixturePoints } from "../../pipeline/fit/mixtures/mixture-points.ts";

// Ethanol and water: densities at 20 °C of OIML R 22 (789.24 and 998.20 kg/m3), molar masses by IUPAC 2021 weights.
const ETHANOL = { molarMass: 46.069, density20C: 789.24 };
const WATER = { molarMass: 18.015, density20C: 998.2 };

const pointsOf = (fraction: number, moleFraction: number, keepsMoleFraction: 0 | 1) =>
  ({
    n: 1,
    fraction: Float64Array.of(fraction),
    lnValue: Float64Array.of(Math.log(moleFraction)),
    keepsMoleFraction: Uint8Array.of(keepsMoleFraction),
  }) as unknown as MixturePoints;

test("Exchanged masses of 30:70 w/w are 70:30 w/w, exchanged volumes of 30:70 v/v are 70:30 v/v", () => {
  // 30 mL of ethanol weigh 23.677 g beside 69.874 g of water: 25.31 % by mass; 70 mL and 30 mL: 64.85 %.
  const [masses, volumes] = exchanges(pointsOf(23.6772 / (23.6772 + 69.874), 0.01, 1), [ETHANOL, WATER]);
  expect(masses?.fraction(0)).toBeCloseTo(69.874 / (23.6772 + 69.874), 12);
  expect(volumes?.fraction(0)).toBeCloseTo(55.2468 / (55.2468 + 29.946), 12);
});

test("A value reported per mass keeps its mass ratio: its mole fraction follows the solvent's molar mass", () => {
  // 5 g of a solute of 150 g/mol in 100 g of solvent, 20 and 80 g ethanol: x = n/(n + 100/M).
  const moles = 5 / 150;
  const x = (ethanol: number) => moles / (moles + ethanol / 46.069 + (100 - ethanol) / 18.015);
  const [masses] = exchanges(pointsOf(0.2, x(20), 0), [ETHANOL, WATER]);
  expect(Math.log(x(20)) + (masses?.shift(0) ?? Number.NaN)).toBeCloseTo(Math.log(x(80)), 12);
});

test("A mole fraction stays as it was reported, and so does everything where the liquids are not known", () => {
  for (const exchange of exchanges(pointsOf(0.2, 0.01, 1), [ETHANOL, WATER])) expect(exchange.shift(0)).toBe(0);
  const unknown = exchanges(pointsOf(0.2, 0.01, 0), undefined);
  expect(unknown.map(({ of }) => of)).toEqual(["masses"]);
  expect(unknown[0]?.shift(0)).toBe(0);
});
