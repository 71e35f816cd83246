import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import fc from "fast-check";
import { expect, test } from "vitest";
import { seededRandom } from "../../pipeline/numerics/random.ts";
import type { MixtureModel } from "../../pipeline/records/mixtures.ts";
import { fitsOf, type MixtureReading, mixtureWorld, modelOf, readingsOn, textbook } from "./mixture-support.ts";

const COMPOSITIONS = [0, 0.1, 0.2, 0.35, 0.5, 0.65, 0.8, 0.9, 1];
const TEMPERATURES = [278.15, 288.15, 298.15, 308.15, 318.15, 328.15];
const COEFFICIENTS = [5, -2200, 2, -2900, 1700, 600, 300];
const truth = textbook(COEFFICIENTS);

/** Readings with normal scatter of 2 %, the same ones for the same seed. */
function scattered(seed: number, compositions = COMPOSITIONS): MixtureReading[] {
  const normal = seededRandom(seed).normal;
  return readingsOn(compositions, TEMPERATURES, truth, () => 0.02 * normal());
}

/** Largest difference of two surfaces, ln value, over the compositions and three temperatures. */
function furthest(model: MixtureModel, other: (w: number, T: number) => number, compositions = COMPOSITIONS): number {
  return Math.max(
    ...compositions.flatMap((w) => [283.15, 303.15, 323.15].map((T) => Math.abs(model.evaluate(w, T) - other(w, T)))),
  );
}

test("Exact values give the seven coefficients back", () => {
  const model = modelOf(mixtureWorld(readingsOn(COMPOSITIONS, TEMPERATURES, truth)));
  expect(model.coefficients.map(({ name }) => name)).toEqual(["A1", "B1", "A2", "B2", "J0", "J1", "J2"]);
  model.coefficients.forEach(({ value }, i) => {
    expect(Math.abs(value / (COEFFICIENTS[i] as number) - 1)).toBeLessThan(1e-9);
  });
  expect(model.rmsd).toBeLessThan(1e-10);
});

test("With a scatter of 2 % the surface is the true one within its limits, and each coefficient within 4 of its u", () => {
  for (const seed of [1, 2, 3, 4, 5]) {
    const model = modelOf(mixtureWorld(scattered(seed)));
    expect(furthest(model, truth)).toBeLessThan(0.03);
    for (const w of COMPOSITIONS) {
      const half = model.limits(w, 300).curve;
      expect(Math.abs(model.evaluate(w, 300) - truth(w, 300))).toBeLessThan(half);
      // The usual offset of a single source, 4 %, is in them; far wider would be of no use.
      expect(half).toBeGreaterThan(0.078);
      expect(half).toBeLessThan(0.13);
    }
    if (model.coefficients.length < COEFFICIENTS.length) continue;
    model.coefficients.forEach(({ value, standardUncertainty }, i) => {
      expect(Math.abs(value - (COEFFICIENTS[i] as number))).toBeLessThan(4 * standardUncertainty);
    });
  }
});

test("A log-linear mixture gets no term J, and few compositions no more terms than they allow", () => {
  const plain = textbook([5, -2200, 2, -2900]);
  const normal = seededRandom(7).normal;
  const model = modelOf(mixtureWorld(readingsOn(COMPOSITIONS, TEMPERATURES, plain, () => 0.02 * normal())));
  expect(model.coefficients).toHaveLength(4);
  const few = [0, 0.5, 1];
  expect(modelOf(mixtureWorld(scattered(1, few))).coefficients).toHaveLength(5);
  expect(modelOf(mixtureWorld(scattered(1, [0, 0.3, 0.7, 1]))).coefficients.length).toBeLessThan(7);
});

test("Three compositions leave what lies between them uncertain, nine do not", () => {
  const half = (compositions: number[]) => modelOf(mixtureWorld(scattered(2, compositions))).limits(0.25, 303.15).curve;
  expect(half([0, 0.5, 1])).toBeGreaterThan(2 * half([0, 0.125, 0.25, 0.375, 0.5, 0.625, 0.75, 0.875, 1]));
});

test("The maximum between the ends is found where it is", () => {
  // Equal pure solvents and J0 alone: the maximum is at half and half, J0/(4 T) above the ends.
  const symmetric = textbook([3, -2400, 3, -2400, 900]);
  const model = modelOf(mixtureWorld(readingsOn([0, 0.25, 0.5, 0.75, 1], TEMPERATURES, symmetric)));
  expect(model.innerMaxima.map(({ temperatureK }) => temperatureK)).toEqual([283.15, 293.15, 303.15, 313.15, 323.15]);
  for (const { temperatureK: T, fraction, rise, fractionLow, fractionHigh } of model.innerMaxima) {
    expect(fraction).toBeCloseTo(0.5, 5);
    expect(rise).toBeCloseTo(900 / (4 * T), 6);
    expect(fractionLow).toBeLessThan(0.5);
    expect(fractionHigh).toBeGreaterThan(0.5);
  }
  // Unequal ends: d ln x/dw = (ln x1 - ln x2) + (J0/T)(1 - 2 w) = 0 at w = 1/2 + T (ln x1 - ln x2)/(2 J0).
  const [A1, B1, A2, B2, J0] = [4, -2400, 3, -2400, 1500];
  const skewed = modelOf(
    mixtureWorld(readingsOn([0, 0.2, 0.4, 0.6, 0.8, 1], TEMPERATURES, textbook([A1, B1, A2, B2, J0]))),
  );
  for (const { temperatureK: T, fraction } of skewed.innerMaxima)
    expect(fraction).toBeCloseTo(0.5 + (T * (A1 - A2)) / (2 * J0), 5);
});

test("A solubility that only rises with the composition, or by no more than its limits, has no inner maximum", () => {
  expect(
    modelOf(mixtureWorld(readingsOn(COMPOSITIONS, TEMPERATURES, textbook([5, -2200, 2, -2900])))).innerMaxima,
  ).toEqual([]);
  const faint = textbook([3, -2400, 3, -2400, 30]);
  const normal = seededRandom(9).normal;
  const model = modelOf(mixtureWorld(readingsOn(COMPOSITIONS, TEMPERATURES, faint, () => 0.02 * normal())));
  expect(model.innerMaxima).toEqual([]);
});

test("One composition off by a factor 1.5 does not move the surface, wherever between the ends it lies", () => {
  const sound = modelOf(mixtureWorld(scattered(3)));
  for (const off of COMPOSITIONS.slice(1, -1)) {
    const readings = scattered(3).map((reading) =>
      reading.fraction === off ? { ...reading, lnValue: reading.lnValue + Math.log(1.5) } : reading,
    );
    const model = modelOf(mixtureWorld(readings));
    expect(furthest(model, sound.evaluate)).toBeLessThan(0.015);
    const member = model.members.find(({ fraction }) => Math.abs(fraction - off) < 1e-9)!;
    expect(member.nUsed).toBe(0);
    expect(member.whyNot).toMatch(/^its values lie (4[5-9]|5[0-5]) % above what the other compositions say$/);
    expect(Math.abs(member.leftOut!.meanDeviation - Math.log(1.5))).toBeLessThan(3 * member.leftOut!.meanSd);
    expect(model.members.filter(({ nUsed }) => nUsed === 0)).toHaveLength(1);
  }
});

test("A pure solvent that is off cannot be judged by the mixtures, and the limits grow instead", () => {
  const readings = scattered(3).map((reading) =>
    reading.fraction === 0 ? { ...reading, lnValue: reading.lnValue + Math.log(1.5) } : reading,
  );
  const model = modelOf(mixtureWorld(readings));
  expect(model.members[0]?.leftOut).toBeUndefined();
  expect(model.limits(0.05, 303.15).curve).toBeGreaterThan(
    1.5 * modelOf(mixtureWorld(scattered(3))).limits(0.05, 303.15).curve,
  );
});

test("One value in ten off by a factor 1.3 to 3 either way hardly moves the surface", () => {
  for (const seed of [11, 12, 13]) {
    const readings = scattered(seed).map((reading, i) => {
      if ((7 * i + seed) % 10 !== 0) return reading;
      const factor = 1.3 + ((i * 0.37) % 1.7);
      return { ...reading, lnValue: reading.lnValue + (i % 2 === 0 ? 1 : -1) * Math.log(factor) };
    });
    const model = modelOf(mixtureWorld(readings));
    expect(furthest(model, truth)).toBeLessThan(0.03);
    expect(model.n).toBeGreaterThanOrEqual(42);
  }
});

test("Many points of one source outvote neither of two that agree", () => {
  const [a, b, c] = [seededRandom(21).normal, seededRandom(22).normal, seededRandom(23).normal];
  const many = TEMPERATURES.flatMap((T) => [T, T + 2, T + 4]);
  const readings = [
    ...readingsOn(COMPOSITIONS, TEMPERATURES, truth, () => 0.02 * a()).map((r) => ({ ...r, source: 0 })),
    ...readingsOn(COMPOSITIONS, TEMPERATURES, truth, () => 0.02 * b()).map((r) => ({ ...r, source: 1 })),
    ...readingsOn(COMPOSITIONS, many, truth, () => 0.4 + 0.02 * c()).map((r) => ({ ...r, source: 2 })),
  ];
  const model = modelOf(mixtureWorld(readings));
  // The third lies 0.4 off; two sources of 54 points each leave 2 % of it.
  expect(furthest(model, truth)).toBeLessThan(0.04);
  expect(model.nSources).toBe(2);
});

test("Exact compositions of the rows are used, not those of the systems", () => {
  // Within one system rows differ by up to 0.2 wt %, where ln x rises by 8 per unit of mass fraction.
  const steep = textbook([5, -2200, -3, -2200, 1200]);
  const readings = [0, 0.1, 0.3, 0.5, 0.7, 0.9, 1].flatMap((w) =>
    TEMPERATURES.map((temperatureK, j) => {
      const fraction = w > 0 && w < 1 ? w + 0.002 * ((j % 3) - 1) : w;
      return { fraction, temperatureK, lnValue: steep(fraction, temperatureK) };
    }),
  );
  const world = mixtureWorld(readings);
  expect(world.systems).toHaveLength(7);
  const model = modelOf(world);
  expect(model.rmsd).toBeLessThan(1e-9);
  expect(model.coefficients[4]?.value).toBeCloseTo(1200, 5);
});

test("Outside its compositions and temperatures the surface says nothing", () => {
  const model = modelOf(mixtureWorld(scattered(1, [0.1, 0.3, 0.5, 0.7])));
  fc.assert(
    fc.property(fc.double({ noNaN: false }), fc.double({ min: 200, max: 400 }), (w, T) => {
      const limits = model.temperaturesAt(w);
      const inside = limits !== undefined && T >= limits[0] - 1e-9 && T <= limits[1] + 1e-9;
      if (inside) {
        expect(model.evaluate(w, T)).toBeLessThan(0);
        expect(model.limits(w, T).newMeasurement).toBeGreaterThan(model.limits(w, T).curve);
      } else {
        expect(() => model.evaluate(w, T)).toThrow(RangeError);
        expect(() => model.limits(w, T)).toThrow(RangeError);
      }
    }),
  );
  expect(model.notices).toContain("second alone is not among the data: its coefficients describe the mixtures only");
  expect(() => model.evaluate(0, 300)).toThrow(RangeError);
  expect(() => model.evaluate(0.3, 278)).toThrow(RangeError);
});

test("The surface does not depend on the order of rows or the numbering of sources", () => {
  const readings = scattered(4).map((reading, i) => ({ ...reading, source: i % 2 }));
  const model = modelOf(mixtureWorld(readings));
  const turned = modelOf(mixtureWorld([...readings].reverse().map((r) => ({ ...r, source: 1 - r.source }))));
  expect(furthest(turned, model.evaluate)).toBeLessThan(1e-9);
  expect(turned.limits(0.3, 300).curve).toBeCloseTo(model.limits(0.3, 300).curve, 9);
});

test("Too few compositions or temperatures, and nothing but contradictions, give a reason and no model", () => {
  const reason = (readings: MixtureReading[]) => fitsOf(mixtureWorld(readings)).without.map((one) => one.reason);
  expect(reason(scattered(1, [0.3, 0.6]))).toEqual(["2 compositions where a surface needs 3"]);
  expect(reason(readingsOn(COMPOSITIONS, [298.15, 303.15], truth))).toEqual(["2 temperatures where a surface needs 3"]);
  const { normal } = seededRandom(8);
  const noise = readingsOn(COMPOSITIONS, TEMPERATURES, () => -4 + 2 * normal());
  expect(reason(noise)[0]).toMatch(/^the compositions contradict each other: no surface holds half of the \d+ points$/);
  // Pure solvents alone are no mixture, and systems of another solid form none of this one.
  expect(fitsOf(mixtureWorld(scattered(1, [0, 1])))).toEqual({ models: [], without: [] });
  const mixed = mixtureWorld(scattered(1));
  const other = mixed.systems.map((system, i) =>
    i % 2 === 0 ? system : { ...system, identity: { ...system.identity, solidForm: "form II" } },
  );
  const { models } = fitsOf({ ...mixed, systems: other });
  expect(models.map(({ solidForm, members }) => [solidForm, members.length])).toEqual([
    ["form II", 4],
    ["unspecified", 5],
  ]);
});

test("Hostile numbers never crash the fit", () => {
  const strange = [1e-300, 1, 1e5, 1e9, Number.NaN, Number.POSITIVE_INFINITY];
  for (const temperatureK of strange)
    for (const lnValue of [-700, -1e-12, Number.NaN]) {
      const readings = [
        ...scattered(1),
        { fraction: 0.5, temperatureK, lnValue },
        { fraction: 0.42, temperatureK, lnValue },
      ];
      const model = modelOf(mixtureWorld(readings));
      expect(furthest(model, truth)).toBeLessThan(0.05);
      expect(model.members.every(({ fraction }) => fraction >= 0 && fraction <= 1)).toBe(true);
    }
});

// Warfarin sodium 2-propanol solvate in (2-propanol + 4.7 to 9.5 wt % acetone) + heptane, x in 1e-3 at mass fractions of
// heptane of 0.088 to 0.471, 281 to 322 K: M. V. George De la Rosa et al., J. Chem. Eng. Data 64 (2019) 1399-1413,
// doi 10.1021/acs.jced.8b00977, Table 9, with the values its authors calculate composition by composition.
const WARFARIN = new URL(
  "../../../shared/reference/solubility/04a_warfarin_solvate_mixed_solvents.csv",
  import.meta.url,
);

interface Published extends MixtureReading {
  readonly calculated: number;
}

function published(table: string): Published[] {
  const lines = readFileSync(fileURLToPath(WARFARIN), "utf8").split(/\r?\n/);
  return lines.flatMap((line) => {
    const [, name, rest] = /,(T\d),"[^"]*",(.*)$/.exec(line) ?? [];
    if (name !== table) return [];
    const [heptane = 0, temperatureK = 0, x = 0, calculated = 0] = (rest ?? "").split(",").map(Number);
    return [{ fraction: 1 - heptane, temperatureK, lnValue: Math.log(x / 1000), calculated: calculated / 1000 }];
  });
}

const absent = !existsSync(fileURLToPath(WARFARIN));

test.skipIf(absent)(
  "Warfarin solvate over heptane: one surface of five coefficients is as good as five curves of three",
  () => {
    const readings = published("T9");
    expect(readings).toHaveLength(33);
    const model = modelOf(mixtureWorld(readings));
    expect(model.n).toBe(33);
    // The authors' curves, 15 coefficients, reproduce the measurements to 1.0 %.
    expect(model.ardPercent).toBeLessThan(2);
    for (const { fraction, temperatureK, calculated } of readings) {
      const off = model.evaluate(fraction, temperatureK) - Math.log(calculated);
      expect(Math.abs(off)).toBeLessThan(0.05);
      expect(Math.abs(off)).toBeLessThan(model.limits(fraction, temperatureK).curve);
    }
    // Each composition between the ends is predicted by the four others.
    for (const { leftOut } of model.members.slice(1, -1)) {
      expect(leftOut?.n).toBeGreaterThan(4);
      expect(Math.abs(leftOut?.meanDeviation ?? 1)).toBeLessThan(0.04);
      expect(Math.abs(leftOut?.meanDeviation ?? 1)).toBeLessThan(leftOut?.meanSd ?? 0);
    }
    expect(model.innerMaxima).toEqual([]);
  },
);

test.skipIf(absent)(
  "Warfarin solvate over acetone: three compositions carry a surface, with wide limits between them",
  () => {
    const model = modelOf(mixtureWorld(published("T4")));
    expect(model.n).toBe(20);
    expect(model.ardPercent).toBeLessThan(4);
    expect(model.fractionRange).toEqual([1 - 0.148, 1 - 0.047]);
    expect(model.notices).toContain("only 3 compositions: what lies between them rests on the model");
  },
);
