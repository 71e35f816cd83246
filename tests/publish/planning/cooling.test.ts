import { describe, expect, test } from "vitest";
import { type CoolingConditions, planCooling } from "../../../pipeline/publish/planning/cooling.ts";
import type { Curve } from "../../../pipeline/records/fits.ts";

const C = (celsius: number) => celsius + 273.15;

/** A curve of which planning needs the model and the range only. */
const curveOver = (low: number, high: number, model: Curve["model"] = "van 't Hoff") =>
  ({ model, temperatureRangeK: [C(low), C(high)] }) as unknown as Curve;

/** An invented solute that doubles every 20 K, 10 g/100 g at 25 °C, in a solvent like ethanol; some of it changed. */
function conditions(given: Partial<CoolingConditions> = {}): CoolingConditions {
  return {
    massRatioAt: (t) => 0.1 * 2 ** ((t - C(25)) / 20),
    halfWidthAt: () => 0.02,
    boilingPointK: C(78),
    freezingPointK: C(-114),
    formMeltingPointK: C(150),
    crystalAt: () => ({ form: "form I", massFactor: 1 }),
    transitionsK: [],
    solventDensity20C: 800,
    excessSolventPercent: 10,
    ...given,
  };
}

const plan = (low: number, high: number, given: Partial<CoolingConditions> = {}) =>
  planCooling(curveOver(low, high), conditions(given));

describe("the ends of a cooling crystallisation (common practice)", () => {
  test.each([
    ["the data", 10, 60, {}, 60, 10],
    ["the boiling point less 10 K", 10, 90, {}, 68, 10],
    ["the melting point of the form less 20 K", 10, 90, { formMeltingPointK: C(70) }, 50, 10],
    ["5 °C, for no plant cools lower without a reason", -10, 60, {}, 60, 5],
    ["the freezing point plus 5 K", 0, 60, { freezingPointK: C(6) }, 60, 11],
    ["the data alone where the solvent's points are unknown", 10, 90, { boilingPointK: Number.NaN }, 90, 10],
  ] as [string, number, number, Partial<CoolingConditions>, number, number][])(
    "are set by %s",
    (_, low, high, given, hot, cold) => {
      const found = plan(low, high, given);
      expect(found.blankReason).toBe("");
      expect([(found.hotK ?? 0) - 273.15, (found.coldK ?? 0) - 273.15].map((t) => Number(t.toFixed(9)))).toEqual([
        hot,
        cold,
      ]);
    },
  );

  test("are where the solubility is highest, not where it is hottest, for a solute that falls on heating", () => {
    // Highest at 40 °C, like sodium sulfate above its transition.
    const massRatioAt = (t: number) => 0.4 - 0.0002 * (t - C(40)) ** 2;
    const found = plan(5, 68, { massRatioAt });
    expect((found.hotK ?? 0) - 273.15).toBeCloseTo(40, 0);
    expect(found.hotMassRatio).toBeCloseTo(0.4, 4);
  });
});

describe("a cooling plan is left blank, with the reason in words, where", () => {
  test.each([
    ["the usable span is below 20 K", () => plan(40, 59), /span/],
    [
      "the data are of one temperature",
      () => planCooling(curveOver(25, 25, "constant"), conditions()),
      /one temperature/,
    ],
    ["heating does not raise the solubility", () => plan(5, 60, { massRatioAt: (t) => 30 / t }), /does not rise/],
    ["the solid at the cold end cannot be told", () => plan(5, 60, { crystalAt: () => undefined }), /solid/],
    [
      "the hot solution would hold less solvent than its crystals: they melt in their own on the way up",
      () =>
        plan(5, 60, { massRatioAt: (t) => 0.3 + (t - C(5)) / 150, crystalAt: () => ({ form: "h", massFactor: 2.7 }) }),
      /melts in its crystal solvent/,
    ],
    [
      "the crystals would melt in their crystal solvent",
      () =>
        plan(5, 60, { massRatioAt: (t) => 0.6 + (t - C(5)) / 500, crystalAt: () => ({ form: "h", massFactor: 2.7 }) }),
      /melts in its crystal solvent/,
    ],
  ] as const)("%s", (_, made, reason) => {
    const found = made();
    expect(found.blankReason).toMatch(reason);
    expect([found.maxRecovery, found.workingRecovery, found.solventMLPerG]).toEqual([undefined, undefined, undefined]);
  });
});

describe("where the solubility is highest within 5 K of a transition", () => {
  const peak = (belowPerK: number, abovePerK: number) => (t: number) =>
    0.3 - (t < C(40) ? belowPerK * (C(40) - t) : abovePerK * (t - C(40)));

  test.each([
    ["above the transition, where the solubility falls the slower", 0.005, 0.001, 45],
    ["below the transition, where that is the higher", 0.001, 0.005, 35],
  ])("the hot end lies 5 K %s", (_, belowPerK, abovePerK, hot) => {
    const found = plan(5, 68, { massRatioAt: peak(belowPerK, abovePerK), transitionsK: [C(40)] });
    expect(found.blankReason).toBe("");
    expect((found.hotK ?? 0) - 273.15).toBeCloseTo(hot, 9);
    expect(found.hotMassRatio).toBeCloseTo(peak(belowPerK, abovePerK)(C(hot)), 9);
  });

  test("it keeps clear of a second transition 8 K away as well", () => {
    const found = plan(5, 68, { massRatioAt: peak(0.005, 0.001), transitionsK: [C(40), C(48)] });
    expect((found.hotK ?? 0) - 273.15).toBeCloseTo(53, 9);
  });

  test("there is no plan where that leaves less than 20 K", () => {
    expect(plan(5, 28, { transitionsK: [C(26)] }).blankReason).toMatch(/span 5\.0 °C to 21\.0 °C/);
  });
});

test("an end moves past two transitions whose bands overlap", () => {
  expect(plan(5, 60, { transitionsK: [C(51), C(58)] })).toMatchObject({ hotK: C(46), coldK: C(5), blankReason: "" });
});

test("an end within 5 K of a transition moves 5 K away from it, into the range", () => {
  expect(plan(5, 60, { transitionsK: [C(57)] })).toMatchObject({ hotK: C(52), coldK: C(5), blankReason: "" });
  expect(plan(5, 60, { transitionsK: [C(0.1)] })).toMatchObject({ hotK: C(60), coldK: C(5.1), blankReason: "" });
});

describe("the figures of a cooling plan", () => {
  // By hand for 60 to 20 °C: S doubles every 20 K, S(60) = 0.33636, S(20) = 0.084090 g/g.
  const found = plan(20, 60);

  test("give the recovery at equilibrium: 75 % where the solubility falls to a quarter", () => {
    expect(found.maxRecovery?.value).toBeCloseTo(75, 9);
    expect(found.hotMassRatio).toBeCloseTo(0.336359, 6);
    expect(found.coldMassRatio).toBeCloseTo(0.0840896, 7);
  });

  test("carry the limits of both ends: 2 % each in ln S, independent, are 0.707 % of the recovery", () => {
    // d(1 - c/h) = (c/h) x sqrt(0.02^2 + 0.02^2) = 0.25 x 0.02828.
    const { value = 0, low = 0, high = 0 } = found.maxRecovery ?? {};
    expect(value - low).toBeCloseTo(100 * 0.25 * 0.02 * Math.SQRT2, 3);
    expect(high - value).toBeCloseTo(100 * 0.25 * 0.02 * Math.SQRT2, 3);
  });

  test("give the recovery at 10 % excess solvent, and what is lost to the liquor", () => {
    expect(found.workingRecovery).toBeCloseTo(100 * (1 - 0.25 * 1.1), 9);
    expect(found.lossPercent).toBeCloseTo(27.5, 9);
  });

  test("give the solvent to add at 20 °C for each gram charged", () => {
    // 1.1/0.336359 g of solvent of 0.8 g/mL.
    expect(found.solventMLPerG).toBeCloseTo(1.1 / 0.336359 / 0.8, 4);
  });

  test("give the solids content at the cold end, and the temperature at which the solution is just saturated", () => {
    expect(found.solidsPercent).toBeCloseTo((100 * 0.725) / (1 + 1.1 / 0.336359), 4);
    // 20 K per factor of 2: the working solution saturates 20 log2(1.1) K below the hot end.
    expect((found.saturationK ?? 0) - 273.15).toBeCloseTo(60 - 20 * Math.log2(1.1), 4);
  });

  test("count the crystals' own solvent in what is to be added: a hydrate needs less", () => {
    // R = 1.25: 1 g of crystals brings 0.8 g of solute and 0.2 g of solvent; 0.8 x 1.1/0.336359 - 0.2 g to add.
    const hydrate = plan(20, 60, { crystalAt: () => ({ form: "hydrate", massFactor: 1.25 }) });
    expect(hydrate.solventMLPerG).toBeCloseTo((0.8 * (1.1 / 0.336359) - 0.2) / 0.8, 4);
    expect(hydrate.maxRecovery?.value).toBeGreaterThan(75);
    expect(hydrate.crystalForm).toBe("hydrate");
  });

  test("leave the volume empty where the density of the solvent is not known", () => {
    expect(plan(20, 60, { solventDensity20C: Number.NaN }).solventMLPerG).toBeUndefined();
  });

  test("warn of a thick slurry over 25 % of solids, and of one that may not stir over 35 %", () => {
    const times = (factor: number) => plan(20, 60, { massRatioAt: (t) => factor * 0.1 * 2 ** ((t - C(25)) / 20) });
    expect(times(1).cautions).toEqual([]);
    expect(times(2).solidsPercent).toBeGreaterThan(25);
    expect(times(2).cautions.join()).toMatch(/25 % solids/);
    expect(times(5).solidsPercent).toBeGreaterThan(35);
    expect(times(5).cautions.join()).toMatch(/may not stir/);
  });

  test("never promise more than everything, nor less than nothing", () => {
    const steep = plan(20, 60, { massRatioAt: (t) => 1e-4 * 10 ** ((t - C(20)) / 10), halfWidthAt: () => 3 });
    expect(steep.maxRecovery?.high).toBeLessThanOrEqual(100);
    const flat = plan(20, 60, { massRatioAt: (t) => 0.1 * 1.001 ** (t - C(20)), halfWidthAt: () => 0.5 });
    expect(flat.maxRecovery?.low).toBeGreaterThanOrEqual(0);
    expect(flat.workingRecovery).toBe(0);
  });
});
