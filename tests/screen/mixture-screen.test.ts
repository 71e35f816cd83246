import { expect, test } from "vitest";
import { seededRandom } from "../../pipeline/numerics/random.ts";
import type { Flag } from "../../pipeline/records/fits.ts";
import { DEFAULT_SETTINGS } from "../../pipeline/records/generated/collection.ts";
import { judgeByMixtures, type MixtureJudgement } from "../../pipeline/screen/mixture-screen.ts";
import { fitsOf, type MixtureReading, mixtureWorld, readingsOn, textbook } from "../fit/mixture-support.ts";

const TEMPERATURES = [278.15, 288.15, 298.15, 308.15, 318.15, 328.15];
const COMPOSITIONS = [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1];
const truth = textbook([5, -2200, 1, -2900, 1300, 400]);

function scattered(seed: number, compositions = COMPOSITIONS, temperatures = TEMPERATURES): MixtureReading[] {
  const { normal } = seededRandom(seed);
  return readingsOn(compositions, temperatures, truth, () => 0.02 * normal());
}

function judged(readings: readonly MixtureReading[], told: ReadonlySet<number> = new Set()): MixtureJudgement {
  const world = mixtureWorld(readings);
  const input = {
    ...{ table: world.table, systems: world.systems, fits: world.robust, scales: world.scales, curves: [] },
    about: world.systems.map(
      () => ({ kind: "general", boilingPointK: Number.NaN, freezingPointK: Number.NaN }) as const,
    ),
    ...{ sourceNames: ["first", "second"], settings: DEFAULT_SETTINGS },
    ...{ reread: () => undefined, inReportedUnit: () => undefined },
  };
  return judgeByMixtures({ ...input, mixtures: fitsOf(world).models }, told);
}

const moved = (readings: readonly MixtureReading[], fraction: number, by: number) =>
  readings.map((one) => (one.fraction === fraction ? { ...one, lnValue: one.lnValue + by } : one));
const only = (flags: readonly Flag[]): Flag => {
  expect(flags).toHaveLength(1);
  return flags[0] as Flag;
};

test("Sound mixtures raise nothing, whether measured at many temperatures or at two", () => {
  for (let seed = 1; seed <= 5; seed++) {
    expect(judged(scattered(seed)).flags).toEqual([]);
    const few = [...scattered(seed, [0, 0.2, 0.4, 0.6, 0.8, 1]), ...scattered(seed + 50, [0.3, 0.5], [293.15, 313.15])];
    const { flags, judged: systems } = judged(few);
    expect(flags).toEqual([]);
    expect(systems.size).toBe(2);
  }
});

test("A composition whose whole series lies 40 % low is told, which its own curve cannot show", () => {
  const flag = only(judged(moved(scattered(2), 0.4, Math.log(0.6))).flags);
  expect(flag).toMatchObject({
    ...{ scope: "block", code: "off-mixture", severity: "notice", source: 0, system: 4 },
    suspectedCause: "no simple cause",
  });
  expect(flag.evidence).toMatch(/^(39|4[01]) % below what the other 10 compositions of first \+ second say \(z = -\d/);
  expect(judged(moved(scattered(2), 0.4, Math.log(0.6)), new Set([4])).flags).toEqual([]);
});

test("A proportion written the wrong way round is named as such", () => {
  const { normal } = seededRandom(5);
  const turned = readingsOn(
    [0.2],
    TEMPERATURES,
    (_, T) => truth(0.8, T),
    () => 0.02 * normal(),
  );
  const readings = [...scattered(5).filter(({ fraction }) => fraction !== 0.2), ...turned];
  const flag = only(judged(readings).flags);
  expect(flag.suspectedCause).toBe("composition mix-up");
  expect(flag.severity).toBe("blocking");
  expect(flag.causeDetail).toBe("the masses of the two solvents exchanged: 80:20 w/w instead of 20:80 w/w");
  expect(flag.causeProbability).toBeGreaterThan(0.9);
  expect(flag.evidence).toContain("read as 80:20 w/w it lies");
});

test("A series a factor ten high has the power of ten named", () => {
  const flag = only(judged(moved(scattered(6), 0.6, Math.LN10)).flags);
  expect(flag.suspectedCause).toBe("power of ten");
  expect(flag.severity).toBe("blocking");
  expect(flag.causeDetail).toBe("values are 10^1 of what they should be");
});

test("One value of a composition measured at two temperatures is judged by the other compositions", () => {
  const few = scattered(51, [0.3], [293.15, 313.15]);
  const readings = [
    ...scattered(1, [0, 0.1, 0.2, 0.4, 0.6, 0.8, 1]),
    few[0]!,
    { ...few[1]!, lnValue: few[1]!.lnValue + 0.5 },
  ];
  const { flags } = judged(readings);
  const flag = only(flags);
  expect(flag.code).toBe("off-mixture");
  expect(flag.severity).toBe("notice");
  expect(flag.system).toBe(3);
});

test("A single measurement at a composition of its own is told as a measurement", () => {
  const single = { fraction: 0.3, temperatureK: 303.15, lnValue: truth(0.3, 303.15) - 0.6 };
  const flag = only(judged([...scattered(1, [0, 0.1, 0.2, 0.4, 0.6, 0.8, 1]), single]).flags);
  expect(flag.scope).toBe("measurement");
  expect(flag.evidence).toContain("45 % below");
});

test("A composition where two sources agree is not judged by the model, and ends never are", () => {
  const second = scattered(31, [0.4]).map((one) => ({ ...one, source: 1 }));
  expect(judged(moved([...scattered(2), ...second], 0.4, 0.5)).flags).toEqual([]);
  expect(judged(moved(scattered(2), 0, 0.5)).flags).toEqual([]);
});
