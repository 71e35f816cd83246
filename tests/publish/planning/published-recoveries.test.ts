import { describe, expect, test } from "vitest";
import { type CoolingPlan, equilibriumRecovery, planCooling } from "../../../pipeline/publish/planning/cooling.ts";
import type { Curve } from "../../../pipeline/records/fits.ts";

// g unsolvated per 100 g water: CRC Handbook of Chemistry and Physics, 98th edition (2017), table Aqueous Solubility of
// Inorganic Compounds at Various Temperatures, as read in a public copy of it.
const ANHYDROUS: Readonly<Record<string, Readonly<Record<number, number>>>> = {
  KNO3: { 0: 13.64, 20: 31.93, 60: 109.2, 80: 170.3 },
  KCl: { 0: 27.78, 20: 34.03, 60: 45.77, 80: 51.19 },
  NaCl: { 0: 35.65, 20: 35.89, 60: 37.04, 80: 37.93 },
  NaNO3: { 0: 73.01, 20: 87.27, 60: 123.7, 80: 147.5 },
  NH4Cl: { 0: 29.74, 20: 37.49, 60: 55.01, 80: 65.02 },
  KClO3: { 0: 3.125, 20: 7.227, 60: 23.12, 80: 36.76 },
  K2Cr2O7: { 0: 4.493, 20: 12.23, 60: 46.41, 80: 70.94 },
  H3BO3: { 0: 2.68, 20: 5.009, 60: 14.81, 80: 23.92 },
  "Pb(NO3)2": { 0: 39.78, 20: 55.45, 60: 91.94, 80: 111.5 },
  KBr: { 0: 53.85, 20: 65.02, 60: 85.87, 80: 95.31 },
  AgNO3: { 0: 126.8, 20: 210.6, 60: 446.4, 80: 584.9 },
  "(NH4)2SO4": { 0: 70.36, 20: 75.13, 60: 87.27, 80: 94.17 },
};
const CUSO4 = { 20: 20.05, 80: 56.99 };
const NA2CO3 = { 10: 12.11, 40: 48.81 };

// Yields of an anhydrous solid by 1 - S(cold)/S(hot), percent to two decimals, worked out beforehand from that table.
const YIELDS: readonly (readonly [string, number, number, number])[] = [
  ...(
    [
      ["KNO3", 81.25, 70.76, 91.99],
      ["KCl", 33.52, 25.65, 45.73],
      ["NaCl", 5.38, 3.1, 6.01],
      ["NaNO3", 40.83, 29.45, 50.5],
      ["NH4Cl", 42.34, 31.85, 54.26],
      ["KClO3", 80.34, 68.74, 91.5],
      ["K2Cr2O7", 82.76, 73.65, 93.67],
      ["H3BO3", 79.06, 66.18, 88.8],
      ["Pb(NO3)2", 50.27, 39.69, 64.32],
      ["KBr", 31.78, 24.28, 43.5],
      ["AgNO3", 63.99, 52.82, 78.32],
      ["(NH4)2SO4", 20.22, 13.91, 25.28],
    ] as const
  ).flatMap(([salt, from80to20, from60to20, from80to0]) => [
    [salt, 80, 20, from80to20] as const,
    [salt, 60, 20, from60to20] as const,
    [salt, 80, 0, from80to0] as const,
  ]),
];

const percent = (hot: number, cold: number, factor: number) => {
  const recovery = equilibriumRecovery(hot / 100, cold / 100, factor);
  return recovery === undefined ? undefined : 100 * recovery;
};

describe("the recovery at equilibrium of a cooling crystallisation", () => {
  test.each(YIELDS)("of anhydrous %s from %d to %d °C is %d %%", (salt, hot, cold, expected) => {
    const solubility = ANHYDROUS[salt] as Record<number, number>;
    const found = percent(solubility[hot] as number, solubility[cold] as number, 1);
    expect(Math.abs((found ?? 0) - expected)).toBeLessThan(0.0051);
  });

  test("of copper(II) sulfate pentahydrate from 80 to 20 °C is 73.1 %, for the crystals take water along; not 64.8", () => {
    // M(CuSO4·5H2O) 249.677, M(CuSO4) 159.602 g/mol.
    expect(percent(CUSO4[80], CUSO4[20], 249.677 / 159.602)).toBeCloseTo(73.1, 1);
    expect(percent(CUSO4[80], CUSO4[20], 1)).toBeCloseTo(64.8, 1);
  });

  test("of sodium carbonate decahydrate from 40 to 10 °C is 94.7 %", () => {
    // M(Na2CO3·10H2O) 286.138, M(Na2CO3) 105.988 g/mol.
    expect(percent(NA2CO3[40], NA2CO3[10], 286.138 / 105.988)).toBeCloseTo(94.7, 1);
  });

  test("keeps the balance of solute and of solvent: what crystallises and what stays is what was there", () => {
    const [hot, cold, factor] = [0.5699, 0.2005, 249.677 / 159.602];
    const crystals = (equilibriumRecovery(hot, cold, factor) as number) * factor * hot;
    const soluteLeft = hot - crystals / factor;
    const waterLeft = 1 - crystals * (1 - 1 / factor);
    expect(soluteLeft / waterLeft).toBeCloseTo(cold, 12);
  });

  test("is undefined where the crystals would melt in their own solvent", () => {
    // With R = 2.7 the crystals hold 1.7 g of water per 1 g of solute: at a cold solubility of 1/1.7 they are the liquor.
    expect(equilibriumRecovery(0.7, 1 / 1.7, 2.7)).toBeUndefined();
    expect(equilibriumRecovery(0.7, 0.9, 2.7)).toBeUndefined();
    expect(equilibriumRecovery(0.58, 0.57, 2.7)).toBeGreaterThan(0);
  });
});

/** A plan from values of that table, ln S straight between them: the ends of the range are the ends of the plan. */
function planFrom(
  values: readonly (readonly [celsius: number, percent: number])[],
  form: string,
  massFactor: number,
  transition?: number,
): CoolingPlan {
  const kelvin = (celsius: number) => celsius + 273.15;
  const massRatioAt = (T: number) => {
    const i = Math.max(
      1,
      values.findIndex(([celsius]) => T <= kelvin(celsius) + 1e-9),
    );
    const [[t0, s0], [t1, s1]] = [values[i - 1], values[i]] as [readonly [number, number], readonly [number, number]];
    return (s0 / 100) * (s1 / s0) ** ((T - kelvin(t0)) / (t1 - t0));
  };
  const range = [
    kelvin((values[0] as readonly [number, number])[0]),
    kelvin((values.at(-1) as readonly [number, number])[0]),
  ];
  return planCooling({ model: "van 't Hoff", temperatureRangeK: range } as unknown as Curve, {
    ...{ massRatioAt, halfWidthAt: () => 0.01, boilingPointK: kelvin(100), freezingPointK: kelvin(0) },
    ...{ formMeltingPointK: Number.NaN, crystalAt: () => ({ form, massFactor }), solventDensity20C: 998.2 },
    ...{ transitionsK: transition === undefined ? [] : [kelvin(transition)], excessSolventPercent: 10 },
  });
}

describe("a whole plan from values of that table", () => {
  test("of copper(II) sulfate between 20 and 80 °C gives 73.1 % of the pentahydrate", () => {
    const plan = planFrom(
      [
        [20, 20.05],
        [80, 56.99],
      ],
      "pentahydrate",
      249.677 / 159.602,
    );
    expect(plan).toMatchObject({ crystalForm: "pentahydrate", hotK: 353.15, coldK: 293.15 });
    expect(plan.maxRecovery?.value).toBeCloseTo(73.1, 1);
  });

  test("of sodium carbonate between 10 and 40 °C, across its transition at 35 °C, gives 94.7 % of the decahydrate", () => {
    const plan = planFrom(
      [
        [10, 12.11],
        [40, 48.81],
      ],
      "decahydrate",
      286.138 / 105.988,
      35,
    );
    expect(plan).toMatchObject({ crystalForm: "decahydrate", hotK: 313.15, coldK: 283.15 });
    expect(plan.maxRecovery?.value).toBeCloseTo(94.7, 1);
  });
});
