import { describe, expect, test } from "vitest";
import { bentRows } from "../../pipeline/screen/bent-rows.ts";
import type { OffPoint } from "../../pipeline/screen/point-screen.ts";
import { inputOf, type More, type Reading, type Sources, screened, series, thousandX } from "./support.ts";

const RANGE = [10, 17, 24, 31, 38, 45, 52];
/** Two good sources over the whole range, 2 % apart. */
const others = () => ({ b: series([12, 22, 32, 42, 53]), c: series([9, 19, 29, 39, 51], (value) => 1.02 * value) });
const bent = (by: (celsius: number) => number): Reading[] =>
  series(RANGE, (value, i) => Number((value * Math.exp(by(RANGE[i]!))).toPrecision(4)));
const causes = (a: Reading[], more: More = {}) =>
  screened([{ a, ...others() }], more).map(({ scope, suspectedCause }) => [scope, suspectedCause]);
const hot = (slope: number) => (t: number) => Math.max(0, t - 31) * slope;

describe("a series that leaves the curve of two other sources", () => {
  test("downwards at the hot end, the more so the hotter, lost solute in a cold filter", () => {
    const flags = screened([{ a: bent(hot(-0.045)), ...others() }]);
    expect(flags.map(({ row, suspectedCause }) => [row, suspectedCause])).toEqual([
      [4, "loss on filtration"],
      [5, "loss on filtration"],
      [6, "loss on filtration"],
    ]);
    for (const flag of flags) {
      expect(flag.evidence).toContain("one of the 3 warmest points of a, which leave the curve together");
      expect(flag.lookAt).toContain("filter");
      expect(flag).not.toHaveProperty("proposedValue");
    }
  });

  test("upwards at the hot end lost solvent", () => {
    expect(causes(bent(hot(0.025)))).toEqual(Array(3).fill(["measurement", "solvent lost"]));
  });

  test("downwards or upwards at the cold end was not at equilibrium", () => {
    const cold = (slope: number) => (t: number) => Math.max(0, 31 - t) * slope;
    for (const slope of [-0.03, 0.03])
      expect(causes(bent(cold(slope)))).toEqual(Array(3).fill(["measurement", "not at equilibrium"]));
  });

  test("to stay at one value had everything dissolved", () => {
    const charge = thousandX(34);
    const plateau = series(RANGE, (value, i) =>
      RANGE[i]! > 34 ? Number((charge * (1 + 0.004 * (i % 2))).toFixed(2)) : value,
    );
    expect(causes(plateau)).toEqual(Array(3).fill(["measurement", "everything dissolved"]));
  });

  test("in one point alone shows no pattern", () => {
    const flags = screened([{ a: bent((t) => (t > 50 ? -0.5 : 0)), ...others() }]);
    expect(flags).toMatchObject([{ row: 6, suspectedCause: "no simple cause" }]);
  });

  test("in proportion to the distance from room, on either side of it, had the jacket read for the solution", () => {
    const wide = [1, 8, 15, 22, 29, 36, 43, 50, 57];
    const lag = wide.map((t): Reading => [t, thousandX(t - 0.3 * (t - 22.85))]);
    const three = {
      b: series([2, 12, 22, 32, 42, 55]),
      c: series([0, 9, 19, 29, 39, 51, 58], (value) => 1.01 * value),
      d: series([3, 13, 26, 37, 48, 57], (value) => 0.99 * value),
    };
    // Its other systems show how little the source scatters.
    const sound = { a: series(wide), ...three };
    const [flag] = screened([{ a: lag, ...three }, sound, sound, sound]);
    expect(flag).toMatchObject({
      suspectedCause: "temperature offset",
      causeDetail: "temperatures are off in proportion to their distance from room",
    });
  });

  test("at temperatures too low by a constant took cloud points for clear points, where it says it measured such", () => {
    const wide = [5, 12, 19, 26, 33, 40, 47];
    const cloud = wide.map((t): Reading => [t, thousandX(t + 14)]);
    const sources = {
      a: cloud,
      b: series([2, 12, 22, 32, 42, 55]),
      c: series([4, 9, 19, 29, 39, 51], (value) => 1.01 * value),
    };
    expect(screened([sources], { method: "clear-point" })[0]).toMatchObject({
      scope: "block",
      suspectedCause: "cloud point for clear point",
    });
    expect(screened([sources], { method: "gravimetric" })[0]?.suspectedCause).not.toBe("cloud point for clear point");
  });
});

describe("a series that no other source can check", () => {
  const long = [5, 11, 17, 23, 29, 35, 41, 47, 53];
  const turned = (slope: number) => series(long, (value, i) => value * Math.exp(hot(slope)(long[i]!)));

  test("names no loss where the curve itself may turn, and asks for one ruling, not for three", () => {
    const flags = screened([{ a: turned(0.06) }]).filter(({ code }) => code === "off-curve");
    expect(flags.length).toBeGreaterThanOrEqual(3);
    for (const flag of flags) expect(["loss on filtration", "solvent lost"]).not.toContain(flag.suspectedCause);
    expect(flags.filter(({ severity }) => severity === "blocking")).toHaveLength(1);
    expect(flags[0]?.evidence).toContain("where no other source reaches");
  });
});

describe("two sources that part at one end", () => {
  test("are laid out as a conflict at that end, and no row is blamed", () => {
    // One turns up by as much as the other turns down, so neither is the smoother one; other systems show both scatter little.
    const sound = { a: series([5, 15, 25, 35, 45]), b: series([8, 18, 28, 38, 48]) };
    const half = (temperatures: readonly number[], side: number) =>
      series(temperatures, (value, i) => value * Math.exp(side * hot(0.013)(temperatures[i]!)));
    const parting = {
      a: half([10, 15, 20, 25, 30, 35, 40, 45, 50], 1),
      b: half([12, 17, 22, 27, 32, 37, 42, 47, 52], -1),
    };
    const flags = screened([parting, sound, sound]);
    expect(flags).toMatchObject([{ scope: "system", code: "sources-disagree", severity: "blocking", system: 0 }]);
    expect(flags[0]).not.toHaveProperty("suspectedCause");
    expect(flags[0]?.evidence).toMatch(
      /^a and b agree but for one end: from 40\.0 °C to 50\.0 °C they part, at the end a lies \d\d % above the curve that follows b, and no third source says which is right$/,
    );
  });

  test("have no quarrel where they read the same at the same temperatures: it is the curve that turns", () => {
    const both = [5, 12, 19, 26, 33, 40, 47, 54];
    const turned = (step: number) =>
      series(both, (value, i) => Number((step * value * Math.exp(i > 5 ? 0.4 : 0)).toPrecision(4)));
    const sound = { a: series([5, 15, 25, 35, 45]), b: series([8, 18, 28, 38, 48]) };
    const flags = screened([{ a: turned(1), b: turned(1.004) }, sound, sound]);
    expect(flags.filter(({ code }) => code === "sources-disagree")).toEqual([]);
    for (const flag of flags.filter(({ code }) => code === "off-curve"))
      expect(flag.evidence).toContain("another source reads the same: the curve itself may turn there");
  });
});

describe("a bent series held against two others", () => {
  const off = (point: number): OffPoint => ({
    system: 0,
    point,
    z: 5,
    threshold: 0.1,
    impossible: false,
    unsure: false,
  });
  const verdict = {
    cause: "solvent lost",
    detail: "",
    probability: 0.9,
    proposedValue: undefined,
    lookAt: "",
  } as const;
  const moved = new Map([
    [0, { by: 0.01, leftZ: 1 }],
    [4, { by: 0.2, leftZ: 5 }],
    [5, { by: 0.2, leftZ: 0.5 }],
    [6, { by: 0.4, leftZ: 0.5 }],
  ]);
  const rows = (sources: Sources) =>
    bentRows(inputOf([sources]), [off(0), off(6)], { verdict, explained: new Set([6]), moved });

  test("has those rows flagged that the bend moves materially, not the sound end of its own", () => {
    const { added, cleared } = rows({ a: series(RANGE), ...others() });
    expect(added.map(({ point, bentBy }) => [point, bentBy])).toEqual([[5, 0.2]]);
    expect([...cleared]).toEqual([0]);
  });

  test("stays as it was found where a single other source cannot say where the curve lies", () => {
    const { added, cleared } = rows({ a: series(RANGE), b: others().b });
    expect(added).toEqual([]);
    expect(cleared.size).toBe(0);
  });
});
